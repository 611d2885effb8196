package harmonic

// Charges are the couplings of the discs' monopoles with everything, kept for many products: what Mono, MonoDot, Logs and the circle's maps
// work out anew each time. Follow keeps them up to date; not safe for concurrent use.
type Charges struct {
	s    *System
	was  []Disc         // as they were when the couplings were worked out
	pair []block        // per disc what unit monopoles bring to it: two of them are like a harmonic
	from [][]int        // per disc where those two begin in its block
	wall [][]complex128 // (c/R)^n/√n of each disc
	out  block          // wall, two discs at a time
	rows [][]float64    // room for the rows of one block
	room room           // for many flows
}

// Charges works the couplings out.
func (s *System) Charges() *Charges {
	n := len(s.discs)
	c := &Charges{s: s, was: append([]Disc(nil), s.discs...), pair: make([]block, n), from: make([][]int, n), wall: make([][]complex128, n)}
	c.rows = make([][]float64, n)
	for i := range n {
		c.outward(i)
		c.fill(i)
	}
	c.stack()
	return c
}

// Fork is the same couplings for a fork of the system; neither may be written to meanwhile.
func (c *Charges) Fork(s *System) *Charges {
	f := *c
	f.s, f.room = s, room{}
	return &f
}

// Follow works out anew what has changed since: discs that System.Put replaced.
func (c *Charges) Follow() {
	moved := false
	for i, d := range c.s.discs {
		if o := c.was[i]; o.C == d.C && o.A == d.A && len(o.S) == len(d.S) {
			continue
		}
		moved = true
		c.was[i] = d
		c.outward(i)
		c.fill(i)
		for j := range c.s.discs {
			if j != i && !c.put(j, i) {
				c.fill(j)
			}
		}
	}
	if moved {
		c.stack()
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

// stack makes a block of wall.
func (c *Charges) stack() {
	wide := 2 * len(c.s.weight)
	pairs := (len(c.wall) + 1) / 2
	c.out.cols, c.out.data = make([]uint16, pairs), make([]float64, 2*pairs*wide)
	for k := range c.out.cols {
		c.out.cols[k] = uint16(wide)
	}
	for j, w := range c.wall {
		for n, v := range w {
			c.out.data[j*wide+2*n], c.out.data[j*wide+2*n+1] = real(v), imag(v)
		}
	}
}

// brings appends to y what a monopole in disc j brings to disc i, directly and by its image.
func (c *Charges) brings(y []float64, i, j int) []float64 {
	s := c.s
	d := s.discs[i]
	for range 2 * len(d.S) {
		y = append(y, 0)
	}
	if j != i {
		series(y, d.S, 1, conj(over(-d.A, apart(d, s.discs[j]))))
	}
	if s.circle != nil && s.circle.RhoInf != 0 {
		series(y, d.S, s.circle.RhoInf, conj(s.eta(i, j)))
	}
	for len(y) > 0 && y[len(y)-1] == 0 && y[len(y)-2] == 0 {
		y = y[:len(y)-2]
	}
	return y
}

// fill writes the block of disc i.
func (c *Charges) fill(i int) {
	b := &c.pair[i]
	b.cols, c.from[i] = b.cols[:0], c.from[i][:0]
	total := 0
	for j := range c.rows {
		c.rows[j] = c.brings(c.rows[j][:0], i, j)
		if j%2 == 0 {
			b.cols, c.from[i] = append(b.cols, 0), append(c.from[i], 0)
		}
		b.cols[j/2] = max(b.cols[j/2], uint16(len(c.rows[j])))
	}
	for k, w := range b.cols {
		c.from[i][k] = total
		total += 2 * int(w)
	}
	if cap(b.data) < total {
		b.data = make([]float64, total)
	}
	b.data = b.data[:total]
	clear(b.data)
	for j, row := range c.rows {
		copy(c.row(i, j), row)
	}
}

// row is where block i keeps what monopole j brings.
func (c *Charges) row(i, j int) []float64 {
	w := int(c.pair[i].cols[j/2])
	return c.pair[i].data[c.from[i][j/2]+j%2*w:][:w]
}

// put writes what monopole j brings to disc i; false if there is no room.
func (c *Charges) put(i, j int) bool {
	c.rows[j] = c.brings(c.rows[j][:0], i, j)
	row := c.row(i, j)
	if len(c.rows[j]) > len(row) {
		return false
	}
	clear(row[copy(row, c.rows[j]):])
	return true
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
	even := n + n%2
	return &Flow{
		X: make([]float64, c.s.Len()), Q: make([]float64, n, even), Y: make([]float64, c.s.Len()), Mean: make([]float64, n, even),
		Alpha: make([]complex128, top), Regular: make([]complex128, top), Back: make([]complex128, top),
	}
}

// Send fills Alpha.
func (c *Charges) Send(f *Flow) {
	s := c.s
	if len(s.weight) == 0 {
		return
	}
	alpha := s.alpha[:2*len(s.weight)]
	s.gather(alpha, f.X, 1)
	c.charge(f.Q[:cap(f.Q)], alpha, 1)
	for n := range f.Alpha {
		f.Alpha[n] = complex(alpha[2*n], alpha[2*n+1])
	}
}

// charge adds what k times the monopoles q send to the circle.
func (c *Charges) charge(q, alpha []float64, k int) {
	if len(c.out.data) > 0 {
		c.out.applyTo(q, c.idle(len(alpha)), c.idle(len(q)), alpha, k)
	}
}

// fetch adds to the means what the circle's regular amplitudes bring.
func (c *Charges) fetch(mean, omega []float64, k int) {
	if len(c.out.data) > 0 {
		c.out.applyTo(c.idle(len(mean)), omega, mean, c.idle(len(omega)), k)
	}
}

// idle are noughts that stand for what a product does not need.
func (c *Charges) idle(n int) []float64 {
	if len(c.room.idle) < n {
		c.room.idle = make([]float64, n)
	}
	return c.room.idle
}

// Receive fills Y, Mean and Regular; Send has been before it.
func (c *Charges) Receive(f *Flow) {
	s := c.s
	clear(f.Y)
	if len(s.parts) > 0 {
		s.together(f.Y, f.X)
	} else {
		s.columns(f.Y, f.X, 0, len(s.discs), 1)
	}
	s.nearLogs(f.Mean, f.Q)
	c.pairs(f.Q[:cap(f.Q)], f.X, f.Mean[:cap(f.Mean)], f.Y, 1)
	if len(f.Regular) == 0 {
		return
	}
	f.regular(s.circle.Sigma)
	s.mixFlow(f)
	omega := s.alpha[:2*len(s.weight)]
	for n, w := range f.Regular {
		omega[2*n], omega[2*n+1] = real(w), imag(w)
	}
	s.spread(f.Y, omega, 1)
	c.fetch(f.Mean[:cap(f.Mean)], omega, 1)
}

// pairs adds what monopoles bring to the discs, and means of what goes out.
func (c *Charges) pairs(q, x, mean, y []float64, k int) {
	off := c.s.off
	for i := range c.pair {
		if b := &c.pair[i]; len(b.data) > 0 {
			b.applyTo(q, x[k*off[i]:k*off[i+1]], mean, y[k*off[i]:k*off[i+1]], k)
		}
	}
}

// regular is what Sigma sends back, and Omega.
func (f *Flow) regular(sigma []float64) {
	clear(f.Regular)
	copy(f.Regular, f.Omega)
	for n, g := range sigma[:min(len(sigma), len(f.Regular))] {
		f.Regular[n] += scale(g, f.Alpha[n])
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
