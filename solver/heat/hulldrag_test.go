package heat_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/heat"
)

// TestHullFreezes: while a part of the outside of a bundle that radiates is dragged, drafts keep what surfaces saw until it has moved 1 mm, say so, and are
// as far from a draft that looked about as they say; nothing else is frozen.
func TestHullFreezes(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	frozen, frames, worst := 0, 0, 0.0
	for i := range soak(4, 40) {
		r := rand.New(rand.NewPCG(15, uint64(i)))
		p := lit(randomBundle(r, wish{parts: 4 + r.IntN(16), air: true, cables: i%2 == 0}))
		k, dir := outermost(&p), 2*math.Pi*r.Float64()
		draft, usual := heat.New(p, heat.Settings{Accuracy: heat.Draft}), heat.New(p, heat.Settings{})
		draft.Solve(bg, nil)
		usual.Solve(bg, nil)
		p.Parts = append([]heat.Part(nil), p.Parts...)
		at := p.Parts[k]
		for step := 1; step <= 12; step++ {
			far := 0.15e-3 * float64(step)
			x := at.X/math.Hypot(at.X, at.Y)*far + 0.3*far*math.Cos(dir)
			y := at.Y/math.Hypot(at.X, at.Y)*far + 0.3*far*math.Sin(dir)
			p.Parts[k].X, p.Parts[k].Y = at.X+x, at.Y+y
			if overlaps(&p, k) {
				continue
			}
			draft.Move(k, at.X+x, at.Y+y)
			got := draft.Solve(bg, nil)
			fresh := heat.New(p, heat.Settings{Accuracy: heat.Draft}).Solve(bg, nil)
			frames++
			if got.Frozen {
				frozen++
			}
			for j, v := range fresh.Core {
				e := math.Abs(got.Core[j] - v)
				worst = math.Max(worst, e)
				if bound := got.ErrorK + fresh.ErrorK; e > bound || !got.Frozen && e > 5e-4*math.Abs(v-p.Wall.Ambient)+1e-3 {
					t.Errorf("bundle %d, %.2f mm: part %d off by %.4f K, frozen %v, estimate %.4f", i, far/1e-3, j, e, got.Frozen, got.ErrorK)
				}
			}
			if d := got.Released - got.Generated; math.Abs(d) > 1e-3*got.Generated {
				t.Errorf("bundle %d: %.4f W/m get lost of %.3f", i, -d, got.Generated)
			}
			if step%6 == 0 {
				usual.Move(k, at.X+x, at.Y+y)
				if s := usual.Solve(bg, nil); s.Frozen {
					t.Errorf("bundle %d: frozen at standard", i)
				}
			}
		}
		draft.Move(k, at.X, at.Y)
		back, _, _ := draft.Tangent(bg)
		p.Parts[k].X, p.Parts[k].Y = at.X, at.Y
		want, _, _ := heat.New(p, heat.Settings{Accuracy: heat.Draft}).Tangent(bg)
		for j := range want {
			if want[j] != nil && math.Abs(back[j][j]-want[j][j]) > 2e-3*want[j][j] {
				t.Errorf("bundle %d: back again, tangent %.5f K per W/m, of a new draft %.5f", i, back[j][j], want[j][j])
			}
		}
	}
	t.Logf("%d of %d frames frozen, at most %.4f K from a new draft", frozen, frames, worst)
	if frozen*2 < frames || frozen == frames {
		t.Errorf("%d of %d frames frozen", frozen, frames)
	}
}

// outermost is the part farthest from the middle that lies in no cable.
func outermost(p *heat.Problem) (k int) {
	far := -1.0
	for i := range p.Parts {
		q := &p.Parts[i]
		if d := math.Hypot(q.X, q.Y) + outer(q); q.In == -1 && d > far {
			k, far = i, d
		}
	}
	return k
}
