package rating

import (
	"context"
	"math"

	"packrise/solver/heat"
)

// Limits of the fixed point between temperature and resistance.
const (
	hottestC = 1000 // above this a metal counts as running away: copper melts at 1085 °C
	maxSteps = 40
)

// tolerance is the largest change (K) of any metal in the last step of the fixed point.
func tolerance(grade heat.Accuracy) float64 {
	switch grade {
	case heat.Draft:
		return 0.02
	case heat.Fine:
		return 2e-4
	}
	return 1e-3
}

// settle finds temperatures and heats that agree: T = T(q), q = I²R(T). The plain iteration contracts by α·(rise due to I²R), mostly 0.1–0.3;
// mixing in the step before (Anderson's method of depth one) leaves three to five steps. Where it does not settle, runaway decides
// whether any steady state exists.
func settle(ctx context.Context, m model, s *scene, start []float64, grade heat.Accuracy) answered {
	x := start
	var lastG, lastF []float64
	q := make([]float64, len(s.parts))
	for range maxSteps {
		r := solveAt(ctx, m, s, x, q)
		if r.Status != heat.Converged {
			return answered{heat: r, temps: r.Core, status: r.Status}
		}
		g := r.Core
		f := make([]float64, len(g))
		worst, hot := 0.0, 0.0
		for i := range g {
			if s.parts[i].metal {
				f[i] = g[i] - x[i]
				worst, hot = max(worst, math.Abs(f[i])), max(hot, g[i])
			}
		}
		if worst <= tolerance(grade) && hot <= hottestC && !cooling(q) {
			return answered{heat: r, temps: g}
		}
		if hot > 3*hottestC || math.IsNaN(worst) || cooling(q) {
			break
		}
		x = mix(g, lastG, f, lastF)
		lastG, lastF = g, f
	}
	return runaway(ctx, m, s, grade)
}

// cooling tells whether a conductor takes heat up: beyond the gain at which a steady state ends, the equations still have a solution, one of
// negative resistances.
func cooling(q []float64) bool {
	for _, v := range q {
		if v < 0 {
			return true
		}
	}
	return false
}

// solveAt solves with the heats that belong to the temperatures x.
func solveAt(ctx context.Context, m model, s *scene, x, q []float64) *heat.Result {
	for i := range s.parts {
		q[i] = s.parts[i].heat(x[i])
	}
	return m.Solve(ctx, q)
}

// mix is Anderson's method with one step of memory.
func mix(g, lastG, f, lastF []float64) []float64 {
	x := make([]float64, len(g))
	copy(x, g)
	if lastG == nil {
		return x
	}
	num, den := 0.0, 0.0
	for i := range f {
		d := f[i] - lastF[i]
		num += f[i] * d
		den += d * d
	}
	if den == 0 {
		return x
	}
	c := num / den
	if math.Abs(c) > 4 { // far outside of what was tried: take the plain step
		return x
	}
	for i := range x {
		x[i] -= c * (g[i] - lastG[i])
	}
	return x
}
