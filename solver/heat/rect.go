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
	discs    []outline.Disc
	src      outline.Sources
	b        [][]complex128
	y        []float64
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
func (r *rectWall) write(g *region) {
	n := len(g.pieces)
	r.discs = make([]outline.Disc, n)
	r.b = make([][]complex128, n)
	r.src = outline.Sources{Q: make([]float64, n), D: make([][]complex128, n)}
	for i := range g.pieces {
		r.discs[i] = outline.Disc{C: g.pieces[i].at, A: g.pieces[i].a, M: g.orders[i]}
		r.b[i] = make([]complex128, g.orders[i]+1)
		r.src.D[i] = make([]complex128, g.orders[i])
	}
	r.sys = outline.New(r.rect, r.discs, r.fineness)
	r.y = make([]float64, r.sys.Len())
}

// move puts piece i elsewhere; false if the wall has to be discretised anew.
func (r *rectWall) move(g *region, i int) bool {
	r.discs[i].C = g.pieces[i].at
	return r.sys.Move(i, r.discs[i].C)
}

// bring adds what the wall sends back to scaled outgoing amplitudes v and heats charge (W/m, nil for none): the scaled incoming amplitudes
// to y, the mean temperatures to mean unless it is nil. ground adds the drive of sides and ambient.
func (r *rectWall) bring(g *region, charge, v []float64, ground bool, y, mean []float64) {
	for i := range r.discs {
		r.src.Q[i] = 0
		if charge != nil {
			r.src.Q[i] = charge[i]
		}
		s, o := g.sys.Disc(i).S, g.sys.Offset(i)
		for n, f := range s {
			f *= rootsOf(n + 1)
			r.src.D[i][n] = complex(f*v[o+2*n], f*v[o+2*n+1])
		}
		clear(r.b[i])
	}
	r.sys.RespondTo(r.y, r.src, ground)
	r.sys.Incoming(r.y, r.b)
	for i := range r.discs {
		s, o := g.sys.Disc(i).S, g.sys.Offset(i)
		for n, f := range s {
			f /= rootsOf(n + 1)
			b := r.b[i][n+1]
			y[o+2*n] += f * real(b)
			y[o+2*n+1] -= f * imag(b)
		}
		if mean != nil {
			mean[i] += real(r.b[i][0])
		}
	}
}

// rectState is a rectangular wall after solving.
type rectState struct {
	rect  outline.Rect
	sys   *outline.System
	y     []float64
	b     [][]complex128 // what it sends back to each piece
	hot   []float64
	mean  float64
	sides [4]float64
}

// solved finds the wall's answer to the whole solution, ground included, and adds the means that it sends back.
func (r *rectWall) solved(g *region, charge, v, mean []float64) *rectState {
	r.bring(g, charge, v, true, make([]float64, len(v)), mean)
	s := &rectState{rect: r.rect, sys: r.sys, y: append([]float64(nil), r.y...)}
	for _, b := range r.b {
		s.b = append(s.b, append([]complex128(nil), b...))
	}
	s.hot, s.mean, s.sides = r.sys.Faces(r.y, r.src)
	return s
}

// frame is the square that covers everything.
func (s *rectState) frame() (mid complex128, half float64) {
	t := 0.0
	for _, l := range s.rect.Layers {
		t += l.Thickness
	}
	return complex(s.rect.W/2, s.rect.H/2), math.Max(s.rect.W, s.rect.H)/2 + t
}

// inverseRoots[n-1] = 1/√n.
var inverseRoots = func() (r [maxOrder]float64) {
	for i := range r {
		r[i] = 1 / math.Sqrt(float64(i+1))
	}
	return r
}()

func rootsOf(n int) float64 { return inverseRoots[n-1] }
