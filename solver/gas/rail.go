package gas

import (
	"math"
	"slices"
)

// rail is a patch of the outline or of a rim, from −1 to 1.
type rail struct {
	mid, half, centre complex128
	normal            complex128 // in the middle, where it looks to
	r, arc            float64    // of an arc: radius, negative if it bulges where it looks to, and half its angle
	length            float64
}

// newRail takes a patch that looks to the left of its run, as an outline's do, or to the right.
func newRail(s *Segment, left bool) rail {
	p := rail{mid: scale(0.5, s.A+s.B), half: scale(0.5, s.B-s.A), centre: s.Centre}
	h := size(p.half)
	p.length, p.normal = 2*h, scale(1/h, complex(-imag(p.half), real(p.half)))
	if s.R > 0 {
		p.r = s.R
		p.arc = math.Asin(math.Min(1, h/s.R))
		p.length = 2 * p.arc * s.R
	}
	if !left {
		p.normal, p.r = -p.normal, -p.r
	}
	return p
}

// at returns a point of the patch and the normal there.
func (p *rail) at(t float64) (z, normal complex128) {
	if p.arc == 0 {
		return p.mid + scale(t, p.half), p.normal
	}
	sin, cos := math.Sincos(p.arc * t)
	normal = p.normal * complex(cos, sin)
	return p.centre - scale(p.r, normal), normal
}

// over returns the place on the patch, −1 to 1, that lies nearest to z, and how far off z is.
func (p *rail) over(z complex128) (t, far float64) {
	n := complex(real(p.normal), -imag(p.normal))
	if p.arc == 0 {
		w := (z - p.mid) * n
		half := p.half * n
		return imag(w) / imag(half), real(w)
	}
	v := z - p.centre
	w := -v * n
	if p.r < 0 {
		w = -w
	}
	return math.Atan2(imag(w), real(w)) / p.arc, p.r - math.Copysign(size(v), p.r)
}

// fringe is half of the range about the end of a surface near by, in distances, over which what is seen of it changes most.
const fringe = 4

// stopsOn are the places on a patch of disc i, or of the outline with i = −1, at which it is divided besides.
func (e *Enclosure) stopsOn(p *rail, i int) []float64 {
	var at []float64
	wide := 0.0
	add := func(z complex128) {
		t, far := p.over(z)
		if far > closeBy*p.length || math.Abs(t) > 2 {
			return
		}
		for _, d := range [3]float64{-wide, 0, wide} { // what is seen changes over about so much
			if t := t + d*far/p.length; t > -1 && t < 1 {
				at = append(at, t)
			}
		}
	}
	for j := range e.discs {
		d := &e.discs[j]
		if j == i || size(d.C-p.mid) > d.R+p.length {
			continue
		}
		if wide = 0; i >= 0 || e.bodies[j] != nil {
			wide = fringe
		}
		for _, z := range e.endsOf(j) {
			add(z)
		}
		if b := e.bodies[j]; b != nil {
			for k := range b.strokes {
				if s := &b.strokes[k]; s.R > 0 {
					add(p.facing(s.Centre, s.R))
				}
			}
			continue
		}
		add(p.facing(d.C, d.R))
	}
	if i >= 0 {
		for k := range e.out.Segments {
			add(e.out.Segments[k].B)
		}
	}
	slices.Sort(at)
	return at
}

// facing is the point of a circle that comes nearest to the patch.
func (p *rail) facing(c complex128, r float64) complex128 {
	if p.arc == 0 {
		return c - scale(r, p.normal)
	}
	v := c - p.centre
	return c + scale(math.Copysign(r, p.r)/math.Max(size(v), 1e-300), v)
}
