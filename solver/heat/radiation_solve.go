package heat

import (
	"context"
	"math"
)

// Newton's method: at most so many rounds; in each the linear system is solved until the residual has come down by rough, or is well within
// what is wanted.
const (
	newtonRounds = 16
	newtonRough  = 0.02
	guessRise    = 15 // K over the wall: where surfaces begin
)

// solve finds the unknowns for given heats of the metals, by source; frozen leaves the emissions as they are.
func (c *coupled) solve(ctx context.Context, heats []float64, frozen bool, tol float64) (steps int, status Status) {
	n := len(c.z)
	if frozen {
		n = c.emit
	}
	r, full := make([]float64, len(c.z)), make([]float64, len(c.z))
	c.pass(full, heats, true)
	c.miss(r, full, true, nil)
	want := tol * (norm(r[:c.held]) + c.m.top.c2()*norm(heats))
	first := !frozen && !c.warm
	if first {
		c.top.each(func(k *knot) { k.guess(c.guess(heats)) })
	}
	for range newtonRounds {
		c.pass(c.z, heats, true)
		net := (*knot).about
		switch {
		case frozen:
			net = nil
		case !first:
			c.top.each((*knot).rebase)
			net = func(k *knot, out []float64) { copy(out, k.rad.still) }
		}
		c.miss(r, c.z, true, net)
		size := norm(r[:n])
		if math.IsNaN(size) || math.IsInf(size, 0) {
			return steps, StoppedEarly
		}
		if size <= want && !first {
			return steps, c.finish(heats, frozen)
		}
		more, ok := c.improve(ctx, r[:n], frozen, math.Max(newtonRough, 0.3*want/size))
		steps += more
		if !ok {
			return steps, Cancelled
		}
		first = false
	}
	return steps, StoppedEarly
}

// guess is a temperature to begin with.
func (c *coupled) guess(heats []float64) float64 {
	t := c.m.p.Wall.Ambient + guessRise
	if c.m.top.border == nil {
		for _, q := range heats {
			t += q * c.m.outsideR()
		}
	}
	return t
}

// improve takes one Newton step from the residual r, which it spoils.
func (c *coupled) improve(ctx context.Context, r []float64, frozen bool, eta float64) (steps int, ok bool) {
	n := len(r)
	v, w := make([]float64, len(c.z)), make([]float64, len(c.z))
	a := func(y, x []float64) {
		copy(v, x)
		c.pass(v, nil, false)
		if frozen {
			c.miss(w, v, false, nil)
		} else {
			c.miss(w, v, false, (*knot).change)
		}
		copy(y, w[:n])
	}
	for i := range r {
		r[i] = -r[i]
	}
	d := make([]float64, n)
	steps, ok = gmres(a, d, r, eta, ended(ctx))
	for i, x := range d {
		c.z[i] += x
	}
	return steps, ok
}

// finish makes the emissions add up to nothing, exactly, and passes a last time.
func (c *coupled) finish(heats []float64, frozen bool) Status {
	if !frozen {
		c.top.each(func(k *knot) { k.level0(c.z) })
		c.pass(c.z, heats, true)
		c.warm = true
		c.heat = 0
		for _, q := range c.q {
			c.heat += math.Abs(q)
		}
	}
	return Converged
}

// level0 takes the sum of the emissions off them.
func (k *knot) level0(z []float64) {
	if k.rad == nil {
		return
	}
	sum, area := 0.0, 0.0
	for p, u := range k.unit {
		sum += u * z[k.e0+p]
		area += k.rad.ex.Area(p)
	}
	for p, u := range k.unit {
		z[k.e0+p] -= sum / area * k.rad.ex.Area(p) / u
	}
}

// solveCoupled is solve for sections with surfaces that radiate.
func (m *Model) solveCoupled(ctx context.Context, q []float64) *Result {
	_, _, tol := m.set.Accuracy.settings()
	if m.glow == nil {
		m.glow, m.before = m.newCoupled(m.before), nil
	}
	c := m.glow
	if !c.fresh {
		c.top.each(func(k *knot) {
			if k.rad != nil {
				k.rad.look(k.g)
			}
		})
		c.fresh = true
	}
	steps, status := c.solve(ctx, q, false, tol)
	s := c.top.state(c.z, c.q)
	r := m.result(s)
	m.estimate(r, s, c.q)
	r.Steps, r.Status = steps, status
	r.Unknowns = len(c.z)
	return r
}

// dim sets the coupled problem aside, of which a new one may keep something.
func (m *Model) dim() {
	if m.glow != nil {
		m.before, m.glow = m.glow, nil
	}
}
