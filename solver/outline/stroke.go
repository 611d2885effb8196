package outline

import (
	"math"
	"math/cmplx"
)

// Stroke is a straight piece of an outline (R = 0) or an arc about Centre, run counterclockwise.
type Stroke struct {
	From, To, Centre complex128
	R                float64
}

// span is the angle of an arc, 0 of a straight piece.
func (s *Stroke) span() float64 {
	if s.R == 0 {
		return 0
	}
	a := cmplx.Phase((s.To - s.Centre) / (s.From - s.Centre))
	if a < 0 {
		a += 2 * math.Pi
	}
	return a
}

// Span is the angle of an arc, 0 of a straight piece.
func (s *Stroke) Span() float64 { return s.span() }

// Length of the stroke, m.
func (s *Stroke) Length() float64 {
	if s.R > 0 {
		return s.R * s.span()
	}
	return cmplx.Abs(s.To - s.From)
}

// At returns the point at share u in 0 … 1 of the length.
func (s *Stroke) At(u float64) complex128 {
	switch {
	case u <= 0:
		return s.From
	case u >= 1:
		return s.To
	case s.R > 0:
		return s.Centre + (s.From-s.Centre)*cmplx.Rect(1, u*s.span())
	}
	return s.From + scale(u, s.To-s.From)
}

// Loop is a closed convex outline, run counterclockwise.
type Loop []Stroke

// draw joins arcs of radius r about centres, in counterclockwise order, by the lines that touch them; turns holds the directions of the outward
// normals of those lines, the line from arc i to arc i+1 in turns[i].
func draw(centres []complex128, r, turns []float64) Loop {
	var l Loop
	n := len(centres)
	for i, c := range centres {
		in, out := cmplx.Rect(1, turns[(i+n-1)%n]), cmplx.Rect(1, turns[i])
		a, b := c+scale(r[i], in), c+scale(r[i], out)
		if r[i] > 0 && cmplx.Abs(b-a) > 1e-9*r[i] {
			l = append(l, Stroke{From: a, To: b, Centre: c, R: r[i]})
		}
		next := centres[(i+1)%n] + scale(r[(i+1)%n], out)
		if cmplx.Abs(next-b) > 1e-12 {
			l = append(l, Stroke{From: b, To: next})
		}
	}
	return l.seamless()
}

// seamless lets every stroke begin exactly where the one before ends.
func (l Loop) seamless() Loop {
	for i := range l {
		l[(i+1)%len(l)].From = l[i].To
	}
	return l
}

// Circle of radius r about the origin.
func Circle(r float64) Loop {
	q := math.Pi / 2
	return draw([]complex128{0, 0, 0, 0}, []float64{r, r, r, r}, []float64{q, 2 * q, 3 * q, 4 * q})
}

// Bar is a rectangle of w × h about the origin whose corners are rounded with radius corner, grown by t on all sides: m.
func Bar(w, h, corner, t float64) Loop {
	x, y, r := w/2-corner, h/2-corner, corner+t
	q := math.Pi / 2
	return draw([]complex128{complex(x, -y), complex(x, y), complex(-x, y), complex(-x, -y)}, []float64{r, r, r, r}, []float64{0, q, 2 * q, 3 * q})
}

// Box is a rectangle of w × h with its lower left corner at the origin, grown by t on all sides with square corners: m.
func Box(w, h, t float64) Loop {
	l := Bar(w+2*t, h+2*t, 0, 0)
	l.shift(complex(w/2, h/2))
	return l
}

// Flat is w × h about the origin with half-circle ends on the short sides, grown by t: m.
func Flat(w, h, t float64) Loop { return Bar(w, h, math.Min(w, h)/2, t) }

// Sector is a disc sector of radius r and opening angle (rad, at most π) eroded and then dilated by corner, its apex at the origin and its bisector
// along +x, grown by t: m. MaxCorner bounds corner.
func Sector(r, angle, corner, t float64) Loop {
	h, q := angle/2, math.Pi/2
	polar := math.Max(0, h-math.Asin(math.Min(1, corner/(r-corner))))
	up := cmplx.Rect(r-corner, polar)
	near := complex(corner/math.Sin(h), 0)
	var l Loop
	line := func(a, b complex128, normal float64) {
		n := cmplx.Rect(corner+t, normal)
		l = append(l, Stroke{From: a + n, To: b + n})
	}
	arc := func(c complex128, r, from, to float64) {
		if r > 0 && to-from > 1e-9 {
			l = append(l, Stroke{From: c + cmplx.Rect(r, from), To: c + cmplx.Rect(r, to), Centre: c, R: r})
		}
	}
	line(near, cmplx.Conj(up), -h-q)
	arc(cmplx.Conj(up), corner+t, -h-q, -polar)
	arc(0, r+t, -polar, polar)
	arc(up, corner+t, polar, h+q)
	line(up, near, h+q)
	arc(near, corner+t, h+q, 2*math.Pi-h-q)
	return l.seamless()
}

// MaxCorner is the largest corner radius of a Sector of radius r and opening angle.
func MaxCorner(r, angle float64) float64 {
	s := math.Sin(angle / 2)
	return r * s / (1 + s)
}

func (l Loop) shift(by complex128) {
	for i := range l {
		l[i].From, l[i].To, l[i].Centre = l[i].From+by, l[i].To+by, l[i].Centre+by
	}
}

// Placed returns the loop turned about the origin (rad) and then moved.
func (l Loop) Placed(turn float64, by complex128) Loop {
	out := append(Loop(nil), l...)
	e := cmplx.Rect(1, turn)
	for i := range out {
		s := &out[i]
		s.From, s.To, s.Centre = s.From*e+by, s.To*e+by, s.Centre*e+by
	}
	return out
}

// Perimeter of the loop, m.
func (l Loop) Perimeter() float64 {
	sum := 0.0
	for i := range l {
		sum += l[i].Length()
	}
	return sum
}

// Area (m²) and centroid: the polygon of the strokes' ends and a circular segment on every arc.
func (l Loop) Area() (area float64, centroid complex128) {
	for i := range l {
		s := &l[i]
		cross := real(s.From)*imag(s.To) - imag(s.From)*real(s.To)
		area += cross / 2
		centroid += scale(cross/6, s.From+s.To)
		if a := s.span(); a > 0 {
			seg := s.R * s.R / 2 * (a - math.Sin(a))
			area += seg
			half := math.Sin(a / 2)
			mid := (s.From - s.Centre) * cmplx.Rect(1/s.R, a/2)
			// The centroid of a segment lies at 4R sin³(a/2)/(3(a − sin a)) from the centre.
			centroid += scale(seg, s.Centre) + scale(2*s.R*s.R*s.R*half*half*half/3, mid)
		}
	}
	return area, scale(1/area, centroid)
}

// Polygon returns points along the loop, none farther than sag (m) outside the chords.
func (l Loop) Polygon(sag float64) []complex128 {
	var out []complex128
	for i := range l {
		s := &l[i]
		n := 1
		if a := s.span(); a > 0 {
			n = max(1, int(math.Ceil(a/math.Sqrt(8*sag/s.R))))
		}
		for k := range n {
			out = append(out, s.At(float64(k)/float64(n)))
		}
	}
	return out
}

// Inside tells whether z lies within the loop.
func (l Loop) Inside(z complex128) bool {
	for i := range l {
		s := &l[i]
		if d := z - s.Centre; onRight(s.From, s.To, z) && (s.R == 0 || real(d)*real(d)+imag(d)*imag(d) > s.R*s.R) {
			return false
		}
	}
	return true
}

// sweep is the angle under which z sees the stroke.
func (s *Stroke) sweep(z complex128) float64 {
	a := cmplx.Phase((s.To - z) / (s.From - z))
	if s.R == 0 || a >= 0 {
		return a
	}
	if onRight(s.From, s.To, z) && cmplx.Abs(z-s.Centre) < s.R {
		a += 2 * math.Pi
	}
	return a
}

// onRight tells whether z lies to the right of the line from a to b, or on it.
func onRight(a, b, z complex128) bool {
	d, r := b-a, z-a
	return real(d)*imag(r)-imag(d)*real(r) <= 0
}
