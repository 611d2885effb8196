package gas

import "math"

// body is a convex surface that is not round, where it stands: its patches, and the strokes that they are pieces of.
type body struct {
	rim, strokes []Segment
	blank        []bool // as Disc.Blank
}

// placeRim puts the rim of disc i where its centre is.
func (e *Enclosure) placeRim(i int) {
	d := &e.discs[i]
	b := &body{rim: make([]Segment, len(d.Rim)), blank: d.Blank}
	for k, s := range d.Rim {
		s.A, s.B, s.Centre = s.A+d.C, s.B+d.C, s.Centre+d.C
		b.rim[k] = s
		e.ends[e.endOf[i]+k] = s.A
		p := newRail(&s, false)
		e.area[e.first[i]+k] = p.length
		b.join(s)
	}
	e.bodies[i] = b
}

// join adds a patch to the strokes, to the last one if it goes on like that.
func (b *body) join(s Segment) {
	k := len(b.strokes) - 1
	if k < 0 {
		b.strokes = append(b.strokes, s)
		return
	}
	last := &b.strokes[k]
	whole := Segment{last.A, s.B, s.Centre, s.R}
	switch {
	case s.R > 0 && last.R == s.R && last.Centre == s.Centre && cross(last.A-s.Centre, s.B-s.Centre) > 0: // less than a half-turn
		*last = whole
	case s.R == 0 && last.R == 0 && cross(last.B-last.A, s.B-s.A) <= 1e-12*size(last.B-last.A)*size(s.B-s.A):
		*last = whole
	default:
		b.strokes = append(b.strokes, s)
	}
}

func cross(a, b complex128) float64 { return real(a)*imag(b) - imag(a)*real(b) }

func inner(a, b complex128) float64 { return real(a)*real(b) + imag(a)*imag(b) }

// over tells whether the direction v from the centre of an arc is within it.
func (s *Segment) over(v complex128) bool {
	return cross(s.A-s.Centre, v) >= 0 && cross(v, s.B-s.Centre) >= 0
}

// touch returns the directions from z, lo clockwise of hi, of the lines that touch the circle of an arc, and whether each touches the arc.
func (s *Segment) touch(z complex128) (lo, hi complex128, onLo, onHi bool) {
	w := s.Centre - z
	d2 := inner(w, w)
	l := d2 - s.R*s.R
	if l <= 0 {
		return 0, 0, false, false
	}
	l = math.Sqrt(l)
	lo, hi = scale(l/d2, w*complex(l, -s.R)), scale(l/d2, w*complex(l, s.R))
	return lo, hi, s.over(lo - w), s.over(hi - w)
}

// extent returns the sines between which the body shows.
func (b *body) extent(y *eye) (lo, hi float64) {
	var p, q complex128
	try := func(v complex128) {
		if p == 0 {
			p, q = v, v
			return
		}
		if cross(p, v) < 0 {
			p = v
		}
		if cross(q, v) > 0 {
			q = v
		}
	}
	for k := range b.strokes {
		s := &b.strokes[k]
		try(s.A - y.at)
		if s.R == 0 {
			continue
		}
		l, h, onL, onH := s.touch(y.at)
		if onL {
			try(l)
		}
		if onH {
			try(h)
		}
	}
	return sines(p*y.turn, q*y.turn)
}

// sines are those of the directions between p and q, counterclockwise and less than a half-turn, that are before the eye.
func sines(p, q complex128) (lo, hi float64) {
	front, left := real(p) > 0, real(q) > 0
	if !front && !left && !(imag(p) < 0 && imag(q) > 0) {
		return 0, 0
	}
	lo, hi = -1, 1
	if front {
		lo = imag(p) / size(p)
	}
	if left {
		hi = imag(q) / size(q)
	}
	return lo, hi
}

// depth is the distance at which a ray from the eye meets the body; other where rounding lets it pass by.
func (b *body) depth(y *eye, c, s, other float64) float64 {
	u := complex(c, s) * complex(real(y.turn), -imag(y.turn))
	for k := range b.strokes {
		if r, ok := b.strokes[k].depth(y.at, u); ok {
			return r
		}
	}
	return other
}

// depth is the distance at which a ray from z in direction u meets the outside of a stroke.
func (s *Segment) depth(z, u complex128) (r float64, ok bool) {
	a, b := (s.A-z)*complex(real(u), -imag(u)), (s.B-z)*complex(real(u), -imag(u))
	if s.R == 0 {
		if imag(b) > 0 || imag(a) < 0 || imag(a) == imag(b) {
			return 0, false
		}
		return real(a) - imag(a)*(real(b)-real(a))/(imag(b)-imag(a)), true
	}
	w := (s.Centre - z) * complex(real(u), -imag(u))
	h := s.R*s.R - imag(w)*imag(w)
	if h < 0 {
		return 0, false
	}
	r = real(w) - math.Sqrt(h)
	v := complex(r, 0) - w
	return r, r > -1e-6*s.R && cross(a-w, v) >= 0 && cross(v, b-w) >= 0
}

// share shares an arc of directions out among the patches, of which first is the number of the first.
func (b *body) share(y *eye, a arc, first int, weight float64) {
	for k := range b.rim {
		s := &b.rim[k]
		p, q, ok := s.shows(y.at)
		if !ok || k < len(b.blank) && b.blank[k] {
			continue
		}
		lo, hi := sines(p*y.turn, q*y.turn)
		s0, s1 := lo, hi
		if s0 < a.s0 {
			s0 = a.s0
		}
		if s1 > a.s1 {
			s1 = a.s1
		}
		if s1-s0 <= 0 {
			continue
		}
		r0, r1 := size(p), size(q)
		at := func(s float64) float64 { return r0 + (s-lo)/(hi-lo)*(r1-r0) }
		y.add(first+k, s0, s1, at(s0), at(s1), weight)
	}
}

// shows returns the directions between which a patch of a rim shows from z, counterclockwise, and whether it does.
func (s *Segment) shows(z complex128) (p, q complex128, ok bool) {
	p, q = s.B-z, s.A-z
	if s.R == 0 {
		return p, q, cross(p, q) > 0
	}
	lo, hi, onLo, onHi := s.touch(z)
	if inner(p, s.B-s.Centre) >= 0 { // turned away
		if p, ok = lo, onLo; !ok {
			return p, q, false
		}
	}
	if inner(q, s.A-s.Centre) >= 0 {
		if q, ok = hi, onHi; !ok {
			return p, q, false
		}
	}
	return p, q, true
}

// nearest is the point of the body that comes nearest to z.
func (b *body) nearest(z complex128) (at complex128) {
	least := -1.0
	for k := range b.strokes {
		p := b.strokes[k].nearest(z)
		if d := size(p - z); least < 0 || d < least {
			least, at = d, p
		}
	}
	return at
}

func (s *Segment) nearest(z complex128) complex128 {
	if s.R == 0 {
		d := s.B - s.A
		return s.A + scale(min(1, max(0, inner(z-s.A, d)/inner(d, d))), d)
	}
	if v := z - s.Centre; s.over(v) && v != 0 {
		return s.Centre + scale(s.R/size(v), v)
	}
	if size(z-s.A) < size(z-s.B) {
		return s.A
	}
	return s.B
}
