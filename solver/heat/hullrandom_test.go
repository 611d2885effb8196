package heat_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/pack"
)

// randomBundle lays random parts up.
func randomBundle(r *rand.Rand, w wish) heat.Problem {
	p := heat.Problem{MediumK: 0.026}
	if !w.air {
		p.MediumK = 0.1 + 0.2*r.Float64()
	}
	p.Wall = heat.Wall{Shape: heat.Hull, Film: 5 + 10*r.Float64(), Ambient: 20 + 20*r.Float64(), Taut: taut}
	var radii []float64
	var parts []heat.Part
	for range w.parts {
		q := randomPart(r, w)
		if r.IntN(10) == 0 {
			q.Rings = nil // bare
		}
		parts = append(parts, q)
		radii = append(radii, outer(&q))
	}
	places, _ := pack.LayUp(radii)
	gap := 1.0
	if w.loose {
		gap += 0.05 * r.Float64()
	}
	for _, d := range places { // not always in the order of radii
		i := closest(radii, d.R)
		parts[i].X, parts[i].Y = gap*d.X, gap*d.Y
		radii[i] = -1
		p.Parts = append(p.Parts, parts[i])
	}
	for i := range w.parts {
		if p.Parts[i].Core == heat.Inside {
			fillCable(r, &p, i)
		}
	}
	return p
}

// closest is the index of the radius that a disc was made with.
func closest(radii []float64, r float64) int {
	best := 0
	for i := range radii {
		if math.Abs(radii[i]-r) < math.Abs(radii[best]-r) {
			best = i
		}
	}
	return best
}

func forBundles(t *testing.T, each int, f func(t *testing.T, r *rand.Rand, p heat.Problem)) {
	n := soak(each, 20*each)
	if testing.Short() {
		n = max(1, n/5)
	}
	for k, w := range []wish{{parts: 2, air: true}, {parts: 5, air: true}, {parts: 12, air: true, held: true}, {parts: 8, air: true, loose: true}, {parts: 7, cables: true}, {parts: 6, air: true, cables: true, loose: true}} {
		for i := range n {
			r := rand.New(rand.NewPCG(50+uint64(k), uint64(i)))
			f(t, r, randomBundle(r, w))
			if t.Failed() {
				t.Fatalf("bundle %d of %+v", i, w)
			}
		}
	}
}

// Heat in is heat out, and nothing is colder than ambient or hotter than the hottest metal.
func TestHullBalanceAndBounds(t *testing.T) {
	forBundles(t, 8, func(t *testing.T, r *rand.Rand, p heat.Problem) {
		res := heat.New(p, heat.Settings{}).Solve(bg, nil)
		if res.Status != heat.Converged {
			t.Errorf("status %v", res.Status)
		}
		made, held := res.Generated, false
		hot, cold := p.Wall.Ambient, p.Wall.Ambient
		for i, q := range p.Parts {
			switch q.Core {
			case heat.Metal:
				hot = math.Max(hot, res.Core[i])
			case heat.FixedBore:
				made -= res.Absorbed[i]
				hot, cold = math.Max(hot, q.Fixed), math.Min(cold, q.Fixed)
				held = true
			}
		}
		if e := res.Released - made; math.Abs(e) > 1e-6*(res.Generated+1) {
			t.Errorf("heat balance off by %g of %g W/m", e, made)
		}
		if held {
			cold = math.Min(cold, coldest(p))
		}
		slack := 1e-3*(hot-cold) + 1e-6
		check := func(what string, v float64) {
			if !(v >= cold-slack && v <= hot+slack) {
				t.Errorf("%s %.4f outside %.4f … %.4f", what, v, cold, hot)
			}
		}
		for i := range p.Parts {
			check("core", res.Core[i])
			for _, v := range res.Surfaces[i] {
				check("face", v)
			}
		}
		check("outside", res.WallMean)
		check("hottest outside", res.WallMax[0])
		lo, hi := math.Inf(1), math.Inf(-1)
		for i := range p.Parts {
			if q := &p.Parts[i]; q.In == -1 {
				lo, hi = math.Min(lo, math.Min(q.X, q.Y)-outer(q)), math.Max(hi, math.Max(q.X, q.Y)+outer(q))
			}
		}
		seen := 0
		for range 400 {
			v := res.Field.At(lo+(hi-lo)*r.Float64(), lo+(hi-lo)*r.Float64())
			if !math.IsNaN(v) {
				seen++
				check("field", v)
			}
		}
		if seen < 60 {
			t.Errorf("only %d of 400 points have a temperature", seen)
		}
	})
}

// coldest is the lowest temperature that anything is held at.
func coldest(p heat.Problem) float64 {
	t := p.Wall.Ambient
	for i := range p.Parts {
		if q := &p.Parts[i]; q.Core == heat.FixedBore {
			t = math.Min(t, q.Fixed)
		}
	}
	return t
}

// Reciprocity holds without being forced, and one load is the influence matrix times the heats.
func TestHullInfluence(t *testing.T) {
	forBundles(t, 4, func(t *testing.T, _ *rand.Rand, p heat.Problem) {
		m := heat.New(p, heat.Settings{})
		k, status := m.Influence(bg)
		if status != heat.Converged {
			t.Errorf("status %v", status)
		}
		ground, _ := m.Ground(bg)
		raw := make([][]float64, len(k))
		largest, rises := 0.0, 0.0
		res := m.Solve(bg, nil)
		for j, row := range k {
			if row == nil {
				continue
			}
			heats := make([]float64, len(k))
			heats[j] = 10
			raw[j] = m.Solve(bg, heats).Core
			largest, rises = math.Max(largest, row[j]), math.Max(rises, math.Abs(res.Core[j]-ground[j]))
		}
		for i, row := range k {
			if row == nil {
				continue
			}
			sum, rise := 0.0, res.Core[i]-ground[i]
			for j, f := range row {
				sum += f * p.Parts[j].Heat
				if k[j] != nil && math.Abs(raw[j][i]-ground[i]-raw[i][j]+ground[j]) > 1e-2*largest {
					t.Errorf("10 W/m in %d raise %d by %g K, in %d raise %d by %g", j, i, raw[j][i]-ground[i], i, j, raw[i][j]-ground[j])
				}
			}
			if math.Abs(sum-rise) > 2e-4*rises {
				t.Errorf("part %d: %.6f K by influence, %.6f by one load, largest %.3f", i, sum, rise, rises)
			}
		}
	})
}

// Twice the heat is twice the rise; the mirrored bundle has the same temperatures.
func TestHullScalesAndMirrors(t *testing.T) {
	forBundles(t, 3, func(t *testing.T, _ *rand.Rand, p heat.Problem) {
		m := heat.New(p, heat.Settings{})
		one := m.Solve(bg, nil)
		ground, _ := m.Ground(bg)
		heats := make([]float64, len(p.Parts))
		q := p
		q.Parts = append([]heat.Part(nil), p.Parts...)
		for i := range heats {
			heats[i] = 2 * p.Parts[i].Heat
			q.Parts[i].X = -q.Parts[i].X
		}
		two := m.Solve(bg, heats)
		mirrored := heat.New(q, heat.Settings{}).Solve(bg, nil)
		rise := 0.0
		for i := range heats {
			rise = math.Max(rise, math.Abs(two.Core[i]-ground[i]))
		}
		for i := range heats {
			a, b := one.Core[i]-ground[i], two.Core[i]-ground[i]
			if p.Parts[i].Core == heat.Metal && math.Abs(b-2*a) > 5e-5*rise+1e-9 {
				t.Errorf("part %d: rises %.7f and %.7f K", i, a, b)
			}
			if e := one.Core[i] - mirrored.Core[i]; math.Abs(e) > 1e-4*rise+1e-9 {
				t.Errorf("part %d: mirrored off by %g K", i, e)
			}
		}
	})
}
