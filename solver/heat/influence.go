package heat

import (
	"context"
	"sync"
	"sync/atomic"

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

// coefficientsBorder is coefficients within a border, column by column. Rises are corrected by the residuals as in columns, the adjoint solutions
// being the solutions but for the small asymmetry of the discretised border, which is averaged away: reciprocity is exact.
func (m *Model) coefficientsBorder(ctx context.Context) ([][]float64, bool) {
	g := m.top
	n := len(g.sources)
	x, res, k := make([][]float64, n), make([][]float64, n), make([][]float64, n)
	var next atomic.Int64
	var failed atomic.Bool
	work := func(g *region) {
		for s := int(next.Add(1)) - 1; s < n && !failed.Load(); s = int(next.Add(1)) - 1 {
			q := make([]float64, n)
			q[s] = 1
			f := g.loadColumn(q, false)
			x[s], res[s] = make([]float64, len(f)), make([]float64, len(f))
			if _, ok := g.iterate(x[s], f, m.set.Accuracy.rough(), ended(ctx)); !ok {
				failed.Store(true)
				return
			}
			g.product(res[s], x[s], make([]float64, len(f)))
			for i, v := range f {
				res[s][i] = v - res[s][i]
			}
			k[s] = g.temperatures(q, x[s], false)
		}
	}
	var all sync.WaitGroup
	for range min(m.set.threads(), n) - 1 {
		mine := g.fork()
		all.Go(func() { work(mine) })
	}
	work(g)
	all.Wait()
	if failed.Load() {
		return nil, false
	}
	for i := range k {
		for j := range i + 1 {
			v := (k[i][j] + k[j][i] - (harmonic.Dot(x[i], res[j])+harmonic.Dot(x[j], res[i]))/g.c2()) / 2
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
