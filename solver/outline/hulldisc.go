package outline

import (
	"cmp"
	"math"
	"slices"

	"gonum.org/v1/gonum/floats"
)

// hullDisc is a part with what it exchanges with the hull. Densities (and cells) stand in an order of its own, those that most harmonics
// reach first, so that each harmonic has to do with the first so many of them.
type hullDisc struct {
	Disc
	mirror Mirror
	order  []int // density or cell, as the system counts them
	first  []int // per panel, where it begins in this order
	reach  []int // per panel, the harmonics that count
	// For q or b_0, Re d_1 or Re b_1, Im … in turn: what a unit of it sends to the conditions, and (minus) to the means of T; and what the densities send
	// to it.
	send, warm, receive [][]float64
}

// link fills the exchange of disc i with all panels.
func (s *HullSystem) link(i int, k *known) {
	d := &s.discs[i]
	if k.disc[i] && k.all {
		s.discs[i] = k.old.discs[i]
		return
	}
	d.reach, d.first = make([]int, len(s.panels)), make([]int, len(s.panels))
	near := make([]int, len(s.panels))
	size := make([]int, 1+2*d.M)
	for j := range s.panels {
		b := &s.panels[j]
		near[j], d.reach[j] = j, d.M
		if b.disc != i {
			if r := b.distance(d.C); r > 1.0001*d.A {
				d.reach[j] = min(d.M, 1+int(math.Log(decayed)/math.Log(d.A/r)))
			}
		}
		for c := range 1 + 2*d.reach[j] {
			size[c] += b.p
		}
	}
	slices.SortStableFunc(near, func(a, b int) int { return cmp.Compare(d.reach[b], d.reach[a]) })
	d.send, d.warm, d.receive = columns(size), columns(size), columns(size)
	d.order = make([]int, 0, s.n)
	var x exchange
	for _, j := range near {
		b := &s.panels[j]
		d.first[j] = len(d.order)
		for l := range b.p {
			d.order = append(d.order, b.dof+l)
		}
		if k.disc[i] && k.panel[j] >= 0 {
			d.copy(&k.old.discs[i], j, k.panel[j], b.p)
			continue
		}
		x.fill(&d.Disc, b, s.hull.MediumK, d.reach[j])
		d.put(&x, j, b.p, s.scaleOf(&s.pieces[b.piece]), s.film(&s.pieces[b.piece]))
	}
}

// copy takes over what an older d exchanged with panel old, which is now j.
func (d *hullDisc) copy(o *hullDisc, j, old, p int) {
	to, from := d.first[j], o.first[old]
	for c := range 1 + 2*d.reach[j] {
		copy(d.send[c][to:to+p], o.send[c][from:])
		copy(d.warm[c][to:to+p], o.warm[c][from:])
		copy(d.receive[c][to:to+p], o.receive[c][from:])
	}
}

// put stores the exchange with panel j.
func (d *hullDisc) put(x *exchange, j, p int, scale, film float64) {
	cols := 1 + 2*d.reach[j]
	for l := range p {
		at := d.first[j] + l
		for c := range cols {
			flux, temp := x.flux[l*cols+c], x.temp[l*cols+c]
			d.send[c][at] = scale * (2*flux + film*temp)
			d.warm[c][at] = temp
			d.receive[c][at] = x.receive[l*cols+c]
		}
	}
}

// columns makes slices of those lengths.
func columns(size []int) [][]float64 {
	total := 0
	for _, n := range size {
		total += n
	}
	all := make([]float64, total)
	out := make([][]float64, len(size))
	for i, n := range size {
		out[i], all = all[:n:n], all[n:]
	}
	return out
}

// out adds to y what d sends into the rows of cols, for sources v; tmp has room for as many numbers as y.
func (d *hullDisc) out(y []float64, cols [][]float64, v, tmp []float64) {
	tmp = tmp[:len(d.order)]
	clear(tmp)
	for c, f := range v[:min(len(v), len(cols))] {
		if f != 0 {
			floats.AddScaled(tmp[:len(cols[c])], f, cols[c])
		}
	}
	for k, i := range d.order {
		y[i] += tmp[k]
	}
}

// in sets v to what d receives of the densities y.
func (d *hullDisc) in(v, y, tmp []float64) {
	tmp = tmp[:len(d.order)]
	for k, i := range d.order {
		tmp[k] = y[i]
	}
	for c, x := range d.receive {
		v[c] = floats.Dot(x, tmp[:len(x)])
	}
}

// exchange is what a disc and a panel send each other, harmonic by harmonic. One row for each cell or mode.
type exchange struct {
	flux, temp []float64 // minus the means of ∂T/∂n and T in each cell, of q, Re d_1, Im d_1, …
	receive    []float64 // of each mode, b_0, Re b_1, Im b_1, …
}

// fill sets x for harmonics up to m.
func (x *exchange) fill(d *Disc, b *bow, k float64, m int) {
	size := b.p * (1 + 2*m)
	x.flux, x.temp, x.receive = resize(x.flux, size), resize(x.temp, size), resize(x.receive, size)
	switch {
	case b.disc < 0:
		d.toString(b, k, m, x)
		b.expandString(d.C, d.A, m, x.receive)
	case b.c == d.C:
		d.toArc(b, k, m, x)
		b.ownHarmonics(m, x.receive)
	default:
		d.toArc(b, k, m, x)
		b.expandArc(d.C, d.A, m, x.receive)
	}
}

// toString fills what d sends to a string: in closed form, as in excite.
func (d *Disc) toString(b *bow, k float64, m int, x *exchange) {
	at := cellsOf[b.p].at
	unit := -1 / (2 * math.Pi * k)
	turn := 1i * conj(b.dir)
	z0 := b.at(at[0]) - d.C
	ln0, x0 := clog(z0*turn), scale(d.A, inverse(z0))
	for c := range b.p {
		f, t := x.flux[c*(1+2*m):][:1+2*m], x.temp[c*(1+2*m):][:1+2*m]
		z1 := b.at(at[c+1]) - d.C
		ln1, x1 := clog(z1*turn), scale(d.A, inverse(z1))
		inv := 1 / (b.half * (at[c+1] - at[c]))
		along := scale(inv, conj(b.dir))
		f[0] = -unit * inv * imag(ln1-ln0)
		t[0] = -unit * real(along*(z1*ln1-z0*ln0-(z1-z0)))
		u0, u1 := x0, x1
		lower := scale(d.A, ln1-ln0) // ∫ (a/z)^m dz
		for n := 1; n <= m; n++ {
			g, e := u1-u0, along*lower
			f[2*n-1], f[2*n] = -inv*imag(g), -inv*real(g)
			t[2*n-1], t[2*n] = -real(e), imag(e)
			lower = scale(-d.A/float64(n), g)
			u0, u1 = u0*x0, u1*x1
		}
		z0, ln0, x0 = z1, ln1, x1
	}
}

// toArc fills what d sends to an arc: flows in closed form, means of T by Simpson's rule, or in closed form if the arc is its own.
func (d *Disc) toArc(b *bow, k float64, m int, x *exchange) {
	at := cellsOf[b.p].at
	unit := -1 / (2 * math.Pi * k)
	turn := 1i * conj(b.dir)
	own := b.c == d.C
	z0 := b.at(at[0]) - d.C
	ln0, x0 := clog(z0*turn), scale(d.A, inverse(z0))
	for c := range b.p {
		f, t := x.flux[c*(1+2*m):][:1+2*m], x.temp[c*(1+2*m):][:1+2*m]
		z1, zm := b.at(at[c+1])-d.C, b.at((at[c]+at[c+1])/2)-d.C
		ln1 := clog(z1 * turn)
		x1, xm := scale(d.A, inverse(z1)), scale(d.A, inverse(zm))
		inv := 1 / (b.half * (at[c+1] - at[c]))
		middle := 0.5 * math.Log(real(zm)*real(zm)+imag(zm)*imag(zm))
		f[0] = -unit * inv * imag(ln1-ln0)
		t[0] = -unit * (real(ln0) + 4*middle + real(ln1)) / 6
		angle := b.turn * (at[c+1] - at[c])
		u0, um, u1 := x0, xm, x1
		for n := 1; n <= m; n++ {
			g := u1 - u0
			e := scale(1.0/6, u0+scale(4, um)+u1)
			if own {
				e = complex(-imag(g), real(g))
				e = scale(1/(float64(n)*angle), e)
			}
			f[2*n-1], f[2*n] = -inv*imag(g), -inv*real(g)
			t[2*n-1], t[2*n] = -real(e), imag(e)
			u0, um, u1 = u0*x0, um*xm, u1*x1
		}
		z0, ln0, x0 = z1, ln1, x1
	}
}
