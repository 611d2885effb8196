package heat

import (
	"math"
	"math/cmplx"
	"sync"

	"packrise/solver/harmonic"
)

// rimPoints is the number of angles at which a rim is sampled for its hottest place; a parabola through the three highest samples follows.
const rimPoints = 96

// unit holds e^{2πik/rimPoints}.
var unit = sync.OnceValue(func() (e [rimPoints]complex128) {
	for k := range e {
		e[k] = cmplx.Rect(1, 2*math.Pi*float64(k)/rimPoints)
	}
	return e
})

// hottest returns the largest value of Re Σ x[n-1] e^{inθ}.
func hottest(x []complex128) float64 {
	var t [rimPoints]float64
	sampleRim(x, &t)
	best := 0
	for k, v := range t {
		if v > t[best] {
			best = k
		}
	}
	return peak(t[(best+rimPoints-1)%rimPoints], t[best], t[(best+1)%rimPoints])
}

// sampleRim sets t to Re Σ x[n-1] e^{inθ} at the rim's points.
func sampleRim(x []complex128, t *[rimPoints]float64) {
	e := unit()
	for i, v := range x {
		if v == 0 {
			continue
		}
		re, im := real(v), imag(v)
		step := (i + 1) % rimPoints
		for k, at := 0, 0; k < rimPoints; k++ {
			t[k] += re*real(e[at]) - im*imag(e[at])
			if at += step; at >= rimPoints {
				at -= rimPoints
			}
		}
	}
}

// peak is the top of the parabola through three equally spaced samples, the middle one being the highest.
func peak(a, b, c float64) float64 {
	den := a - 2*b + c
	if den >= 0 {
		return b
	}
	return b - (a-c)*(a-c)/(8*den)
}

// faces returns the hottest temperature at the inner face of each ring of the piece, then at its outside.
func (p *pieceState) faces() []float64 {
	rings := p.stack.Rings
	out := make([]float64, len(rings)+1)
	mean := p.mean
	for i := len(rings); i >= 0; i-- {
		out[i] = mean
		if i > 0 {
			mean += p.q * ringR(rings[i-1])
		}
	}
	waves := make([][]complex128, len(out))
	for i := range waves {
		waves[i] = make([]complex128, len(p.b))
	}
	var w []harmonic.Waves
	for n, b := range p.b {
		a := p.from(n)
		w = p.stack.Waves(n+1, w[:0])
		for i := range w {
			f, g := w[i].Split(b, a)
			waves[i][n] = f*complex(w[i].W, 0) + g
		}
		port := p.stack.Port(n + 1)
		waves[len(w)][n] = b*complex(1+port.T, 0) + a*complex(port.Tau, 0)
	}
	for i := range out {
		out[i] += hottest(waves[i])
	}
	return out
}

// from is conj(A_n) of what comes from a cable's inside.
func (p *pieceState) from(n int) complex128 {
	if n < len(p.sent) {
		return p.sent[n]
	}
	return 0
}

// ringR is a ring's resistance, K·m/W.
func ringR(g harmonic.Ring) float64 { return math.Log(g.R1/g.R0) / (2 * math.Pi * g.K) }

// core is the temperature that Result.Core gives: of the metal, else the hottest place of what the part holds.
func (p *pieceState) core(faces []float64) float64 {
	if p.source {
		return p.mean + p.q*p.series
	}
	return faces[0]
}

// wallFaces returns the hottest temperatures at the inner face of each ring of a round wall and outside, the mean outside, and the heat
// that leaves there, integrated over the outside.
func (s *state) wallFaces(w *Wall) (hot []float64, mean, released float64) {
	rings := s.wall.Rings
	hot = make([]float64, len(rings)+1)
	mean = s.level
	a := s.outgoing(max(len(s.cloud.Circle.Sigma), 12))
	for len(a) < s.rest.harmonics() {
		a = append(a, 0) // not heard outside
	}
	waves := make([][]complex128, len(hot))
	for i := range waves {
		waves[i] = make([]complex128, len(a))
	}
	var ws []harmonic.Waves
	for n := range a {
		in := cmplx.Conj(a[n])
		ws = s.wall.Waves(n+1, ws[:0])
		for i := range ws {
			f, g := ws[i].Split(s.rest.at(n), in)
			waves[i][n] = f*complex(ws[i].W, 0) + g
			waves[i+1][n] = f + g*complex(ws[i].W, 0)
		}
		if len(ws) == 0 {
			waves[0][n] = in*complex(1+s.wall.Port(n+1).Rho, 0) + s.rest.at(n)
		}
	}
	for i := range hot {
		hot[i] = mean + hottest(waves[i])
		if i < len(rings) {
			mean -= s.total * ringR(rings[i])
		}
	}
	hot[0] = math.Max(hot[0], s.insideFace())
	return hot, mean, s.leaves(w, mean)
}

// insideFace is the hottest temperature of the wall's inside at the places nearest to the pieces that lie close to it; elsewhere the
// harmonics of the wall are enough.
func (s *state) insideFace() float64 {
	hot := math.Inf(-1)
	for i := range s.pieces {
		p := &s.pieces[i]
		if l := math.Hypot(real(p.at), imag(p.at)); l > 0 && s.r-l < 1.5*p.a {
			hot = math.Max(hot, s.cloud.At(p.at*complex(s.r/l, 0)))
		}
	}
	return hot
}

// leaves is the heat that the film takes at the outside's mean temperature; where the outside is held, what the medium's sources carry.
func (s *state) leaves(w *Wall, mean float64) float64 {
	if s.rest != nil {
		open, taken := s.rest.leaves(mean)
		return open + taken
	}
	if math.IsInf(w.Film, 1) {
		return s.carried()
	}
	return w.Film * (mean - w.Ambient) * 2 * math.Pi * s.wall.Outside()
}

// carried is the heat that the medium's sources send through any closed line round them, W/m.
func (s *state) carried() float64 {
	sum := 0.0
	for _, q := range s.cloud.Q {
		sum += q
	}
	return 2*math.Pi*s.k*sum + s.taken
}
