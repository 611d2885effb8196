package heat

import (
	"sync"
	"sync/atomic"

	"packrise/solver/harmonic"
	"packrise/solver/outline"
)

// crowd multiplies with a bordered region for many vectors at once, which share every entry that is fetched.
type crowd struct {
	g       *region
	charges *harmonic.Charges
	flows   []*harmonic.Flow
	lot     *outline.Lot
	x, y    []float64   // many vectors side by side
	v       [][]float64 // what they send out
	room    vectors
}

// newCrowd works beside g.
func newCrowd(g *region, charges *harmonic.Charges) *crowd {
	c := &crowd{g: g.fork()}
	c.charges = charges.Fork(c.g.sys)
	c.lot = c.g.border.hand().lot()
	n := g.sys.Len()
	c.x, c.y, c.room.n = make([]float64, many*n), make([]float64, many*n), n
	for range many {
		c.flows, c.v = append(c.flows, c.charges.NewFlow()), append(c.v, make([]float64, n))
	}
	return c
}

// product is region.product for many vectors.
func (c *crowd) product(ys, xs [][]float64, _ []int) {
	g := c.g
	for k, x := range xs {
		copy(c.v[k], x)
		g.lift(c.v[k])
		for i, f := range c.v[k] {
			c.x[many*i+k] = f
		}
	}
	g.sys.ApplyMany(c.y, c.x)
	for k, y := range ys {
		for i := range y {
			y[i] = c.y[many*i+k]
		}
	}
	g.border.hand().bringMany(c.lot, g, nil, c.v[:len(xs)], ys, nil)
	for k, y := range ys {
		g.drop(y)
		for i, s := range g.sign {
			y[i] += s * xs[k][i]
		}
	}
}

// respond fills the flows with what comes of unit heats in the sources who and unknowns xs (nil for none).
func (c *crowd) respond(who []int, xs [][]float64) []*harmonic.Flow {
	g := c.g
	flows := c.flows[:len(who)]
	charges, vs, ys, means := make([][]float64, len(who)), make([][]float64, len(who)), make([][]float64, len(who)), make([][]float64, len(who))
	q := make([]float64, len(g.sources))
	for k, s := range who {
		f := flows[k]
		q[s] = 1
		x := c.v[k]
		clear(x)
		if xs != nil {
			x = xs[k]
		}
		var v []float64
		charges[k], v = g.outgoing(q, x)
		q[s] = 0
		copy(f.X, v)
		for i, p := range charges[k] {
			f.Q[i] = g.c2() * p
		}
		vs[k], ys[k], means[k] = f.X, f.Y, f.Mean
	}
	c.charges.SendMany(flows)
	c.charges.ReceiveMany(flows)
	g.border.hand().bringMany(c.lot, g, charges, vs, ys, means)
	return flows
}

// column is what the heat of one source does: the solution, what of its right-hand side is left, and the temperatures of all sources.
type column struct{ x, rest, t []float64 }

// columns solves for unit heats in the sources first … last−1, at most many.
func (c *crowd) columns(first, last int, tol float64, stop func() bool) ([]column, bool) {
	g := c.g
	who := make([]int, 0, many)
	f := make([][]float64, 0, many)
	for s := first; s < last; s++ {
		who = append(who, s)
	}
	for _, flow := range c.respond(who, nil) {
		y := append([]float64(nil), flow.Y...)
		g.drop(y)
		scale(y, -1)
		f = append(f, y)
	}
	bases, ok := gmresMany(c.product, f, tol, &c.room, stop)
	if !ok {
		return nil, false
	}
	out, xs := make([]column, len(who)), make([][]float64, len(who))
	for k, b := range bases {
		xs[k] = make([]float64, g.sys.Len())
		b.improve(xs[k])
		rest := f[k]
		clear(rest)
		b.rest(rest)
		out[k] = column{x: xs[k], rest: rest}
		c.room.put(b.basis...)
	}
	for k, flow := range c.respond(who, xs) {
		out[k].t = g.rises(who[k], flow.Mean, flow.Y)
	}
	return out, true
}

// rises are the temperatures of all sources for the unit heat of source s, whose means and incoming amplitudes are given.
func (g *region) rises(s int, mean, y []float64) []float64 {
	t := make([]float64, len(g.sources))
	for k := range t {
		src := &g.sources[k]
		t[k] = mean[src.piece] + dot(src.u, y[g.sys.Offset(src.piece):])/g.c2() + g.ownTerm(src, &g.sources[s])
	}
	return t
}

// inBatches calls work for 0 … n−1, many at a time, on up to threads goroutines that each have a worker; false if one of them failed.
func inBatches[W any](n, threads int, worker func() W, work func(w W, first, last int) bool) bool {
	var next atomic.Int64
	var failed atomic.Bool
	one := func() {
		w := worker()
		for k := int(next.Add(1)-1) * many; k < n && !failed.Load(); k = int(next.Add(1)-1) * many {
			if !work(w, k, min(k+many, n)) {
				failed.Store(true)
			}
		}
	}
	var all sync.WaitGroup
	for range min(threads, (n+many-1)/many) - 1 {
		all.Go(one)
	}
	one()
	all.Wait()
	return !failed.Load()
}
