package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// askRow is one answer in a list: what to do, at its right what it brings, and below what it costs. Pointing at it or reaching it with the keyboard
// previews it, a click or Enter takes it.
type askRow struct {
	widget.BaseWidget

	back             *fill
	head, gain, tail *prose
	preview          func(on bool)
	take             func()
	step             func(by int) // to the row after or before
	width            float32
	lit              bool
}

var (
	_ fyne.Tappable      = (*askRow)(nil)
	_ fyne.Focusable     = (*askRow)(nil)
	_ desktop.Hoverable  = (*askRow)(nil)
	_ desktop.Cursorable = (*askRow)(nil)
)

const askRowPad = 6

func newAskRow(k *Desk, head, gain, tail string) *askRow {
	r := &askRow{back: newFill(theme.ColorNameSelection), head: newProse(k, run{text: head, tone: strong}), gain: newProse(k, run{text: gain, tone: strong}), tail: newProse(k, run{text: tail, tone: quiet})}
	r.tail.size = smallText(r.tail)
	r.back.rect.CornerRadius = 3
	r.back.Hide()
	r.ExtendBaseWidget(r)
	return r
}

// Tapped takes the answer.
func (r *askRow) Tapped(*fyne.PointEvent) { r.take() }

// MouseIn previews it.
func (r *askRow) MouseIn(*desktop.MouseEvent) { r.light(true) }

// MouseMoved is for the toolkit.
func (r *askRow) MouseMoved(*desktop.MouseEvent) {}

// MouseOut ends the preview.
func (r *askRow) MouseOut() { r.light(false) }

// FocusGained previews it.
func (r *askRow) FocusGained() { r.light(true) }

// FocusLost ends the preview.
func (r *askRow) FocusLost() { r.light(false) }

// Cursor is a hand.
func (r *askRow) Cursor() desktop.Cursor { return desktop.PointerCursor }

// TypedRune is for the toolkit.
func (r *askRow) TypedRune(rune) {}

// TypedKey takes the answer with Enter; the arrows go to the next.
func (r *askRow) TypedKey(e *fyne.KeyEvent) {
	switch e.Name {
	case fyne.KeyReturn, fyne.KeyEnter, fyne.KeySpace:
		r.take()
	case fyne.KeyDown:
		r.step(1)
	case fyne.KeyUp:
		r.step(-1)
	case fyne.KeyEscape:
		if c := fyne.CurrentApp().Driver().CanvasForObject(r); c != nil {
			c.Unfocus()
		}
	}
}

func (r *askRow) light(on bool) {
	if on == r.lit {
		return
	}
	r.lit = on
	setVisible(on, r.back)
	r.preview(on)
}

// gainWidth is the room of what it brings, at most a third.
func (r *askRow) gainWidth(width float32) float32 {
	if r.gain.String() == "" {
		return 0
	}
	w := textExtent(r.gain.String(), r.gain.textSize(), fyne.TextStyle{Bold: true}).Width + 4
	return min(w, width/3)
}

// heightFor returns the height at a width.
func (r *askRow) heightFor(width float32) float32 {
	r.width = width
	head, gain := r.columns(width)
	h := r.head.heightFor(head)
	if gain > 0 {
		h = max(h, r.gain.heightFor(gain))
	}
	if r.tail.String() != "" {
		h += r.tail.heightFor(width) + 2
	}
	return h + 2*askRowPad
}

// columns are the widths of what to do and of what it brings.
func (r *askRow) columns(width float32) (head, gain float32) {
	if gain = r.gainWidth(width); gain > 0 {
		return width - gain - 8, gain
	}
	return width, 0
}

// MinSize is the height at the width laid out last.
func (r *askRow) MinSize() fyne.Size {
	r.ExtendBaseWidget(r)
	return fyne.NewSize(80, r.heightFor(max(r.width, 80)))
}

// CreateRenderer is for the toolkit.
func (r *askRow) CreateRenderer() fyne.WidgetRenderer {
	// The touch lies on top: prose would take the pointer for itself.
	return widget.NewSimpleRenderer(&fyne.Container{Layout: askRowLayout{r}, Objects: []fyne.CanvasObject{r.back, r.head, r.gain, r.tail, newAskTouch(r)}})
}

type askRowLayout struct{ r *askRow }

func (l askRowLayout) MinSize([]fyne.CanvasObject) fyne.Size { return l.r.MinSize() }

func (l askRowLayout) Layout(objects []fyne.CanvasObject, s fyne.Size) {
	r := l.r
	head, gain := r.columns(s.Width)
	h := r.head.heightFor(head)
	put(r.back, -askRowPad, 0, s.Width+2*askRowPad, s.Height) // the text stands in line with the pane's other text
	put(r.head, 0, askRowPad, head, h)
	if gain > 0 {
		h = max(h, r.gain.heightFor(gain))
		put(r.gain, s.Width-gain, askRowPad, gain, r.gain.heightFor(gain))
	}
	put(r.tail, 0, askRowPad+h+2, s.Width, r.tail.heightFor(s.Width))
	objects[len(objects)-1].Resize(s)
}

// askTouch takes the pointer for a row.
type askTouch struct {
	widget.BaseWidget
	r *askRow
}

var (
	_ fyne.Tappable      = (*askTouch)(nil)
	_ desktop.Hoverable  = (*askTouch)(nil)
	_ desktop.Cursorable = (*askTouch)(nil)
)

func newAskTouch(r *askRow) *askTouch {
	t := &askTouch{r: r}
	t.ExtendBaseWidget(t)
	return t
}

// Tapped, MouseIn, MouseMoved, MouseOut and Cursor are the row's.
func (t *askTouch) Tapped(e *fyne.PointEvent) { t.r.Tapped(e) }

// MouseIn is the row's.
func (t *askTouch) MouseIn(e *desktop.MouseEvent) { t.r.MouseIn(e) }

// MouseMoved is the row's.
func (t *askTouch) MouseMoved(*desktop.MouseEvent) {}

// MouseOut is the row's.
func (t *askTouch) MouseOut() { t.r.MouseOut() }

// Cursor is the row's.
func (t *askTouch) Cursor() desktop.Cursor { return t.r.Cursor() }

// MinSize is nothing.
func (t *askTouch) MinSize() fyne.Size { return fyne.NewSize(1, 1) }

// CreateRenderer draws nothing.
func (t *askTouch) CreateRenderer() fyne.WidgetRenderer {
	return widget.NewSimpleRenderer(&fyne.Container{})
}
