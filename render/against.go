package render

import (
	"math"

	"packrise/solver/section"
)

// Sizes of the band that stands for what a part of the outline rests against, in pixels at scale 1.
const (
	bandAway = 3.5 // its line lies so far outside the outline
	bandTick = 7.0 // depth of its slanting ticks
	bandStep = 6.0
)

// against draws what a part of the outline rests against: a line along it and ticks behind, as the ground is drawn in technical drawings.
func (p *sectionPainter) against() {
	if p.holder == nil || len(p.holder.Against) < 2 {
		return
	}
	k := p.k
	line := beside(evenly(p.pixels(p.holder.Against), bandStep*k), bandAway*k)
	pen := Pen{Width: 1.2 * k, Color: p.pal.Quiet}
	for i, q := range line {
		if i == 0 {
			p.c.MoveTo(q.at.X, q.at.Y)
		} else {
			p.c.LineTo(q.at.X, q.at.Y)
		}
	}
	p.c.Stroke(pen)
	const slant = 0.6
	for _, q := range line {
		x, y := q.at.X+bandTick*k*(q.out.X-slant*q.out.Y), q.at.Y+bandTick*k*(q.out.Y+slant*q.out.X)
		p.c.MoveTo(q.at.X, q.at.Y)
		p.c.LineTo(x, y)
		p.taken = append(p.taken, box{min(x, q.at.X), min(y, q.at.Y), max(x, q.at.X), max(y, q.at.Y)})
	}
	pen.Width = k
	p.c.Stroke(pen)
}

// evenly sets points at about equal steps along a line.
func evenly(line []section.Point, step float64) []section.Point {
	at := []float64{0}
	for i := 1; i < len(line); i++ {
		at = append(at, at[i-1]+math.Hypot(line[i].X-line[i-1].X, line[i].Y-line[i-1].Y))
	}
	whole := at[len(at)-1]
	n := int(min(max(math.Round(whole/step), 1), 2000))
	out := make([]section.Point, 0, n+1)
	i := 1
	for j := range n + 1 {
		s := whole * float64(j) / float64(n)
		for i < len(at)-1 && at[i] < s {
			i++
		}
		t := 0.0
		if d := at[i] - at[i-1]; d > 0 {
			t = (s - at[i-1]) / d
		}
		a, b := line[i-1], line[i]
		out = append(out, section.Point{X: a.X + t*(b.X-a.X), Y: a.Y + t*(b.Y-a.Y)})
	}
	return out
}

// edgePoint is a point beside an outline and the unit vector outwards.
type edgePoint struct{ at, out section.Point }

// beside moves a line, which runs counterclockwise as seen, outwards: pixels, y downwards.
func beside(line []section.Point, away float64) []edgePoint {
	out := make([]edgePoint, len(line))
	for i, q := range line {
		a, b := line[max(i-1, 0)], line[min(i+1, len(line)-1)]
		dx, dy := b.X-a.X, b.Y-a.Y
		if l := math.Hypot(dx, dy); l > 0 {
			dx, dy = dx/l, dy/l
		}
		n := section.Point{X: -dy, Y: dx}
		out[i] = edgePoint{section.Point{X: q.X + away*n.X, Y: q.Y + away*n.Y}, n}
	}
	return out
}
