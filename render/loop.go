package render

import (
	"math"

	"packrise/solver/section"
)

// loopOutline is the outer surface of a holder, or of a lone bare part, that is not round.
func loopOutline(h *section.Shape, shapes []section.Shape) (o outline, ok bool) {
	if h == nil || h.Kind == section.Apart {
		return o, false
	}
	of := h
	if h.Kind == section.NoHolder {
		for i := range shapes {
			if s := &shapes[i]; s.ID != "" && s.Depth == 0 && !s.Unset {
				of = s
			}
		}
	}
	if len(of.Loops) == 0 {
		return o, false
	}
	return outline{round: &disc{of.At.X, of.At.Y, of.OuterR()}, poly: of.Loops[len(of.Loops)-1]}, true
}

// loopPath adds a closed line through points (mm) to the path.
func (p *sectionPainter) loopPath(points []section.Point) {
	for i, q := range points {
		x, y := p.v.ToPx(q)
		if i == 0 {
			p.c.MoveTo(x, y)
			continue
		}
		p.c.LineTo(x, y)
	}
	p.c.Close()
}

// pixelPath is loopPath of points in pixels.
func pixelPath(c Canvas, points []section.Point) {
	for i, q := range points {
		if i == 0 {
			c.MoveTo(q.X, q.Y)
			continue
		}
		c.LineTo(q.X, q.Y)
	}
	c.Close()
}

// rim adds the outer outline of ring i of a shape to the path, whose circle is d; −1: of its last.
func (p *sectionPainter) rim(s section.Shape, d disc, i int) {
	if i < 0 {
		i = len(s.Rings) - 1
	}
	if len(s.Loops) > 0 {
		p.loopPath(s.Loops[i])
		return
	}
	p.c.Circle(d.x, d.y, s.Rings[i].R1*p.v.PxPerMM)
}

// hole adds the inner outline of ring i to the path.
func (p *sectionPainter) hole(s section.Shape, d disc, i int) {
	switch r := s.Rings[i].R0; {
	case r <= 0:
	case len(s.Loops) > 0:
		p.loopPath(s.Loops[i-1])
	default:
		p.c.Circle(d.x, d.y, r*p.v.PxPerMM)
	}
}

// core is the disc of a part in pixels, of one that is not round the largest about its place within it, so that leaders end on it.
func (p *sectionPainter) core(s section.Shape) disc {
	d := p.disc(s)
	d.r = s.InnerR() * p.v.PxPerMM
	return d
}

// pixels turns points into pixels.
func (p *sectionPainter) pixels(points []section.Point) []section.Point {
	out := make([]section.Point, len(points))
	for i, q := range points {
		out[i].X, out[i].Y = p.v.ToPx(q)
	}
	return out
}

// chordOf returns where a straight line runs inside a convex line through points, both in pixels.
func chordOf(points []section.Point, x, y, dx, dy float64) []span {
	s := span{math.Inf(1), math.Inf(-1)}
	for i, a := range points {
		b := points[(i+1)%len(points)]
		sa, sb := (a.X-x)*dy-(a.Y-y)*dx, (b.X-x)*dy-(b.Y-y)*dx
		if sa == sb || sa > 0 == (sb > 0) && sa != 0 && sb != 0 {
			continue
		}
		f := sa / (sa - sb)
		t := (a.X+f*(b.X-a.X)-x)*dx + (a.Y+f*(b.Y-a.Y)-y)*dy
		s.a, s.b = min(s.a, t), max(s.b, t)
	}
	if !(s.a < s.b) {
		return nil
	}
	return []span{s}
}

// rowsPerPixel of coverage at the edges of a loop.
const rowsPerPixel = 4

// coverLoop writes how much of each pixel of a row lies inside a convex line through points.
func coverLoop(dst []uint8, x0, y int, points []section.Point) {
	cover := make([]float64, len(dst))
	for k := range rowsPerPixel {
		at := float64(y) + (float64(k)+0.5)/rowsPerPixel
		for _, s := range chordOf(points, 0, at, 1, 0) {
			from, to := max(0, int(math.Floor(s.a))-x0), min(len(dst)-1, int(math.Ceil(s.b))-x0)
			for i := from; i <= to; i++ {
				cover[i] += overlap(float64(x0+i), s.a, s.b) / rowsPerPixel
			}
		}
	}
	for i, c := range cover {
		dst[i] = max(dst[i], uint8(255*min(1, c)+0.5))
	}
}

// insideLoop tells whether a point lies within a convex line through points.
func insideLoop(points []section.Point, q section.Point) bool {
	for _, s := range chordOf(points, q.X, q.Y, 1, 0) {
		return s.a <= 0 && s.b >= 0
	}
	return false
}
