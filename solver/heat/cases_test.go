package heat_test

import (
	"context"
	"math"
	"testing"

	"packrise/solver/heat"
)

// referenceCases are the conduction sections with temperatures from a converged general finite-element solution
// (testdata/fe-cases/README.md).
var referenceCases = []string{
	"c01_single_touch_air", "c02_hex7_spaced_air", "c04_hex7_touch_wall_air", "c05_hex7_touch_filler", "c06_mixed19_settled_air",
	"c07_hex37_gap100um_filler", "c12_nested_cable_air", "m01_screen7", "m02_hose_air", "h01_hex7_conductive", "h02b_ratio12",
	"c09_rect7_floor_air", "c11_rect6_spaced_filler", "c13_sides_steel8", "c14b_sides_bare4",
}

func TestReferenceCases(t *testing.T) {
	want := expected(t, "expected.csv", "temperature_c")
	for _, name := range referenceCases {
		l := load(t, name)
		for _, acc := range []heat.Accuracy{heat.Draft, heat.Standard, heat.Fine} {
			r := heat.New(l.Problem, heat.Settings{Accuracy: acc}).Solve(context.Background(), nil)
			worst, rise := 0.0, 0.0
			for i, id := range l.ids {
				w, ok := want[name][id]
				if !ok {
					continue
				}
				e := r.Core[i] - w
				if math.Abs(e) > math.Abs(worst) {
					worst = e
				}
				rise = math.Max(rise, w-l.Wall.Ambient)
			}
			t.Logf("%-28s %d: error %8.4f K of %5.1f K, estimate %.4f, %4d unknowns, %3d steps, %v", name, acc, worst, rise, r.ErrorK, r.Unknowns, r.Steps, r.Status)
			if math.Abs(worst) > 0.005*rise {
				t.Errorf("%s: error %.4f K", name, worst)
			}
		}
	}
}
