package heat

import (
	"math"
	"math/cmplx"

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

// gripped lists the pieces on whose rim a bundle's hull begins or ends to be held at a temperature.
func (g *region) gripped() []int {
	if h, ok := g.border.(*hullWall); ok && h.rest.Share > 0 && h.sys != nil {
		return h.sys.Gripped()
	}
	return nil
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
	a := &l.p.Wall.Against
	switch {
	case a.Share == 0 || !a.Held:
	case l.p.Wall.Shape == Hull:
		return out[1]
	default:
		for i, s := range l.contours[len(l.contours)-1].Sides {
			if s.Kind == outline.Held {
				sum += out[i]
			}
		}
	}
	return sum
}

// lean divides exposed faces and strings where the hull begins and ends to rest against something.
func (l *plan) lean() {
	a := &l.p.Wall.Against
	if a.Share == 0 {
		return
	}
	cut, in := l.hull.Rest(a.At, a.Share)
	var blocked outline.Loop
	var ends []complex128
	for i := range cut {
		if in[i] {
			blocked = append(blocked, cut[i])
		}
		if in[i] != in[(i+1)%len(in)] {
			ends = append(ends, cut[i].To)
		}
	}
	near := 1e-7 * l.hull.Perimeter()
	for i := range l.contours {
		c := &l.contours[i]
		if c.Sides == nil {
			continue
		}
		var loop outline.Loop
		var sides []outline.Side
		for j := range c.Loop {
			side := c.Sides[min(j, len(c.Sides)-1)]
			if side.Kind == outline.Covered {
				loop, sides = append(loop, c.Loop[j]), append(sides, side)
				continue
			}
			for _, s := range divided(&c.Loop[j], ends, near) {
				mid, to := s.At(0.5), side
				for k := range blocked {
					if dist(blocked[k].Nearest(mid), mid) < near {
						to = a.side()
					}
				}
				loop, sides = append(loop, s), append(sides, to)
			}
		}
		if !c.String {
			c.Loop, c.Sides = loop, sides
			continue
		}
		whole := *c
		for j := range loop { // a string is one straight line
			piece := whole
			piece.Loop, piece.Sides = loop[j:j+1], sides[j:j+1]
			if j == 0 {
				l.contours[i] = piece
			} else {
				l.contours = append(l.contours, piece)
			}
		}
	}
}

// divided cuts a stroke at those of some points that lie on it.
func divided(s *outline.Stroke, at []complex128, near float64) (all outline.Loop) {
	cuts := []float64{0}
	for _, z := range at {
		if dist(s.Nearest(z), z) > near {
			continue
		}
		u := dist(z, s.From) / s.Length()
		if s.R > 0 {
			u = turned(cmplx.Phase((z-s.Centre)/(s.From-s.Centre))) / s.Span()
		}
		if e := near / s.Length(); u > e && u < 1-e {
			cuts = insert(cuts, u)
		}
	}
	cuts = append(cuts, 1)
	for k := 1; k < len(cuts); k++ {
		p := outline.Stroke{From: s.At(cuts[k-1]), To: s.At(cuts[k]), Centre: s.Centre, R: s.R}
		if k > 1 {
			p.From = all[k-2].To
		}
		all = append(all, p)
	}
	return all
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
