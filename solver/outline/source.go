package outline

import "math"

// disc is a part with what it exchanges with each panel.
type disc struct {
	Disc
	links []link
	// Per link: one row for each cell (send) or mode (receive) of the panel, 1+2m columns: q, Re d_1, Im d_1, … or b_0, Re b_1, Im b_1, ….
	send, receive []float64
}

// link is the part of a disc's multipoles that reaches a panel.
type link struct {
	panel  int
	m      int // harmonics that have not decayed
	offset int
}

// decayed is the size under which a harmonic no longer counts at a panel.
const decayed = 1e-9

// link fills d's exchange with all panels.
func (s *System) link(d *disc) {
	d.links = d.links[:0]
	size := 0
	for i := range s.panels {
		p := &s.panels[i]
		m := d.M
		if r := p.distance(d.C); r > 1.0001*d.A {
			m = min(m, 1+int(math.Log(decayed)/math.Log(d.A/r)))
		}
		d.links = append(d.links, link{i, m, size})
		size += p.p * (1 + 2*m)
	}
	d.send, d.receive = resize(d.send, size), resize(d.receive, size)
	for _, l := range d.links {
		size := s.panels[l.panel].p * (1 + 2*l.m)
		s.sends(&d.Disc, l, d.send[l.offset:][:size])
		s.receives(&d.Disc, l, d.receive[l.offset:][:size])
	}
}

func resize(x []float64, n int) []float64 {
	if cap(x) < n {
		return make([]float64, n)
	}
	return x[:n]
}

// sends writes minus the right-hand side that the multipoles of d make in the cells of a panel: exact means of flux and temperature from
// the complex potential −q/(2πk) ln(z−c) + Σ d_m (a/(z−c))^m at the ends of the cells.
func (s *System) sends(d *Disc, l link, out []float64) {
	p := &s.panels[l.panel]
	r := s.rows[p.edge]
	at := cellsOf[p.p].at
	cols := 1 + 2*l.m
	unit := -1 / (2 * math.Pi * s.rect.MediumK)
	turn := 1i * conj(p.dir) // makes the outward normal the positive axis: the disc is inside
	z0 := p.mid + scale(p.half*at[0], p.dir) - d.C
	ln0 := clog(z0 * turn)
	x0 := scale(d.A, inverse(z0))
	for c := range p.p {
		row := out[c*cols:][:cols]
		z1 := p.mid + scale(p.half*at[c+1], p.dir) - d.C
		ln1 := clog(z1 * turn)
		x1 := scale(d.A, inverse(z1))
		length := p.half * (at[c+1] - at[c])
		flux, temp := r.flux/length, scale(r.temp/length, conj(p.dir))
		row[0] = -unit * (flux*imag(ln1-ln0) + real(temp*(z1*ln1-z0*ln0-(z1-z0))))
		lower := scale(d.A, ln1-ln0) // ∫ (a/z)^m dz at m = 1
		u, v := x0, x1               // powers m
		for m := 1; m <= l.m; m++ {
			g := scale(flux, v-u)
			e := temp * lower
			row[2*m-1] = -(imag(g) + real(e))
			row[2*m] = -(real(g) - imag(e))
			lower = scale(d.A/float64(m), u-v)
			u, v = u*x0, v*x1
		}
		z0, ln0, x0 = z1, ln1, x1
	}
}

// receives writes the coefficients that the modes of a panel make about d: b_n = (1/2πn) ∫ σ (a/(y−c))^n ds.
func (s *System) receives(d *Disc, l link, out []float64) {
	p := &s.panels[l.panel]
	cols := 1 + 2*l.m
	clear(out)
	inv := 1 / p.half
	w := (d.C - p.mid) * scale(inv, conj(p.dir))
	var f potential
	f.at(w, p.p, real(w) < 0, false)
	unit := p.half / (2 * math.Pi)
	for k := range p.p {
		out[k*cols] = -unit * real(f.first[k])
	}
	out[0] -= unit * 2 * math.Log(p.half)
	g := &rules[points(w, p.p, l.m)]
	for i, t := range g.x {
		x := scale(d.A, inverse(p.mid+scale(p.half*t, p.dir)-d.C))
		v := complex(unit, 0)
		for n := 1; n <= l.m; n++ {
			v *= x
			re, im := real(v)/float64(n), imag(v)/float64(n)
			for k := range p.p {
				out[k*cols+2*n-1] += g.p[i][k] * re
				out[k*cols+2*n] += g.p[i][k] * im
			}
		}
	}
}

// points is the number of Gauss points for ∫ P_k (a/(y−c))^n over a panel, w the centre in its frame. A rule of N points is off by about
// ρ^(k−2N), ρ the size of the ellipse through w; the power n costs a few points more.
func points(w complex128, p, m int) int {
	a := (math.Hypot(real(w)+1, imag(w)) + math.Hypot(real(w)-1, imag(w))) / 2
	rho := a + math.Sqrt(a*a-1)
	return min(maxRule, (p+m/3+int(23/math.Log(rho))+2)/2)
}

// distance from the panel to z.
func (p *panel) distance(z complex128) float64 {
	rel := (z - p.mid) * conj(p.dir)
	s := math.Max(-p.half, math.Min(real(rel), p.half))
	return math.Hypot(real(rel)-s, imag(rel))
}

// Respond solves for the wall's unknowns given the parts' sources; ground adds the drive of sides and ambient (absolute temperatures), without it they
// count as 0.
func (s *System) Respond(src Sources, ground bool) (y []float64) {
	y = make([]float64, s.n+1)
	s.RespondTo(y, src, ground)
	return y
}

// RespondTo is Respond into y, of length Len. It doesn't allocate.
func (s *System) RespondTo(y []float64, src Sources, ground bool) {
	clear(y)
	for j := range s.discs {
		d := &s.discs[j]
		q, dm := src.Q[j], src.D[j]
		y[s.n] -= q / s.rect.MediumK
		for _, l := range d.links {
			p := &s.panels[l.panel]
			cols := 1 + 2*l.m
			for c := range p.p {
				row := d.send[l.offset+c*cols:][:cols]
				sum := q * row[0]
				row = row[1:]
				for m, z := range dm[:min(l.m, len(dm))] {
					sum += row[2*m]*real(z) + row[2*m+1]*imag(z)
				}
				y[p.dof+c] += sum
			}
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
	s.solve(y)
}

// Incoming adds to b[i][n] (n = 0 … M_i) the coefficients of the wall's field about disc i: Re Σ b_n ((z−c)/a)^n. b_0 includes T_c.
func (s *System) Incoming(y []float64, b [][]complex128) {
	for i := range s.discs {
		d := &s.discs[i]
		bi := b[i]
		bi[0] += complex(y[s.n], 0)
		for _, l := range d.links {
			p := &s.panels[l.panel]
			cols := 1 + 2*l.m
			for k := range p.p {
				row := d.receive[l.offset+k*cols:][:cols]
				v := y[p.dof+k]
				bi[0] += complex(v*row[0], 0)
				row = row[1:]
				for n := range bi[1:][:min(l.m, len(bi)-1)] {
					bi[1+n] += complex(v*row[2*n], v*row[2*n+1])
				}
			}
		}
	}
}
