package render

import (
	"image/color"

	"packrise/solver/section"
)

// outlines draws all edges: a light halo first, so that they stand out from any colour of the map, then the line.
func (p *sectionPainter) outlines() {
	p.holderOutline()
	for _, s := range p.shapes {
		d := p.disc(s)
		if !p.inSight(d) {
			continue
		}
		fine := min(1, d.r/(10*p.k)) // small parts get finer lines
		inner := Pen{Width: 0.9 * p.k * fine, Color: alpha(p.line(s), 0.75)}
		last := d.r
		for i := len(s.Rings) - 1; i >= 0; i-- {
			if r := s.Rings[i].R0 * p.v.PxPerMM; r > 1.5*p.k && last-r > 1.5*p.k {
				p.hole(s, d, i)
				p.c.Stroke(inner)
				last = r
			}
		}
		p.rim(s, d, -1)
		p.c.Stroke(Pen{Width: 3.4 * p.k * fine, Color: p.halo(s)})
		pen := Pen{Width: 1.4 * p.k * fine, Color: p.line(s)}
		if s.Unset {
			pen = Pen{Width: 1.3 * p.k * fine, Color: p.pal.Quiet, Dash: []float64{4 * p.k, 3 * p.k}}
		}
		p.rim(s, d, -1)
		p.c.Stroke(pen)
	}
}

// line and halo return the colours of a part's outline: dark on light over the map, the style's own without one.
func (p *sectionPainter) line(s section.Shape) color.NRGBA {
	if p.s.solved() && !s.Unset {
		return p.pal.Line
	}
	return p.pal.Ink
}

func (p *sectionPainter) halo(s section.Shape) color.NRGBA {
	if p.s.solved() && !s.Unset {
		return alpha(p.pal.Halo, 0.8)
	}
	return alpha(p.pal.Paper, 0.8)
}

// holderOutline draws the outer surface and the wall's layers; an open bundle, which has no wall, gets a dashed line: the string
// round it, or a circle where that is not known. Of bodies apart those of several parts get one.
func (p *sectionPainter) holderOutline() {
	if p.holder == nil {
		return
	}
	halo := Pen{Width: 3.6 * p.k, Color: p.halo(*p.holder)}
	pen := Pen{Width: 1.7 * p.k, Color: p.line(*p.holder)}
	inner := Pen{Width: p.k, Color: alpha(p.line(*p.holder), 0.8)}
	if p.holder.Kind == section.OpenBundle || p.holder.Kind == section.Apart {
		pen = Pen{Width: 1.5 * p.k, Color: p.pal.Ink, Dash: []float64{7 * p.k, 5 * p.k}}
	}
	switch e := p.edge; {
	case e.rect != nil:
		p.rectWall(*e.rect, inner)
		for _, pen := range []Pen{halo, pen} {
			rectangle(p.c, e.rect.x0, e.rect.y0, e.rect.x1-e.rect.x0, e.rect.y1-e.rect.y0)
			p.c.Stroke(pen)
		}
	case e.round != nil:
		last := e.round.r
		for i := len(p.holder.Rings) - 1; i >= 0; i-- {
			r := p.holder.Rings[i].R0 * p.v.PxPerMM
			if r > 0 && last-r > 1.5*p.k {
				p.hole(*p.holder, *e.round, i)
				p.c.Stroke(inner)
				last = r
			}
		}
		for _, pen := range []Pen{halo, pen} {
			p.outlinePath()
			p.c.Stroke(pen)
		}
	default:
		for _, l := range p.holder.Loops { // bodies apart: of several parts that touch
			for _, pen := range []Pen{halo, pen} {
				p.loopPath(l)
				p.c.Stroke(pen)
			}
		}
	}
}

// rectWall draws the inner faces of a rectangle's wall layers.
func (p *sectionPainter) rectWall(b box, pen Pen) {
	t := p.holder.OuterR()
	last := 0.0
	for i := len(p.holder.Rings) - 1; i >= 0; i-- {
		in := (t - p.holder.Rings[i].R0) * p.v.PxPerMM
		if in-last < 1.5*p.k {
			continue
		}
		g := b.grown(-in)
		rectangle(p.c, g.x0, g.y0, g.x1-g.x0, g.y1-g.y0)
		p.c.Stroke(pen)
		last = in
	}
}
