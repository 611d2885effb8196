package heat_test

import (
	"context"
	"math"
	"testing"

	"packrise/solver/heat"
)

// leaning is seven wires in a jacket, or without one, on a floor.
func leaning(a heat.Against, rings ...heat.Ring) heat.Problem {
	p := heat.Problem{MediumK: 0.027, ZeroK: 273.15, Wall: heat.Wall{R: 6e-3, Rings: rings, Film: 9, Ambient: 30, Against: a, Emissivity: 0.9}}
	for i := range 7 {
		w := heat.Part{In: -1, Core: heat.Metal, Radius: 1e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 0.6e-3}}, Heat: 1 + 0.3*float64(i), Emissivity: 0.9}
		if i > 0 {
			s, c := math.Sincos(float64(i-1) * math.Pi / 3)
			w.X, w.Y = 3.4e-3*c, 3.4e-3*s
		}
		p.Parts = append(p.Parts, w)
	}
	return p
}

// contoured is p solved with a density on every face, which has nothing in common with the harmonics: a flat part as high as it is wide is a disc.
func contoured(p heat.Problem) heat.Problem {
	p.Parts = append([]heat.Part(nil), p.Parts...)
	w := &p.Parts[0]
	w.Form = heat.Form{Kind: heat.Flat, W: 2 * w.Radius, H: 2 * w.Radius}
	return p
}

func solveAt(p heat.Problem, a heat.Accuracy) *heat.Result {
	return heat.New(p, heat.Settings{Accuracy: a}).Solve(context.Background(), nil)
}

// sameAnswer compares cores, the outside and the heats of two answers.
func sameAnswer(t *testing.T, got, want *heat.Result, kelvin float64) {
	t.Helper()
	for i := range got.Core {
		if d := math.Abs(got.Core[i] - want.Core[i]); !(d <= kelvin) {
			t.Errorf("part %d: %.4f, want %.4f", i, got.Core[i], want.Core[i])
		}
	}
	if d := math.Abs(got.WallMean - want.WallMean); !(d <= kelvin) {
		t.Errorf("outside: %.4f, want %.4f", got.WallMean, want.WallMean)
	}
	heats := math.Abs(want.Generated) + math.Abs(want.AgainstOut)
	if d := math.Abs(got.AgainstOut - want.AgainstOut); !(d <= 1e-4*heats) {
		t.Errorf("into what it rests against: %.5f W/m, want %.5f", got.AgainstOut, want.AgainstOut)
	}
	balance := got.Generated - got.Released
	for _, v := range got.Absorbed {
		balance -= v
	}
	if !(math.Abs(balance) <= 1e-6*heats) {
		t.Errorf("balance %v of %v W/m", balance, heats)
	}
}

// TestAgainstContours: the harmonics agree with boundary integrals on all faces, whatever the wall and whatever it rests against.
func TestAgainstContours(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	jacket := []heat.Ring{{K: 0.2, Thickness: 1.2e-3}}
	for _, c := range []struct {
		name  string
		a     heat.Against
		rings []heat.Ring
	}{
		{"insulated", heat.Against{Share: 0.25, At: -math.Pi / 2}, jacket},
		{"held", heat.Against{Share: 0.2, At: 0.7, Held: true, Temp: 50}, jacket},
		{"cold over most of it", heat.Against{Share: 0.9, At: 3, Held: true, Temp: -20}, jacket},
		{"two layers", heat.Against{Share: 0.4, At: 1, Held: true, Temp: 10}, []heat.Ring{{K: 0.3, Thickness: 0.5e-3}, {K: 0.15, Thickness: 0.4e-3}}},
		{"steel", heat.Against{Share: 0.25, At: -1.5}, []heat.Ring{{K: 50, Thickness: 1e-3}}},
		{"cold steel", heat.Against{Share: 0.25, At: -1.5, Held: true}, []heat.Ring{{K: 50, Thickness: 1e-3}}},
		{"no layer, insulated", heat.Against{Share: 0.25, At: -1.5}, nil},
		{"no layer, held", heat.Against{Share: 0.25, At: -1.5, Held: true, Temp: 10}, nil},
	} {
		t.Run(c.name, func(t *testing.T) {
			p := leaning(c.a, c.rings...)
			sameAnswer(t, solveAt(p, heat.Standard), solveAt(contoured(p), heat.Standard), 0.006)
		})
	}
}

// TestAgainstRadiating: so it is with radiation in the gas inside.
func TestAgainstRadiating(t *testing.T) {
	some := []heat.Against{{Share: 0.2, At: 0.7, Held: true, Temp: 40}, {Share: 0.25, At: -math.Pi / 2}}
	if testing.Short() {
		some = some[:1]
	}
	for _, a := range some {
		p := leaning(a, heat.Ring{K: 0.2, Thickness: 1.2e-3})
		p.Filling = heat.Gas
		got := solveAt(p, heat.Standard)
		if !got.Radiates {
			t.Error("does not radiate")
		}
		sameAnswer(t, got, solveAt(contoured(p), heat.Standard), 0.06)
	}
}

// lone is one wire with two layers without a holder.
func lone(a heat.Against) heat.Problem {
	return heat.Problem{MediumK: 0.03, Wall: heat.Wall{Shape: heat.BarePart, Film: 12, Ambient: 25, Against: a}, Parts: []heat.Part{{
		In: -1, Core: heat.Metal, Radius: 2e-3, Rings: []heat.Ring{{K: 0.3, Thickness: 0.8e-3}, {K: 0.2, Thickness: 0.5e-3}}, Heat: 10,
	}}}
}

// TestAgainstBare: a lone part agrees with the same part in a hull, with a section of contours and with a cable in its place, about whose wall the
// source is reckoned otherwise.
func TestAgainstBare(t *testing.T) {
	for _, a := range []heat.Against{{Share: 0.3, At: -1}, {Share: 0.15, At: 2, Held: true, Temp: 60}, {Share: 0.7, At: 2, Held: true}} {
		p := lone(a)
		got := solveAt(p, heat.Standard)
		sameAnswer(t, got, solveAt(contoured(p), heat.Fine), 0.003)
		h := p
		h.Wall.Shape, h.Wall.Taut = heat.Hull, taut
		sameAnswer(t, solveAt(h, heat.Standard), got, 0.01)
		c := p
		c.Parts = []heat.Part{
			{In: -1, Core: heat.Inside, Radius: 2.8e-3, K: 0.3, Rings: p.Parts[0].Rings[1:]},
			{In: 0, Core: heat.Metal, Radius: 2e-3, Rings: p.Parts[0].Rings[:1], Heat: 10},
		}
		in := solveAt(c, heat.Standard)
		if d := math.Abs(in.Core[1] - got.Core[0]); d > 0.002 {
			t.Errorf("in a cable %.4f, want %.4f", in.Core[1], got.Core[0])
		}
		if d := math.Abs(in.WallMax[0] - got.WallMax[0]); d > 0.02 {
			t.Errorf("hottest place outside: %.4f, want %.4f", in.WallMax[0], got.WallMax[0])
		}
	}
}

// TestAgainstMetal: metal without a layer is one temperature, so that the heat divides by itself.
func TestAgainstMetal(t *testing.T) {
	p := lone(heat.Against{Share: 0.4, At: 1})
	p.Parts[0].Rings = nil
	got := solveAt(p, heat.Standard)
	if want := 25 + 10/(12*0.6*2*math.Pi*2e-3); math.Abs(got.Core[0]-want) > 1e-6 {
		t.Errorf("insulated: %v, want %v", got.Core[0], want)
	}
	p.Wall.Against = heat.Against{Share: 0.4, At: 1, Held: true, Temp: 50}
	got = solveAt(p, heat.Standard)
	open := 25 * 12 * 0.6 * 2 * math.Pi * 2e-3
	if got.Core[0] != 50 || math.Abs(got.AgainstOut-(10-open)) > 1e-9 || math.Abs(got.Released-10) > 1e-9 {
		t.Errorf("held: %v, %v W/m of %v", got.Core[0], got.AgainstOut, got.Released)
	}
}

// TestAgainstLimits: the smaller the share, the less it matters; held all but everywhere is a wall held at that temperature.
func TestAgainstLimits(t *testing.T) {
	jacket := heat.Ring{K: 0.2, Thickness: 1.2e-3}
	plain := solveAt(leaning(heat.Against{}, jacket), heat.Standard)
	for a, near := range map[heat.Against]float64{{Share: 1e-4, At: 1}: 0.01, {Share: 1e-4, At: 1, Held: true, Temp: plain.WallMean}: 0.2} { // what is held fades as 1/ln(share)
		got := solveAt(leaning(a, jacket), heat.Standard)
		for i := range got.Core {
			if math.Abs(got.Core[i]-plain.Core[i]) > near {
				t.Errorf("%+v: %v, plain %v", a, got.Core[i], plain.Core[i])
			}
		}
	}
	whole := leaning(heat.Against{}, jacket)
	whole.Wall.Film, whole.Wall.Ambient = math.Inf(1), 40
	want := solveAt(whole, heat.Standard)
	got := solveAt(leaning(heat.Against{Share: 0.999, At: 1, Held: true, Temp: 40}, jacket), heat.Standard)
	for i := range got.Core {
		if math.Abs(got.Core[i]-want.Core[i]) > 0.02 {
			t.Errorf("held: %v, want %v", got.Core[i], want.Core[i])
		}
	}
}

// TestAgainstMixedBundle: a bundle whose hull is reckoned by contours, since not everything on it is round, agrees with the round one.
func TestAgainstMixedBundle(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	some := []heat.Against{{Share: 0.2, At: 0.7, Held: true, Temp: 45}, {Share: 0.25, At: -math.Pi / 2}}
	if testing.Short() {
		some = some[:1]
	}
	for _, a := range some {
		p := heat.Problem{
			Parts: rosette(4.2e-3), MediumK: 0.027,
			Wall: heat.Wall{Shape: heat.Hull, Taut: taut, Film: 10, Ambient: 30, Against: a},
		}
		c := contoured(p)
		w := &c.Parts[2] // on the hull
		w.Form = heat.Form{Kind: heat.Flat, W: 2 * w.Radius, H: 2 * w.Radius}
		sameAnswer(t, solveAt(c, heat.Standard), solveAt(p, heat.Fine), 0.01)
	}
}
