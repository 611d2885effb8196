package heat

import (
	"math"
)

// coupled is conduction and radiation together: one system for all regions that radiate and those that they lie in. Unknowns z are first the
// amplitudes of all knots, then the heats of bores that are held at a temperature, then the emissions of patches.
type coupled struct {
	m    *Model
	top  *knot
	z    []float64
	held int // where the heats of held bores begin
	emit int // where the emissions begin
	grip []float64

	q     []float64 // by source, held bores included
	heats []float64 // by source, of the last solution
	cores []float64 // by source, of the last solution
	warm  bool      // z is the solution of something alike
	stale bool      // a bundle's string has moved since the surfaces looked about: with it arcs and strings have
}

// newCoupled prepares the model's system, which is written; old may be that of an older model or section.
func (m *Model) newCoupled(old *coupled) *coupled {
	c := &coupled{m: m}
	var before *knot
	if old != nil {
		before = old.top
	}
	c.top = m.newKnot(m.top, before)
	c.arrange()
	if old != nil && c.top.inherit(old.top, c.z, old.z) {
		c.warm = old.warm
		if len(c.grip) == len(old.grip) {
			for i, r := range c.grip {
				c.z[c.held+i] = old.z[old.held+i] / old.grip[i] * r
			}
		}
	}
	return c
}

// arrange numbers the unknowns.
func (c *coupled) arrange() {
	c.held = c.top.number(0)
	c.emit = c.held + len(c.m.held)
	c.z = make([]float64, c.top.numberPatches(c.emit))
	c.q = make([]float64, len(c.m.top.sources))
	g := c.m.top
	c.grip = c.grip[:0]
	for _, s := range c.m.held { // about the rise of a bore for its own heat
		p := &g.pieces[g.sources[s].piece]
		r := p.series + g.c2()
		if g.border == nil {
			r += c.m.outsideR()
		}
		c.grip = append(c.grip, r)
	}
}

// follow takes over what has moved and which orders have grown: the unknowns of the top level began at old and begin at fresh.
func (c *coupled) follow(old, fresh []int) {
	c.top.charges.Follow()
	if n := len(fresh) - 1; fresh[n] != old[n] {
		was, z := c.z, stretch(c.z[:old[n]], old, fresh)
		c.top.fit()
		c.arrange()
		copy(c.z, z)
		copy(c.z[fresh[n]:], was[old[n]:])
	}
}

// pass sends and receives once, for given heats by source (nil for none). ground tells whether sides and ambient count, or only changes.
func (c *coupled) pass(z, heats []float64, ground bool) {
	clear(c.q)
	copy(c.q, heats)
	for i, s := range c.m.held {
		c.q[s] = z[c.held+i] / c.grip[i]
	}
	level := c.levelOf(c.q)
	if ground && c.m.top.border == nil {
		level += c.m.p.Wall.Ambient
	}
	c.top.send(z, c.q)
	c.top.receive(level, nil, ground)
}

// levelOf is how far heats q raise the mean temperature of a round wall's inside; 0 within a border.
func (c *coupled) levelOf(q []float64) (level float64) {
	if c.m.top.border != nil {
		return 0
	}
	for _, v := range q {
		level += v
	}
	return level * c.m.outsideR()
}

// miss sets r to how far z is from the solution for given heats, after pass.
func (c *coupled) miss(r, z []float64, ground bool, net func(k *knot, out []float64)) {
	c.top.miss(r, z, net)
	for i, s := range c.m.held {
		t := c.top.core(s, c.q)
		if ground {
			t -= c.m.p.Parts[c.m.top.sources[s].part].Fixed
		}
		r[c.held+i] = t
	}
}

// about is the emission that the patches' temperatures ask for, to first order about the temperatures k.rad.base (K).
func (k *knot) about(out []float64) {
	d := k.rad.warm
	for p, v := range k.t {
		d[p] = v + k.rad.zero - k.rad.base[p]
	}
	k.rad.ex.ChangeOf(out, k.rad.base, d, k.emission)
	for p, v := range k.rad.still {
		out[p] += v
	}
}

// change is how that changes with temperatures and emissions about the base.
func (k *knot) change(out []float64) { k.rad.ex.ChangeOf(out, k.rad.base, k.t, k.emission) }

// rebase takes the patches' present temperatures for the base, and lets the air move by them.
func (k *knot) rebase() {
	if k.rad == nil {
		return
	}
	for p, v := range k.t {
		k.rad.base[p] = math.Max(v+k.rad.zero, 1)
	}
	k.rad.stir(k.rad.base)
	k.rad.ex.NetOf(k.rad.still, k.rad.base, k.emission)
}

// guess takes one temperature for the base of all patches.
func (k *knot) guess(t float64) {
	if k.rad == nil {
		return
	}
	for p := range k.rad.base {
		k.rad.base[p] = t + k.rad.zero
	}
	clear(k.rad.still)
}

func norm(x []float64) float64 { return math.Sqrt(dot(x, x)) }
