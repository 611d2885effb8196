package outline

import "math"

// potential holds, for a point w in a panel's own frame (the panel is [−1, 1]), the closed forms
//
//	first[k]  = ∫ P_k(t) ln(w−t) dt
//	second[k] = an antiderivative of first[k] in w
//
// On the panel itself only the real parts mean anything; flipped takes ln(t−w) in place of ln(w−t), so that the cut of the
// logarithm lies on the other side.
type potential struct {
	first, second [maxModes]complex128
	q             [maxModes + 2]complex128
}

// at fills the first p entries. Legendre functions Q_n: Abramowitz and Stegun 8.5.3 (recurrence in n), 8.4.2 (Q_0); their integrals follow
// from (2n+1) Q_n = Q'_{n+1} − Q'_{n−1}.
func (f *potential) at(w complex128, p int, flipped, second bool) {
	right, left := w+1, w-1 // of the ends
	var lr, ll complex128
	if flipped {
		lr, ll = clog(-right), clog(-left)
	} else {
		lr, ll = clog(right), clog(left)
	}
	n := p
	if second {
		n++
	}
	legendreQ(f.q[:n+1], w, scale(0.5, lr-ll))
	e := scale(0.5, right*lr-left*ll) // w Q_0 + ½ ln(w²−1), finite at ±1
	q := &f.q
	f.first[0] = e + e - 2
	for k := 1; k < p; k++ {
		f.first[k] = scale(2/float64(2*k+1), q[k+1]-q[k-1])
	}
	if !second {
		return
	}
	f.second[0] = scale(0.5, right*right*lr-left*left*ll) - scale(3, w)
	if p > 1 {
		f.second[1] = scale(2.0/3, scale(0.2, q[3]-q[1])-(e-1))
	}
	for k := 2; k < p; k++ {
		f.second[k] = scale(2/float64(2*k+1), scale(1/float64(2*k+3), q[k+2]-q[k])-scale(1/float64(2*k-1), q[k]-q[k-2]))
	}
}

// legendreQ fills q[0..n], n ≥ 1, given Q_0. Upwards the recurrence loses |w+√(w²−1)|^(2n), so away from the panel it runs downwards from a start far
// enough above n and is scaled to Q_0 (Miller's algorithm; Gautschi, SIAM Review 9, 1967).
func legendreQ(q []complex128, w, q0 complex128) {
	n := len(q) - 1
	q[0] = q0
	size := real(w)*real(w) + imag(w)*imag(w)
	if size < 4 {
		q[1] = w*q0 - 1
		for k := 1; k < n; k++ {
			q[k+1] = scale(up[k], w*q[k]) - scale(over[k], q[k-1])
		}
		return
	}
	extra := 7
	switch {
	case size > 900:
		extra = 2
	case size > 64:
		extra = 3
	case size > 16:
		extra = 5
	}
	a, b := complex128(0), complex(1, 0) // Q_{k+1}, Q_k but for a factor
	for k := n + extra; k > 0; k-- {
		if k <= n {
			q[k] = b
		}
		a, b = b, scale(down[k], w*b)-scale(under[k], a)
	}
	c := q0 * inverse(b)
	for k := 1; k <= n; k++ {
		q[k] *= c
	}
}

// Coefficients of the recurrence (k+1) Q_{k+1} = (2k+1) w Q_k − k Q_{k−1}, solved for either end.
var up, over, down, under [maxTerms + 8]float64

func init() {
	for k := 1; k < len(up); k++ {
		n := float64(k)
		up[k], over[k] = (2*n+1)/(n+1), n/(n+1)
		down[k], under[k] = (2*n+1)/n, (n+1)/n
	}
}

// clog is the principal logarithm, 0 at 0: every use multiplies it by something that vanishes there.
func clog(z complex128) complex128 {
	s := real(z)*real(z) + imag(z)*imag(z)
	if s == 0 {
		return 0
	}
	return complex(0.5*math.Log(s), math.Atan2(imag(z), real(z)))
}

func scale(s float64, z complex128) complex128 { return complex(s*real(z), s*imag(z)) }

func inverse(z complex128) complex128 {
	s := 1 / (real(z)*real(z) + imag(z)*imag(z))
	return complex(s*real(z), -s*imag(z))
}

func conj(z complex128) complex128 { return complex(real(z), -imag(z)) }
