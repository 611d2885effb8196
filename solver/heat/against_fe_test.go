package heat_test

import (
	"math"
	"testing"

	"packrise/solver/heat"
)

// rosette is seven wires of 4 mm, six round one, turned by 10°.
func rosette(ring float64) (parts []heat.Part) {
	for i, q := range []float64{2, 1, 1.5, 3, 2.5, 1.2, 1.8} {
		w := heat.Part{In: -1, Core: heat.Metal, Radius: 1.2e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 0.8e-3}}, Heat: q}
		if i > 0 {
			s, c := math.Sincos((10 + 60*float64(i-1)) * math.Pi / 180)
			w.X, w.Y = ring*c, ring*s
		}
		parts = append(parts, w)
	}
	return parts
}

// TestAgainstFiniteElements compares with converged finite elements (own FreeFem++ run, quadratic elements on meshes of up to 410 000 nodes, extrapolated
// from two of them; good to 1 mK).
func TestAgainstFiniteElements(t *testing.T) {
	for _, c := range []struct {
		name    string
		p       heat.Problem
		want    []float64
		against float64
	}{
		{"jacket on an insulating floor", heat.Problem{
			Parts: rosette(4.3e-3), MediumK: 0.027,
			Wall: heat.Wall{R: 6.6e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 1.2e-3}}, Film: 9, Ambient: 30, Against: heat.Against{Share: 0.25, At: -math.Pi / 2}},
		}, []float64{87.8635, 79.7925, 80.3228, 84.8710, 86.2010, 87.4016, 85.8740}, 0},
		{"bundle on a floor held at 66 °C", heat.Problem{
			Parts: rosette(4.2e-3), MediumK: 0.027,
			Wall: heat.Wall{Shape: heat.Hull, Taut: taut, Film: 10, Ambient: 30, Against: heat.Against{Share: 0.2, At: -math.Pi / 2, Held: true, Temp: 66}},
		}, []float64{72.4707, 66.4484, 68.4298, 72.5745, 71.5109, 68.1394, 68.2526}, 13 - 10.63573},
	} {
		for grade, limit := range map[heat.Accuracy]float64{heat.Standard: 0.03, heat.Fine: 0.01} {
			r := solveAt(c.p, grade)
			worst := 0.0
			for i, v := range c.want {
				worst = math.Max(worst, math.Abs(r.Core[i]-v))
			}
			t.Logf("%s, accuracy %d: worst %.4f K of %.1f, estimate %.4f, %.5f W/m (%.5f)", c.name, grade, worst, c.want[0]-30, r.ErrorK, r.AgainstOut, c.against)
			if worst > limit {
				t.Errorf("%s, accuracy %d: %v, want %v", c.name, grade, r.Core, c.want)
			}
			if d := math.Abs(r.AgainstOut - c.against); d > 5e-3*c.against+1e-9 {
				t.Errorf("%s: %v W/m into what it rests against, want %v", c.name, r.AgainstOut, c.against)
			}
		}
	}
}
