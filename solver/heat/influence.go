package heat

import (
	"context"

	"packrise/solver/harmonic"
)

// coefficients returns the rises of all sources for 1 W/m in each, held bores being left to float.
func (m *Model) coefficients(ctx context.Context) ([][]float64, bool) {
	g := m.top
	if g.border != nil {
		return m.coefficientsBorder(ctx)
	}
	f := make([][]float64, len(g.sources))
	for s := range f {
		f[s] = g.sourceColumn(s)
	}
	_, z, ok := g.columns(f, m.set.Accuracy.rough(), m.set.threads(), ended(ctx))
	if !ok {
		return nil, false
	}
	k := g.ownMatrix(z)
	r := m.outsideR()
	for i := range k {
		for j := range k[i] {
			k[i][j] += r
		}
	}
	return k, true
}

// coefficientsBorder is coefficients within a border. Rises are corrected by the residuals as in columns, the adjoint solutions being the
// solutions but for the small asymmetry of the discretised border, which is averaged away: reciprocity is exact.
func (m *Model) coefficientsBorder(ctx context.Context) ([][]float64, bool) {
	g := m.top
	n := len(g.sources)
	all, charges := make([]column, n), g.sys.Charges()
	ok := inBatches(n, m.set.threads(), func() *crowd { return newCrowd(g, charges) }, func(c *crowd, first, last int) bool {
		some, ok := c.columns(first, last, m.set.Accuracy.rough(), ended(ctx))
		copy(all[first:], some)
		return ok
	})
	if !ok {
		return nil, false
	}
	k := make([][]float64, n)
	for i := range k {
		k[i] = make([]float64, n)
	}
	for i := range k {
		if ctx.Err() != nil {
			return nil, false
		}
		a := &all[i]
		for j := range i + 1 {
			b := &all[j]
			v := (a.t[j] + b.t[i] - (harmonic.Dot(a.x, b.rest)+harmonic.Dot(b.x, a.rest))/g.c2()) / 2
			k[i][j], k[j][i] = v, v
		}
	}
	return k, true
}

// Influence returns K[i][j] in K per W/m: the rise of part i's Core temperature for 1 W/m made in part j; rows and columns of parts that
// aren't Metal are nil. Where surfaces radiate it is the tangent at the last solution, or at the Problem's own heats if there is none.
func (m *Model) Influence(ctx context.Context) ([][]float64, Status) {
	out := make([][]float64, len(m.p.Parts))
	if m.form != nil {
		return out, m.form.influence(ctx, out)
	}
	if m.contours != nil {
		return out, m.contourInfluence(ctx, out)
	}
	if m.top == nil {
		m.bare.influence(out)
		return out, Converged
	}
	k, ok := m.matrix(ctx)
	if !ok {
		return out, Cancelled
	}
	for i, s := range m.top.sources {
		if m.p.Parts[s.part].Core != Metal {
			continue
		}
		row := make([]float64, len(m.p.Parts))
		for j, t := range m.top.sources {
			row[t.part] = k[i][j]
		}
		out[s.part] = row
	}
	return out, Converged
}

// matrix returns the rises of all sources for 1 W/m in each, held bores taking part; it is kept until something moves.
func (m *Model) matrix(ctx context.Context) ([][]float64, bool) {
	if m.kept != nil {
		return m.kept, true
	}
	if !m.prepare(ctx) {
		return nil, false
	}
	if m.top.opens() {
		k, ok := m.tangent(ctx)
		m.kept = k
		return k, ok
	}
	k, ok := m.coefficients(ctx)
	if ok {
		m.kept = m.reduce(k)
	}
	return m.kept, ok
}

// reduce takes out the held bores: K_mm − K_mh K_hh⁻¹ K_hm.
func (m *Model) reduce(k [][]float64) [][]float64 {
	n := len(k)
	r := make([][]float64, n)
	for i := range r {
		r[i] = append([]float64(nil), k[i]...)
	}
	for _, h := range m.held { // one step of elimination per bore
		p := append([]float64(nil), r[h]...)
		for i := range r {
			f := r[i][h] / p[h]
			for j := range r[i] {
				r[i][j] -= f * p[j]
			}
		}
	}
	return r
}

// Ground returns the Core temperatures (K above the common zero) with all heats zero: Ambient, unless sides or bores are held at other
// temperatures.
func (m *Model) Ground(ctx context.Context) ([]float64, Status) {
	load := m.x
	m.x = m.ground
	r := m.Solve(ctx, make([]float64, len(m.p.Parts)))
	m.x, m.ground = load, m.x
	return r.Core, r.Status
}
