package heat

// columns solves A x = f for every right-hand side and returns the solutions and z = fᵀ A⁻¹ f, symmetric and with an error quadratic in
// the residuals: fᵀ x + xᵀ (f − A x).
func (g *region) columns(f [][]float64, tol float64, stop func() bool) (x, z [][]float64, ok bool) {
	n := g.sys.Len()
	x = make([][]float64, len(f))
	res := make([][]float64, len(f))
	tmp := make([]float64, n)
	for k := range f {
		x[k] = make([]float64, n)
		if _, ok := g.iterate(x[k], f[k], tol, stop); !ok {
			return nil, nil, false
		}
		res[k] = make([]float64, n)
		g.product(res[k], x[k], tmp)
		for i := range tmp {
			res[k][i] = f[k][i] - res[k][i]
		}
	}
	z = make([][]float64, len(f))
	for i := range f {
		z[i] = make([]float64, len(f))
	}
	for i := range f {
		for j := i; j < len(f); j++ {
			v := (dot(f[i], x[j]) + dot(f[j], x[i]) + dot(x[i], res[j]) + dot(x[j], res[i])) / 2
			z[i][j], z[j][i] = v, v
		}
	}
	return x, z, true
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
