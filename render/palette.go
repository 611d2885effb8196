package render

import "image/color"

// Style chooses light or dark and the device scale (1 = 96 dpi) by which text and line widths grow.
type Style struct {
	Dark  bool
	Scale float64
}

// k returns the device scale, 1 when none is given.
func (st Style) k() float64 {
	if st.Scale > 0 {
		return st.Scale
	}
	return 1
}

// Palette is the set of quiet colours around the heat map; the window uses the same.
type Palette struct {
	Paper  color.NRGBA // behind everything
	Sheet  color.NRGBA // behind text panes, a little lighter than paper
	Panel  color.NRGBA // strips: the tool line, the caution
	Ink    color.NRGBA // text
	Quiet  color.NRGBA // lesser text
	Rule   color.NRGBA // hairlines and frames
	Accent color.NRGBA // the one accent: selection, links
	Wash   color.NRGBA // behind the selected row
	Over   color.NRGBA // state colours; they never speak without the word
	Close  color.NRGBA
	Within color.NRGBA

	Line, Halo        color.NRGBA // outlines of the section and the light seam round them
	Metal, Insulation color.NRGBA // parts without a temperature
	Wall, Fill        color.NRGBA // the holder's wall and what is between the parts, without a temperature
	Veil              color.NRGBA // over what is out of date
}

func rgb(v uint32) color.NRGBA {
	return color.NRGBA{uint8(v >> 16), uint8(v >> 8), uint8(v), 255}
}

func alpha(c color.NRGBA, a float64) color.NRGBA {
	c.A = uint8(float64(c.A)*a + 0.5)
	return c
}

var lightPalette = Palette{
	Paper: rgb(0xfdfcf8), Sheet: rgb(0xffffff), Panel: rgb(0xf4f2ec), Ink: rgb(0x1c1d21), Quiet: rgb(0x67665f), Rule: rgb(0xe0ddd3),
	Accent: rgb(0x1d6a75), Wash: rgb(0xe0eeef), Over: rgb(0xb0412a), Close: rgb(0x8a5a00), Within: rgb(0x1d6a75),
	Line: rgb(0x1a1c20), Halo: rgb(0xffffff),
	Metal: rgb(0xc9c2b4), Insulation: rgb(0xefece3), Wall: rgb(0xdcd7ca), Fill: rgb(0xf8f6ef),
	Veil: color.NRGBA{0xe8, 0xe5, 0xdc, 0xb0},
}

var darkPalette = Palette{
	Paper: rgb(0x1b1c1e), Sheet: rgb(0x212326), Panel: rgb(0x26282b), Ink: rgb(0xe9e7e1), Quiet: rgb(0xa6a49d), Rule: rgb(0x393b3f),
	Accent: rgb(0x66bac4), Wash: rgb(0x21393f), Over: rgb(0xf0836c), Close: rgb(0xdca94b), Within: rgb(0x66bac4),
	Line: rgb(0x14161a), Halo: rgb(0xf4f2ec),
	Metal: rgb(0x8d897f), Insulation: rgb(0x5a5b5c), Wall: rgb(0x494b4e), Fill: rgb(0x2e3034),
	Veil: color.NRGBA{0x2b, 0x2d, 0x31, 0xb0},
}

// Colors returns the palette of the style.
func (st Style) Colors() Palette {
	if st.Dark {
		return darkPalette
	}
	return lightPalette
}
