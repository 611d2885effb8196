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
	s.cloud = g.cloud(k.charge, f.X, k.level, f.Omega)
	for n := range len(k.absorbed) / 2 {
		r := 1 / math.Sqrt(float64(n+1))
		s.shone = append(s.shone, complex(r*k.absorbed[2*n], r*k.absorbed[2*n+1]))
	}
	if k.rad != nil {
		from, to := k.rad.ex.Patches(len(k.bonds))
		for _, v := range k.emission[from:to] {
			s.taken -= v
		}
	}
	k.bound(s)
	s.pieces = make([]pieceState, len(g.pieces))
	for i := range s.pieces {
		p, b := &s.pieces[i], &k.bonds[i]
		p.piece, p.q, p.mean = g.pieces[i], k.heat[i], k.level+f.Mean[i]
		p.b = make([]complex128, len(b.c)/2)
		for n := range p.b {
			r := 1 / math.Sqrt(float64(n+1))
			p.b[n] = complex(r*b.c[2*n], -r*b.c[2*n+1])
		}
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
