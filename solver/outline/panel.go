package outline

import "math"

// edge is one straight side of one interface, run counterclockwise.
type edge struct {
	face       int // interface, 0 the inside outline
	side       int // 0 bottom, 1 right, 2 top, 3 left
	start      complex128
	dir        complex128 // unit tangent; the outward normal is −i dir
	length     float64
	first, end int // its panels
}

func (e *edge) at(s float64) complex128 { return e.start + scale(s, e.dir) }

// panel is a straight piece of an edge that carries a density Σ s_k P_k.
type panel struct {
	edge     int
	lo, hi   float64 // along the edge
	half     float64
	mid, dir complex128
	p        int // modes
	dof      int // its first unknown and its first row
	pt       int // its first cell end in System.points
}

// edges returns the sides of all interfaces of r, interface by interface.
func (r *Rect) edges() []edge {
	var all []edge
	grow := 0.0
	for f := 0; f <= len(r.Layers); f++ {
		if f > 0 {
			grow += r.Layers[f-1].Thickness
		}
		w, h := r.W+2*grow, r.H+2*grow
		z := complex(-grow, -grow)
		dir := complex(1, 0)
		for side := range 4 {
			l := w
			if side%2 == 1 {
				l = h
			}
			all = append(all, edge{face: f, side: side, start: z, dir: dir, length: l})
			z += scale(l, dir)
			dir *= 1i
		}
	}
	return all
}

// Measured on the finite-element cases: half or twice as many panels move the temperatures by a few mK.
const (
	modes       = 5    // per panel
	inCorner    = 20.0 // the shorter inside over the panel in a corner, whose density grows like distance^(−1/3)
	perHarmonic = 12.5 // a panel at distance r from a centre resolves harmonic m if it is no longer than perHarmonic·r/m
	visible     = 0.1  // a harmonic that has decayed to this no longer needs resolving
	reach       = 2.0  // no panel is longer than this times the distance to a centre
)

// grading decides how long a panel may be.
type grading struct {
	fineness float64
	corner   float64 // length of the panel in a corner
	discs    []Disc
}

func newGrading(r *Rect, discs []Disc, fineness float64) *grading {
	return &grading{fineness: fineness, corner: math.Min(r.W, r.H) / (inCorner * fineness), discs: discs}
}

// split cuts the piece lo–hi of e until it follows the corners and the discs.
func (g *grading) split(e *edge, lo, hi float64, cuts []float64) []float64 {
	l := hi - lo
	if l > 1.01*g.corner {
		if l > e.length/2*1.0001 {
			return g.halve(e, lo, hi, (lo+hi)/2, cuts)
		}
		if lo == 0 {
			return g.halve(e, lo, hi, lo+math.Max(0.25*l, g.corner), cuts)
		}
		if hi == e.length {
			return g.halve(e, lo, hi, hi-math.Max(0.25*l, g.corner), cuts)
		}
		if d := math.Min(lo, e.length-hi); l > 3.01*d {
			return g.halve(e, lo, hi, (lo+hi)/2, cuts)
		}
	}
	for i := range g.discs {
		if l > g.allowed(&g.discs[i], e, lo, hi) {
			return g.halve(e, lo, hi, (lo+hi)/2, cuts)
		}
	}
	return append(cuts, hi)
}

func (g *grading) halve(e *edge, lo, hi, mid float64, cuts []float64) []float64 {
	cuts = g.split(e, lo, mid, cuts)
	return g.split(e, mid, hi, cuts)
}

// allowed is the longest panel there that still follows the harmonics of d.
func (g *grading) allowed(d *Disc, e *edge, lo, hi float64) float64 {
	rel := (d.C - e.start) * conj(e.dir)
	s := math.Max(lo, math.Min(real(rel), hi))
	r := math.Max(math.Hypot(real(rel)-s, imag(rel)), d.A)
	m := math.Max(float64(d.M), 1)
	if r > 1.0001*d.A {
		m = math.Min(m, math.Max(1, math.Log(visible)/math.Log(d.A/r)))
	}
	return math.Min(reach, perHarmonic/(g.fineness*m)) * r
}

// panels cuts every edge.
func (g *grading) panels(edges []edge) (all []panel, unknowns, points int) {
	for i := range edges {
		e := &edges[i]
		e.first = len(all)
		cuts := g.split(e, 0, e.length, []float64{0})
		for j := 1; j < len(cuts); j++ {
			q := panel{edge: i, lo: cuts[j-1], hi: cuts[j], p: modes, dof: unknowns, pt: points, dir: e.dir}
			q.half = (q.hi - q.lo) / 2
			q.mid = e.at((q.lo + q.hi) / 2)
			all = append(all, q)
			unknowns += q.p
			points += q.p + 1
		}
		e.end = len(all)
	}
	return all, unknowns, points
}
