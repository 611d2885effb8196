package heat

import (
	"packrise/solver/gas"
	"packrise/solver/outline"
)

// sides are the patches of a rectangle's inside.
type sides struct {
	wall  *rectWall
	sys   *outline.System // that the patches belong to
	patch *outline.Patches
	taken []float64 // W/m that each patch takes up
}

// newSides divides the inside of a wall that is written.
func newSides(w *rectWall, grain *gas.Grain) *sides {
	usual := 2 * (w.rect.W + w.rect.H) / grain.Turn
	s := &sides{wall: w, sys: w.sys}
	s.patch = w.sys.Patches(func(z complex128) float64 { return grain.Longest(z, usual, -1) })
	n := len(s.patch.Length)
	s.taken = make([]float64, n)
	return s
}

func (s *sides) outline() gas.Outline {
	o := gas.Outline{Segments: make([]gas.Segment, len(s.patch.Length))}
	for k := range o.Segments {
		o.Segments[k] = gas.Segment{A: s.patch.A[k], B: s.patch.B[k]}
	}
	return o
}

// bring is exchange.bring with what the patches take up.
func (s *sides) bring(g *region, charge, v []float64, ground bool, y, mean []float64) {
	w := s.wall
	w.fill(g, charge, v)
	s.patch.RespondTo(w.y, w.src, ground, s.taken)
	w.fetch(g, y, mean)
}

// means sets t to the temperatures of the patches after bring.
func (s *sides) means(t []float64) { s.patch.Means(t, s.wall.y, s.wall.src) }

// bound is the wall after bring.
func (s *sides) bound() *bound {
	w := s.wall
	b := &bound{y: append([]float64(nil), w.y...)}
	for _, v := range w.b {
		b.b = append(b.b, append([]complex128(nil), v...))
	}
	w.tell(b)
	for i, v := range s.patch.Direct(s.taken) {
		b.sides[i] += v
		b.released += v
	}
	return b
}

// follow takes over that piece i has moved; false if the wall has been written again since.
func (s *sides) follow(i int) bool {
	if s.sys != s.wall.sys {
		return false
	}
	s.patch.Follow(i)
	return true
}
