package outline

// Respond solves for the wall's unknowns given the parts' sources; ground adds the drive of sides and ambient (absolute temperatures), without it they
// count as 0.
func (s *System) Respond(src Sources, ground bool) (y []float64) {
	y = make([]float64, s.n+1)
	s.RespondTo(y, src, ground)
	return y
}

// RespondTo is Respond into y, of length Len. It doesn't allocate.
func (s *System) RespondTo(y []float64, src Sources, ground bool) {
	s.load(y, src, ground)
	s.solve(y)
}

// load is the right-hand side of RespondTo.
func (s *System) load(y []float64, src Sources, ground bool) {
	clear(y)
	for j := range s.discs {
		d := &s.discs[j]
		y[s.n] -= src.Q[j] / s.rect.MediumK
		v := pack(make([]float64, 0, 1+2*usualOrder), src.Q[j], src.D[j][:min(len(src.D[j]), d.M)])
		for _, l := range d.links {
			addProduct(y[s.panels[l.panel].dof:], d.send[l.offset:], 1+2*l.m, v)
		}
	}
	if ground {
		for i := range s.panels {
			p := &s.panels[i]
			r := &s.rows[p.edge]
			for c := range p.p {
				y[p.dof+c] += r.temp * r.outside
			}
		}
	}
}

// Incoming adds to b[i][n] (n = 0 … M_i) the coefficients of the wall's field about disc i: Re Σ b_n ((z−c)/a)^n. b_0 includes T_c.
func (s *System) Incoming(y []float64, b [][]complex128) {
	for i := range s.discs {
		s.IncomingAt(i, y, b[i])
	}
}

// IncomingAt is Incoming for disc i alone.
func (s *System) IncomingAt(i int, y []float64, b []complex128) {
	d := &s.discs[i]
	v := make([]float64, 1+2*d.M, 1+2*usualOrder)
	for _, l := range d.links {
		addTransposed(v, d.receive[l.offset:], 1+2*l.m, y[s.panels[l.panel].dof:])
	}
	b[0] += complex(v[0]+y[s.n], 0)
	for n := 1; n <= min(d.M, len(b)-1); n++ {
		b[n] += complex(v[2*n-1], v[2*n])
	}
}
