package render

import (
	"math"
	"strconv"
)

// scaleBar draws a line of a round length in mm at the lower left.
func (p *sectionPainter) scaleBar() {
	longest := min(130*p.k, 0.3*(p.frame.x1-p.frame.x0))
	mm := roundLength(longest / p.v.PxPerMM)
	l := mm * p.v.PxPerMM
	if !finite(l) || l < 8*p.k {
		return
	}
	x, y := 12*p.k, p.frame.y1-12*p.k
	f := Font{Size: 12 * p.k, Color: p.pal.Ink, Halo: p.pal.Paper, HaloWidth: 2 * p.k}
	text := lengthText(mm)
	b := textBox(x, y-7*p.k, p.c.MeasureText(text, f), f).with(box{x, y - 4*p.k, x + l, y + 4*p.k})
	p.taken = append(p.taken, b.grown(2*p.k))
	tick := func(pen Pen) {
		for _, t := range []float64{x, x + l} {
			p.c.MoveTo(t, y-4*p.k)
			p.c.LineTo(t, y+4*p.k)
		}
		p.c.MoveTo(x, y)
		p.c.LineTo(x+l, y)
		p.c.Stroke(pen)
	}
	tick(Pen{Width: 4.5 * p.k, Color: p.pal.Paper})
	tick(Pen{Width: 1.5 * p.k, Color: p.pal.Ink})
	p.write(text, x, y-7*p.k, f)
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
