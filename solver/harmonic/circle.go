package harmonic

import (
	"math"
	"slices"
)

// Circle is a round wall about the origin: inside radius R, reflection B_n = (RhoInf + Sigma[n-1]) conj(A_n), where A_n are the outgoing
// and B_n the regular coefficients about the origin, both referred to R. RhoInf acts by images in closed form; Sigma, for
// n = 1 … len(Sigma), as a short sum; the rest of Sigma is nought. Mix, if any, couples harmonics. Logarithms are relative to R.
type Circle struct {
	R      float64
	RhoInf float64
	Sigma  []float64
	Mix    *Mix
}

// portCut drops entries of the maps from discs to the circle's own harmonics.
const portCut = 1e-6

// port is the map from a disc's scaled amplitudes to the circle's, P[n,m] = s_m √(n/m) C(n−1, m−1) (a/R)^m (c/R)^(n−m), as a block: its rows
// belong to m and are wide enough for all n whose weighted entries reach portCut.
func (w *builder) port(b *block, d Disc, r float64, weight []float64) {
	c := scale(1/r, d.C)
	l := size(c)
	am := 1.0
	w.cols, w.flat = w.cols[:0], w.flat[:0]
	for m := 1; m <= min(len(d.S), len(weight)); m++ {
		am *= d.A / r
		v := complex(am*d.S[m-1], 0)
		abs := am * d.S[m-1]
		w.line = w.line[:0]
		keep := 0
		for n := m; n <= len(weight); n++ {
			w.line = append(w.line, v)
			if abs*weight[n-1] >= portCut {
				keep = n
			}
			f := float64(n) / float64(n-m+1) * math.Sqrt(float64(n+1)/float64(n))
			if abs *= f * l; abs < portCut && f*l < 1 {
				break
			}
			v = scale(f, v) * c
		}
		w.cols = append(w.cols, uint16(2*keep))
		w.adjoint(m, keep)
	}
	w.room(b, len(w.cols), len(w.flat))
	copy(b.cols, w.cols)
	copy(b.data, w.flat)
}

// adjoint appends the rows of Pᴴ that belong to m: w.line for n = m … keep behind noughts.
func (w *builder) adjoint(m, keep int) {
	at := len(w.flat)
	w.flat = slices.Grow(w.flat, 4*keep)[:at+4*keep]
	r0, r1 := w.flat[at:][:2*keep], w.flat[at+2*keep:][:2*keep]
	for k := range min(2*(m-1), 2*keep) {
		r0[k], r1[k] = 0, 0
	}
	for n := m; n <= keep; n++ {
		e := w.line[n-m]
		k := 2 * (n - 1)
		r0[k], r0[k+1] = real(e), imag(e)
		r1[k], r1[k+1] = -imag(e), real(e)
	}
}

// gather sets alpha to the circle's outgoing scaled amplitudes of x, P x, for k vectors at once.
func (s *System) gather(alpha, x []float64, k int) {
	clear(alpha)
	for i := range s.discs {
		if b := &s.ports[i]; len(b.data) > 0 {
			b.applyTo(x[k*s.off[i]:k*s.off[i+1]], s.idle, s.idle, alpha, k)
		}
	}
}

// spread adds to y what the circle's regular amplitudes omega bring, Pᴴ omega, for k vectors at once.
func (s *System) spread(y, omega []float64, k int) {
	for i := range s.discs {
		if b := &s.ports[i]; len(b.data) > 0 {
			b.applyTo(s.idle, omega, y[k*s.off[i]:k*s.off[i+1]], s.idle, k)
		}
	}
}

// applyTo is apply for one vector or for many.
func (b *block) applyTo(xi, xj, yi, yj []float64, k int) {
	if k == 1 {
		b.apply(xi, xj, yi, yj)
		return
	}
	b.apply8(xi, xj, yi, yj)
}

// reflect turns outgoing amplitudes of the circle into what Sigma and Mix send back, for k vectors at once.
func (s *System) reflect(alpha []float64, k int) {
	mix := s.circle.Mix
	if mix != nil {
		mix.hear(s.feel[:k*len(mix.W0)], alpha, k)
	}
	for n := range s.weight {
		f := 0.0
		if n < len(s.circle.Sigma) {
			f = s.circle.Sigma[n]
		}
		for v := range alpha[2*n*k : (2*n+2)*k] {
			alpha[2*n*k+v] *= f
		}
	}
	if mix != nil {
		mix.tell(alpha, s.feel[:k*len(mix.W0)], k)
	}
}

// Gather sets alpha to the circle's outgoing scaled amplitudes √n A_n of x, n = 1 … Top.
func (s *System) Gather(alpha []complex128, x []float64) {
	s.gather(s.alpha[:2*len(s.weight)], x, 1)
	for n := range alpha {
		alpha[n] = complex(s.alpha[2*n], s.alpha[2*n+1])
	}
}

// Spread adds to y what the circle's regular field with scaled amplitudes omega_n = √n conj(B_n) brings to the discs.
func (s *System) Spread(y []float64, omega []complex128) {
	for n, w := range omega {
		s.alpha[2*n], s.alpha[2*n+1] = real(w), imag(w)
	}
	clear(s.alpha[2*len(omega) : 2*len(s.weight)])
	s.spread(y, s.alpha, 1)
}
