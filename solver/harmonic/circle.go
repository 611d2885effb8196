package harmonic

import "math"

// Circle is a round wall about the origin: inside radius R, reflection B_n = (RhoInf + Sigma[n-1]) conj(A_n), where A_n are the outgoing
// and B_n the regular coefficients about the origin, both referred to R. RhoInf acts by images in closed form; Sigma, for
// n = 1 … len(Sigma), as a short sum; the rest of Sigma is nought. Logarithms are relative to R.
type Circle struct {
	R      float64
	RhoInf float64
	Sigma  []float64
}

// portCut drops entries of the maps from discs to the circle's own harmonics.
const portCut = 1e-7

// port is the map from a disc's scaled amplitudes to the circle's: P[n,m] = s_m √(n/m) C(n−1, m−1) (a/R)^m (c/R)^(n−m). Row m-1 holds n = m,
// m+1, … up to where weighted entries stay below portCut.
type port struct {
	n    []int
	data []complex128
}

// newPort maps d to the circle's harmonics n ≤ len(weight), each of which counts by its weight.
func newPort(d Disc, r float64, weight []float64) port {
	p := port{n: make([]int, len(d.S))}
	c := scale(1/r, d.C)
	l := size(c)
	am := 1.0
	for m := 1; m <= len(d.S) && m <= len(weight); m++ {
		am *= d.A / r
		v := complex(am*d.S[m-1], 0)
		abs := am * d.S[m-1]
		first := len(p.data)
		keep := first
		for n := m; n <= len(weight); n++ {
			p.data = append(p.data, v)
			if abs*weight[n-1] >= portCut {
				keep = len(p.data)
			}
			f := float64(n) / float64(n-m+1) * math.Sqrt(float64(n+1)/float64(n))
			if abs *= f * l; abs < portCut && f*l < 1 {
				break
			}
			v = scale(f, v) * c
		}
		p.data = p.data[:keep]
		p.n[m-1] = keep - first
	}
	return p
}

// gather adds the disc's share of the circle's outgoing amplitudes: alpha += P x.
func (p *port) gather(x []float64, alpha []complex128) {
	at := 0
	for m, n := range p.n {
		if n == 0 {
			continue
		}
		re, im := x[2*m], x[2*m+1]
		a := alpha[m : m+n]
		for k, e := range p.data[at : at+n] {
			a[k] += complex(real(e)*re-imag(e)*im, real(e)*im+imag(e)*re)
		}
		at += n
	}
}

// spread is gather's adjoint: y += Pᴴ omega.
func (p *port) spread(omega []complex128, y []float64) {
	at := 0
	for m, n := range p.n {
		if n == 0 {
			continue
		}
		o := omega[m : m+n]
		var re, im float64
		for k, e := range p.data[at : at+n] {
			w := o[k]
			re += real(e)*real(w) + imag(e)*imag(w)
			im += real(e)*imag(w) - imag(e)*real(w)
		}
		y[2*m] += re
		y[2*m+1] += im
		at += n
	}
}
