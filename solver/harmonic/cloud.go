package harmonic

import "math"

// Cloud is a finished outgoing state of discs in one medium: enough to evaluate the medium's temperature anywhere. Slices
// are shared, not copied.
type Cloud struct {
	C      []complex128
	A      []float64
	D      [][]complex128 // d_m of each disc, K
	Q      []float64      // q_j/(2πk), K
	Circle *Circle        // nil: no round wall
	B      []complex128   // regular field about the origin besides the images: Re Σ B[n-1] (z/R)^n
	Level  float64        // constant, K
}

// Remainder sets B from Sigma: B_n = Sigma_n conj(A_n).
func (c *Cloud) Remainder() {
	if c.Circle == nil || len(c.Circle.Sigma) == 0 {
		return
	}
	c.B = c.Outgoing(len(c.Circle.Sigma))
	for n, f := range c.Circle.Sigma {
		c.B[n] = scale(f, conj(c.B[n]))
	}
}

// faint ends series of amplitudes, K.
const faint = 1e-10

// Outgoing returns the coefficients A_n, n = 1 … top, of the discs' field beyond them: Re Σ A_n (R/z)^n.
func (c *Cloud) Outgoing(top int) []complex128 {
	a := make([]complex128, top)
	r := c.Circle.R
	for j, d := range c.D {
		z := scale(1/r, c.C[j])
		l := size(z)
		p := complex(c.Q[j], 0)
		for n := range a {
			p *= z
			a[n] += scale(1/float64(n+1), p)
		}
		t := c.A[j] / r
		f := 1.0
		for m := 1; m <= min(len(d), top); m++ {
			f *= t
			p := scale(f, d[m-1])
			for n := m; n <= top; n++ {
				a[n-1] += p
				g := float64(n) / float64(n-m+1)
				if p = scale(g, p) * z; g*l < 1 && small(p, faint) {
					break
				}
			}
		}
	}
	return a
}

// At returns the temperature at z, which lies in the medium.
func (c *Cloud) At(z complex128) float64 {
	t := c.Level
	for j := range c.D {
		t += c.disc(j, z) + c.image(j, z)
	}
	return t + c.regular(z)
}

// disc is the field of one disc's own sources.
func (c *Cloud) disc(j int, z complex128) float64 {
	v := z - c.C[j]
	t := 0.0
	if q := c.Q[j]; q != 0 {
		t = -q * c.log(size(v))
	}
	return t + Sum(c.D[j], over(c.A[j], v))
}

// log is the logarithm of a distance, relative to the circle if there is one.
func (c *Cloud) log(r float64) float64 {
	if c.Circle != nil {
		r /= c.Circle.R
	}
	return math.Log(r)
}

// image is the field of one disc's image in the circle.
func (c *Cloud) image(j int, z complex128) float64 {
	if c.Circle == nil || c.Circle.RhoInf == 0 {
		return 0
	}
	r2 := c.Circle.R * c.Circle.R
	den := complex(r2, 0) - conj(c.C[j])*z
	t := 0.0
	if q := c.Q[j]; q != 0 {
		t = -q * math.Log(size(den)/r2)
	}
	u := scale(c.A[j], z) * over(1, den)
	s := 0.0
	p := complex(1, 0)
	for _, d := range c.D[j] { // Re Σ conj(d_m) u^m
		p *= u
		s += real(d)*real(p) + imag(d)*imag(p)
	}
	return c.Circle.RhoInf * (t + s)
}

// regular is the field of B.
func (c *Cloud) regular(z complex128) float64 {
	if len(c.B) == 0 {
		return 0
	}
	w := scale(1/c.Circle.R, z)
	top := len(c.B)
	if r := size(w); r < 1 {
		top = min(top, 1+int(-20/math.Log(r+1e-300))) // e⁻²⁰ is nothing beside the first terms
	}
	return Sum(c.B[:top], w)
}

// Sum returns Re Σ x[n-1] z^n, n = 1 … len(x).
func Sum(x []complex128, z complex128) float64 {
	zr, zi := real(z), imag(z)
	n := len(x)
	if n < 4 {
		var re, im float64
		for n--; n >= 0; n-- {
			re, im = re+real(x[n]), im+imag(x[n])
			re, im = re*zr-im*zi, re*zi+im*zr
		}
		return re
	}
	// Two chains in powers of z², so that one does not wait for the other.
	wr, wi := zr*zr-zi*zi, 2*zr*zi
	var ar, ai, br, bi float64
	if n&1 == 1 {
		n--
		ar, ai = real(x[n]), imag(x[n])
	}
	for n -= 2; n >= 0; n -= 2 {
		p, q := x[n], x[n+1]
		ar, ai = ar*wr-ai*wi+real(p), ar*wi+ai*wr+imag(p)
		br, bi = br*wr-bi*wi+real(q), br*wi+bi*wr+imag(q)
	}
	// a z + b z²
	ar, ai = ar+br*zr-bi*zi, ai+br*zi+bi*zr
	return ar*zr - ai*zi
}

// About adds to b[n], n = 0 … len(b)-1, the coefficients of the field about a disc of radius a at at: Re Σ b_n ((z−at)/a)^n. The
// sources of disc skip are left out, its image is not; with no such disc the field of all is expanded.
func (c *Cloud) About(at complex128, a float64, skip int, b []complex128) {
	b[0] += complex(c.Level, 0)
	top := len(b) - 1
	g := make([]complex128, top) // √n b_n of the direct parts
	for j := range c.D {
		if j != skip {
			c.direct(j, at, a, b, g)
		}
		if c.Circle != nil && c.Circle.RhoInf != 0 {
			c.mirrored(j, at, a, b)
		}
	}
	for n, v := range g {
		b[n+1] += scale(1/roots[n], v)
	}
	if len(c.B) > 0 {
		c.shifted(at, a, b)
	}
}

// direct adds disc j's own sources: b_0 to b, √n b_n to g.
func (c *Cloud) direct(j int, at complex128, a float64, b, g []complex128) {
	v := apart(Disc{C: at, A: a}, Disc{C: c.C[j], A: c.A[j]})
	step := over(1, v)
	x := scale(-a, step)
	if q := c.Q[j]; q != 0 {
		b[0] -= complex(q*c.log(size(v)), 0)
		p := complex(q, 0)
		for n := range g {
			p *= x
			g[n] += scale(1/roots[n], p)
		}
	}
	y := scale(c.A[j], step)
	var w [MaxOrder]complex128
	p := complex(1, 0)
	big := 0.0
	top := 0
	for m, d := range c.D[j] {
		p *= y
		w[m] = scale(roots[m], d*p)
		b[0] += d * p
		if s := size(w[m]); s > 1e-12*big {
			big, top = math.Max(big, s), m+1
		}
	}
	p = complex(1, 0)
	for n := range g {
		p *= x
		var re, im float64
		t := table()[n]
		for m, v := range w[:top] {
			re += t[m] * real(v)
			im += t[m] * imag(v)
		}
		g[n] += p * complex(re, im)
	}
}

// mirrored adds the image of disc j.
func (c *Cloud) mirrored(j int, at complex128, a float64, b []complex128) {
	r2 := c.Circle.R * c.Circle.R
	f := c.Circle.RhoInf
	cj := conj(c.C[j])
	gamma := complex(r2, 0) - cj*at
	inv := over(1, gamma)
	if q := c.Q[j]; q != 0 {
		b[0] -= complex(f*q*math.Log(size(gamma)/r2), 0)
		eta := scale(a, cj) * inv
		p := complex(f*q, 0)
		for n := 1; n < len(b); n++ {
			p *= eta
			b[n] += scale(1/float64(n), p)
		}
	}
	al := scale(c.A[j], at) * inv
	be := scale(a*c.A[j], inv)
	de := scale(-a, cj) * inv
	var small [2][16]complex128
	p, q := small[0][:], small[1][:]
	if len(b) > len(p) {
		p, q = make([]complex128, len(b)), make([]complex128, len(b))
	}
	p[0] = 1
	for _, d := range c.D[j] {
		q[0] = al * p[0]
		w := scale(f, conj(d))
		b[0] += w * q[0]
		for n := 1; n < len(b); n++ {
			q[n] = al*p[n] + be*p[n-1] - de*q[n-1]
			b[n] += w * q[n]
		}
		p, q = q, p
	}
}

// shifted adds the regular field B.
func (c *Cloud) shifted(at complex128, a float64, b []complex128) {
	z := scale(1/c.Circle.R, at)
	t := a / c.Circle.R
	top := len(c.B)
	if r := size(z) + t; r < 1 { // what has died out this far inside
		top = min(top, int(-600/math.Log(r))) // so that the power is no nought
		for p := math.Pow(r, float64(top)); top > 0 && size(c.B[top-1])*p <= 1e-7; top-- {
			p /= r
		}
	}
	// Repeated synthetic division by (z − at): the Taylor coefficients of the polynomial, one order a sweep.
	var few [64]complex128
	w := few[:]
	if top+1 > len(w) {
		w = make([]complex128, top+1)
	}
	w = w[:top+1]
	copy(w[1:], c.B[:top])
	p := 1.0
	for n := 0; n < len(b) && n < len(w); n++ {
		for m := len(w) - 2; m >= n; m-- {
			w[m] += z * w[m+1]
		}
		b[n] += scale(p, w[n])
		p *= t
	}
}
