package heat

import (
	"context"
)

// tangentTolerance is the residual of a column of the influence matrix of a section that radiates.
const tangentTolerance = 1e-4

// Radiates tells whether surfaces radiate to each other in the section.
func (m *Model) Radiates() bool {
	return m.top != nil && m.top.opens() || m.form != nil && m.form.radiates()
}

// Tangent returns K and ground such that the Core temperatures of Metal parts are ground + K q near the last solution; rows and columns of parts
// that aren't Metal are nil. Where nothing radiates they are so everywhere: Influence and Ground.
func (m *Model) Tangent(ctx context.Context) (k [][]float64, ground []float64, status Status) {
	if !m.Radiates() {
		if k, status = m.Influence(ctx); status != Converged {
			return k, nil, status
		}
		ground, status = m.Ground(ctx)
		return k, ground, status
	}
	if k, status = m.Influence(ctx); status != Converged {
		return k, nil, status
	}
	if m.form != nil {
		return k, m.form.tangentAt(k), Converged
	}
	if m.contours != nil {
		return k, m.contours.tangentAt(k), Converged
	}
	ground = make([]float64, len(m.p.Parts))
	c := m.glow
	for i, s := range m.top.sources {
		if k[s.part] == nil {
			continue
		}
		ground[s.part] = c.cores[i]
		for j, t := range m.top.sources {
			if k[t.part] != nil {
				ground[s.part] -= k[s.part][t.part] * c.heats[j]
			}
		}
	}
	return k, ground, Converged
}

// tangent returns the rises of all sources for 1 W/m more in each, about the last solution, bores being held: their rows and columns are nought.
func (m *Model) tangent(ctx context.Context) ([][]float64, bool) {
	if !m.solvedHere(ctx) {
		return nil, false
	}
	n := len(m.top.sources)
	held := make([]bool, n)
	for _, s := range m.held {
		held[s] = true
	}
	var free []int
	k := make([][]float64, n)
	for s := range k {
		k[s] = make([]float64, n)
		if !held[s] {
			free = append(free, s)
		}
	}
	ok := inBatches(len(free), m.set.threads(), func() *throng { return newThrong(m.glow, len(free)) }, func(t *throng, first, last int) bool {
		who := free[first:last]
		rises, ok := t.columns(ctx, who)
		for v, rise := range rises {
			for _, i := range free {
				k[i][who[v]] = rise[i]
			}
		}
		return ok
	})
	return k, ok
}

// solvedHere solves for the last heats, or the Problem's own, unless the last solution is that of the section as it is; false if ctx ended first.
func (m *Model) solvedHere(ctx context.Context) bool {
	c := m.glow
	if c != nil && len(c.cores) > 0 && c.far() == 0 {
		return true
	}
	heats := m.metals(m.heats(nil))
	if c != nil && len(c.heats) == len(heats) {
		copy(heats, c.heats)
	}
	return m.solveCoupled(ctx, heats).Status != Cancelled
}

// fork is the same system with work space of its own.
func (c *coupled) fork() *coupled {
	f := *c
	f.top = c.top.fork()
	f.q = make([]float64, len(c.q))
	return &f
}

// fork is the knot with work space of its own.
func (k *knot) fork() *knot {
	f := *k
	f.g = k.g.fork()
	f.charges = k.charges.Fork(f.g.sys)
	f.charge, f.heat = make([]float64, len(k.charge)), make([]float64, len(k.heat))
	f.emission, f.t = make([]float64, len(k.emission)), make([]float64, len(k.t))
	f.absorbed = make([]float64, len(k.absorbed))
	f.reflect = nil
	if k.rad != nil {
		f.rad = k.rad.fork()
	}
	f.bonds = append([]bond(nil), k.bonds...)
	for i := range f.bonds {
		b := &f.bonds[i]
		b.t = nil
		if b.inside != nil {
			b.inside = b.inside.fork()
		}
	}
	f.fit()
	return &f
}

// fork is the same surfaces with room of their own.
func (r *radiant) fork() *radiant {
	f := *r
	f.ex = r.ex.Fork()
	f.net, f.warm = make([]float64, len(r.net)), make([]float64, len(r.warm))
	if r.sides != nil {
		s, with := *r.sides, r.sides.with.fork()
		s.with, s.taken = &with, make([]float64, len(r.sides.taken))
		f.sides = &s
	}
	return &f
}

// linear is how the miss changes with the unknowns.
func (c *coupled) linear(net func(k *knot, out []float64)) operator {
	return func(y, x []float64) {
		c.pass(x, nil, false)
		c.miss(y, x, false, net)
	}
}
