package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// Against is where a part of the outside rests against a wall or a floor: Share of the perimeter, its middle where a ray from the outline's centre
// (the centroid of its area) in direction At meets it, half of it to each side by length. No heat passes there, or the outer surface is held at Temp. The wall's
// film acts on the rest. It belongs to every Shape but Rect, whose sides are told one by one.
type Against struct {
	Share float64 // 0: nothing; below 1
	At    float64 // rad
	Held  bool    // at Temp
	Temp  float64
}

const badAgainst = "heat: what the outside rests against needs a share from 0 to below 1 and a film that is not infinite, and belongs to no rectangle"

// check panics on misuse.
func (a *Against) check(w *Wall) {
	ok := good(a.Share, a.At, a.Temp) && a.Share >= 0 && a.Share < 1
	if a.Share > 0 {
		ok = ok && w.Shape != Rect && !math.IsInf(w.Film, 1)
	}
	if !ok {
		panic(badAgainst)
	}
}

// rest is the round outside of a stack of rings, of which an arc rests against something. The film is taken to act all round; on the arc a source
// s(θ), W/m², makes up for what does not: h (T − ambient) where no heat passes, whatever keeps T at its value where that is held. What the source does is
// reckoned in the harmonics of the whole stack, so that it can be eliminated: the wall then answers in all harmonics to any (PHYSICS of the Mix). The
// source is a series on the arc: Legendre polynomials where it is bounded, Chebyshev's over the root of the distance from the ends where T is held.
// Galerkin's method makes the answer reciprocal.
type rest struct {
	Against
	film, ambient float64
	k, r          float64 // conductivity of the outermost material, outer radius
	unit          float64 // outer radius/(2πk) of the medium
	basis         *arcBasis
	root          [][]float64 // Cholesky factor of the arc's own answer
	mix           *harmonic.Mix
	ground        float64 // what ambient and arc do without heat, as a sum of monopoles in units of 1/(2πk) of the medium
}

// newRest prepares the arc of a wall w whose rings are stack's, seen from a medium of conductivity k; nil if nothing rests against anything. The stack ends in
// the film.
func newRest(w *Wall, stack *harmonic.Stack, k float64) *rest {
	if w.Against.Share == 0 {
		return nil
	}
	t := &rest{Against: w.Against, film: w.Film, ambient: w.Ambient, r: stack.Outside(), k: outermost(stack)}
	t.unit = t.r / (2 * math.Pi * k)
	inner := *stack
	inner.Outer = harmonic.End{Kind: harmonic.Medium, V: t.k}
	t.basis = newArcBasis(t.Share*math.Pi, t.modes(stack), t.film*t.r/t.k, t.Held)
	own := make([]float64, t.basis.top) // Z_n, K per W/m²
	for n := range own {
		own[n] = t.own(n+1, inner.Port(n+1).T)
	}
	t.root = t.basis.factor(t, own)
	t.couple(stack, k)
	if t.Held {
		t.ground = (t.ambient - t.Temp) * t.film * t.unit * 2 * math.Pi
	}
	return t
}

// outermost is the conductivity of the last material of a stack.
func outermost(s *harmonic.Stack) float64 {
	switch n := len(s.Rings); {
	case n > 0:
		return s.Rings[n-1].K
	case s.Inner.Kind == harmonic.Held:
		return 1 // never reached
	}
	return s.Inner.V
}

// How many terms the source gets: a few, and so many for each length over which the outside's temperature changes.
const (
	fewTerms  = 10
	termsEach = 3.0
	mostTerms = 80
)

// modes is the number of terms of the source: temperatures outside change over the thickness of the wall.
func (t *rest) modes(s *harmonic.Stack) int {
	over := t.r / 16
	switch n := len(s.Rings); {
	case n == 0 && s.Inner.Kind == harmonic.Medium:
		over = t.r / 60 // parts touch the outside itself
	case n > 0:
		over = math.Max(t.r-s.Rings[0].R0, 0.01*t.r)
		if t.k > metalK {
			over = math.Max(over, t.r/6)
		}
	}
	return min(fewTerms+int(termsEach*t.Share*math.Pi*t.r/over), mostTerms)
}

// own is the temperature (K) of the outside for a source of 1 W/m² in harmonic n, where the stack reflects t1.
func (t *rest) own(n int, t1 float64) float64 {
	g := t.k * float64(n) / t.r
	return (1 + t1) / (g*(1-t1) + t.film*(1+t1))
}

// enters is the regular wave that a source of 1 W/m² sends in at the outside, in harmonic n.
func (t *rest) enters(n int) float64 { return 1 / (t.film + t.k*float64(n)/t.r) }

// couple makes the mix.
func (t *rest) couple(stack *harmonic.Stack, k float64) {
	m := t.basis.modes
	top := min(t.basis.top, maxSigma)
	rows := make([][]float64, m)
	w0 := make([]float64, m)
	for j := range rows {
		rows[j] = make([]float64, 2*top)
		w0[j] = t.basis.at(j, 0) * k / (t.film * t.r)
	}
	if stack.Inner.Kind == harmonic.Held {
		top = 0 // a metal's own rim: nothing but its heat comes out
	}
	f := 1.0
	for n := 1; n <= top; n++ {
		if n > 32 && f < faintPath {
			top = n - 1
			break
		}
		// Reciprocity: what comes out to the outside of A_n is what goes in of a source, times 2nk/r.
		f = stack.Port(n).TauIn * t.enters(n) * 2 * k * math.Sqrt(float64(n)) / t.r
		s, c := math.Sincos(float64(n) * t.At)
		for j := range rows {
			e := f * t.basis.at(j, n)
			if j%2 == 0 {
				rows[j][2*n-2], rows[j][2*n-1] = e*c, e*s
			} else {
				rows[j][2*n-2], rows[j][2*n-1] = -e*s, e*c
			}
		}
	}
	forward(t.root, rows)
	for j := range rows {
		rows[j] = rows[j][:2*top]
	}
	f = math.Sqrt(t.unit)
	one := [][]float64{}
	for j := range rows {
		scale(rows[j], f)
		one = append(one, w0[j:j+1])
	}
	forward(t.root, one)
	scale(w0, f)
	t.mix = &harmonic.Mix{Sign: 1, W: rows, W0: w0}
	if t.Held {
		t.mix.Sign = -1
	}
	for top > 0 && t.mix.Weight(top) < faintMix*faintMix {
		top--
	}
	t.mix = t.mix.Cut(top)
	for n := len(w0); n > 8 && dot(t.mix.W[n-1], t.mix.W[n-1])+w0[n-1]*w0[n-1] < faintMix*faintMix; n-- {
		t.mix.W, t.mix.W0 = t.mix.W[:n-1], t.mix.W0[:n-1]
	}
}

// What counts for nothing of a harmonic's way to the outside, as a share, and of what the mix has of it.
const (
	faintPath = 1e-9
	faintMix  = 2e-6
)

// forward solves L y = b for the rows of b.
func forward(l, b [][]float64) {
	for i := range b {
		for j := range i {
			if f := l[i][j]; f != 0 {
				axpy(b[i], -f, b[j])
			}
		}
		scale(b[i], 1/l[i][i])
	}
}

// source is the arc's source in a solution.
type arcSource struct {
	*rest
	heat float64      // W/m that it makes
	wave []complex128 // regular waves that it sends in at the outside, n = 1 …
}

// answer finds the source for outgoing amplitudes a (A_n of the wall) and heat through the wall, q in W/m.
func (t *rest) answer(a []complex128, q float64) *arcSource {
	m := t.mix
	c := make([]float64, len(m.W0))
	c2 := t.unit / t.r
	for j, w := range m.W {
		c[j] = m.W0[j] * (q*c2 + t.ground)
		for n := range min(len(a), len(w)/2) {
			f := math.Sqrt(float64(n + 1))
			c[j] += f * (w[2*n]*real(a[n]) + w[2*n+1]*imag(a[n]))
		}
		c[j] *= m.Sign / math.Sqrt(t.unit)
	}
	for i := len(c) - 1; i >= 0; i-- { // Lᵀ; terms that the mix has no more are nought
		c[i] /= t.root[i][i]
		for j := range i {
			c[j] -= t.root[i][j] * c[i]
		}
	}
	s := &arcSource{rest: t, wave: make([]complex128, min(t.basis.top, maxWallSeries))}
	for j, f := range c {
		s.heat += f * t.basis.at(j, 0) * t.r
	}
	for n := range s.wave {
		var even, odd float64
		for j := 0; j < len(c); j += 2 {
			even += c[j] * t.basis.at(j, n+1)
		}
		for j := 1; j < len(c); j += 2 {
			odd += c[j] * t.basis.at(j, n+1)
		}
		sin, cos := math.Sincos(float64(n+1) * t.At)
		f := t.enters(n+1) / math.Pi
		s.wave[n] = complex(f*(even*cos-odd*sin), -f*(even*sin+odd*cos))
	}
	for n := len(s.wave); n > 64 && size(s.wave[n-1]) < faintWave; n-- {
		s.wave = s.wave[:n-1]
	}
	return s
}

// faintWave ends the waves of a source, K.
const faintWave = 2e-5

func size(z complex128) float64 { return math.Sqrt(square(z)) }

// at is wave n + 1.
func (s *arcSource) at(n int) complex128 {
	if s == nil || n >= len(s.wave) {
		return 0
	}
	return s.wave[n]
}

// harmonics is how many waves there are.
func (s *arcSource) harmonics() int {
	if s == nil {
		return 0
	}
	return len(s.wave)
}

// leaves is the heat that leaves through the film of the open part, and what the arc takes up, at a mean temperature of the outside.
func (s *arcSource) leaves(mean float64) (open, taken float64) {
	open = s.film * (mean - s.ambient) * 2 * math.Pi * s.r
	if !s.Held {
		return open - s.heat, 0
	}
	blocked := s.film * (s.Temp - s.ambient) * 2 * math.Pi * s.Share * s.r
	return open - blocked, blocked - s.heat
}

// within are the regular waves that come into a bare part, n = 1 …
func (s *arcSource) within(c *piece) []complex128 {
	b := make([]complex128, len(s.wave))
	for n := range b {
		t := c.stack.Port(n + 1).T
		if e := s.enters(n + 1); s.own(n+1, t) > 0 {
			b[n] = s.wave[n] * complex(s.own(n+1, t)/e/(1+t), 0)
		}
	}
	return b
}
