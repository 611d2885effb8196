package render

import (
	"image/color"
	"strings"

	"packrise/solver/section"
)

// SectionLayer paints what lies over the heat map: outlines with halo, isotherms, ids, labels on leaders, hatching, selection,
// scale in mm.
func SectionLayer(c Canvas, s Scene, v View, sc Scale, st Style) {
	p := newSectionPainter(c, s, v, sc, st)
	p.fills()
	p.veil()
	shaded := p.shades()
	lines := p.isotherms()
	hatched := p.hatching()
	flow := p.flowLines()
	p.outlines()
	p.against()
	p.marks()
	bar := p.planScaleBar()
	p.planCallouts()
	p.ids()
	p.drawScaleBar(bar)
	p.key(bar, hatched, lines, flow, shaded)
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
	outside map[string]bool     // what has a label outside
	rooms   map[string]*gapRoom // by the cable that they are in, "" for the holder
}

func newSectionPainter(c Canvas, s Scene, v View, sc Scale, st Style) *sectionPainter {
	w, h := c.Size()
	p := &sectionPainter{c: c, s: s, v: v, sc: sc, k: st.k(), pal: st.Colors(), frame: box{0, 0, w, h}, rooms: map[string]*gapRoom{}}
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
		p.rim(s, d, -1)
		p.c.Fill(p.pal.Insulation)
		for i, r := range s.Rings {
			if r.Metal {
				p.ring(s, d, i, p.pal.Metal)
			}
		}
		if w := wall(s); s.Kind == section.Cable && len(w) > 0 {
			p.hole(s, d, len(s.Rings)-len(w))
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
		p.outlinePath()
		p.c.Fill(p.pal.Fill)
		if p.holder.Kind == section.NoHolder {
			return
		}
		n := len(p.holder.Rings)
		for i := n - len(wall(*p.holder)); i < n; i++ {
			p.ring(*p.holder, *e.round, i, p.pal.Wall)
		}
	case p.holder != nil:
		for _, l := range p.holder.Loops {
			p.loopPath(l)
			p.c.Fill(p.pal.Fill)
		}
	}
}

// ring fills ring i of a shape whose circle is d.
func (p *sectionPainter) ring(s section.Shape, d disc, i int, col color.NRGBA) {
	p.rim(s, d, i)
	p.hole(s, d, i)
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
	case e.poly != nil:
		pixelPath(p.c, e.poly)
	case e.rect != nil:
		rectangle(p.c, e.rect.x0, e.rect.y0, e.rect.x1-e.rect.x0, e.rect.y1-e.rect.y0)
	case e.round != nil:
		p.c.Circle(e.round.x, e.round.y, e.round.r)
	default:
		for _, d := range e.parts {
			p.c.Circle(d.x, d.y, d.r)
		}
		for _, l := range e.loops {
			pixelPath(p.c, l)
		}
	}
}

// shortID is what is written inside a part: the last step of a nested id.
func shortID(id string) string { return id[strings.LastIndexByte(id, '/')+1:] }

// parentID is the cable that a nested part lies in, "" for none.
func parentID(id string) string { return id[:max(0, strings.LastIndexByte(id, '/'))] }

// isInside tells whether part id lies, at any depth, in the cable.
func isInside(id, cable string) bool {
	return len(id) > len(cable) && cable != "" && id[:len(cable)] == cable && id[len(cable)] == '/'
}
