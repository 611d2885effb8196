package render

import (
	"image/color"
	"math"
	"strconv"

	"packrise/solver/section"
)

// flowLines draws the heat-flow lines, where the scene wants them, and returns them for the key. An out-of-date section and one
// that is being dragged have none.
func (p *sectionPainter) flowLines() *flow {
	if !p.s.Flow || p.s.Field == nil || p.s.Stale || p.s.Draft {
		return nil
	}
	f := lastFlow.of(p.s)
	drawn := make([][]section.Point, len(f.lines))
	quiet := make([][]bool, len(f.lines))
	for i, l := range f.lines {
		drawn[i] = p.pixels(l.points)
		quiet[i] = p.inThinMetal(l.points)
	}
	seam, line := p.flowPens()
	thin := Pen{Width: 0.7 * p.k, Color: alpha(line.Color, 0.6)}
	for _, layer := range []struct {
		pen   Pen
		quiet bool
	}{{thin, true}, {seam, false}, {line, false}} {
		for i := range drawn {
			if p.flowPath(drawn[i], quiet[i], layer.quiet) {
				p.c.Stroke(layer.pen)
			}
		}
	}
	p.flowHeads(drawn, quiet)
	return f
}

// flowColors are of the seam and the line: a light line in a dark seam shows on every colour of the map.
func flowColors() (seam, line color.NRGBA) {
	return color.NRGBA{12, 18, 32, 110}, color.NRGBA{255, 255, 255, 235}
}

func (p *sectionPainter) flowPens() (seam, line Pen) {
	s, l := flowColors()
	return Pen{Width: 2.4 * p.k, Color: s}, Pen{Width: 1.1 * p.k, Color: l}
}

// thinMetal is the thickness in pixels at device scale 1 below which the holder's metal has no room for lines side by side: all
// heat of a section runs along it, and they are drawn fainter there.
const thinMetal = 30

// inThinMetal tells for each piece of a line (mm) whether its middle lies in a thin metal layer of the holder.
func (p *sectionPainter) inThinMetal(line []section.Point) []bool {
	out := make([]bool, len(line))
	if p.holder == nil {
		return out
	}
	for _, r := range p.holder.Rings {
		if !r.Metal || (r.R1-r.R0)*p.v.PxPerMM >= thinMetal*p.k {
			continue
		}
		for i := 1; i < len(line); i++ {
			d := p.wallDepth(section.Point{X: (line[i-1].X + line[i].X) / 2, Y: (line[i-1].Y + line[i].Y) / 2})
			out[i] = out[i] || d > r.R0 && d < r.R1
		}
	}
	return out
}

// wallDepth measures a point as the radii of the holder's rings are.
func (p *sectionPainter) wallDepth(q section.Point) float64 {
	h := p.holder
	if h.Width > 0 && h.Height > 0 {
		return rectDepth(h, q)
	}
	return math.Hypot(q.X-h.At.X, q.Y-h.At.Y)
}

// flowPath adds to the path what of a line is in sight and quiet, or not.
func (p *sectionPainter) flowPath(line []section.Point, quiet []bool, want bool) (any bool) {
	sight := p.frame.grown(4 * p.k)
	open := false
	for i := 1; i < len(line); i++ {
		if quiet[i] != want || !segmentMeetsBox(line[i-1], line[i], sight) {
			open = false
			continue
		}
		if !open {
			p.c.MoveTo(line[i-1].X, line[i-1].Y)
		}
		p.c.LineTo(line[i].X, line[i].Y)
		open, any = true, true
	}
	return any
}

// keyText says what a line stands for.
func (f *flow) keyText() string {
	return "one line = " + strconv.FormatFloat(f.each, 'f', -1, 64) + " W/m"
}

// flowSwatch is a piece of a line on a piece of the map.
func (p *sectionPainter) flowSwatch(b box) {
	rectangle(p.c, b.x0, b.y0, b.x1-b.x0, b.y1-b.y0)
	p.c.Fill(p.sc.Color((p.sc.Low + p.sc.High) / 2))
	y := (b.y0 + b.y1) / 2
	seam, pen := p.flowPens()
	line(p.c, b.x0, y, b.x1, y, seam)
	line(p.c, b.x0, y, b.x1, y, pen)
	p.flowHead(flowHead{section.Point{X: (b.x0 + b.x1) / 2, Y: y}, section.Point{X: 1}})
}
