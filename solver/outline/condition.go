package outline

import "math"

// row is the condition of an edge: density·⟨σ⟩ + flux·⟨∂T/∂n⟩ + temp·⟨T⟩ = temp·outside, ⟨⟩ the mean over a cell, n outwards, ∂T/∂n the principal
// value on the edge.
type row struct{ density, flux, temp, outside float64 }

// conductivities returns those of the medium and of the layers.
func (r *Rect) conductivities() []float64 {
	k := []float64{r.MediumK}
	for _, l := range r.Layers {
		k = append(k, l.K)
	}
	return k
}

// rows returns the condition of each edge. Heat flow in k, out k': k(∂T/∂n + σ/2) = k'(∂T/∂n − σ/2); on the outer face −k(∂T/∂n + σ/2) = h(T − T_s).
func (r *Rect) rows(edges []edge) []row {
	k := r.conductivities()
	all := make([]row, len(edges))
	for i := range edges {
		e := &edges[i]
		in := k[e.face]
		if e.face < len(r.Layers) {
			out := k[e.face+1]
			all[i] = row{density: 1, flux: 2 * (in - out) / (in + out)}
			continue
		}
		s := r.Sides[e.side]
		switch {
		case s.Kind == Insulated:
			all[i] = row{density: 1, flux: 2}
		case s.Kind == Held || math.IsInf(s.Film, 1):
			all[i] = row{temp: 2 / e.length, outside: s.Temp}
		default: // scaled so that the limit of a large film is the line above
			c := 1 / (1 + s.Film*e.length/in)
			all[i] = row{density: c, flux: 2 * c, temp: 2 * c * s.Film / in, outside: s.Temp}
		}
	}
	return all
}
