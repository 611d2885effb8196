package outline

import "math"

// harmonics returns (1/n) ∫ P_k e^{inθ} dt of an arc for n = 1 … m, mode by mode: spherical Bessel functions of n·turn (Abramowitz and Stegun
// 10.1.14).
func (b *bow) harmonics(m int) []complex128 {
	out := make([]complex128, m*b.p)
	var j [maxModes]float64
	step := polar(1, b.theta)
	e := complex(1, 0)
	for n := 1; n <= m; n++ {
		e *= step
		sphericalBessel(float64(n)*b.turn, j[:b.p])
		v := scale(2/float64(n), e)
		for k := range b.p {
			out[(n-1)*b.p+k] = scale(j[k], v)
			v *= 1i
		}
	}
	return out
}

// ownHarmonics writes what the modes of an arc send to its own part: on the rim b_n = (a/2πn) ∫ σ e^{−inθ} dθ. out has p.p rows of 1+2m, as
// of expand.
func (b *bow) ownHarmonics(m int, out []float64) {
	cols := 1 + 2*m
	clear(out)
	out[0] = 2 * b.unit() * math.Log(b.a)
	h := b.far
	if m > farTerms {
		h = b.harmonics(m)
	}
	unit := -b.unit()
	for n := range m {
		for k := range b.p {
			v := h[n*b.p+k]
			out[k*cols+2*n+1], out[k*cols+2*n+2] = unit*real(v), -unit*imag(v)
		}
	}
}

// expandArc is expand for an arc of another part.
func (b *bow) expandArc(c complex128, a float64, m int, out []float64) {
	cols := 1 + 2*m
	clear(out)
	unit := b.unit()
	var s sight
	b.look(c, &s, 0, false)
	for k := range b.p {
		out[k*cols] = unit * real(s.value(k))
	}
	out[0] += unit * b.log()
	powers := make([]float64, 2*m)
	g := &rules[points(b.frame(c), b.p, m)]
	for i, t := range g.x {
		x := scale(a, inverse(b.at(t)-c))
		v := complex(-unit, 0)
		for n := range m {
			v *= x
			powers[2*n], powers[2*n+1] = real(v)/float64(n+1), imag(v)/float64(n+1)
		}
		for k := range b.p {
			addScaled(out[k*cols+1:][:2*m], g.p[i][k], powers)
		}
	}
}

// expandString is expand for a string, of very many harmonics too: beyond those that a Gauss rule follows, integration by parts leads from x^(n−1) to
// x^n, x = a/(y−c), with P_k' = Σ (2j+1) P_j, j = k−1, k−3 ….
func (b *bow) expandString(c complex128, a float64, m int, out []float64) {
	gauss := max(4, int(10*a/b.half))
	if m <= gauss {
		b.expand(c, a, m, out)
		return
	}
	few := make([]float64, b.p*(1+2*gauss))
	b.expand(c, a, gauss, few)
	unit := -b.unit()
	var prev, next [maxModes]complex128 // ∫ P_k x^n dt
	for k := range b.p {
		row := few[k*(1+2*gauss):][:1+2*gauss]
		copy(out[k*(1+2*m):], row)
		prev[k] = scale(float64(gauss)/unit, complex(row[2*gauss-1], row[2*gauss]))
	}
	x0, x1 := scale(a, inverse(b.at(-1)-c)), scale(a, inverse(b.at(1)-c))
	u0, u1 := power(x0, gauss), power(x1, gauss)
	step := scale(a/b.half, conj(b.dir))
	for n := gauss + 1; n <= m; n++ {
		f := scale(-1/float64(n-1), step)
		for k := range b.p {
			ends := u1 - u0
			if k%2 == 1 {
				ends = u1 + u0
			}
			for j := k - 1; j >= 0; j -= 2 {
				ends -= scale(float64(2*j+1), prev[j])
			}
			next[k] = f * ends
			row := out[k*(1+2*m):]
			row[2*n-1], row[2*n] = unit/float64(n)*real(next[k]), unit/float64(n)*imag(next[k])
		}
		prev = next
		u0, u1 = u0*x0, u1*x1
	}
}

// power is x^n.
func power(x complex128, n int) complex128 {
	p := complex(1, 0)
	for ; n > 0; n >>= 1 {
		if n&1 == 1 {
			p *= x
		}
		x *= x
	}
	return p
}

// sphericalBessel fills j with j_0(x) … j_{len−1}(x), x > 0: upwards where that is stable, else downwards (Miller's algorithm).
func sphericalBessel(x float64, j []float64) {
	s, c := math.Sincos(x)
	j0 := 1 - x*x/6*(1-x*x/20)
	if x > 0.05 {
		j0 = s / x
	}
	if x > float64(len(j)) {
		j[0] = j0
		if len(j) > 1 {
			j[1] = s/(x*x) - c/x
		}
		for k := 2; k < len(j); k++ {
			j[k] = float64(2*k-1)/x*j[k-1] - j[k-2]
		}
		return
	}
	a, b := 0.0, 1e-200
	for k := len(j) + 12; k > 0; k-- {
		a, b = b, float64(2*k+1)/x*b-a
		if k <= len(j) {
			j[k-1] = b
		}
	}
	// Scale by the larger of j_0 and j_1: either alone may vanish.
	f := j0 / j[0]
	if len(j) > 1 && math.Abs(j[1]) > math.Abs(j[0]) {
		f = (s/(x*x) - c/x) / j[1]
	}
	for k := range j {
		j[k] *= f
	}
}
