package heat_test

import (
	"context"
	"math"
	"testing"

	"packrise/solver/heat"
)

// The reference sections with parts that are not round (testdata/fe-cases/README.md).
func TestShapedReferenceCases(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	want := expected(t, "expected.csv", "temperature_c")
	for _, name := range []string{"s01_sector4", "s02b_flat_air", "s03_bar_two_wires"} {
		l := load(t, name)
		for acc, within := range map[heat.Accuracy]float64{heat.Draft: 0.05, heat.Standard: 0.005, heat.Fine: 0.003} {
			r := solve(t, l.Problem, acc)
			worst, rise := 0.0, 0.0
			for i, id := range l.ids {
				worst = math.Max(worst, math.Abs(r.Core[i]-want[name][id]))
				rise = math.Max(rise, want[name][id]-l.Wall.Ambient)
			}
			t.Logf("%-18s %d: error %.4f K of %.1f K, estimated %.4f, %d unknowns", name, acc, worst, rise, r.ErrorK, r.Unknowns)
			if worst > within {
				t.Errorf("%s: error %.4f K", name, worst)
			}
			if r.ErrorK > 0.2 {
				t.Errorf("%s: estimate %.4f K", name, r.ErrorK)
			}
			if d := r.Released - r.Generated; math.Abs(d) > 2e-4*r.Generated {
				t.Errorf("%s: %g W/m do not balance", name, d)
			}
		}
	}
}

// bar is a metal bar of w × h mm with an insulation of t mm.
func bar(w, h, corner, t, k, q float64) heat.Part {
	p := heat.Part{In: -1, Radius: w / 2 * mm, Heat: q, Form: heat.Form{Kind: heat.Bar, W: w * mm, H: h * mm, Corner: corner * mm}}
	if t > 0 {
		p.Rings = []heat.Ring{{K: k, Thickness: t * mm}}
	}
	return p
}

// Round sections solved as contours agree with the harmonics: the same parts, one of them given as a flat with equal sides.
func TestShapedAgreesWithRound(t *testing.T) {
	names := []string{"m02_hose_air", "c12_nested_cable_air", "c04_hex7_touch_wall_air", "c13_sides_steel8", "h02b_ratio12"}
	for _, name := range names[:soak(2, len(names))] {
		p := load(t, name).Problem
		round := solve(t, p, heat.Fine)
		q := p
		q.Parts = append([]heat.Part(nil), p.Parts...)
		for i := range q.Parts { // a flat of equal sides is a circle
			if q.Parts[i].In == -1 {
				r := 2 * q.Parts[i].Radius
				q.Parts[i].Form = heat.Form{Kind: heat.Flat, W: r, H: r}
				break
			}
		}
		r := solve(t, q, heat.Standard)
		worst, faces := 0.0, 0.0
		for i := range r.Core {
			worst = math.Max(worst, math.Abs(r.Core[i]-round.Core[i]))
			for k := range r.Surfaces[i] {
				faces = math.Max(faces, math.Abs(r.Surfaces[i][k]-round.Surfaces[i][k]))
			}
		}
		t.Logf("%s: %.4f K, faces %.4f K, wall %.4f K, %d unknowns, estimated %.4f", name, worst, faces, r.WallMean-round.WallMean, r.Unknowns, r.ErrorK)
		if worst > 0.02 || faces > 0.1 {
			t.Errorf("%s: differs by %.4f K, faces by %.4f K", name, worst, faces)
		}
		if math.Abs(r.WallMean-round.WallMean) > 0.01 {
			t.Errorf("%s: wall %.4f, want %.4f", name, r.WallMean, round.WallMean)
		}
		for k := range r.SideOut {
			if math.Abs(r.SideOut[k]-round.SideOut[k]) > 0.005*math.Abs(round.SideOut[k])+0.002 {
				t.Errorf("%s: side %d gives %.4f W/m, want %.4f", name, k, r.SideOut[k], round.SideOut[k])
			}
		}
	}
}

// A bare bar in the open: all its heat leaves through the film at its own temperature.
func TestShapedBareBar(t *testing.T) {
	p := heat.Problem{Parts: []heat.Part{bar(30, 5, 0.5, 0, 0, 20)}, Wall: heat.Wall{Shape: heat.BarePart, Film: 12, Ambient: 35}}
	r := solve(t, p, heat.Standard)
	perimeter := (2*(30+5) - 8*0.5 + math.Pi) * mm
	if want := 35 + 20/(12*perimeter); math.Abs(r.Core[0]-want) > 0.02 || math.Abs(r.WallMean-want) > 0.02 {
		t.Errorf("bar %.4f, outside %.4f, want %.4f", r.Core[0], r.WallMean, want)
	}
	if math.Abs(r.Released-20) > 0.01 {
		t.Errorf("released %.4f of 20 W/m", r.Released)
	}
	if !math.IsNaN(r.Field.At(0.02, 0)) || math.Abs(r.Field.At(0, 0)-r.Core[0]) > 0.01 {
		t.Errorf("field %.4f within, %.4f outside", r.Field.At(0, 0), r.Field.At(0.02, 0))
	}
}

// The influence matrix is that of the solutions, a moved part and another film are those of a new model.
func TestShapedModel(t *testing.T) {
	l := load(t, "s03_bar_two_wires")
	m := heat.New(l.Problem, heat.Settings{})
	r := m.Solve(context.Background(), nil)
	k, _ := m.Influence(context.Background())
	for i := range r.Core {
		sum := l.Wall.Ambient
		for j := range r.Core {
			sum += k[i][j] * l.Parts[j].Heat
			if k[i][j] != k[j][i] {
				t.Errorf("influence %d, %d is not reciprocal", i, j)
			}
		}
		if math.Abs(sum-r.Core[i]) > 0.005 {
			t.Errorf("part %d: %.4f by influence, %.4f", i, sum, r.Core[i])
		}
	}
	m.Move(2, 3*mm, 2*mm)
	w := l.Wall
	w.Film, w.Ambient = 14, 21
	m.Outside(w)
	moved := m.Solve(context.Background(), nil)
	p := l.Problem
	p.Parts = append([]heat.Part(nil), p.Parts...)
	p.Parts[2].X, p.Parts[2].Y, p.Wall = 3*mm, 2*mm, w
	fresh := solve(t, p, heat.Standard)
	w.Film = 20
	m.Outside(w)
	m.Outside(p.Wall)
	again := m.Solve(context.Background(), nil)
	for i := range fresh.Core {
		// Orders stay where they were if they were higher, contours as fine.
		if math.Abs(fresh.Core[i]-moved.Core[i]) > 0.02 || math.Abs(moved.Core[i]-again.Core[i]) > 1e-3 {
			t.Errorf("part %d: new %.6f, moved %.6f, back at its film %.6f", i, fresh.Core[i], moved.Core[i], again.Core[i])
		}
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if r := heat.New(p, heat.Settings{}).Solve(ctx, nil); r.Status != heat.Cancelled {
		t.Errorf("status %v, want cancelled", r.Status)
	}
}
