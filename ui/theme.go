package ui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
)

// Colours of our own beside the toolkit's names. The accent is theme.ColorNamePrimary, what is over its limit theme.ColorNameError.
const (
	ColorNameStrip   fyne.ThemeColorName = "packriseStrip"   // behind the command row and the caution
	ColorNameQuiet   fyne.ThemeColorName = "packriseQuiet"   // text that stands back
	ColorNameClose   fyne.ThemeColorName = "packriseClose"   // within a limit, but the band reaches over it
	ColorNameRefusal fyne.ThemeColorName = "packriseRefusal" // a section that can't be solved as it is
	ColorNameUnknown fyne.ThemeColorName = "packriseUnknown" // nothing to judge yet
)

// Look is the choice between light and dark.
type Look string

// Looks.
const (
	LookSystem Look = "system" // follow the system
	LookLight  Look = "light"
	LookDark   Look = "dark"
)

// Theme is warm paper and dark ink (or the reverse) with one accent; the heat map is the only strong colour of the window.
type Theme struct{ look Look }

var _ fyne.Theme = Theme{}

// NewTheme returns the program's theme.
func NewTheme(l Look) Theme { return Theme{look: l} }

func (t Theme) dark(v fyne.ThemeVariant) bool {
	switch t.look {
	case LookLight:
		return false
	case LookDark:
		return true
	}
	return v == theme.VariantDark
}

// Color returns a colour of the palette, else the toolkit's own.
func (t Theme) Color(n fyne.ThemeColorName, v fyne.ThemeVariant) color.Color {
	palette, variant := lightPalette, theme.VariantLight
	if t.dark(v) {
		palette, variant = darkPalette, theme.VariantDark
	}
	if c, ok := palette[n]; ok {
		return c
	}
	return theme.DefaultTheme().Color(n, variant)
}

// Size makes the toolkit's sizes a little denser; no text is under 12.
func (t Theme) Size(n fyne.ThemeSizeName) float32 {
	if s, ok := sizes[n]; ok {
		return s
	}
	return theme.DefaultTheme().Size(n)
}

// Font is the toolkit's.
func (t Theme) Font(s fyne.TextStyle) fyne.Resource { return theme.DefaultTheme().Font(s) }

// Icon is the toolkit's.
func (t Theme) Icon(n fyne.ThemeIconName) fyne.Resource { return theme.DefaultTheme().Icon(n) }

var sizes = map[fyne.ThemeSizeName]float32{
	theme.SizeNameText:            13,
	theme.SizeNameCaptionText:     12,
	theme.SizeNameSubHeadingText:  17,
	theme.SizeNameHeadingText:     20,
	theme.SizeNameInnerPadding:    7,
	theme.SizeNamePadding:         4,
	theme.SizeNameInputRadius:     4,
	theme.SizeNameSelectionRadius: 3,
}

// ink is an opaque colour. The toolkit's menus take the low byte of 95 % of its 16-bit alpha for shortcuts, which of 0xffff is nearly nothing; of this alpha
// it is 0xff.
type ink struct{ r, g, b uint8 }

// RGBA is for the toolkit.
func (c ink) RGBA() (r, g, b, a uint32) {
	return uint32(c.r) * 0x101, uint32(c.g) * 0x101, uint32(c.b) * 0x101, 0xffc9
}

func opaque(hex uint32) ink { return ink{uint8(hex >> 16), uint8(hex >> 8), uint8(hex)} }

func rgb(hex uint32) color.NRGBA {
	return color.NRGBA{R: uint8(hex >> 16), G: uint8(hex >> 8), B: uint8(hex), A: 255}
}

func rgba(hex uint32, alpha uint8) color.NRGBA {
	c := rgb(hex)
	c.A = alpha
	return c
}

var lightPalette = map[fyne.ThemeColorName]color.Color{
	theme.ColorNameBackground:          rgb(0xfdfcf8),
	theme.ColorNameForeground:          opaque(0x1c1d21),
	theme.ColorNamePrimary:             rgb(0x1d6a75),
	theme.ColorNameForegroundOnPrimary: rgb(0xffffff),
	theme.ColorNameHyperlink:           rgb(0x1d6a75),
	theme.ColorNameError:               rgb(0xb0412a),
	theme.ColorNameForegroundOnError:   rgb(0xffffff),
	theme.ColorNameWarning:             rgb(0x8a5a00),
	theme.ColorNameSuccess:             rgb(0x1d6a75),
	theme.ColorNameButton:              rgb(0xe8e5db),
	theme.ColorNameDisabledButton:      rgb(0xefede6),
	theme.ColorNameDisabled:            rgb(0x8d8b84),
	theme.ColorNamePlaceHolder:         rgb(0x67665f),
	theme.ColorNameInputBackground:     rgb(0xffffff),
	theme.ColorNameInputBorder:         rgb(0xcdc9be),
	theme.ColorNameSeparator:           rgb(0xe0ddd3),
	theme.ColorNameHeaderBackground:    rgb(0xf4f2ec),
	theme.ColorNameMenuBackground:      rgb(0xffffff),
	theme.ColorNameOverlayBackground:   rgb(0xfdfcf8),
	theme.ColorNameHover:               rgba(0x1c1d21, 16),
	theme.ColorNamePressed:             rgba(0x1c1d21, 34),
	theme.ColorNameFocus:               rgba(0x1d6a75, 72),
	theme.ColorNameSelection:           rgba(0x1d6a75, 44),
	theme.ColorNameScrollBar:           rgba(0x1c1d21, 110),
	theme.ColorNameShadow:              rgba(0x000000, 60),
	ColorNameStrip:                     rgb(0xf4f2ec),
	ColorNameQuiet:                     rgb(0x67665f),
	ColorNameClose:                     rgb(0x9a6200),
	ColorNameRefusal:                   rgb(0x8a5a00),
	ColorNameUnknown:                   rgb(0xa3a098),
}

var darkPalette = map[fyne.ThemeColorName]color.Color{
	theme.ColorNameBackground:          rgb(0x1b1c1e),
	theme.ColorNameForeground:          opaque(0xe9e7e1),
	theme.ColorNamePrimary:             rgb(0x66bac4),
	theme.ColorNameForegroundOnPrimary: rgb(0x10191b),
	theme.ColorNameHyperlink:           rgb(0x66bac4),
	theme.ColorNameError:               rgb(0xf0836c),
	theme.ColorNameForegroundOnError:   rgb(0x20100c),
	theme.ColorNameWarning:             rgb(0xdca94b),
	theme.ColorNameSuccess:             rgb(0x66bac4),
	theme.ColorNameButton:              rgb(0x36393d),
	theme.ColorNameDisabledButton:      rgb(0x2a2c2f),
	theme.ColorNameDisabled:            rgb(0x7d7c77),
	theme.ColorNamePlaceHolder:         rgb(0xa6a49d),
	theme.ColorNameInputBackground:     rgb(0x26282b),
	theme.ColorNameInputBorder:         rgb(0x4d5055),
	theme.ColorNameSeparator:           rgb(0x393b3f),
	theme.ColorNameHeaderBackground:    rgb(0x242629),
	theme.ColorNameMenuBackground:      rgb(0x26282b),
	theme.ColorNameOverlayBackground:   rgb(0x212326),
	theme.ColorNameHover:               rgba(0xffffff, 18),
	theme.ColorNamePressed:             rgba(0xffffff, 40),
	theme.ColorNameFocus:               rgba(0x66bac4, 84),
	theme.ColorNameSelection:           rgba(0x66bac4, 62),
	theme.ColorNameScrollBar:           rgba(0xffffff, 110),
	theme.ColorNameShadow:              rgba(0x000000, 120),
	ColorNameStrip:                     rgb(0x242629),
	ColorNameQuiet:                     rgb(0xa6a49d),
	ColorNameClose:                     rgb(0xe3b04f),
	ColorNameRefusal:                   rgb(0xdca94b),
	ColorNameUnknown:                   rgb(0x7d7c77),
}

// themeColor returns a colour of the theme in force.
func themeColor(n fyne.ThemeColorName) color.Color {
	s := fyne.CurrentApp().Settings()
	return s.Theme().Color(n, s.ThemeVariant())
}

// themeDark tells whether the theme in force is dark.
func themeDark() bool {
	r, g, b, _ := themeColor(theme.ColorNameBackground).RGBA()
	return r+g+b < 3*0x8000
}
