package heat_test

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/heat"
)

// shining gives every surface of a section an emissivity and its media gases.
func shining(r *rand.Rand, p heat.Problem, inside bool) heat.Problem {
	p.Parts = append([]heat.Part(nil), p.Parts...)
	p.Filling, p.ZeroK = heat.Gas, 273.15
	p.Wall.Emissivity = 0.1 + 0.9*r.Float64()
	for i := range p.Parts {
		q := &p.Parts[i]
		q.Emissivity, q.InsideEmissivity = 0.1+0.9*r.Float64(), 0.1+0.9*r.Float64()
		if q.Core == heat.Inside && inside {
			q.Filling, q.K = heat.Gas, 0.027
		}
	}
	return p
}

func dull(p heat.Problem) heat.Problem {
	p.Parts = append([]heat.Part(nil), p.Parts...)
	p.Wall.Emissivity = 0
	for i := range p.Parts {
		p.Parts[i].Emissivity, p.Parts[i].InsideEmissivity = 0, 0
	}
	return p
}

var glowWishes = []wish{
	{parts: 7, air: true},
	{parts: 9, air: true, rect: true},
	{parts: 6, air: true, cables: true},
	{parts: 6, air: true, cables: true, held: true},
	{parts: 5, air: true, loose: true},
	{parts: 6, air: true, loose: true, rect: true, cables: true, held: true},
}

func forShining(t *testing.T, n int, f func(t *testing.T, r *rand.Rand, p heat.Problem)) {
	t.Helper()
	for w, wish := range glowWishes {
		for k := range soak(n, 40*n) {
			r := rand.New(rand.NewPCG(uint64(w), uint64(1000+k)))
			f(t, r, shining(r, randomSection(r, wish), k%2 == 0))
		}
	}
}

// Where nothing emits, the coupled system gives what conduction alone gives, inside cables too.
func TestDullSurfaces(t *testing.T) {
	forShining(t, 2, func(t *testing.T, _ *rand.Rand, p heat.Problem) {
		d := dull(p)
		a := heat.New(d, heat.Settings{Accuracy: heat.Fine}).Solve(bg, nil)
		d.Filling = heat.Solid
		d.Parts = append([]heat.Part(nil), d.Parts...)
		for i := range d.Parts {
			d.Parts[i].Filling = heat.Solid
		}
		b := heat.New(d, heat.Settings{Accuracy: heat.Fine}).Solve(bg, nil)
		for i := range a.Core {
			if e := a.Core[i] - b.Core[i]; math.Abs(e) > 1e-4*math.Abs(b.Core[i]-p.Wall.Ambient)+1e-6 {
				t.Errorf("part %d of %d, core %d: %.6f, conduction alone %.6f", i, len(a.Core), p.Parts[i].Core, a.Core[i], b.Core[i])
			}
		}
	})
}

// Heat is conserved, radiation cools, and the accuracies agree.
func TestShining(t *testing.T) {
	forShining(t, 2, func(t *testing.T, _ *rand.Rand, p heat.Problem) {
		s := heat.New(p, heat.Settings{}).Solve(bg, nil)
		f := heat.New(p, heat.Settings{Accuracy: heat.Fine}).Solve(bg, nil)
		if s.Status != heat.Converged || f.Status != heat.Converged {
			t.Fatalf("%v, %v", s.Status, f.Status)
		}
		taken, rise := 0.0, 0.0
		for i, q := range s.Absorbed {
			taken += q
			rise = math.Max(rise, math.Abs(f.Core[i]-p.Wall.Ambient))
		}
		if d := s.Generated - s.Released - taken; math.Abs(d) > 1e-6*math.Max(s.Generated, 1) {
			t.Errorf("%g W/m get lost of %g", d, s.Generated)
		}
		worst := 0.0
		for i := range s.Core {
			worst = math.Max(worst, math.Abs(s.Core[i]-f.Core[i]))
		}
		t.Logf("%d parts: standard to fine %.4f K of %.1f, estimate %.4f; %d steps", len(s.Core), worst, rise, s.ErrorK, s.Steps)
		if worst > math.Max(2e-3*rise, s.ErrorK) {
			t.Errorf("standard and fine differ by %.4f K of %.1f", worst, rise)
		}
	})
}

// The tangent is what small changes of the heats do.
func TestTangent(t *testing.T) {
	forShining(t, 1, func(t *testing.T, r *rand.Rand, p heat.Problem) {
		m := heat.New(p, heat.Settings{Accuracy: heat.Fine})
		base := m.Solve(bg, nil)
		k, ground, status := m.Tangent(bg)
		if status != heat.Converged {
			t.Fatal(status)
		}
		up, down := make([]float64, len(p.Parts)), make([]float64, len(p.Parts))
		d := make([]float64, len(p.Parts))
		for i, q := range p.Parts {
			if q.Core == heat.Metal {
				d[i] = 0.02 * q.Heat * r.Float64()
				up[i], down[i] = q.Heat+d[i], q.Heat-d[i]
			}
		}
		a, b := m.Solve(bg, up), m.Solve(bg, down)
		for i, row := range k {
			if row == nil {
				continue
			}
			slope, sum := 0.0, ground[i]
			for j, v := range row {
				slope += v * d[j]
				if p.Parts[j].Core == heat.Metal {
					sum += v * p.Parts[j].Heat
				}
			}
			if want := (a.Core[i] - b.Core[i]) / 2; math.Abs(slope-want) > 1e-3*math.Abs(want)+1e-5 {
				t.Errorf("part %d: tangent %.6f K, difference %.6f K", i, slope, want)
			}
			if math.Abs(sum-base.Core[i]) > 1e-9*math.Abs(base.Core[i])+1e-9 {
				t.Errorf("part %d: ground + K q is %.6f, not %.6f", i, sum, base.Core[i])
			}
		}
	})
}

// A section without heat and with nothing held is at the ambient throughout.
func TestShiningCold(t *testing.T) {
	r := rand.New(rand.NewPCG(8, 8))
	p := shining(r, randomSection(r, wish{parts: 8, air: true, cables: true}), true)
	c := heat.New(p, heat.Settings{}).Solve(bg, make([]float64, len(p.Parts)))
	for i, v := range c.Core {
		if math.Abs(v-p.Wall.Ambient) > 1e-6 {
			t.Errorf("part %d is at %.8f, not %.4f", i, v, p.Wall.Ambient)
		}
	}
}

// Moving a part gives what a new model gives; a draft may freeze the radiation on the way and says so.
func TestMoveShining(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	for _, rect := range []bool{false, true} {
		r := rand.New(rand.NewPCG(3, 77))
		p := shining(r, randomSection(r, wish{parts: 8, air: true, rect: rect, loose: true, cables: true}), true)
		for _, acc := range []heat.Accuracy{heat.Standard, heat.Draft} {
			m := heat.New(p, heat.Settings{Accuracy: acc})
			m.Solve(bg, nil)
			moved := p
			moved.Parts = append([]heat.Part(nil), p.Parts...)
			for step := range 3 {
				i := 0
				for moved.Parts[i].In >= 0 || overlapsAt(&moved, i, 0.3e-3*float64(step+1), 0) {
					i++
				}
				q := &moved.Parts[i]
				q.X += 0.3e-3 * float64(step+1)
				m.Move(i, q.X, q.Y)
				a := m.Solve(bg, nil)
				b := heat.New(moved, heat.Settings{Accuracy: acc}).Solve(bg, nil)
				if acc == heat.Standard && a.Frozen || step == 0 && acc == heat.Draft && !a.Frozen {
					t.Errorf("rectangle %v, accuracy %d, step %d: frozen %v", rect, acc, step, a.Frozen)
				}
				worst, rise := 0.0, 0.0
				for j := range a.Core {
					worst = math.Max(worst, math.Abs(a.Core[j]-b.Core[j]))
					rise = math.Max(rise, b.Core[j]-p.Wall.Ambient)
				}
				t.Logf("rectangle %v, accuracy %d, step %d: %.4f K of %.1f, frozen %v, %d steps", rect, acc, step, worst, rise, a.Frozen, a.Steps)
				if !a.Frozen && worst > 1e-3*rise || worst > a.ErrorK+b.ErrorK+1e-3*rise {
					t.Errorf("rectangle %v, accuracy %d, step %d: %.4f K after Move (estimate %.4f)", rect, acc, step, worst, a.ErrorK)
				}
			}
		}
	}
}

func overlapsAt(p *heat.Problem, i int, dx, dy float64) bool {
	q := *p
	q.Parts = append([]heat.Part(nil), p.Parts...)
	q.Parts[i].X += dx
	q.Parts[i].Y += dy
	a := outer(&q.Parts[i])
	if q.Wall.Shape == heat.Rect {
		if q.Parts[i].X+a > q.Wall.W {
			return true
		}
	} else if math.Hypot(q.Parts[i].X, q.Parts[i].Y)+a > q.Wall.R {
		return true
	}
	return overlaps(&q, i)
}

// A solution that is cancelled says so, and one after it is as good as any.
func TestCancelShining(t *testing.T) {
	l := glowing(t, "t37_settled_air")
	m := heat.New(l.Problem, heat.Settings{})
	ctx, cancel := context.WithCancel(bg)
	cancel()
	if r := m.Solve(ctx, nil); r.Status != heat.Cancelled {
		t.Errorf("status %v", r.Status)
	}
	if r := m.Solve(bg, nil); r.Status != heat.Converged {
		t.Errorf("status %v", r.Status)
	}
}

// A model that resumes from a like one, of another gas or another accuracy, gets where one gets from nothing, in fewer steps.
func TestResume(t *testing.T) {
	for _, rect := range []bool{false, true} {
		r := rand.New(rand.NewPCG(5, 78))
		p := shining(r, randomSection(r, wish{parts: 9, air: true, rect: rect, cables: true, held: true}), true)
		old := heat.New(p, heat.Settings{Accuracy: heat.Draft})
		old.Solve(bg, nil)
		p.MediumK *= 1.03
		for range 2 {
			m := heat.New(p, heat.Settings{})
			m.Resume(old)
			warm, cold := m.Solve(bg, nil), heat.New(p, heat.Settings{}).Solve(bg, nil)
			for i := range cold.Core {
				if d := math.Abs(warm.Core[i] - cold.Core[i]); d > 1e-4*math.Abs(cold.Core[i]-p.Wall.Ambient)+1e-5 {
					t.Errorf("rectangle %v, part %d: %.6f resumed, %.6f from nothing", rect, i, warm.Core[i], cold.Core[i])
				}
			}
			if warm.Steps >= cold.Steps {
				t.Errorf("rectangle %v: %d steps resumed, %d from nothing", rect, warm.Steps, cold.Steps)
			}
			old = m
			p.MediumK *= 1.01
		}
	}
}
