package ui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
)

// denseTheme is the theme in force with less padding in entries: so little in a row of the list that they fit, a little more in fields.
type denseTheme struct{ pad float32 }

const (
	rowPad   = 3
	fieldPad = 5
)

func inForce() fyne.Theme { return fyne.CurrentApp().Settings().Theme() }

func (denseTheme) Color(n fyne.ThemeColorName, v fyne.ThemeVariant) color.Color {
	return inForce().Color(n, v)
}
func (denseTheme) Font(s fyne.TextStyle) fyne.Resource     { return inForce().Font(s) }
func (denseTheme) Icon(n fyne.ThemeIconName) fyne.Resource { return inForce().Icon(n) }

func (t denseTheme) Size(n fyne.ThemeSizeName) float32 {
	switch n {
	case theme.SizeNameInnerPadding:
		return t.pad
	case theme.SizeNamePadding:
		return 2
	}
	return inForce().Size(n)
}
