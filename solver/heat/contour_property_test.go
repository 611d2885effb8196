package heat_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/heat"
)

// randomBunch is an open bundle of parts of any outline in cells of a grid, with some round ones between them.
func randomBunch(rnd *rand.Rand) heat.Problem {
	u := func(lo, hi float64) float64 { return lo + (hi-lo)*rnd.Float64() }
	p := heat.Problem{MediumK: u(0.024, 0.3), Wall: heat.Wall{Shape: heat.Hull, Film: u(4, 20), Ambient: u(-10, 50), Taut: taut}}
	r, across := u(2, 8)*mm, 2+rnd.IntN(2)
	for i := range 2 + rnd.IntN(4) {
		q := randomForm(rnd, r, u(0, 8))
		for q.Form.Kind == heat.Sector { // no string is wound round these
			q = randomForm(rnd, r, u(0, 8))
		}
		q.X, q.Y = 2*r*float64(i%across), 2*r*float64(i/across)
		p.Parts = append(p.Parts, q)
	}
	p.Parts[0] = bar(u(1, 1.5)*r/mm, u(0.3, 0.8)*r/mm, 0.1*r/mm, 0.1*r/mm, u(0.15, 0.4), u(1, 8))
	return p
}

// Any open bundle with parts that are not round is solved: heat balances, nothing is below ambient, the influence is reciprocal and that of the
// solution, the finer answer lies within the estimate 19 times of 20, and moving a part is making the bundle anew. 2 bundles, 60 under PACKRISE_SOAK.
func TestContourHullProperties(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	count, held := soak(2, 60), 0
	for k := range count {
		seed := 4 * (k + 1)
		p := randomBunch(rand.New(rand.NewPCG(uint64(seed), 11)))
		m := heat.New(p, heat.Settings{})
		r := m.Solve(bg, nil)
		fine := solve(t, p, heat.Fine)
		if d := r.Released - r.Generated; !(math.Abs(d) < 1e-4*(r.Generated+0.1)) {
			t.Errorf("%d: %g of %g W/m released", seed, r.Released, r.Generated)
		}
		k, _ := m.Influence(bg)
		worst := 0.0
		for i := range p.Parts {
			if !(r.Core[i] > p.Wall.Ambient-1e-3) {
				t.Errorf("%d: part %d at %g, ambient %g", seed, i, r.Core[i], p.Wall.Ambient)
			}
			sum := p.Wall.Ambient
			for j := range p.Parts {
				sum += k[i][j] * p.Parts[j].Heat
			}
			if math.Abs(sum-r.Core[i]) > 0.01+r.ErrorK {
				t.Errorf("%d: part %d: %g by influence, %g", seed, i, sum, r.Core[i])
			}
			worst = math.Max(worst, math.Abs(fine.Core[i]-r.Core[i]))
		}
		if worst <= r.ErrorK {
			held++
		}
		t.Logf("%2d: %d parts, %4d unknowns, fine %4d, off by %.5f K, estimated %.5f, rise %.1f", seed, len(p.Parts), r.Unknowns, fine.Unknowns, worst, r.ErrorK, heatRise(r, p))
		if worst > 0.05 {
			t.Errorf("%d: off by %g K", seed, worst)
		}
		p.Parts = append([]heat.Part(nil), p.Parts...)
		p.Parts[1].X += 0.3 * mm
		p.Parts[1].Y += 0.4 * mm
		m.Move(1, p.Parts[1].X, p.Parts[1].Y)
		moved, fresh := m.Solve(bg, nil), solve(t, p, heat.Standard)
		for i := range p.Parts {
			if math.Abs(moved.Core[i]-fresh.Core[i]) > 1e-3 {
				t.Errorf("%d: part %d: moved %g, made anew %g", seed, i, moved.Core[i], fresh.Core[i])
			}
		}
	}
	if float64(held) < 0.95*float64(count) {
		t.Errorf("the estimate held %d of %d times", held, count)
	}
}
