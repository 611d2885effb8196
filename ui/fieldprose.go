package ui

import (
	"image/color"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// tone is how a run of text looks.
type tone int

const (
	plain  tone = iota
	strong      // bold: names and titles
	quiet       // less ink: what only accompanies
	alarm       // in the colour of what is over, and bold
	old         // belongs to an older section
)

// run is a piece of text of one tone; with in it is an input's word, underlined, that edits in place; with tap it does something.
type run struct {
	text string
	tone tone
	in   *input
	tap  func()
}

// prose is text that wraps at any width and never clips, with words in it that edit in place.
type prose struct {
	widget.BaseWidget

	runs   []run
	size   func() float32 // of the text
	desk   *Desk          // for inputs
	moved  func()         // the height may have changed
	about  func(string)   // what the input being edited takes
	width  float32        // for which pieces are laid out
	pieces []piece
	height float32

	editing int // index of the run that is being edited, −1 for none
	entry   *fieldEntry
	message string
	wrong   bool
	hovered int
}

// piece is one word or part of a word where it stands.
type piece struct {
	text string
	run  int // index; −1: the message of the entry
	at   fyne.Position
	size fyne.Size
}

var (
	_ fyne.Tappable      = (*prose)(nil)
	_ desktop.Hoverable  = (*prose)(nil)
	_ desktop.Cursorable = (*prose)(nil)
)

func newProse(k *Desk, runs ...run) *prose {
	p := &prose{desk: k, runs: runs, editing: -1, hovered: -1}
	p.ExtendBaseWidget(p)
	return p
}

// say replaces the text. An input that is being edited stays open as long as the new text has it too.
func (p *prose) say(runs ...run) {
	if p.editing < 0 && sameRuns(p.runs, runs) {
		p.runs = runs
		return
	}
	open := p.editing >= 0 && p.editing < len(p.runs)
	var was *input
	if open {
		was = p.runs[p.editing].in
	}
	p.runs, p.hovered = runs, -1
	if !open {
		p.message, p.wrong = "", false
	}
	if open {
		p.editing = -1
		for i, r := range runs {
			if r.in != nil && r.in.key == was.key && r.in.on == was.on {
				p.editing = i
				p.entry.show(r.in)
			}
		}
		if p.editing < 0 {
			p.entry, p.message = nil, ""
		}
	}
	p.relay()
}

// sameRuns tells whether two texts look alike.
func sameRuns(a, b []run) bool {
	if len(a) != len(b) {
		return false
	}
	for i := range a {
		if a[i].text != b[i].text || a[i].tone != b[i].tone || a[i].linked() != b[i].linked() {
			return false
		}
	}
	return true
}

// linked tells whether something happens when the run is tapped.
func (r run) linked() bool { return r.in != nil || r.tap != nil }

// String is the text without its looks.
func (p *prose) String() string {
	var b strings.Builder
	for _, r := range p.runs {
		b.WriteString(r.text)
	}
	return b.String()
}

func (p *prose) relay() {
	before := p.height
	p.layOut()
	p.Refresh()
	if p.moved != nil && before != p.height {
		p.moved()
	}
}

func (p *prose) textSize() float32 {
	if p.size != nil {
		return p.size()
	}
	return p.Theme().Size(theme.SizeNameText)
}

// heightFor lays the text out for a width and returns its height.
func (p *prose) heightFor(width float32) float32 {
	if width != p.width || p.pieces == nil {
		p.width = width
		p.layOut()
	}
	return p.height
}

// MinSize is the height at the width laid out last; the width may shrink to that of a few letters.
func (p *prose) MinSize() fyne.Size {
	p.ExtendBaseWidget(p)
	return fyne.NewSize(40, p.heightFor(max(p.width, 40)))
}

// Resize lays the text out anew for the width.
func (p *prose) Resize(s fyne.Size) {
	p.heightFor(s.Width)
	p.BaseWidget.Resize(s)
	p.Refresh()
}

func (t tone) style() fyne.TextStyle {
	return fyne.TextStyle{Bold: t == strong || t == alarm}
}

func (t tone) colour(w fyne.Widget) color.Color {
	th, v := theme.CurrentForWidget(w), fyne.CurrentApp().Settings().ThemeVariant()
	switch t {
	case quiet:
		return th.Color(ColorNameQuiet, v)
	case alarm:
		return th.Color(theme.ColorNameError, v)
	case old:
		return th.Color(theme.ColorNameDisabled, v)
	}
	return th.Color(theme.ColorNameForeground, v)
}

// Tapped opens the input under the pointer.
func (p *prose) Tapped(e *fyne.PointEvent) {
	i := p.runAt(e.Position)
	if i < 0 {
		return
	}
	if r := p.runs[i]; r.tap != nil {
		r.tap()
	} else if r.in != nil {
		p.edit(i)
	}
}

// edit puts an entry in the place of the run.
func (p *prose) edit(i int) {
	p.editing, p.message, p.wrong = i, "", false
	e := newFieldEntry(p.desk, p.runs[i].in)
	e.say = func(understood string, err error) {
		p.message, p.wrong = understood, err != nil
		if err != nil {
			p.message = sentence(err)
		}
		p.relay()
	}
	e.about = p.about
	e.after = func(how fieldEnd) {
		p.editing, p.entry = -1, nil
		if how != fieldLeft || !p.wrong { // why it was not taken stays until something else is said
			p.message, p.wrong = "", false
		}
		if c := fyne.CurrentApp().Driver().CanvasForObject(p); c != nil && c.Focused() == fyne.Focusable(e) {
			c.Unfocus()
		}
		p.relay()
	}
	p.entry = e
	p.relay()
	if c := fyne.CurrentApp().Driver().CanvasForObject(p); c != nil {
		c.Focus(e)
	}
}

func (p *prose) runAt(at fyne.Position) int {
	for _, w := range p.pieces {
		if w.run >= 0 && at.X >= w.at.X && at.X < w.at.X+w.size.Width && at.Y >= w.at.Y && at.Y < w.at.Y+w.size.Height {
			if p.runs[w.run].linked() {
				return w.run
			}
		}
	}
	return -1
}

// MouseIn follows the pointer.
func (p *prose) MouseIn(e *desktop.MouseEvent) { p.MouseMoved(e) }

// MouseMoved marks the input under the pointer.
func (p *prose) MouseMoved(e *desktop.MouseEvent) { p.hover(p.runAt(e.Position)) }

// MouseOut marks none.
func (p *prose) MouseOut() { p.hover(-1) }

func (p *prose) hover(i int) {
	if i != p.hovered {
		p.hovered = i
		p.Refresh()
	}
}

// Cursor is a hand over what can be changed.
func (p *prose) Cursor() desktop.Cursor {
	if p.hovered >= 0 {
		return desktop.PointerCursor
	}
	return desktop.DefaultCursor
}
