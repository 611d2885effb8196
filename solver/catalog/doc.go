// Package catalog is the typed, checked look-up of conductors, wire types, materials, finished wires and holders. Every row
// has its source. It must not know documents.
package catalog
