package heat

import "packrise/solver/harmonic"

// many right-hand sides are iterated on together: element k of vector v stands at many·k + v.
const many = harmonic.Many

// columns solves A x = f for every right-hand side and returns the solutions and z = fᵀ A⁻¹ f, symmetric and with an error quadratic in
// the residuals: fᵀ x + xᵀ (f − A x).
func (g *region) columns(f [][]float64, tol float64, stop func() bool) (x, z [][]float64, ok bool) {
	n := g.sys.Len()
	x, res := make([][]float64, len(f)), make([][]float64, len(f))
	b := newBatch(g)
	for first := 0; first < len(f); first += many {
		some := f[first:min(first+many, len(f))]
		if !b.solve(some, tol, stop) {
			return nil, nil, false
		}
		for v := range some {
			x[first+v], res[first+v] = make([]float64, n), make([]float64, n)
			for i := range n {
				x[first+v][i], res[first+v][i] = b.x[many*i+v], b.r[many*i+v]
			}
		}
	}
	return x, products(f, x, res), true
}

// products returns fᵢᵀ x_j + x_iᵀ res_j, which is symmetric.
func products(f, x, res [][]float64) [][]float64 {
	z := make([][]float64, len(f))
	for i := range f {
		z[i] = make([]float64, len(f))
	}
	for i := range f {
		for j := i; j < len(f); j++ {
			v := dot2(f[i], x[j], x[i], res[j])
			z[i][j], z[j][i] = v, v
		}
	}
	return z
}

// dot2 is aᵀb + cᵀd.
func dot2(a, b, c, d []float64) float64 {
	var s, t float64
	b, c, d = b[:len(a)], c[:len(a)], d[:len(a)]
	for i, v := range a {
		s += v * b[i]
		t += c[i] * d[i]
	}
	return s + t
}

// iterate improves x until A x = f to tol, relative to f.
func (g *region) iterate(x, f []float64, tol float64, stop func() bool) (steps int, ok bool) {
	tmp := make([]float64, len(x))
	a := func(y, x []float64) { g.product(y, x, tmp) }
	if g.rect != nil {
		return gmres(a, x, f, tol, stop)
	}
	if g.definite {
		if steps, ok = conjugate(a, x, f, tol, stop); steps >= 0 {
			return steps, ok
		}
	}
	return minres(a, x, f, tol, stop)
}
