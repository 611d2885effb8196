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

// edges returns the sides of all interfaces of r, interface by interface.
func (r *Rect) edges() []edge {
	all := make([]edge, 0, 4*(len(r.Layers)+1))
	grow := 0.0
	for f := 0; f <= len(r.Layers); f++ {
		if f > 0 {
			grow += r.Layers[f-1].Thickness
		}
		z, dir := complex(-grow, -grow), complex(1, 0)
		for side := range 4 {
			l := r.W + 2*grow
			if side%2 == 1 {
				l = r.H + 2*grow
			}
			all = append(all, edge{face: f, side: side, start: z, dir: dir, length: l})
			z += scale(l, dir)
			dir *= 1i
		}
	}
	return all
}

// panel is a straight piece of an edge that carries a density Σ s_k P_k.
type panel struct {
	edge      int
	along     float64 // of its middle, from the start of the edge
	half      float64
	mid, dir  complex128
	p         int // modes
	dof       int // its first unknown and its first row
	firstCell int // its first end of a cell among all
}

// newPanel covers the piece lo–hi of edge i.
func newPanel(e *edge, i int, lo, hi float64, p int) panel {
	along := (lo + hi) / 2
	return panel{edge: i, along: along, half: (hi - lo) / 2, mid: e.at(along), dir: e.dir, p: p}
}

// at returns the point of the panel at t in −1 … 1.
func (p *panel) at(t float64) complex128 { return p.mid + scale(p.half*t, p.dir) }

// frame maps z to the coordinate in which the panel is [−1, 1].
func (p *panel) frame(z complex128) complex128 { return (z - p.mid) * scale(1/p.half, conj(p.dir)) }

// distance from the panel to z.
func (p *panel) distance(z complex128) float64 {
	w := p.frame(z)
	return p.half * math.Hypot(math.Max(0, math.Abs(real(w))-1), imag(w))
}
