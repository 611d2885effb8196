package main

import (
	"cmp"
	"math"
	"slices"

	"packrise/solver/section"
)

const (
	touching = 1e-3  // mm: what is nearer touches, in one shared vertex
	neckGap  = 0.3   // of the smaller radius: what is farther apart needs no grading of its own
	neckEnd  = 0.4   // of the smaller radius: half the length of a neck
	leastW   = 0.05  // mm: the length scale of a neck that touches
	leastX   = 0.04  // mm: next node from a contact; between a core of 5.2 mm and a round wall of 15.6 mm the gap is 0.2 µm there
	shortest = 0.002 // mm: FreeFem++ joins nodes nearer than about a sixteenth of the shortest segment, which must leave that gap open
	stretch  = 0.5   // part of a length scale that a segment has at refinement 1; also how fast segments grow
)

// lines are the polygons that a mesh keeps.
type lines struct {
	nodes    []section.Point
	segments [][2]int
	outside  []bool // per segment: at the surroundings
	alpha    float64
}

// stop is a node at a place s along a curve (angle × radius on a circle, length on a side).
type stop struct {
	s    float64
	node int // −1: a node of its own
	step float64
}

// curve is a circle, or a side of a rectangle when r is 0: from `from` along `dir`, `length` long.
type curve struct {
	at, from, dir section.Point
	r, length     float64
	hmax          float64
	outside       bool
	stops         []stop
}

func (c *curve) place(s float64) section.Point {
	if c.r > 0 {
		return section.Point{X: c.at.X + c.r*math.Cos(s/c.r), Y: c.at.Y + c.r*math.Sin(s/c.r)}
	}
	return section.Point{X: c.from.X + c.dir.X*s, Y: c.from.Y + c.dir.Y*s}
}

// along returns the place next to p and offset x along the tangent there.
func (c *curve) along(p section.Point, x float64) float64 {
	if c.r > 0 {
		return c.r * math.Mod(math.Atan2(p.Y-c.at.Y, p.X-c.at.X)+math.Asin(x/c.r)+4*math.Pi, 2*math.Pi)
	}
	return (p.X-c.from.X)*c.dir.X + (p.Y-c.from.Y)*c.dir.Y + x
}

func circle(at section.Point, r, hmax float64) *curve {
	return &curve{at: at, r: r, length: 2 * math.Pi * r, hmax: hmax}
}

// box returns the sides of a rectangle from (a, a) to (b.X, b.Y), anticlockwise.
func box(a float64, b section.Point, hmax float64) []*curve {
	corners := []section.Point{{X: a, Y: a}, {X: b.X, Y: a}, b, {X: a, Y: b.Y}}
	var out []*curve
	for k, p := range corners {
		q := corners[(k+1)%4]
		l := math.Hypot(q.X-p.X, q.Y-p.Y)
		c := &curve{from: p, dir: section.Point{X: (q.X - p.X) / l, Y: (q.Y - p.Y) / l}, length: l, hmax: hmax}
		out = append(out, c)
	}
	return out
}

// neck joins two curves where they come close: p on a, q on b, curvature of the gap's opening 1/radius.
func (l *lines) neck(a, b *curve, p, q section.Point, radius, smaller float64) {
	gap := math.Hypot(p.X-q.X, p.Y-q.Y)
	if gap > neckGap*smaller {
		return
	}
	w := max(math.Sqrt(2*radius*gap), leastW)
	na, nb := -1, -1
	if gap < touching {
		na = l.node(section.Point{X: (p.X + q.X) / 2, Y: (p.Y + q.Y) / 2})
		nb = na
	}
	a.stops = append(a.stops, stop{a.along(p, 0), na, w * l.alpha})
	b.stops = append(b.stops, stop{b.along(q, 0), nb, w * l.alpha})
	for k := 1; ; k++ {
		x := w * math.Sinh(float64(k)*l.alpha)
		if x > neckEnd*smaller {
			return
		}
		if gap < touching && x < leastX {
			continue
		}
		step := min(l.alpha*math.Hypot(x, w), l.alpha*neckEnd*smaller)
		for _, x := range []float64{-x, x} {
			a.stops = append(a.stops, stop{a.along(p, x), -1, step})
			b.stops = append(b.stops, stop{b.along(q, x), -1, step})
		}
	}
}

func (l *lines) node(p section.Point) int {
	l.nodes = append(l.nodes, p)
	return len(l.nodes) - 1
}

// close turns a ring of curves into segments: each begins where the one before it ended. FreeFem++ keeps only what lies to the left of some segment, so every
// other one inside is turned: then pockets between touching parts are kept too.
func (l *lines) close(ring ...*curve) {
	first, last := -1, -1
	add := func(c *curve, node int) {
		if last >= 0 {
			l.segments = append(l.segments, [2]int{last, node})
			if turned := len(l.segments)%2 == 0; turned && !c.outside {
				l.segments[len(l.segments)-1] = [2]int{node, last}
			}
			l.outside = append(l.outside, c.outside)
		} else {
			first = node
		}
		last = node
	}
	for _, c := range ring {
		slices.SortFunc(c.stops, func(a, b stop) int { return cmp.Compare(a.s, b.s) })
		if c.r == 0 || len(c.stops) == 0 {
			c.stops = slices.Insert(c.stops, 0, stop{0, -1, c.hmax})
		}
		shared := make([]bool, len(c.stops))
		for k, s := range c.stops {
			shared[k] = s.node >= 0
		}
		for k, a := range c.stops {
			b := stop{c.length, -1, c.hmax}
			if k+1 < len(c.stops) {
				b = c.stops[k+1]
			} else if c.r > 0 {
				b = c.stops[0]
				b.s += c.length
			}
			if a.node < 0 {
				a.node = l.node(c.place(a.s))
			}
			add(c, a.node)
			if shared[k] || shared[(k+1)%len(c.stops)] {
				continue // the first node next to a contact stands opposite its twin
			}
			for _, s := range between(a, b, c.hmax, l.alpha) {
				add(c, l.node(c.place(s)))
			}
		}
	}
	add(ring[len(ring)-1], first)
}

// between divides the way between two stops by a length that grows from both ends at the rate alpha up to hmax.
func between(a, b stop, hmax, alpha float64) (out []float64) {
	const fine = 400
	h := func(s float64) float64 { return min(hmax, a.step+alpha*(s-a.s), b.step+alpha*(b.s-s)) }
	ds := (b.s - a.s) / fine
	total := 0.0
	for i := range fine {
		total += ds / h(a.s+(float64(i)+0.5)*ds)
	}
	n := int(math.Ceil(total - 0.4))
	sum, next := 0.0, 1
	for i := range fine {
		part := ds / h(a.s+(float64(i)+0.5)*ds)
		for ; next < n && sum+part >= total*float64(next)/float64(n); next++ {
			out = append(out, a.s+ds*(float64(i)+(total*float64(next)/float64(n)-sum)/part))
		}
		sum += part
	}
	return out
}
