package render

import (
	"math"

	"packrise/solver/section"
)

// span is a piece of a straight line, from a to b along it.
type span struct{ a, b float64 }

// hatching draws slanting lines over whatever is over its limit, so that this does not hang on a colour alone, and tells
// whether there was anything.
func (p *sectionPainter) hatching() (any bool) {
	if p.s.Stale {
		return false
	}
	for _, s := range p.shapes {
		if r, ok := p.read[s.ID]; !ok || !r.Over() || s.Unset {
			continue
		}
		any = true
		d := p.disc(s)
		hole := 0.0
		if w := wall(s); s.Kind == section.Cable && len(w) > 0 {
			hole = w[0].R0 * p.v.PxPerMM
		} else if len(s.Rings) > 0 {
			hole = s.Rings[0].R0 * p.v.PxPerMM
		}
		if len(s.Loops) > 0 {
			first := 0
			if s.Kind == section.Cable {
				first = len(s.Rings) - len(wall(s))
			}
			p.hatchLoops(s, first, len(s.Rings)-1)
			continue
		}
		p.hatch(boxAround(d.x, d.y, d.r), func(x, y, dx, dy float64) []span {
			return minus(chord(d, x, y, dx, dy), chord(disc{d.x, d.y, hole}, x, y, dx, dy))
		})
	}
	for _, r := range p.s.Readings {
		if r.Over() && r.Kind == "layer" {
			any = true
			p.hatchLayer(layerOf(r.ID, p.s.Shapes))
		}
	}
	return any
}

// hatchLayer hatches one layer of the holder's wall or of a cable's jacket.
func (p *sectionPainter) hatchLayer(owner *section.Shape, i int) {
	if owner == nil {
		return
	}
	r, ok := layerRing(*owner, i)
	if !ok {
		return
	}
	if len(owner.Loops) > 0 {
		n := len(owner.Rings) - len(wall(*owner)) + i
		p.hatchLoops(*owner, n, n)
		return
	}
	k := p.v.PxPerMM
	if owner.Width > 0 && p.edge.rect != nil {
		t := owner.OuterR()
		out, in := p.edge.rect.grown(-(t-r.R1)*k), p.edge.rect.grown(-(t-r.R0)*k)
		p.hatch(out, func(x, y, dx, dy float64) []span {
			return minus(across(out, x, y, dx, dy), across(in, x, y, dx, dy))
		})
		return
	}
	d := p.disc(*owner)
	out, in := disc{d.x, d.y, r.R1 * k}, disc{d.x, d.y, r.R0 * k}
	p.hatch(boxAround(out.x, out.y, out.r), func(x, y, dx, dy float64) []span {
		return minus(chord(out, x, y, dx, dy), chord(in, x, y, dx, dy))
	})
}

// hatchLoops hatches rings first to last of a shape that is not round.
func (p *sectionPainter) hatchLoops(s section.Shape, first, last int) {
	d := p.disc(s)
	out := p.pixels(s.Loops[last])
	var in []section.Point
	if first > 0 {
		in = p.pixels(s.Loops[first-1])
	}
	p.hatch(boxAround(d.x, d.y, d.r), func(x, y, dx, dy float64) []span {
		return minus(chordOf(out, x, y, dx, dy), chordOf(in, x, y, dx, dy))
	})
}

// hatch strokes the lines x + y = n·gap inside b where cut leaves them.
func (p *sectionPainter) hatch(b box, cut func(x, y, dx, dy float64) []span) {
	const s = math.Sqrt2 / 2
	if !b.meets(p.frame) {
		return
	}
	gap := 8 * p.k
	var lines [][4]float64
	for n := math.Ceil((b.x0 + b.y0) / gap); n*gap <= b.x1+b.y1; n++ {
		x, y := n*gap/2, n*gap/2
		for _, c := range cut(x, y, s, -s) {
			lines = append(lines, [4]float64{x + c.a*s, y - c.a*s, x + c.b*s, y - c.b*s})
		}
		if len(lines) > 4000 {
			break
		}
	}
	for _, pen := range []Pen{{Width: 3.6 * p.k, Color: alpha(p.pal.Halo, 0.75)}, {Width: 1.5 * p.k, Color: overOnMap}} {
		for _, l := range lines {
			p.c.MoveTo(l[0], l[1])
			p.c.LineTo(l[2], l[3])
		}
		p.c.Stroke(pen)
	}
}

// overOnMap is the colour of what is over its limit where it lies on the heat map, whatever the style.
var overOnMap = lightPalette.Over

// chord returns where a straight line runs inside a circle.
func chord(d disc, x, y, dx, dy float64) []span {
	if d.r <= 0 {
		return nil
	}
	px, py := x-d.x, y-d.y
	m := -(px*dx + py*dy)
	q := m*m - (px*px + py*py - d.r*d.r)
	if q <= 0 {
		return nil
	}
	h := math.Sqrt(q)
	return []span{{m - h, m + h}}
}

// across returns where a slanting straight line runs inside a box.
func across(b box, x, y, dx, dy float64) []span {
	x0, x1 := (b.x0-x)/dx, (b.x1-x)/dx
	y0, y1 := (b.y0-y)/dy, (b.y1-y)/dy
	s := span{max(min(x0, x1), min(y0, y1)), min(max(x0, x1), max(y0, y1))}
	if b.empty() || s.a >= s.b {
		return nil
	}
	return []span{s}
}

// minus takes the span of b (at most one) out of the span of a (at most one).
func minus(a, b []span) []span {
	if len(a) == 0 || len(b) == 0 || b[0].b <= a[0].a || b[0].a >= a[0].b {
		return a
	}
	var out []span
	if b[0].a > a[0].a {
		out = append(out, span{a[0].a, b[0].a})
	}
	if b[0].b < a[0].b {
		out = append(out, span{b[0].b, a[0].b})
	}
	return out
}
