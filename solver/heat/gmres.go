package heat

import "math"

// maxBasis is the number of directions that gmres keeps before it starts again.
const maxBasis = 80

// gmres solves A x = f for any A (Saad and Schultz 1986) from the x given, until the residual is below tol times f.
func gmres(a operator, x, f []float64, tol float64, stop func() bool) (steps int, ok bool) {
	end := tol * math.Sqrt(dot(f, f))
	for steps < maxSteps {
		n, done, ok := gmresCycle(a, x, f, end, stop)
		steps += n
		if done || !ok {
			return steps, ok
		}
	}
	return steps, true
}

// gmresCycle improves x over one basis; done tells that the residual is below end.
func gmresCycle(a operator, x, f []float64, end float64, stop func() bool) (steps int, done, ok bool) {
	n := len(f)
	r := make([]float64, n)
	a(r, x)
	for i := range r {
		r[i] = f[i] - r[i]
	}
	beta := math.Sqrt(dot(r, r))
	if beta <= end {
		return 0, true, true
	}
	scale(r, 1/beta)
	basis := [][]float64{r}
	var h [][]float64 // columns of the triangle
	var cs, sn []float64
	g := []float64{beta}
	ok = true
	for len(h) < maxBasis && math.Abs(g[len(g)-1]) > end {
		if stop() {
			ok = false
			break
		}
		w := make([]float64, n)
		a(w, basis[len(h)])
		col := make([]float64, len(h)+2)
		for i, v := range basis {
			col[i] = dot(v, w)
			axpy(w, -col[i], v)
		}
		norm := math.Sqrt(dot(w, w))
		k := len(h)
		for i := range k {
			col[i], col[i+1] = cs[i]*col[i]+sn[i]*col[i+1], cs[i]*col[i+1]-sn[i]*col[i]
		}
		rho := math.Hypot(col[k], norm)
		if rho == 0 {
			break
		}
		c, s := col[k]/rho, norm/rho
		col[k] = rho
		cs, sn, h = append(cs, c), append(sn, s), append(h, col)
		last := g[k]
		g[k] = c * last
		g = append(g, -s*last)
		if norm == 0 {
			break
		}
		scale(w, 1/norm)
		basis = append(basis, w)
	}
	back(h, g, basis, x)
	return len(h), ok && math.Abs(g[len(g)-1]) <= end, ok
}

// back solves the triangle and adds the combination of the basis to x.
func back(h [][]float64, g []float64, basis [][]float64, x []float64) {
	k := len(h)
	y := make([]float64, k)
	for i := k - 1; i >= 0; i-- {
		s := g[i]
		for j := i + 1; j < k; j++ {
			s -= h[j][i] * y[j]
		}
		y[i] = s / h[i][i]
		axpy(x, y[i], basis[i])
	}
}
