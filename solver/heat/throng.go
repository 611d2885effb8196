package heat

import (
	"context"

	"packrise/solver/harmonic"
	"packrise/solver/outline"
)

// throng takes many steps of the coupled problem at once: one fork of the system for each, which share every coupling that is fetched.
type throng struct {
	c     []*coupled
	tops  []*knot
	lot   *outline.Lot // of a border
	taken []float64    // side by side, what its patches take up
	means []float64    // and their temperatures
	room  vectors
}

// newThrong works beside c.
func newThrong(c *coupled, most int) *throng {
	t := &throng{room: vectors{n: len(c.z)}}
	for range min(many, most) {
		f := c.fork()
		t.c, t.tops = append(t.c, f), append(t.tops, f.top)
	}
	if b := c.top.g.border; b != nil {
		t.lot = b.hand().lot()
	}
	if r := c.top.rad; r != nil && r.sides != nil {
		n := outline.Lanes * len(r.sides.taken)
		t.taken, t.means = make([]float64, n), make([]float64, n)
	}
	return t
}

// pass is coupled.pass for many unknowns zs and heats qs (nil for none), of changes.
func (t *throng) pass(zs, qs [][]float64) {
	n := len(zs)
	heats, levels, omegas := make([][]float64, n), make([]float64, n), make([][]complex128, n)
	for v, z := range zs {
		c := t.c[v]
		clear(c.q)
		if qs != nil {
			copy(c.q, qs[v])
		}
		for i, s := range c.m.held {
			c.q[s] = z[c.held+i] / c.grip[i]
		}
		heats[v], levels[v] = c.q, c.levelOf(c.q)
	}
	sendMany(t.tops[:n], zs, heats)
	t.receive(levels, omegas)
}

// sendMany is knot.send for the same knot of many forks.
func sendMany(ks []*knot, zs, qs [][]float64) {
	flows := make([]*harmonic.Flow, len(ks))
	for v, k := range ks {
		k.utter(zs[v], qs[v])
		flows[v] = k.flow
	}
	ks[0].charges.SendMany(flows)
	for i := range ks[0].bonds {
		if ks[0].bonds[i].inside == nil {
			continue
		}
		in, q := make([]*knot, len(ks)), make([][]float64, len(ks))
		for v, k := range ks {
			in[v], q[v] = k.bonds[i].inside, k.bonds[i].q
		}
		sendMany(in, zs, q)
	}
}

// receive is knot.receive for the top of all forks.
func (t *throng) receive(levels []float64, omegas [][]complex128) {
	ks := t.tops[:len(levels)]
	takeMany(ks, levels, omegas, t.border)
	r := ks[0].rad
	if r == nil || r.sides == nil {
		return
	}
	r.sides.patch.MeansMany(t.means, t.lot)
	for v, k := range ks {
		to := k.t[r.first[len(k.bonds)]:]
		for p := range r.sides.taken {
			to[p] = t.means[outline.Lanes*p+v]
		}
	}
}

// takeMany is knot.receive for the same knot of many forks; border adds what one sends back.
func takeMany(ks []*knot, levels []float64, omegas [][]complex128, border func(ks []*knot)) {
	flows := make([]*harmonic.Flow, len(ks))
	for v, k := range ks {
		k.expect(levels[v], omegas[v], false)
		flows[v] = k.flow
	}
	ks[0].charges.ReceiveMany(flows)
	if ks[0].g.border != nil {
		border(ks)
	}
	for _, k := range ks {
		k.meet()
	}
	for i := range ks[0].bonds {
		if ks[0].bonds[i].inside == nil {
			continue
		}
		in, l, o := make([]*knot, len(ks)), make([]float64, len(ks)), make([][]complex128, len(ks))
		for v, k := range ks {
			in[v], l[v], o[v] = k.bonds[i].inside, k.within(i), k.bonds[i].omega
		}
		takeMany(in, l, o, border)
	}
	for _, k := range ks {
		k.feel()
	}
}

// border adds what it sends back.
func (t *throng) border(ks []*knot) {
	n := len(ks)
	charges, xs, ys, means := make([][]float64, n), make([][]float64, n), make([][]float64, n), make([][]float64, n)
	for v, k := range ks {
		charges[v], xs[v], ys[v], means[v] = k.charge, k.flow.X, k.flow.Y, k.flow.Mean
	}
	g := ks[0].g
	e := g.border.hand()
	r := ks[0].rad
	if r == nil || r.sides == nil {
		e.bringMany(t.lot, g, charges, xs, ys, means)
		return
	}
	for v, k := range ks {
		for p, w := range k.rad.sides.taken {
			t.taken[outline.Lanes*p+v] = w
		}
	}
	e.fillMany(t.lot, g, charges, xs)
	r.sides.patch.RespondMany(t.lot, t.taken)
	e.fetchMany(t.lot, g, ys, means)
}

// columns are the rises of all sources for 1 W/m more in each of the sources who; false if ctx ended.
func (t *throng) columns(ctx context.Context, who []int) ([][]float64, bool) {
	n := len(t.c[0].q)
	zs, qs, f, out := make([][]float64, len(who)), make([][]float64, len(who)), make([][]float64, len(who)), make([][][]float64, len(who))
	for v, s := range who {
		zs[v], qs[v], f[v] = t.room.get(), make([]float64, n), t.room.get()
		clear(zs[v])
		qs[v][s] = 1
	}
	t.pass(zs, qs)
	for v := range who {
		out[v] = append(out[v], t.c[v].rises())
		t.c[v].miss(f[v], zs[v], false, (*knot).change)
		scale(f[v], -1)
	}
	product := func(ys, xs [][]float64, lanes []int) {
		t.pass(xs, nil)
		for k, v := range lanes {
			out[v] = append(out[v], t.c[k].rises())
			t.c[k].miss(ys[k], xs[k], false, (*knot).change)
		}
	}
	bases, ok := gmresMany(product, f, tangentTolerance, &t.room, ended(ctx))
	if !ok {
		return nil, false
	}
	rises := make([][]float64, len(who))
	for v, b := range bases {
		rises[v] = out[v][0]
		for k, share := range b.shares() {
			axpy(rises[v], share, out[v][1+k])
		}
		if b.residual() > tangentTolerance*norm(f[v]) { // the basis was full
			b.improve(zs[v])
			if rises[v], ok = t.c[0].polish(ctx, zs[v], f[v], qs[v]); !ok {
				return nil, false
			}
		}
		t.room.put(b.basis...)
		t.room.put(zs[v], f[v])
	}
	return rises, true
}

// polish goes on from unknowns z, alone.
func (c *coupled) polish(ctx context.Context, z, f, q []float64) ([]float64, bool) {
	if _, ok := gmres(c.linear((*knot).change), z, f, tangentTolerance, ended(ctx)); !ok {
		return nil, false
	}
	c.pass(z, q, false)
	return c.rises(), true
}

// rises are those of all sources, after a pass.
func (c *coupled) rises() []float64 {
	t := make([]float64, len(c.q))
	for i := range t {
		t[i] = c.top.core(i, c.q)
	}
	return t
}
