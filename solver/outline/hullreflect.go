package outline

import "math"

// faded is the share of a harmonic beyond the order of a part under which it need not be reckoned.
const faded = 0.05

// kin returns the panels that disc i is solved with to all orders: its own arcs, the strings that leave it, and those so close that harmonics
// beyond its order have not faded there. Not the arcs of other parts: what these send back once more would have to follow.
func (s *HullSystem) kin(i int) (all []int) {
	d := &s.discs[i].Disc
	near := d.A * math.Pow(faded, -1/float64(d.M+1))
	for j := range s.panels {
		b := &s.panels[j]
		if p := &s.pieces[b.piece]; p.ends[0] == i || p.ends[1] == i || b.disc < 0 && b.distance(d.C) < near {
			all = append(all, j)
		}
	}
	return all
}

// reflect adds what disc i sends back of its kin's densities to its kin, but for the harmonics n ≤ M, which are solved for. A disc that
// reflects all harmonics alike, t, mirrors an outer potential φ as t φ(c + a²/conj(z−c)) (circle theorem: Milne-Thomson, Theoretical
// Hydrodynamics); what it reflects otherwise is summed.
func (s *HullSystem) reflect(i int) {
	d := &s.discs[i]
	kin := s.kin(i)
	if len(kin) == 0 {
		return
	}
	m := d.mirrored()
	if m == 0 {
		return
	}
	x := make([]exchange, len(kin))
	for k, j := range kin {
		x[k].fill(&d.Disc, &s.panels[j], s.hull.MediumK, m)
	}
	before := s.through(kin)
	if t := d.mirror.Beyond; t != 0 {
		for k, j := range kin {
			for l, g := range kin {
				s.image(d, t, &s.panels[j], &s.panels[g], &x[k], &x[l])
			}
		}
	}
	s.sums(d, m, kin, x)
	s.settle(kin, before)
}

// through is the flow that each density sends through panels.
func (s *HullSystem) through(panels []int) []float64 {
	sum := make([]float64, s.n)
	for _, j := range panels {
		b := &s.panels[j]
		for l := range b.p {
			addScaled(sum, b.cell(l), s.flux[(b.dof+l)*s.n:][:s.n])
		}
	}
	return sum
}

// settle makes good, evenly over the kin, what of the flow that a disc sends back misses them: in all it is nought.
func (s *HullSystem) settle(kin []int, before []float64) {
	length := 0.0
	for _, j := range kin {
		length += 2 * s.panels[j].half
	}
	miss := s.through(kin)
	for k := range miss {
		miss[k] = (before[k] - miss[k]) / length
	}
	for _, j := range kin {
		b := &s.panels[j]
		for l := range b.p {
			addScaled(s.flux[(b.dof+l)*s.n:][:s.n], 1, miss)
		}
	}
}

// mirrored is the highest harmonic that is not reflected like those beyond, or M.
func (d *hullDisc) mirrored() int {
	m := d.M
	for n := len(d.mirror.T); n > m; n-- {
		if math.Abs(d.mirror.T[n-1]-d.mirror.Beyond) > decayed {
			return n
		}
	}
	if d.mirror.Beyond == 0 && m == d.M {
		return 0
	}
	return m
}

// image adds the image of from in disc d, as seen by to: with t of all harmonics.
func (s *HullSystem) image(d *hullDisc, t float64, from, to *bow, xf, xt *exchange) {
	own, ownTo := from.isOf(d), to.isOf(d)
	if !own && !ownTo {
		s.imageBeside(d, t, from, to, xf)
		return
	}
	cols := len(xf.receive) / from.p
	for l := range to.p {
		direct, directT := s.block(s.direct.flux, from, to, l), s.block(s.direct.temp, from, to, l)
		flux, temp := s.block(s.flux, from, to, l), s.block(s.temp, from, to, l)
		for k := range flux {
			switch {
			case !own: // seen on the rim, where it mirrors itself
				flux[k] -= t * direct[k]
				temp[k] += t * (directT[k] - xf.receive[k*cols])
			case !ownTo: // from the rim: the same field outside, but for the part's mean
				q := 0.0
				if k == 0 {
					q = 2 * from.half * s.hull.MediumK
				}
				flux[k] += t * (direct[k] + q*xt.flux[l*cols])
				temp[k] += t * (directT[k] + q*xt.temp[l*cols])
			default: // the density once more, within the rim
				temp[k] += t * (directT[k] - xf.receive[k*cols])
				if from == to {
					flux[k] -= t / 2 * cellsOf[to.p].mean[l][k]
				}
				if k == 0 {
					flux[k] += t / 2 * from.half / (math.Pi * from.a)
				}
			}
		}
	}
}

// isOf tells whether b is an arc of d.
func (b *bow) isOf(d *hullDisc) bool { return b.disc >= 0 && b.c == d.C }

// imageBeside looks at from, which is no arc of d, from the mirror places of to, which is none either.
func (s *HullSystem) imageBeside(d *hullDisc, t float64, from, to *bow, xf *exchange) {
	cols := len(xf.receive) / from.p
	mirror := func(z complex128) complex128 {
		v := z - d.C
		return d.C + scale(d.A*d.A/(real(v)*real(v)+imag(v)*imag(v)), v)
	}
	var v views
	v.along(from, to, mirror, false)
	v.middles(from, to, mirror)
	unit, log := from.unit(), from.log()
	at := cellsOf[to.p].at
	for l := range to.p {
		flux, temp := s.block(s.flux, from, to, l), s.block(s.temp, from, to, l)
		c := t * unit / (to.half * (at[l+1] - at[l]))
		for k := range flux {
			flux[k] -= c * (imag(v.end[l+1].value(k)) - imag(v.end[l].value(k)))
			temp[k] += t * (unit*v.mean(l, k) - xf.receive[k*cols])
		}
		temp[0] += t * unit * log
	}
}

// sums adds the harmonics of d that are not reflected like those beyond, n ≤ m, and takes out those that are solved for.
func (s *HullSystem) sums(d *hullDisc, m int, kin []int, x []exchange) {
	cols := 1 + 2*m
	gain := make([]float64, cols)
	for n := 1; n <= m; n++ {
		g := -d.mirror.Beyond
		if n > d.M {
			g += d.mirror.t(n)
		}
		gain[2*n-1], gain[2*n] = -g, g // conj(d) = t b, and exchange has the sign of excite
	}
	back := make([]float64, cols)
	for i, a := range kin {
		from := &s.panels[a]
		for k := range from.p {
			for c, v := range x[i].receive[k*cols:][:cols] {
				back[c] = gain[c] * v
			}
			for j, b := range kin {
				to := &s.panels[b]
				for l := range to.p {
					s.flux[(to.dof+l)*s.n+from.dof+k] += dot(x[j].flux[l*cols:][:cols], back)
					s.temp[(to.dof+l)*s.n+from.dof+k] += dot(x[j].temp[l*cols:][:cols], back)
				}
			}
		}
	}
}
