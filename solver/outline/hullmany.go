package outline

// RespondMany is RespondTo for all of l.Src without ground.
func (s *HullSystem) RespondMany(l *Lot) {
	s.loadMany(l)
	substituteMany(s.lu.Data, s.pivots, l.Y)
}

func (s *HullSystem) loadMany(l *Lot) {
	clear(l.Y)
	for j := range s.discs {
		d, v := &s.discs[j], l.Src[j]
		takeUp(l.Y[Lanes*s.n:], v, -1/s.hull.MediumK)
		d.outMany(l.Y, d.send, v, l.tmp)
	}
}

// together is how many densities are worked on for all harmonics while they are at hand.
const together = 96

// stretchOf are the next of a column from lo on.
func stretchOf(col []float64, lo int) []float64 { return col[lo:min(lo+together, len(col))] }

// outMany is out for many sources v.
func (d *hullDisc) outMany(y []float64, cols [][]float64, v, tmp []float64) {
	tmp = tmp[:Lanes*len(d.order)]
	clear(tmp)
	for lo := 0; lo < len(cols[0]); lo += together {
		part := tmp[Lanes*lo:]
		out1(stretchOf(cols[0], lo), v[:Lanes], part)
		for c := 1; c+1 < len(cols) && len(cols[c]) > lo; c += 2 {
			out2(stretchOf(cols[c], lo), stretchOf(cols[c+1], lo), v[Lanes*c:], part)
		}
	}
	for k, i := range d.order {
		to, from := (*lanes)(y[Lanes*i:]), (*lanes)(tmp[Lanes*k:])
		for l := range Lanes {
			to[l] += from[l]
		}
	}
}

// IncomingMany sets l.In to what Incoming adds for each.
func (s *HullSystem) IncomingMany(l *Lot) {
	for i := range s.discs {
		d, v := &s.discs[i], l.In[i]
		clear(v)
		for k, i := range d.order {
			*(*lanes)(l.tmp[Lanes*k:]) = lanes(l.Y[Lanes*i:])
		}
		for lo := 0; lo < len(d.receive[0]); lo += together {
			part := l.tmp[Lanes*lo:]
			in1(stretchOf(d.receive[0], lo), part, v)
			for c := 1; c+1 < len(d.receive) && len(d.receive[c]) > lo; c += 2 {
				in2(stretchOf(d.receive[c], lo), stretchOf(d.receive[c+1], lo), part, v[Lanes*c:])
			}
		}
		add(v[:Lanes], l.Y[Lanes*s.n:][:Lanes])
	}
}

// RespondMany is HullSystem.RespondMany with w (W/m, of Lanes vectors) going into each patch besides.
func (p *HullPatches) RespondMany(l *Lot, w []float64) {
	p.s.loadMany(l)
	for k, length := range p.Length {
		for c := p.first[k]; c < p.first[k+1]; c++ {
			takeUp(l.Y[Lanes*p.row[c]:], w[Lanes*k:], p.gain[c]/length)
		}
	}
	substituteMany(p.s.lu.Data, p.s.pivots, l.Y)
}

// patchMeans are the mean temperatures of patches: what the densities and the discs bring to them.
type patchMeans struct {
	temp []float64 // per patch and density
	feel [][]touch // per disc and patch
}

// MeansMany sets t to the mean temperatures of the patches, of Lanes vectors.
func (p *HullPatches) MeansMany(t []float64, l *Lot) {
	m := p.measured()
	meansMany(t, l, m.temp, p.s.n, m.feel)
}

// measured works the means out once.
func (p *HullPatches) measured() *patchMeans {
	p.lock.Lock()
	defer p.lock.Unlock()
	if p.means != nil {
		return p.means
	}
	n := p.s.n
	m := &patchMeans{temp: make([]float64, len(p.Length)*n), feel: make([][]touch, len(p.s.discs))}
	for k := range p.Length {
		for c := p.first[k]; c < p.first[k+1]; c++ {
			addScaled(m.temp[k*n:][:n], p.share[c], p.s.temp[p.row[c]*n:][:n])
		}
	}
	patch, share := make([]int, n), make([]float64, n) // of each cell
	for i := range patch {
		patch[i] = -1
	}
	for k := range p.Length {
		for c := p.first[k]; c < p.first[k+1]; c++ {
			patch[p.row[c]], share[p.row[c]] = k, p.share[c]
		}
	}
	for j := range m.feel {
		m.feel[j] = feltOf(&p.s.discs[j], patch, share, len(p.Length))
	}
	p.means = m
	return m
}

// feltOf is what each of so many patches feels of d; patch of each cell, −1 for none, and the cell's share in it.
func feltOf(d *hullDisc, patch []int, share []float64, patches int) []touch {
	cols, size := make([]int, patches), 0
	for h := len(d.warm) - 1; h >= 0; h-- {
		for _, i := range d.order[:len(d.warm[h])] {
			if k := patch[i]; k >= 0 && cols[k] == 0 {
				cols[k] = h + 1
				size += h + 1
			}
		}
	}
	rows, room := make([]touch, patches), make([]float64, size)
	for k, c := range cols {
		rows[k], room = room[:c:c], room[c:]
	}
	for h, w := range d.warm {
		for k, v := range w {
			if i := d.order[k]; patch[i] >= 0 {
				rows[patch[i]][h] -= share[i] * v
			}
		}
	}
	return rows
}
