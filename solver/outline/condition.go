package outline

import "math"

// row is the condition of an edge: density·⟨σ⟩ + flux·⟨∂T/∂n⟩ + temp·⟨T⟩ = temp·outside, ⟨⟩ the mean over a cell, n outwards, ∂T/∂n the principal
// value on the edge.
type row struct{ density, flux, temp, outside float64 }

// check panics on what no caller may pass.
func (r *Rect) check() {
	positive := func(x float64) bool { return x > 0 && !math.IsInf(x, 0) }
	ok := positive(r.W) && positive(r.H) && positive(r.MediumK)
	for _, l := range r.Layers {
		ok = ok && positive(l.K) && positive(l.Thickness)
	}
	for _, s := range r.Sides {
		ok = ok && (s.Kind != Open || s.Film >= 0)
	}
	if !ok {
		panic("outline: size, conductivity or thickness not positive, or negative film")
	}
}

// sealed tells that no side lets heat out.
func (r *Rect) sealed() bool {
	for _, s := range r.Sides {
		if s.Kind == Held || s.Kind == Open && s.Film > 0 {
			return false
		}
	}
	return true
}

// conductivities returns those of the medium and of the layers.
func (r *Rect) conductivities() []float64 {
	k := []float64{r.MediumK}
	for _, l := range r.Layers {
		k = append(k, l.K)
	}
	return k
}

// rows returns the condition of each edge. Heat flow between k and k': k(∂T/∂n + σ/2) = k'(∂T/∂n − σ/2); on the outer face −k(∂T/∂n + σ/2) = h(T − outside).
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
		default: // scaled so that a large film tends to the line above
			c := 1 / (1 + s.Film*e.length/in)
			all[i] = row{density: c, flux: 2 * c, temp: 2 * c * s.Film / in, outside: s.Temp}
		}
	}
	return all
}
