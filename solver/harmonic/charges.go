package harmonic

// Charges are the couplings of the discs' monopoles with everything, kept for many products: what Mono, MonoDot, Logs and the circle's maps
// work out anew each time. Follow keeps them up to date; not safe for concurrent use.
type Charges struct {
	s    *System
	was  []Disc         // as they were when the couplings were worked out
	pair [][]float64    // of discs i, j at i·n + j: what a unit monopole in j brings to i
	wall [][]complex128 // (c/R)^n/√n of each disc
}

// Charges works the couplings out.
func (s *System) Charges() *Charges {
	n := len(s.discs)
	c := &Charges{s: s, was: append([]Disc(nil), s.discs...), pair: make([][]float64, n*n), wall: make([][]complex128, n)}
	for i := range n {
		c.outward(i)
		for j := range n {
			c.write(i, j)
		}
	}
	return c
}

// Fork is the same couplings for a fork of the system; neither may be written to meanwhile.
func (c *Charges) Fork(s *System) *Charges {
	f := *c
	f.s = s
	return &f
}

// Follow works out anew what has changed since: discs that System.Put replaced.
func (c *Charges) Follow() {
	for i, d := range c.s.discs {
		if o := c.was[i]; o.C == d.C && o.A == d.A && len(o.S) == len(d.S) {
			continue
		}
		c.was[i] = d
		c.outward(i)
		for j := range c.s.discs {
			c.write(i, j)
			c.write(j, i)
		}
	}
}

func (c *Charges) outward(i int) {
	s := c.s
	w := make([]complex128, len(s.weight))
	if len(w) > 0 {
		s.chargeOut(i, 1, w)
	}
	c.wall[i] = w
}

// write keeps what a monopole in disc j brings to disc i, directly and by its image.
func (c *Charges) write(i, j int) {
	s := c.s
	d := s.discs[i]
	y := make([]float64, 2*len(d.S))
	if j != i {
		series(y, d.S, 1, conj(over(-d.A, apart(d, s.discs[j]))))
	}
	if s.circle != nil && s.circle.RhoInf != 0 {
		series(y, d.S, s.circle.RhoInf, conj(s.eta(i, j)))
	}
	for len(y) > 0 && y[len(y)-1] == 0 {
		y = y[:len(y)-1]
	}
	c.pair[i*len(s.discs)+j] = y
}

// Flow is all that goes between discs, monopoles and circle at once. In: amplitudes X like the system's unknowns, monopoles Q in units of
// 1/(2πk), and Omega, regular scaled amplitudes √n conj(B_n) from elsewhere, n = 1 … at most Top. Out: Y as of Apply, what comes in; Mean, the mean
// temperature of each disc's rim, without what a wall adds to all; Alpha, the scaled amplitudes √n A_n that leave for the circle; Regular, what
// comes back from it but for the images. A circle's Mix also answers to Taken, scaled amplitudes that the circle takes up for itself, and to Through, the
// sum of all that goes through it (units of 1/(2πk)); it sends Back, which Regular has in it, and Lift, a constant temperature, which Mean has not.
type Flow struct {
	X, Q           []float64
	Omega, Taken   []complex128
	Through        float64
	Y, Mean        []float64
	Alpha, Regular []complex128
	Back           []complex128
	Lift           float64
}

// NewFlow makes room for the system's flows; Omega is left out.
func (c *Charges) NewFlow() *Flow {
	n, top := len(c.s.discs), c.s.Top()
	return &Flow{
		X: make([]float64, c.s.Len()), Q: make([]float64, n), Y: make([]float64, c.s.Len()), Mean: make([]float64, n),
		Alpha: make([]complex128, top), Regular: make([]complex128, top), Back: make([]complex128, top),
	}
}

// Send fills Alpha.
func (c *Charges) Send(f *Flow) {
	s := c.s
	if len(s.weight) == 0 {
		return
	}
	s.Gather(f.Alpha, f.X)
	for j, q := range f.Q {
		if q == 0 {
			continue
		}
		for n, w := range c.wall[j] {
			f.Alpha[n] += scale(q, w)
		}
	}
}

// Receive fills Y, Mean and Regular; Send has been before it.
func (c *Charges) Receive(f *Flow) {
	s := c.s
	n := len(s.discs)
	clear(f.Y)
	if len(s.parts) > 0 {
		s.together(f.Y, f.X)
	} else {
		s.columns(f.Y, f.X, 0, n, 1)
	}
	s.nearLogs(f.Mean, f.Q)
	for i := range n {
		x, y := f.X[s.off[i]:s.off[i+1]], f.Y[s.off[i]:s.off[i+1]]
		for j, q := range f.Q {
			row := c.pair[i*n+j]
			f.Mean[j] += Dot(row, x)
			if q != 0 {
				for k, e := range row {
					y[k] += q * e
				}
			}
		}
	}
	c.reflect(f)
}

// reflect adds what Sigma sends back and Omega.
func (c *Charges) reflect(f *Flow) {
	s := c.s
	if len(f.Regular) == 0 {
		return
	}
	clear(f.Regular)
	copy(f.Regular, f.Omega)
	for n, g := range s.circle.Sigma {
		if n < len(f.Regular) {
			f.Regular[n] += scale(g, f.Alpha[n])
		}
	}
	s.mixFlow(f)
	s.Spread(f.Y, f.Regular)
	for i := range f.Mean {
		sum := 0.0
		for n, w := range c.wall[i] {
			r := f.Regular[n]
			sum += real(w)*real(r) + imag(w)*imag(r)
		}
		f.Mean[i] += sum
	}
}

// nearLogs sets out_i = Σ_j near(i, j) q_j.
func (s *System) nearLogs(out, q []float64) {
	clear(out)
	for j := range out {
		row := s.logs[j*(j+1)/2:][:j]
		sum := s.logs[j*(j+1)/2+j] * q[j]
		for i, l := range row {
			out[i] += l * q[j]
			sum += l * q[i]
		}
		out[j] += sum
	}
}
