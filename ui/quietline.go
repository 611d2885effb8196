package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// quietLine is one line of small quiet text at the right; what doesn't fit is elided.
type quietLine struct {
	widget.BaseWidget
	text string
	line *canvas.Text
}

func newQuietLine() *quietLine {
	q := &quietLine{line: canvas.NewText("", nil)}
	q.line.Alignment = fyne.TextAlignTrailing
	q.ExtendBaseWidget(q)
	return q
}

// SetText changes what the line says.
func (q *quietLine) SetText(s string) {
	if s != q.text {
		q.text = s
		q.Refresh()
	}
}

// fit elides the text to the width.
func (q *quietLine) fit(width float32) {
	q.line.TextSize, q.line.Color = theme.CaptionTextSize(), themeColor(ColorNameQuiet)
	r := []rune(q.text)
	q.line.Text = q.text
	for n := len(r) - 1; n > 0 && q.line.MinSize().Width > width; n-- {
		q.line.Text = string(r[:n]) + "…"
	}
}

// MinSize is one line high.
func (q *quietLine) MinSize() fyne.Size {
	return fyne.NewSize(40, fyne.MeasureText("M", theme.CaptionTextSize(), fyne.TextStyle{}).Height+8)
}

// CreateRenderer is for the toolkit.
func (q *quietLine) CreateRenderer() fyne.WidgetRenderer { return &quietRenderer{q} }

type quietRenderer struct{ q *quietLine }

func (r *quietRenderer) Destroy()                     {}
func (r *quietRenderer) MinSize() fyne.Size           { return r.q.MinSize() }
func (r *quietRenderer) Objects() []fyne.CanvasObject { return []fyne.CanvasObject{r.q.line} }

func (r *quietRenderer) Layout(s fyne.Size) {
	r.q.fit(s.Width - 2*8)
	put(r.q.line, 8, 0, s.Width-2*8, s.Height)
}

func (r *quietRenderer) Refresh() {
	r.Layout(r.q.Size())
	r.q.line.Refresh()
}
