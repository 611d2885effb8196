package outline

// RespondMany is RespondTo for all of l.Src without ground.
func (s *System) RespondMany(l *Lot) {
	s.loadMany(l)
	substituteMany(s.lu.Data, s.pivots, l.Y)
}

func (s *System) loadMany(l *Lot) {
	clear(l.Y)
	for j := range s.discs {
		d, v := &s.discs[j], l.Src[j]
		takeUp(l.Y[Lanes*s.n:], v, -1/s.rect.MediumK)
		for _, k := range d.links {
			cols := 1 + 2*k.m
			rowsMany(d.send[k.offset:], cols, 0, modes, cols, v, l.Y[Lanes*s.panels[k.panel].dof:])
		}
	}
}

// IncomingMany sets l.In to what Incoming adds for each.
func (s *System) IncomingMany(l *Lot) {
	for i := range s.discs {
		d, v := &s.discs[i], l.In[i]
		clear(v)
		for _, k := range d.links {
			cols, y := 1+2*k.m, l.Y[Lanes*s.panels[k.panel].dof:]
			a := d.receive[k.offset:]
			for c := 0; c+1 < modes; c += 2 {
				out2(a[c*cols:][:cols], a[(c+1)*cols:][:cols], y[Lanes*c:], v)
			}
			if modes%2 > 0 {
				out1(a[(modes-1)*cols:][:cols], y[Lanes*(modes-1):][:Lanes], v)
			}
		}
		add(v[:Lanes], l.Y[Lanes*s.n:][:Lanes])
	}
}

// RespondMany is System.RespondMany with w (W/m, of Lanes vectors) going into each patch besides.
func (p *Patches) RespondMany(l *Lot, w []float64) {
	p.s.loadMany(l)
	for k, length := range p.Length {
		for _, c := range p.dof[p.first[k]:p.first[k+1]] {
			takeUp(l.Y[Lanes*c:], w[Lanes*k:], p.gain[k]/length)
		}
	}
	substituteMany(p.s.lu.Data, p.s.pivots, l.Y)
}

// MeansMany sets t to the mean temperatures of the patches, of Lanes vectors.
func (p *Patches) MeansMany(t []float64, l *Lot) {
	meansMany(t, l, p.temp, p.s.n, p.feel)
}

// meansMany sets t from n densities and the constant, and from the discs.
func meansMany(t []float64, l *Lot, temp []float64, n int, feel [][]touch) {
	patches := len(temp) / max(n, 1)
	for k := range patches {
		copy(t[Lanes*k:][:Lanes], l.Y[Lanes*n:])
	}
	rowsMany(temp, n, 0, patches, n, l.Y, t)
	for j, feel := range feel {
		v := l.Src[j]
		for k := range feel {
			if k%2 > 0 {
				continue
			}
			if k+1 == len(feel) {
				in1(feel[k], v, t[Lanes*k:])
				continue
			}
			a, b := feel[k], feel[k+1]
			m := min(len(a), len(b))
			in2(a[:m], b[:m], v, t[Lanes*k:])
			in1(a[m:], v[Lanes*m:], t[Lanes*k:])
			in1(b[m:], v[Lanes*m:], t[Lanes*(k+1):])
		}
	}
}
