package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// knot is a region in the coupled problem of conduction and radiation. Unknowns are, besides the amplitudes x that conduction has, the net emissions
// of the patches. With e the scaled harmonics of a piece's emission, what its inside feels is c = β − e, it sends out δ = (its answer to c) − e,
// and its monopole is its heat less its emission: so the matrix of conduction serves as it is. The same holds within a round wall, which takes up
// ω for itself: it answers to A + ω and sends back ω more. A cable whose inside has surfaces that radiate is not eliminated: its inside is a
// knot of its own.
type knot struct {
	g       *region
	rad     *radiant // nil where nothing radiates
	charges *harmonic.Charges
	flow    *harmonic.Flow
	bonds   []bond
	x0, e0  int       // where its unknowns begin
	unit    []float64 // W/m of each unknown emission

	charge   []float64 // W/m of each piece
	heat     []float64 // W/m made in each piece
	emission []float64 // W/m of each patch
	t        []float64 // of each patch, above the common zero
	absorbed []float64 // scaled harmonics of what a round wall takes up
	reflect  []float64 // ρ_n of a round wall
	tau      []float64
	level    float64
}

// bond is a piece in a knot.
type bond struct {
	t      []float64 // reflections, n = 1 …, as many as its emission or its order has
	s      []float64 // the system's scales
	first  int       // harmonics that an eliminated cable or an open one answers to
	e, c   []float64 // scaled emission and what the inside feels
	inside *knot     // of an open cable
	tau    []float64 // of its jacket
	in     []float64
	omega  []complex128
	q      []float64 // heats of the sources inside
}

// newKnot prepares region g, whose system is written.
func (m *Model) newKnot(g *region, old *knot) *knot {
	k := &knot{g: g, charges: g.sys.Charges()}
	if g.radiates() {
		var before *radiant
		if old != nil {
			before = old.rad
		}
		k.rad = m.newRadiant(g, before)
		k.emission, k.t = make([]float64, len(k.rad.area)), make([]float64, len(k.rad.area))
		k.absorbed = make([]float64, 2*k.rad.wall.harmonics)
	}
	k.bonds = make([]bond, len(g.pieces))
	for i := range g.pieces {
		if c := &g.pieces[i]; c.inside != nil && c.inside.opens() {
			var before *knot
			if old != nil && i < len(old.bonds) {
				before = old.bonds[i].inside
			}
			k.bonds[i].inside = m.newKnot(c.inside, before)
		}
	}
	k.fit()
	return k
}

// fit works out what depends on orders.
func (k *knot) fit() {
	g := k.g
	k.flow = k.charges.NewFlow()
	k.flow.Omega = make([]complex128, g.sys.Top())
	k.charge, k.heat = make([]float64, len(g.pieces)), make([]float64, len(g.pieces))
	k.reflect = k.reflect[:0]
	for n := range g.sys.Top() {
		k.reflect = append(k.reflect, g.wall.Port(n+1).Rho)
	}
	longest := 2 * g.sys.Top()
	for i := range g.pieces {
		b, c := &k.bonds[i], &g.pieces[i]
		b.s = g.sys.Disc(i).S
		rim := 0
		if k.rad != nil {
			rim = k.rad.rims[i].harmonics
		}
		most := max(rim, g.orders[i])
		b.t = b.t[:0]
		for n := range most {
			b.t = append(b.t, c.stack.Port(n+1).T)
		}
		b.e, b.c = make([]float64, 2*rim), make([]float64, 2*g.orders[i])
		longest = max(longest, 2*most)
		if l := g.laws[i]; l != nil {
			b.first = l.n / 2
		}
		if b.inside != nil {
			b.tau, b.in = nil, nil
			for n := range b.first {
				p := c.stack.Port(n + 1)
				b.tau, b.in = append(b.tau, p.Tau), append(b.in, p.TauIn)
			}
			b.omega = make([]complex128, b.inside.g.sys.Top())
			b.q = make([]float64, len(b.inside.g.sources))
		}
	}
	k.tau = make([]float64, longest)
	k.units()
}

// units makes an emission spread over a piece as large as the temperatures that it makes.
func (k *knot) units() {
	if k.rad == nil {
		return
	}
	r := k.rad
	k.unit = make([]float64, len(r.area))
	for i := range len(r.first) - 1 {
		whole := 0.0
		for p := r.first[i]; p < r.first[i+1]; p++ {
			whole += r.area[p]
		}
		for p := r.first[i]; p < r.first[i+1]; p++ {
			k.unit[p] = math.Sqrt(r.area[p]/whole) / k.g.c2()
		}
	}
}

// inherit takes over amplitudes and emissions from a knot of the same pieces, whose unknowns are old; false if it is none.
func (k *knot) inherit(o *knot, z, old []float64) bool {
	if len(o.bonds) != len(k.bonds) || (o.rad == nil) != (k.rad == nil) {
		return false
	}
	for i := range k.bonds {
		b, a := &k.bonds[i], &o.bonds[i]
		if b.first != a.first || (b.inside == nil) != (a.inside == nil) {
			return false
		}
		x, y := z[k.x0+k.g.sys.Offset(i):][:len(b.c)], old[o.x0+o.offset(i):][:len(a.c)]
		copy(x, y)
		if b.inside != nil && !b.inside.inherit(a.inside, z, old) {
			return false
		}
	}
	if k.rad == nil {
		return true
	}
	for i := range len(k.bonds) + 1 {
		from := k.rad.first[i]
		was := o.rad.emissions(i, o, old)
		for p, v := range spread(o.rad.cuts(i), was, k.rad.cuts(i)) {
			z[k.e0+from+p] = v / k.unit[from+p]
		}
	}
	return true
}

// offset is where the unknowns of piece i began when the knot was last fitted.
func (k *knot) offset(i int) int {
	n := 0
	for j := range i {
		n += len(k.bonds[j].c)
	}
	return n
}

// cuts are the ends of the patches of piece i, or of the wall.
func (r *radiant) cuts(i int) []float64 {
	switch {
	case i < len(r.discs):
		return r.discs[i].Cuts
	case r.sides != nil:
		return r.ends
	}
	return r.wall.cuts
}

// emissions are those (W/m) of piece i at unknowns z of knot k.
func (r *radiant) emissions(i int, k *knot, z []float64) []float64 {
	e := make([]float64, r.first[i+1]-r.first[i])
	for p := range e {
		e[p] = k.unit[r.first[i]+p] * z[k.e0+r.first[i]+p]
	}
	return e
}

// spread shares what lies evenly between each two of the old cuts out between new ones of the same range.
func spread(old, what, cuts []float64) []float64 {
	out := make([]float64, len(cuts)-1)
	end := old[len(old)-1] / cuts[len(cuts)-1] // lengths may differ by rounding
	j := 0
	for k := range out {
		a, b := cuts[k]*end, cuts[k+1]*end
		for j > 0 && old[j] > a {
			j--
		}
		for ; j < len(what); j++ {
			lo, hi := math.Max(a, old[j]), math.Min(b, old[j+1])
			if hi > lo {
				out[k] += what[j] * (hi - lo) / (old[j+1] - old[j])
			}
			if old[j+1] >= b {
				break
			}
		}
	}
	return out
}

// number gives the unknowns their places: all amplitudes first.
func (k *knot) number(x int) int {
	k.x0 = x
	x += k.g.sys.Len()
	for i := range k.bonds {
		if in := k.bonds[i].inside; in != nil {
			x = in.number(x)
		}
	}
	return x
}

func (k *knot) numberPatches(e int) int {
	k.e0 = e
	if k.rad != nil {
		e += len(k.unit)
	}
	for i := range k.bonds {
		if in := k.bonds[i].inside; in != nil {
			e = in.numberPatches(e)
		}
	}
	return e
}

// each calls f for a knot and all those inside it.
func (k *knot) each(f func(*knot)) {
	f(k)
	for i := range k.bonds {
		if in := k.bonds[i].inside; in != nil {
			in.each(f)
		}
	}
}
