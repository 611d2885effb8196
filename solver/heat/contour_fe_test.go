package heat_test

import (
	"math"
	"testing"

	"packrise/solver/heat"
)

// beside is a section of a bar and round wires, with the conductors' temperatures by quadratic triangles (FreeFem++ 4; the scripts stand in
// testdata/fe-cases/scripts): three refinements and Richardson's extrapolation, converged to 0.002 K.
type beside struct {
	name string
	p    heat.Problem
	want []float64 // bar, wires
}

func besides() []beside {
	conduit := heat.Problem{MediumK: 0.026, Wall: heat.Wall{R: 22 * mm, Rings: []heat.Ring{{K: 0.17, Thickness: 2 * mm}}, Film: 9, Ambient: 30}}
	b := bar(24, 4, 0.5, 1, 0.2, 6)
	b.Y = -15 * mm
	conduit.Parts = append(conduit.Parts, b)
	for i, q := range []float64{0.8, 0.4, 1.2, 1.2, 0, 0.8, 0.3, 0.9, 0.6, 1.5, 0.7, 0.2} {
		w := wire(2*mm, 0.8*mm, 0.2, q)
		w.In, w.X, w.Y = -1, (-9.5+3.8*float64(i%6))*mm, (-10+3.8*float64(i/6))*mm
		conduit.Parts = append(conduit.Parts, w)
	}
	bundle := heat.Problem{MediumK: 0.026, Wall: heat.Wall{Shape: heat.Hull, Film: 10, Ambient: 25, Taut: taut}}
	bundle.Parts = append(bundle.Parts, bar(18, 4, 0.5, 1, 0.2, 5))
	for i, q := range []float64{1.5, 1, 0.5} {
		w := wire(2*mm, 0.8*mm, 0.2, q)
		w.In, w.X, w.Y = -1, (-4.5+4.5*float64(i))*mm, 5*mm
		if i == 1 {
			w.Y = 4.95 * mm // the string passes over it
		}
		bundle.Parts = append(bundle.Parts, w)
	}
	return []beside{
		{"bar12_conduit", conduit, []float64{77.647, 80.985, 82.605, 85.207, 85.295, 81.553, 80.450, 80.093, 84.694, 86.752, 88.416, 84.105, 79.238}},
		{"bar3_bundle", bundle, []float64{41.668, 44.237, 43.136, 40.514}},
	}
}

// A bar beside round wires, in a conduit and in an open bundle, against finite elements.
func TestContoursAgainstFiniteElements(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	for _, c := range besides() {
		for acc, within := range map[heat.Accuracy]float64{heat.Draft: 0.05, heat.Standard: 0.01, heat.Fine: 0.005} {
			r := solve(t, c.p, acc)
			worst, rise := 0.0, 0.0
			for i, want := range c.want {
				worst = math.Max(worst, math.Abs(r.Core[i]-want))
				rise = math.Max(rise, want-c.p.Wall.Ambient)
			}
			t.Logf("%-14s %d: error %.4f K of %.1f K, estimated %.4f, %d unknowns", c.name, acc, worst, rise, r.ErrorK, r.Unknowns)
			if worst > within {
				t.Errorf("%s, accuracy %d: error %.4f K", c.name, acc, worst)
			}
			if d := r.Released - r.Generated; math.Abs(d) > 2e-4*r.Generated {
				t.Errorf("%s: %g W/m do not balance", c.name, d)
			}
		}
	}
}
