package render

import (
	"image/color"
	"math"
)

// Rung is one line of the ladder in pixels.
type Rung struct {
	IDs    []string // several when equal ones are folded
	Y0, Y1 float64
}

// Ladder paints the ladder into the canvas: colour scale with unit, rungs, limits, ambient. It returns where each rung is, for hit tests.
func Ladder(c Canvas, s Scene, sc Scale, st Style) []Rung {
	w, h := c.Size()
	l := &ladder{c: c, s: s, sc: sc, k: st.k(), pal: st.Colors(), w: w, h: h}
	l.layout()
	l.axis()
	steps := l.steps()
	l.place(steps)
	l.bands(steps)
	return l.draw(steps)
}

// ladder holds what the pieces of Ladder share. Lengths in pixels.
type ladder struct {
	c    Canvas
	s    Scene
	sc   Scale
	k    float64
	pal  Palette
	w, h float64

	top, bottom float64 // of the colour bar
	bar0, bar1  float64 // its left and right edge
	text        float64 // where labels begin
}

// rowHeight is the least distance of two labels at device scale 1.
const rowHeight = 16

func (l *ladder) font() Font { return Font{Size: 12 * l.k, Color: l.pal.Ink, AY: 0.5} }

func (l *ladder) layout() {
	l.top, l.bottom = math.Round(34*l.k), math.Round(max(35*l.k, l.h-16*l.k))
	wide := 0.0
	for _, t := range l.ticks() {
		wide = max(wide, l.c.MeasureText(wholeOrHalf(t), l.font()))
	}
	l.bar0 = math.Round(10*l.k + wide + 7*l.k)
	l.bar1 = l.bar0 + math.Round(max(9*l.k, min(15*l.k, l.w*0.08)))
	l.text = l.bar1 + 24*l.k
}

// ticks returns the numbers on the axis.
func (l *ladder) ticks() []float64 {
	if !(l.sc.High > l.sc.Low) || !l.s.solved() {
		return nil
	}
	return levels(l.sc.Low, l.sc.High, roundStep((l.sc.High-l.sc.Low)*38*l.k/(l.bottom-l.top)))
}

// y returns the height of a temperature, kept on the bar.
func (l *ladder) y(t float64) float64 {
	return l.bottom - max(0, min(1, l.sc.at(t)))*(l.bottom-l.top)
}

// axis draws the unit, the numbers and the colour bar.
func (l *ladder) axis() {
	f := l.font()
	f.Color = l.pal.Quiet
	l.c.Text("°C", 10*l.k, 16*l.k, f)
	for _, t := range l.ticks() {
		g := f
		g.AX = 1
		y := l.y(t)
		l.c.Text(wholeOrHalf(t), l.bar0-7*l.k, y, g)
		line(l.c, l.bar0-4*l.k, y, l.bar0, y, Pen{Width: l.k, Color: l.pal.Rule})
	}
	if l.s.solved() {
		l.colorBar()
		if l.s.Stale {
			rectangle(l.c, l.bar0, l.top, l.bar1-l.bar0, l.bottom-l.top)
			l.c.Fill(l.pal.Veil)
		}
	} else {
		rectangle(l.c, l.bar0, l.top, l.bar1-l.bar0, l.bottom-l.top)
		l.c.Fill(l.pal.Wall)
	}
	rectangle(l.c, l.bar0, l.top, l.bar1-l.bar0, l.bottom-l.top)
	l.c.Stroke(Pen{Width: l.k, Color: alpha(l.pal.Quiet, 0.7)})
}

// colorBar fills the bar in steps of whole pixels.
func (l *ladder) colorBar() {
	n := int(math.Ceil(min(255, l.bottom-l.top)))
	for i := range n {
		y0 := l.top + math.Round(float64(i)*(l.bottom-l.top)/float64(n))
		y1 := l.top + math.Round(float64(i+1)*(l.bottom-l.top)/float64(n))
		t := l.sc.High - (float64(i)+0.5)/float64(n)*(l.sc.High-l.sc.Low)
		rectangle(l.c, l.bar0, y0, l.bar1-l.bar0, min(y1+1, l.bottom)-y0) // a pixel more, so that no seam shows
		l.c.Fill(l.sc.Color(t))
	}
}

// place gives every step the height of its label.
func (l *ladder) place(steps []step) {
	want, height := make([]float64, len(steps)), make([]float64, len(steps))
	for i, s := range steps {
		want[i], height[i] = l.y(s.temp), rowHeight*l.k
	}
	for i, y := range spread(want, height, l.top-8*l.k, l.h-2*l.k) {
		steps[i].label = y
	}
}

// draw paints the steps and returns those that stand for parts or layers.
func (l *ladder) draw(steps []step) []Rung {
	var out []Rung
	for _, s := range steps {
		switch {
		case s.limit:
			l.drawLimit(s)
		default:
			l.drawStep(s)
		}
		if len(s.ids) > 0 {
			half := rowHeight * l.k / 2
			out = append(out, Rung{IDs: s.ids, Y0: s.label - half, Y1: s.label + half})
		}
	}
	return out
}

func (l *ladder) drawStep(s step) {
	y := l.y(s.temp)
	col := s.color
	if l.s.Stale {
		col = l.pal.Quiet
	}
	if s.selected || s.pointed {
		l.highlight(s)
	}
	if s.high-s.low > 0.5 && !s.banded { // a folded group: how far it reaches
		y0, y1 := l.y(s.high), l.y(s.low)
		rectangle(l.c, l.bar1+2*l.k, y0, 3.5*l.k, max(y1-y0, l.k))
		l.c.Fill(alpha(l.pal.Quiet, 0.6))
	}
	wide := l.k
	if s.bold {
		wide = 2 * l.k
	}
	line(l.c, l.bar0, y, l.bar1, y, Pen{Width: wide + 2*l.k, Color: alpha(l.pal.Halo, 0.7)})
	line(l.c, l.bar0, y, l.bar1, y, Pen{Width: wide, Color: l.pal.Line})
	l.c.MoveTo(l.bar1, y)
	l.c.LineTo(l.bar1+7*l.k, y)
	l.c.LineTo(l.text-10*l.k, s.label)
	l.c.LineTo(l.text-4*l.k, s.label)
	l.c.Stroke(Pen{Width: wide, Color: col})
	l.write(s, col)
}

// write puts name and number of a step at its label's height.
func (l *ladder) write(s step, col color.NRGBA) {
	f := l.font()
	f.Bold, f.Color = s.bold, col
	g := l.font()
	g.Color = l.pal.Quiet
	if s.bold {
		g.Color = col
	}
	number := s.number()
	if l.s.Stale {
		number = ""
	}
	room := l.w - l.text - 4*l.k
	nw := 0.0
	if number != "" {
		nw = l.c.MeasureText(" "+number, g)
	}
	if l.c.MeasureText(s.name, f) > room-nw { // the name counts for more than the number
		number, nw = "", 0
	}
	name := Elide(s.name, room-nw, func(t string) float64 { return l.c.MeasureText(t, f) })
	l.c.Text(name, l.text, s.label, f)
	if number != "" && nw <= room {
		l.c.Text(number, l.text+l.c.MeasureText(name+" ", f), s.label, g)
	}
}

// drawLimit draws a limit's notch: a dashed line across the bar and a triangle that points at it.
func (l *ladder) drawLimit(s step) {
	y := l.y(s.temp)
	col := s.color
	if l.s.Stale {
		col = l.pal.Quiet
	}
	l.c.MoveTo(l.bar0, y)
	l.c.LineTo(l.bar1+7*l.k, y)
	l.c.LineTo(l.text-12*l.k, s.label)
	l.c.Stroke(Pen{Width: 1.3 * l.k, Color: col, Dash: []float64{4 * l.k, 2.5 * l.k}})
	x := l.text - 11*l.k
	l.c.MoveTo(x, s.label)
	l.c.LineTo(x+7*l.k, s.label-4.5*l.k)
	l.c.LineTo(x+7*l.k, s.label+4.5*l.k)
	l.c.Close()
	l.c.Fill(col)
	f := l.font()
	f.Color, f.Bold = col, s.bold
	room, measure := l.w-l.text-4*l.k, func(t string) float64 { return l.c.MeasureText(t, f) }
	name := s.name
	if measure(name) > room {
		name = s.short
	}
	l.c.Text(Elide(name, room, measure), l.text, s.label, f)
}

// highlight puts the selection's wash behind a label, or a frame round the one pointed at.
func (l *ladder) highlight(s step) {
	half := rowHeight * l.k / 2
	box := func() { rounded(l.c, l.text-4*l.k, s.label-half, l.w-l.text+2*l.k, 2*half, 3*l.k) }
	if s.selected {
		box()
		l.c.Fill(l.pal.Wash)
	}
	if s.pointed {
		box()
		l.c.Stroke(Pen{Width: l.k, Color: l.pal.Accent})
	}
}
