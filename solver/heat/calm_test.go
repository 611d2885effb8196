package heat

import (
	"math"
	"math/cmplx"
	"testing"

	"packrise/solver/outline"
)

func TestCalm(t *testing.T) {
	r := &outline.Rect{W: 40, H: 30, Layers: []outline.Layer{{K: 0.2, Thickness: 1}, {K: 50, Thickness: 1e-3}, {K: 50, Thickness: 4e-3}}}
	for _, c := range []struct{ z, want complex128 }{
		{20 + 15i, 20 + 15i},
		{-0.5 + 15i, -0.5 + 15i},                   // plastic
		{-1.0001 + 15i, -1.0005 + 15i},             // the thin sheet's inner half
		{-1.0007 + 15i, -1.0007 + 15i},             // its outer one
		{41.00102 + 15i, 41.002 + 15i},             // the thick one, not to its middle
		{41.0025 + 15i, 41.0025 + 15i},             // deep in it
		{7 - 1.0002i, 7 - 1.0005i},                 // below
		{7 + 31.0002i, 7 + 31.0005i},               // above
		{-1.0001 - 1.0001i, -1.0005 - 1.0005i},     // a corner's diagonal
		{41.0001 + 31.00005i, 41.0005 + 31.00025i}, // between
	} {
		if got := calm(r, c.z); cmplx.Abs(got-c.want) > 1e-9 {
			t.Errorf("%v goes to %v, want %v", c.z, got, c.want)
		}
	}
	// no jump at the end of a side
	a, b := calm(r, complex(1e-9-1, -1.0002)), calm(r, complex(-1e-9-1, -1.0002))
	if math.Abs(real(a-b))+math.Abs(imag(a-b)) > 1e-8 {
		t.Errorf("%v and %v across the corner's edge", a, b)
	}
}
