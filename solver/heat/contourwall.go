package heat

import (
	"math"
	"slices"

	"packrise/solver/harmonic"
	"packrise/solver/outline"
)

// contourWall is the border of a section in which not everything is round: every face that is not, and all that lies in one, is a contour of
// densities, as the wall is. Round parts among them stay pieces. What its metals make is not among the region's sources but a drive of the border.
type contourWall struct {
	p        *Problem
	fineness float64
	plan     *plan
	facing   []facing
	sys      *outline.Shaped
	was      *outline.Shaped // before other films
	drive    *drive
	cores    []float64 // of the last solution, by part
	by       []float64 // W/m by part in it
	exchange
}

// facing is a contour that the pieces' medium touches.
type facing struct {
	loop   outline.Loop
	behind []harmonic.Stack // what lies behind each stroke, or all of them, as if it were flat
	around bool             // the pieces lie within it
}

// amongPieces tells whether round parts can stay pieces: not where there is but one, nor where surfaces that are not round look into a gas.
func (p *Problem) amongPieces() bool {
	if p.Wall.Shape == BarePart {
		return false
	}
	l := beginPlan(p)
	l.choose()
	for i := range p.Parts {
		if q := &p.Parts[i]; l.drawn[i] && q.Core == Inside && q.Filling != Solid {
			return false
		}
	}
	return p.Filling == Solid || p.Wall.Shape != Hull && slices.Contains(l.drawn, false)
}

// layoutContours makes the top level of a section in which not everything is round.
func (m *Model) layoutContours() {
	p := &m.p
	for i := range p.Parts {
		p.Parts[i].Form.check()
	}
	factor, _, _ := m.set.Accuracy.settings()
	c := &contourWall{p: p, fineness: factor, plan: newPlanAmong(p)}
	c.drive = &drive{heats: make([]float64, len(c.plan.metals)), unit: make([]float64, len(c.plan.metals))}
	if m.contours != nil {
		c.sys = m.contours.sys
	}
	g := newRegion(p, -1, p.MediumK)
	var pieces []piece
	for _, q := range g.pieces {
		if !c.plan.drawn[q.part] {
			pieces = append(pieces, q)
		}
	}
	g.pieces, g.border = pieces, c
	c.face(g.k)
	m.contours, m.top, m.ready = c, g, false
	g.order(factor)
}

// reshape makes the top level anew after a contour has moved; contours that have not are kept.
func (m *Model) reshape() {
	m.dim()
	m.forget()
	m.layoutContours()
}

// holds tells whether moving a part of the top level changes contours.
func (c *contourWall) holds(part int) bool { return c.plan.drawn[part] || c.p.Wall.Shape == Hull }

// face lists what the pieces' medium touches.
func (c *contourWall) face(k float64) {
	l := c.plan
	lo, hi := l.bounds().Bounds()
	flat := 100 * math.Max(real(hi-lo), imag(hi-lo)) // a wall this round is flat to the parts
	for i := range c.p.Parts {
		q := &c.p.Parts[i]
		if q.In >= 0 || !l.drawn[i] {
			continue
		}
		s := harmonic.Stack{Inner: harmonic.End{Kind: harmonic.Medium, V: k}, R: flat, Outer: harmonic.End{Kind: harmonic.Medium, V: q.K}}
		if q.Core == Metal || q.Core == FixedBore {
			s.Outer = harmonic.End{Kind: harmonic.Held}
		}
		var out []Ring
		for j := len(q.Rings) - 1; j >= 0; j-- {
			out = append(out, q.Rings[j])
		}
		s.Rings = rings(flat, out)
		c.facing = append(c.facing, facing{loop: l.contours[l.skinOf(i)].Loop, behind: []harmonic.Stack{s}})
	}
	w := &c.p.Wall
	if w.Shape == Hull {
		return
	}
	f := facing{loop: l.contours[l.wall].Loop, around: true}
	for _, s := range l.contours[len(l.contours)-1].Sides {
		film := s.Film
		switch s.Kind {
		case outline.Insulated:
			film = 0
		case outline.Held:
			film = math.Inf(1)
		}
		f.behind = append(f.behind, outerWall(k, flat, w.Rings, film))
	}
	c.facing = append(c.facing, f)
}

// settle draws a piece in so that it keeps off the contours.
func (c *contourWall) settle(q *piece) {
	q.loose = q.drawn - c.plan.slackOf(q.part, q.at)
	q.a = q.loose
}

// gap is none: settle has kept bare metal off bare metal.
func (c *contourWall) gap(*piece) float64 { return math.Inf(1) }

func (c *contourWall) metal() bool { return false }

// order is the order that q needs beside the contours, 0 if it is not above m.
func (c *contourWall) order(g *region, q *piece, f float64, m int) int {
	need := 0
	if c.p.Wall.Shape == Hull {
		need = (*hullWall)(nil).order(g, q, f, m)
	}
	for i := range c.facing {
		d := &c.facing[i]
		for j := range d.loop {
			s := &d.loop[j]
			gap := dist(s.Nearest(q.at), q.at) - q.a
			reff := q.a
			switch {
			case s.R > 0 && d.around:
				reff = math.Min(q.a*s.R/math.Max(s.R-q.a, 1e-3*s.R), 1e3*q.a)
			case s.R > 0:
				reff = q.a * s.R / (q.a + s.R)
			}
			if openEnough(f*q.a, reff, gap, max(m, need)) {
				continue
			}
			b := &d.behind[min(j, len(d.behind)-1)]
			need = max(need, contact(f, q.a, reff, math.Max(gap, 0), g.k, between(q.skin(), face(b)), func(x float64) float64 {
				n := int(math.Min(math.Max(b.R/x, 1), 1e7))
				return between(q.conductivity(x), shows(g.k, b.Port(n).Rho))
			}))
		}
	}
	return need
}

// write discretises the contours for the region's pieces.
func (c *contourWall) write(g *region, stop func() bool) bool {
	if stop == nil {
		stop = func() bool { return false }
	}
	c.collect(g)
	around := outline.Around{MediumK: g.k, Discs: c.discs, Hull: c.plan.hull}
	for i := range g.pieces {
		t := make([]float64, g.orders[i])
		for n := range t {
			t[n] = g.pieces[i].stack.Port(n + 1).T
		}
		around.T = append(around.T, t)
	}
	sys := outline.NewShapedAround(c.plan.contours, around, c.sys, c.fineness, stop)
	if sys == nil {
		return false
	}
	c.sys = sys
	c.begin(&driven{sys, c.drive})
	return true
}

// move puts piece i elsewhere; false if the contours have to be discretised anew.
func (c *contourWall) move(g *region, i int) bool {
	q := &g.pieces[i]
	c.discs[i].C, c.discs[i].A = q.at, q.a
	return c.sys.MoveDisc(i, c.discs[i])
}

// outside takes other films and temperatures.
func (c *contourWall) outside() {
	c.plan = newPlanAmong(c.p)
	if c.sys != nil {
		c.was, c.sys = c.sys, c.sys.Outside(c.plan.sides())
		c.with = &driven{c.sys, c.drive}
	}
}

// solved finds the contours' answer to the whole solution, ground included, and adds the means that they send back.
func (c *contourWall) solved(g *region, charge, v, mean []float64) *bound {
	s := c.answer(g, charge, v, mean)
	c.tell(s)
	return s
}

// contourBound is what the contours' unknowns say of parts.
type contourBound struct {
	faces  []float64 // hottest of each contour
	metals []float64 // temperatures
	leaves func(contour int) float64
	out    []float64       // W/m through each stroke of the outside
	taken  map[int]float64 // W/m that each contour takes up by radiation
}

// tell fills in what the contours' unknowns say of them.
func (c *contourWall) tell(s *bound) {
	y, sys, l := s.y, c.sys, c.plan
	hot, mean, out := sys.Faces(y, c.src)
	n := len(l.contours)
	s.mean, s.hot = mean, hot[n:]
	if c.p.Wall.Shape != Hull {
		s.hot = hot[l.wall:n]
	}
	for i, q := range out {
		s.released += q
		if c.p.Wall.Shape == Rect {
			s.sides[boxOrder[i]] = q
		}
	}
	s.against = l.against(out)
	lo, hi := sys.Bounds().Bounds()
	s.mid, s.half = (lo+hi)/2, 0.505*math.Max(real(hi-lo), imag(hi-lo))
	s.field = func() pointField { return sys.Field(y) }
	s.drawn = &contourBound{faces: hot[:n], metals: c.temperatures(y), out: out}
	s.drawn.leaves = func(contour int) float64 { return sys.Leaves(y, contour) }
}

// temperatures of the metals for unknowns y and the sources that the exchange holds.
func (c *contourWall) temperatures(y []float64) []float64 { return c.metalsOf(y, c.src) }

// metalsAt are the temperatures of the metals after an exchange.
func (c *contourWall) metalsAt(e *exchange) []float64 { return c.metalsOf(e.y, e.src) }

func (c *contourWall) metalsOf(y []float64, src outline.Sources) []float64 {
	t := make([]float64, len(c.plan.metals))
	for k, i := range c.sys.Metals() {
		t[k] = c.sys.Metal(y, i)
	}
	c.sys.Felt(src, t)
	return t
}

func (c *contourWall) fork() border {
	f := *c
	f.exchange = c.exchange.fork()
	return &f
}

// readContours fills in the parts that are contours.
func (m *Model) readContours(r *Result, s *state) {
	if m.contours == nil {
		return
	}
	l, d := m.contours.plan, s.border.drawn
	for k, i := range l.metals {
		r.Core[i] = d.metals[k]
		r.Generated += m.contours.drive.heats[k]
	}
	for i := range m.p.Parts {
		q := &m.p.Parts[i]
		if !l.drawn[i] {
			continue
		}
		copy(r.Surfaces[i], d.faces[l.first[i]+l.skins[i]:])
		switch q.Core {
		case Metal:
			r.Surfaces[i][0] = r.Core[i]
		case FixedBore:
			r.Core[i], r.Absorbed[i] = q.Fixed, -d.leaves(l.first[i])
			if len(q.Rings) == 0 {
				r.Absorbed[i] += d.taken[l.first[i]]
			}
		default:
			r.Core[i] = r.Surfaces[i][0]
		}
	}
}

// remember keeps the temperatures of a solution for q by source.
func (c *contourWall) remember(m *Model, r *Result, q []float64) {
	if c == nil {
		return
	}
	c.cores, c.by = append([]float64(nil), r.Core...), make([]float64, len(r.Core))
	for s, v := range q {
		c.by[m.top.sources[s].part] = v
	}
	for k, i := range c.plan.metals {
		c.by[i] = c.drive.heats[k]
	}
}

// imbalance is the share of the heat that got lost, which no contour should lose.
func (r *Result) imbalance() float64 {
	sum, whole := r.Generated-r.Released, r.Generated
	for _, v := range r.Absorbed {
		sum -= v
		whole += math.Abs(v)
	}
	if whole == 0 {
		return 0
	}
	return math.Abs(sum) / whole
}

// looseContours adds to the estimates what unresolved densities do: found on random sections against the fine setting (TestShapedProperties).
func (m *Model) looseContours(r *Result) {
	if m.contours == nil {
		return
	}
	l, rise := m.contours.sys.Loose(), m.rise(r)
	m.widen(r, rise*(looseShare*l*l+2*r.imbalance()))
	for i := range m.p.Parts {
		if !m.contours.plan.drawn[i] {
			continue
		}
		switch m.p.Parts[i].Core {
		case Body, Bore, Inside: // a hottest place is of first order
			r.PartErrorK[i] += rise * hottestShare * l
		case FixedBore:
			r.PartErrorK[i] = 0
		}
		r.ErrorK = math.Max(r.ErrorK, r.PartErrorK[i])
	}
}
