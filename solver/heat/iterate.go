package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// maxSteps ends an iteration that does not converge.
const maxSteps = 400

// operator sets y = A x for a symmetric A.
type operator func(y, x []float64)

// conjugate solves A x = f by conjugate gradients (Hestenes and Stiefel 1952) from the x given, until the residual is below tol times f.
// ok is false if stop asked for an end; steps < 0 tells that A turned out not to be positive.
func conjugate(a operator, x, f []float64, tol float64, stop func() bool) (steps int, ok bool) {
	n := len(f)
	w := make([]float64, 3*n)
	r, p, q := w[:n], w[n:2*n], w[2*n:]
	a(q, x)
	for i := range r {
		r[i] = f[i] - q[i]
	}
	copy(p, r)
	rr := dot(r, r)
	end := tol * tol * dot(f, f)
	for steps = 0; rr > end && steps < maxSteps; steps++ {
		if stop() {
			return steps, false
		}
		a(q, p)
		pq := dot(p, q)
		if pq <= 0 {
			return -1, true
		}
		al := rr / pq
		for i := range x {
			x[i] += al * p[i]
			r[i] -= al * q[i]
		}
		next := dot(r, r)
		be := next / rr
		for i := range p {
			p[i] = r[i] + be*p[i]
		}
		rr = next
	}
	return steps, true
}

// minres solves A x = f for a symmetric A of either sign by minimal residuals (Paige and Saunders 1975).
func minres(a operator, x, f []float64, tol float64, stop func() bool) (steps int, ok bool) {
	n := len(f)
	w := make([]float64, 6*n)
	cut := func() []float64 { s := w[:n:n]; w = w[n:]; return s }
	v0, v, t, d0, d1, d2 := cut(), cut(), cut(), cut(), cut(), cut()
	a(t, x)
	for i := range v {
		v[i] = f[i] - t[i]
	}
	beta := math.Sqrt(dot(v, v))
	end := tol * math.Sqrt(dot(f, f))
	if beta <= end {
		return 0, true
	}
	scale(v, 1/beta)
	phi := beta
	var cs, sn, delta, eps float64 = -1, 0, 0, 0
	beta = 0
	for steps = 1; steps <= maxSteps; steps++ {
		if stop() {
			return steps, false
		}
		a(t, v)
		alpha := dot(v, t)
		for i := range t {
			t[i] -= alpha*v[i] + beta*v0[i]
		}
		next := math.Sqrt(dot(t, t))
		d := cs*delta + sn*alpha
		g := sn*delta - cs*alpha
		eps2 := sn * next
		delta = -cs * next
		rho := math.Hypot(g, next)
		if rho == 0 {
			return steps, true
		}
		cs, sn = g/rho, next/rho
		tau := cs * phi
		phi *= sn
		for i := range x {
			m := (v[i] - eps*d0[i] - d*d1[i]) / rho
			d2[i] = m
			x[i] += tau * m
		}
		d0, d1, d2 = d1, d2, d0
		eps = eps2
		if math.Abs(phi) <= end || next == 0 {
			return steps, true
		}
		beta = next
		v0, v, t = v, t, v0
		scale(v, 1/next)
	}
	return steps, true
}

func dot(a, b []float64) float64 { return harmonic.Dot(a, b) }

func scale(a []float64, f float64) {
	for i := range a {
		a[i] *= f
	}
}
