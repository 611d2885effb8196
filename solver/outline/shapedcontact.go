package outline

import (
	"math"
	"math/cmplx"
)

// perContact is the longest half of a bend near a contact, over the scale on which the gap opens there; less at a fineness above 1.
const perContact = 1.0 // measured: finite-element sections and wires on a bar need no second round

// cut adds a piece of a stroke, halved as often as contacts with other contours ask.
func (s *Shaped) cut(st *Stroke, contour, stroke int, lo, hi float64) {
	if s.perContact(st, contour, lo, hi) {
		mid := (lo + hi) / 2
		s.cut(st, contour, stroke, lo, mid)
		s.cut(st, contour, stroke, mid, hi)
		return
	}
	s.bends = append(s.bends, newBend(st, contour, stroke, lo, hi))
}

// perContact tells whether a piece is too long for a contact: the field there varies on the scale √(2R·gap), or R times the ratio of the gap's
// conductivity to the bodies', if that is more; 1/R is the sum of the curvatures with which the faces part.
func (s *Shaped) perContact(st *Stroke, contour int, lo, hi float64) bool {
	half := st.Length() * (hi - lo) / 2
	for _, u := range []float64{lo, (lo + hi) / 2, hi} {
		if s.closer(st, contour, u, half) {
			return true
		}
		z := st.At(u)
		for i := range s.around.Discs {
			if s.grading.near(&s.around.Discs[i], z, 2*half) < 2*half {
				return true
			}
		}
	}
	return false
}

// closer tells whether a piece of the given half length around share u is too long.
func (s *Shaped) closer(st *Stroke, contour int, u, half float64) bool {
	z, n := st.At(u), st.normal(u)
	c := &s.contours[contour]
	for i := range s.contours {
		d := &s.contours[i]
		if i == contour || c.String || d.String {
			continue
		}
		at, other := d.Loop.nearest(z)
		gap := cmplx.Abs(at - z)
		if gap > 2*half || gap == 0 {
			continue
		}
		outwards := real((at-z)*conj(n)) > 0
		facing := real((z-at)*conj(other.normalAt(at))) > 0
		bend := st.curvature(outwards) + other.curvature(facing)
		if bend <= 1e-3/gap*math.Min(1, gap/half) && bend < 1e-2/half {
			continue
		}
		k := math.Max(share(c, outwards), share(d, facing))
		r := 1 / math.Max(bend, 1e-9)
		if half > perContact/math.Max(1, s.fineness)*math.Max(math.Sqrt(2*r*gap), r*math.Min(k, 1)) {
			return true
		}
	}
	return false
}

// share is the conductivity of a contour's one side over that of its other; outwards: the outside over the inside.
func share(c *Contour, outwards bool) float64 {
	switch {
	case c.Sides != nil && math.IsInf(c.Sides[0].Film, 1):
		return 0
	case c.Sides != nil:
		return 1
	case math.IsInf(c.In, 1) && outwards:
		return 0
	case math.IsInf(c.In, 1):
		return 1
	case outwards:
		return c.Out / c.In
	}
	return c.In / c.Out
}

// curvature of the stroke as seen from outside, or from inside.
func (s *Stroke) curvature(outside bool) float64 {
	switch {
	case s.R == 0:
		return 0
	case outside:
		return 1 / s.R
	}
	return -1 / s.R
}

// normal is the outward unit normal at share u of the length.
func (s *Stroke) normal(u float64) complex128 { return s.normalAt(s.At(u)) }

func (s *Stroke) normalAt(z complex128) complex128 {
	if s.R > 0 {
		return scale(1/s.R, z-s.Centre)
	}
	d := s.To - s.From
	return -1i * scale(1/cmplx.Abs(d), d)
}

// nearest is the point of the loop nearest to z, and its stroke.
func (l Loop) nearest(z complex128) (at complex128, on *Stroke) {
	least := math.Inf(1)
	for i := range l {
		s := &l[i]
		p := s.nearest(z)
		if d := cmplx.Abs(p - z); d < least {
			least, at, on = d, p, s
		}
	}
	return at, on
}

// Distance from the loop to z.
func (l Loop) Distance(z complex128) float64 {
	at, _ := l.nearest(z)
	return cmplx.Abs(at - z)
}

// Nearest is the point of the stroke nearest to z.
func (s *Stroke) Nearest(z complex128) complex128 { return s.nearest(z) }

func (s *Stroke) nearest(z complex128) complex128 {
	if s.R == 0 {
		d := s.To - s.From
		u := real((z-s.From)*conj(d)) / real(d*conj(d))
		return s.From + scale(math.Min(1, math.Max(0, u)), d)
	}
	if r := z - s.Centre; r != 0 {
		if p := s.Centre + scale(s.R/cmplx.Abs(r), r); onRight(s.From, s.To, p) {
			return p
		}
	}
	if cmplx.Abs(z-s.From) < cmplx.Abs(z-s.To) {
		return s.From
	}
	return s.To
}
