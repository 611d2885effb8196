package render

import (
	"math"

	"packrise/solver/section"
)

const pi = math.Pi

// View maps millimetres to pixels: centre of the picture in mm, pixels per mm, size in pixels. y is up in mm and down in pixels.
type View struct {
	CX, CY  float64
	PxPerMM float64
	W, H    int
}

// ToPx maps mm to pixels; ToMM is its inverse.
func (v View) ToPx(p section.Point) (x, y float64) {
	return float64(v.W)/2 + (p.X-v.CX)*v.PxPerMM, float64(v.H)/2 - (p.Y-v.CY)*v.PxPerMM
}

// ToMM maps pixels to mm.
func (v View) ToMM(x, y float64) section.Point {
	return section.Point{X: v.CX + (x-float64(v.W)/2)/v.PxPerMM, Y: v.CY - (y-float64(v.H)/2)/v.PxPerMM}
}

// ZoomAt returns the view magnified by factor with the point under pixel (x, y) staying there.
func (v View) ZoomAt(x, y, factor float64) View {
	p := v.ToMM(x, y)
	v.PxPerMM *= factor
	q := v.ToMM(x, y)
	v.CX += p.X - q.X
	v.CY += p.Y - q.Y
	return v
}

// Pan returns the view with its content moved by (dx, dy) pixels.
func (v View) Pan(dx, dy float64) View {
	v.CX -= dx / v.PxPerMM
	v.CY += dy / v.PxPerMM
	return v
}

// emptyPxPerMM is the magnification of a picture with nothing in it.
const emptyPxPerMM = 10

// FitView returns the view that shows all shapes with a margin for labels.
func FitView(shapes []section.Shape, w, h int, st Style) View {
	w, h = max(w, 1), max(h, 1)
	v := View{PxPerMM: emptyPxPerMM, W: w, H: h}
	b := boxOf(shapes)
	if b.empty() {
		return v
	}
	v.PxPerMM = 0
	for _, m := range fitMargins(float64(w), float64(h), outlineOf(shapes).rect != nil, st) {
		k := min((float64(w)-2*m.side)/max(b.x1-b.x0, 1e-6), (float64(h)-m.top-m.bottom)/max(b.y1-b.y0, 1e-6))
		if k > v.PxPerMM {
			v.PxPerMM, v.CX = k, (b.x0+b.x1)/2
			v.CY = (b.y0+b.y1)/2 + (m.top-m.bottom)/2/k
		}
	}
	return v
}

// margins is room in pixels left round the section.
type margins struct{ side, top, bottom float64 }

// fitMargins returns the ways to leave room for labels: at the sides, or above and below. Round sections leave their corners
// free as well, so they need less. The scale in mm stands below at the left.
func fitMargins(w, h float64, rect bool, st Style) []margins {
	k := st.k()
	side, share := 84*k, 0.14
	if rect {
		side, share = 136*k, 0.2
	}
	if w < 320*k {
		share = 0.04
	}
	least := min(10*k, 0.05*w)
	top, bottom := min(20*k, h*0.06), min(36*k, h*0.12)
	high := min(64*k, h*0.16)
	return []margins{{max(least, min(side, share*w)), top, bottom}, {least, high, high}}
}

// box is an upright rectangle, in mm or pixels.
type box struct{ x0, y0, x1, y1 float64 }

func noBox() box { return box{math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)} }

func (b box) empty() bool { return !(b.x0 <= b.x1 && b.y0 <= b.y1) }

func (b box) with(c box) box {
	return box{min(b.x0, c.x0), min(b.y0, c.y0), max(b.x1, c.x1), max(b.y1, c.y1)}
}

func (b box) grown(d float64) box { return box{b.x0 - d, b.y0 - d, b.x1 + d, b.y1 + d} }

func (b box) meets(c box) bool { return b.x0 < c.x1 && c.x0 < b.x1 && b.y0 < c.y1 && c.y0 < b.y1 }

func (b box) within(c box) bool {
	return b.x0 >= c.x0 && b.y0 >= c.y0 && b.x1 <= c.x1 && b.y1 <= c.y1
}

func boxAround(x, y, r float64) box { return box{x - r, y - r, x + r, y + r} }

// boxOf returns the box in mm around all shapes.
func boxOf(shapes []section.Shape) box {
	b := noBox()
	for _, s := range shapes {
		b = b.with(shapeBox(s))
	}
	if o := outlineOf(shapes); o.known() {
		b = b.with(o.box())
	}
	return b
}

// shapeBox returns the box in mm around one shape, empty if it has no size.
func shapeBox(s section.Shape) box {
	if s.Width > 0 && s.Height > 0 {
		t := s.OuterR()
		return box{s.At.X, s.At.Y, s.At.X + s.Width, s.At.Y + s.Height}.grown(t)
	}
	if n := len(s.Loops); n > 0 {
		return loopBox(s.Loops[n-1])
	}
	if r := s.OuterR(); r > 0 {
		return boxAround(s.At.X, s.At.Y, r)
	}
	return noBox()
}
