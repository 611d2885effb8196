package heat

import (
	"sync"
	"sync/atomic"

	"packrise/solver/harmonic"
)

// many right-hand sides are iterated on together: element k of vector v stands at many·k + v.
const many = harmonic.Many

// columns solves A x = f for every right-hand side and returns the solutions and z = fᵀ A⁻¹ f, symmetric and with an error quadratic in
// the residuals: fᵀ x + xᵀ (f − A x). Up to threads batches go on at the same time.
func (g *region) columns(f [][]float64, tol float64, threads int, stop func() bool) (x, z [][]float64, ok bool) {
	x, res := make([][]float64, len(f)), make([][]float64, len(f))
	batches := (len(f) + many - 1) / many
	var next atomic.Int64
	var failed atomic.Bool
	work := func(g *region) {
		b := newBatch(g)
		for k := int(next.Add(1)) - 1; k < batches; k = int(next.Add(1)) - 1 {
			first := k * many
			some := f[first:min(first+many, len(f))]
			if failed.Load() || !b.solve(some, tol, stop) {
				failed.Store(true)
				return
			}
			for v := range some {
				x[first+v], res[first+v] = b.column(b.x, v), b.column(b.r, v)
			}
		}
	}
	var all sync.WaitGroup
	for range min(threads, batches) - 1 {
		mine := g.fork()
		all.Go(func() { work(mine) })
	}
	work(g)
	all.Wait()
	if failed.Load() {
		return nil, nil, false
	}
	z, ok = products(f, x, res, threads, stop)
	return x, z, ok
}

// fork is a region that can be multiplied with beside g.
func (g *region) fork() *region {
	f := *g
	f.sys = g.sys.Fork()
	if g.border != nil {
		f.border = g.border.fork()
	}
	f.laws = make([]*law, len(g.laws))
	for i, l := range g.laws {
		if l != nil {
			mine := *l
			mine.buf = make([]float64, len(l.buf))
			f.laws[i] = &mine
		}
	}
	return &f
}

// products returns fᵢᵀ x_j + x_iᵀ res_j, which is symmetric.
func products(f, x, res [][]float64, threads int, stop func() bool) (z [][]float64, ok bool) {
	z = make([][]float64, len(f))
	for i := range f {
		z[i] = make([]float64, len(f))
	}
	var all sync.WaitGroup
	for t := range threads {
		all.Go(func() {
			for i := t; i < len(f) && !stop(); i += threads {
				for j := i; j < len(f); j++ {
					v := harmonic.Dot(f[i], x[j]) + harmonic.Dot(x[i], res[j])
					z[i][j], z[j][i] = v, v
				}
			}
		})
	}
	all.Wait()
	return z, !stop()
}

// iterate improves x until A x = f to tol, relative to f.
func (g *region) iterate(x, f []float64, tol float64, stop func() bool) (steps int, ok bool) {
	tmp := make([]float64, len(x))
	a := func(y, x []float64) { g.product(y, x, tmp) }
	if g.border != nil {
		return gmres(a, x, f, tol, stop)
	}
	if g.definite {
		if steps, ok = conjugate(a, x, f, tol, stop); steps >= 0 {
			return steps, ok
		}
	}
	return minres(a, x, f, tol, stop)
}
