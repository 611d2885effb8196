package outline

import (
	"math"
	"testing"
)

// TestCases solves whole sections and compares with converged finite elements (testdata/fe-cases, good to about 0.003 K; sides to 0.0005 W/m).
func TestCases(t *testing.T) {
	for _, c := range []struct {
		name   string
		within float64 // K
		sides  bool
	}{
		{"c09_rect7_floor_air", 0.006, false},
		{"c11_rect6_spaced_filler", 0.004, false},
		{"c13_sides_steel8", 0.008, true},
		{"c14b_sides_bare4", 0.002, true},
	} {
		t.Run(c.name, func(t *testing.T) {
			r, rods := readCase(t, c.name)
			orders(r, rods, 1)
			w := solveWhole(r, rods, 1, true)
			want := expected(t, "expected.csv", c.name)
			total := 0.0
			for i, p := range rods {
				total += p.heat
				if d := w.core[i] - want[p.id]; !(math.Abs(d) < c.within) {
					t.Errorf("%s: %.4f °C, want %.4f, off by %.4f K", p.id, w.core[i], want[p.id], d)
				}
			}
			_, _, out := w.wall.Faces(w.y, w.src)
			if d := out[0] + out[1] + out[2] + out[3] - total; !(math.Abs(d) < 1e-7*total) {
				t.Errorf("heat balance off by %g of %g W/m", d, total)
			}
			if !c.sides {
				return
			}
			want = expected(t, "expected_sides.csv", c.name)
			for i, side := range []string{"bottom", "right", "top", "left"} {
				if d := out[i] - want[side]; !(math.Abs(d) < 0.001) {
					t.Errorf("%s: %.4f W/m, want %.4f", side, out[i], want[side])
				}
			}
		})
	}
}
