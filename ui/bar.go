package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/widget"
)

// bar is the command row: the line to put things in, and the few commands that people use all day.
type bar struct {
	back    *fill
	put     fyne.CanvasObject
	buttons []fyne.CanvasObject
	right   []fyne.CanvasObject // at the right end; the first gives way where there is no room for all
}

const (
	barGap   = 6
	putLeast = 170
	putMost  = 380
)

func newBar(put fyne.CanvasObject, buttons, right []fyne.CanvasObject) *fyne.Container {
	b := &bar{back: newFill(ColorNameStrip), put: put, buttons: buttons, right: right}
	objects := append([]fyne.CanvasObject{b.back}, buttons...)
	return &fyne.Container{Layout: b, Objects: append(append(objects, right...), put)}
}

// MinSize has room for every button.
func (b *bar) MinSize([]fyne.CanvasObject) fyne.Size {
	w, h := float32(2*barMargin+putLeast), b.put.MinSize().Height
	for _, o := range append(b.buttons[:len(b.buttons):len(b.buttons)], b.right...) {
		if o.Visible() {
			w += o.MinSize().Width + barGap
			h = max(h, o.MinSize().Height)
		}
	}
	return fyne.NewSize(w, h+2*barGap)
}

// Layout gives the line to put things in what the buttons leave.
func (b *bar) Layout(objects []fyne.CanvasObject, s fyne.Size) {
	b.back.Resize(s)
	if len(b.right) > 1 { // its command stands in a menu too
		b.right[0].Show()
		setVisible(b.MinSize(objects).Width <= s.Width, b.right[0])
	}
	least := b.MinSize(objects).Width
	wide := min(putMost, max(putLeast, putLeast+s.Width-least))
	h := b.put.MinSize().Height
	put(b.put, barMargin, (s.Height-h)/2, wide, h)
	x := barMargin + wide + 2*barGap
	for _, o := range b.buttons {
		if o.Visible() {
			m := o.MinSize()
			put(o, x, (s.Height-m.Height)/2, m.Width, m.Height)
			x += m.Width + barGap
		}
	}
	x = s.Width - barMargin
	for i := len(b.right) - 1; i >= 0; i-- {
		if o := b.right[i]; o.Visible() {
			m := o.MinSize()
			x -= m.Width
			put(o, x, (s.Height-m.Height)/2, m.Width, m.Height)
			x -= barGap
		}
	}
}

// elided cuts a label that would be too long for its button; the whole stands in the menu.
func elided(s string, most int) string {
	r := []rune(s)
	if len(r) <= most {
		return s
	}
	return string(r[:most-1]) + "…"
}

// commands are the buttons of the command row.
type commands struct {
	settle, layUp, undo, fit, out, in, advice, details *widget.Button
}

func newCommands(w *Window) *commands {
	return &commands{
		settle:  widget.NewButton("Settle", w.settle),
		layUp:   widget.NewButton("Lay up", w.layUp),
		undo:    widget.NewButton("Undo", w.undo),
		fit:     widget.NewButton("Fit", w.view.Fit),
		out:     widget.NewButton(minusSign, func() { w.view.Zoom(1 / zoomStep) }),
		in:      widget.NewButton("+", func() { w.view.Zoom(zoomStep) }),
		advice:  widget.NewButton(adviceTitle, w.asks.showAdvice),
		details: widget.NewButton("Details", w.toggleDetails),
	}
}

// follow brings the buttons up to the desk.
func (c *commands) follow(k *Desk) {
	label := "Undo"
	if n := k.UndoName(); n != "" {
		label = "Undo " + elided(n, 22)
	}
	if c.undo.Text != label {
		c.undo.SetText(label)
	}
	enable(c.undo, k.UndoName() != "" || k.Drafting())
}

func enable(b *widget.Button, on bool) {
	if on && b.Disabled() {
		b.Enable()
	} else if !on && !b.Disabled() {
		b.Disable()
	}
}
