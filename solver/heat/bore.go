package heat

import (
	"context"

	"gonum.org/v1/gonum/mat"
)

// holdBores sets the heats of the bores that are held at a temperature so that their temperatures come out.
func (m *Model) holdBores(ctx context.Context, q []float64) bool {
	if len(m.held) == 0 {
		return true
	}
	if !m.prepareBores(ctx) {
		return false
	}
	h := len(m.held)
	a, b := mat.NewDense(h, h, nil), mat.NewVecDense(h, nil)
	for i, s := range m.held {
		v := m.p.Parts[m.top.sources[s].part].Fixed - m.floor[s]
		for t, f := range q {
			v -= m.rises[i][t] * f // reciprocity
		}
		b.SetVec(i, v)
		for j, t := range m.held {
			a.Set(i, j, m.rises[i][t]/2+m.rises[j][s]/2)
		}
	}
	var x mat.VecDense
	if err := x.SolveVec(a, b); err != nil && x.IsEmpty() {
		return true // no bore can give or take heat: impossible for a checked problem
	}
	for i, s := range m.held {
		q[s] = x.AtVec(i)
	}
	return true
}

// prepareBores solves for 1 W/m in each held bore, and for no heat at all.
func (m *Model) prepareBores(ctx context.Context) bool {
	if m.rises != nil {
		return true
	}
	rises := make([][]float64, len(m.held))
	for len(m.columns) < len(m.held) {
		m.columns = append(m.columns, nil)
	}
	for i, s := range m.held {
		var ok bool
		if m.columns[i], rises[i], ok = m.unit(ctx, s, m.columns[i]); !ok {
			return false
		}
	}
	var ok bool
	if m.floorX, m.floor, ok = m.unit(ctx, -1, m.floorX); !ok {
		return false
	}
	m.rises = rises
	return true
}

// unit solves for 1 W/m in source s, or for no heat with s −1, from x, and returns the temperatures of all sources: rises, or absolute for
// no heat.
func (m *Model) unit(ctx context.Context, s int, x []float64) (_, t []float64, ok bool) {
	g := m.top
	q := make([]float64, len(g.sources))
	_, _, tol := m.set.Accuracy.settings()
	if len(x) != g.sys.Len() {
		x = make([]float64, g.sys.Len())
	}
	if s < 0 && g.border == nil {
		for k := range q {
			q[k] = m.p.Wall.Ambient
		}
		return x, q, true
	}
	if s >= 0 {
		q[s] = 1
	}
	if _, ok = g.iterate(x, g.loadColumn(q, s < 0), tol, ended(ctx)); !ok {
		return x, nil, false
	}
	t = g.temperatures(q, x, s < 0)
	if g.border == nil {
		for k := range t {
			t[k] += m.outsideR()
		}
	}
	return x, t, true
}

// coefficients returns the rises of all sources for 1 W/m in each, held bores being left to float.
func (m *Model) coefficients(ctx context.Context) ([][]float64, bool) {
	g := m.top
	if g.border != nil {
		return m.coefficientsRect(ctx)
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

// coefficientsRect goes column by column; the small asymmetry of the discretised wall is averaged away, reciprocity being exact.
func (m *Model) coefficientsRect(ctx context.Context) ([][]float64, bool) {
	n := len(m.top.sources)
	k := make([][]float64, n)
	for s := range k {
		var ok bool
		if _, k[s], ok = m.unit(ctx, s, nil); !ok {
			return nil, false
		}
	}
	for i := range k {
		for j := range i {
			v := (k[i][j] + k[j][i]) / 2
			k[i][j], k[j][i] = v, v
		}
	}
	return k, true
}

// Influence returns K[i][j] in K per W/m: the rise of part i's Core temperature for 1 W/m made in part j; rows and columns of parts that
// aren't Metal are nil.
func (m *Model) Influence(ctx context.Context) ([][]float64, Status) {
	out := make([][]float64, len(m.p.Parts))
	if m.top == nil {
		m.bare.influence(out)
		return out, Converged
	}
	if !m.prepare(ctx) {
		return out, Cancelled
	}
	k, ok := m.coefficients(ctx)
	if !ok {
		return out, Cancelled
	}
	k = m.reduce(k)
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
	r := m.Solve(ctx, make([]float64, len(m.p.Parts)))
	return r.Core, r.Status
}
