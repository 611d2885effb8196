package render

import (
	"math"
	"slices"

	"packrise/solver/section"
)

// marks lights up the part under the pointer, rings the selected ones and crosses the bad ones.
func (p *sectionPainter) marks() {
	for _, s := range p.shapes {
		d := p.disc(s)
		if s.ID == p.s.Pointed && p.s.Pointed != "" {
			p.rim(s, d, -1)
			p.c.Fill(alpha(p.pal.Halo, 0.25))
			p.rim(s, d, -1)
			p.c.Stroke(Pen{Width: 2.6 * p.k, Color: p.pal.Accent})
		}
	}
	for _, s := range p.shapes {
		d := p.disc(s)
		if slices.Contains(p.s.Selected, s.ID) {
			p.around(s, d)
			p.c.Stroke(Pen{Width: 5.5 * p.k, Color: p.halo(s)})
			p.around(s, d)
			p.c.Stroke(Pen{Width: 3 * p.k, Color: p.pal.Accent})
		}
		if slices.Contains(p.s.Bad, s.ID) {
			p.bad(s, d)
		}
	}
}

// around adds the ring of a selected part to the path.
func (p *sectionPainter) around(s section.Shape, d disc) {
	if len(s.Loops) > 0 {
		p.rim(s, d, -1)
		return
	}
	p.c.Circle(d.x, d.y, d.r+2.5*p.k)
}

// bad marks a part that overlaps or lies outside: a dashed ring in the warning colour and a cross at its upper right.
func (p *sectionPainter) bad(s section.Shape, d disc) {
	p.rim(s, d, -1)
	p.c.Stroke(Pen{Width: 4.5 * p.k, Color: p.pal.Paper})
	p.rim(s, d, -1)
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
