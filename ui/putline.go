package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// PutLine is the line to put things in: it shows how it understands what is typed, and Enter puts it into the section.
type PutLine struct {
	widget.BaseWidget

	desk  *Desk
	entry *putEntry
	hint  *putHint
	wrong bool
}

// putEntry is the entry of the line. Escape empties it.
type putEntry struct {
	widget.Entry
	line *PutLine
}

// NewPutLine puts things into the desk's section.
func NewPutLine(k *Desk) *PutLine {
	l := &PutLine{desk: k, hint: newPutHint()}
	e := &putEntry{line: l}
	e.Wrapping = fyne.TextWrap(fyne.TextTruncateClip)
	e.ExtendBaseWidget(e)
	e.SetPlaceHolder("Put in: 12 thhn, 3x 2.5 h07v-k, M25, filler 4 …")
	e.OnChanged = func(string) { l.understand() }
	e.OnSubmitted = func(string) { l.submit() }
	l.entry = e
	l.ExtendBaseWidget(l)
	return l
}

// Focus puts the keyboard into the line.
func (l *PutLine) Focus() {
	if c := fyne.CurrentApp().Driver().CanvasForObject(l.entry); c != nil {
		c.Focus(l.entry)
	}
}

// understand says below the line what it makes of the text.
func (l *PutLine) understand() {
	text := plainMinus(l.entry.Text)
	if squeezed(text) == "" {
		l.say("", false)
		return
	}
	p, err := l.desk.Catalog().Parse(text)
	if err != nil {
		l.say(sentence(err), true)
		return
	}
	l.say(upperFirst(p.Meant), false)
}

// say writes below the line; "" takes the words away.
func (l *PutLine) say(text string, wrong bool) {
	l.wrong = wrong
	l.hint.text = text
	l.hint.wrong = wrong
	l.Refresh()
}

// submit puts in what is typed.
func (l *PutLine) submit() {
	text := plainMinus(l.entry.Text)
	if squeezed(text) == "" {
		return
	}
	p, err := l.desk.Catalog().Parse(text)
	if err == nil {
		err = l.put(p)
	}
	if err != nil {
		l.say(sentence(err), true)
	}
}

// done empties the line for the next thing and says what has happened, "" if that can be seen.
func (l *PutLine) done(said string) {
	l.entry.SetText("")
	l.say(said, false)
}

// TypedKey empties the line on Escape.
func (e *putEntry) TypedKey(key *fyne.KeyEvent) {
	if key.Name == fyne.KeyEscape {
		e.SetText("")
		e.line.say("", false)
		return
	}
	e.Entry.TypedKey(key)
}

// FocusLost takes the words below away: they would cover the section.
func (e *putEntry) FocusLost() {
	e.Entry.FocusLost()
	e.line.hint.hide = true
	e.line.Refresh()
}

// FocusGained brings them back.
func (e *putEntry) FocusGained() {
	e.Entry.FocusGained()
	e.line.hint.hide = false
	e.line.Refresh()
}

// MinSize is that of the entry.
func (l *PutLine) MinSize() fyne.Size {
	l.ExtendBaseWidget(l)
	return fyne.NewSize(160, l.entry.MinSize().Height)
}

// CreateRenderer draws the entry and, below it and over what is there, the hint.
func (l *PutLine) CreateRenderer() fyne.WidgetRenderer { return &putRenderer{line: l} }

type putRenderer struct {
	line *PutLine
}

func (r *putRenderer) Destroy()           {}
func (r *putRenderer) MinSize() fyne.Size { return r.line.MinSize() }

func (r *putRenderer) Layout(s fyne.Size) {
	r.line.entry.Resize(s)
}

func (r *putRenderer) Objects() []fyne.CanvasObject {
	l := r.line
	return append([]fyne.CanvasObject{l.entry}, l.hint.objects(l.Size())...)
}

func (r *putRenderer) Refresh() { canvas.Refresh(r.line) }

// putHint is a small box of words below the line. It takes nothing from the pointer.
type putHint struct {
	text  string
	wrong bool
	hide  bool
	box   *canvas.Rectangle
	lines []*canvas.Text
}

func newPutHint() *putHint { return &putHint{box: canvas.NewRectangle(nil)} }

// putHintWidth is the least width at which the hint wraps.
const putHintWidth = 360

// objects lays the words out below a line of that size.
func (h *putHint) objects(line fyne.Size) []fyne.CanvasObject {
	if h.text == "" || h.hide {
		return nil
	}
	const pad = 8
	ink := themeColor(theme.ColorNameForeground)
	if h.wrong {
		ink = themeColor(theme.ColorNameError)
	}
	h.box.FillColor, h.box.StrokeColor, h.box.StrokeWidth = themeColor(theme.ColorNameOverlayBackground), themeColor(theme.ColorNameInputBorder), 1
	h.box.CornerRadius = 4
	size := theme.TextSize()
	words := tipLines(h.text, size, max(putHintWidth, line.Width)-2*pad)
	for len(h.lines) < len(words) {
		h.lines = append(h.lines, &canvas.Text{})
	}
	out := []fyne.CanvasObject{h.box}
	y := line.Height + 3
	wide := line.Width
	for i, w := range words {
		t := h.lines[i]
		t.Text, t.TextSize, t.Color = w, size, ink
		s := t.MinSize()
		t.Move(fyne.NewPos(pad, y+pad/2))
		t.Resize(s)
		y += s.Height
		wide = max(wide, s.Width+2*pad)
		out = append(out, t)
	}
	h.box.Move(fyne.NewPos(0, line.Height+3))
	h.box.Resize(fyne.NewSize(wide, y+pad-line.Height-3))
	return out
}
