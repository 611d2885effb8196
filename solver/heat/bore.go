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
	k, ok := m.coefficients(ctx)
	if !ok {
		return false
	}
	h := len(m.held)
	a, b := mat.NewDense(h, h, nil), mat.NewVecDense(h, nil)
	for i, s := range m.held {
		v := m.p.Parts[m.top.sources[s].part].Fixed - m.p.Wall.Ambient
		for t, f := range q {
			if m.p.Parts[m.top.sources[t].part].Core == Metal {
				v -= k[s][t] * f
			}
		}
		b.SetVec(i, v)
		for j, t := range m.held {
			a.Set(i, j, k[s][t])
		}
	}
	var x mat.VecDense
	if err := x.SolveVec(a, b); err != nil && x.IsEmpty() {
		return true
	}
	for i, s := range m.held {
		q[s] = x.AtVec(i)
	}
	return true
}

// coefficients returns the rises of all sources over ambient for 1 W/m in each, held bores being left to float.
func (m *Model) coefficients(ctx context.Context) ([][]float64, bool) {
	if m.bores != nil {
		return m.bores, true
	}
	g := m.top
	f := make([][]float64, len(g.sources))
	for s := range f {
		f[s] = g.sourceColumn(s)
	}
	_, z, ok := g.columns(f, 1e-4, ended(ctx))
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
	m.bores = k
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
