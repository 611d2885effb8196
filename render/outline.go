package render

import (
	"math"
	"slices"

	"packrise/solver/section"
)

// disc is a circle, in mm or pixels.
type disc struct{ x, y, r float64 }

// outline is the outer surface of the section in mm: a circle, an upright rectangle, or, where nothing encloses the parts, the
// parts themselves.
type outline struct {
	round *disc
	poly  []section.Point // what is really the surface where round is only the circle round it; convex
	rect  *box
	parts []disc
	loops [][]section.Point // beside parts: bodies that are not round; convex
}

// holderOf returns the holder, nil if the shapes have none.
func holderOf(shapes []section.Shape) *section.Shape {
	for i := range shapes {
		if shapes[i].ID == "" {
			return &shapes[i]
		}
	}
	return nil
}

// outlineOf makes out the outer surface. An open bundle without a size of its own is the smallest circle round its parts.
func outlineOf(shapes []section.Shape) outline {
	h := holderOf(shapes)
	if o, ok := loopOutline(h, shapes); ok {
		return o
	}
	if h != nil && h.Width > 0 && h.Height > 0 {
		b := shapeBox(*h)
		return outline{rect: &b}
	}
	if h != nil && h.OuterR() > 0 {
		return outline{round: &disc{h.At.X, h.At.Y, h.OuterR()}}
	}
	var o outline
	if h != nil && h.Kind == section.Apart {
		o.loops = h.Loops
	}
	for _, s := range shapes {
		if s.ID == "" || s.Depth > 0 || s.Unset || !(s.OuterR() > 0) {
			continue
		}
		switch n := len(s.Loops); {
		case h != nil && h.Kind == section.Apart && n > 0:
			o.loops = append(o.loops[:len(o.loops):len(o.loops)], s.Loops[n-1])
		case !slices.ContainsFunc(o.loops, func(l []section.Point) bool { return insideLoop(l, s.At) }):
			o.parts = append(o.parts, disc{s.At.X, s.At.Y, s.OuterR()})
		}
	}
	if h != nil && h.Kind != section.Apart && h.Kind != section.NoHolder && len(o.parts) > 0 {
		d := enclose(o.parts)
		return outline{round: &d}
	}
	return o
}

func (o outline) known() bool {
	return o.round != nil || o.rect != nil || len(o.parts) > 0 || len(o.loops) > 0
}

// box returns the box around the outline, in its own unit.
func (o outline) box() box {
	switch {
	case o.rect != nil:
		return *o.rect
	case o.poly != nil:
		return loopBox(o.poly)
	case o.round != nil:
		return boxAround(o.round.x, o.round.y, o.round.r)
	}
	b := noBox()
	for _, d := range o.parts {
		b = b.with(boxAround(d.x, d.y, d.r))
	}
	for _, l := range o.loops {
		b = b.with(loopBox(l))
	}
	return b
}

// toPx returns the outline in pixels of the view.
func (o outline) toPx(v View) outline {
	one := func(d disc) disc {
		x, y := v.ToPx(section.Point{X: d.x, Y: d.y})
		return disc{x, y, d.r * v.PxPerMM}
	}
	var p outline
	if o.round != nil {
		d := one(*o.round)
		p.round = &d
	}
	line := func(of []section.Point) (out []section.Point) {
		for _, q := range of {
			x, y := v.ToPx(q)
			out = append(out, section.Point{X: x, Y: y})
		}
		return out
	}
	p.poly = line(o.poly)
	for _, l := range o.loops {
		p.loops = append(p.loops, line(l))
	}
	if o.rect != nil {
		x0, y0 := v.ToPx(section.Point{X: o.rect.x0, Y: o.rect.y1})
		x1, y1 := v.ToPx(section.Point{X: o.rect.x1, Y: o.rect.y0})
		p.rect = &box{x0, y0, x1, y1}
	}
	for _, d := range o.parts {
		p.parts = append(p.parts, one(d))
	}
	return p
}

// leave returns how far from (x, y) along the unit vector (dx, dy) the outline is left for good, 0 if it is never met.
func (o outline) leave(x, y, dx, dy float64) float64 {
	switch {
	case o.rect != nil:
		return max(0, leaveBox(*o.rect, x, y, dx, dy))
	case o.poly != nil:
		return leaveLoop(o.poly, x, y, dx, dy)
	case o.round != nil:
		return max(0, leaveDisc(*o.round, x, y, dx, dy))
	}
	far := 0.0
	for _, d := range o.parts {
		far = max(far, leaveDisc(d, x, y, dx, dy))
	}
	for _, l := range o.loops {
		far = max(far, leaveLoop(l, x, y, dx, dy))
	}
	return far
}

// leaveLoop returns the far crossing of a ray with a convex line, 0 if it misses.
func leaveLoop(points []section.Point, x, y, dx, dy float64) (far float64) {
	for _, s := range chordOf(points, x, y, dx, dy) {
		far = max(far, s.b)
	}
	return far
}

// leaveDisc returns the far crossing of a ray with a circle, −1 if it misses.
func leaveDisc(d disc, x, y, dx, dy float64) float64 {
	px, py := x-d.x, y-d.y
	b := px*dx + py*dy
	q := b*b - (px*px + py*py - d.r*d.r)
	if q < 0 {
		return -1
	}
	return -b + math.Sqrt(q)
}

// leaveBox returns the far crossing of a ray with a box, −1 if it misses.
func leaveBox(b box, x, y, dx, dy float64) float64 {
	in, out := math.Inf(-1), math.Inf(1)
	slab := func(p, d, lo, hi float64) bool {
		if d == 0 {
			return p >= lo && p <= hi
		}
		t0, t1 := (lo-p)/d, (hi-p)/d
		in, out = max(in, min(t0, t1)), min(out, max(t0, t1))
		return true
	}
	if !slab(x, dx, b.x0, b.x1) || !slab(y, dy, b.y0, b.y1) || in > out {
		return -1
	}
	return out
}

// meetsBox tells whether the outline's inside and the box have a point in common.
func (o outline) meetsBox(b box) bool {
	switch {
	case o.rect != nil:
		return o.rect.meets(b)
	case o.poly != nil:
		return loopMeetsBox(o.poly, b)
	case o.round != nil:
		return discMeetsBox(*o.round, b)
	}
	for _, d := range o.parts {
		if discMeetsBox(d, b) {
			return true
		}
	}
	return slices.ContainsFunc(o.loops, func(l []section.Point) bool { return loopMeetsBox(l, b) })
}

func discMeetsBox(d disc, b box) bool {
	dx := d.x - max(b.x0, min(d.x, b.x1))
	dy := d.y - max(b.y0, min(d.y, b.y1))
	return dx*dx+dy*dy < d.r*d.r
}

// enclose returns a circle round the discs, within 0.1 % of the smallest: the centre walks towards the farthest disc by
// shrinking steps (Bădoiu & Clarkson 2003, "Smaller core-sets for balls").
func enclose(discs []disc) disc {
	c := discs[0]
	far := func() (d disc, reach float64) {
		for _, e := range discs {
			if t := math.Hypot(e.x-c.x, e.y-c.y) + e.r; t > reach {
				d, reach = e, t
			}
		}
		return d, reach
	}
	for i := range 2000 {
		d, reach := far()
		if reach <= 0 {
			break
		}
		l := math.Hypot(d.x-c.x, d.y-c.y)
		if l == 0 {
			break
		}
		// the farthest point of that disc lies at distance reach
		step := reach / float64(i+2)
		c.x += (d.x - c.x) / l * step
		c.y += (d.y - c.y) / l * step
	}
	_, c.r = far()
	return c
}
