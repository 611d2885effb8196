package heat

import (
	"math"

	"packrise/solver/outline"
)

// Arc is where the taut string round a bundle lies on a disc: from angle From to angle To (radians, counterclockwise, To ≥ From), with a straight
// string from there to the next arc's disc.
type Arc struct {
	Disc     int
	From, To float64
}

// hullWall is the hull of an open bundle: the pieces' own outside where they are exposed, opaque strings between.
type hullWall struct {
	taut     func(x, y, r []float64) []Arc
	k        float64
	fineness float64
	out      outline.Outside
	arcs     []Arc // of the pieces as they lie
	sys      *outline.HullSystem
	exchange
}

func newHullWall(p *Problem, fineness float64) *hullWall {
	w := &p.Wall
	return &hullWall{taut: w.Taut, k: p.MediumK, fineness: fineness, out: outline.Outside{Film: w.Film, Temp: w.Ambient}}
}

// wrap winds the string round the region's pieces.
func (h *hullWall) wrap(g *region) {
	n := len(g.pieces)
	x, y, r := make([]float64, n), make([]float64, n), make([]float64, n)
	for i := range g.pieces {
		c := &g.pieces[i]
		x[i], y[i], r[i] = real(c.at), imag(c.at), c.a
	}
	h.arcs = h.taut(x, y, r)
}

// settle does nothing: the hull lies round the pieces wherever they are.
func (h *hullWall) settle(*piece) {}

// gap is none: no metal wall is near.
func (h *hullWall) gap(*piece) float64 { return math.Inf(1) }

func (h *hullWall) metal() bool { return false }

// order asks for nothing: what a piece sends straight back to the hull beside it is reckoned to all orders.
func (h *hullWall) order(*region, *piece, float64, int) int { return 0 }

// maxMirror bounds the harmonics that a part on the hull sends straight back.
const maxMirror = 400

// mirror is what piece i sends back beyond its order.
func (g *region) mirror(i int) outline.Mirror {
	c := &g.pieces[i]
	m := outline.Mirror{Beyond: -1}
	if s := c.skin(); !math.IsInf(s, 1) {
		m.Beyond = (g.k - s) / (g.k + s)
	}
	for n := 1; n <= maxMirror; n++ {
		m.T = append(m.T, c.stack.Port(n).T)
		if n > g.orders[i] && math.Abs(m.T[n-1]-m.Beyond) < 1e-7 {
			break
		}
	}
	return m
}

// write winds the string and discretises the hull.
func (h *hullWall) write(g *region) {
	h.collect(g)
	h.wrap(g)
	shape := outline.Hull{MediumK: h.k}
	for _, a := range h.arcs {
		shape.Arcs = append(shape.Arcs, outline.Arc{Disc: a.Disc, From: a.From, To: a.To, Bare: h.out, String: h.out})
	}
	mirrors := make([]outline.Mirror, len(g.pieces))
	for i := range mirrors {
		mirrors[i] = g.mirror(i)
	}
	h.sys = outline.NewHull(shape, h.discs, mirrors, h.fineness)
	h.begin(h.sys)
}

// move is always false: the string is wound anew.
func (h *hullWall) move(*region, int) bool { return false }

// solved finds the hull's answer to the whole solution, ground included, and adds the means that it sends back.
func (h *hullWall) solved(g *region, charge, v, mean []float64) *bound {
	s := h.answer(g, charge, v, mean)
	hot, average, out := h.sys.Faces(h.sys.Temperatures(s.y, h.src))
	s.hot, s.mean, s.released = []float64{hot}, average, out
	return s
}

func (h *hullWall) fork() border {
	f := *h
	f.exchange = h.exchange.fork()
	return &f
}
