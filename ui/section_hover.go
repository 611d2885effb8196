package ui

import (
	"math"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"

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
	v.hint.say(nil, fyne.Position{}, v.Size())
}

// hover puts the read-out beside the pointer.
func (v *SectionView) hover() {
	if !v.over && v.drag.mode != dragParts || v.camera.scale == 0 {
		v.hint.say(nil, fyne.Position{}, v.Size())
		return
	}
	id := v.desk.Pointed()
	if v.drag.mode == dragParts {
		id = v.drag.id
	}
	v.hint.say(v.desk.readOut(id, v.camera.toMM(v.at, v.Size())), v.at, v.Size())
}

// readOut says what is at a place: the part, and the temperature there.
func (k *Desk) readOut(id string, p section.Point) []string {
	var lines []string
	for _, s := range k.shownShapes() {
		if s.ID == id && id != "" {
			lines = append(lines, strings.TrimSuffix(s.ID+"  "+s.Label, "  "))
		}
	}
	r, fresh := k.Result()
	if r == nil || !fresh {
		return lines
	}
	for _, q := range r.Readings() {
		if q.ID == id && id != "" {
			return append(lines, readingLine(q))
		}
	}
	var t [1]float64
	r.Row(t[:], p.Y, p.X, 1)
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
		return s + ", over by " + withUnit(strings.TrimPrefix(kelvins(m), minusSign), "K")
	}
	return s + ", margin " + withUnit(kelvins(m), "K")
}

// readout is a little box of text beside the pointer.
type readout struct {
	box   *canvas.Rectangle
	lines [2]*canvas.Text
}

func newReadout() *readout {
	r := &readout{box: canvas.NewRectangle(nil)}
	r.box.CornerRadius, r.box.StrokeWidth = 4, 1
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

// say shows the lines beside a position, within the canvas; no lines hide it.
func (r *readout) say(lines []string, at fyne.Position, within fyne.Size) {
	if len(lines) == 0 {
		if r.box.Visible() {
			for _, o := range r.objects() {
				o.Hide()
			}
		}
		return
	}
	const pad, off = 6, 16
	var w, h float32
	for i, t := range r.lines {
		if i >= len(lines) {
			t.Hide()
			continue
		}
		t.Text, t.TextSize = lines[i], theme.CaptionTextSize()
		t.Color = themeColor(theme.ColorNameForeground)
		size := t.MinSize()
		w = max(w, size.Width)
		t.Show()
		h += size.Height
	}
	x, y := at.X+off, at.Y+off
	if x+w+2*pad > within.Width {
		x = max(0, at.X-off-w-2*pad)
	}
	if y+h+2*pad > within.Height {
		y = max(0, at.Y-off-h-2*pad)
	}
	r.box.FillColor, r.box.StrokeColor = themeColor(theme.ColorNameMenuBackground), themeColor(theme.ColorNameSeparator)
	r.box.Move(fyne.NewPos(x, y))
	r.box.Resize(fyne.NewSize(w+2*pad, h+2*pad))
	r.box.Show()
	row := y + pad
	for _, t := range r.lines {
		if t.Visible() {
			t.Move(fyne.NewPos(x+pad, row))
			t.Resize(t.MinSize())
			row += t.MinSize().Height
			t.Refresh()
		}
	}
	r.box.Refresh()
}
