package heat

import "math"

// state is the region as the last pass left it, at heats q by source.
func (k *knot) state(z, q []float64) *state {
	g, f := k.g, k.flow
	s := &state{k: g.k, r: g.r, wall: g.wall, level: k.level}
	for _, v := range q {
		s.total += v
	}
	s.tail = g.tail(z[k.x0:], f.X)
	s.cloud = g.cloud(k.charge, f.X, k.level, k.regular())
	for n := range len(k.absorbed) / 2 {
		r := 1 / math.Sqrt(float64(n+1))
		s.shone = append(s.shone, complex(r*k.absorbed[2*n], r*k.absorbed[2*n+1]))
	}
	if k.rad != nil {
		from, to := k.rad.first[len(k.bonds)], len(k.rad.area)
		for _, v := range k.emission[from:to] {
			s.taken -= v
		}
	}
	s.leanOn(g.rest)
	k.bound(s)
	s.pieces = make([]pieceState, len(g.pieces))
	for i := range s.pieces {
		p := &s.pieces[i]
		p.piece, p.q, p.mean = g.pieces[i], k.heat[i], k.level+f.Mean[i]
		p.b = k.felt(s, i)
	}
	g.enter(s, q)
	for i := range s.pieces {
		p, b := &s.pieces[i], &k.bonds[i]
		if b.inside == nil {
			continue
		}
		p.inside = b.inside.state(z, b.q)
		s.tail += p.inside.tail
		p.sent = p.inside.outgoing(len(p.b))
		for n, a := range p.sent {
			p.sent[n] = complex(real(a), -imag(a))
		}
	}
	return s
}

// bound fills in a border.
func (k *knot) bound(s *state) {
	g := k.g
	switch {
	case g.border == nil:
	case k.rad != nil && k.rad.sides != nil:
		s.border = k.rad.sides.bound()
	default:
		s.border = g.border.solved(g, k.charge, k.flow.X, make([]float64, len(g.pieces)))
	}
}

// cableWaves is the fewest harmonics that a cable is looked at with.
const cableWaves = 12

// felt returns what the inside of piece i feels, b_n less its emission, n = 1 …; of cables also beyond their order.
func (k *knot) felt(s *state, i int) []complex128 {
	b, g := &k.bonds[i], k.g
	n := len(b.c) / 2
	out := make([]complex128, n)
	if g.laws[i] != nil && n < cableWaves {
		all := make([]complex128, cableWaves+1)
		s.cloud.About(g.pieces[i].at, g.pieces[i].a, i, all)
		if s.border != nil {
			for n, w := range s.border.b[i] {
				all[n] += w
			}
		}
		out = all[1:]
	}
	for j := range out {
		r := 1 / math.Sqrt(float64(j+1))
		switch {
		case j < n:
			out[j] = complex(r*b.c[2*j], -r*b.c[2*j+1])
		case 2*j < len(b.e):
			out[j] -= complex(r*b.e[2*j], -r*b.e[2*j+1])
		}
	}
	return out
}
