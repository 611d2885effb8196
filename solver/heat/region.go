package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// region is one medium with the pieces that lie in it and what it ends at: the holder's wall, or a cable's jacket.
type region struct {
	part    int // the cable whose inside it is, −1 for the holder
	filling Filling
	k       float64
	r       float64        // inside radius, clearance added; 0 if there is a border
	border  border         // nil of a round region
	wall    harmonic.Stack // round: as drawn, from the medium outwards
	rest    *rest          // of a round holder: what its outside rests against, nil for nothing
	pieces  []piece
	orders  []int

	sys      *harmonic.System
	circle   *harmonic.Circle
	sign     []float64 // of each unknown in A = diag(−sgn) + 𝒢: +1 where the piece conducts better than the medium
	laws     []*law    // of cables, nil for others
	definite bool
	sources  []source
	port     int // harmonics of a cable as a piece outside, 0 of the holder
}

// source is a metal or held bore of the region or of a cable in it.
type source struct {
	piece int
	part  int
	own   int       // index among the sources of its cable, −1 if it is the piece itself
	u     []float64 // scaled outgoing amplitudes of its cable for 1 W/m, nil for the piece itself
}

// c2 is 1/(2πk): K per W/m of a logarithm.
func (g *region) c2() float64 { return 1 / (2 * math.Pi * g.k) }

// newRegion collects the pieces of holder or cable in (−1 for the holder).
func newRegion(p *Problem, in int, k float64) *region {
	g := &region{part: in, filling: p.Filling, k: k}
	if in >= 0 {
		g.filling = p.Parts[in].Filling
	}
	for i := range p.Parts {
		if p.Parts[i].In == in {
			g.pieces = append(g.pieces, newPiece(p, i, k))
		}
	}
	for i := range g.pieces {
		c := &g.pieces[i]
		if q := &p.Parts[c.part]; q.Core == Inside {
			c.inside = newRegion(p, c.part, q.K)
			c.inside.r = q.Radius
			c.inside.wall = c.stack
		}
		c.loosen(0)
	}
	return g
}

// loosen applies the clearance to the pieces.
func (g *region) loosen(clearance float64) {
	for i := range g.pieces {
		g.pieces[i].loosen(clearance)
	}
}

// settle keeps the pieces inside the round wall: what sticks out counts as touching.
func (g *region) settle(i int) {
	c := &g.pieces[i]
	if g.border != nil {
		g.border.settle(c)
		return
	}
	if c.a > g.r {
		c.a = g.r * (1 - 1e-9)
	}
	if l := math.Hypot(real(c.at), imag(c.at)); l+c.a > g.r {
		c.at *= complex((g.r-c.a)/l, 0)
	}
}

func dist(a, b complex128) float64 { return math.Hypot(real(a-b), imag(a-b)) }
