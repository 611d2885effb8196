package heat_test

import (
	"math"
	"testing"

	"packrise/solver/heat"
)

// allContours gives every round part of the top level as a flat of equal sides, so that nothing stays a piece.
func allContours(p heat.Problem) heat.Problem {
	p.Parts = append([]heat.Part(nil), p.Parts...)
	for i := range p.Parts {
		if q := &p.Parts[i]; q.In == -1 && q.Form.Kind == heat.Disc {
			q.Form = heat.Form{Kind: heat.Flat, W: 2 * q.Radius, H: 2 * q.Radius}
		}
	}
	return p
}

// The reference sections whose surfaces radiate, solved by contours (testdata/fe-cases/README.md).
func TestShapedRadiatingCases(t *testing.T) {
	want := expected(t, "expected.csv", "temperature_c")
	sides := expected(t, "expected_sides.csv", "released_w_m")
	names := []string{"r05b_concentric1", "r08_nested_cable", "r04_loose7_conduit40", "r01_conduit9_plastic", "r09b_sides10_steel"}
	grades := []heat.Accuracy{heat.Standard, heat.Draft, heat.Fine}
	for _, name := range names[:soak(3, len(names))] {
		l := load(t, name)
		for _, acc := range grades[:soak(1, len(grades))] {
			most := [...]float64{heat.Standard: 0.03, heat.Draft: 0.1, heat.Fine: 0.025}[acc]
			r := solve(t, allContours(l.Problem), acc)
			worst, rise := 0.0, 0.0
			for i, id := range l.ids {
				if w, ok := want[name][id]; ok {
					worst = math.Max(worst, math.Abs(r.Core[i]-w))
					rise = math.Max(rise, w-l.Wall.Ambient)
				}
			}
			t.Logf("%-28s %d: error %8.4f K of %5.1f K, estimate %.4f, %4d unknowns, %3d steps, %v", name, acc, worst, rise, r.ErrorK, r.Unknowns, r.Steps, r.Status)
			if r.Status != heat.Converged || !r.Radiates || worst > most {
				t.Errorf("%s, accuracy %d: error %.4f K, %v", name, acc, worst, r.Status)
			}
			if math.Abs(r.Released/r.Generated-1) > 2e-4 {
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

// The open bundles among them: the pockets under the strings radiate.
func TestShapedRadiatingBundles(t *testing.T) {
	want := expected(t, "expected.csv", "temperature_c")
	for _, name := range []string{"b01_three_gas", "b05_big_small_gas", "b03_mixed12_gas"}[:soak(2, 3)] {
		l := bundle(t, name)
		r := solve(t, allContours(l.Problem), heat.Standard)
		worst := 0.0
		for i, id := range l.ids {
			if w, ok := want[name][id]; ok {
				worst = math.Max(worst, math.Abs(r.Core[i]-w))
			}
		}
		t.Logf("%-20s error %.4f K, estimate %.4f, %d unknowns, %d steps, %v", name, worst, r.ErrorK, r.Unknowns, r.Steps, r.Status)
		if worst > 0.03 || !r.Radiates || math.Abs(r.Released/r.Generated-1) > 2e-4 {
			t.Errorf("%s: error %.4f K, %g of %g W/m released", name, worst, r.Released, r.Generated)
		}
	}
}

// duct holds two bars on edge in a steel duct full of a gas, one bare, one insulated.
func duct() heat.Problem {
	at := func(p heat.Part, x, y float64) heat.Part {
		p.X, p.Y = x*mm, y*mm
		return p
	}
	p := heat.Problem{MediumK: 0.028, Filling: heat.Gas, ZeroK: 273.15, Wall: heat.Wall{
		Shape: heat.Rect, W: 60 * mm, H: 40 * mm, Rings: []heat.Ring{{K: 45, Thickness: 1.5 * mm}}, Film: 9, Ambient: 30, Emissivity: 0.25,
	}}
	p.Parts = []heat.Part{at(bar(5, 30, 0.5, 0, 0, 12), 18, 20), at(bar(5, 30, 0.5, 1, 0.2, 18), 36, 19)}
	p.Parts[0].Emissivity, p.Parts[1].Emissivity = 0.08, 0.9
	return p
}

// flatInConduit is a flat cable of two cores, full of gas, askew in a plastic conduit with a wire beside it.
func flatInConduit() heat.Problem {
	p := heat.Problem{MediumK: 0.027, Filling: heat.Gas, ZeroK: 273.15, Wall: heat.Wall{
		R: 16 * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 1.8 * mm}}, Film: 10, Ambient: 25, Emissivity: 0.9,
	}}
	sin, cos := math.Sincos(0.3)
	core := func(x, y, over, q float64) heat.Part {
		return heat.Part{In: 0, X: (x*cos - y*sin) * mm, Y: (x*sin + y*cos) * mm, Radius: 1.4 * mm, Heat: q, Emissivity: 0.9, Rings: []heat.Ring{{K: 0.2, Thickness: over * mm}}}
	}
	p.Parts = []heat.Part{
		{
			In: -1, Core: heat.Inside, X: -2 * mm, Y: -8 * mm, Radius: 5.5 * mm, K: 0.027, Filling: heat.Gas, Emissivity: 0.9, InsideEmissivity: 0.9,
			Form: heat.Form{Kind: heat.Flat, W: 11 * mm, H: 5 * mm, Turn: 0.3}, Rings: []heat.Ring{{K: 0.19, Thickness: 1.2 * mm}},
		},
		core(-2.6, 0.1, 0.7, 3), core(2.5, -0.15, 0.8, 2),
		{In: -1, X: 5 * mm, Y: 5 * mm, Radius: 1.5 * mm, Heat: 4, Emissivity: 0.8, Rings: []heat.Ring{{K: 0.25, Thickness: 0.8 * mm}}},
	}
	return p
}

// References of our own (testdata/fe-shaped/README.md): conduction by FreeFem++ 4 on quadratic triangles, radiation by crossed strings between some 400
// patches, Richardson in their length; good to 0.005 K.
func TestShapedRadiatingReferences(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	for _, c := range []struct {
		name string
		p    heat.Problem
		want map[int]float64
	}{
		{"two bars in a duct", duct(), map[int]float64{0: 96.125, 1: 87.656}},
		{"a flat cable in a conduit", flatInConduit(), map[int]float64{1: 54.417, 2: 52.814, 3: 58.8235}},
	} {
		for acc, most := range map[heat.Accuracy]float64{heat.Draft: 0.06, heat.Standard: 0.03, heat.Fine: 0.02} {
			r := solve(t, c.p, acc)
			worst := 0.0
			for i, w := range c.want {
				worst = math.Max(worst, math.Abs(r.Core[i]-w))
			}
			t.Logf("%-26s %d: error %.4f K, estimate %.4f, %d unknowns, %d steps", c.name, acc, worst, r.ErrorK, r.Unknowns, r.Steps)
			if worst > most || worst > 1.5*r.ErrorK {
				t.Errorf("%s, accuracy %d: error %.4f K, estimated %.4f", c.name, acc, worst, r.ErrorK)
			}
			if d := r.Released - r.Generated; math.Abs(d) > 1e-4*r.Generated {
				t.Errorf("%s: %g of %g W/m released", c.name, r.Released, r.Generated)
			}
		}
	}
}
