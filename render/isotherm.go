package render

import (
	"fmt"
	"image"
	"image/color"
	"math"
	"slices"
	"strconv"

	"packrise/solver/section"
)

// isoline is the lines of one temperature in pixels.
type isoline struct {
	temp  float64
	limit bool
	lines [][]section.Point
}

// isotherms draws lines of equal temperature at round values and, dashed, at the limits, and returns them for labelling.
func (p *sectionPainter) isotherms() []isoline {
	if p.s.Field == nil || p.s.Stale || p.s.Plain || !(p.sc.High > p.sc.Low) {
		return nil
	}
	step := 4 * p.k
	if p.s.Draft {
		step = 8 * p.k
	}
	var out []isoline
	for _, t := range levels(p.sc.Low, p.sc.High, roundStep((p.sc.High-p.sc.Low)/11)) {
		out = append(out, isoline{temp: t})
	}
	for _, t := range p.limits() {
		out = append(out, isoline{temp: t, limit: true})
	}
	for i, lines := range p.contoursOf(out, step) {
		l := &out[i]
		l.lines = lines
		pen := Pen{Width: p.k, Color: p.isoColor(l.temp)}
		if l.limit {
			pen = Pen{Width: 1.6 * p.k, Color: overOnMap, Dash: []float64{6 * p.k, 3 * p.k}}
		}
		for _, poly := range l.lines {
			for j, q := range poly {
				if j == 0 {
					p.c.MoveTo(q.X, q.Y)
				} else {
					p.c.LineTo(q.X, q.Y)
				}
			}
		}
		if len(l.lines) > 0 {
			p.c.Stroke(pen)
		}
	}
	return out
}

// contoursOf finds the lines of all temperatures, or takes them from the last picture of the same field and view: the window
// draws many, for every move of the pointer.
func (p *sectionPainter) contoursOf(list []isoline, step float64) [][][]section.Point {
	values := make([]float64, len(list))
	for i := range list {
		values[i] = list[i].temp
	}
	key := contourKey{field: p.s.Field, view: p.v, step: step, frame: p.frame, values: fmt.Sprint(values)}
	if lines, ok := lastContours.find(key); ok {
		return lines
	}
	g, ok := p.isoGrid(step)
	if !ok {
		return make([][][]section.Point, len(list))
	}
	lines := g.contours(values)
	for i := range lines {
		lines[i] = p.outsidePlateaus(p.outsideMetal(lines[i], step))
	}
	lastContours.keep(key, lines)
	return lines
}

// outsideMetal drops rings that only run inside one conductor: metal has one temperature, and where that is a round one, the
// line would draw nothing but the last digits of the solution.
func (p *sectionPainter) outsideMetal(lines [][]section.Point, step float64) [][]section.Point {
	var metal []disc
	for _, s := range p.shapes {
		for _, r := range s.Rings {
			if r.Metal && r.R0 <= 0 {
				d := p.disc(s)
				metal = append(metal, disc{d.x, d.y, r.R1*p.v.PxPerMM + step/2})
			}
		}
	}
	return slices.DeleteFunc(lines, func(l []section.Point) bool {
		return slices.ContainsFunc(metal, func(d disc) bool {
			return !slices.ContainsFunc(l, func(q section.Point) bool { return math.Hypot(q.X-d.x, q.Y-d.y) > d.r })
		})
	})
}

// isoColor is light on the dark part of the map and dark on the light part.
func (p *sectionPainter) isoColor(t float64) color.NRGBA {
	if lightness(p.sc.Color(t)) > 55 {
		return alpha(p.pal.Line, 0.5)
	}
	return alpha(p.pal.Halo, 0.6)
}

// limits returns the different limits inside the scale, rising.
func (p *sectionPainter) limits() []float64 {
	var out []float64
	for _, r := range p.s.Readings {
		if r.LimitC.OK && r.LimitC.V > p.sc.Low && r.LimitC.V < p.sc.High {
			out = insert(out, r.LimitC.V)
		}
	}
	return out
}

// insert puts t into a rising list unless it is there.
func insert(list []float64, t float64) []float64 {
	i := 0
	for i < len(list) && list[i] < t {
		i++
	}
	if i < len(list) && list[i] == t {
		return list
	}
	list = append(list, 0)
	copy(list[i+1:], list[i:])
	list[i] = t
	return list
}

// tempGrid holds temperatures at nodes (x0 + i·step, y0 + j·step) in pixels, NaN outside.
type tempGrid struct {
	x0, y0, step float64
	nx, ny       int
	v            []float64
}

// isoGrid samples the field where it is in sight.
func (p *sectionPainter) isoGrid(step float64) (*tempGrid, bool) {
	fx0, fy0, fx1, fy1 := p.s.Field.Bounds()
	x0, y0 := p.v.ToPx(section.Point{X: fx0, Y: fy1})
	x1, y1 := p.v.ToPx(section.Point{X: fx1, Y: fy0})
	x0, y0 = max(x0, p.frame.x0-step), max(y0, p.frame.y0-step)
	x1, y1 = min(x1, p.frame.x1+step), min(y1, p.frame.y1+step)
	if !(x1 > x0 && y1 > y0) {
		return nil, false
	}
	// nodes stand at whole multiples of the step in mm, so that lines do not crawl while the picture is panned
	g := &tempGrid{step: step, nx: int((x1-x0)/step) + 2, ny: int((y1-y0)/step) + 2}
	if g.nx < 2 || g.ny < 2 || !image.Pt(g.nx, g.ny).In(image.Rect(0, 0, 4000, 4000)) {
		return nil, false
	}
	g.x0, g.y0 = x0, y0
	g.v = make([]float64, g.nx*g.ny)
	parallelRows(g.ny, func(next func() (int, bool)) {
		for j, ok := next(); ok; j, ok = next() {
			at := p.v.ToMM(g.x0, g.y0+float64(j)*step)
			p.s.Field.Row(g.v[j*g.nx:(j+1)*g.nx], at.Y, at.X, step/p.v.PxPerMM)
		}
	})
	return g, true
}

// isothermLabels writes each line's temperature once, where it runs through free room.
func (p *sectionPainter) isothermLabels(all []isoline) {
	f := Font{Size: 12 * p.k, AX: 0.5, AY: 0.5, Color: p.pal.Line, Halo: p.pal.Halo, HaloWidth: 2 * p.k}
	for _, l := range all {
		text := degrees(l.temp)
		w := p.c.MeasureText(text, f)
		if x, y, ok := p.isoPlace(l, w, f); ok {
			if l.limit {
				f.Color = overOnMap
			} else {
				f.Color = p.pal.Line
			}
			p.write(text, x, y, f)
			p.taken = append(p.taken, textBox(x, y, w, f).grown(4*p.k))
		}
	}
}

// isoPlace finds a point of the line whose label lies inside the section, off the parts and off what is written.
func (p *sectionPainter) isoPlace(l isoline, w float64, f Font) (x, y float64, ok bool) {
	best := math.Inf(1)
	for _, poly := range l.lines {
		if len(poly) < 12 { // short rings round one small part do not earn a label
			continue
		}
		for i := 0; i < len(poly); i += 3 {
			q := poly[i]
			b := textBox(q.X, q.Y, w, f).grown(2 * p.k)
			if !b.within(p.frame) || !p.isFree(b) || !p.insideEdge(b) {
				continue
			}
			// the same corner of every line, so that the labels stand in a row
			if score := q.Y + 0.3*math.Abs(q.X-(p.frame.x0+p.frame.x1)/2); score < best {
				best, x, y, ok = score, q.X, q.Y, true
			}
		}
	}
	return x, y, ok
}

// isFree tells whether a box lies on no part, on nothing written and on no leader.
func (p *sectionPainter) isFree(b box) bool {
	for _, c := range p.called {
		for i := 1; i < len(c.path); i++ {
			if segmentMeetsBox(c.path[i-1], c.path[i], b.grown(8*p.k)) {
				return false
			}
		}
	}
	for _, t := range p.taken {
		if t.meets(b) {
			return false
		}
	}
	for _, s := range p.shapes {
		if discMeetsBox(p.disc(s), b) {
			return false
		}
	}
	return true
}

// insideEdge tells whether a box lies wholly within the outer surface.
func (p *sectionPainter) insideEdge(b box) bool {
	switch e := p.edge; {
	case e.poly != nil:
		return loopHoldsBox(e.poly, b)
	case e.rect != nil:
		return b.within(*e.rect)
	case e.round != nil:
		d := *e.round
		return math.Hypot(max(math.Abs(b.x0-d.x), math.Abs(b.x1-d.x)), max(math.Abs(b.y0-d.y), math.Abs(b.y1-d.y))) <= d.r
	}
	return slices.ContainsFunc(p.edge.loops, func(l []section.Point) bool { return loopHoldsBox(l, b) })
}

// loopHoldsBox tells whether a box lies wholly within a convex line.
func loopHoldsBox(points []section.Point, b box) bool {
	for _, q := range []section.Point{{X: b.x0, Y: b.y0}, {X: b.x1, Y: b.y0}, {X: b.x0, Y: b.y1}, {X: b.x1, Y: b.y1}} {
		if !insideLoop(points, q) {
			return false
		}
	}
	return true
}

// degrees writes a temperature in whole degrees (fewer than needed only for odd steps) with a real minus sign.
func degrees(t float64) string {
	s := strconv.FormatFloat(math.Round(t*10)/10, 'f', -1, 64)
	if s[0] == '-' {
		s = "−" + s[1:]
	}
	return s + "°"
}
