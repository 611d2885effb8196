package rating

import (
	"context"
	"math"

	"gonum.org/v1/gonum/mat"

	"packrise/solver/heat"
)

// affine is the steady state written out: T = ground + K q(T) over the metals, with q = s² I²R20 (1 + α(T−20)) + fixed heats.
type affine struct {
	index  []int // metals, as part indices
	k      *mat.Dense
	ground []float64
	square []float64 // I²R20 at factor 1, W/m
	alpha  []float64
	fixed  []float64
}

// runaway decides what a fixed point that does not settle means. With K the influence matrix a steady state exists up to the
// factor s at which the largest eigenvalue of s² K diag(α I²R20) reaches 1 (it is the gain of the loop resistance → heat
// → temperature) or a metal reaches hottestC, whichever is lower. Where surfaces radiate K is a tangent, which is taken anew at the factor
// that the last one gave.
func runaway(ctx context.Context, m model, s *scene, grade heat.Accuracy) (a answered) {
	last := math.Inf(1)
	for range tangents {
		w, ground, status := writeOut(ctx, m, s)
		if status != heat.Converged {
			return answered{status: status}
		}
		factor, at := w.largest()
		if factor >= 1 {
			a = w.steady(ctx, m, s, ground, grade)
		} else {
			a = answered{status: heat.ThermalRunaway, settles: factor, at: at}
		}
		if !m.Radiates() || a.status == heat.Converged || a.status == heat.Cancelled {
			return a
		}
		if factor < 1 {
			if math.Abs(factor-last) < 1e-3 {
				return a
			}
			if r := m.Solve(ctx, w.heats(s, factor)); r.Status == heat.Cancelled {
				return answered{status: r.Status}
			}
		}
		last = factor
	}
	return a
}

// tangents is how often the tangent is taken anew, at most.
const tangents = 12

// steady solves at the temperatures that the matrix gives, and compares.
func (a *affine) steady(ctx context.Context, m model, s *scene, ground []float64, grade heat.Accuracy) answered {
	temps := make([]float64, len(s.parts))
	copy(temps, ground)
	for j, t := range a.temperatures(1) {
		temps[a.index[j]] = t
	}
	r := solveAt(ctx, m, s, temps, make([]float64, len(s.parts)))
	if r.Status != heat.Converged {
		return answered{heat: r, temps: r.Core, status: r.Status}
	}
	for _, i := range a.index {
		if math.Abs(r.Core[i]-temps[i]) > 20*tolerance(grade) {
			return answered{heat: r, temps: r.Core, status: heat.StoppedEarly}
		}
	}
	return answered{heat: r, temps: r.Core}
}

// writeOut finds the influence matrix and the temperatures without heat, or, where surfaces radiate, those of the tangent.
func writeOut(ctx context.Context, m model, s *scene) (a affine, ground []float64, status heat.Status) {
	k, ground, status := m.Tangent(ctx)
	if status != heat.Converged {
		return a, nil, status
	}
	return newAffine(s, k, ground), ground, status
}

func newAffine(s *scene, k [][]float64, ground []float64) affine {
	var a affine
	for i := range s.parts {
		if s.parts[i].metal {
			a.index = append(a.index, i)
		}
	}
	n := len(a.index)
	a.k = mat.NewDense(n, n, nil)
	for r, i := range a.index {
		p := &s.parts[i]
		for c, j := range a.index {
			a.k.Set(r, c, k[i][j])
		}
		a.ground = append(a.ground, ground[i])
		fixed, square := 0.0, 0.0
		if p.load != nil && p.load.HeatWM.OK {
			fixed = p.load.HeatWM.V
		} else {
			square = p.heat(20)
		}
		a.square, a.fixed, a.alpha = append(a.square, square), append(a.fixed, fixed), append(a.alpha, p.alpha)
	}
	return a
}

// temperatures solves (I − s² K diag(α I²R20)) T = ground + K (s² I²R20 (1 − 20 α) + fixed), °C; nil if singular.
func (a *affine) temperatures(s float64) []float64 {
	n := len(a.index)
	lhs := mat.NewDense(n, n, nil)
	rhs := mat.NewVecDense(n, nil)
	for r := range n {
		sum := a.ground[r]
		for c := range n {
			k, q := a.k.At(r, c), s*s*a.square[c]
			lhs.Set(r, c, -k*q*a.alpha[c])
			sum += k * (q*(1-20*a.alpha[c]) + a.fixed[c])
		}
		lhs.Set(r, r, lhs.At(r, r)+1)
		rhs.SetVec(r, sum)
	}
	var t mat.VecDense
	if err := t.SolveVec(lhs, rhs); err != nil {
		return nil
	}
	return t.RawVector().Data
}

// gain returns the largest eigenvalue of K diag(α I²R20) by the power method (the matrix is non-negative, so it is real and
// its vector has one sign) and the metal with the largest component.
func (a *affine) gain() (lambda float64, at int) {
	n := len(a.index)
	x, y := make([]float64, n), make([]float64, n)
	for i := range x {
		x[i] = 1
	}
	for range 500 {
		norm := 0.0
		for r := range n {
			y[r] = 0
			for c := range n {
				y[r] += a.k.At(r, c) * a.alpha[c] * a.square[c] * x[c]
			}
			norm = max(norm, y[r])
		}
		if norm == 0 {
			return 0, 0
		}
		change := 0.0
		for i := range x {
			y[i] /= norm
			change = max(change, math.Abs(y[i]-x[i]))
		}
		x, y = y, x
		lambda = norm
		if change < 1e-10 {
			break
		}
	}
	for i := range x {
		if x[i] > x[at] {
			at = i
		}
	}
	return lambda, at
}

// largest returns the largest factor on all currents that still settles below hottestC, and the part that stops it.
func (a *affine) largest() (factor float64, at int) {
	lambda, worst := a.gain()
	high := 1e3
	if lambda > 0 {
		high = (1 - 1e-9) / math.Sqrt(lambda)
	}
	if t, _ := a.hottest(high); t <= hottestC {
		return high, a.index[worst]
	}
	low := 0.0
	if t, i := a.hottest(0); t > hottestC {
		return 0, a.index[i]
	}
	for range 60 {
		mid := (low + high) / 2
		if t, i := a.hottest(mid); t > hottestC {
			high, worst = mid, i
		} else {
			low = mid
		}
	}
	return low, a.index[worst]
}

// hottest returns the hottest metal at a factor; +Inf where the system is singular.
func (a *affine) hottest(s float64) (t float64, at int) {
	temps := a.temperatures(s)
	if temps == nil {
		return math.Inf(1), 0
	}
	for i, v := range temps {
		if v > temps[at] {
			at = i
		}
	}
	return temps[at], at
}
