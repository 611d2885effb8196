package harmonic

// Mix is what a circle sends back in all harmonics for any that arrives, where what lies outside differs from place to place. To outgoing scaled
// amplitudes α (√n A_n, Re and Im in turn) and monopoles of sum q it answers, besides what Sigma does, with
//
//	u = W α + W0 q,    regular scaled amplitudes Sign Wᵀu,    a constant temperature Sign W0·u.
//
// It is not changed once made.
type Mix struct {
	Sign float64
	W    [][]float64 // rows of twice as many numbers as harmonics
	W0   []float64
}

// Harmonics returns how many it answers to.
func (m *Mix) Harmonics() int {
	if m == nil || len(m.W) == 0 {
		return 0
	}
	return len(m.W[0]) / 2
}

// Weight returns how much harmonic n counts: the length of its columns.
func (m *Mix) Weight(n int) float64 {
	sum := 0.0
	for _, w := range m.W {
		sum += w[2*n-2]*w[2*n-2] + w[2*n-1]*w[2*n-1]
	}
	return sum
}

// Cut returns the first harmonics of a mix, no more than top.
func (m *Mix) Cut(top int) *Mix {
	if m.Harmonics() <= top {
		return m
	}
	c := &Mix{Sign: m.Sign, W0: m.W0}
	for _, w := range m.W {
		c.W = append(c.W, w[:2*top])
	}
	return c
}

// hear sets u to Sign W α, for k vectors at once.
func (m *Mix) hear(u, alpha []float64, k int) {
	if k == 1 {
		for r, w := range m.W {
			u[r] = m.Sign * Dot(w, alpha[:len(w)])
		}
		return
	}
	clear(u)
	for r, w := range m.W {
		to := u[k*r:][:k]
		for i, f := range w {
			f *= m.Sign
			for v, a := range alpha[k*i:][:k] {
				to[v] += f * a
			}
		}
	}
}

// tell adds Wᵀu to omega, for k vectors at once.
func (m *Mix) tell(omega, u []float64, k int) {
	for r, w := range m.W {
		if k == 1 {
			f := u[r]
			to := omega[:len(w)]
			for i, v := range w {
				to[i] += f * v
			}
			continue
		}
		from := u[k*r:][:k]
		for i, f := range w {
			for v, a := range from {
				omega[k*i+v] += f * a
			}
		}
	}
}

// mute tells whether a circle reflects nothing but images.
func (c *Circle) mute() bool { return c == nil || len(c.Sigma) == 0 && c.Mix == nil }

// lean is what a unit monopole in disc j makes a mix feel.
func (s *System) leanOf(j int) []float64 {
	m := s.circle.Mix
	alpha := make([]complex128, m.Harmonics())
	s.chargeOut(j, 1, alpha)
	u := append([]float64(nil), m.W0...)
	for r, w := range m.W {
		for n, a := range alpha {
			u[r] += w[2*n]*real(a) + w[2*n+1]*imag(a)
		}
	}
	return u
}

// leanAll works out what all discs' monopoles make the mix feel.
func (s *System) leanAll() {
	if s.circle == nil || s.circle.Mix == nil {
		s.lean = nil
		return
	}
	lean := make([][]float64, len(s.discs)) // forks keep theirs
	for j := range lean {
		lean[j] = s.leanOf(j)
	}
	s.lean = lean
}

// Answer is what the mix answers to amplitudes x, monopoles q (units of 1/(2πk)) and a further sum more of monopoles: a constant temperature and
// regular scaled amplitudes, n = 1 … Top.
func (s *System) Answer(x, q []float64, more float64) (lift float64, omega []complex128) {
	m := s.circle.Mix
	alpha := make([]float64, 2*len(s.weight))
	s.gather(alpha, x, 1)
	u := make([]float64, len(m.W0))
	m.hear(u, alpha, 1)
	for r, w := range m.W0 {
		u[r] += m.Sign * w * more
		for j, f := range q {
			u[r] += m.Sign * f * s.lean[j][r]
		}
	}
	clear(alpha)
	m.tell(alpha, u, 1)
	omega = make([]complex128, len(s.weight))
	for n := range omega {
		omega[n] = complex(alpha[2*n], alpha[2*n+1])
	}
	return Dot(m.W0, u), omega
}

// Drive adds to y what the mix sends for a sum more of monopoles that are nowhere, and Rise to the mean temperatures of the discs' rims.
func (s *System) Drive(y []float64, more float64) {
	m := s.circle.Mix
	u := make([]float64, len(m.W0))
	for r, w := range m.W0 {
		u[r] = m.Sign * w * more
	}
	alpha := make([]float64, 2*len(s.weight))
	m.tell(alpha, u, 1)
	s.spread(y, alpha, 1)
}

// Rise adds to the mean temperatures of the discs' rims what the mix does for a sum more of monopoles that are nowhere.
func (s *System) Rise(mean []float64, more float64) {
	m := s.circle.Mix
	for i := range mean {
		mean[i] += m.Sign * more * Dot(m.W0, s.lean[i])
	}
}

// mixFlow adds what the mix answers to a flow.
func (s *System) mixFlow(f *Flow) {
	m := s.circle.Mix
	f.Lift = 0
	if m == nil {
		return
	}
	alpha := s.alpha[:2*len(s.weight)]
	for n, a := range f.Alpha {
		alpha[2*n], alpha[2*n+1] = real(a), imag(a)
	}
	for n, a := range f.Taken[:min(len(f.Taken), len(f.Alpha))] {
		alpha[2*n] += real(a)
		alpha[2*n+1] += imag(a)
	}
	u := s.feel[:len(m.W0)]
	m.hear(u, alpha, 1)
	for r, w := range m.W0 {
		u[r] += m.Sign * w * f.Through
	}
	clear(alpha)
	m.tell(alpha, u, 1)
	for n := range f.Back {
		f.Back[n] = complex(alpha[2*n], alpha[2*n+1])
		f.Regular[n] += f.Back[n]
	}
	f.Lift = Dot(m.W0, u)
}
