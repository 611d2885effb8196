package heat

import (
	"packrise/solver/gas"
	"packrise/solver/outline"
)

// sides are the patches of a border's inside: of a rectangle's, or of a bundle's strings.
type sides struct {
	wall   patched
	with   *exchange
	a, b   []complex128 // ends of the patches, counterclockwise
	length []float64    // m
	patch  patches
	taken  []float64 // W/m that each patch takes up

	// Of contours: parts that are not round, whose patches come first, then the wall; and the emissivity of each patch.
	bodies []gas.Disc
	walls  []gas.Segment
	eps    []float64
}

// patched is a border whose inside can be divided.
type patched interface {
	border
	divide(grain *gas.Grain) *sides
	exposed(i int) [][2]float64      // arcs of piece i, from angle to angle, that do not face the inside
	tell(b *bound)                   // fills in what the unknowns b.y say of the wall
	direct(b *bound, s *sides)       // adds what patches give off straight to the outside, if tell does not see it
	follow(s *sides, moved int) bool // after a move or other films; false if the border was divided otherwise
}

// patches are those of a discretised border.
type patches interface {
	RespondTo(y []float64, src outline.Sources, ground bool, w []float64)
	Means(t, y []float64, src outline.Sources)
	RespondMany(l *outline.Lot, w []float64)
	MeansMany(t []float64, l *outline.Lot)
}

func (s *sides) outline() gas.Outline {
	if s.walls != nil {
		return gas.Outline{Segments: s.walls}
	}
	o := gas.Outline{Segments: make([]gas.Segment, len(s.length))}
	for k := range o.Segments {
		o.Segments[k] = gas.Segment{A: s.a[k], B: s.b[k]}
	}
	return o
}

// bring is exchange.bring with what the patches take up.
func (s *sides) bring(g *region, charge, v []float64, ground bool, y, mean []float64) {
	w := s.with
	w.fill(g, charge, v)
	s.patch.RespondTo(w.y, w.src, ground, s.taken)
	w.fetch(g, y, mean)
}

// means sets t to the temperatures of the patches after bring.
func (s *sides) means(t []float64) { s.patch.Means(t, s.with.y, s.with.src) }

// bound is the wall after bring.
func (s *sides) bound() *bound {
	w := s.with
	b := &bound{y: append([]float64(nil), w.y...)}
	for _, v := range w.b {
		b.b = append(b.b, append([]complex128(nil), v...))
	}
	s.wall.tell(b)
	s.wall.direct(b, s)
	return b
}

// divide divides the inside of a wall that is written.
func (r *rectWall) divide(grain *gas.Grain) *sides {
	usual := 2 * (r.rect.W + r.rect.H) / grain.Turn
	p := r.sys.Patches(func(z complex128) float64 { return grain.Longest(z, usual, -1) })
	return &sides{wall: r, with: &r.exchange, a: p.A, b: p.B, length: p.Length, patch: p, taken: make([]float64, len(p.Length))}
}

func (r *rectWall) exposed(int) [][2]float64 { return nil }

func (r *rectWall) direct(b *bound, s *sides) {
	for i, v := range s.patch.(*outline.Patches).Direct(s.taken) {
		b.sides[i] += v
		b.released += v
	}
}

func (r *rectWall) follow(s *sides, moved int) bool {
	p := s.patch.(*outline.Patches)
	if !p.Of(r.sys) {
		return false
	}
	if moved >= 0 {
		p.Follow(moved)
	}
	return true
}
