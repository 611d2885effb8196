package heat_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/pack"
)

// taut winds the string by pack.
func taut(x, y, r []float64) []heat.Arc {
	discs := make([]pack.Disc, len(x))
	for i := range discs {
		discs[i] = pack.Disc{X: x[i], Y: y[i], R: r[i]}
	}
	arcs, _, _ := pack.Hull(discs)
	out := make([]heat.Arc, len(arcs))
	for i, a := range arcs {
		out[i] = heat.Arc{Disc: a.Disc, From: a.From, To: a.To}
	}
	return out
}

// bundle is a reference section without its holder.
func bundle(t testing.TB, name string) loaded {
	l := load(t, name)
	l.Wall = heat.Wall{Shape: heat.Hull, Film: l.Wall.Film, Ambient: l.Wall.Ambient, Taut: taut, Emissivity: 0.9}
	return l
}

// solid takes the gas of a bundle for a solid.
func solid(l loaded) loaded {
	l.Filling = heat.Solid
	return l
}

// bundles are the reference sections of open bundles.
var bundles = []string{"b01_three_gas", "b02_hex7_solid", "b03_mixed12_gas", "b04b_hex19_4loaded_gas", "b05_big_small_gas"}

// TestHullAgainstFiniteElements: open bundles, in all but b02 surfaces and strings radiate (testdata/fe-cases, converged to 1 to 5 mK).
func TestHullAgainstFiniteElements(t *testing.T) {
	want := expected(t, "expected.csv", "temperature_c")
	for _, name := range bundles {
		l := bundle(t, name)
		for acc, within := range map[heat.Accuracy]float64{heat.Draft: 0.06, heat.Standard: 0.015, heat.Fine: 0.006} {
			r := heat.New(l.Problem, heat.Settings{Accuracy: acc}).Solve(bg, nil)
			worst := 0.0
			for i, id := range l.ids {
				worst = math.Max(worst, math.Abs(r.Core[i]-want[name][id]))
			}
			if worst > within || r.Status != heat.Converged {
				t.Errorf("%s, accuracy %d: off by %.4f K, estimated %.4f, %v", name, acc, worst, r.ErrorK, r.Status)
			}
			if e := r.Released - r.Generated; math.Abs(e) > 1e-6*r.Generated {
				t.Errorf("%s, accuracy %d: heat balance off by %g of %g W/m", name, acc, e, r.Generated)
			}
		}
	}
}

// TestHullConverges: standard beside fine on every bundle, gas taken as a solid.
func TestHullConverges(t *testing.T) {
	for _, name := range append(bundles, "t37_settled_air", "c06_mixed19_settled_air") {
		l := solid(bundle(t, name))
		fine := heat.New(l.Problem, heat.Settings{Accuracy: heat.Fine}).Solve(bg, nil)
		for acc, within := range map[heat.Accuracy]float64{heat.Draft: 0.06, heat.Standard: 0.015} {
			r := heat.New(l.Problem, heat.Settings{Accuracy: acc}).Solve(bg, nil)
			worst := 0.0
			for i := range r.Core {
				worst = math.Max(worst, math.Abs(r.Core[i]-fine.Core[i]))
			}
			if worst > within {
				t.Errorf("%s, accuracy %d: off by %.4f K, estimated %.4f", name, acc, worst, r.ErrorK)
			}
		}
	}
}

// One part is its own hull: closed form Σ ln(r'/r)/(2πk) + 1/(2πrh).
func TestHullOfOnePart(t *testing.T) {
	p := heat.Problem{
		MediumK: 0.03, Wall: heat.Wall{Shape: heat.Hull, Film: 8, Ambient: 25, Taut: taut},
		Parts: []heat.Part{{In: -1, X: 3e-3, Y: -1e-3, Radius: 2e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 0.7e-3}, {K: 0.3, Thickness: 0.4e-3}}, Heat: 6}},
	}
	r := heat.New(p, heat.Settings{}).Solve(bg, nil)
	film := 6 / (2 * math.Pi * 3.1e-3 * 8)
	closed(t, "outside", r.WallMean, 25+film, 1e-7)
	closed(t, "hottest outside", r.WallMax[0], 25+film, 1e-7)
	closed(t, "core", r.Core[0], 25+film+6*(math.Log(2.7/2)/0.2+math.Log(3.1/2.7)/0.3)/(2*math.Pi), 1e-7)
	closed(t, "released", r.Released, 6, 1e-7)
	if v := r.Field.At(3e-3, 2.09e-3); math.Abs(v-r.WallMean) > 0.1 || !math.IsNaN(r.Field.At(3e-3, 2.2e-3)) {
		t.Errorf("field at the rim %g", v)
	}
}

// A film without end: the hull is held. With a medium like the insulation and a part that fills its hull but for nothing, the closed form
// of a held cylinder.
func TestHullHeld(t *testing.T) {
	p := heat.Problem{
		MediumK: 0.2, Wall: heat.Wall{Shape: heat.Hull, Film: math.Inf(1), Ambient: 40, Taut: taut},
		Parts: []heat.Part{{In: -1, Radius: 1e-3, Rings: []heat.Ring{{K: 0.25, Thickness: 1e-3}}, Heat: 10}},
	}
	r := heat.New(p, heat.Settings{}).Solve(bg, nil)
	closed(t, "core", r.Core[0], 40+10*math.Log(2)/(2*math.Pi*0.25), 1e-6)
}

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

// Moving parts, on the hull and inside, and other films give what a new model gives, to within the truncation of either; with and without
// surfaces that radiate.
func TestHullMoves(t *testing.T) {
	for _, filling := range []heat.Filling{heat.Solid, heat.Gas} {
		l := bundle(t, "t37_settled_air")
		l.Filling, l.ZeroK = filling, 273.15
		for i := range l.Parts {
			l.Parts[i].Emissivity = 0.9
		}
		m := heat.New(l.Problem, heat.Settings{Accuracy: heat.Fine})
		before := m.Solve(bg, nil)
		at := before.Field.At(l.Parts[0].X, l.Parts[0].Y)
		p := l.Problem
		p.Parts = append([]heat.Part(nil), l.Parts...)
		for _, i := range []int{0, 7, 14, 21, 28, 35} {
			q := &p.Parts[i]
			q.X, q.Y = q.X+0.05*mm, q.Y+0.03*mm
			for k := 0; overlaps(&p, i) && k < 8; k++ {
				s, c := math.Sincos(float64(k) * math.Pi / 4)
				q.X, q.Y = l.Parts[i].X+0.05*mm*c, l.Parts[i].Y+0.05*mm*s
			}
			m.Move(i, q.X, q.Y)
			if i == 14 {
				m.Solve(bg, nil)
			}
		}
		w := p.Wall
		w.Film, w.Ambient = 14, 20
		m.Outside(w)
		p.Wall = w
		got, want := m.Solve(bg, nil), heat.New(p, heat.Settings{Accuracy: heat.Fine}).Solve(bg, nil)
		for i := range got.Core {
			if e := got.Core[i] - want.Core[i]; math.Abs(e) > 2e-4*(want.Core[i]-20) {
				t.Errorf("filling %d, part %d: %.5f after moving, %.5f anew", filling, i, got.Core[i], want.Core[i])
			}
		}
		if v := before.Field.At(l.Parts[0].X, l.Parts[0].Y); v != at {
			t.Error("a result that is out has changed")
		}
	}
}

// The temperature has no step at the rims of parts beside the hull, nor on strings: the field meets the surfaces.
func TestHullFieldIsContinuous(t *testing.T) {
	for _, name := range bundles[:3] {
		l := bundle(t, name)
		r := heat.New(l.Problem, heat.Settings{}).Solve(bg, nil)
		rise := r.WallMax[0] - l.Wall.Ambient
		worst := 0.0
		for i := range l.Parts {
			q := &l.Parts[i]
			for k := range 72 {
				s, c := math.Sincos(2 * math.Pi * (float64(k) + 0.37) / 72)
				in, out := outer(q)*(1-1e-6), outer(q)*(1+1e-6)
				a, b := r.Field.At(q.X+in*c, q.Y+in*s), r.Field.At(q.X+out*c, q.Y+out*s)
				if !math.IsNaN(b) {
					worst = math.Max(worst, math.Abs(a-b))
				}
			}
		}
		t.Logf("%s: largest step %.4f K", name, worst)
		if worst > 0.02*rise {
			t.Errorf("%s: the field steps by %.3f K at a rim", name, worst)
		}
	}
}

func TestHullRefuses(t *testing.T) {
	l := bundle(t, "b01_three_gas")
	for name, spoil := range map[string]func(p *heat.Problem){
		"no string": func(p *heat.Problem) { p.Wall.Taut = nil },
		"no parts":  func(p *heat.Problem) { p.Parts = nil },
		"no film":   func(p *heat.Problem) { p.Wall.Film = 0 },
	} {
		p := l.Problem
		spoil(&p)
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%s goes through", name)
				}
			}()
			heat.New(p, heat.Settings{})
		}()
	}
}
