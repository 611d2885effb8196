package outline

import (
	"math"
)

// disc is a part with what it exchanges with each panel.
type disc struct {
	Disc
	links []link
	// Per link: one row for each cell (send) or mode (receive) of the panel, 1+2m columns: q, Re d_1, Im d_1, … or b_0, Re b_1, Im b_1, ….
	send, receive []float64
}

// link is the part of a disc's harmonics that reaches a panel.
type link struct {
	panel  int
	m      int // harmonics that have not decayed
	offset int
}

// usualOrder is how many harmonics work spaces hold without allocating.
const usualOrder = 64

// decayed is the size under which a harmonic no longer counts at a panel.
const decayed = 1e-7

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
		p := &s.panels[l.panel]
		size := p.p * (1 + 2*l.m)
		d.excite(p, s.rows[p.edge], s.rect.MediumK, l.m, d.send[l.offset:][:size])
		p.expand(d.C, d.A, l.m, d.receive[l.offset:][:size])
	}
}

func resize(x []float64, n int) []float64 {
	if cap(x) < n {
		return make([]float64, n)
	}
	return x[:n]
}

// excite writes minus what the multipoles of d contribute to the condition r in each cell of p: exact means of flux and temperature from the
// complex potential −q/(2πk) ln(z−c) + Σ d_m (a/(z−c))^m at the ends of the cells. out has p.p rows of 1+2m.
func (d *Disc) excite(p *panel, r row, k float64, m int, out []float64) {
	at := cellsOf[p.p].at
	unit := -1 / (2 * math.Pi * k)
	turn := 1i * conj(p.dir) // the outward normal becomes the real axis: the centre is on the other side of the cut
	z0 := p.at(at[0]) - d.C
	ln0, x0 := clog(z0*turn), scale(d.A, inverse(z0))
	for c := range p.p {
		o := out[c*(1+2*m):][:1+2*m]
		z1 := p.at(at[c+1]) - d.C
		ln1, x1 := clog(z1*turn), scale(d.A, inverse(z1))
		length := p.half * (at[c+1] - at[c])
		flux, temp := r.flux/length, scale(r.temp/length, conj(p.dir))
		o[0] = -unit * (flux*imag(ln1-ln0) + real(temp*(z1*ln1-z0*ln0-(z1-z0))))
		u0, u1 := x0, x1             // powers m
		lower := scale(d.A, ln1-ln0) // ∫ (a/z)^m dz
		for n := 1; n <= m; n++ {
			g, e := scale(flux, u1-u0), temp*lower
			o[2*n-1], o[2*n] = -(imag(g) + real(e)), -(real(g) - imag(e))
			lower = scale(d.A/float64(n), u0-u1)
			u0, u1 = u0*x0, u1*x1
		}
		z0, ln0, x0 = z1, ln1, x1
	}
}

// expand writes the coefficients b_0 … b_m of Re Σ b_n ((z−c)/a)^n that each mode of p makes about c: b_n = (1/2πn) ∫ σ (a/(y−c))^n ds, by a Gauss
// rule, and b_0 in closed form. out has p.p rows of 1+2m.
func (p *panel) expand(c complex128, a float64, m int, out []float64) {
	cols := 1 + 2*m
	clear(out)
	w := p.frame(c)
	var f potential
	f.at(w, p.p, real(w) < 0, false)
	unit := p.unit()
	var room [2 * usualOrder]float64
	powers := room[:]
	if m > usualOrder {
		powers = make([]float64, 2*m)
	}
	powers = powers[:2*m]
	g := &rules[points(w, p.p, m)]
	for i, t := range g.x {
		x := scale(a, inverse(p.at(t)-c))
		v := complex(-unit, 0)
		for n := range m {
			v *= x
			powers[2*n], powers[2*n+1] = real(v)/float64(n+1), imag(v)/float64(n+1)
		}
		for k := range p.p {
			addScaled(out[k*cols+1:][:2*m], g.p[i][k], powers)
		}
	}
	for k := range p.p {
		out[k*cols] = unit * real(f.first[k])
	}
	out[0] += unit * p.log()
}

// points is the number of Gauss points for ∫ P_k (a/(y−c))^n over a panel, w the centre in its frame. A rule of N points is off by about
// ρ^(k−2N), ρ the size of the ellipse through w; the power n costs a few points more.
func points(w complex128, p, m int) int {
	a := (math.Hypot(real(w)+1, imag(w)) + math.Hypot(real(w)-1, imag(w))) / 2
	rho := a + math.Sqrt(math.Max(a*a-1, 0))
	return int(math.Min(maxRule, (float64(p+m/3+2)+23/math.Log(rho))/2))
}

// pack puts the sources of one disc in the order of a row of excite.
func pack(buf []float64, q float64, d []complex128) []float64 {
	buf = append(buf, q)
	for _, z := range d {
		buf = append(buf, real(z), imag(z))
	}
	return buf
}

// Move puts a disc elsewhere and rewrites what depends on it, in a fraction of the time of New: for dragging. It reports whether the
// panels, which stay, are short enough there; if not, New is due (with some Slack). Not safe while others use the System.
func (s *System) Move(i int, c complex128) (resolved bool) {
	d := &s.discs[i]
	d.C = c
	s.link(d)
	return s.grading.resolves(d.Disc, s.panels)
}
