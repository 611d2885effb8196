package outline

import (
	"math"
	"slices"
)

// couple fills direct and means: what every density makes in every cell, and what the parts send straight back of it beyond their orders.
func (s *HullSystem) couple(k *known) bool {
	s.direct = newMeans(s.n)
	if !s.eachPiece(len(s.panels), func(i int) { s.coupleRows(i, k) }) {
		return false
	}
	s.means = means{slices.Clone(s.direct.flux), slices.Clone(s.direct.temp)}
	for i := range s.discs {
		if stop := s.hull.Stop; stop != nil && stop() {
			return false
		}
		s.reflect(i)
	}
	for i := range s.panels {
		b := &s.panels[i]
		for l, mean := range cellsOf[b.p].mean {
			for k, m := range mean {
				s.flux[(b.dof+l)*s.n+b.dof+k] += m / 2
			}
		}
	}
	return true
}

// coupleRows fills the rows of panel i in direct.
func (s *HullSystem) coupleRows(i int, known *known) {
	to := &s.panels[i]
	var v views
	for j := range s.panels {
		from := &s.panels[j]
		if known.panel[i] >= 0 && known.panel[j] >= 0 {
			known.copy(s, i, j)
			continue
		}
		switch {
		case from.disc >= 0 && from.disc == to.disc:
			s.sameCircle(from, to)
		case from.disc < 0 && to.disc < 0:
			v.along(from, to, nil, true)
			s.straight(from, to, &v)
		default:
			v.along(from, to, nil, false)
			v.middles(from, to, nil)
			s.across(from, to, &v)
		}
	}
}

// copy takes over what panel j makes on panel i.
func (k *known) copy(s *HullSystem, i, j int) {
	o := k.old
	to, from, oldTo, oldFrom := &s.panels[i], &s.panels[j], &o.panels[k.panel[i]], &o.panels[k.panel[j]]
	for l := range to.p {
		copy(s.block(s.direct.flux, from, to, l), o.block(o.direct.flux, oldFrom, oldTo, l))
		copy(s.block(s.direct.temp, from, to, l), o.block(o.direct.temp, oldFrom, oldTo, l))
	}
}

// block returns the share of row l of to that belongs to from.
func (s *HullSystem) block(x []float64, from, to *bow, l int) []float64 {
	return x[(to.dof+l)*s.n+from.dof:][:from.p]
}

// views are the potentials of one panel at the ends and middles of the cells of another.
type views struct {
	end    [maxModes + 1]sight
	middle [maxModes]sight
	touch  [maxModes]bool // the panel ends where the cell does, and its potential there has a corner
	fine   [maxModes][maxModes]float64
}

// along looks at the ends of to's cells, or where mirror puts them.
func (v *views) along(from, to *bow, mirror func(complex128) complex128, second bool) {
	near := 0.0
	for l, x := range cellsOf[to.p].at {
		z := to.at(x)
		if mirror != nil {
			z = mirror(z)
		}
		from.look(z, &v.end[l], near, second)
		near = real(v.end[l].w)
	}
}

// middles looks at the middles of to's cells.
func (v *views) middles(from, to *bow, mirror func(complex128) complex128) {
	at := cellsOf[to.p].at
	for l := range to.p {
		z := to.at((at[l] + at[l+1]) / 2)
		if mirror != nil {
			z = mirror(z)
		}
		from.look(z, &v.middle[l], real(v.end[l].w), false)
		v.touch[l] = atEnd(v.end[l].w) || atEnd(v.end[l+1].w)
		if v.touch[l] {
			v.grade(from, to, l, atEnd(v.end[l].w), mirror)
		}
	}
}

// atEnd tells whether w is where a panel ends.
func atEnd(w complex128) bool {
	return math.Abs(math.Abs(real(w))-1) < 1e-6 && math.Abs(imag(w)) < 1e-6
}

// grade fills fine with the means over cell l, by a Gauss rule with its points drawn to the end that touches: there the potential
// goes like x ln x.
func (v *views) grade(from, to *bow, l int, first bool, mirror func(complex128) complex128) {
	a, b := cellsOf[to.p].at[l], cellsOf[to.p].at[l+1]
	if !first {
		a, b = b, a
	}
	near := real(v.end[l].w)
	v.fine[l] = [maxModes]float64{}
	g := &rules[6]
	var s sight
	for i, x := range g.x {
		u := (1 + x) / 2
		z := to.at(a + (b-a)*u*u)
		if mirror != nil {
			z = mirror(z)
		}
		from.look(z, &s, near, false)
		for k := range from.p {
			v.fine[l][k] += g.w[i] * u * real(s.value(k))
		}
	}
}

// mean returns the mean of mode k's potential over cell l, by Simpson's rule where that will do.
func (v *views) mean(l, k int) float64 {
	if v.touch[l] {
		return v.fine[l][k]
	}
	return (real(v.end[l].value(k)) + 4*real(v.middle[l].value(k)) + real(v.end[l+1].value(k))) / 6
}

// straight is a string seen by a string: all in closed form.
func (s *HullSystem) straight(from, to *bow, v *views) {
	unit, log := from.unit(), from.log()
	at := cellsOf[to.p].at
	for l := range to.p {
		flux, temp := s.block(s.direct.flux, from, to, l), s.block(s.direct.temp, from, to, l)
		e0, e1 := &v.end[l], &v.end[l+1]
		step := inverse(e1.w - e0.w)
		c := unit / (to.half * (at[l+1] - at[l]))
		for k := range flux {
			if from.piece != to.piece {
				flux[k] = c * (imag(e1.first[k]) - imag(e0.first[k]))
			}
			temp[k] = unit * real((e1.second[k]-e0.second[k])*step)
		}
		temp[0] += unit * log
	}
}

// across is a string seen by an arc or the other way round, or arcs of different parts.
func (s *HullSystem) across(from, to *bow, v *views) {
	unit, log := from.unit(), from.log()
	at := cellsOf[to.p].at
	for l := range to.p {
		flux, temp := s.block(s.direct.flux, from, to, l), s.block(s.direct.temp, from, to, l)
		c := unit / (to.half * (at[l+1] - at[l]))
		for k := range flux {
			flux[k] = c * (imag(v.end[l+1].value(k)) - imag(v.end[l].value(k)))
			temp[k] = unit * v.mean(l, k)
		}
		temp[0] += unit * log
	}
}

// sameCircle is an arc seen by an arc of the same part: the flow of a density on a circle is the same everywhere on it.
func (s *HullSystem) sameCircle(from, to *bow) {
	unit, log := from.unit(), from.log()
	at := cellsOf[to.p].at
	var e0, e1, m sight
	from.look(to.at(at[0]), &e0, 0, true)
	for l := range to.p {
		flux, temp := s.block(s.direct.flux, from, to, l), s.block(s.direct.temp, from, to, l)
		near := real(e0.w)
		from.look(to.at(at[l+1]), &e1, near, true)
		from.look(to.at((at[l]+at[l+1])/2), &m, near, false)
		step := inverse(e1.w - e0.w)
		for k := range flux {
			smooth := (real(e0.smooth[k]) + 4*real(m.smooth[k]) + real(e1.smooth[k])) / 6
			temp[k] = unit * (real((e1.second[k]-e0.second[k])*step) + smooth)
		}
		temp[0] += unit * log
		flux[0] = -from.half / (2 * math.Pi * from.a)
		e0 = e1
	}
}
