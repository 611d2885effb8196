package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// Harmonics that a part neither reflects nor lets pass are left out below this reflection.
const deafT = 1e-12

// maxSigma ends the sum for what the wall reflects besides the images.
const maxSigma = 600

// assemble writes the region's system, cables first. stop is asked between pieces of work; it reports whether all was done.
func (g *region) assemble(cut float64, threads int, stop func() bool) bool {
	g.sources = nil
	g.laws = make([]*law, len(g.pieces))
	g.definite = true
	discs := make([]harmonic.Disc, len(g.pieces))
	for i := range g.pieces {
		c := &g.pieces[i]
		if c.inside != nil {
			if !c.inside.assemble(cut, threads, stop) {
				return false
			}
			var ok bool
			if c.inside.opens() {
				g.laws[i] = c.inside.openLaw()
			} else if g.laws[i], ok = c.inside.eliminate(c, threads, stop); !ok {
				return false
			}
		}
		discs[i] = g.disc(i)
		g.addSources(i)
	}
	if g.border == nil {
		g.circle = g.newCircle()
	}
	g.sys = harmonic.NewSystem(discs, g.circle, g.weights(), cut)
	g.setSigns()
	if g.border != nil {
		g.border.hand().threads = threads
		if !g.border.write(g, stop) {
			return false
		}
	}
	return g.sys.Build(threads, stop)
}

// weights tells how much the jacket of a cable lets each harmonic through.
func (g *region) weights() []float64 {
	w := make([]float64, g.port)
	for n := range w {
		p := g.wall.Port(n + 1)
		w[n] = math.Max(math.Abs(p.Tau), math.Abs(p.TauIn))
	}
	if g.radiates() && g.border == nil {
		for n := range maxRing {
			if n == len(w) {
				w = append(w, 0)
			}
			w[n] = math.Max(w[n], wallShare)
		}
	}
	return w
}

// disc is piece i as the system sees it: a part's scales are the roots of its reflections, a cable's are one.
func (g *region) disc(i int) harmonic.Disc {
	c := &g.pieces[i]
	d := harmonic.Disc{C: c.at, A: c.a, S: make([]float64, g.orders[i])}
	for n := range d.S {
		if l := g.laws[i]; l != nil && 2*n < l.n {
			d.S[n] = 1
			continue
		}
		if t := c.stack.Port(n + 1).T; math.Abs(t) > deafT {
			d.S[n] = math.Sqrt(math.Abs(t))
		}
		if g.radiates() {
			d.S[n] = math.Max(d.S[n], leastScale)
		}
	}
	return d
}

// setSigns fills sign and definite.
func (g *region) setSigns() {
	g.sign = make([]float64, g.sys.Len())
	g.definite = true
	for i := range g.pieces {
		o, first := g.sys.Offset(i), 0
		if l := g.laws[i]; l != nil {
			copy(g.sign[o:], l.sign)
			g.definite = g.definite && l.definite
			first = l.n / 2
		}
		for n := first; n < g.orders[i]; n++ {
			s := 1.0
			if t := g.pieces[i].stack.Port(n + 1).T; t > 0 {
				s = -1
				g.definite = g.definite && t < 1e-6
			}
			g.sign[o+2*n], g.sign[o+2*n+1] = s, s
		}
	}
}

func (g *region) addSources(i int) {
	c := &g.pieces[i]
	if c.source {
		g.sources = append(g.sources, source{piece: i, part: c.part, own: -1})
	}
	if c.inside == nil {
		return
	}
	for s := range c.inside.sources {
		g.sources = append(g.sources, source{piece: i, part: c.inside.sources[s].part, own: s, u: g.laws[i].u[s]})
	}
}

// newCircle describes the round wall to the system.
func (g *region) newCircle() *harmonic.Circle {
	w := &g.wall
	first := w.Outer
	if len(w.Rings) > 0 {
		first = harmonic.End{Kind: harmonic.Medium, V: w.Rings[0].K}
	}
	c := &harmonic.Circle{R: g.r}
	switch {
	case first.Kind == harmonic.Medium:
		c.RhoInf = (g.k - first.V) / (g.k + first.V)
	case first.Kind == harmonic.Held, math.IsInf(first.V, 1):
		c.RhoInf = -1
	default:
		c.RhoInf = 1
	}
	for n := 1; n <= maxSigma; n++ {
		s := w.Port(n).Rho - c.RhoInf
		if math.Abs(s) < 1e-6 {
			break
		}
		c.Sigma = append(c.Sigma, s)
	}
	if g.rest != nil {
		c.Mix = g.rest.mix
	}
	return c
}

// lift turns unknowns into the system's scaled amplitudes, in place; drop is its adjoint.
func (g *region) lift(x []float64) {
	for i, l := range g.laws {
		if l != nil {
			l.lift(x[g.sys.Offset(i):][:l.n])
		}
	}
}

func (g *region) drop(y []float64) {
	for i, l := range g.laws {
		if l != nil {
			l.drop(y[g.sys.Offset(i):][:l.n])
		}
	}
}

// lifts tells whether lift and drop do anything.
func (g *region) lifts() bool {
	for _, l := range g.laws {
		if l != nil {
			return true
		}
	}
	return false
}

// product sets y = A x, using tmp of the same length.
func (g *region) product(y, x, tmp []float64) {
	copy(tmp, x)
	g.lift(tmp)
	g.sys.Apply(y, tmp)
	if g.border != nil {
		g.border.bring(g, nil, tmp, false, y, nil)
	}
	g.drop(y)
	for i, s := range g.sign {
		y[i] += s * x[i]
	}
}
