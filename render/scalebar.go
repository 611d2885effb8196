package render

import (
	"math"
	"strconv"
)

// bar is the scale in mm: a line of a round length at the lower left, in pixels.
type bar struct {
	x, y, long float64
	text       string
}

// planScaleBar keeps room for the scale.
func (p *sectionPainter) planScaleBar() bar {
	longest := min(130*p.k, 0.3*(p.frame.x1-p.frame.x0))
	mm := roundLength(longest / p.v.PxPerMM)
	b := bar{12 * p.k, p.frame.y1 - 12*p.k, mm * p.v.PxPerMM, lengthText(mm)}
	if !finite(b.long) || b.long < 8*p.k {
		return bar{}
	}
	p.taken = append(p.taken, b.box(p).grown(2*p.k))
	return b
}

// box returns what line and text cover.
func (b bar) box(p *sectionPainter) box {
	f := p.barFont()
	return textBox(b.x, b.y-7*p.k, p.c.MeasureText(b.text, f), f).with(box{b.x, b.y - 4*p.k, b.x + b.long, b.y + 4*p.k})
}

func (p *sectionPainter) barFont() Font {
	return Font{Size: 12 * p.k, Color: p.pal.Ink, Halo: p.pal.Paper, HaloWidth: 2 * p.k}
}

func (p *sectionPainter) drawScaleBar(b bar) {
	if b.long == 0 {
		return
	}
	if t := b.box(p); p.edge.meetsBox(t) { // on the map it stands on a label of its own
		t = t.grown(3 * p.k)
		rounded(p.c, t.x0, t.y0, t.x1-t.x0, t.y1-t.y0, 4*p.k)
		p.c.Fill(alpha(p.pal.Paper, 0.85))
	}
	for _, pen := range []Pen{{Width: 4.5 * p.k, Color: p.pal.Paper}, {Width: 1.5 * p.k, Color: p.pal.Ink}} {
		for _, t := range []float64{b.x, b.x + b.long} {
			p.c.MoveTo(t, b.y-4*p.k)
			p.c.LineTo(t, b.y+4*p.k)
		}
		p.c.MoveTo(b.x, b.y)
		p.c.LineTo(b.x+b.long, b.y)
		p.c.Stroke(pen)
	}
	p.write(b.text, b.x, b.y-7*p.k, p.barFont())
}

// roundLength returns the largest of 1, 2, 5 × a power of ten that is not above x.
func roundLength(x float64) float64 {
	if !(x > 0) || math.IsInf(x, 1) {
		return 0
	}
	p := math.Pow(10, math.Floor(math.Log10(x)))
	for _, m := range []float64{5, 2} {
		if m*p <= x*(1+1e-9) {
			return m * p
		}
	}
	return p
}

func lengthText(mm float64) string {
	return strconv.FormatFloat(mm, 'f', -1, 64) + " mm"
}
