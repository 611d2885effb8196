package gas

import (
	"math"
	"slices"
)

// Sigma is the Stefan–Boltzmann constant, W/m²K⁴ (CODATA 2018, exact digits 5.670374419…e-8).
const Sigma = 5.670374419e-8

// Exchange is what the patches of an enclosure give off and take up: grey, diffuse radiation, and convection through one air node.
type Exchange struct {
	*Enclosure
	emissivity []float64
	root       []float64 // √((1−ε)/A)
	rho        []float64 // (1−ε)/(ε A), nil if something is bright

	node  []float64 // W/mK from each patch to the air node, nil without one
	total float64

	y, b, p, q, r []float64
}

// NewExchange takes one emissivity per patch, 0 to 1.
func NewExchange(e *Enclosure, emissivity []float64) *Exchange {
	n := e.Len()
	x := &Exchange{Enclosure: e, emissivity: emissivity, root: make([]float64, n)}
	x.y, x.b, x.p, x.q, x.r = make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n)
	for i, v := range emissivity {
		x.root[i] = math.Sqrt((1 - v) / e.Area(i))
	}
	if len(emissivity) > 0 && slices.Min(emissivity) >= bright {
		x.rho = make([]float64, n)
		for i, v := range emissivity {
			x.rho[i] = (1 - v) / (v * e.Area(i))
		}
	}
	return x
}

// Fork is the exchange with work space of its own, so that both can be used at the same time; neither may be changed meanwhile.
func (x *Exchange) Fork() *Exchange {
	f := *x
	n := x.Len()
	f.y, f.b, f.p, f.q, f.r = make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n)
	return &f
}

// bright is the emissivity below which radiosities are better found by themselves than along with the emissions.
const bright = 0.5

// Net sets out to the net emission (W/m) of patches at temperatures t (K). Their sum is nought.
func (x *Exchange) Net(out, t []float64) {
	for i, v := range t {
		v = math.Max(v, 0)
		x.y[i] = Sigma * v * v * v * v
	}
	x.radiate(out)
	x.convect(out, t)
}

// Change sets out to the change of the net emission for small changes dt (K) of temperatures t.
func (x *Exchange) Change(out, t, dt []float64) {
	x.slope(t, dt)
	x.radiate(out)
	x.convect(out, dt)
}

// slope puts the change of the black emissive powers into y.
func (x *Exchange) slope(t, dt []float64) {
	for i, v := range t {
		v = math.Max(v, 0)
		x.y[i] = 4 * Sigma * v * v * v * dt[i]
	}
}

// NetOf is Net for an iteration that seeks the emissions e (W/m) as well: where surfaces are dark enough it takes their radiosities from e, so
// that out is the net emission only if it equals e. Heat to the air is part of both.
func (x *Exchange) NetOf(out, t, e []float64) {
	if x.rho == nil {
		x.Net(out, t)
		return
	}
	for i, v := range t {
		v = math.Max(v, 0)
		x.y[i] = Sigma * v * v * v * v
	}
	x.leave(out, t, e)
}

// ChangeOf is to NetOf what Change is to Net, for small changes dt and de.
func (x *Exchange) ChangeOf(out, t, dt, de []float64) {
	if x.rho == nil {
		x.Change(out, t, dt)
		return
	}
	x.slope(t, dt)
	x.leave(out, dt, de)
}

// leave sets out to (A − G) J with the radiosities J = y − (1−ε)/(ε A) e, and to what goes to the air at temperatures t, which is no radiation.
func (x *Exchange) leave(out, t, e []float64) {
	clear(x.p)
	x.convect(x.p, t)
	for i, v := range x.y {
		x.b[i] = v - x.rho[i]*(e[i]-x.p[i])
	}
	x.Product(out, x.b)
	for i := range out {
		out[i] = x.Area(i)*x.b[i] - out[i] + x.p[i]
	}
}

const radiosityTolerance = 1e-11

// radiate sets out to the net emission of patches of black emissive power y: A (J − F J) with the radiosity J = ε y + (1−ε) F J. With
// J = ε y + √((1−ε)/A) h and G = A F the system (I − √ G √) h = √ G ε y is symmetric, whatever the emissivities; conjugate gradients take
// a step or two per decade.
func (x *Exchange) radiate(out []float64) {
	b, r, p, q := x.b, x.r, x.p, x.q
	for i, v := range x.y {
		b[i] = x.emissivity[i] * v
	}
	x.Product(r, b)
	first := 0.0
	for i := range r {
		r[i] *= x.root[i]
		p[i] = r[i]
		first += r[i] * r[i]
	}
	rr := first
	for steps := 0; rr > radiosityTolerance*radiosityTolerance*first && steps < 500; steps++ {
		for i := range p { // out serves as scratch
			out[i] = x.root[i] * p[i]
		}
		x.Product(q, out)
		pq := 0.0
		for i := range q {
			q[i] = p[i] - x.root[i]*q[i]
			pq += p[i] * q[i]
		}
		if pq <= 0 {
			break
		}
		a := rr / pq
		next := 0.0
		for i := range r {
			b[i] += a * out[i]
			r[i] -= a * q[i]
			next += r[i] * r[i]
		}
		f := next / rr
		for i := range p {
			p[i] = r[i] + f*p[i]
		}
		rr = next
	}
	x.Product(out, b)
	for i := range out {
		out[i] = x.Area(i)*b[i] - out[i]
	}
}

// SetNode gives the air a node with the given conductances (W/mK) to the patches, nil takes it away. The node takes up no heat itself.
func (x *Exchange) SetNode(conductance []float64) {
	x.node, x.total = conductance, 0
	for _, c := range conductance {
		x.total += c
	}
	if x.total == 0 {
		x.node = nil
	}
}

// convect adds what goes to the air node.
func (x *Exchange) convect(out, t []float64) {
	if x.node == nil {
		return
	}
	mean := 0.0
	for i, c := range x.node {
		mean += c * t[i]
	}
	mean /= x.total
	for i, c := range x.node {
		out[i] += c * (t[i] - mean)
	}
}
