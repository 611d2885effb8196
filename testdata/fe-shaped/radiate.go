package main

import (
	"fmt"
	"math"
	"math/cmplx"
)

func cross(a, b complex128) float64 { return real(a)*imag(b) - imag(a)*real(b) }

// blocked tells whether the straight way from z to w goes through a convex polygon.
func blocked(poly []complex128, z, w complex128) bool {
	d := w - z
	lo, hi := 0.0, 1.0
	for i := range poly {
		a, e := poly[i], poly[(i+1)%len(poly)]-poly[i]
		f, g := cross(e, z-a), cross(e, d) // inside: f + u g > 0
		switch {
		case g > 0:
			lo = math.Max(lo, -f/g)
		case g < 0:
			hi = math.Min(hi, -f/g)
		case f <= 0:
			return false
		}
		if hi-lo < 1e-9 {
			return false
		}
	}
	return hi-lo > 1e-9
}

// areas are A F between all patches, by crossed strings; pairs that something partly hides are divided.
func areas(s *section, p []patch) [][]float64 {
	n := len(p)
	polys := map[int][]complex128{}
	for _, q := range p {
		if !s.bodies[q.body].wall {
			polys[q.body] = append(polys[q.body], q.a)
		}
	}
	g := make([][]float64, n) // A F
	for i := range g {
		g[i] = make([]float64, n)
	}
	strings := func(a, b, c, d complex128) float64 { // a→b and c→d, both looking to the same side of their run
		return math.Max(0, (cmplx.Abs(c-a)+cmplx.Abs(d-b)-cmplx.Abs(d-a)-cmplx.Abs(c-b))/2)
	}
	free := func(i, j int, z, w complex128) bool {
		for b, poly := range polys {
			if s.bodies[b].rad == s.bodies[p[i].body].rad && b != p[i].body && b != p[j].body && blocked(poly, z, w) {
				return false
			}
		}
		return true
	}
	faces := func(i int, a, b, z complex128) bool { // z is before the patch
		c := cross(b-a, z-a)
		if s.bodies[p[i].body].wall {
			return c > 1e-16
		}
		return c < -1e-16
	}
	for i := range p {
		for j := range i {
			bi, bj := p[i].body, p[j].body
			if s.bodies[bi].rad != s.bodies[bj].rad || bi == bj && !s.bodies[bi].wall {
				continue
			}
			k := 1
			clear, all := 0, 0
			ui := [3]complex128{p[i].a, (p[i].a + p[i].b) / 2, p[i].b}
			uj := [3]complex128{p[j].a, (p[j].a + p[j].b) / 2, p[j].b}
			for _, z := range ui {
				for _, w := range uj {
					all++
					if free(i, j, z, w) && (bi == bj || faces(i, p[i].a, p[i].b, w) && faces(j, p[j].a, p[j].b, z)) {
						clear++
					}
				}
			}
			if clear == 0 {
				continue
			}
			if clear < all {
				k = 24
			}
			sum := 0.0
			for x := range k {
				a := p[i].a + complex(float64(x)/float64(k), 0)*(p[i].b-p[i].a)
				b := p[i].a + complex(float64(x+1)/float64(k), 0)*(p[i].b-p[i].a)
				for y := range k {
					c := p[j].a + complex(float64(y)/float64(k), 0)*(p[j].b-p[j].a)
					d := p[j].a + complex(float64(y+1)/float64(k), 0)*(p[j].b-p[j].a)
					if k > 1 && !(free(i, j, (a+b)/2, (c+d)/2) && (bi == bj || faces(i, a, b, (c+d)/2) && faces(j, c, d, (a+b)/2))) {
						continue
					}
					if s.bodies[bi].wall == s.bodies[bj].wall {
						sum += strings(a, b, c, d)
					} else {
						sum += strings(a, b, d, c)
					}
				}
			}
			g[i][j], g[j][i] = sum, sum
		}
	}
	return g
}

// complete makes the rows add up to the areas, by scaling rows and columns alike.
func complete(p []patch, g [][]float64) {
	n := len(p)
	worst := 0.0
	for i := range g {
		sum := 0.0
		for _, v := range g[i] {
			sum += v
		}
		worst = math.Max(worst, math.Abs(sum/p[i].area-1))
	}
	d := make([]float64, n)
	for i := range d {
		d[i] = 1
	}
	for range 400 {
		for i := range g {
			sum := 0.0
			for j, v := range g[i] {
				sum += v * d[j]
			}
			if sum > 0 {
				d[i] = math.Sqrt(d[i] * p[i].area / sum)
			}
		}
	}
	for i := range g {
		for j := range g[i] {
			g[i][j] *= d[i] * d[j]
		}
	}
	fmt.Printf("%d patches, rows off by %.2g at most before scaling\n", n, worst)
}

// emitted is the matrix of net emissions for black emissive powers.
func emitted(s *section, p []patch, g [][]float64) [][]float64 {
	n := len(p)
	eps := make([]float64, n)
	for i := range eps {
		eps[i] = s.bodies[p[i].body].eps
	}
	// e = M y, y = σT⁴: J = (1−(1−ε)F)⁻¹ ε y, e = A J − G J
	m := make([][]float64, n)
	x := make([][]float64, n)
	for i := range m {
		m[i], x[i] = make([]float64, n), make([]float64, n)
		for j := range m[i] {
			m[i][j] = -(1 - eps[i]) * g[i][j] / p[i].area
		}
		m[i][i]++
		x[i][i] = eps[i]
	}
	gauss(m, x)
	em := make([][]float64, n)
	for i := range em {
		em[i] = make([]float64, n)
		for j := range x[i] {
			em[i][j] += p[i].area * x[i][j]
		}
		for k, v := range g[i] {
			if v != 0 {
				for j := range em[i] {
					em[i][j] -= v * x[k][j]
				}
			}
		}
	}
	return em
}

// radiate finds the emissions, W/m, by Newton's method.
func radiate(s *section, p []patch, r [][]float64, t0 []float64) []float64 {
	n := len(p)
	g := areas(s, p)
	complete(p, g)
	em := emitted(s, p, g)
	e := make([]float64, n)
	const sigma, zero = 5.670374419e-8, 273.15
	for round := range 30 {
		t := append([]float64(nil), t0[:n]...)
		for i, v := range e {
			for j := range t {
				t[j] -= r[i][j] * v
			}
		}
		// f = e − M σ T⁴; df = I + M 4σT³ R
		f := make([][]float64, n)
		jac := make([][]float64, n)
		size := 0.0
		for i := range f {
			f[i] = []float64{-e[i]}
			jac[i] = make([]float64, n)
			for j, v := range em[i] {
				a := math.Max(t[j]+zero, 1)
				f[i][0] += v * sigma * a * a * a * a
				w := v * 4 * sigma * a * a * a
				for k := range jac[i] {
					jac[i][k] += w * r[k][j]
				}
			}
			jac[i][i]++
			size += f[i][0] * f[i][0]
		}
		if math.Sqrt(size) < 1e-10 {
			break
		}
		if round == 29 {
			panic("no end")
		}
		gauss(jac, f)
		for i := range e {
			e[i] += f[i][0]
		}
	}
	sum := 0.0
	for _, v := range e {
		sum += v
	}
	fmt.Printf("emissions add up to %.2g W/m\n", sum)
	return e
}

// gauss solves a x = b in place.
func gauss(a, b [][]float64) {
	n := len(a)
	for c := range n {
		best := c
		for i := c + 1; i < n; i++ {
			if math.Abs(a[i][c]) > math.Abs(a[best][c]) {
				best = i
			}
		}
		a[c], a[best], b[c], b[best] = a[best], a[c], b[best], b[c]
		for i := range n {
			if i == c || a[i][c] == 0 {
				continue
			}
			f := a[i][c] / a[c][c]
			for j := c; j < n; j++ {
				a[i][j] -= f * a[c][j]
			}
			for j := range b[i] {
				b[i][j] -= f * b[c][j]
			}
		}
		f := 1 / a[c][c]
		for j := c; j < n; j++ {
			a[c][j] *= f
		}
		for j := range b[c] {
			b[c][j] *= f
		}
	}
}
