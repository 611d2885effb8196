package outline

// On returns the patches on a section that differs from theirs by its outside only (see Outside).
func (p *ShapedPatches) On(s *Shaped) *ShapedPatches {
	q := *p
	q.s = s
	q.gain = make([]float64, len(p.gain))
	for k := range q.gain {
		q.gain[k] = s.gain(s.bendOf(p.row[p.first[k]]))
	}
	return &q
}
