package render

import (
	"image/color"
	"math"
)

// shades lays the accent over what heats the part Heated, the stronger the more of its rise it gives; the part itself stays clear. It tells whether
// anything in sight is shaded.
func (p *sectionPainter) shades() (any bool) {
	for _, s := range p.shapes {
		percent := p.s.Heaters[s.ID]
		d := p.disc(s)
		if percent <= 0 || s.ID == p.s.Heated || s.Unset || !p.inSight(d) {
			continue
		}
		p.rim(s, d, -1)
		p.c.Fill(p.shade(percent))
		any = true
	}
	return any
}

// shade is the accent for a share. The root keeps small shares apart in a section of many parts.
func (p *sectionPainter) shade(percent int) color.NRGBA {
	return alpha(p.pal.Accent, 0.85*math.Sqrt(math.Min(1, float64(percent)/100)))
}

// shadeSwatch shows a small, a middle and a large share.
func (p *sectionPainter) shadeSwatch(b box) {
	wide := (b.x1 - b.x0) / 3
	for i, percent := range []int{5, 25, 75} {
		rectangle(p.c, b.x0+float64(i)*wide, b.y0, wide, b.y1-b.y0)
		p.c.Fill(p.shade(percent))
	}
	rectangle(p.c, b.x0, b.y0, b.x1-b.x0, b.y1-b.y0)
	p.c.Stroke(Pen{Width: p.k, Color: p.pal.Quiet})
}
