// Package section owns the document: holder, parts, builds, loads, surroundings, materials; its YAML codec with version and
// migration; problems of form with line and key; edits as functions from document to document; history. It must not know
// Fyne, the catalogue's tables or numerics.
package section
