package outline

import "math"

// Around is what stands among the contours of a Shaped besides them.
type Around struct {
	MediumK float64 // of what the discs lie in
	Discs   []Disc
	T       [][]float64 // reflections t_n of each disc, n = 1 …: for finding out how fine the contours have to be
	Hull    Loop        // outer boundary of an open bundle; nil where the last contour is the outside
}

// A disc's exchange with the bends, besides what a disc has.
type shapedDisc struct {
	Disc
	links []shapedLink
	// Per link: one row for each cell (send) or mode (receive) of the bend, 1+2m columns: q, Re d_1, Im d_1, … or b_0, Re b_1, Im b_1, …. On the
	// outside send is the flux alone, and warm the temperature; elsewhere warm is nought.
	send, warm, receive []float64
	feel                []touch // temperature brought to each metal's middle
}

// shapedLink is the part of a disc's harmonics that reaches a bend.
type shapedLink struct{ bend, m, offset int }

// link fills the exchange of disc j with all bends and metals.
func (s *Shaped) link(j int) {
	d := &s.discs[j]
	d.links = d.links[:0]
	size := 0
	for i := range s.bends {
		m := d.reach(s.bends[i].distance(d.C), decayed)
		d.links = append(d.links, shapedLink{i, m, size})
		size += modes * (1 + 2*m)
	}
	d.send, d.warm, d.receive = resize(d.send, size), resize(d.warm, size), resize(d.receive, size)
	for _, l := range d.links {
		b := &s.bends[l.bend]
		size := modes * (1 + 2*l.m)
		send, warm := d.send[l.offset:][:size], d.warm[l.offset:][:size]
		r := s.condition(b)
		if s.outer(b) {
			d.excites(b, row{flux: 1}, s.around.MediumK, l.m, send)
			d.excites(b, row{temp: 1}, s.around.MediumK, l.m, warm)
		} else {
			d.excites(b, r, s.around.MediumK, l.m, send)
		}
		b.expand(d.C, d.A, l.m, d.receive[l.offset:][:size])
	}
	d.feel = d.feel[:0]
	for i := range s.contours {
		if c := &s.contours[i]; c.metal() {
			_, at := c.Loop.Area()
			d.feel = append(d.feel, d.touch(at, s.around.MediumK))
		}
	}
}

// reach is the number of harmonics that count at distance r from the centre.
func (d *Disc) reach(r, least float64) int {
	if r > 1.0001*d.A {
		return min(d.M, 1+int(math.Log(least)/math.Log(d.A/r)))
	}
	return d.M
}

// touch is what the disc brings to the temperature at z.
func (d *Disc) touch(z complex128, k float64) touch {
	x := scale(d.A, inverse(z-d.C))
	m := d.reach(dist(z, d.C), decayed)
	out := make(touch, 1+2*m)
	out[0] = -math.Log(dist(z, d.C)) / (2 * math.Pi * k)
	u := complex128(1)
	for n := 1; n <= m; n++ {
		u *= x
		out[2*n-1], out[2*n] = real(u), -imag(u)
	}
	return out
}

// excites writes minus what the multipoles of d contribute to the condition r in each cell of b: exact means of the flux, the temperature by a Gauss
// rule. out has a row of 1+2m for each cell.
func (d *Disc) excites(b *bend, r row, k float64, m int, out []float64) {
	at := cellsOf[modes].at
	clear(out)
	if r.flux != 0 {
		z0 := b.at(at[0]) - d.C
		ln0, x0 := clog(z0), scale(d.A, inverse(z0))
		for c := range modes {
			o := out[c*(1+2*m):][:1+2*m]
			z1 := b.at(at[c+1]) - d.C
			ln1, x1 := clog(z1), scale(d.A, inverse(z1))
			flux := r.flux / (b.half * (at[c+1] - at[c]))
			turn := imag(ln1) - imag(ln0)
			turn -= 2 * math.Pi * math.Round(turn/(2*math.Pi))
			o[0] = flux * turn / (2 * math.Pi * k)
			u0, u1 := x0, x1
			for n := 1; n <= m; n++ {
				g := scale(flux, u1-u0)
				o[2*n-1], o[2*n] = -imag(g), -real(g)
				u0, u1 = u0*x0, u1*x1
			}
			ln0, x0 = ln1, x1
		}
	}
	if r.temp != 0 {
		d.warms(b, r.temp, k, m, out)
	}
}

// warms subtracts f times the mean temperature that d brings to each cell of b.
func (d *Disc) warms(b *bend, f, k float64, m int, out []float64) {
	at := cellsOf[modes].at
	rule := &rules[4]
	if b.distance(d.C) < d.A+4*b.half {
		rule = &rules[8]
	}
	for c := range modes {
		o := out[c*(1+2*m):][:1+2*m]
		for i, x := range rule.x {
			z := b.at((at[c]+at[c+1])/2+x*(at[c+1]-at[c])/2) - d.C
			w := f * rule.w[i] / 2
			o[0] += w * real(clog(z)) / (2 * math.Pi * k)
			x := scale(d.A, inverse(z))
			u := complex(-w, 0)
			for n := 1; n <= m; n++ {
				u *= x
				o[2*n-1] += real(u)
				o[2*n] -= imag(u)
			}
		}
	}
}

// expand writes the coefficients b_0 … b_m of Re Σ b_n ((z−c)/a)^n that each mode of b makes about c: as that of a panel.
func (b *bend) expand(c complex128, a float64, m int, out []float64) {
	cols := 1 + 2*m
	clear(out)
	var room [2 * usualOrder]float64
	powers := room[:]
	if m > usualOrder {
		powers = make([]float64, 2*m)
	}
	powers = powers[:2*m]
	n := points((c-b.mid)*b.inv, modes, m)
	if b.alpha > 0 {
		n = min(maxRule, n+4)
	}
	g := &rules[n]
	for i, t := range g.x {
		x := scale(a, inverse(b.at(t)-c))
		v := complex(b.half/(2*math.Pi), 0)
		for n := range m {
			v *= x
			powers[2*n], powers[2*n+1] = real(v)/float64(n+1), imag(v)/float64(n+1)
		}
		for k := range modes {
			addScaled(out[k*cols+1:][:2*m], g.p[i][k], powers)
		}
	}
	var f curved
	var q [modes]complex128
	b.complexPotential(&f, b.look(c), &q)
	for k := range modes {
		out[k*cols] = -real(q[k]) / (2 * math.Pi)
	}
}

// MoveDisc puts disc i elsewhere and rewrites what depends on it: for dragging. It reports whether the bends are short enough there; if not, a new
// Shaped is due. Not safe while others use the Shaped.
func (s *Shaped) MoveDisc(i int, to Disc) (resolved bool) {
	s.discs[i].Disc, s.around.Discs[i] = to, to
	s.link(i)
	x := rules[4]
	d := s.discs[i].Disc
	for k := range s.bends {
		b := &s.bends[k]
		pieces := 0.0
		for j, t := range x.x {
			pieces += x.w[j] * b.half / s.grading.near(&d, b.at(t), math.Inf(1))
		}
		if pieces > 1.6 {
			return false
		}
	}
	return true
}

// Incoming adds to b[i][n] (n = 0 … M_i) the coefficients of the contours' field about disc i: Re Σ b_n ((z−c)/a)^n. b_0 includes T_c. Behind the discs
// b_0 is the temperature of each metal, in the order of Metals, but for what the discs themselves bring.
func (s *Shaped) Incoming(y []float64, b [][]complex128) {
	for i := range s.discs {
		d := &s.discs[i]
		v := make([]float64, 1+2*d.M, 1+2*usualOrder)
		for _, l := range d.links {
			addTransposed(v, d.receive[l.offset:], 1+2*l.m, y[s.bends[l.bend].dof:])
		}
		b[i][0] += complex(v[0]+y[s.n], 0)
		for n := 1; n <= min(d.M, len(b[i])-1); n++ {
			b[i][n] += complex(v[2*n-1], v[2*n])
		}
	}
	for k, i := range s.metals {
		if at := len(s.discs) + k; at < len(b) {
			b[at][0] += complex(s.Metal(y, i), 0)
		}
	}
}

// Felt adds to mean the temperatures that the discs bring to each metal.
func (s *Shaped) Felt(src Sources, mean []float64) {
	for j := range s.discs {
		v := pack(make([]float64, 0, 1+2*usualOrder), src.Q[j], src.D[j])
		for k, row := range s.discs[j].feel {
			m := min(len(row), len(v))
			mean[k] += dot(row[:m], v)
		}
	}
}

// Metals are the contours of metals, whose heats stand behind those of the discs in Sources.Q.
func (s *Shaped) Metals() []int { return s.metals }

// RespondTo solves for given sources of the discs and of the metals behind them (see Metals) into y, of length Len; ground adds the drive of held bores
// and of the surroundings.
func (s *Shaped) RespondTo(y []float64, src Sources, ground bool) {
	s.loadFrom(y, src, ground)
	s.solve(y)
}

// loadFrom is the right-hand side of RespondTo.
func (s *Shaped) loadFrom(y []float64, src Sources, ground bool) {
	clear(y)
	heats := make([]float64, len(s.contours))
	for k, i := range s.metals {
		if at := len(s.discs) + k; at < len(src.Q) {
			heats[i] = src.Q[at]
		}
	}
	s.loadTo(y, heats, ground)
	for j := range s.discs {
		d := &s.discs[j]
		y[s.n] -= src.Q[j] / s.around.MediumK
		v := pack(make([]float64, 0, 1+2*usualOrder), src.Q[j], src.D[j][:min(len(src.D[j]), d.M)])
		for _, l := range d.links {
			b := &s.bends[l.bend]
			rows := y[b.dof:]
			if !s.outer(b) {
				addProduct(rows, d.send[l.offset:], 1+2*l.m, v)
				continue
			}
			r := s.condition(b)
			var flux, warm [modes]float64
			addProduct(flux[:], d.send[l.offset:], 1+2*l.m, v)
			addProduct(warm[:], d.warm[l.offset:], 1+2*l.m, v)
			for c := range modes {
				rows[c] += r.flux*flux[c] + r.temp*warm[c]
			}
		}
	}
}
