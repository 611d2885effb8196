package outline

// Respond solves for the hull's unknowns given the parts' sources; ground adds the drive of what is outside.
func (s *HullSystem) Respond(src Sources, ground bool) (y []float64) {
	y = make([]float64, s.n+1)
	s.RespondTo(y, src, ground)
	return y
}

// RespondTo is Respond into y, of length Len.
func (s *HullSystem) RespondTo(y []float64, src Sources, ground bool) {
	s.load(y, src, ground)
	s.solve(y)
}

// load is the right-hand side of RespondTo.
func (s *HullSystem) load(y []float64, src Sources, ground bool) {
	clear(y)
	tmp := make([]float64, s.n)
	for j := range s.discs {
		d := &s.discs[j]
		y[s.n] -= src.Q[j] / s.hull.MediumK
		d.out(y, d.send, pack(make([]float64, 0, 1+2*usualOrder), src.Q[j], src.D[j]), tmp)
	}
	if ground {
		for i := range s.panels {
			b := &s.panels[i]
			p := &s.pieces[b.piece]
			v := s.scaleOf(p) * (s.film(p)*p.out.Temp + 2/s.hull.MediumK*p.out.Absorbed)
			for c := range b.p {
				y[b.dof+c] += v
			}
		}
	}
}

// Incoming adds to b[i][n] (n = 0 … M_i) the coefficients of the hull's field about disc i, as of a System.
func (s *HullSystem) Incoming(y []float64, b [][]complex128) {
	tmp := make([]float64, s.n)
	for i := range s.discs {
		s.discs[i].incoming(y, s.n, b[i], tmp)
	}
}

func (d *hullDisc) incoming(y []float64, tc int, b []complex128, tmp []float64) {
	var room [1 + 2*usualOrder]float64
	v := room[:]
	if len(d.receive) > len(v) {
		v = make([]float64, len(d.receive))
	}
	d.in(v, y, tmp)
	b[0] += complex(v[0]+y[tc], 0)
	for n := 1; n <= min(d.M, len(b)-1); n++ {
		b[n] += complex(v[2*n-1], v[2*n])
	}
}
