package heat

import (
	"math"
	"math/cmplx"
	"slices"

	"packrise/solver/outline"
)

// knuckle is a corner of a part's outside that the taut string may lie on.
type knuckle struct {
	part int
	c    complex128
	r    float64
}

// knuckles lists those of a loop.
func knuckles(part int, l outline.Loop) (all []knuckle) {
	for _, k := range l.Corners() {
		all = append(all, knuckle{part, k.C, k.R})
	}
	return all
}

const badHullSector = "heat: the string of an open bundle can't be wound round a sector, whose arc is no part of a disc within it"

// taut winds the string round knuckles.
func (l *plan) taut(k []knuckle) []Arc {
	x, y, r := make([]float64, len(k)), make([]float64, len(k)), make([]float64, len(k))
	for i, d := range k {
		x[i], y[i], r[i] = real(d.c), imag(d.c), d.r
	}
	return l.p.Wall.Taut(x, y, r)
}

// tinyArc (rad) and tinyString (share of the section's size) carry nothing.
const (
	tinyArc    = 1e-6
	tinyString = 1e-5
)

// stringed are the knuckles of all parts of the top level as drawn.
func (l *plan) stringed() (k []knuckle) {
	for i := range l.p.Parts {
		if q := &l.p.Parts[i]; q.In == -1 {
			if q.Form.Kind == Sector {
				panic(badHullSector)
			}
			k = append(k, knuckles(i, l.outer(i))...)
		}
	}
	return k
}

// exposed lists the parts of the top level that the string lies on or touches.
func (l *plan) exposed() (parts []int) {
	k := l.stringed()
	for _, a := range l.taut(k) {
		parts = append(parts, k[a.Disc].part)
	}
	return parts
}

// drawHull gives exposed surfaces their film and adds the strings.
func (l *plan) drawHull() {
	var k []knuckle
	for i := range l.p.Parts {
		if l.p.Parts[i].In == -1 && l.drawn[i] {
			k = append(k, knuckles(i, l.contours[l.skinOf(i)].Loop)...)
		}
	}
	arcs := l.taut(k)
	open := outline.Side{Film: l.p.Wall.Film * l.drawnShare(k, arcs), Temp: l.p.Wall.Ambient}
	size := 0.0
	for _, d := range k {
		size = math.Max(size, cmplx.Abs(d.c-k[0].c)+d.r)
	}
	bare := map[int][]Arc{} // by part: arcs of its knuckles
	var strings []outline.Stroke
	for i, a := range arcs {
		d, e := k[a.Disc], k[arcs[(i+1)%len(arcs)].Disc]
		if d.r > 0 {
			bare[d.part] = append(bare[d.part], a)
		}
		if a.To-a.From > tinyArc && d.r > 0 {
			l.hull = append(l.hull, arcStrokes(d, a.From, a.To)...)
		}
		p, q := d.at(a.To), e.at(a.To)
		if len(arcs) == 1 || cmplx.Abs(q-p) < tinyString*size {
			continue
		}
		s := outline.Stroke{From: p, To: q}
		l.hull = append(l.hull, s)
		if d.part != e.part {
			strings = append(strings, s)
		}
	}
	for i := range l.p.Parts {
		if l.p.Parts[i].In == -1 && l.drawn[i] {
			l.expose(&l.contours[l.skinOf(i)], k, bare[i], size, open)
		}
	}
	for _, s := range strings {
		l.contours = append(l.contours, outline.Contour{Loop: outline.Loop{s}, In: l.p.MediumK, Sides: []outline.Side{open}, String: true})
	}
	l.lean()
}

// drawnShare is the length of the string as drawn over that round parts drawn in by the clearance: the film's area stays.
func (l *plan) drawnShare(k []knuckle, arcs []Arc) float64 {
	if l.p.Clearance == 0 {
		return 1
	}
	whole := l.stringed()
	return along(whole, l.taut(whole)) / along(k, arcs)
}

// along is the length of the string.
func along(k []knuckle, arcs []Arc) (sum float64) {
	for i, a := range arcs {
		d, e := k[a.Disc], k[arcs[(i+1)%len(arcs)].Disc]
		sum += d.r * (a.To - a.From)
		if len(arcs) > 1 {
			sum += cmplx.Abs(e.at(a.To) - d.at(a.To))
		}
	}
	return sum
}

// at is the point of the knuckle where the string's normal has the angle.
func (k knuckle) at(angle float64) complex128 { return k.c + cmplx.Rect(k.r, angle) }

// arcStrokes is an arc in pieces of at most a quarter turn.
func arcStrokes(k knuckle, from, to float64) (l outline.Loop) {
	n := max(1, int(math.Ceil((to-from)/(math.Pi/2)-1e-9)))
	for i := range n {
		a, b := from+(to-from)*float64(i)/float64(n), from+(to-from)*float64(i+1)/float64(n)
		l = append(l, outline.Stroke{From: k.at(a), To: k.at(b), Centre: k.c, R: k.r})
	}
	return l
}

// expose cuts a part's outside where the string leaves it or touches it, and tells for each piece whether it is covered. A straight piece lies bare if the hull runs
// along all of it.
func (l *plan) expose(c *outline.Contour, k []knuckle, arcs []Arc, size float64, open outline.Side) {
	var loop outline.Loop
	var sides []outline.Side
	exposed := false
	for i := range c.Loop {
		s := &c.Loop[i]
		if s.R == 0 {
			side := outline.Side{Kind: outline.Covered}
			for j := range l.hull {
				if h := &l.hull[j]; h.R == 0 && cmplx.Abs(h.From-s.From) < tinyString*size && cmplx.Abs(h.To-s.To) < tinyString*size {
					side, exposed = open, true
				}
			}
			loop, sides = append(loop, *s), append(sides, side)
			continue
		}
		from := cmplx.Phase(s.From - s.Centre)
		span := s.Span()
		cuts := []float64{0, span}
		for _, a := range arcs {
			if k[a.Disc].c != s.Centre || k[a.Disc].r != s.R {
				continue
			}
			for _, angle := range []float64{a.From, a.To} {
				if t := turned(angle - from); t < span && !slices.ContainsFunc(cuts, func(c float64) bool { return math.Abs(t-c) <= tinyArc }) {
					cuts = insert(cuts, t)
				}
			}
		}
		for j := range len(cuts) - 1 {
			p := *s
			if j > 0 {
				p.From = loop[len(loop)-1].To
			}
			if j < len(cuts)-2 {
				p.To = s.Centre + cmplx.Rect(s.R, from+cuts[j+1])
			}
			side, mid := outline.Side{Kind: outline.Covered}, from+(cuts[j]+cuts[j+1])/2
			for _, a := range arcs {
				if k[a.Disc].c == s.Centre && k[a.Disc].r == s.R && turned(mid-a.From) < a.To-a.From {
					side, exposed = open, true
				}
			}
			loop, sides = append(loop, p), append(sides, side)
		}
	}
	if exposed || len(loop) > len(c.Loop) {
		c.Loop, c.Sides = loop, sides
	}
}

// turned brings an angle between 0 and 2π.
func turned(a float64) float64 {
	a = math.Mod(a, 2*math.Pi)
	if a < 0 {
		a += 2 * math.Pi
	}
	return a
}

// insert puts t in its place among rising values.
func insert(x []float64, t float64) []float64 {
	x = append(x, t)
	for i := len(x) - 1; i > 0 && x[i] < x[i-1]; i-- {
		x[i], x[i-1] = x[i-1], x[i]
	}
	return x
}
