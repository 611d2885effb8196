package render

import (
	"fmt"
	"image"
	"image/color"
	"math"
	"strings"
)

// Recorder is a canvas that writes down what is drawn, a line for every call that leaves a mark, so that a picture can be
// compared as text. Text is measured as on a raster.
type Recorder struct {
	w, h  float64
	lines []string
	path  []string
	reach box
	depth int
}

// NewRecorder returns an empty recorder of a picture's size in pixels.
func NewRecorder(w, h float64) *Recorder { return &Recorder{w: w, h: h, reach: noBox()} }

// String returns what was drawn.
func (r *Recorder) String() string { return strings.Join(r.lines, "\n") + "\n" }

// Size returns the picture's size.
func (r *Recorder) Size() (w, h float64) { return r.w, r.h }

func (r *Recorder) note(format string, args ...any) {
	r.lines = append(r.lines, strings.Repeat("  ", r.depth)+fmt.Sprintf(format, args...))
}

// Push begins an indented block.
func (r *Recorder) Push() {
	r.note("push")
	r.depth++
}

// Pop ends it.
func (r *Recorder) Pop() {
	if r.depth == 0 {
		panic("render: Pop without Push")
	}
	r.depth--
	r.note("pop")
}

// Clip writes the rectangle.
func (r *Recorder) Clip(x, y, w, h float64) {
	r.note("clip %s %s %s %s", tenth(x), tenth(y), tenth(w), tenth(h))
}

// MoveTo adds to the path.
func (r *Recorder) MoveTo(x, y float64) { r.add(box{x, y, x, y}, "move %s %s", x, y) }

// LineTo adds to the path.
func (r *Recorder) LineTo(x, y float64) { r.add(box{x, y, x, y}, "line %s %s", x, y) }

// Arc adds to the path; angles are written in degrees.
func (r *Recorder) Arc(x, y, rad, from, to float64) {
	r.add(boxAround(x, y, rad), "arc %s %s %s %s %s", x, y, rad, from*180/pi, to*180/pi)
}

// Circle adds to the path.
func (r *Recorder) Circle(x, y, rad float64) {
	r.add(boxAround(x, y, rad), "circle %s %s %s", x, y, rad)
}

// Close adds to the path.
func (r *Recorder) Close() { r.add(noBox(), "close") }

func (r *Recorder) add(b box, format string, args ...float64) {
	text := make([]any, len(args))
	for i, a := range args {
		text[i] = tenth(a)
	}
	r.path = append(r.path, fmt.Sprintf(format, text...))
	r.reach = r.reach.with(b)
}

// longPath is the number of pieces from which a path is written as its number to the nearest 20 and its box to the nearest 5
// pixels: such paths come from a numerical field, whose last digits differ between processors.
const longPath = 14

// takePath returns the path's text and forgets it.
func (r *Recorder) takePath() string {
	t := strings.Join(r.path, ", ")
	if len(r.path) > longPath {
		b := r.reach
		five := func(v float64) float64 { return 5*math.Round(v/5) + 0 }
		t = fmt.Sprintf("some %d pieces within %g %g %g %g", (len(r.path)+10)/20*20, five(b.x0), five(b.y0), five(b.x1), five(b.y1))
	}
	r.path, r.reach = r.path[:0], noBox()
	return t
}

// Fill writes colour and path.
func (r *Recorder) Fill(c color.NRGBA) { r.note("fill %s %s", hex(c), r.takePath()) }

// Stroke writes pen and path.
func (r *Recorder) Stroke(p Pen) {
	dash := ""
	for _, d := range p.Dash {
		dash += " " + tenth(d)
	}
	if dash != "" {
		dash = " dash" + dash
	}
	r.note("stroke %s %s%s %s", tenth(p.Width), hex(p.Color), dash, r.takePath())
}

// Text writes the words first.
func (r *Recorder) Text(s string, x, y float64, f Font) {
	bold := ""
	if f.Bold {
		bold = " bold"
	}
	r.note("text %q %s %s size %s%s %s anchor %g %g", s, tenth(x), tenth(y), tenth(f.Size), bold, hex(f.Color), f.AX, f.AY)
}

// MeasureText returns what a raster would.
func (r *Recorder) MeasureText(s string, f Font) float64 { return letters.measure(s, f) }

// Image writes size and place.
func (r *Recorder) Image(img *image.RGBA, x, y float64) {
	r.note("image %d × %d at %s %s", img.Rect.Dx(), img.Rect.Dy(), tenth(x), tenth(y))
}

// tenth writes a number to a tenth, never as "-0".
func tenth(v float64) string {
	return fmt.Sprintf("%g", math.Round(v*10)/10+0)
}

func hex(c color.NRGBA) string {
	if c.A == 255 {
		return fmt.Sprintf("#%02x%02x%02x", c.R, c.G, c.B)
	}
	return fmt.Sprintf("#%02x%02x%02x%02x", c.R, c.G, c.B, c.A)
}
