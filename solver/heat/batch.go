package heat

import "math"

// batch iterates on many right-hand sides together by minimal residuals, so that every entry of the matrix is fetched once for all.
type batch struct {
	g       *region
	x, r    []float64 // solutions and true residuals
	f, t    []float64
	v0, v   []float64
	d0, d1  []float64
	d2, tmp []float64
	one     []float64
}

func newBatch(g *region) *batch {
	n := many * g.sys.Len()
	all := make([]float64, 10*n+g.sys.Len())
	cut := func(n int) []float64 { s := all[:n:n]; all = all[n:]; return s }
	b := &batch{g: g, x: cut(n), r: cut(n), f: cut(n), t: cut(n), v0: cut(n), v: cut(n), d0: cut(n), d1: cut(n), d2: cut(n), tmp: cut(n)}
	b.one = cut(g.sys.Len())
	return b
}

// product sets y = A x for all vectors.
func (b *batch) product(y, x []float64) {
	g := b.g
	in := x
	if g.lifts() {
		copy(b.tmp, x)
		b.each(b.tmp, g.lift)
		in = b.tmp
	}
	g.sys.ApplyMany(y, in)
	if g.lifts() {
		b.each(y, g.drop)
	}
	for i, s := range g.sign {
		yi, xi := (*[many]float64)(y[many*i:]), (*[many]float64)(x[many*i:])
		for v := range many {
			yi[v] += s * xi[v]
		}
	}
}

// column is vector v of x.
func (b *batch) column(x []float64, v int) []float64 {
	c := make([]float64, len(b.one))
	for i := range c {
		c[i] = x[many*i+v]
	}
	return c
}

// each applies f to every vector.
func (b *batch) each(x []float64, f func([]float64)) {
	for v := range many {
		for i := range b.one {
			b.one[i] = x[many*i+v]
		}
		f(b.one)
		for i, e := range b.one {
			x[many*i+v] = e
		}
	}
}

// lanes are one number per vector.
type lanes [many]float64

// inner returns the inner products of the vectors.
func inner(a, b []float64) (s lanes) {
	for i := 0; i < len(a); i += many {
		x, y := (*lanes)(a[i:]), (*lanes)(b[i:])
		for v := range many {
			s[v] += x[v] * y[v]
		}
	}
	return s
}

// solve iterates from nought until every residual is below tol times its right-hand side (Paige and Saunders 1975, see minres).
func (b *batch) solve(f [][]float64, tol float64, stop func() bool) bool {
	for i := range b.one {
		for v := range many {
			b.f[many*i+v] = 0
			if v < len(f) {
				b.f[many*i+v] = f[v][i]
			}
		}
	}
	clear(b.x)
	clear(b.v0)
	clear(b.d0)
	clear(b.d1)
	beta := inner(b.f, b.f)
	var end, phi lanes
	for v := range many {
		phi[v] = math.Sqrt(beta[v])
		end[v] = tol * phi[v]
	}
	copy(b.v, b.f)
	normalise(b.v, phi)
	s := sweep{phi: phi}
	for v := range many {
		s.cs[v] = -1
	}
	for range maxSteps {
		if stop() {
			return false
		}
		b.product(b.t, b.v)
		if s.step(b); s.done(end) {
			break
		}
	}
	b.product(b.r, b.x)
	for i, v := range b.f {
		b.r[i] = v - b.r[i]
	}
	return true
}

// normalise divides each vector by its length; a vector of nought stays.
func normalise(x []float64, l lanes) {
	for v := range many {
		if l[v] > 0 {
			l[v] = 1 / l[v]
		}
	}
	for i := 0; i < len(x); i += many {
		e := (*lanes)(x[i:])
		for v := range many {
			e[v] *= l[v]
		}
	}
}

// sweep is the state of the recurrences.
type sweep struct{ beta, delta, eps, cs, sn, phi lanes }

func (s *sweep) done(end lanes) bool {
	for v := range many {
		if math.Abs(s.phi[v]) > end[v] {
			return false
		}
	}
	return true
}

// step takes t = A v into the bases and improves x.
func (s *sweep) step(b *batch) {
	alpha := inner(b.v, b.t)
	for i := 0; i < len(b.t); i += many {
		t, v, v0 := (*lanes)(b.t[i:]), (*lanes)(b.v[i:]), (*lanes)(b.v0[i:])
		for k := range many {
			t[k] -= alpha[k]*v[k] + s.beta[k]*v0[k]
		}
	}
	next := inner(b.t, b.t)
	var e1, e2, inv, tau lanes // coefficients of the new direction
	for k := range many {
		n := math.Sqrt(next[k])
		next[k] = n
		d := s.cs[k]*s.delta[k] + s.sn[k]*alpha[k]
		g := s.sn[k]*s.delta[k] - s.cs[k]*alpha[k]
		e2[k], e1[k] = s.eps[k], d
		s.eps[k] = s.sn[k] * n
		s.delta[k] = -s.cs[k] * n
		if rho := math.Hypot(g, n); rho > 0 {
			inv[k] = 1 / rho
			s.cs[k], s.sn[k] = g/rho, n/rho
		}
		tau[k] = s.cs[k] * s.phi[k]
		s.phi[k] *= s.sn[k]
	}
	for i := 0; i < len(b.t); i += many {
		v, d0, d1, d2, x := (*lanes)(b.v[i:]), (*lanes)(b.d0[i:]), (*lanes)(b.d1[i:]), (*lanes)(b.d2[i:]), (*lanes)(b.x[i:])
		for k := range many {
			m := (v[k] - e2[k]*d0[k] - e1[k]*d1[k]) * inv[k]
			d2[k] = m
			x[k] += tau[k] * m
		}
	}
	b.d0, b.d1, b.d2 = b.d1, b.d2, b.d0
	b.v0, b.v, b.t = b.v, b.t, b.v0
	normalise(b.v, next)
	s.beta = next
}
