package outline

import "math"

// At adds nothing for the parts: it is the wall's own field in the medium, T_c included.
func (s *System) At(y []float64, z complex128) float64 {
	t := y[s.n]
	var f potential
	for i := range s.panels {
		p := &s.panels[i]
		w := (z - p.mid) * scale(1/p.half, conj(p.dir))
		f.at(w, p.p, false, false)
		sum := 2 * math.Log(p.half) * y[p.dof]
		for k := range p.p {
			sum += y[p.dof+k] * real(f.first[k])
		}
		t -= sum * p.half / (2 * math.Pi)
	}
	return t
}

// InWall returns the temperature inside the wall's layers at z, given the whole solution; NaN outside the outer face.
func (s *System) InWall(y []float64, src Sources, z complex128) float64 {
	e := &s.edges[len(s.edges)-4]
	rel := z - e.start
	if real(rel) < 0 || imag(rel) < 0 || real(rel) > e.length || imag(rel) > s.edges[len(s.edges)-3].length {
		return math.NaN()
	}
	return s.At(y, z) + s.sourcesAt(src, z)
}
