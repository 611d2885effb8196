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

// outMany is out for many sources v.
func (d *hullDisc) outMany(y []float64, cols [][]float64, v, tmp []float64) {
	tmp = tmp[:Lanes*len(d.order)]
	clear(tmp)
	out1(cols[0], v[:Lanes], tmp)
	for c := 1; c+1 < len(cols); c += 2 {
		out2(cols[c], cols[c+1], v[Lanes*c:], tmp)
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
		in1(d.receive[0], l.tmp, v)
		for c := 1; c+1 < len(d.receive); c += 2 {
			in2(d.receive[c], d.receive[c+1], l.tmp, v[Lanes*c:])
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

// MeansMany sets t to the mean temperatures of the patches, of Lanes vectors.
func (p *HullPatches) MeansMany(t []float64, l *Lot) {
	s := p.s
	clear(l.cold)
	for j := range s.discs {
		d := &s.discs[j]
		d.outMany(l.cold, d.warm, l.Src[j], l.tmp)
	}
	for k := range p.Length {
		mean := (*lanes)(t[Lanes*k:])
		*mean = lanes(l.Y[Lanes*s.n:])
		for c := p.first[k]; c < p.first[k+1]; c++ {
			var cell [Lanes]float64
			in1(s.temp[p.row[c]*s.n:][:s.n], l.Y, cell[:])
			takeUp(mean[:], cell[:], p.share[c])
			takeUp(mean[:], l.cold[Lanes*p.row[c]:], -p.share[c])
		}
	}
}
