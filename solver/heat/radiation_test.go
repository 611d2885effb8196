package heat_test

import (
	"context"
	"math"
	"testing"

	"packrise/solver/heat"
)

var radiatingCases = []string{"r05b_concentric1", "r01_conduit9_plastic", "r04_loose7_conduit40", "r08_nested_cable", "r09b_sides10_steel", "r03_wireway24_steel"}

// TestRadiatingCases compares with converged finite elements with radiating surfaces (testdata/fe-cases/README.md, good to 0.002–0.01 K).
func TestRadiatingCases(t *testing.T) {
	want := expected(t, "expected.csv", "temperature_c")
	sides := expected(t, "expected_sides.csv", "released_w_m")
	for _, name := range radiatingCases {
		l := load(t, name)
		for acc, most := range map[heat.Accuracy]float64{heat.Draft: 0.08, heat.Standard: 0.03, heat.Fine: 0.017} {
			r := heat.New(l.Problem, heat.Settings{Accuracy: acc}).Solve(context.Background(), nil)
			worst, rise := 0.0, 0.0
			for i, id := range l.ids {
				if w, ok := want[name][id]; ok {
					worst = math.Max(worst, math.Abs(r.Core[i]-w))
					rise = math.Max(rise, w-l.Wall.Ambient)
				}
			}
			t.Logf("%-28s %d: error %8.4f K of %5.1f K, estimate %.4f, %4d unknowns, %3d steps, %v", name, acc, worst, rise, r.ErrorK, r.Unknowns, r.Steps, r.Status)
			if r.Status != heat.Converged || worst > most {
				t.Errorf("%s, accuracy %d: error %.4f K, %v", name, acc, worst, r.Status)
			}
			if math.Abs(r.Released/r.Generated-1) > 1e-6 {
				t.Errorf("%s: %g W/m made, %g released", name, r.Generated, r.Released)
			}
			for k, s := range []string{"bottom", "right", "top", "left"} {
				if w, ok := sides[name][s]; ok && math.Abs(r.SideOut[k]-w) > 0.005*9.4 {
					t.Errorf("%s: %s releases %.4f W/m, want %.4f", name, s, r.SideOut[k], w)
				}
			}
		}
	}
}

// One insulated wire in the middle of a pipe: all resistances in series, radiation by the two-surface formula (F. P. Incropera and D. P. DeWitt,
// Fundamentals of Heat and Mass Transfer, table 13.3), solved by bisection; testdata/fe-cases gives 91.061 °C.
func TestConcentricRadiation(t *testing.T) {
	l := load(t, "r05b_concentric1")
	const q, a, b, k = 10.0, 2.6e-3, 10e-3, 0.027
	ln := func(r, s float64) float64 { return math.Log(s/r) / (2 * math.Pi) }
	wall := 30 + q*(1/(2*math.Pi*11.5e-3*8)+ln(10e-3, 11.5e-3)/0.2)
	lo, hi := wall, wall+200
	for range 60 {
		s := (lo + hi) / 2
		power := func(t float64) float64 { return math.Pow(t+273.15, 4) }
		out := (s-wall)/ln(a, b)*k + 2*math.Pi*a*5.670374419e-8*(power(s)-power(wall))/(1/0.9+a/b*(1/0.8-1))
		if out > q {
			hi = s
		} else {
			lo = s
		}
	}
	want := lo + q*ln(1.8e-3, 2.6e-3)/0.2
	if math.Abs(want-91.061) > 1.5e-3 { // the constant may have been 5.67e-8
		t.Fatalf("closed form gives %.4f °C, the file says 91.061", want)
	}
	if r := heat.New(l.Problem, heat.Settings{}).Solve(context.Background(), nil); math.Abs(r.Core[0]-want) > 1e-3 {
		t.Errorf("%.4f °C, want %.4f", r.Core[0], want)
	}
}
