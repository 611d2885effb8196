package heat

import (
	"math"

	"packrise/solver/harmonic"
	"packrise/solver/outline"
)

// rectWall is a rectangular wall: its densities are eliminated exactly in every product with the parts.
type rectWall struct {
	rect     outline.Rect
	fineness float64
	sides    [4]harmonic.Stack // each side as a flat stack, for the order rule
	sys      *outline.System
	exchange
}

// newRectWall prepares the wall of p; the clearance widens the inside by half on each side.
func newRectWall(p *Problem, fineness float64) *rectWall {
	w := &p.Wall
	r := &rectWall{fineness: fineness, rect: outline.Rect{W: w.W + p.Clearance, H: w.H + p.Clearance, MediumK: p.MediumK}}
	for _, l := range w.Rings {
		r.rect.Layers = append(r.rect.Layers, outline.Layer{K: l.K, Thickness: l.Thickness})
	}
	flat := 100 * math.Max(w.W, w.H) // a wall this round is flat to the parts
	for i, s := range w.Sides {
		film, toward := w.Film, w.Ambient
		if s.Film != 0 {
			film, toward = s.Film, s.Temp
		}
		to := outline.Side{Kind: outline.Open, Film: film, Temp: toward}
		switch s.Kind {
		case Insulated:
			to, film = outline.Side{Kind: outline.Insulated}, 0
		case Held:
			to, film = outline.Side{Kind: outline.Held, Temp: s.Temp}, math.Inf(1)
		}
		r.rect.Sides[i] = to
		r.sides[i] = outerWall(p.MediumK, flat, w.Rings, film)
	}
	return r
}

// metal tells whether the inside of any side is bare metal, or held at one temperature.
func (r *rectWall) metal() bool {
	for i := range r.sides {
		if face(&r.sides[i]) > metalK {
			return true
		}
	}
	return false
}

// gap is the least of gaps.
func (r *rectWall) gap(c *piece) float64 {
	gap := math.Inf(1)
	for _, v := range r.gaps(c) {
		gap = math.Min(gap, v)
	}
	return gap
}

// gaps returns the distances of c's rim from the four sides: bottom, right, top, left.
func (r *rectWall) gaps(c *piece) [4]float64 {
	x, y := real(c.at), imag(c.at)
	return [4]float64{y - c.a, r.rect.W - x - c.a, r.rect.H - y - c.a, x - c.a}
}

// settle keeps a piece inside: what sticks out counts as touching.
func (r *rectWall) settle(c *piece) {
	if m := math.Min(r.rect.W, r.rect.H) / 2 * (1 - 1e-9); c.a > m {
		c.a = m
	}
	x := math.Min(math.Max(real(c.at), c.a), r.rect.W-c.a)
	y := math.Min(math.Max(imag(c.at), c.a), r.rect.H-c.a)
	c.at = complex(x, y)
}

// order is the order that c needs beside the sides, 0 if it is not above m.
func (r *rectWall) order(g *region, c *piece, f float64, m int) int {
	need := 0
	for i, gap := range r.gaps(c) {
		if openEnough(f*c.a, c.a, gap, max(m, need)) {
			continue
		}
		wall := &r.sides[i]
		need = max(need, contact(f, c.a, c.a, gap, g.k, between(c.skin(), face(wall)), func(x float64) float64 {
			n := int(math.Min(math.Max(wall.R/x, 1), 1e7))
			return between(c.conductivity(x), shows(g.k, wall.Port(n).Rho))
		}))
	}
	return need
}

// write discretises the wall for the region's pieces.
func (r *rectWall) write(g *region, stop func() bool) bool {
	r.collect(g)
	rect := r.rect
	rect.Workers, rect.Stop = r.threads, stop
	sys := outline.New(rect, r.discs, r.fineness)
	if sys == nil {
		return false
	}
	r.sys = sys
	r.begin(r.sys)
	return true
}

// move puts piece i elsewhere; false if the wall has to be discretised anew.
func (r *rectWall) move(g *region, i int) bool {
	r.discs[i].C = g.pieces[i].at
	return r.sys.Move(i, r.discs[i].C)
}

// solved finds the wall's answer to the whole solution, ground included, and adds the means that it sends back.
func (r *rectWall) solved(g *region, charge, v, mean []float64) *bound {
	s := r.answer(g, charge, v, mean)
	r.tell(s)
	return s
}

// tell fills in what the wall's unknowns say of it.
func (r *rectWall) tell(s *bound) {
	y, sys := s.y, r.sys
	s.hot, s.mean, s.sides = sys.Faces(y, r.src)
	for _, q := range s.sides {
		s.released += q
	}
	t := 0.0
	for _, l := range r.rect.Layers {
		t += l.Thickness
	}
	s.mid, s.half = complex(r.rect.W/2, r.rect.H/2), math.Max(r.rect.W, r.rect.H)/2+t
	s.field = func() pointField { return sys.Field(y) }
	rect := r.rect // a result never changes
	s.sheet = &rect
}

func (r *rectWall) fork() border {
	f := *r
	f.exchange = r.exchange.fork()
	return &f
}
