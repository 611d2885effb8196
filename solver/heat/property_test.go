package heat_test

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/heat"
)

var bg = context.Background()

// wishes are the kinds of section that the properties are tested on.
var wishes = []wish{
	{parts: 1, air: true},
	{parts: 6},
	{parts: 9, air: true},
	{parts: 9, air: true, cables: true},
	{parts: 7, cables: true, loose: true},
	{parts: 8, conducts: true, cables: true},
	{parts: 5, rect: true},
	{parts: 6, rect: true, air: true, cables: true},
}

func forRandom(t *testing.T, each int, f func(t *testing.T, r *rand.Rand, p heat.Problem)) {
	n := soak(each, 1000)
	if testing.Short() {
		n = max(1, n/5)
	}
	for k, w := range wishes {
		for i := range n {
			r := rand.New(rand.NewPCG(uint64(k), uint64(i)))
			p := randomSection(r, w)
			f(t, r, p)
			if t.Failed() {
				t.Fatalf("section %d of %+v", i, w)
			}
		}
	}
}

// A solid between the parts, a fixed film and open sides: heat in is heat out, nothing is colder than ambient or hotter than the hottest
// metal, in the metals, on every face and in the field.
func TestBalanceAndBounds(t *testing.T) {
	forRandom(t, 5, func(t *testing.T, r *rand.Rand, p heat.Problem) {
		res := heat.New(p, heat.Settings{}).Solve(bg, nil)
		if res.Status != heat.Converged {
			t.Errorf("status %v", res.Status)
		}
		if e := res.Released - res.Generated; math.Abs(e) > 1e-6*res.Generated {
			t.Errorf("heat balance off by %g of %g W/m", e, res.Generated)
		}
		hot := p.Wall.Ambient
		for i, q := range p.Parts {
			if q.Core == heat.Metal {
				hot = math.Max(hot, res.Core[i])
			}
		}
		slack := 1e-3 * (hot - p.Wall.Ambient)
		check := func(what string, v float64) {
			if !(v >= p.Wall.Ambient-slack && v <= hot+slack) {
				t.Errorf("%s %.4f outside %.4f … %.4f", what, v, p.Wall.Ambient, hot)
			}
		}
		for i := range p.Parts {
			check("core", res.Core[i])
			for _, v := range res.Surfaces[i] {
				check("face", v)
			}
		}
		for _, v := range res.WallMax {
			check("wall", v)
		}
		check("outside", res.WallMean)
		for range 300 {
			x, y := somewhere(r, p.Wall)
			if v := res.Field.At(x, y); !math.IsNaN(v) {
				check("field", v)
			}
		}
	})
}

// somewhere is a random point of the box round the holder.
func somewhere(r *rand.Rand, w heat.Wall) (x, y float64) {
	if w.Shape == heat.Rect {
		return w.W * (1.1*r.Float64() - 0.05), w.H * (1.1*r.Float64() - 0.05)
	}
	return 2.1 * w.R * (r.Float64() - 0.5), 2.1 * w.R * (r.Float64() - 0.5)
}

// Reciprocity: what one metal does to another is what the other does to it.
func TestInfluenceIsSymmetric(t *testing.T) {
	forRandom(t, 6, func(t *testing.T, r *rand.Rand, p heat.Problem) {
		k, status := heat.New(p, heat.Settings{}).Influence(bg)
		if status != heat.Converged {
			t.Errorf("status %v", status)
		}
		for i := range k {
			for j := range k {
				if k[i] == nil || k[j] == nil {
					continue
				}
				if e := k[i][j] - k[j][i]; math.Abs(e) > 1e-6*k[i][i] {
					t.Errorf("K[%d][%d] − K[%d][%d] = %g of %g", i, j, j, i, e, k[i][j])
				}
			}
		}
	})
}

// One load is the influence matrix times the heats, but for what averaging the asymmetry of a rectangle's panels changes.
func TestInfluenceGivesTheLoad(t *testing.T) {
	forRandom(t, 6, func(t *testing.T, r *rand.Rand, p heat.Problem) {
		m := heat.New(p, heat.Settings{})
		k, _ := m.Influence(bg)
		res := m.Solve(bg, nil)
		for i, row := range k {
			if row == nil {
				continue
			}
			rise, sum := res.Core[i]-p.Wall.Ambient, 0.0
			for j, f := range row {
				sum += f * p.Parts[j].Heat
			}
			within := 2e-5 * rise
			if p.Wall.Shape == heat.Rect { // a foil for a wall is the worst
				within += 2 * res.ErrorK
			}
			if math.Abs(sum-rise) > within {
				t.Errorf("part %d: %.7f K by influence, %.7f K by one load", i, sum, rise)
			}
		}
	})
}

// Twice the heat is twice the rise; no heat is no rise.
func TestRisesScaleWithHeat(t *testing.T) {
	forRandom(t, 4, func(t *testing.T, r *rand.Rand, p heat.Problem) {
		m := heat.New(p, heat.Settings{})
		one := m.Solve(bg, nil)
		heats := make([]float64, len(p.Parts))
		for i := range heats {
			heats[i] = 2 * p.Parts[i].Heat
		}
		two := m.Solve(bg, heats)
		ground, _ := m.Ground(bg)
		for i := range heats {
			a, b := one.Core[i]-p.Wall.Ambient, two.Core[i]-p.Wall.Ambient
			if math.Abs(b-2*a) > 2e-5*b {
				t.Errorf("part %d: rises %.7f and %.7f K", i, a, b)
			}
			if math.Abs(ground[i]-p.Wall.Ambient) > 1e-6 {
				t.Errorf("part %d: %.7f without heat, ambient %.7f", i, ground[i], p.Wall.Ambient)
			}
		}
	})
}

// The mirrored section has the same temperatures.
func TestMirrorSymmetry(t *testing.T) {
	forRandom(t, 4, func(t *testing.T, r *rand.Rand, p heat.Problem) {
		one := heat.New(p, heat.Settings{}).Solve(bg, nil)
		m := p
		m.Parts = append([]heat.Part(nil), p.Parts...)
		for i := range m.Parts {
			q := &m.Parts[i]
			q.X = -q.X
			if q.In == -1 && p.Wall.Shape == heat.Rect {
				q.X += p.Wall.W
			}
		}
		two := heat.New(m, heat.Settings{}).Solve(bg, nil)
		for i := range m.Parts {
			if e := one.Core[i] - two.Core[i]; math.Abs(e) > 2e-5*(one.Core[i]-p.Wall.Ambient) {
				t.Errorf("part %d: mirrored off by %g K", i, e)
			}
		}
	})
}

// Moving a part gives what a new model of the moved section gives, to within the truncation of either.
func TestMoveIsNew(t *testing.T) {
	forRandom(t, 4, func(t *testing.T, r *rand.Rand, p heat.Problem) {
		m := heat.New(p, heat.Settings{Accuracy: heat.Fine})
		m.Solve(bg, nil)
		moved := p
		moved.Parts = append([]heat.Part(nil), p.Parts...)
		for range 3 {
			i := r.IntN(len(p.Parts))
			q := &moved.Parts[i]
			if q.In != -1 {
				continue
			}
			q.X *= 1 - 0.2*r.Float64()
			if p.Wall.Shape != heat.Rect {
				q.Y *= 1 - 0.2*r.Float64()
			}
			if overlaps(&moved, i) {
				q.X, q.Y = m0(&p, i)
				continue
			}
			m.Move(i, q.X, q.Y)
			p.Parts = append([]heat.Part(nil), moved.Parts...)
		}
		a := m.Solve(bg, nil)
		b := heat.New(moved, heat.Settings{Accuracy: heat.Fine}).Solve(bg, nil)
		for i := range a.Core {
			allowed := 1e-4*(b.Core[i]-p.Wall.Ambient) + a.PartErrorK[i] + b.PartErrorK[i]
			if p.Wall.Shape == heat.Rect { // its panels stay where they were graded for
				allowed *= 3
			}
			if e := a.Core[i] - b.Core[i]; math.Abs(e) > allowed {
				t.Errorf("part %d: %.5f after Move, %.5f anew", i, a.Core[i], b.Core[i])
			}
		}
	})
}

func m0(p *heat.Problem, i int) (x, y float64) { return p.Parts[i].X, p.Parts[i].Y }

func overlaps(p *heat.Problem, i int) bool {
	a := &p.Parts[i]
	for j := range p.Parts {
		b := &p.Parts[j]
		if j != i && b.In == a.In && math.Hypot(a.X-b.X, a.Y-b.Y) < outer(a)+outer(b) {
			return true
		}
	}
	return false
}
