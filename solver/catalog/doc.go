// Package catalog is the typed, checked look-up of conductors, wire types, materials, finished wires and holders. Every row
// has its source. It reads assets/catalog/*.yaml once, refuses a row that can't be right, and answers from memory. It must not
// know documents.
package catalog
