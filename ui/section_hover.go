package ui

import (
	"math"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"

	"packrise/render"
	"packrise/solver/section"
)

// MouseIn is the pointer coming over the canvas.
func (v *SectionView) MouseIn(e *desktop.MouseEvent) { v.MouseMoved(e) }

// MouseMoved lights up the part under the pointer and reads it out.
func (v *SectionView) MouseMoved(e *desktop.MouseEvent) {
	v.over, v.at = true, e.Position
	if v.drag.mode != dragParts {
		v.desk.Point(v.partAt(e.Position))
	}
	v.hover()
}

// MouseOut is the pointer leaving the canvas.
func (v *SectionView) MouseOut() {
	v.over = false
	v.desk.Point("")
	v.hint.say(nil)
}

// hover puts the read-out beside the pointer.
func (v *SectionView) hover() {
	if !v.over && v.drag.mode != dragParts || v.camera.scale == 0 {
		v.hint.say(nil)
		return
	}
	id := v.desk.Pointed()
	if v.drag.mode == dragParts {
		id = v.drag.id
	}
	if v.pic != nil {
		v.hint.say(readOut(v.pic.scene, id, v.camera.toMM(v.at, v.Size())))
	}
}

// readOut says what is at a place of a picture: the part, and the temperature there.
func readOut(s render.Scene, id string, p section.Point) []string {
	var lines []string
	for _, shape := range s.Shapes {
		if shape.ID == id && id != "" {
			lines = append(lines, strings.TrimSuffix(shape.ID+"  "+shape.Label, "  "))
		}
	}
	for _, q := range s.Readings {
		if q.ID == id && id != "" {
			return append(lines, readingLine(q))
		}
	}
	if s.Field == nil {
		return lines
	}
	var t [1]float64
	s.Field.Row(t[:], p.Y, p.X, 1)
	if math.IsNaN(t[0]) {
		return lines
	}
	return append(lines, withUnit(degrees(t[0], section.Opt[float64]{}), "°C")+" here")
}

// readingLine says a part's temperature beside its limit.
func readingLine(q section.Reading) string {
	s := withUnit(degrees(q.TempC, q.LimitC), "°C")
	m, ok := q.MarginK()
	if !ok {
		return s
	}
	s += ", limit " + withUnit(degrees(q.LimitC.V, section.Opt[float64]{}), "°C")
	if q.Assumed {
		s += " (assumed)"
	}
	if m < 0 {
		return s + ", over by " + withUnit(overWords(q.TempC, q.LimitC.V), "K")
	}
	return s + ", margin " + withUnit(marginWords(q.TempC, q.LimitC.V), "K")
}

// readout is what is under the pointer, in the upper left corner of the canvas, where it covers no part of a section that fits.
type readout struct {
	box   *fill
	lines [2]*canvas.Text
}

func newReadout() *readout {
	r := &readout{box: newFill(theme.ColorNameBackground)}
	r.box.rect.CornerRadius = 4
	r.box.Hide()
	for i := range r.lines {
		r.lines[i] = canvas.NewText("", nil)
		r.lines[i].Hide()
	}
	return r
}

func (r *readout) objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.box, r.lines[0], r.lines[1]}
}

// say shows the lines; no lines hide it.
func (r *readout) say(lines []string) {
	const off, pad = 8, 4
	var w, y float32 = 0, off + pad
	for i, t := range r.lines {
		if i >= len(lines) {
			t.Hide()
			continue
		}
		t.Text, t.TextSize, t.Color = lines[i], theme.CaptionTextSize(), themeColor(ColorNameQuiet)
		if i == 0 {
			t.Color = themeColor(theme.ColorNameForeground)
		}
		size := t.MinSize()
		put(t, off+pad, y, size.Width, size.Height)
		w, y = max(w, size.Width), y+size.Height
		t.Show()
		t.Refresh()
	}
	setVisible(len(lines) > 0, r.box)
	put(r.box, off, off, w+2*pad, y+pad-off)
}

// text is what is shown.
func (r *readout) text() string {
	var s []string
	for _, t := range r.lines {
		if t.Visible() {
			s = append(s, t.Text)
		}
	}
	return strings.Join(s, "\n")
}
