// Package keep sees to it that no work is lost: side files that hold unsaved work, notes that tell who has a design open, and prints by which a file
// that was changed by another is known. It works on paths and bytes and must not know designs or widgets. All of it touches the disk: call it beside
// the window.
package keep
