package heat

import (
	"context"
	"math"

	"packrise/solver/gas"
	"packrise/solver/outline"
)

// drivenPatches are patches of contours with their drive.
type drivenPatches struct {
	*outline.ShapedPatches
	drive *drive
}

// RespondTo adds the drive to the sources of the pieces.
func (p *drivenPatches) RespondTo(y []float64, src outline.Sources, ground bool, w []float64) {
	p.ShapedPatches.RespondTo(y, p.drive.with(src, ground), ground, w)
}

// bodies are the parts of the top level that are contours, as surfaces: their whole outlines.
func (c *contourWall) bodies() (discs []gas.Disc) {
	for _, i := range c.tops() {
		discs = append(discs, c.plan.disc(i, strokes(c.plan.contours[c.plan.skinOf(i)].Loop)))
	}
	return discs
}

// tops are the parts of the top level that are contours.
func (c *contourWall) tops() (parts []int) {
	for i := range c.p.Parts {
		if c.p.Parts[i].In == -1 && c.plan.drawn[i] {
			parts = append(parts, i)
		}
	}
	return parts
}

// divide divides the outsides of the parts that are contours, and the wall's inside. The grain's discs are the pieces, then those parts.
func (c *contourWall) divide(grain *gas.Grain) *sides {
	l := c.plan
	tops := c.tops()
	pieces := len(grain.Discs) - len(tops)
	place := map[int]int{l.wall: -1}
	for k, i := range tops {
		place[l.skinOf(i)] = pieces + k
	}
	on, usual := 0, 0.0 // Patches asks for contours in turn
	p := c.sys.Patches(func(contour int) bool {
		k, ok := place[contour]
		if on = k; ok {
			if usual = l.contours[contour].Loop.Perimeter() / (1.5 * grain.Turn); k >= 0 {
				usual *= grain.Turn / float64(grain.PerTurn)
			}
		}
		return ok
	}, func(z complex128) float64 { return grain.Longest(z, usual, on) })
	s := &sides{wall: c, with: &c.exchange, a: p.A, b: p.B, length: p.Length, patch: &drivenPatches{p, c.drive}, taken: make([]float64, len(p.Length))}
	for _, i := range tops {
		at := l.skinOf(i)
		off := (l.outer(i).Perimeter() - l.contours[at].Loop.Perimeter()) / (2 * math.Pi)
		s.bodies = append(s.bodies, l.disc(i, c.segments(p, at, off)))
	}
	s.walls = c.segments(p, l.wall, 0)
	for _, contour := range p.Contour {
		e := c.p.Wall.Emissivity
		for _, i := range tops {
			if l.skinOf(i) == contour {
				e = c.p.Parts[i].Emissivity
			}
		}
		s.eps = append(s.eps, e)
	}
	return s
}

// segments are the patches of a contour, moved outwards by off.
func (c *contourWall) segments(p *outline.ShapedPatches, contour int, off float64) (out []gas.Segment) {
	for k, at := range p.Contour {
		if at == contour {
			out = append(out, segment(c.plan.contours[contour].Loop, p.A[k], p.B[k], off))
		}
	}
	for k := range out { // neighbours meet exactly
		out[(k+1)%len(out)].A = out[k].B
	}
	return out
}

// measure works out what patches of contours are asked for; false if stop asked for an end.
func (s *sides) measure(stop func() bool) bool {
	p, ok := s.patch.(*drivenPatches)
	return !ok || p.Measure(stop)
}

func (c *contourWall) exposed(int) [][2]float64 { return nil }

// direct adds what patches of an outside without layers give off.
func (c *contourWall) direct(b *bound, s *sides) {
	last := len(c.plan.contours) - 1
	l := c.plan.contours[last].Loop
	p := s.patch.(*drivenPatches)
	b.drawn.taken = map[int]float64{}
	for k, v := range s.taken {
		b.drawn.taken[p.Contour[k]] += v
		if p.Contour[k] != last {
			continue
		}
		on := nearestStroke(l, (p.A[k]+p.B[k])/2)
		b.released += v
		b.drawn.out[on] += v
		if c.p.Wall.Shape == Rect {
			b.sides[boxOrder[on]] += v
		}
	}
}

// follow leads the patches over to other films, or a piece that has moved.
func (c *contourWall) follow(s *sides, moved int) bool {
	p := s.patch.(*drivenPatches)
	if !p.Of(c.sys) {
		if moved >= 0 || c.was == nil || !p.Of(c.was) {
			return false
		}
		p.ShapedPatches = p.On(c.sys)
	}
	if moved >= 0 {
		p.Follow(moved)
	}
	return true
}

// glowColumn is contourColumn about the last solution of a section whose surfaces radiate; c is to be used for nothing else.
func (m *Model) glowColumn(ctx context.Context, c *coupled, s int) ([]float64, bool) {
	wall := m.contours
	q := make([]float64, len(c.q))
	z, r := make([]float64, len(c.z)), make([]float64, len(c.z))
	pass := func() {
		if s < len(q) {
			q[s] = 1
		} else {
			wall.drive.unit[s-len(q)] = 1
		}
		c.pass(z, q, false)
	}
	pass()
	c.miss(r, z, false, (*knot).change)
	clear(wall.drive.unit)
	for i := range r {
		r[i] = -r[i]
	}
	if _, ok := gmres(c.linear((*knot).change), z, r, tangentTolerance, ended(ctx)); !ok {
		return nil, false
	}
	pass()
	clear(wall.drive.unit)
	t := make([]float64, len(q))
	for i := range t {
		t[i] = c.top.core(i, c.q)
	}
	with := c.top.g.border.hand()
	if c.top.rad != nil {
		with = c.top.rad.sides.with
	}
	return append(t, wall.metalsAt(with)...), true
}

// contourTangent is contourInfluence about the last solution of a section whose surfaces radiate; held bores are held.
func (m *Model) contourTangent(ctx context.Context) ([][]float64, bool) {
	if m.contours.cores == nil {
		m.loadContours(m.heats(nil))
	}
	if !m.solvedHere(ctx) {
		return nil, false
	}
	pieces := len(m.top.sources)
	all := pieces + len(m.contours.plan.metals)
	k := make([][]float64, all)
	for s := range k {
		k[s] = make([]float64, all)
	}
	held := make([]bool, all)
	for _, s := range m.held {
		held[s] = true
	}
	c := m.glow.fork()
	for s := range all {
		if held[s] {
			continue
		}
		t, ok := m.glowColumn(ctx, c, s)
		if !ok {
			return nil, false
		}
		for i, v := range t {
			if !held[i] {
				k[i][s] = v
			}
		}
	}
	return k, true
}

// tangentAt is the ground that belongs to influence k at the last solution.
func (c *contourWall) tangentAt(k [][]float64) []float64 {
	ground := make([]float64, len(k))
	for i, row := range k {
		if row == nil {
			continue
		}
		ground[i] = c.cores[i]
		for j, v := range row {
			if k[j] != nil {
				ground[i] -= v * c.by[j]
			}
		}
	}
	return ground
}
