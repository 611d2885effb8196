package render

import (
	"image"
	"io"

	"packrise/solver/section"
)

// Field is what a picture asks of a solution. Lengths in mm, temperatures in °C.
type Field interface {
	Bounds() (x0, y0, x1, y1 float64)
	// Row fills dst with temperatures at (x0 + i·dx, y), NaN outside. Safe for concurrent use.
	Row(dst []float64, y, x0, dx float64)
}

// Scene is everything that a picture shows.
type Scene struct {
	Shapes   []section.Shape   // the holder first
	Readings []section.Reading // empty: not solved
	Field    Field             // nil: outlines only
	AmbientC float64
	Title    string
	Answer   string   // the sentence
	Assumed  string   // its second line
	Notes    []string // what is assumed or left out
	Status   string   // the quiet line below: heat in and out, numerical error, time
	Caution  string

	Selected []string // ringed
	Pointed  string   // lit up
	Stale    bool     // the readings belong to an older section: greyed
	Bad      []string // ids that overlap or lie outside: marked
}

// View maps millimetres to pixels: centre of the picture in mm, pixels per mm, size in pixels. y is up in mm and down in pixels.
type View struct {
	CX, CY  float64
	PxPerMM float64
	W, H    int
}

// Style chooses light or dark and the device scale (1 = 96 dpi) by which text and line widths grow.
type Style struct {
	Dark  bool
	Scale float64
}

// Scale maps temperature to colour: from Low to High °C.
type Scale struct{ Low, High float64 }

// ScaleOf returns the automatic scale of a scene: ambient to the hottest reading or nearby limit, at round numbers.
func ScaleOf(s Scene) Scale { panic("render: not built") }

// FitView returns the view that shows all shapes with a margin for labels.
func FitView(shapes []section.Shape, w, h int, st Style) View { panic("render: not built") }

// ToPx maps mm to pixels; ToMM is its inverse.
func (v View) ToPx(p section.Point) (x, y float64) { panic("render: not built") }

// ToMM maps pixels to mm.
func (v View) ToMM(x, y float64) section.Point { panic("render: not built") }

// Hit returns the id of the innermost part at p (mm), "" for none.
func Hit(shapes []section.Shape, p section.Point) string { panic("render: not built") }

// HeatLayer paints the heat map alone (transparent outside the section) into a picture of the view's size; coarse samples every few pixels and interpolates, for dragging.
func HeatLayer(s Scene, v View, sc Scale, coarse bool) *image.RGBA { panic("render: not built") }

// SectionLayer paints what lies over the heat map: outlines with halo, isotherms, ids, labels on leaders, hatching, selection,
// scale in mm.
func SectionLayer(c Canvas, s Scene, v View, sc Scale, st Style) { panic("render: not built") }

// Ladder paints the ladder into the canvas: colour scale with unit, rungs, limits, ambient. It returns where each rung is, for hit tests.
func Ladder(c Canvas, s Scene, sc Scale, st Style) []Rung { panic("render: not built") }

// Rung is one line of the ladder in pixels.
type Rung struct {
	IDs    []string // several when equal ones are folded
	Y0, Y1 float64
}

// Canvas is the small drawing interface that back ends fill. Coordinates are pixels, y down.
type Canvas interface {
	Size() (w, h float64)
}

// WritePNG draws the whole picture (sentence, ladder, section, status, notes, caution) at w × h pixels.
func WritePNG(out io.Writer, s Scene, w, h int, st Style) error { panic("render: not built") }
