package rating

import (
	"math"

	"gonum.org/v1/gonum/mat"
)

// anderson speeds a fixed point x = g(x) up: the next x is the mix of the last answers whose misses g − x cancel best (D. G. Anderson, Journal of
// the ACM 12 (1965) 547).
type anderson struct {
	g, f [][]float64 // answers and misses, the newest last
}

const andersonDepth = 3

// next takes the answer g to x and returns the next x.
func (a *anderson) next(x, g []float64) []float64 {
	f := make([]float64, len(g))
	for i := range f {
		f[i] = g[i] - x[i]
	}
	a.g, a.f = append(a.g, append([]float64(nil), g...)), append(a.f, f)
	if len(a.f) > andersonDepth+1 {
		a.g, a.f = a.g[1:], a.f[1:]
	}
	out := append([]float64(nil), g...)
	last := len(a.f) - 1
	c := a.weights()
	if c == nil && last > 0 { // half a step: what overshoots calms down
		for i := range out {
			out[i] -= f[i] / 2
		}
	}
	for k, v := range c {
		for i := range out {
			out[i] += v * (a.g[k][i] - a.g[last][i])
		}
	}
	return out
}

// weights are the shares of the older answers that make the miss smallest; none where they would carry far beyond what was tried.
func (a *anderson) weights() []float64 {
	last := len(a.f) - 1
	if last < 1 {
		return nil
	}
	n := len(a.f[last])
	d := mat.NewDense(n+last, last, nil)
	b := mat.NewVecDense(n+last, nil)
	size := 0.0
	for k := range last {
		for i := range n {
			v := a.f[k][i] - a.f[last][i]
			d.Set(i, k, v)
			size = math.Max(size, math.Abs(v))
		}
	}
	for k := range last {
		d.Set(n+k, k, 1e-6*size) // keeps alike misses from making wild shares
	}
	for i := range n {
		b.SetVec(i, -a.f[last][i])
	}
	var c mat.VecDense
	if err := c.SolveVec(d, b); err != nil {
		return nil
	}
	for k := range last {
		if v := c.AtVec(k); math.IsNaN(v) || math.Abs(v) > 4 {
			return nil
		}
	}
	return c.RawVector().Data
}

func (a *anderson) forget() { a.g, a.f = nil, nil }
