package outline

import "math"

// block holds the potentials of one panel at the ends of the cells of another.
type block struct {
	w [maxModes + 1]complex128 // those ends in the frame of the first
	f [maxModes + 1]potential
}

// look evaluates the potentials; second asks for their integrals too.
func (b *block) look(from, to *panel, second bool) {
	at := cellsOf[to.p].at
	inv := 1 / from.half
	if from.edge == to.edge { // exactly on the real axis
		mid := to.along - from.along
		for l, x := range at {
			b.w[l] = complex((mid+to.half*x)*inv, 0)
			b.f[l].at(b.w[l], from.p, mid < 0, second)
		}
		return
	}
	turn := scale(inv, conj(from.dir))
	mid, step := (to.mid-from.mid)*turn, to.dir*turn
	for l, x := range at {
		b.w[l] = mid + scale(to.half*x, step)
		b.f[l].at(b.w[l], from.p, real(mid) < 0, second)
	}
}

// unit is the factor of a panel's potentials: T = −(1/2π) ∫ σ ln|z−y| ds.
func (p *panel) unit() float64 { return -p.half / (2 * math.Pi) }

// log is what mode 0 has besides the potential in the panel's own frame: ∫ ln(half) dt.
func (p *panel) log() float64 { return 2 * math.Log(p.half) }

// flux adds c times the mean of ∂T/∂n over cell l of to (principal value) to a, per mode of from. It is the difference of the conjugate
// potential between the ends of the cell; nothing crosses the line of a straight edge.
func (b *block) flux(c float64, from, to *panel, l int, a []float64) {
	if from.edge == to.edge {
		return
	}
	at := cellsOf[to.p].at
	c *= from.unit() / (to.half * (at[l+1] - at[l]))
	for k := range a {
		a[k] += c * (imag(b.f[l+1].first[k]) - imag(b.f[l].first[k]))
	}
}

// temp adds c times the mean of T over cell l of to.
func (b *block) temp(c float64, from *panel, l int, a []float64) {
	c *= from.unit()
	step := inverse(b.w[l+1] - b.w[l])
	for k := range a {
		a[k] += c * real((b.f[l+1].second[k]-b.f[l].second[k])*step)
	}
	a[0] += c * from.log()
}

// equations writes the rows of to in the modes of from.
func (b *block) equations(s *System, from, to *panel) {
	r := &s.rows[to.edge]
	for l := range to.p {
		a := s.lu.Data[(to.dof+l)*s.lu.Stride+from.dof:][:from.p]
		if from == to {
			for k, m := range cellsOf[to.p].mean[l] {
				a[k] = r.density * m
			}
		}
		if r.flux != 0 {
			b.flux(r.flux, from, to, l, a)
		}
		if r.temp != 0 {
			b.temp(r.temp, from, l, a)
		}
	}
}

// temperatures keeps the temperature at the ends of the cells of to.
func (b *block) temperatures(s *System, from, to *panel) {
	unit, log := from.unit(), from.log()
	for l := range to.p + 1 {
		t := s.temps[(to.firstCell+l)*s.n+from.dof:][:from.p]
		for k := range t {
			t[k] = unit * real(b.f[l].first[k])
		}
		t[0] += unit * log
	}
}
