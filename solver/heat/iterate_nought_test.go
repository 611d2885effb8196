package heat

import "testing"

// TestNought: with no source left a warm start ends at nothing, converged, whatever it starts from.
func TestNought(t *testing.T) {
	a := func(y, x []float64) {
		y[0], y[1] = 2*x[0]+x[1], x[0]+3*x[1]
	}
	for name, solve := range map[string]func(operator, []float64, []float64, float64, func() bool) (int, bool){"conjugate": conjugate, "minres": minres} {
		x := []float64{1, 2}
		if steps, ok := solve(a, x, []float64{0, 0}, 1e-6, func() bool { return false }); !ok || steps != 0 || x[0] != 0 || x[1] != 0 {
			t.Errorf("%s: %d steps, %v, x %v", name, steps, ok, x)
		}
	}
}
