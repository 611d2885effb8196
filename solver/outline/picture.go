package outline

import "math"

// Field is the wall's own field (T_c included, the parts' multipoles not) made ready for very many points. Safe for concurrent use.
type Field struct {
	s *System
	squares
}

// Field prepares the wall's field for many points: a few milliseconds.
func (s *System) Field(y []float64) *Field {
	f := &Field{s: s}
	e := s.outerEdges()
	all := make([]carrier, len(s.panels))
	for i := range all {
		all[i] = &s.panels[i]
	}
	f.squares = newSquares((e[0].start+e[2].start)/2, math.Max(e[0].length, e[1].length)/2, all, y[:s.n+1], f.outside)
	return f
}

// outside tells whether all of q is outside the outer face.
func (f *Field) outside(q *cell) bool {
	e := f.s.outerEdges()
	lo, hi := q.mid-complex(q.half, q.half)-e[2].start, q.mid+complex(q.half, q.half)-e[0].start
	return real(lo) > 0 || imag(lo) > 0 || real(hi) < 0 || imag(hi) < 0
}

// At returns the field at z, in the medium and in the wall's layers; NaN outside the outer face.
func (f *Field) At(z complex128) float64 {
	if !f.s.within(z) {
		return math.NaN()
	}
	return f.value(z)
}
