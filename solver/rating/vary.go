package rating

import "math"

// Vary shifts inputs of a solution from what design and catalogue say, for bands. The zero Vary shifts nothing.
type Vary struct {
	Film       float64            // times the convective film outside, or a fixed film; 0 means 1
	Emissivity float64            // added to every emissivity, which stays between leastEmissivity and mostEmissivity
	K          map[string]float64 // material → times its conductivity
}

// What an emissivity can be shifted to.
const (
	leastEmissivity = 0.03
	mostEmissivity  = 0.98
)

func (v Vary) emissive(e float64) float64 {
	if v.Emissivity == 0 {
		return e
	}
	return math.Min(math.Max(e+v.Emissivity, math.Min(e, leastEmissivity)), math.Max(e, mostEmissivity))
}

func (v Vary) material(id string, m material) material {
	if f, ok := v.K[id]; ok {
		m.k *= f
	}
	m.emissivity = v.emissive(m.emissivity)
	return m
}

func (v Vary) outside(s *scene) {
	if v.Film <= 0 {
		return
	}
	s.filmW *= v.Film
	s.out.air.Convection = v.Film
}
