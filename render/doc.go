// Package render owns pictures: a section and its field onto one small drawing interface with back ends, palettes, label
// placement, the mm ↔ pixel transform that hit tests share. It must not know Fyne or formulas.
package render
