package heat

import (
	"math"

	"packrise/solver/gas"
	"packrise/solver/harmonic"
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
	rest     outline.Rest
	arcs     []Arc // of the pieces as they lie
	sys      *outline.HullSystem
	exchange
}

func newHullWall(p *Problem, fineness float64) *hullWall {
	w := &p.Wall
	return &hullWall{taut: w.Taut, k: p.MediumK, fineness: fineness, out: outline.Outside{Film: w.Film, Temp: w.Ambient}, rest: w.Against.hull()}
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

// order is the fewest harmonics in a bundle, whatever the medium: what a piece sends back of higher ones is reckoned to all orders, but only to
// the hull beside it.
func (h *hullWall) order(_ *region, _ *piece, f float64, _ int) int {
	switch {
	case f < 1:
		return 10
	case f > 1:
		return 14
	}
	return 12
}

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

// shape is the hull round the pieces.
func (h *hullWall) shape() outline.Hull {
	s := outline.Hull{MediumK: h.k, Rest: h.rest, Workers: h.threads}
	for _, a := range h.arcs {
		s.Arcs = append(s.Arcs, outline.Arc{Disc: a.Disc, From: a.From, To: a.To, Bare: h.out, String: h.out})
	}
	return s
}

// write winds the string and discretises the hull; what of an older one still holds is kept.
func (h *hullWall) write(g *region, stop func() bool) bool {
	h.collect(g)
	h.wrap(g)
	mirrors := make([]outline.Mirror, len(g.pieces))
	for i := range mirrors {
		mirrors[i] = g.mirror(i)
	}
	shape := h.shape()
	shape.Stop = stop
	var sys *outline.HullSystem
	if h.sys != nil {
		sys = h.sys.Renew(shape, h.discs, mirrors)
	} else {
		sys = outline.NewHull(shape, h.discs, mirrors, h.fineness)
	}
	if sys == nil {
		return false
	}
	h.sys = sys
	h.begin(sys)
	return true
}

// move winds the string anew and keeps what does not hang on piece i. Results that are out keep their hull.
func (h *hullWall) move(g *region, _ int) bool {
	return h.write(g, nil)
}

// outside takes other films and temperatures.
func (h *hullWall) outside(w *Wall) {
	h.out, h.rest = outline.Outside{Film: w.Film, Temp: w.Ambient}, w.Against.hull()
	if h.sys != nil {
		h.sys = h.sys.Outsides(h.shape().Arcs, h.rest.Outside)
		h.with = h.sys
	}
}

// highest is the harmonic up to which the field near the hull is drawn.
const highest = 32

// solved finds the hull's answer to the whole solution, ground included, and adds the means that it sends back.
func (h *hullWall) solved(g *region, charge, v, mean []float64) *bound {
	s := h.answer(g, charge, v, mean)
	h.tell(s)
	return s
}

// tell fills in what the hull's unknowns say of it.
func (h *hullWall) tell(s *bound) {
	y, sys := s.y, h.sys
	t := sys.Temperatures(y, h.src)
	hot, average, out := sys.Faces(t)
	s.against = sys.RestOut(t)
	s.hot, s.mean, s.released, s.arcs = []float64{hot}, average, out, h.arcs
	lo, hi := complex(math.Inf(1), math.Inf(1)), complex(math.Inf(-1), math.Inf(-1))
	for _, d := range h.discs {
		lo = complex(math.Min(real(lo), real(d.C)-d.A), math.Min(imag(lo), imag(d.C)-d.A))
		hi = complex(math.Max(real(hi), real(d.C)+d.A), math.Max(imag(hi), imag(d.C)+d.A))
	}
	s.mid, s.half = (lo+hi)/2, 0.505*math.Max(real(hi-lo), imag(hi-lo)) // pieces are drawn a little larger
	s.field = func() pointField { return sys.Field(y) }
	s.high = func() [][]complex128 { return sys.High(y, highest) }
}

// divide divides the strings of a hull that is written.
func (h *hullWall) divide(grain *gas.Grain) *sides {
	_, hull := h.sys.Size()
	usual := hull / grain.Turn
	p := h.sys.Patches(func(z complex128) float64 { return grain.Longest(z, usual, -1) })
	return &sides{wall: h, with: &h.exchange, a: p.A, b: p.B, length: p.Length, patch: p, taken: make([]float64, len(p.Length))}
}

// exposed lists the arcs of piece i that face the outside.
func (h *hullWall) exposed(i int) (arcs [][2]float64) {
	for _, a := range h.arcs {
		if a.Disc == i {
			arcs = append(arcs, [2]float64{a.From, a.To})
		}
	}
	return arcs
}

// direct adds nothing: tell sees all that leaves through the film.
func (h *hullWall) direct(*bound, *sides) {}

func (h *hullWall) follow(s *sides, _ int) bool { return s.patch.(*outline.HullPatches).Follow(h.sys) }

// refit is follow where the strings have moved but are divided alike: patches keep what they saw, which is for frozen drafts alone.
func (h *hullWall) refit(s *sides) bool { return s.patch.(*outline.HullPatches).Refit(h.sys) }

func (h *hullWall) fork() border {
	f := *h
	f.exchange = h.exchange.fork()
	return &f
}

// exposed raises the hottest temperature of the outside to that of the pieces where they are exposed.
func (s *state) exposed(hot float64) float64 {
	for _, a := range s.border.arcs {
		p := &s.pieces[a.Disc]
		x := make([]complex128, len(p.b))
		for n, b := range p.b {
			port := p.stack.Port(n + 1)
			x[n] = b*complex(1+port.T, 0) + p.from(n)*complex(port.Tau, 0)
		}
		steps := max(4, int((a.To-a.From)/(2*math.Pi)*rimPoints))
		for i := range steps + 1 {
			sin, cos := math.Sincos(a.From + (a.To-a.From)*float64(i)/float64(steps))
			hot = math.Max(hot, p.mean+harmonic.Sum(x, complex(cos, sin)))
		}
	}
	return hot
}

// near adds to the cloud and the pieces beside a hull what they send straight back to it, of harmonics that are not solved for.
func (s *state) near() (*harmonic.Cloud, []pieceState) {
	if s.border == nil || s.border.high == nil {
		return &s.cloud, s.pieces
	}
	c := s.cloud
	c.D = append([][]complex128(nil), c.D...)
	pieces := make([]pieceState, len(s.pieces))
	for i, high := range s.border.high() {
		p := &s.pieces[i]
		pieces[i] = pieceState{piece: p.piece, mean: p.mean, q: p.q, b: p.b, sent: p.sent, inside: p.inside}
		m := len(c.D[i])
		if len(high) == 0 || m < len(p.b) {
			continue
		}
		c.D[i] = append([]complex128(nil), c.D[i]...)
		pieces[i].b = append(append([]complex128(nil), p.b...), high...)
		for n, b := range high {
			t := complex(p.stack.Port(m+n+1).T, 0)
			c.D[i] = append(c.D[i], t*complex(real(b), -imag(b)))
		}
	}
	return &c, pieces
}
