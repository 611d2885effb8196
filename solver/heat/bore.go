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
	if s < 0 && g.border == nil && g.rest == nil {
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
		add := m.outsideR()
		if s < 0 {
			add = m.p.Wall.Ambient
		}
		for k := range t {
			t[k] += add
		}
	}
	return x, t, true
}
