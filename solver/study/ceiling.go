package study

import (
	"context"
	"math"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Ceiling is the largest common factor on some currents, others as given, at which nothing is over what it may reach.
type Ceiling struct {
	Factor  float64 // on the currents; not rounded
	Governs string  // thing that stops it
	TempC   float64 // its temperature there
	LimitC  float64
	SetBy   string         // what sets its limit
	Result  *rating.Result // the full solution at Factor; nil at 0
	Runaway bool           // no steady temperature exists above Factor, and that is what stops it
	// Hopeless: something is over with these currents at zero; Factor is 0 and Governs says what.
	Hopeless bool
	// Unbounded: nothing reaches its limit at mostFactor times the currents, or they are zero; Factor is +Inf.
	Unbounded bool
}

const (
	mostFactor = 1000 // on currents
	closeK     = 0.1  // a ceiling is found when the closest thing has less room than this
	aimK       = 0.03 // room aimed at, so that rounding of a solution doesn't put it over
	mostClimbs = 40   // solutions
	narrow     = 1e-5 // relative width of x at which a jump (a runaway) is found
)

// climber searches in x, the square of the factor, since heat goes with it and temperatures nearly so.
type climber struct {
	with  func(factor float64) *section.Document
	solve func(*section.Document) (*rating.Result, error)
	room  judge
	found Ceiling
	lo    *step   // largest x with nothing over
	below *step   // the one before it
	hi    *step   // smallest x with something over and temperatures known
	wall  float64 // smallest x known to have no steady state
	falls int     // solutions without a steady state
}

type step struct {
	x    float64
	list []thing
	k    float64 // least room
	r    *rating.Result
}

// climb finds the ceiling of the currents that with scales. base is the solution at factor 1, first a guess of the factor (0: none).
func (s *Study) climb(ctx context.Context, e *rating.Engine, base *rating.Result, with func(float64) *section.Document, room judge, first float64, o Options) (Ceiling, error) {
	c := &climber{with: with, room: room, wall: math.Inf(1)}
	c.solve = func(d *section.Document) (*rating.Result, error) { return solveWith(ctx, e, d, o) }
	if !c.note(1, base) {
		return Ceiling{Factor: math.Inf(1), Unbounded: true}, nil
	}
	x := first * first
	if x <= 0 {
		x = c.next()
	}
	for range mostClimbs {
		if c.done() {
			break
		}
		r, err := c.solve(c.with(math.Sqrt(x)))
		if err != nil {
			return Ceiling{}, err
		}
		c.note(x, r)
		x = c.next()
		if x >= mostFactor*mostFactor && c.hi == nil && math.IsInf(c.wall, 1) {
			return Ceiling{Factor: math.Inf(1), Unbounded: true}, nil
		}
	}
	return c.ceiling()
}

// note keeps a solution. False if nothing in it has a limit.
func (c *climber) note(x float64, r *rating.Result) bool {
	if r.Status == heat.ThermalRunaway {
		c.wall, c.falls = math.Min(c.wall, x), c.falls+1
		if r.Settles > 0 && r.Settles < 1 { // of all currents: right when all are scaled, else a place to look
			c.found.Runaway = true
		}
		return true
	}
	list := things(r)
	_, k, ok := closest(list, c.room)
	if !ok {
		return false
	}
	p := &step{x, list, k, r}
	if k >= 0 && (c.lo == nil || x > c.lo.x) {
		c.below, c.lo = c.lo, p
	}
	if k < 0 && (c.hi == nil || x < c.hi.x) {
		c.hi = p
	}
	return true
}

// top is the least x that is too much.
func (c *climber) top() float64 {
	if c.hi != nil {
		return math.Min(c.hi.x, c.wall)
	}
	return c.wall
}

// done: something is within reach of its limit, or lo and top are together, or even nothing is too much.
func (c *climber) done() bool {
	switch {
	case c.lo != nil && c.lo.k < closeK:
		return true
	case c.lo != nil:
		top := c.top()
		return !math.IsInf(top, 1) && top-c.lo.x <= narrow*top
	}
	return c.hi != nil && c.hi.x == 0 || c.wall == 0
}

// next proposes an x: where the first thing reaches its limit by a line through two solutions, or through one and the outside.
func (c *climber) next() float64 {
	switch {
	case c.lo != nil && c.hi != nil:
		return c.between(c.lo, c.hi)
	case c.lo != nil && !math.IsInf(c.wall, 1):
		return (c.lo.x + c.wall) / 2
	case c.lo != nil:
		return math.Min(c.beyond(c.lo), mostFactor*mostFactor)
	case c.hi != nil:
		return c.down(c.hi)
	}
	if c.falls > 2 { // where others run away nothing is found below, and each of these takes long
		return 0
	}
	return c.wall / 4
}

// between takes for each thing the line through its rooms, and the least crossing; never nearer to an end than a little, so that it ends.
func (c *climber) between(lo, hi *step) float64 {
	x := hi.x
	for i := range lo.list {
		if !lo.list[i].limit.OK {
			continue
		}
		a, b := c.room(i, lo.list[i]), c.room(i, hi.list[i])
		if b < aimK && a > b {
			x = math.Min(x, lo.x+(hi.x-lo.x)*(a-aimK)/(a-b))
		}
	}
	w := hi.x - lo.x
	if c.wall < hi.x {
		return (lo.x + c.wall) / 2
	}
	return math.Min(math.Max(x, lo.x+0.02*w), hi.x-0.02*w)
}

// beyond guesses from solutions below: by the line through two, or, from one, as if rises over the ambient went with x (they do not where
// the sun or warm sides heat, nor where another load stays).
func (c *climber) beyond(p *step) float64 {
	if c.below != nil {
		return c.along(c.below, p)
	}
	x := 4 * p.x
	if p.x == 0 {
		x = 1
	}
	for i, t := range p.list {
		rise := t.tempC - p.r.AmbientC
		if !t.limit.OK || rise <= 0 {
			continue
		}
		x = math.Min(x, p.x*(1+(c.room(i, t)-aimK)/rise))
	}
	return math.Max(x, p.x*1.0005+1e-9)
}

// along goes on along the line through two solutions, at most four times as far.
func (c *climber) along(a, b *step) float64 {
	w := b.x - a.x
	x := b.x + 4*math.Max(w, b.x)
	for i := range b.list {
		if !b.list[i].limit.OK {
			continue
		}
		if was, is := c.room(i, a.list[i]), c.room(i, b.list[i]); was > is {
			x = math.Min(x, b.x+w*(is-aimK)/(was-is))
		}
	}
	return math.Max(x, b.x*1.0005)
}

// down guesses from one solution above.
func (c *climber) down(p *step) float64 {
	if p.x < 1e-8 {
		return 0
	}
	x := p.x
	for i, t := range p.list {
		rise := t.tempC - p.r.AmbientC
		if !t.limit.OK || rise <= 0 {
			continue
		}
		x = math.Min(x, p.x*(1+(c.room(i, t)-aimK)/rise))
	}
	if x <= 0.02*p.x {
		x = 0.02 * p.x
		if p.x < 1e-3 {
			return 0
		}
	}
	return x
}

// ceiling words what was found.
func (c *climber) ceiling() (Ceiling, error) {
	out := Ceiling{}
	at := c.lo
	if at == nil {
		at, out.Hopeless = c.hi, true
	}
	if at == nil { // nothing settles, not even at zero
		out.Hopeless, out.Runaway = true, true
		return out, nil
	}
	i, _, _ := closest(at.list, c.room)
	t := at.list[i]
	out.Governs, out.TempC, out.LimitC, out.SetBy = t.id, t.tempC, t.limit.V, t.by
	if out.Hopeless {
		return out, nil
	}
	out.Factor, out.Result = math.Sqrt(at.x), at.r
	out.Runaway = at.k >= closeK && c.wall <= c.top()
	return out, nil
}
