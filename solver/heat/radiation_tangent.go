package heat

import "context"

// tangentTolerance is the residual of a column of the influence matrix of a section that radiates.
const tangentTolerance = 1e-5

// Radiates tells whether surfaces radiate to each other in the section.
func (m *Model) Radiates() bool { return m.top != nil && m.top.opens() }

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
	c := m.glow
	if c == nil || c.cores == nil || c.far() > 0 {
		var heats []float64
		if c != nil {
			heats = c.heats
		}
		if heats == nil {
			heats = m.metals(m.heats(nil))
		}
		if m.solveCoupled(ctx, heats).Status == Cancelled {
			return nil, false
		}
		c = m.glow
	}
	n := len(m.top.sources)
	held := make([]bool, n)
	for _, s := range m.held {
		held[s] = true
	}
	k := make([][]float64, n)
	for s := range k {
		k[s] = make([]float64, n)
	}
	for s := range n {
		if held[s] {
			continue
		}
		rise, ok := c.column(ctx, s)
		if !ok {
			return nil, false
		}
		for i, t := range rise {
			if !held[i] {
				k[i][s] = t
			}
		}
	}
	return k, true
}

// column is the rise of all sources for 1 W/m more in source s.
func (c *coupled) column(ctx context.Context, s int) (rise []float64, ok bool) {
	q := make([]float64, len(c.q))
	q[s] = 1
	z, r := make([]float64, len(c.z)), make([]float64, len(c.z))
	c.pass(z, q, false)
	c.miss(r, z, false, (*knot).change)
	for i := range r {
		r[i] = -r[i]
	}
	if _, ok = gmres(c.linear((*knot).change), z, r, tangentTolerance, ended(ctx)); !ok {
		return nil, false
	}
	c.pass(z, q, false)
	rise = make([]float64, len(q))
	for i := range rise {
		rise[i] = c.top.core(i, c.q)
	}
	return rise, true
}

// linear is how the miss changes with the unknowns.
func (c *coupled) linear(net func(k *knot, out []float64)) operator {
	return func(y, x []float64) {
		c.pass(x, nil, false)
		c.miss(y, x, false, net)
	}
}
