package rating

import (
	"math"
	"testing"
)

// TestAnderson: a linear fixed point in two unknowns ends exactly once as many answers are known as there are unknowns and one, also where the
// plain iteration runs away; a strongly bent one converges.
func TestAnderson(t *testing.T) {
	linear := func(x []float64) []float64 { return []float64{1 - 0.9*x[0] + 0.3*x[1], 2 + 0.2*x[0] - 1.3*x[1]} }
	var a anderson
	x := []float64{5, -3}
	for range 4 {
		x = a.next(x, linear(x))
	}
	// (1.9, −0.3; −0.2, 2.3) x = (1, 2), determinant 4.31
	if math.Abs(x[0]-2.9/4.31) > 1e-4 || math.Abs(x[1]-4/4.31) > 1e-4 {
		t.Errorf("linear: %v", x)
	}
	a.forget()
	x = []float64{3}
	for range 12 {
		x = a.next(x, []float64{math.Exp(-2 * x[0])}) // x = e^{−2x} at 0.4263027510…, half of the omega function of 2
	}
	if math.Abs(x[0]-0.42630275100686274) > 1e-9 {
		t.Errorf("bent: %v", x)
	}
}
