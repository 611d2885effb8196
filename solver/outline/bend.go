package outline

import (
	"math"
	"math/cmplx"
)

// Bends are straight or curved pieces of a Loop that carry a density Σ s_k P_k along their length. On an arc, σ ds = f(w) dw with f analytic in the
// complex coordinate w in which the ends are ±1 (Helsing and Ojala, J. Comput. Phys. 227, 2008, 2899): a polynomial in w, which the same closed
// forms integrate that hold on a straight panel. What is different is only on which side of the arc a point lies.

// maxTerms is the most terms of such a polynomial.
const maxTerms = 14

// maxBend is the largest half opening of an arc that is one bend, rad.
const maxBend = math.Pi / 8

type bend struct {
	contour, stroke int
	lo, hi          float64 // along the stroke, shares of its length
	half            float64 // half of the length
	a, b            complex128
	mid, chord      complex128 // z = mid + chord·w
	inv             complex128
	alpha           float64 // half opening, 0 straight
	c               complex128
	r               float64
	wc              complex128 // centre in w
	rw              float64
	terms           int
	fit             [][modes]complex128 // of f for each mode
	dof             int
	firstCell       int
	corner          bool // at a sharp corner
	known           int  // dof of a bend that has not changed since the equations were last written, −1 of others
}

func newBend(s *Stroke, contour, stroke int, lo, hi float64) bend {
	b := bend{contour: contour, stroke: stroke, lo: lo, hi: hi, half: s.Length() * (hi - lo) / 2, known: -1, a: s.At(lo), b: s.At(hi), c: s.Centre, r: s.R}
	b.mid, b.chord = scale(0.5, b.a+b.b), scale(0.5, b.b-b.a)
	b.inv = inverse(b.chord)
	b.terms = modes
	if s.R > 0 {
		b.alpha = s.span() * (hi - lo) / 2
		b.wc, b.rw = complex(0, 1/math.Tan(b.alpha)), 1/math.Sin(b.alpha)
		b.fitArc()
		return b
	}
	b.fit = make([][modes]complex128, modes)
	for k := range modes {
		b.fit[k][k] = complex(b.half, 0)
	}
	return b
}

// fitArc finds the polynomials by interpolation at Gauss points of the angle.
func (b *bend) fitArc() {
	away := imag(b.wc) // the nearest singularity of f is the centre
	rho := away + math.Hypot(1, away)
	b.terms = min(maxTerms, modes+2+int(math.Ceil(18/math.Log(rho))))
	n := b.terms
	x, _ := gauss(n)
	a := make([][]complex128, n)
	for i, t := range x {
		w := b.frameAt(t)
		row := make([]complex128, n+modes)
		for k := range n {
			row[k] = legendreC(k, w)
		}
		// ds = half dt, dw = i (w − wc) alpha dt
		f := complex(b.half/b.alpha, 0) * inverse(1i*(w-b.wc))
		for k := range modes {
			p, _ := legendre(k, t)
			row[n+k] = f * complex(p, 0)
		}
		a[i] = row
	}
	eliminate(a)
	b.fit = make([][modes]complex128, n)
	for k := range n {
		copy(b.fit[k][:], a[k][n:])
	}
}

// eliminate solves the square system at the left of a for the columns at its right, in place.
func eliminate(a [][]complex128) {
	n := len(a)
	for c := range n {
		best := c
		for i := c + 1; i < n; i++ {
			if cmplx.Abs(a[i][c]) > cmplx.Abs(a[best][c]) {
				best = i
			}
		}
		a[c], a[best] = a[best], a[c]
		f := 1 / a[c][c]
		for j := c; j < len(a[c]); j++ {
			a[c][j] *= f
		}
		for i := range a {
			if i == c {
				continue
			}
			f := a[i][c]
			for j := c; j < len(a[c]); j++ {
				a[i][j] -= f * a[c][j]
			}
		}
	}
}

func legendreC(n int, x complex128) complex128 {
	if n == 0 {
		return 1
	}
	prev, p := complex128(1), x
	for k := 1; k < n; k++ {
		prev, p = p, scale(1/float64(k+1), scale(float64(2*k+1), x*p)-scale(float64(k), prev))
	}
	return p
}

// frameAt is the coordinate w of the point at t in −1 … 1 along the bend.
func (b *bend) frameAt(t float64) complex128 {
	if b.alpha == 0 {
		return complex(t, 0)
	}
	return b.wc + cmplx.Rect(b.rw, b.alpha*t-math.Pi/2)
}

// at is the point at t.
func (b *bend) at(t float64) complex128 {
	switch {
	case t <= -1:
		return b.a
	case t >= 1:
		return b.b
	case b.alpha == 0:
		return b.mid + scale(t, b.chord)
	}
	return b.c + (b.a-b.c)*cmplx.Rect(1, b.alpha*(t+1))
}

// sweep is the angle under which z sees the piece t0 … t1.
func (b *bend) sweep(t0, t1 float64, z complex128) float64 {
	s := Stroke{From: b.at(t0), To: b.at(t1), Centre: b.c, R: b.r}
	return s.sweep(z)
}

// spot is a point as a bend sees it.
type spot struct {
	w, lr, ll complex128 // in its frame, ln(w+1) and ln(w−1) to one branch along the bend
	straight  bool       // on the line of a straight bend, where nothing crosses
}

// look finds the spot of z.
func (b *bend) look(z complex128) spot {
	w := (z - b.mid) * b.inv
	lr, ll := clog(w+1), clog(w-1)
	turn := imag(ll) - imag(lr)
	switch {
	case turn <= -math.Pi:
		turn += 2 * math.Pi
	case turn > math.Pi:
		turn -= 2 * math.Pi
	}
	if turn < 0 && b.alpha > 0 && imag(w) <= 0 && cmplx.Abs(w-b.wc) < b.rw {
		turn += 2 * math.Pi
	}
	return spot{w: w, lr: lr, ll: complex(real(ll), imag(lr)+turn)}
}

// own finds the spot of the bend's point at t, on neither side.
func (b *bend) own(t float64) spot {
	w := b.frameAt(t)
	lr, ll := clog(w+1), clog(w-1)
	return spot{w: w, lr: complex(real(lr), b.alpha*(t-1)/2), ll: complex(real(ll), b.alpha*(t+1)/2), straight: b.alpha == 0}
}

// beside finds the spot of another bend's point on the same straight stroke.
func (b *bend) beside(to *bend, t float64) spot {
	at := (to.lo+to.hi)/2 + t*(to.hi-to.lo)/2
	w := complex((2*at-b.lo-b.hi)/(b.hi-b.lo), 0)
	lr, ll := clog(w+1), clog(w-1)
	return spot{w: w, lr: complex(real(lr), 0), ll: complex(real(ll), 0), straight: true}
}

// spotOf finds the spot of the point t of bend to.
func (b *bend) spotOf(to *bend, t float64) spot {
	switch {
	case b == to:
		return b.own(t)
	case b.alpha == 0 && b.contour == to.contour && b.stroke == to.stroke:
		return b.beside(to, t)
	}
	return b.look(to.at(t))
}

// curved holds ∫ P_k(τ) ln(w−τ) dτ along a bend, as potential.first does for a straight panel.
type curved struct {
	first [maxTerms]complex128
	q     [maxTerms + 1]complex128
}

func (f *curved) at(s spot, terms int) {
	w := s.w
	legendreQ(f.q[:terms+1], w, scale(0.5, s.lr-s.ll))
	f.first[0] = (w+1)*s.lr - (w-1)*s.ll - 2
	for k := 1; k < terms; k++ {
		f.first[k] = scale(2/float64(2*k+1), f.q[k+1]-f.q[k-1])
	}
}

// complexPotential sets g[k] to ∫ σ_k ln(z−y) ds for every mode, T = −Re g/2π.
func (b *bend) complexPotential(f *curved, s spot, g *[modes]complex128) {
	f.at(s, b.terms)
	if b.alpha == 0 {
		for k := range g {
			g[k] = scale(b.half, f.first[k])
		}
	} else {
		*g = [modes]complex128{}
		for k := range b.terms {
			v := f.first[k]
			for j, c := range &b.fit[k] {
				g[j] += c * v
			}
		}
	}
	g[0] += complex(2*b.half*0.5*math.Log(real(b.chord)*real(b.chord)+imag(b.chord)*imag(b.chord)), 0)
}

// distance from the middle and the ends to z, at least.
func (b *bend) distance(z complex128) float64 {
	w := (z - b.mid) * b.inv
	return cmplx.Abs(b.chord) * math.Hypot(math.Max(0, math.Abs(real(w))-1), math.Max(0, math.Abs(imag(w))-0.21))
}
