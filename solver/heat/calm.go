package heat

import (
	"math"

	"packrise/solver/outline"
)

// calmDepth is how far into a layer of good metal (m) the errors of the heat that comes in cell by cell are felt at most.
const calmDepth = 1e-3

// calm says where the temperature at z is taken in pictures. Across sheet metal it changes by some mK, along it by kelvins; the
// errors of the heat that comes in through the inside face, cell by cell, die away with the depth. So the inner half of a layer of good
// metal shows what its middle has.
func calm(r *outline.Rect, z complex128) complex128 {
	x, y := math.Max(-real(z), real(z)-r.W), math.Max(-imag(z), imag(z)-r.H) // beyond the inside
	d, in := math.Max(x, y), 0.0
	for _, l := range r.Layers {
		if deep := math.Min(l.Thickness/2, calmDepth); l.K > metalK && d > in && d < in+deep {
			more := deep/(d-in) - 1
			return complex(outwards(real(z), r.W, more*math.Max(0, x-in)), outwards(imag(z), r.H, more*math.Max(0, y-in)))
		}
		in += l.Thickness
	}
	return z
}

// outwards moves a coordinate away from 0 … w.
func outwards(at, w, by float64) float64 {
	if at < w/2 {
		return at - by
	}
	return at + by
}
