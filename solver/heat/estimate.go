package heat

import (
	"math"
	"slices"
)

// The estimate rests on the variational property: cutting the harmonics raises the energy Σ q_i T_i by about what the last of them still carry,
// so that their energy over Σ|q| is the rise of the mean of all conductors, weighted by heat. How the worst of them compares was
// found on random sections against order factor 4 (TestEstimate has the spread).
const (
	tailShare  = 0.7 // harmonics above this share of the order stand for those that are left out
	worstShare = 3.0 // the largest error of a metal over the mean rise
	localShare = 1.3 // a body's hottest place: the harmonics that are left out there

	// What holds the outside of a bundle at a temperature puts energy into harmonics that no conductor feels. Their error is the product of what the last
	// ones of the solution carry and of what those of a conductor's own field would, about strayShare of 1/(2πk) K·m/W.
	strayShare = 2e-6
)

// tail is the energy of the last harmonics, W/m·K, of unknowns x with outgoing amplitudes v.
func (g *region) tail(x, v []float64) float64 {
	sum := 0.0
	gripped := g.gripped()
	for i, m := range g.orders {
		if slices.Contains(gripped, i) {
			continue
		}
		o := g.sys.Offset(i)
		for n := int(math.Ceil(tailShare * float64(m))); n < m; n++ {
			if l := g.laws[i]; l == nil || 2*n >= l.n {
				sum += x[o+2*n]*x[o+2*n] + x[o+2*n+1]*x[o+2*n+1]
				continue
			}
			t := math.Abs(g.pieces[i].stack.Port(n + 1).T)
			sum += (v[o+2*n]*v[o+2*n] + v[o+2*n+1]*v[o+2*n+1]) / math.Max(t, 0.01)
		}
	}
	return sum / g.c2()
}

// floor is what dropped entries, the iteration's tolerance and an outline's panels may add, as a share of the largest rise.
func (a Accuracy) floor() float64 {
	switch a {
	case Draft:
		return 1e-4
	case Fine:
		return 3e-6
	}
	return 3e-5
}

// estimate fills in ErrorK and PartErrorK.
func (m *Model) estimate(r *Result, s *state, q []float64) {
	sum := 0.0
	for _, v := range q {
		sum += math.Abs(v)
	}
	if m.contours != nil {
		for _, v := range m.contours.drive.heats {
			sum += math.Abs(v)
		}
	}
	e := m.set.Accuracy.floor() * m.rise(r)
	bends := m.contours != nil && m.set.Accuracy != Draft
	switch {
	case bends && m.p.Wall.Shape == Hull:
		e /= 10
	case bends:
		e /= 3 // bends lie where densities ask for them, on foils too
	case m.p.Wall.Shape == Hull:
		e /= 2 // its panels are the better ones
	case m.top.border != nil && m.metalLayer():
		e *= 10 // panels on a foil
	}
	tail := math.Inf(1)
	if sum > 0 {
		tail = worstShare * s.tail / sum
	}
	if m.p.Wall.Shape == Hull && m.p.Wall.Against.Held {
		e *= 2.5 // panels next to a jump from film to temperature
		tail = math.Min(tail, worstShare*math.Sqrt(s.tail*strayShare*m.top.c2()))
	}
	if !math.IsInf(tail, 1) {
		e += tail
	}
	for i := range r.PartErrorK {
		r.PartErrorK[i] = e
	}
	m.local(r, s)
	m.looseContours(r)
	r.MetalGap = s.metalGap()
	r.ErrorK = 0
	for _, v := range r.PartErrorK {
		r.ErrorK = math.Max(r.ErrorK, v)
	}
}

// metalLayer tells whether any layer of the wall is metal.
func (m *Model) metalLayer() bool {
	return slices.ContainsFunc(m.p.Wall.Rings, func(r Ring) bool { return r.K > metalK })
}

// local adds to parts without a temperature of their own what their last harmonics make of the hottest place.
func (m *Model) local(r *Result, s *state) {
	for i := range s.pieces {
		p := &s.pieces[i]
		switch m.p.Parts[p.part].Core {
		case Body, Bore, Inside:
			r.PartErrorK[p.part] += localShare * p.left()
		case FixedBore:
			r.PartErrorK[p.part] = 0
		}
		if p.inside != nil {
			m.local(r, p.inside)
		}
	}
}

// left is what the harmonics beyond the last may add where Result.Core looks for a body's or cable's hottest place, if they go on dying out as the last
// quarter did after the one before.
func (p *pieceState) left() float64 {
	const slowest = 0.95
	n := len(p.b)
	quarter := max(2, n/4)
	late, early := p.size(n-quarter, n), p.size(n-2*quarter, n-quarter)
	if late == 0 {
		return 0
	}
	ratio := math.Min(late/math.Max(early, 1e-300), slowest)
	return late * ratio / (1 - ratio)
}

// size sums what the harmonics from … to−1 do at most there.
func (p *pieceState) size(from, to int) (sum float64) {
	for n := max(0, from); n < to; n++ {
		a := p.from(n)
		port := p.stack.Port(n + 1)
		x := p.b[n]*complex(1+port.T, 0) + a*complex(port.Tau, 0)
		if w := p.stack.Waves(n+1, nil); len(w) > 0 {
			f, g := w[0].Split(p.b[n], a)
			x = f*complex(w[0].W, 0) + g
		}
		sum += math.Hypot(real(x), imag(x))
	}
	return sum
}

// rise is the largest difference from ambient.
func (m *Model) rise(r *Result) float64 {
	rise := 0.0
	for _, t := range r.Core {
		rise = math.Max(rise, math.Abs(t-m.p.Wall.Ambient))
	}
	return rise
}

// doubt raises the estimate of an iteration that did not end: by the residual's share of the rise.
func (m *Model) doubt(r *Result, f []float64) {
	y, tmp := make([]float64, len(f)), make([]float64, len(f))
	m.top.product(y, m.x, tmp)
	for i := range y {
		y[i] -= f[i]
	}
	share := math.Sqrt(dot(y, y) / math.Max(dot(f, f), 1e-300))
	add := share * m.rise(r)
	for i := range r.PartErrorK {
		r.PartErrorK[i] += add
	}
	r.ErrorK += add
}
