package pack

import (
	"math"
	"testing"
)

// Lay-up factors (diameter over the cores by the diameter of one): closed forms for 2–7, 10, 12 and 19 and the trade's table for laid-up cores.
// The trade's figures are rounded to three decimals at most.
func TestLayUpFactors(t *testing.T) {
	for _, c := range []struct {
		n      int
		factor float64
		tol    float64
		source string
	}{
		{1, 1, 1e-12, "itself"},
		{2, 2, 1e-12, "closed form"},
		{3, 1 + 2/math.Sqrt(3), 1e-12, "closed form"},
		{4, 1 + math.Sqrt2, 1e-12, "closed form"},
		{5, 1 + 1/math.Sin(math.Pi/5), 1e-12, "closed form"},
		{6, 3, 1e-12, "1+5 round one"},
		{7, 3, 1e-12, "1+6"},
		{10, 4, 1e-12, "2+8, trade's table of lay-up factors, from memory"},
		{12, 4.155, 5e-4, "3+9, trade's table of lay-up factors, from memory"},
		{19, 5, 1e-12, "1+6+12, the usual concentric lay"},
		{37, 7, 1e-12, "1+6+12+18"},
		{61, 9, 1e-12, "1+6+12+18+24"},
	} {
		radii := make([]float64, c.n)
		for i := range radii {
			radii[i] = 0.7
		}
		d, r := LayUp(radii)
		if math.Abs(r/0.7-c.factor) > c.tol {
			t.Errorf("%d cores: factor %.6f, want %.6f (%s)", c.n, r/0.7, c.factor, c.source)
		}
		if i, j, depth := Overlap(d, Box{R: r}); depth > 1e-12*r {
			t.Errorf("%d cores: %d and %d overlap by %g", c.n, i, j, depth)
		}
	}
}
