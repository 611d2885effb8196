package study

import (
	"math"

	"gonum.org/v1/gonum/mat"
)

// programme maximises Σ w·√x with low + gain·x ≤ limit and x ≥ 0, by Newton's method on that sum with logarithmic barriers (the sum itself keeps
// x above 0). It starts from the present currents, a little inside.
func (m *summed) programme() {
	n := len(m.loads)
	x := make([]float64, n)
	for l, v := range m.loads {
		x[l] = 0.98 * v.A * v.A
	}
	if !m.inside(x) {
		return
	}
	scale := m.sum()
	for mu := 0.03 * scale; mu > 1e-6*scale; mu /= 4 {
		for range 30 {
			if m.newton(x, mu) < 1e-9 {
				break
			}
		}
	}
	for l := range x {
		m.loads[l].A = math.Sqrt(x[l])
	}
}

func (m *summed) inside(x []float64) bool {
	for i := range m.limit {
		if m.left(i, x) <= 0 {
			return false
		}
	}
	for _, v := range x {
		if v <= 0 {
			return false
		}
	}
	return true
}

func (m *summed) left(i int, x []float64) float64 {
	k := m.limit[i] - m.low[i]
	for l, v := range x {
		k -= m.gain[i][l] * v
	}
	return k
}

// value is the sum with its barriers.
func (m *summed) value(x []float64, mu float64) (v float64) {
	for l := range x {
		v += m.weight[l]*math.Sqrt(x[l]) + 1e-3*mu*math.Log(x[l])
	}
	for i := range m.limit {
		v += mu * math.Log(m.left(i, x))
	}
	return v
}

// newton makes one step, in place, and returns the largest relative change.
func (m *summed) newton(x []float64, mu float64) float64 {
	n := len(x)
	g, h := mat.NewVecDense(n, nil), mat.NewSymDense(n, nil)
	for l, v := range x {
		r := math.Sqrt(v)
		g.SetVec(l, m.weight[l]/(2*r)+1e-3*mu/v)
		h.SetSym(l, l, m.weight[l]/(4*v*r)+1e-3*mu/(v*v))
	}
	for i := range m.limit {
		k := m.left(i, x)
		for a, ga := range m.gain[i] {
			g.SetVec(a, g.AtVec(a)-mu*ga/k)
			for b := a; b < n; b++ {
				h.SetSym(a, b, h.At(a, b)+mu*ga*m.gain[i][b]/(k*k))
			}
		}
	}
	var chol mat.Cholesky
	var step mat.VecDense
	if !chol.Factorize(h) || chol.SolveVecTo(&step, g) != nil {
		return 0
	}
	next := make([]float64, n)
	before := m.value(x, mu)
	for t := 1.0; t > 1e-10; t /= 2 {
		for l := range x {
			next[l] = x[l] + t*step.AtVec(l)
		}
		if m.inside(next) && m.value(next, mu) >= before {
			most := 0.0
			for l := range x {
				most = math.Max(most, math.Abs(next[l]/x[l]-1))
			}
			copy(x, next)
			return most
		}
	}
	return 0
}
