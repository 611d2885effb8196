// Package ui is the only room that imports Fyne's widgets: window, section canvas, ladder, details, wire list, dialogs,
// menus. It must not know file formats, formulas or tables.
package ui
