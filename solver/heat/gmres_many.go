package heat

// stack of vectors to use again.
type vectors struct {
	n    int
	free [][]float64
}

func (v *vectors) get() []float64 {
	if k := len(v.free) - 1; k >= 0 {
		x := v.free[k]
		v.free = v.free[:k]
		return x
	}
	return make([]float64, v.n)
}

func (v *vectors) put(x ...[]float64) { v.free = append(v.free, x...) }

// gmresMany is gmres for up to many right-hand sides at once, from nought. product multiplies with the vectors xs, which belong to the right-hand
// sides who. It returns a basis for each, whose vectors came from room; bases that are full are left as they are.
func gmresMany(product func(ys, xs [][]float64, who []int), f [][]float64, tol float64, room *vectors, stop func() bool) ([]*krylov, bool) {
	all := make([]*krylov, len(f))
	end := make([]float64, len(f))
	var who []int
	for v := range f {
		beta := norm(f[v])
		end[v] = tol * beta
		r := room.get()
		clear(r)
		if beta > 0 {
			axpy(r, 1/beta, f[v])
			who = append(who, v)
		}
		all[v] = &krylov{basis: [][]float64{r}, g: []float64{beta}}
	}
	for len(who) > 0 {
		if stop() {
			return nil, false
		}
		var xs, ys [][]float64
		for _, v := range who {
			xs, ys = append(xs, all[v].basis[len(all[v].h)]), append(ys, room.get())
		}
		product(ys, xs, who)
		var rest []int
		for k, v := range who {
			a := all[v]
			if a.add(ys[k]) && a.residual() > end[v] && len(a.h) < maxBasis {
				rest = append(rest, v)
			}
		}
		who = rest
	}
	return all, true
}

// rest adds the residual to r: what of the right-hand side the basis does not reach.
func (k *krylov) rest(r []float64) {
	n := len(k.h)
	if len(k.basis) <= n { // nothing is left
		return
	}
	c := make([]float64, n+1)
	c[n] = k.g[n]
	for i := n - 1; i >= 0; i-- {
		c[i], c[i+1] = -k.sn[i]*c[i+1], k.cs[i]*c[i+1]
	}
	for i, f := range c {
		axpy(r, f, k.basis[i])
	}
}
