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
	if nought(x, f) {
		return 0, true
	}
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

// nought answers a right side of nothing, for which a tolerance in shares of it has no meaning.
func nought(x, f []float64) bool {
	if dot(f, f) != 0 {
		return false
	}
	clear(x)
	return true
}

// minres solves A x = f for a symmetric A of either sign by minimal residuals (Paige and Saunders 1975).
func minres(a operator, x, f []float64, tol float64, stop func() bool) (steps int, ok bool) {
	if nought(x, f) {
		return 0, true
	}
	l := lanczos{x: x}
	for _, v := range []*[]float64{&l.v0, &l.v, &l.t, &l.d0, &l.d1, &l.d2} {
		*v = make([]float64, len(f))
	}
	a(l.t, x)
	for i := range l.v {
		l.v[i] = f[i] - l.t[i]
	}
	l.phi, l.cs = math.Sqrt(dot(l.v, l.v)), -1
	end := tol * math.Sqrt(dot(f, f))
	if l.phi <= end {
		return 0, true
	}
	scale(l.v, 1/l.phi)
	for steps = 1; steps <= maxSteps; steps++ {
		if stop() {
			return steps, false
		}
		a(l.t, l.v)
		if l.step() || math.Abs(l.phi) <= end {
			break
		}
	}
	return min(steps, maxSteps), true
}

// lanczos is the state of minres: three bases, three directions, the last rotation.
type lanczos struct {
	x, v0, v, t, d0, d1, d2       []float64
	beta, delta, eps, cs, sn, phi float64
}

// step takes in t = A v and improves x; true if nothing is left.
func (l *lanczos) step() bool {
	alpha := dot(l.v, l.t)
	for i := range l.t {
		l.t[i] -= alpha*l.v[i] + l.beta*l.v0[i]
	}
	next := math.Sqrt(dot(l.t, l.t))
	d, g, eps := l.cs*l.delta+l.sn*alpha, l.sn*l.delta-l.cs*alpha, l.eps
	l.eps, l.delta = l.sn*next, -l.cs*next
	rho := math.Hypot(g, next)
	if rho == 0 {
		return true
	}
	l.cs, l.sn = g/rho, next/rho
	tau := l.cs * l.phi
	l.phi *= l.sn
	for i := range l.x {
		m := (l.v[i] - eps*l.d0[i] - d*l.d1[i]) / rho
		l.d2[i] = m
		l.x[i] += tau * m
	}
	l.d0, l.d1, l.d2 = l.d1, l.d2, l.d0
	if next == 0 {
		return true
	}
	l.beta = next
	l.v0, l.v, l.t = l.v, l.t, l.v0
	scale(l.v, 1/next)
	return false
}

func dot(a, b []float64) float64 { return harmonic.Dot(a, b) }

func scale(a []float64, f float64) {
	for i := range a {
		a[i] *= f
	}
}
