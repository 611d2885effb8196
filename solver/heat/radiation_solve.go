package heat

import (
	"context"
	"math"
	"slices"
)

// Newton's method: at most so many rounds; in each the linear system is solved until the residual has come down by rough, or is well within
// what is wanted.
const (
	newtonRounds = 16
	newtonRough  = 0.02
	newtonNear   = 10.0 // K: radiation is too bent for steps that end farther off
	guessRise    = 15   // K over the wall: where surfaces begin
	mostDrive    = 400  // K: residuals are small beside this, however badly the medium conducts
	leastDrive   = 0.01 // K: what a section without heat is driven by, so that rounding is no residual
)

// solve finds the unknowns for given heats of the metals, by source. What does not lead anywhere from the last solution is tried from none.
func (c *coupled) solve(ctx context.Context, heats []float64, tol float64) (steps int, status Status) {
	warm := c.warm
	steps, status = c.newton(ctx, heats, tol)
	if status == StoppedEarly && warm {
		clear(c.z)
		c.warm = false
		more := 0
		more, status = c.newton(ctx, heats, tol)
		steps += more
	}
	c.finish(heats, status)
	return steps, status
}

// newton is solve from where the unknowns are.
func (c *coupled) newton(ctx context.Context, heats []float64, tol float64) (steps int, status Status) {
	r, none := make([]float64, len(c.z)), make([]float64, len(c.z))
	c.pass(none, heats, true)
	c.miss(r, none, true, nil)
	want := tol * (math.Min(norm(r[:c.held])+c.m.top.c2()*norm(heats), mostDrive) + leastDrive)
	first := !c.warm
	if first {
		t := c.guess(heats)
		c.top.each(func(k *knot) { k.guess(t) })
	}
	for range newtonRounds {
		c.pass(c.z, heats, true)
		net := (*knot).about
		if !first {
			c.top.each((*knot).rebase)
			net = func(k *knot, out []float64) { copy(out, k.rad.still) }
		}
		c.miss(r, c.z, true, net)
		size := norm(r)
		if math.IsNaN(size) || math.IsInf(size, 0) {
			return steps, StoppedEarly
		}
		if size <= want && !first {
			return steps, Converged
		}
		more, ok := c.improve(ctx, r, math.Max(math.Min(newtonRough, newtonNear/size), 0.3*want/size))
		steps += more
		if !ok {
			return steps, Cancelled
		}
		first = false
	}
	return steps, StoppedEarly
}

// guess is a temperature to begin with.
func (c *coupled) guess(heats []float64) float64 {
	t := c.m.p.Wall.Ambient + guessRise
	if c.m.top.border == nil {
		for _, q := range heats {
			t += q * c.m.outsideR()
		}
	}
	return t
}

// improve takes one Newton step from the residual r, which it spoils.
func (c *coupled) improve(ctx context.Context, r []float64, eta float64) (steps int, ok bool) {
	for i := range r {
		r[i] = -r[i]
	}
	d := make([]float64, len(r))
	steps, ok = gmres(c.linear((*knot).change), d, r, eta, ended(ctx))
	axpy(c.z, 1, d)
	return steps, ok
}

// finish makes the emissions add up to nothing, exactly, and passes a last time.
func (c *coupled) finish(heats []float64, status Status) {
	if c.warm = status == Converged; c.warm {
		c.top.each(func(k *knot) { k.level0(c.z) })
	}
	c.pass(c.z, heats, true)
}

// Over the square of the patches per turn, what patches of one temperature and radiosity each may do, as a share of the largest rise: more than nineteen of
// twenty random sections, and of bundles.
const (
	grainError     = 0.35
	hullGrainError = 0.2
)

// level0 takes the sum of the emissions off them.
func (k *knot) level0(z []float64) {
	if k.rad == nil {
		return
	}
	sum, area := 0.0, 0.0
	for p, u := range k.unit {
		sum += u * z[k.e0+p]
		area += k.rad.area[p]
	}
	for p, u := range k.unit {
		z[k.e0+p] -= sum / area * k.rad.area[p] / u
	}
}

// Dragging: in a draft surfaces see each other as they did until a part has moved this far.
const (
	frozenPath  = 1e-3 // m
	frozenError = 5.0  // of the rise, per metre of path
)

// freezes tells whether the surfaces need not look about for a draft of something that has moved, and how far it has.
func (c *coupled) freezes() (frozen bool, far float64) {
	far = c.far()
	frozen = c.m.set.Accuracy == Draft && c.warm && far > 0 && far < frozenPath
	c.top.each(func(k *knot) { frozen = frozen && (k.rad == nil || k.rad.ex != nil) })
	return frozen, far
}

// far is how far any piece has moved since the surfaces looked about.
func (c *coupled) far() (far float64) {
	c.top.each(func(k *knot) {
		if k.rad != nil {
			far = math.Max(far, k.rad.strays(k.g))
		}
	})
	return far
}

// solveCoupled is solve for sections with surfaces that radiate.
func (m *Model) solveCoupled(ctx context.Context, q []float64) *Result {
	_, _, tol := m.set.Accuracy.settings()
	if m.glow == nil {
		m.glow, m.before = m.newCoupled(m.before), nil
	}
	c := m.glow
	frozen, far := c.freezes()
	if !frozen {
		if far = 0; c.stale {
			m.dim()
			m.glow, m.before = m.newCoupled(m.before), nil
			c = m.glow
		}
		if !c.look(ctx) {
			return m.blank(Cancelled)
		}
	}
	steps, status := c.solve(ctx, q, tol)
	m.kept = nil
	c.heats = append(c.heats[:0], q...)
	c.cores = c.cores[:0]
	for i := range c.q {
		c.cores = append(c.cores, c.top.core(i, c.q))
	}
	s := c.top.state(c.z, c.q)
	r := m.result(s)
	m.estimate(r, s, c.q)
	m.contours.remember(m, r, q)
	r.Steps, r.Status, r.Radiates, r.Frozen = steps, status, true, frozen
	r.Unknowns = len(c.z)
	if rad := c.top.rad; rad != nil {
		r.Nusselt, r.Beyond = rad.nu, !rad.inRange
	}
	part, _, _ := m.set.Accuracy.grain()
	if m.p.Wall.Shape == Hull {
		r.blend(m.rise(r) * hullGrainError / (part * part))
	} else {
		m.widen(r, m.rise(r)*grainError/(part*part))
	}
	m.widen(r, m.rise(r)*frozenError*far)
	return r
}

// look lets all surfaces look about; false if ctx ended first.
func (c *coupled) look(ctx context.Context) bool {
	ok := true
	c.top.each(func(k *knot) {
		ok = ok && (k.rad == nil || k.rad.look(k.g, c.m.set.threads(), ended(ctx)))
	})
	return ok && ctx.Err() == nil
}

// widen adds to all estimates.
func (m *Model) widen(r *Result, add float64) {
	for i := range r.PartErrorK {
		r.PartErrorK[i] += add
	}
	r.ErrorK += add
}

// blend adds an error that has nothing to do with the others.
func (r *Result) blend(add float64) {
	for i, v := range r.PartErrorK {
		r.PartErrorK[i] = math.Hypot(v, add)
	}
	r.ErrorK = math.Hypot(r.ErrorK, add)
}

// dim sets the coupled problem aside, of which a new one may keep something.
func (m *Model) dim() {
	if m.glow != nil {
		m.before, m.glow = m.glow, nil
	}
}

// glowOn follows a move of piece i of the top level; the unknowns began at old.
func (m *Model) glowOn(i int, old []int) {
	c := m.glow
	if c == nil || !m.ready {
		return
	}
	c.cores = nil // of another place, even if the piece comes back to where surfaces looked about
	if r := c.top.rad; r != nil && r.sides != nil {
		if !r.sides.wall.follow(r.sides, i) {
			h, hull := r.sides.wall.(*hullWall)
			if frozen, _ := c.freezes(); !hull || !frozen || !h.refit(r.sides) {
				m.dim() // the wall was divided anew
				return
			}
			c.stale = true
		}
	}
	c.follow(old, m.top.offsets())
}

// Resume lets a model that has not solved yet start from what old, of a like section, knows: its solution, and what surfaces see of each other. The
// old model must not be used any more.
func (m *Model) Resume(old *Model) {
	if m.form != nil && old != nil && old.form != nil {
		m.form.resume(old.form)
		return
	}
	if m.top == nil || old == nil || old.top == nil || m.ready {
		return
	}
	if m.before = old.glow; m.before == nil {
		m.before = old.before
	}
	if a, b := m.top.offsets(), old.top.offsets(); slices.Equal(a, b) {
		m.x = old.x
	}
}
