package pack

import "math"

// aim is what a crowd strives for: the least of
//
//	Σ fy y + Σ kx/2 (x − tx)² + Σ ky/2 (y − ty)² − grow · size.
type aim struct {
	fy        []float64 // weight of each disc, which pulls it towards −y
	kx, ky    []float64 // springs of each disc along x and y
	to        []Disc    // the springs' ends
	grow      float64   // pull on the size of all, 0: the size is given
	enough    float64   // size at which growing may stop, 0: the largest
	rounds    int       // most Newton steps
	precision float64   // wanted of the gaps, in units of length
	still     float64   // last step that counts as having arrived, 0: precision
	slack     float64   // first slack of a closed contact, 0: little, for discs that do not overlap at the start
}

// press moves the discs to the (local) least of the aim without overlap, by a primal-dual interior-point method (S. Boyd and L. Vandenberghe,
// "Convex Optimization", 2004, section 11.7; slacks of their own as in J. Nocedal and S. J. Wright, "Numerical Optimization", 2006, chapter 19).
// The gap of two discs is linearised at each step, which errs towards a wider gap, so that steps keep discs apart. done is false when the rounds
// ran out.
func (c *crowd) press(a aim) (done bool) {
	p := presser{crowd: c, aim: a}
	p.mu = 0.02 * c.near
	p.slack = max(p.slack, 1e-3*c.near)
	p.still = max(p.still, p.precision)
	c.list(p.mu, p.slack)
	p.layout()
	stuck := 0
	for range a.rounds {
		if c.strayed() > c.near/4 {
			c.list(p.mu, 1e-3*c.near)
			p.layout()
		}
		p.assemble()
		p.step()
		if p.finished() || p.enough > 0 && p.size > p.enough {
			return true
		}
		if stuck++; p.alpha > 1e-3 {
			stuck = 0
		}
		if stuck > 6 {
			break
		}
	}
	return false
}

// strayed is the farthest that a disc's rim has gone, by moving and by growing, since the contacts were listed.
func (c *crowd) strayed() float64 {
	far, most := 0.0, 0.0
	for i, d := range c.discs {
		far = max(far, math.Hypot(d.X-c.since[i].X, d.Y-c.since[i].Y))
		most = max(most, d.R)
	}
	return far + most*(c.size-c.sizeThen)
}

type presser struct {
	*crowd
	aim
	mu    float64
	m     skyline
	b, dx []float64
	moved float64 // in the last step
	alpha float64 // its share
	tight float64 // largest lack of gap
}

func (p *presser) layout() {
	p.m.shape(p.shape(p.grow > 0))
	p.b = make([]float64, len(p.m.first))
}

// assemble sets up the Newton equations in the places and the size.
func (p *presser) assemble() {
	p.m.clear()
	clear(p.b)
	for k, i := range p.order {
		p.spring(2*k, i)
	}
	last := len(p.b) - 1
	if p.grow > 0 {
		p.b[last] = p.grow
		p.m.add(last, last, 1e-9*p.grow)
	}
	for k := range p.contacts {
		t := &p.contacts[k]
		p.look(t)
		if t.g > 0.1*t.s {
			t.s = t.g
		}
		w := t.f / t.s
		h := (p.mu - t.f*(t.g-t.s)) / t.s
		p.couple(t, w, h)
	}
}

func (p *presser) spring(row, i int) {
	d := p.discs[i]
	// A disc that nothing holds would fly off: let it go about as far as its neighbours in one step, less held back as the forces settle.
	q := max(1e-6, 20*p.mu/p.near) / p.near
	qx, qy := q, q
	if p.kx != nil {
		qx += p.kx[i]
		p.b[row] -= p.kx[i] * (d.X - p.to[i].X)
	}
	if p.ky != nil {
		qy += p.ky[i]
		p.b[row+1] -= p.ky[i] * (d.Y - p.to[i].Y)
	}
	if p.fy != nil {
		p.b[row+1] -= p.fy[i]
	}
	p.m.add(row, row, qx)
	p.m.add(row+1, row+1, qy)
}

// couple enters one contact with stiffness w and push h.
func (p *presser) couple(t *contact, w, h float64) {
	row := 2 * p.rank[t.i]
	p.b[row] += h * t.nx
	p.b[row+1] += h * t.ny
	p.block(row, row, w, t)
	if t.j == wallRound { // the wall's own curvature
		if d := math.Hypot(p.discs[t.i].X, p.discs[t.i].Y); d > 0 {
			p.block(row, row, t.f/d, &contact{nx: -t.ny, ny: t.nx})
		}
	}
	two := t.j >= 0 && p.rank[t.j] >= 0
	if two {
		col := 2 * p.rank[t.j]
		p.b[col] -= h * t.nx
		p.b[col+1] -= h * t.ny
		p.block(col, col, w, t)
		p.block(row, col, -w, t)
	}
	if p.grow == 0 {
		return
	}
	last := len(p.b) - 1
	p.b[last] -= h * t.need
	p.m.add(last, row, -w*t.nx*t.need)
	p.m.add(last, row+1, -w*t.ny*t.need)
	p.m.add(last, last, w*t.need*t.need)
	if two {
		col := 2 * p.rank[t.j]
		p.m.add(last, col, w*t.nx*t.need)
		p.m.add(last, col+1, w*t.ny*t.need)
	}
}

// block adds w n nᵀ at the rows of one disc and the columns of another, or of the same.
func (p *presser) block(row, col int, w float64, t *contact) {
	p.m.add(row, col, w*t.nx*t.nx)
	p.m.add(row+1, col, w*t.nx*t.ny)
	p.m.add(row+1, col+1, w*t.ny*t.ny)
	if row != col {
		p.m.add(row, col+1, w*t.nx*t.ny)
	}
}

// rate is how fast a contact's gap opens along the step dx.
func (p *presser) rate(t *contact) float64 {
	row := 2 * p.rank[t.i]
	v := t.nx*p.dx[row] + t.ny*p.dx[row+1]
	if t.j >= 0 && p.rank[t.j] >= 0 {
		col := 2 * p.rank[t.j]
		v -= t.nx*p.dx[col] + t.ny*p.dx[col+1]
	}
	if p.grow > 0 {
		v -= t.need * p.dx[len(p.dx)-1]
	}
	return v
}

// step solves for the step and takes as much of it as keeps slacks and forces positive.
func (p *presser) step() {
	p.m.factor(1e-14)
	p.dx = append(p.dx[:0], p.b...)
	p.m.solve(p.dx)
	primal, dual := p.shares()
	far, most := 0.0, 0.0
	for k, i := range p.order {
		far = max(far, math.Hypot(p.dx[2*k], p.dx[2*k+1]))
		most = max(most, p.discs[i].R)
	}
	if p.grow > 0 {
		far += most * max(0, p.dx[len(p.dx)-1])
	}
	if far*primal > p.near/4 { // no farther than the list of contacts is good for
		primal = p.near / 4 / far
		dual = min(dual, primal)
	}
	p.moved, p.alpha = far*primal, min(primal, dual)
	p.advance(primal, dual)
}

// change is what the whole step would do to a contact's slack and force.
func (p *presser) change(t *contact) (ds, df float64) {
	ds = p.rate(t) + t.g - t.s
	return ds, (p.mu-t.f*ds)/t.s - t.f
}

// shares are the parts of the step that the slacks and the forces allow.
func (p *presser) shares() (primal, dual float64) {
	primal, dual = 1, 1
	const keep = 0.98 // of the way to zero
	for k := range p.contacts {
		t := &p.contacts[k]
		ds, df := p.change(t)
		if ds < 0 {
			primal = min(primal, -keep*t.s/ds)
		}
		if df < 0 {
			dual = min(dual, -keep*t.f/df)
		}
	}
	return primal, dual
}

// advance takes the step.
func (p *presser) advance(primal, dual float64) {
	sum := 0.0
	p.tight = 0
	for k := range p.contacts {
		t := &p.contacts[k]
		ds, df := p.change(t)
		t.s += primal * ds
		t.f += dual * df
		sum += t.s * t.f
		p.tight = max(p.tight, t.s-t.g-primal*p.rate(t))
	}
	for k, i := range p.order {
		p.discs[i].X += primal * p.dx[2*k]
		p.discs[i].Y += primal * p.dx[2*k+1]
	}
	if p.grow > 0 {
		p.size += primal * p.dx[len(p.dx)-1]
	}
	p.lower(sum)
}

// lower chooses the next target of slack × force: much less after a good step, about the same after a short one.
func (p *presser) lower(sum float64) {
	if len(p.contacts) == 0 {
		return
	}
	mean := sum / float64(len(p.contacts))
	share := 0.7
	switch {
	case p.alpha > 0.9:
		share = 0.1
	case p.alpha > 0.5:
		share = 0.3
	}
	p.mu = max(share*mean, 1e-3*p.precision)
}

func (p *presser) finished() bool {
	return p.mu <= 2e-3*p.precision && p.moved < p.still && p.tight < p.precision
}
