package heat

import (
	"math"

	"packrise/solver/harmonic"
	"packrise/solver/outline"
)

// side is what the outside rests against.
func (a *Against) side() outline.Side {
	if a.Held {
		return outline.Side{Kind: outline.Held, Temp: a.Temp}
	}
	return outline.Side{Kind: outline.Insulated}
}

// hull is what a bundle's hull rests against.
func (a *Against) hull() outline.Rest {
	r := outline.Rest{Share: a.Share, At: a.At}
	if a.Held {
		r.Outside = outline.Outside{Film: math.Inf(1), Temp: a.Temp}
	}
	return r
}

// cut divides the outside's contour, which has one film all round, where it rests against something.
func (a *Against) cut(c *outline.Contour) {
	if a.Share == 0 {
		return
	}
	film := c.Sides[0]
	loop, in := c.Loop.Rest(a.At, a.Share)
	c.Loop, c.Sides = loop, nil
	for _, rests := range in {
		if rests {
			c.Sides = append(c.Sides, a.side())
		} else {
			c.Sides = append(c.Sides, film)
		}
	}
}

// against sums up what the sides of the outside that rest against something take up.
func (l *plan) against(out []float64) (sum float64) {
	if a := &l.p.Wall.Against; a.Share > 0 && a.Held {
		for i, s := range l.contours[len(l.contours)-1].Sides {
			if s.Kind == outline.Held {
				sum += out[i]
			}
		}
	}
	return sum
}

// facing is the round wall as parts meet it: held, where it may rest against something that is.
func (g *region) facing() *harmonic.Stack {
	if g.rest == nil || !g.rest.Held {
		return &g.wall
	}
	w := g.wall
	w.Outer = harmonic.End{Kind: harmonic.Held, V: math.Inf(1)}
	return &w
}

// lean prepares what a round holder's outside rests against.
func (g *region) lean(w *Wall) { g.rest = newRest(w, &g.wall, g.k) }

// monopoles are charges (W/m) in units of 1/(2πk).
func (g *region) monopoles(charge []float64) []float64 {
	q := make([]float64, len(charge))
	axpy(q, g.c2(), charge)
	return q
}

// leanOn finds the source of the arc that rests against something; total and cloud are known.
func (s *state) leanOn(t *rest) {
	if t != nil {
		s.rest = t.answer(s.outgoing(t.mix.Harmonics()), s.total)
	}
}

// lean tells a flow what a round holder's outside rests against.
func (k *knot) lean(ground bool) {
	t := k.g.rest
	if t == nil {
		return
	}
	f := k.flow
	f.Through = 0
	for _, q := range k.heat {
		f.Through += q * k.g.c2()
	}
	if ground {
		f.Through += t.ground
	}
	f.Taken = f.Taken[:0]
	for n := range len(k.absorbed) / 2 {
		f.Taken = append(f.Taken, complex(k.absorbed[2*n], k.absorbed[2*n+1]))
	}
}

// regular is what comes into the region from its wall besides images and what each harmonic sends back of itself.
func (k *knot) regular() []complex128 {
	if k.g.rest == nil {
		return k.flow.Omega
	}
	all := append([]complex128(nil), k.flow.Back...)
	for n, w := range k.flow.Omega {
		all[n] += w
	}
	return all
}
