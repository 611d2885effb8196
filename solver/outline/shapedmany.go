package outline

// RespondMany is RespondTo for all of l.Src without ground and without heat in metals, one after the other.
func (s *Shaped) RespondMany(l *Lot) {
	src := Sources{Q: make([]float64, len(s.discs)), D: make([][]complex128, len(s.discs))}
	for j := range s.discs {
		src.D[j] = make([]complex128, s.discs[j].M)
	}
	y := make([]float64, s.n+1)
	for v := range Lanes {
		l.lane(v, src)
		s.RespondTo(y, src, false)
		for i, f := range y {
			l.Y[Lanes*i+v] = f
		}
	}
}

// IncomingMany sets l.In to what Incoming adds for each.
func (s *Shaped) IncomingMany(l *Lot) {
	b := make([][]complex128, len(s.discs))
	y := make([]float64, s.n+1)
	for v := range Lanes {
		for i := range y {
			y[i] = l.Y[Lanes*i+v]
		}
		for j := range b {
			b[j] = make([]complex128, s.discs[j].M+1)
		}
		s.Incoming(y, b)
		for j, in := range b {
			to := l.In[j]
			to[v] = real(in[0])
			for n := 1; n < len(in); n++ {
				at := Lanes*(2*n-1) + v
				to[at], to[at+Lanes] = real(in[n]), imag(in[n])
			}
		}
	}
}

// RespondMany is Shaped.RespondMany with w (W/m, of Lanes vectors) going into each patch besides.
func (p *ShapedPatches) RespondMany(l *Lot, w []float64) {
	s := p.s
	y, one := make([]float64, s.n+1), make([]float64, len(p.A))
	src := Sources{Q: make([]float64, len(s.discs)), D: make([][]complex128, len(s.discs))}
	for j := range s.discs {
		src.D[j] = make([]complex128, s.discs[j].M)
	}
	for v := range Lanes {
		l.lane(v, src)
		for k := range one {
			one[k] = w[Lanes*k+v]
		}
		p.RespondTo(y, src, false, one)
		for i, f := range y {
			l.Y[Lanes*i+v] = f
		}
	}
}

// MeansMany sets t to the mean temperatures of the patches, of Lanes vectors.
func (p *ShapedPatches) MeansMany(t []float64, l *Lot) {
	s := p.s
	y, one := make([]float64, s.n+1), make([]float64, len(p.A))
	src := Sources{Q: make([]float64, len(s.discs)), D: make([][]complex128, len(s.discs))}
	for j := range s.discs {
		src.D[j] = make([]complex128, s.discs[j].M)
	}
	for v := range Lanes {
		l.lane(v, src)
		for i := range y {
			y[i] = l.Y[Lanes*i+v]
		}
		p.Means(one, y, src)
		for k, f := range one {
			t[Lanes*k+v] = f
		}
	}
}

// lane takes the sources of vector v out.
func (l *Lot) lane(v int, src Sources) {
	for j, d := range src.D {
		from := l.Src[j]
		src.Q[j] = from[v]
		for n := range d {
			at := Lanes*(1+2*n) + v
			d[n] = complex(from[at], from[at+Lanes])
		}
	}
}
