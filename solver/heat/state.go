package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// state is a region after solving: all that temperatures anywhere in it need. It is not changed once made.
type state struct {
	k      float64
	r      float64
	wall   harmonic.Stack
	cloud  harmonic.Cloud
	level  float64      // mean temperature of the wall's inside
	total  float64      // W/m through the wall
	taken  float64      // W/m of it that the wall takes up by radiation
	shone  []complex128 // what that adds to A_n of a round wall
	rest   *arcSource   // of a round wall's outside, where it rests against something
	border *bound
	tail   float64 // W/m·K, see region.tail
	pieces []pieceState
	charts charts
}

// pieceState is a piece after solving.
type pieceState struct {
	piece
	mean   float64      // of its outer rim
	q      float64      // W/m out of it
	b      []complex128 // what comes in, n = 1 …
	sent   []complex128 // conj(A_n) of what a cable's inside sends out
	inside *state
}

// solved makes the state of g for heats q (W/m, by source), unknowns x, mean wall temperature level, and a regular field omega
// (√n conj(B_n)) that a cable's jacket lets in, nil for the holder.
func (g *region) solved(q, x []float64, level float64, omega []complex128) *state {
	s := &state{k: g.k, r: g.r, wall: g.wall, level: level}
	charge, v := g.outgoing(q, x)
	for _, f := range q {
		s.total += f
	}
	s.tail = g.tail(x, v)
	mean := g.means(charge, v, omega)
	if g.rest != nil {
		g.sys.Rise(mean, g.rest.ground)
		var lift float64
		lift, omega = g.sys.Answer(v, g.monopoles(charge), g.rest.ground)
		s.level += lift
	}
	s.cloud = g.cloud(charge, v, s.level, omega)
	s.leanOn(g.rest)
	if g.border != nil {
		s.border = g.border.solved(g, charge, v, mean)
	}
	s.pieces = make([]pieceState, len(g.pieces))
	for i := range s.pieces {
		p := &s.pieces[i]
		p.piece, p.q, p.mean = g.pieces[i], charge[i], level+mean[i]
		p.b = g.incoming(s, i)
	}
	g.enter(s, q)
	return s
}

// outgoing returns the heats of the pieces and the scaled amplitudes that they send out, for heats q by source and unknowns x.
func (g *region) outgoing(q, x []float64) (charge, v []float64) {
	charge = make([]float64, len(g.pieces))
	v = append([]float64(nil), x...)
	g.lift(v)
	for k, f := range q {
		src := &g.sources[k]
		charge[src.piece] += f
		if src.u != nil {
			axpy(v[g.sys.Offset(src.piece):], f, src.u)
		}
	}
	return charge, v
}

// means returns the mean temperatures of the pieces' rims over the round wall's; of a rectangle, without what the wall sends back.
func (g *region) means(charge, v []float64, omega []complex128) []float64 {
	mean, dots := make([]float64, len(g.pieces)), make([]float64, len(g.pieces))
	g.sys.Logs(mean, charge)
	g.sys.MonoDot(dots, v)
	for i := range mean {
		mean[i] = g.c2()*mean[i] + dots[i]
		if omega == nil {
			continue
		}
		z := g.pieces[i].at / complex(g.r, 0)
		p := complex(1, 0)
		for n, w := range omega { // Re Σ B_n (c/R)^n, B_n = conj(omega_n)/√n
			p *= z
			mean[i] += (real(p)*real(w) + imag(p)*imag(w)) / math.Sqrt(float64(n+1))
		}
	}
	return mean
}

// cloud collects the outgoing amplitudes v.
func (g *region) cloud(charge, v []float64, level float64, omega []complex128) harmonic.Cloud {
	c := harmonic.Cloud{Circle: g.circle, Level: level}
	for i := range g.pieces {
		p := &g.pieces[i]
		c.C, c.A, c.Q = append(c.C, p.at), append(c.A, p.a), append(c.Q, g.c2()*charge[i])
		s := g.sys.Disc(i).S
		d := make([]complex128, len(s))
		o := g.sys.Offset(i)
		for n := range d {
			f := s[n] / math.Sqrt(float64(n+1))
			d[n] = complex(f*v[o+2*n], f*v[o+2*n+1])
		}
		c.D = append(c.D, d)
	}
	c.Remainder()
	for n, w := range omega {
		for len(c.B) <= n {
			c.B = append(c.B, 0)
		}
		c.B[n] += complex(real(w), -imag(w)) / complex(math.Sqrt(float64(n+1)), 0)
	}
	return c
}

// clearT is the reflection below which incoming amplitudes are summed anew and not read off what goes out.
const clearT = 0.05

// incoming returns b_n of piece i.
func (g *region) incoming(s *state, i int) []complex128 {
	p, c := &g.pieces[i], &s.cloud
	b := make([]complex128, g.orders[i])
	known := g.laws[i] == nil
	for n := range b {
		if !known {
			break
		}
		t := p.stack.Port(n + 1).T
		if math.Abs(t) < clearT {
			known = false
			break
		}
		d := c.D[i][n]
		b[n] = complex(real(d)/t, -imag(d)/t)
	}
	if known {
		return b
	}
	b = make([]complex128, 1+max(len(b), 12))
	c.About(p.at, p.a, i, b)
	if s.border != nil {
		for n, w := range s.border.b[i] {
			b[n] += w
		}
	}
	return b[1:]
}

// enter makes the states of the cables' insides, for heats q of the region's sources.
func (g *region) enter(s *state, q []float64) {
	for i := range s.pieces {
		p := &s.pieces[i]
		l := g.laws[i]
		if l == nil || l.open {
			continue
		}
		in := g.pieces[i].inside
		heats := make([]float64, len(in.sources))
		for k, f := range q {
			if src := &g.sources[k]; src.piece == i {
				heats[src.own] = f
			}
		}
		omega := make([]complex128, in.sys.Top())
		x := make([]float64, in.sys.Len())
		for r, f := range heats {
			axpy(x, f, l.response[r])
		}
		for n := range l.tau {
			w := complex(math.Sqrt(float64(n+1)), 0) * complex(real(p.b[n]), -imag(p.b[n]))
			axpy(x, real(w), l.drive[2*n])
			axpy(x, imag(w), l.drive[2*n+1])
			omega[n] = complex(l.in[n], 0) * w
		}
		p.inside = in.solved(heats, x, p.mean+p.q*p.series, omega)
		s.tail += p.inside.tail
		p.sent = p.inside.outgoing(len(p.b))
		for n, a := range p.sent {
			p.sent[n] = complex(real(a), -imag(a))
		}
	}
}

// outgoing returns what a round wall answers to, A_n, n = 1 … top: what comes from inside and what its face takes up.
func (s *state) outgoing(top int) []complex128 {
	a := s.cloud.Outgoing(top)
	for n, v := range s.shone[:min(top, len(s.shone))] {
		a[n] += v
	}
	return a
}

func axpy(y []float64, f float64, x []float64) {
	if f != 0 {
		harmonic.Axpy(y, f, x)
	}
}
