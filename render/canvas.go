package render

import (
	"image"
	"image/color"
)

// Canvas is the small drawing interface that back ends fill: raster (NewRaster), text (NewRecorder), and whatever writes
// vectors. Coordinates are pixels, x to the right, y down; angles are radians from +x, growing clockwise as the picture is seen.
//
// MoveTo, LineTo, Arc, Circle and Close build one path of any number of pieces; Fill and Stroke paint it and forget it.
type Canvas interface {
	Size() (w, h float64)

	// Push remembers the clip and Pop returns to it. Clip narrows drawing to a rectangle (whole pixels on a raster).
	Push()
	Pop()
	Clip(x, y, w, h float64)

	MoveTo(x, y float64)
	LineTo(x, y float64)
	Arc(x, y, r, from, to float64)
	Circle(x, y, r float64)
	Close()

	// Fill paints the inside by the even-odd rule: two circles are a ring.
	Fill(c color.NRGBA)
	Stroke(p Pen)

	// Text writes one line with its anchor point at (x, y); MeasureText returns the width that it takes.
	Text(s string, x, y float64, f Font)
	MeasureText(s string, f Font) float64

	// Image puts a picture with its upper left corner at (x, y), one of its pixels on one pixel.
	Image(img *image.RGBA, x, y float64)
}

// Pen is how a line looks. Lengths are pixels; Dash alternates on and off, nil is a whole line.
type Pen struct {
	Width float64
	Color color.NRGBA
	Dash  []float64
	Round bool // round ends and corners
}

// Font is how a line of text looks. Size is the em in pixels. AX puts the anchor at the left (0) … right (1) of the line, AY
// at the baseline (0), half the height of capitals (0.5) or their top (1). A Halo with alpha is drawn HaloWidth wide behind.
type Font struct {
	Size      float64
	Bold      bool
	Color     color.NRGBA
	AX, AY    float64
	Halo      color.NRGBA
	HaloWidth float64
}

// capHeight of the Go fonts, in em.
const capHeight = 0.72

// rectangle adds an upright rectangle to the path.
func rectangle(c Canvas, x, y, w, h float64) {
	c.MoveTo(x, y)
	c.LineTo(x+w, y)
	c.LineTo(x+w, y+h)
	c.LineTo(x, y+h)
	c.Close()
}

// rounded adds a rectangle with round corners to the path.
func rounded(c Canvas, x, y, w, h, r float64) {
	const q = pi / 2
	r = min(r, w/2, h/2)
	c.MoveTo(x+r, y)
	c.LineTo(x+w-r, y)
	c.Arc(x+w-r, y+r, r, -q, 0)
	c.LineTo(x+w, y+h-r)
	c.Arc(x+w-r, y+h-r, r, 0, q)
	c.LineTo(x+r, y+h)
	c.Arc(x+r, y+h-r, r, q, 2*q)
	c.LineTo(x, y+r)
	c.Arc(x+r, y+r, r, 2*q, 3*q)
	c.Close()
}

// line strokes one straight line.
func line(c Canvas, x0, y0, x1, y1 float64, p Pen) {
	c.MoveTo(x0, y0)
	c.LineTo(x1, y1)
	c.Stroke(p)
}

// Inset returns a canvas that draws into a rectangle of c, clipped to it, with its origin in the upper left corner. Call done
// when the drawing in it is finished.
func Inset(c Canvas, x, y, w, h float64) (inner Canvas, done func()) {
	c.Push()
	c.Clip(x, y, w, h)
	return &inset{Canvas: c, x: x, y: y, w: w, h: h}, c.Pop
}

// inset moves everything by (x, y).
type inset struct {
	Canvas
	x, y, w, h float64
}

func (i *inset) Size() (w, h float64)          { return i.w, i.h }
func (i *inset) Clip(x, y, w, h float64)       { i.Canvas.Clip(x+i.x, y+i.y, w, h) }
func (i *inset) MoveTo(x, y float64)           { i.Canvas.MoveTo(x+i.x, y+i.y) }
func (i *inset) LineTo(x, y float64)           { i.Canvas.LineTo(x+i.x, y+i.y) }
func (i *inset) Arc(x, y, r, from, to float64) { i.Canvas.Arc(x+i.x, y+i.y, r, from, to) }
func (i *inset) Circle(x, y, r float64)        { i.Canvas.Circle(x+i.x, y+i.y, r) }

func (i *inset) Text(s string, x, y float64, f Font) { i.Canvas.Text(s, x+i.x, y+i.y, f) }
func (i *inset) Image(img *image.RGBA, x, y float64) { i.Canvas.Image(img, x+i.x, y+i.y) }
