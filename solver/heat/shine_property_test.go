package heat_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/heat"
)

// randomShine is a section of parts of any outline in any wall full of a gas, or of air that moves.
func randomShine(seed uint64) heat.Problem {
	r := rand.New(rand.NewPCG(seed, 21))
	p := randomShaped(r)
	p.MediumK = 0.025 + 0.005*r.Float64()
	p = shining(r, p, true)
	if seed%2 == 0 {
		p.Filling = heat.Air
	}
	if seed%3 == 0 {
		p.Clearance = 0.2 * mm
	}
	return p
}

// Heat is conserved, radiation cools, the tangent tells what a little more heat does, and the finer answer lies within the estimate 19 times of 20.
// 2 sections, 100 under PACKRISE_SOAK.
func TestShineProperties(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	count, held := soak(2, 100), 0
	for seed := range count {
		p := randomShine(uint64(seed))
		m := heat.New(p, heat.Settings{})
		r := m.Solve(bg, nil)
		if r.Status != heat.Converged || !r.Radiates || !m.Radiates() {
			t.Fatalf("%d: %v", seed, r.Status)
		}
		if d := r.Released - r.Generated; !(math.Abs(d) < 1e-3*(r.Generated+0.1)) {
			t.Errorf("%d: %g of %g W/m released", seed, r.Released, r.Generated)
		}
		cold := heat.New(dull(p), heat.Settings{}).Solve(bg, nil)
		hot := func(r *heat.Result) (hottest float64) {
			hottest = math.Inf(-1)
			for i := range p.Parts {
				if p.Parts[i].Core == heat.Metal {
					hottest = math.Max(hottest, r.Core[i])
				}
			}
			return hottest
		}
		if p.Filling == heat.Gas && hot(r) > hot(cold)+r.ErrorK {
			t.Errorf("%d: %.4f °C, %.4f without radiation", seed, hot(r), hot(cold))
		}
		checkTangent(t, m, p, r)
		fine := heat.New(p, heat.Settings{Accuracy: heat.Fine}).Solve(bg, nil)
		worst := 0.0
		for i := range p.Parts {
			if p.Parts[i].Core == heat.Metal {
				worst = math.Max(worst, math.Abs(fine.Core[i]-r.Core[i]))
			}
		}
		if worst <= r.ErrorK {
			held++
		}
		t.Logf("%2d: %d parts, wall %d, %4d unknowns, %2d steps, off by %.5f K, estimated %.5f, rise %.1f, %.1f without radiation", seed, len(p.Parts), p.Wall.Shape, r.Unknowns,
			r.Steps, worst, r.ErrorK, heatRise(r, p), heatRise(cold, p))
		if worst > 0.05 && worst > r.ErrorK {
			t.Errorf("%d: off by %g K", seed, worst)
		}
	}
	if float64(held) < 0.95*float64(count) {
		t.Errorf("the estimate held %d of %d times", held, count)
	}
}

// checkTangent compares the tangent with a little more heat in one metal, the air being held where it is a gas.
func checkTangent(t *testing.T, m *heat.Model, p heat.Problem, r *heat.Result) {
	t.Helper()
	k, ground, status := m.Tangent(bg)
	if status != heat.Converged {
		t.Fatal(status)
	}
	heats := make([]float64, len(p.Parts))
	for i := range p.Parts {
		heats[i] = p.Parts[i].Heat
	}
	for i := range p.Parts {
		if k[i] == nil {
			continue
		}
		sum := ground[i]
		for j, q := range heats {
			sum += k[i][j] * q
		}
		if math.Abs(sum-r.Core[i]) > 1e-9*math.Abs(sum)+1e-9 {
			t.Errorf("part %d: %.6f °C by the tangent, %.6f", i, sum, r.Core[i])
		}
	}
	if p.Filling == heat.Air {
		return // the tangent holds the air's coefficient
	}
	const more = 0.02
	heats[0] += more
	s := m.Solve(bg, heats)
	for i := range p.Parts {
		if k[i] == nil {
			continue
		}
		if d := (s.Core[i] - r.Core[i]) / more; math.Abs(d-k[i][0]) > 0.01*k[0][0]+2e-3*heatRise(r, p)/more*1e-2 {
			t.Errorf("part %d: %.5f K·m/W, the tangent says %.5f", i, d, k[i][0])
		}
	}
}

// A bar at one temperature in a large black pipe at another: q = S k ΔT + ε σ A (T⁴ − Ta⁴), since the pipe is black and either surface has one
// temperature; S is what conduction alone gives.
func TestBarInBlackPipe(t *testing.T) {
	const ambient, eps, zero = 25.0, 0.3, 273.15
	p := heat.Problem{MediumK: 0.026, Filling: heat.Gas, ZeroK: zero, Wall: heat.Wall{R: 200 * mm, Rings: []heat.Ring{{K: 400, Thickness: mm}}, Film: 1e6, Ambient: ambient, Emissivity: 1}}
	p.Parts = []heat.Part{bar(40, 8, 1, 0, 0, 12)}
	p.Parts[0].X, p.Parts[0].Emissivity, p.Parts[0].Form.Turn = 30*mm, eps, 0.4
	area := (2*(40+8) - 8*1 + 2*math.Pi*1) * mm
	solid := p
	solid.Filling = heat.Solid
	s := 12 / (solve(t, solid, heat.Fine).Core[0] - ambient)
	lo, hi := ambient, 500.0
	for range 60 {
		mid := (lo + hi) / 2
		if s*(mid-ambient)+eps*5.670374419e-8*area*(math.Pow(mid+zero, 4)-math.Pow(ambient+zero, 4)) > 12 {
			hi = mid
		} else {
			lo = mid
		}
	}
	if r := solve(t, p, heat.Standard); math.Abs(r.Core[0]-lo) > 2e-3 {
		t.Errorf("%.4f °C, want %.4f", r.Core[0], lo)
	}
}

// The air moves among contours as among round parts: the same section both ways.
func TestShapedAirMoves(t *testing.T) {
	p := load(t, "r04_loose7_conduit40").Problem
	p.Filling = heat.Air
	round, r := solve(t, p, heat.Standard), solve(t, allContours(p), heat.Standard)
	if !(r.Nusselt > 1.1) || math.Abs(r.Nusselt/round.Nusselt-1) > 1e-3 {
		t.Errorf("Nu %.4f, %.4f among round parts", r.Nusselt, round.Nusselt)
	}
	for i := range r.Core {
		if math.Abs(r.Core[i]-round.Core[i]) > 0.03 {
			t.Errorf("part %d: %.4f °C, %.4f among round parts", i, r.Core[i], round.Core[i])
		}
	}
}

// A moved part leaves nothing behind: the answer is that of a new model; other films are taken over.
func TestShineMoves(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	p := duct()
	m := heat.New(p, heat.Settings{})
	m.Solve(bg, nil)
	p.Parts[0].X += 2 * mm
	m.Move(0, p.Parts[0].X, p.Parts[0].Y)
	p.Wall.Film = 12
	m.Outside(p.Wall)
	a, b := m.Solve(bg, nil), heat.New(p, heat.Settings{}).Solve(bg, nil)
	for i := range a.Core {
		if math.Abs(a.Core[i]-b.Core[i]) > 2e-3 {
			t.Errorf("part %d: %.6f °C after a move, %.6f", i, a.Core[i], b.Core[i])
		}
	}
}
