package heat_test

import (
	"math"
	"testing"

	"packrise/solver/heat"
)

// asContours gives the first part of the top level as a flat of equal sides, which is a circle: what lies on the hull and this part are then contours.
func asContours(p heat.Problem) heat.Problem {
	p.Parts = append([]heat.Part(nil), p.Parts...)
	for i := range p.Parts {
		if p.Parts[i].In == -1 {
			r := 2 * p.Parts[i].Radius
			p.Parts[i].Form = heat.Form{Kind: heat.Flat, W: r, H: r}
			break
		}
	}
	return p
}

// Open bundles of round parts solved as contours agree with the harmonics. Under PACKRISE_SOAK also the larger ones.
func TestContourHullAgreesWithRound(t *testing.T) {
	names := []string{"b01_three_gas", "b05_big_small_gas", "b02_hex7_solid", "b03_mixed12_gas"}
	for _, name := range names[:soak(2, len(names))] {
		p := solid(bundle(t, name)).Problem
		round, r := solve(t, p, heat.Fine), solve(t, asContours(p), heat.Standard)
		worst, faces := 0.0, 0.0
		for i := range r.Core {
			worst = math.Max(worst, math.Abs(r.Core[i]-round.Core[i]))
			for k := range r.Surfaces[i] {
				faces = math.Max(faces, math.Abs(r.Surfaces[i][k]-round.Surfaces[i][k]))
			}
		}
		t.Logf("%s: %.4f K, faces %.4f K, outside %.5f K, %d unknowns, estimated %.4f", name, worst, faces, r.WallMean-round.WallMean, r.Unknowns, r.ErrorK)
		if worst > 0.005 || faces > 0.05 || math.Abs(r.WallMean-round.WallMean) > 0.002 || math.Abs(r.WallMax[0]-round.WallMax[0]) > 0.01 {
			t.Errorf("%s: differs by %.4f K, faces by %.4f K, outside by %.4f K, its hottest place by %.4f K", name, worst, faces, r.WallMean-round.WallMean, r.WallMax[0]-round.WallMax[0])
		}
		if math.Abs(r.Released-r.Generated) > 1e-4*r.Generated {
			t.Errorf("%s: %g of %g W/m released", name, r.Released, r.Generated)
		}
	}
}

// A bare bar held by nothing gives off all its heat through the film at its own temperature, and so do two that touch along their faces and are alike.
func TestContourHullOfBars(t *testing.T) {
	p := heat.Problem{MediumK: 0.026, Parts: []heat.Part{bar(30, 5, 0.5, 0, 0, 20)}, Wall: heat.Wall{Shape: heat.Hull, Film: 12, Ambient: 35, Taut: taut}}
	r := solve(t, p, heat.Standard)
	perimeter := (2*(30+5) - 8*0.5 + math.Pi) * mm
	if want := 35 + 20/(12*perimeter); math.Abs(r.Core[0]-want) > 0.02 || math.Abs(r.WallMean-want) > 0.02 || math.Abs(r.Released-20) > 0.005 {
		t.Errorf("bar %.4f, outside %.4f, want %.4f; released %.4f", r.Core[0], r.WallMean, want, r.Released)
	}
	two := p
	two.Parts = append([]heat.Part(nil), p.Parts...)
	two.Parts = append(two.Parts, two.Parts[0])
	two.Parts[0].Y, two.Parts[1].Y = -2.5*mm, 2.5*mm
	r = solve(t, two, heat.Standard)
	// The hull is that of 30 × 10 mm; two strings of 1 mm bridge the rounded corners, behind which the temperature hardly falls.
	perimeter = (2*(30+10) - 8*0.5 + math.Pi) * mm
	want := 35 + 40/(12*perimeter)
	for i := range 2 {
		if r.Core[i] < want-0.02 || r.Core[i] > want*1.02 {
			t.Errorf("bar %d of two: %.4f, a single one of the whole size %.4f", i, r.Core[i], want)
		}
	}
	if math.Abs(r.Core[0]-r.Core[1]) > 0.005 || math.Abs(r.Released-40) > 0.01 {
		t.Errorf("two bars: %.4f and %.4f, %.4f W/m released", r.Core[0], r.Core[1], r.Released)
	}
}
