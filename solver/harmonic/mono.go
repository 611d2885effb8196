package harmonic

import "math"

// sourceCut ends the running powers of far monopoles.
const sourceCut = 1e-8

// Mono adds to y what monopoles of strength q_j/(2πk) in the discs bring to every disc, scaled like the system's unknowns; they
// are given as q, one a disc.
func (s *System) Mono(y, q []float64) {
	for i := range s.discs {
		s.monoAt(i, q, y[s.off[i]:s.off[i+1]])
	}
	if s.circle.mute() {
		return
	}
	s.Spread(y, s.monoBack(q))
}

// monoBack returns what Sigma and Mix send back of monopoles q.
func (s *System) monoBack(q []float64) []complex128 {
	m := s.circle.Mix
	alpha := make([]complex128, max(len(s.circle.Sigma), m.Harmonics()))
	for j, f := range q {
		s.chargeOut(j, f, alpha)
	}
	for n := range alpha {
		f := 0.0
		if n < len(s.circle.Sigma) {
			f = s.circle.Sigma[n]
		}
		alpha[n] = scale(f, alpha[n])
	}
	if m == nil {
		return alpha
	}
	for r, u := range s.leans(q) {
		for n := range m.Harmonics() {
			alpha[n] += complex(u*m.W[r][2*n], u*m.W[r][2*n+1])
		}
	}
	return alpha
}

// leans is what monopoles q make the mix feel, times its sign.
func (s *System) leans(q []float64) []float64 {
	m := s.circle.Mix
	u := make([]float64, len(m.W0))
	for j, f := range q {
		if f == 0 {
			continue
		}
		for r, v := range s.lean[j] {
			u[r] += m.Sign * f * v
		}
	}
	return u
}

// monoAt adds the direct and image parts at disc i.
func (s *System) monoAt(i int, q, y []float64) {
	d := s.discs[i]
	for j, f := range q {
		if f == 0 {
			continue
		}
		if j != i {
			series(y, d.S, f, conj(over(-d.A, apart(d, s.discs[j]))))
		}
		if s.circle != nil && s.circle.RhoInf != 0 {
			series(y, d.S, f*s.circle.RhoInf, conj(s.eta(i, j)))
		}
	}
}

// eta is the ratio of the Taylor series of the image of j's monopole about disc i.
func (s *System) eta(i, j int) complex128 {
	cj := conj(s.discs[j].C)
	gamma := complex(s.circle.R*s.circle.R, 0) - cj*s.discs[i].C
	return scale(s.discs[i].A, cj) * over(1, gamma)
}

func conj(z complex128) complex128 { return complex(real(z), -imag(z)) }

// series adds f S_n z^n/√n.
func series(y, s []float64, f float64, z complex128) {
	p := complex(f, 0)
	r := size(z)
	a := math.Abs(f)
	for n, g := range s {
		p *= z
		if a *= r; a < sourceCut {
			return
		}
		g /= roots[n]
		y[2*n] += g * real(p)
		y[2*n+1] += g * imag(p)
	}
}

// chargeOut adds the circle's outgoing amplitudes of a monopole in disc j: f (c/R)^n/√n.
func (s *System) chargeOut(j int, f float64, alpha []complex128) {
	if f == 0 {
		return
	}
	z := scale(1/s.circle.R, s.discs[j].C)
	p := complex(f, 0)
	for n := range alpha {
		p *= z
		alpha[n] += scale(1/math.Sqrt(float64(n+1)), p)
	}
}

// ChargeOut sets alpha to the circle's outgoing scaled amplitudes of monopoles q in the discs, in units of 1/(2πk).
func (s *System) ChargeOut(alpha []complex128, q []float64) {
	for n := range alpha {
		alpha[n] = 0
	}
	for j, f := range q {
		s.chargeOut(j, f, alpha)
	}
}

// MonoDot returns, for each disc, the inner product of its unit monopole's share (as of Mono) with x: the mean temperature that outgoing
// amplitudes x bring to it.
func (s *System) MonoDot(out, x []float64) {
	for j := range out {
		out[j] = 0
	}
	for i, d := range s.discs {
		xi := x[s.off[i]:s.off[i+1]]
		for j := range s.discs {
			if j != i {
				out[j] += against(xi, d.S, conj(over(-d.A, apart(d, s.discs[j]))))
			}
			if s.circle != nil && s.circle.RhoInf != 0 {
				out[j] += s.circle.RhoInf * against(xi, d.S, conj(s.eta(i, j)))
			}
		}
	}
	if s.circle.mute() {
		return
	}
	s.gather(s.alpha[:2*len(s.weight)], x, 1)
	if m := s.circle.Mix; m != nil {
		u := s.feel[:len(m.W0)]
		m.hear(u, s.alpha, 1)
		for j := range out {
			out[j] += Dot(u, s.lean[j])
		}
	}
	for j := range out {
		z := scale(1/s.circle.R, s.discs[j].C)
		p := complex(1, 0)
		for n, g := range s.circle.Sigma {
			p *= z
			out[j] += g / math.Sqrt(float64(n+1)) * (real(p)*s.alpha[2*n] + imag(p)*s.alpha[2*n+1])
		}
	}
}

// against is series' inner product with x.
func against(x, s []float64, z complex128) float64 {
	p := complex(1, 0)
	r, a, sum := size(z), 1.0, 0.0
	for n, g := range s {
		p *= z
		if a *= r; a < sourceCut {
			break
		}
		sum += g / roots[n] * (real(p)*x[2*n] + imag(p)*x[2*n+1])
	}
	return sum
}

// Log returns the mean temperature that a unit monopole in disc j brings to the rim of disc i (or, i = j, its own rim), in units of
// 1/(2πk), wall included but for the wall's own series resistance.
func (s *System) Log(i, j int) float64 {
	g := s.logs[max(i, j)*(max(i, j)+1)/2+min(i, j)]
	if s.circle == nil {
		return g
	}
	z := scale(1/(s.circle.R*s.circle.R), s.discs[i].C) * conj(s.discs[j].C)
	p := complex(1, 0)
	for n, f := range s.circle.Sigma {
		p *= z
		g += f / float64(n+1) * real(p)
	}
	if m := s.circle.Mix; m != nil {
		g += m.Sign * Dot(s.lean[i], s.lean[j])
	}
	return g
}

// near is Log but for what Sigma reflects; symmetric.
func (s *System) near(i, j int) float64 {
	r := s.discs[i].A
	if i != j {
		r = size(apart(s.discs[i], s.discs[j]))
	}
	if s.circle == nil {
		return -math.Log(r)
	}
	r2 := s.circle.R * s.circle.R
	g := -math.Log(r / s.circle.R)
	if s.circle.RhoInf != 0 {
		g -= s.circle.RhoInf * math.Log(size(complex(r2, 0)-conj(s.discs[j].C)*s.discs[i].C)/r2)
	}
	return g
}

// Logs sets out_i = Σ_j Log(i, j) q_j.
func (s *System) Logs(out, q []float64) {
	s.nearLogs(out, q)
	if s.circle.mute() {
		return
	}
	if s.circle.Mix != nil {
		u := s.leans(q)
		for i := range out {
			out[i] += Dot(u, s.lean[i])
		}
	}
	alpha := make([]complex128, len(s.circle.Sigma))
	for j, f := range q {
		s.chargeOut(j, f, alpha)
	}
	for n, f := range s.circle.Sigma {
		alpha[n] = scale(f, alpha[n])
	}
	for i := range out {
		z := scale(1/s.circle.R, s.discs[i].C)
		p := complex(1, 0)
		for n, a := range alpha {
			p *= z
			out[i] += (real(p)*real(a) + imag(p)*imag(a)) / math.Sqrt(float64(n+1))
		}
	}
}
