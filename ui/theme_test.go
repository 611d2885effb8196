package ui

import (
	"image/color"
	"math"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
)

// contrast is the contrast ratio of WCAG 2.1, "relative luminance" and "contrast ratio".
func contrast(a, b color.Color) float64 {
	la, lb := luminance(a), luminance(b)
	return (max(la, lb) + 0.05) / (min(la, lb) + 0.05)
}

func luminance(c color.Color) float64 {
	r, g, b, _ := c.RGBA()
	lin := func(v uint32) float64 {
		s := float64(v) / 0xffff
		if s <= 0.03928 {
			return s / 12.92
		}
		return math.Pow((s+0.055)/1.055, 2.4)
	}
	return 0.2126*lin(r) + 0.7152*lin(g) + 0.0722*lin(b)
}

func TestContrastFormula(t *testing.T) {
	// black on white is 21:1 by the standard's own definition
	if c := contrast(color.Black, color.White); math.Abs(c-21) > 1e-9 {
		t.Errorf("black on white %g, want 21", c)
	}
}

// TestTextIsReadable asks for 4.5:1 for text and 3:1 for lines that carry meaning (WCAG 2.1, 1.4.3 and 1.4.11).
func TestTextIsReadable(t *testing.T) {
	for _, look := range []Look{LookLight, LookDark} {
		th := NewTheme(look)
		col := func(n fyne.ThemeColorName) color.Color { return th.Color(n, theme.VariantLight) }
		pairs := []struct {
			fore, back fyne.ThemeColorName
			need       float64
		}{
			{theme.ColorNameForeground, theme.ColorNameBackground, 4.5},
			{theme.ColorNameForeground, ColorNameStrip, 4.5},
			{theme.ColorNameForeground, theme.ColorNameButton, 4.5},
			{theme.ColorNameForeground, theme.ColorNameMenuBackground, 4.5},
			{theme.ColorNameForeground, theme.ColorNameInputBackground, 4.5},
			{theme.ColorNamePlaceHolder, theme.ColorNameInputBackground, 4.5},
			{ColorNameQuiet, theme.ColorNameBackground, 4.5},
			{ColorNameQuiet, ColorNameStrip, 4.5},
			{theme.ColorNameError, theme.ColorNameBackground, 4.5},
			{theme.ColorNamePrimary, theme.ColorNameBackground, 4.5},
			{theme.ColorNameWarning, theme.ColorNameBackground, 4.5},
			{theme.ColorNameForegroundOnPrimary, theme.ColorNamePrimary, 4.5},
			{theme.ColorNameForegroundOnError, theme.ColorNameError, 4.5},
			{ColorNameRefusal, theme.ColorNameBackground, 3},
			{ColorNameClose, theme.ColorNameBackground, 4.5},
		}
		for _, p := range pairs {
			if c := contrast(col(p.fore), col(p.back)); c < p.need {
				t.Errorf("%s: %s on %s has contrast %.2f, need %g", look, p.fore, p.back, c, p.need)
			}
		}
	}
}

func TestNoTextUnderTwelve(t *testing.T) {
	th := NewTheme(LookSystem)
	for _, n := range []fyne.ThemeSizeName{
		theme.SizeNameText, theme.SizeNameCaptionText, theme.SizeNameHeadingText, theme.SizeNameSubHeadingText,
	} {
		if s := th.Size(n); s < 12 {
			t.Errorf("%s is %g px", n, s)
		}
	}
}

func TestLookOverridesSystem(t *testing.T) {
	for _, c := range []struct {
		look    Look
		variant fyne.ThemeVariant
		dark    bool
	}{
		{LookSystem, theme.VariantLight, false},
		{LookSystem, theme.VariantDark, true},
		{LookLight, theme.VariantDark, false},
		{LookDark, theme.VariantLight, true},
	} {
		if luminance(NewTheme(c.look).Color(theme.ColorNameBackground, c.variant)) < 0.5 != c.dark {
			t.Errorf("%s with system variant %d: dark is not %v", c.look, c.variant, c.dark)
		}
	}
}

// TestShortcutsInMenusShow repeats what the toolkit does with the colour of text for shortcuts (widget/menu_item.go of v2.7.1).
func TestShortcutsInMenusShow(t *testing.T) {
	for _, look := range []Look{LookLight, LookDark} {
		_, _, _, a := NewTheme(look).Color(theme.ColorNameForeground, theme.VariantLight).RGBA()
		if low := uint8(uint32(float32(a) * 0.95)); low < 230 {
			t.Errorf("%s: shortcuts are painted with alpha %d of 255", look, low)
		}
		if a>>8 != 0xff {
			t.Errorf("%s: text is painted with alpha %d of 255", look, a>>8)
		}
	}
}
