package outline

import (
	"cmp"
	"math"
	"slices"
)

// Hull is the outer boundary of an open bundle: the taut string round its parts. Where the string lies on a part the part's own
// surface is the outside; where it runs straight from part to part it is an opaque line of no thickness.
type Hull struct {
	MediumK float64 // of what fills the pockets
	Arcs    []Arc   // counterclockwise
	Rest    Rest    // of all of them, in place of their own outsides
	Workers int     // goroutines at most, 0 for as many as there are processors
	// Stop, if any, is asked between pieces of work; when it says so NewHull and Renew return nil.
	Stop func() bool
}

// Arc is where the string lies on disc Disc, from angle From to angle To (radians, To ≥ From, equal where it only touches), and the straight
// string from there to the next arc's disc.
type Arc struct {
	Disc     int
	From, To float64
	Bare     Outside // of the arc
	String   Outside
}

// Outside is what a piece of the hull gives its heat to: Film (W/m²K; +Inf holds it at Temp) to Temp, and Absorbed (W/m²), what it takes up of the
// sun.
type Outside struct{ Film, Temp, Absorbed float64 }

// Mirror is what a part sends back of the harmonics beyond those that are solved for: conj(d_n) = t_n b_n with t_n = T[n-1], and Beyond for
// n > len(T), the reflection of its outermost layer alone.
type Mirror struct {
	T      []float64
	Beyond float64
}

// t returns t_n.
func (m *Mirror) t(n int) float64 {
	if n <= len(m.T) {
		return m.T[n-1]
	}
	return m.Beyond
}

// tiny arcs and strings, in radians and as a share of the hull's size, carry nothing.
const (
	tinyArc    = 1e-6
	tinyString = 1e-9
)

// check panics on what no caller may pass.
func (h *Hull) check(discs []Disc) {
	ok := h.MediumK > 0 && !math.IsInf(h.MediumK, 1) && len(h.Arcs) > 0
	for _, a := range h.Arcs {
		ok = ok && a.Disc >= 0 && a.Disc < len(discs) && a.To >= a.From && a.Bare.Film >= 0 && a.String.Film >= 0
	}
	if !ok {
		panic("outline: hull without arcs, an arc of no disc, conductivity not positive, or negative film")
	}
}

// piece is an arc or a string of the hull.
type piece struct {
	disc       int // of an arc, −1 of a string
	ends       [2]int
	c          complex128
	a          float64
	from, turn float64 // of an arc: first angle and whole angle
	start, dir complex128
	length     float64
	out        Outside
	rests      bool    // see Rest
	tip        [2]bool // where it begins or ends to
	held       bool    // at a temperature, on one side of a tip
}

// at returns the point at s from the beginning.
func (p *piece) at(s float64) complex128 {
	if p.disc < 0 {
		return p.start + scale(s, p.dir)
	}
	return p.c + polar(p.a, p.from+s/p.a)
}

// polar is r e^{iθ}.
func polar(r, theta float64) complex128 {
	s, c := math.Sincos(theta)
	return complex(r*c, r*s)
}

// pieces returns the arcs and strings that carry anything. Their ends follow from the discs that a string joins, not from the arcs given, so that they
// are the same to the last bit while the discs are.
func (h *Hull) pieces(discs []Disc) []piece {
	size := 0.0
	for _, a := range h.Arcs {
		size = math.Max(size, discs[a.Disc].A)
	}
	n := len(h.Arcs)
	leaves := make([]float64, n) // angle at which the string leaves
	for i, a := range h.Arcs {
		leaves[i] = tangent(discs[a.Disc], discs[h.Arcs[(i+1)%n].Disc], a.To)
	}
	var all []piece
	for i, a := range h.Arcs {
		d, next := discs[a.Disc], h.Arcs[(i+1)%n].Disc
		from := leaves[(i+n-1)%n]
		turn := leaves[i] - from
		turn += 2 * math.Pi * math.Round((a.To-a.From-turn)/(2*math.Pi))
		if turn > tinyArc {
			all = append(all, piece{disc: a.Disc, ends: [2]int{a.Disc, a.Disc}, c: d.C, a: d.A, from: from, turn: turn, length: d.A * turn, out: a.Bare})
		}
		e := discs[next]
		start, end := d.C+polar(d.A, leaves[i]), e.C+polar(e.A, leaves[i])
		l := math.Hypot(real(end-start), imag(end-start))
		if n > 1 && l > tinyString*size {
			p := piece{disc: -1, ends: [2]int{a.Disc, next}, start: start, dir: scale(1/l, end-start), length: l, out: a.String}
			all = append(all, p.split(discs)...)
		}
	}
	return h.lean(all)
}

// grazed is the gap, as a share of its radius, under which a part divides the string that passes it as if it touched.
const grazed = 0.02

// split divides a string where parts graze it.
func (p piece) split(discs []Disc) (all []piece) {
	type graze struct {
		disc  int
		along float64
	}
	var on []graze
	for i, d := range discs {
		w := (d.C - p.start) * conj(p.dir)
		if i != p.ends[0] && i != p.ends[1] && imag(w)-d.A < grazed*d.A && real(w) > grazed*d.A && real(w) < p.length-grazed*d.A {
			on = append(on, graze{i, real(w)})
		}
	}
	slices.SortFunc(on, func(a, b graze) int { return cmp.Compare(a.along, b.along) })
	from := 0.0
	for _, g := range on {
		q := p
		q.start, q.length, q.ends[1] = p.at(from), g.along-from, g.disc
		all = append(all, q)
		from, p.ends[0] = g.along, g.disc
	}
	if from > 0 {
		p.start, p.length = p.at(from), p.length-from
	}
	return append(all, p)
}

// tangent is the angle at which a string round d and then e, counterclockwise, leaves d; angle, if there is none.
func tangent(d, e Disc, angle float64) float64 {
	v := e.C - d.C
	l := math.Hypot(real(v), imag(v))
	if l <= math.Abs(d.A-e.A) {
		return angle
	}
	return math.Atan2(imag(v), real(v)) - math.Acos((d.A-e.A)/l)
}
