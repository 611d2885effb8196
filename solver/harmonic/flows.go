package harmonic

// room is work space for many flows: element k of flow v at many·k + v.
type room struct {
	idle                     []float64
	x, y, q, mean, alpha, re []float64
}

// fit makes room.
func (r *room) fit(length, charges, top int) {
	even := charges + charges%2
	if len(r.x) == many*length && len(r.q) == many*even && len(r.alpha) == 2*many*top {
		return
	}
	r.x, r.y = make([]float64, many*length), make([]float64, many*length)
	r.q, r.mean = make([]float64, many*even), make([]float64, many*even)
	r.alpha, r.re = make([]float64, 2*many*top), make([]float64, 2*many*top)
}

// gatherLane puts x in lane v of to; scatterLane gets it back.
func gatherLane(to, x []float64, v int) {
	to = to[v:]
	for i, e := range x {
		to[many*i] = e
	}
}

func scatterLane(x, from []float64, v int) {
	from = from[v:]
	for i := range x {
		x[i] = from[many*i]
	}
}

// SendMany is Send for up to Many flows.
func (c *Charges) SendMany(flows []*Flow) {
	s, r := c.s, &c.room
	r.fit(s.Len(), len(s.discs), len(s.weight))
	for v, f := range flows {
		gatherLane(r.x, f.X, v)
		gatherLane(r.q, f.Q, v)
	}
	if len(s.weight) == 0 {
		return
	}
	s.gather(r.alpha, r.x, many)
	c.charge(r.q, r.alpha, many)
	for v, f := range flows {
		for n := range f.Alpha {
			f.Alpha[n] = complex(r.alpha[2*n*many+v], r.alpha[(2*n+1)*many+v])
		}
	}
}

// ReceiveMany is Receive for the flows that SendMany has seen.
func (c *Charges) ReceiveMany(flows []*Flow) {
	s, r := c.s, &c.room
	clear(r.y)
	clear(r.mean)
	s.columns(r.y, r.x, 0, len(s.discs), many)
	c.pairs(r.q, r.x, r.mean, r.y, many)
	s.nearLogsMany(r.mean, r.q)
	if len(s.weight) > 0 {
		for v, f := range flows {
			f.regular(s.circle.Sigma)
			s.mixFlow(f)
			for n, w := range f.Regular {
				r.re[2*n*many+v], r.re[(2*n+1)*many+v] = real(w), imag(w)
			}
		}
		s.spread(r.y, r.re, many)
		c.fetch(r.mean, r.re, many)
	}
	for v, f := range flows {
		scatterLane(f.Y, r.y, v)
		scatterLane(f.Mean, r.mean, v)
	}
}

// nearLogsMany adds Σ_j near(i, j) q_j for many flows.
func (s *System) nearLogsMany(out, q []float64) {
	type lanes = [many]float64
	for j := range s.discs {
		row := s.logs[j*(j+1)/2:][:j+1]
		qj, oj := (*lanes)(q[many*j:]), (*lanes)(out[many*j:])
		var sum lanes
		for i, l := range row[:j] {
			qi, oi := (*lanes)(q[many*i:]), (*lanes)(out[many*i:])
			for v := range many {
				oi[v] += l * qj[v]
				sum[v] += l * qi[v]
			}
		}
		for v := range many {
			oj[v] += sum[v] + row[j]*qj[v]
		}
	}
}
