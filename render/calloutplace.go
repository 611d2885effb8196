package render

import (
	"math"
	"sort"

	"packrise/solver/section"
)

// placeCallout tries the leads, the shortest and flattest first, until a label fits.
func (p *sectionPainter) placeCallout(w wanted, leads []lead) bool {
	type option struct {
		l    lead
		cost float64
	}
	options := make([]option, len(leads))
	for i, l := range leads {
		options[i] = option{l, p.leadCost(l)}
	}
	sort.SliceStable(options, func(i, j int) bool { return options[i].cost < options[j].cost })
	for _, gap := range []float64{16, 34, 60} {
		for _, o := range options {
			for _, c := range p.fits(w, o.l, gap*p.k) {
				if p.calloutFree(c) {
					p.called = append(p.called, c)
					p.taken = append(p.taken, c.box.grown(3*p.k))
					return true
				}
			}
		}
	}
	return false
}

// leadCost is the length of a leader up to the outer surface, with so much for every bend and for running up or down, where
// labels stand less well than at the sides.
func (p *sectionPainter) leadCost(l lead) float64 {
	last := l.pts[len(l.pts)-1]
	cost := p.edge.leave(last.X, last.Y, l.dx, l.dy) + 70*p.k*l.dy*l.dy
	if l.dx < 0 {
		cost += 8 * p.k
	}
	for i := 1; i < len(l.pts); i++ {
		cost += between(l.pts[i-1], l.pts[i]) + 40*p.k
	}
	return cost
}

// fits puts a label at the end of a lead, gap pixels outside: beside the end where the lead runs sideways, else on its line.
func (p *sectionPainter) fits(w wanted, l lead, gap float64) []callout {
	last := l.pts[len(l.pts)-1]
	t := p.edge.leave(last.X, last.Y, l.dx, l.dy) + gap
	x, y := last.X+t*l.dx, last.Y+t*l.dy
	head, sub := p.calloutFonts(w.color)
	width := p.c.MeasureText(w.head, head)
	for _, t := range w.sub {
		width = max(width, p.c.MeasureText(t, sub))
	}
	height := calloutLine * p.k * float64(1+len(w.sub))
	c := callout{head: w.head, sub: w.sub, color: w.color, align: 0.5}
	switch {
	case l.dx > 0.25:
		c.align = 0
	case l.dx < -0.25:
		c.align = 1
	}
	c.path = append(append(c.path, l.pts...), section.Point{X: x, Y: y})
	at := func(cx, cy float64) callout {
		c.box = box{cx - width/2, cy - height/2, cx + width/2, cy + height/2}
		return c
	}
	var out []callout
	if math.Abs(l.dx) > 0.35 {
		out = append(out, at(x+math.Copysign(width/2+4*p.k, l.dx), y+0.35*height*l.dy))
	}
	reach := min(width/2/max(1e-9, math.Abs(l.dx)), height/2/max(1e-9, math.Abs(l.dy))) + 4*p.k
	return append(out, at(x+reach*l.dx, y+reach*l.dy))
}

func (p *sectionPainter) calloutFree(c callout) bool {
	if !c.box.within(p.frame.grown(-2*p.k)) || p.edge.meetsBox(c.box.grown(5*p.k)) || !p.isFree(c.box.grown(2*p.k)) {
		return false
	}
	for i := 1; i < len(c.path); i++ {
		for _, t := range p.taken {
			if segmentMeetsBox(c.path[i-1], c.path[i], t) {
				return false
			}
		}
	}
	for _, o := range p.called {
		for i := 1; i < len(o.path); i++ {
			if segmentMeetsBox(o.path[i-1], o.path[i], c.box.grown(3*p.k)) {
				return false
			}
			for j := 1; j < len(c.path); j++ {
				if segmentsCross(o.path[i-1], o.path[i], c.path[j-1], c.path[j]) {
					return false
				}
			}
		}
	}
	return true
}

// segmentsCross tells whether two straight lines have a point in common.
func segmentsCross(a, b, c, d section.Point) bool {
	side := func(p, q, r section.Point) float64 { return (q.X-p.X)*(r.Y-p.Y) - (q.Y-p.Y)*(r.X-p.X) }
	return side(a, b, c)*side(a, b, d) < 0 && side(c, d, a)*side(c, d, b) < 0
}

// segmentMeetsBox tells whether a straight line runs through a box.
func segmentMeetsBox(a, b section.Point, r box) bool {
	lo, hi := 0.0, 1.0
	cut := func(p, d, from, to float64) {
		if d == 0 {
			if p < from || p > to {
				hi = -1
			}
			return
		}
		t0, t1 := (from-p)/d, (to-p)/d
		lo, hi = max(lo, min(t0, t1)), min(hi, max(t0, t1))
	}
	cut(a.X, b.X-a.X, r.x0, r.x1)
	cut(a.Y, b.Y-a.Y, r.y0, r.y1)
	return lo < hi
}
