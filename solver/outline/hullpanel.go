package outline

import "math"

// bow is a panel of the hull. Of a string it is a panel like those of a straight side; of an arc, half is half the length along the arc, and mid
// and dir are those of its middle, for estimates.
type bow struct {
	panel
	piece int
	disc  int // of an arc, −1 of a string
	c     complex128
	a     float64
	theta float64      // angle of the middle
	turn  float64      // half the angle
	far   []complex128 // of an arc: see farAway
}

// newBow covers lo–hi of piece i.
func newBow(q *piece, i int, lo, hi float64, p int) bow {
	s := (lo + hi) / 2
	b := bow{piece: i, disc: q.disc, c: q.c, a: q.a}
	b.panel = panel{along: s, half: (hi - lo) / 2, mid: q.at(s), dir: q.dir, p: p}
	if q.disc >= 0 {
		b.theta, b.turn = q.from+s/q.a, b.half/q.a
		b.dir = polar(1, b.theta) * 1i
		b.far = b.harmonics(farTerms)
	}
	return b
}

// at returns the point at t in −1 … 1.
func (b *bow) at(t float64) complex128 {
	if b.disc < 0 {
		return b.panel.at(t)
	}
	return b.c + polar(b.a, b.theta+b.turn*t)
}

// sight is the complex potential of a panel's modes at a point: ∫ P_k ln((z−y)/half) dt, of an arc but for a constant turn.
type sight struct {
	potential
	w      complex128
	smooth [maxModes]complex128 // of an arc: what first has besides the straight line in the plane of angles
}

// value returns the potential of mode k.
func (s *sight) value(k int) complex128 { return s.first[k] + s.smooth[k] }

// look evaluates the potential at z. All of the hull lies to the left of a string and outside the disc of an arc, so that no logarithm's cut is
// crossed on the way along the hull; near is the real part of w at a point beside z, for arcs, whose angles repeat.
func (b *bow) look(z complex128, s *sight, near float64, second bool) {
	if b.disc < 0 {
		s.w = b.frame(z)
		s.w = complex(real(s.w), math.Max(imag(s.w), 0))
		s.at(s.w, b.p, false, second)
		clear(s.smooth[:b.p])
		return
	}
	v := z - b.c
	r2 := (real(v)*real(v) + imag(v)*imag(v)) / (b.a * b.a)
	period := 2 * math.Pi / b.turn
	re := (math.Atan2(imag(v), real(v)) - b.theta) / b.turn
	re -= period * math.Round((re-near)/period)
	im := -0.5 * math.Log(r2) / b.turn
	if math.Abs(im) < 1e-9 {
		im = -1e-300 // on the rim, seen from outside; not −0, which is lost in a sum
	}
	s.w = complex(re, im)
	if r2 > farOff*farOff && !second {
		b.farAway(s, scale(b.a, inverse(v)))
		return
	}
	s.at(s.w, b.p, false, second)
	b.round(s)
}

// An arc is far from what is farOff radii from its centre: farTerms harmonics then are good to 1e-9.
const (
	farOff   = 1.8
	farTerms = 32
)

// farAway is look by harmonics: ln(z−y) = ln(z−c) − Σ (1/n) (a/(z−c))^n e^{inθ}, x = a/(z−c).
func (b *bow) farAway(s *sight, x complex128) {
	var sum [maxModes]complex128
	terms := farTerms
	if r := real(x)*real(x) + imag(x)*imag(x); r < 0.06 {
		terms = farTerms / 2
	}
	for n := terms - 1; n >= 0; n-- {
		h := b.far[n*b.p:][:b.p]
		for k, v := range h {
			sum[k] = (sum[k] + v) * x
		}
	}
	for k := range b.p {
		s.first[k], s.smooth[k] = -sum[k], 0
	}
	// In the units of round: less ln(half) + iπ/2.
	s.first[0] += complex(2*math.Log(b.a/b.half)-2*b.turn*imag(s.w), 2*(b.theta+b.turn*real(s.w))-math.Pi)
}

// round fills smooth. With angles ω and θ, z − y = a e^{iω} − a e^{iθ} = 2i a e^{i(ω+θ)/2} sin((ω−θ)/2): the logarithm of a straight line in the
// plane of angles, besides something smooth.
func (b *bow) round(s *sight) {
	for k := range b.p {
		s.smooth[k] = 0
	}
	s.smooth[0] = complex(0, 1) * (s.w*complex(b.turn, 0) + complex(2*b.theta, 0)) // ½(ω+θ) over the panel, θ's own part below
	if b.p > 1 {
		s.smooth[1] = complex(0, b.turn/3)
	}
	g := &rules[b.p+3]
	for i, t := range g.x {
		v := logSinc(scale(b.turn/2, s.w-complex(t, 0)))
		for k := range b.p {
			s.smooth[k] += scale(g.p[i][k], v)
		}
	}
}

// logSinc is ln(sin x / x).
func logSinc(x complex128) complex128 {
	r2 := real(x)*real(x) + imag(x)*imag(x)
	if r2 < 0.04 {
		q := x * x
		return q * (-1.0/6 + q*(-1.0/180+q*(-1.0/2835+q*(-1.0/37800+q*(-1.0/467775)))))
	}
	u, v := real(x), imag(x)
	su, cu := math.Sincos(u)
	e := math.Exp(math.Abs(v))
	ch, sh := (e+1/e)/2, math.Copysign((e-1/e)/2, v)
	sin := complex(su*ch, cu*sh)
	q := sin * inverse(x)
	return clog(q)
}

// distance from the panel to z, of an arc to its chord's and a little less.
func (b *bow) distance(z complex128) float64 {
	d := b.panel.distance(z)
	if b.disc >= 0 {
		d = math.Max(0, d-b.a*(1-math.Cos(b.turn)))
	}
	return d
}
