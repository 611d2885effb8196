package render

import (
	"image/color"
	"math"
	"strings"

	"packrise/solver/section"
)

// SectionLayer paints what lies over the heat map: outlines with halo, isotherms, ids, labels on leaders, hatching, selection,
// scale in mm.
func SectionLayer(c Canvas, s Scene, v View, sc Scale, st Style) {
	p := newSectionPainter(c, s, v, sc, st)
	p.fills()
	p.veil()
	lines := p.isotherms()
	p.hatching()
	p.outlines()
	p.marks()
	bar := p.planScaleBar()
	p.planCallouts()
	p.ids()
	p.drawScaleBar(bar)
	p.callouts()
	p.isothermLabels(lines)
}

// sectionPainter holds what the steps of SectionLayer share. Lengths in pixels.
type sectionPainter struct {
	c       Canvas
	s       Scene
	v       View
	sc      Scale
	k       float64 // device scale
	pal     Palette
	frame   box // the canvas
	read    map[string]section.Reading
	shapes  []section.Shape // parts, outer ones first, without the holder
	holder  *section.Shape
	edge    outline
	taken   []box // where something is written
	called  []callout
	outside map[string]bool // what has a label outside
}

func newSectionPainter(c Canvas, s Scene, v View, sc Scale, st Style) *sectionPainter {
	w, h := c.Size()
	p := &sectionPainter{c: c, s: s, v: v, sc: sc, k: st.k(), pal: st.Colors(), frame: box{0, 0, w, h}}
	p.read = readingsByID(s.Readings)
	p.holder = holderOf(s.Shapes)
	p.edge = outlineOf(s.Shapes).toPx(v)
	for depth, left := 0, true; left; depth++ {
		left = false
		for _, sh := range s.Shapes {
			switch {
			case sh.ID == "" || sh.OuterR() <= 0:
			case sh.Depth == depth:
				p.shapes = append(p.shapes, sh)
			case sh.Depth > depth:
				left = true
			}
		}
	}
	return p
}

// disc returns a part's outline in pixels.
func (p *sectionPainter) disc(s section.Shape) disc {
	x, y := p.v.ToPx(s.At)
	return disc{x, y, s.OuterR() * p.v.PxPerMM}
}

// inSight tells whether a circle touches the canvas.
func (p *sectionPainter) inSight(d disc) bool {
	return boxAround(d.x, d.y, d.r+4*p.k).meets(p.frame)
}

// wall returns the rings of a round shape that enclose something: those that do not reach its centre.
func wall(s section.Shape) []section.Ring {
	if len(s.Rings) > 0 && s.Rings[0].R0 <= 0 {
		return s.Rings[1:]
	}
	return s.Rings
}

// fills gives shape to what has no temperature: everything in an unsolved scene, unplaced parts always.
func (p *sectionPainter) fills() {
	if !p.s.solved() {
		p.fillHolder()
	}
	for _, s := range p.shapes {
		d := p.disc(s)
		if p.s.solved() && !s.Unset || !p.inSight(d) {
			continue
		}
		p.c.Circle(d.x, d.y, d.r)
		p.c.Fill(p.pal.Insulation)
		for _, r := range s.Rings {
			if r.Metal {
				p.ring(d, r, p.pal.Metal)
			}
		}
		if w := wall(s); s.Kind == section.Cable && len(w) > 0 {
			p.c.Circle(d.x, d.y, w[0].R0*p.v.PxPerMM)
			p.c.Fill(p.pal.Fill)
		} else if len(s.Rings) > 0 && s.Rings[0].R0 > 0 { // a hose's bore
			p.c.Circle(d.x, d.y, s.Rings[0].R0*p.v.PxPerMM)
			p.c.Fill(p.pal.Paper)
		}
	}
}

func (p *sectionPainter) fillHolder() {
	switch e := p.edge; {
	case e.rect != nil:
		b := *e.rect
		rectangle(p.c, b.x0, b.y0, b.x1-b.x0, b.y1-b.y0)
		p.c.Fill(p.pal.Wall)
		in := b.grown(-p.holder.OuterR() * p.v.PxPerMM)
		rectangle(p.c, in.x0, in.y0, in.x1-in.x0, in.y1-in.y0)
		p.c.Fill(p.pal.Fill)
	case e.round != nil:
		p.c.Circle(e.round.x, e.round.y, e.round.r)
		p.c.Fill(p.pal.Fill)
		for _, r := range wall(*p.holder) {
			p.ring(*e.round, r, p.pal.Wall)
		}
	}
}

// ring fills one ring of a shape whose outline is d.
func (p *sectionPainter) ring(d disc, r section.Ring, col color.NRGBA) {
	p.c.Circle(d.x, d.y, r.R1*p.v.PxPerMM)
	if r.R0 > 0 {
		p.c.Circle(d.x, d.y, r.R0*p.v.PxPerMM)
	}
	p.c.Fill(col)
}

// veil greys the map of a scene whose temperatures belong to an older section.
func (p *sectionPainter) veil() {
	if !p.s.Stale || !p.s.solved() {
		return
	}
	p.outlinePath()
	p.c.Fill(p.pal.Veil)
}

// outlinePath adds the outer surface to the path.
func (p *sectionPainter) outlinePath() {
	switch e := p.edge; {
	case e.rect != nil:
		rectangle(p.c, e.rect.x0, e.rect.y0, e.rect.x1-e.rect.x0, e.rect.y1-e.rect.y0)
	case e.round != nil:
		p.c.Circle(e.round.x, e.round.y, e.round.r)
	default:
		for _, d := range e.parts {
			p.c.Circle(d.x, d.y, d.r)
		}
	}
}

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
				p.c.Circle(d.x, d.y, r)
				p.c.Stroke(inner)
				last = r
			}
		}
		p.c.Circle(d.x, d.y, d.r)
		p.c.Stroke(Pen{Width: 3.4 * p.k * fine, Color: p.halo(s)})
		pen := Pen{Width: 1.4 * p.k * fine, Color: p.line(s)}
		if s.Unset {
			pen = Pen{Width: 1.3 * p.k * fine, Color: p.pal.Quiet, Dash: []float64{4 * p.k, 3 * p.k}}
		}
		p.c.Circle(d.x, d.y, d.r)
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

// holderOutline draws the outer surface and the wall's layers; an open bundle, which has no wall, gets a dashed circle.
func (p *sectionPainter) holderOutline() {
	if p.holder == nil {
		return
	}
	halo := Pen{Width: 3.6 * p.k, Color: p.halo(*p.holder)}
	pen := Pen{Width: 1.7 * p.k, Color: p.line(*p.holder)}
	inner := Pen{Width: p.k, Color: alpha(p.line(*p.holder), 0.8)}
	if p.holder.Kind == section.OpenBundle {
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
				p.c.Circle(e.round.x, e.round.y, r)
				p.c.Stroke(inner)
				last = r
			}
		}
		for _, pen := range []Pen{halo, pen} {
			p.c.Circle(e.round.x, e.round.y, e.round.r)
			p.c.Stroke(pen)
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

// marks lights up the part under the pointer, rings the selected ones and crosses the bad ones.
func (p *sectionPainter) marks() {
	for _, s := range p.shapes {
		d := p.disc(s)
		if s.ID == p.s.Pointed && p.s.Pointed != "" {
			p.c.Circle(d.x, d.y, d.r)
			p.c.Fill(alpha(p.pal.Halo, 0.3))
			p.c.Circle(d.x, d.y, d.r)
			p.c.Stroke(Pen{Width: 2.4 * p.k, Color: p.line(s)})
		}
	}
	for _, s := range p.shapes {
		d := p.disc(s)
		if contains(p.s.Selected, s.ID) {
			p.c.Circle(d.x, d.y, d.r+2.5*p.k)
			p.c.Stroke(Pen{Width: 5.5 * p.k, Color: p.halo(s)})
			p.c.Circle(d.x, d.y, d.r+2.5*p.k)
			p.c.Stroke(Pen{Width: 3 * p.k, Color: p.pal.Accent})
		}
		if contains(p.s.Bad, s.ID) {
			p.bad(d)
		}
	}
}

// bad marks a part that overlaps or lies outside: a dashed ring in the warning colour and a cross at its upper right.
func (p *sectionPainter) bad(d disc) {
	p.c.Circle(d.x, d.y, d.r)
	p.c.Stroke(Pen{Width: 4.5 * p.k, Color: p.pal.Paper})
	p.c.Circle(d.x, d.y, d.r)
	p.c.Stroke(Pen{Width: 2.5 * p.k, Color: p.pal.Over, Dash: []float64{6 * p.k, 3 * p.k}})
	x, y := d.x+d.r*math.Sqrt2/2, d.y-d.r*math.Sqrt2/2
	p.c.Circle(x, y, 7*p.k)
	p.c.Fill(p.pal.Paper)
	p.c.Circle(x, y, 7*p.k)
	p.c.Stroke(Pen{Width: 1.5 * p.k, Color: p.pal.Over})
	a := 3 * p.k
	p.c.MoveTo(x-a, y-a)
	p.c.LineTo(x+a, y+a)
	p.c.MoveTo(x-a, y+a)
	p.c.LineTo(x+a, y-a)
	p.c.Stroke(Pen{Width: 1.8 * p.k, Color: p.pal.Over, Round: true})
}

func contains(list []string, id string) bool {
	for _, s := range list {
		if s == id {
			return true
		}
	}
	return false
}

// shortID is what is written inside a part: the last step of a nested id.
func shortID(id string) string { return id[strings.LastIndexByte(id, '/')+1:] }

// parentID is the cable that a nested part lies in, "" for none.
func parentID(id string) string { return id[:max(0, strings.LastIndexByte(id, '/'))] }

// isInside tells whether part id lies, at any depth, in the cable.
func isInside(id, cable string) bool {
	return len(id) > len(cable) && cable != "" && id[:len(cable)] == cable && id[len(cable)] == '/'
}
