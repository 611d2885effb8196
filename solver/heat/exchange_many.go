package heat

import "packrise/solver/outline"

// hand is the exchange itself.
func (e *exchange) hand() *exchange { return e }

// lot makes room for many right-hand sides.
func (e *exchange) lot() *outline.Lot { return outline.NewLot(e.discs, e.with.Len()) }

// fillMany is fill for many vectors.
func (e *exchange) fillMany(l *outline.Lot, g *region, charges, vs [][]float64) {
	for i := range e.discs {
		src := l.Src[i]
		s, o := g.sys.Disc(i).S, g.sys.Offset(i)
		for k, v := range vs {
			src[k] = 0
			if charges != nil {
				src[k] = charges[k][i]
			}
			for n, f := range s {
				f *= rootsOf(n + 1)
				at := outline.Lanes*(1+2*n) + k
				src[at], src[at+outline.Lanes] = f*v[o+2*n], f*v[o+2*n+1]
			}
		}
	}
}

// fetchMany is fetch for many vectors; means may be nil.
func (e *exchange) fetchMany(l *outline.Lot, g *region, ys, means [][]float64) {
	e.with.IncomingMany(l)
	for i := range e.discs {
		b := l.In[i]
		s, o := g.sys.Disc(i).S, g.sys.Offset(i)
		for k, y := range ys {
			for n, f := range s {
				f /= rootsOf(n + 1)
				at := outline.Lanes*(1+2*n) + k
				y[o+2*n] += f * b[at]
				y[o+2*n+1] -= f * b[at+outline.Lanes]
			}
			if means != nil {
				means[k][i] += b[k]
			}
		}
	}
}

// bringMany is bring for many vectors without ground.
func (e *exchange) bringMany(l *outline.Lot, g *region, charges, vs, ys, means [][]float64) {
	e.fillMany(l, g, charges, vs)
	e.with.RespondMany(l)
	e.fetchMany(l, g, ys, means)
}
