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
	r := make([]float64, len(f))
	if !isNought(x) {
		a(r, x)
	}
	for i := range r {
		r[i] = f[i] - r[i]
	}
	beta := math.Sqrt(dot(r, r))
	if beta <= end {
		return 0, true, true
	}
	scale(r, 1/beta)
	k := krylov{basis: [][]float64{r}, g: []float64{beta}}
	ok = true
	for more := true; more && len(k.h) < maxBasis && k.residual() > end; {
		if ok = !stop(); !ok {
			break
		}
		w := make([]float64, len(f))
		a(w, k.basis[len(k.h)])
		more = k.add(w)
	}
	k.improve(x)
	return len(k.h), ok && k.residual() <= end, ok
}

func isNought(x []float64) bool {
	for _, v := range x {
		if v != 0 {
			return false
		}
	}
	return true
}

// krylov is a basis with the triangle of its products, kept by rotations.
type krylov struct {
	basis  [][]float64
	h      [][]float64 // columns
	cs, sn []float64
	g      []float64 // rotated right-hand side; the last is the residual
}

func (k *krylov) residual() float64 { return math.Abs(k.g[len(k.g)-1]) }

// add takes in w, the product of the last direction; false if nothing new is in it.
func (k *krylov) add(w []float64) bool {
	n := len(k.h)
	col := make([]float64, n+2)
	for i, v := range k.basis {
		col[i] = dot(v, w)
		axpy(w, -col[i], v)
	}
	norm := math.Sqrt(dot(w, w))
	for i := range n {
		col[i], col[i+1] = k.cs[i]*col[i]+k.sn[i]*col[i+1], k.cs[i]*col[i+1]-k.sn[i]*col[i]
	}
	rho := math.Hypot(col[n], norm)
	if rho == 0 {
		return false
	}
	c, s := col[n]/rho, norm/rho
	col[n] = rho
	k.cs, k.sn, k.h = append(k.cs, c), append(k.sn, s), append(k.h, col)
	last := k.g[n]
	k.g[n] = c * last
	k.g = append(k.g, -s*last)
	if norm == 0 {
		return false
	}
	scale(w, 1/norm)
	k.basis = append(k.basis, w)
	return true
}

// improve solves the triangle and adds the combination of the basis to x.
func (k *krylov) improve(x []float64) {
	for i, f := range k.shares() {
		axpy(x, f, k.basis[i])
	}
}

// shares solves the triangle: how much of each direction is in the solution.
func (k *krylov) shares() []float64 {
	y := make([]float64, len(k.h))
	for i := len(y) - 1; i >= 0; i-- {
		s := k.g[i]
		for j := i + 1; j < len(y); j++ {
			s -= k.h[j][i] * y[j]
		}
		y[i] = s / k.h[i][i]
	}
	return y
}
