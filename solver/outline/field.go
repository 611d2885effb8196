package outline

import "math"

// At adds nothing for the parts: it is the wall's own field in the medium, T_c included. Field is quicker for many points.
func (s *System) At(y []float64, z complex128) float64 {
	t := y[s.n]
	var v sight
	for i := range s.panels {
		p := &s.panels[i]
		t += p.temperature(&v, y[p.dof:], z)
	}
	return t
}

// temperature is what the density Σ y_k P_k on p makes at z.
func (p *panel) temperature(v *sight, y []float64, z complex128) float64 {
	v.at(p.frame(z), p.p, false, false)
	sum := p.log() * y[0]
	for k := range p.p {
		sum += y[k] * real(v.first[k])
	}
	return sum * p.unit()
}

// within tells whether z lies inside the outer face.
func (s *System) within(z complex128) bool {
	e := s.outerEdges()
	z -= e[0].start
	return real(z) >= 0 && imag(z) >= 0 && real(z) <= e[0].length && imag(z) <= e[1].length
}

// InWall returns the temperature inside the wall's layers at z, given the whole solution; NaN outside the outer face. Between the parts
// it holds as well.
func (s *System) InWall(y []float64, src Sources, z complex128) float64 {
	if !s.within(z) {
		return math.NaN()
	}
	return s.At(y, z) + s.sourcesAt(src, z)
}
