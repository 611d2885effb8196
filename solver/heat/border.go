package heat

import (
	"math"

	"packrise/solver/outline"
)

// border is a wall whose densities are eliminated exactly in every product with the parts: a rectangle's, or the hull of a bundle.
type border interface {
	settle(c *piece)                                 // keeps a piece inside: what sticks out counts as touching
	gap(c *piece) float64                            // between c's rim and the wall
	metal() bool                                     // whether the inside is bare metal anywhere
	order(g *region, c *piece, f float64, m int) int // that c needs beside the wall, 0 if it is not above m
	write(g *region, stop func() bool) bool          // discretises for the region's pieces; false if stop asked for an end
	move(g *region, i int) bool                      // follows piece i; false if the wall has to be written again
	bring(g *region, charge, v []float64, ground bool, y, mean []float64)
	solved(g *region, charge, v, mean []float64) *bound
	fork() border    // for products beside it
	hand() *exchange // what goes between it and the pieces
}

// maxOrderBorder bounds the harmonics of a piece within a border, which keeps no more.
const maxOrderBorder = 64

// bound is a border after solving.
type bound struct {
	y        []float64
	b        [][]complex128 // what it sends back to each piece
	hot      []float64      // as Result.WallMax
	mean     float64        // of the outer surface
	sides    [4]float64
	released float64
	against  float64    // of it, what the outside rests against takes up
	mid      complex128 // of a square that covers everything
	half     float64
	field    func() pointField
	sheet    *outline.Rect         // of a rectangle
	arcs     []Arc                 // of a hull
	drawn    *contourBound         // of contours
	high     func() [][]complex128 // of a hull: what comes to the pieces beyond their orders
}

// pointField is a border's own field, NaN outside.
type pointField interface{ At(z complex128) float64 }

// exchange is what goes between a border and the pieces.
type exchange struct {
	discs []outline.Disc
	src   outline.Sources
	b     [][]complex128
	y     []float64
	with  responder

	threads int // for discretising the border
}

// responder is a discretised border.
type responder interface {
	Len() int
	RespondTo(y []float64, src outline.Sources, ground bool)
	Incoming(y []float64, b [][]complex128)
	RespondMany(l *outline.Lot)
	IncomingMany(l *outline.Lot)
}

// collect lists the region's pieces.
func (e *exchange) collect(g *region) {
	n := len(g.pieces)
	e.discs = make([]outline.Disc, n)
	e.b = make([][]complex128, n)
	e.src = outline.Sources{Q: make([]float64, n), D: make([][]complex128, n)}
	for i := range g.pieces {
		e.discs[i] = outline.Disc{C: g.pieces[i].at, A: g.pieces[i].a, M: g.orders[i]}
		e.b[i] = make([]complex128, g.orders[i]+1)
		e.src.D[i] = make([]complex128, g.orders[i])
	}
}

func (e *exchange) begin(with responder) {
	e.with = with
	e.y = make([]float64, with.Len())
}

// bring adds what the border sends back to scaled outgoing amplitudes v and heats charge (W/m, nil for none): the scaled incoming amplitudes
// to y, the mean temperatures to mean unless it is nil. ground adds the drive of sides and ambient.
func (e *exchange) bring(g *region, charge, v []float64, ground bool, y, mean []float64) {
	e.fill(g, charge, v)
	e.with.RespondTo(e.y, e.src, ground)
	e.fetch(g, y, mean)
}

// fill puts scaled outgoing amplitudes v and heats charge (W/m, nil for none) in the border's terms.
func (e *exchange) fill(g *region, charge, v []float64) {
	for i := range e.discs {
		e.src.Q[i] = 0
		if charge != nil {
			e.src.Q[i] = charge[i]
		}
		s, o := g.sys.Disc(i).S, g.sys.Offset(i)
		for n, f := range s {
			f *= rootsOf(n + 1)
			e.src.D[i][n] = complex(f*v[o+2*n], f*v[o+2*n+1])
		}
	}
}

// fetch adds what the border sends back: the scaled incoming amplitudes to y, the mean temperatures to mean unless it is nil.
func (e *exchange) fetch(g *region, y, mean []float64) {
	for _, b := range e.b {
		clear(b)
	}
	e.with.Incoming(e.y, e.b)
	for i := range e.discs {
		s, o := g.sys.Disc(i).S, g.sys.Offset(i)
		for n, f := range s {
			f /= rootsOf(n + 1)
			b := e.b[i][n+1]
			y[o+2*n] += f * real(b)
			y[o+2*n+1] -= f * imag(b)
		}
		if mean != nil {
			mean[i] += real(e.b[i][0])
		}
	}
}

// answer finds the border's answer to the whole solution, ground included, and adds the means that it sends back.
func (e *exchange) answer(g *region, charge, v, mean []float64) *bound {
	e.bring(g, charge, v, true, make([]float64, len(v)), mean)
	s := &bound{y: append([]float64(nil), e.y...)}
	for _, b := range e.b {
		s.b = append(s.b, append([]complex128(nil), b...))
	}
	return s
}

// fork is an exchange with the same border and room of its own.
func (e *exchange) fork() exchange {
	f := exchange{discs: e.discs, y: make([]float64, len(e.y)), with: e.with}
	f.src.Q = make([]float64, len(e.src.Q))
	for i := range e.b {
		f.b = append(f.b, make([]complex128, len(e.b[i])))
		f.src.D = append(f.src.D, make([]complex128, len(e.src.D[i])))
	}
	return f
}

// inverseRoots[n-1] = 1/√n.
var inverseRoots = func() (r [maxOrder]float64) {
	for i := range r {
		r[i] = 1 / math.Sqrt(float64(i+1))
	}
	return r
}()

func rootsOf(n int) float64 { return inverseRoots[n-1] }
