package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// fieldEntry is the entry of an input: Enter or loss of the focus commits, Escape puts back what stood there, the arrows may step to a neighbour.
type fieldEntry struct {
	widget.Entry

	in     *input
	desk   *Desk
	say    func(understood string, err error) // beside the entry, while typing
	after  func(how fieldEnd)                 // editing has ended; nil: the entry stays
	about  func(text string)                  // what the entry takes, while it has the focus
	steps  bool                               // the arrows go to the neighbours
	ending bool
}

// fieldEnd is how editing ended.
type fieldEnd int

const (
	fieldEntered   fieldEnd = iota // by Enter
	fieldLeft                      // by the loss of the focus
	fieldCancelled                 // by Escape
	fieldUp                        // by the arrow: on to the neighbour
	fieldDown
)

func newFieldEntry(k *Desk, in *input) *fieldEntry {
	e := &fieldEntry{desk: k}
	e.Wrapping = fyne.TextWrap(fyne.TextTruncateClip)
	e.ExtendBaseWidget(e)
	e.OnChanged = func(string) { e.tell() }
	e.OnSubmitted = func(string) { e.finish(fieldEntered) }
	e.show(in)
	return e
}

// show puts an input into the entry. What a person is typing is kept as long as the input is the same and still stands as it did.
func (e *fieldEntry) show(in *input) {
	typing := e.in != nil && e.Text != e.in.text && e.in.key == in.key && e.in.on == in.on && e.in.text == in.text
	e.in = in
	hint := in.hint
	if in.mixed {
		hint = "several"
	}
	if e.PlaceHolder != hint {
		e.SetPlaceHolder(hint)
	}
	if len(in.choices) > 0 && e.ActionItem == nil {
		e.ActionItem = newFieldDrop(e)
	}
	if typing {
		return
	}
	if e.Text != in.text {
		e.SetText(in.text)
	}
	if e.say != nil {
		e.say("", nil)
	}
}

// tell says beside the entry how its text is understood.
func (e *fieldEntry) tell() {
	if e.say != nil && e.in != nil {
		e.say(e.in.understood(e.Text))
	}
}

// finish ends editing. A text that isn't understood leaves the document alone: after Enter and the arrows editing goes on, otherwise the last
// good value comes back by Escape and stays in the document.
func (e *fieldEntry) finish(how fieldEnd) {
	if e.ending {
		return
	}
	e.ending = true
	defer func() { e.ending = false }()
	if how == fieldCancelled {
		e.SetText(e.in.text)
	} else {
		step, ok, err := e.in.edit(e.Text)
		if err != nil {
			if e.say != nil {
				e.say("", err)
			}
			if how != fieldLeft {
				return
			}
		}
		if ok {
			then := e.in.then
			e.desk.Apply(step, false)
			if then != nil {
				then()
			}
		}
	}
	if e.after != nil {
		e.after(how)
	}
}

// FocusLost commits.
func (e *fieldEntry) FocusLost() {
	e.Entry.FocusLost()
	if e.about != nil {
		e.about("")
	}
	e.finish(fieldLeft)
}

// FocusGained selects the whole text, so that typing replaces it.
func (e *fieldEntry) FocusGained() {
	e.Entry.FocusGained()
	if e.about != nil {
		e.about(e.in.about)
	}
	e.TypedShortcut(&fyne.ShortcutSelectAll{})
}

// TypedKey takes Escape and the arrows, and leaves the rest to the entry.
func (e *fieldEntry) TypedKey(key *fyne.KeyEvent) {
	switch key.Name {
	case fyne.KeyEscape:
		e.finish(fieldCancelled)
	case fyne.KeyUp, fyne.KeyDown:
		switch {
		case e.steps && key.Name == fyne.KeyUp:
			e.finish(fieldUp)
		case e.steps:
			e.finish(fieldDown)
		case len(e.in.choices) > 0:
			e.drop()
		default:
			e.Entry.TypedKey(key)
		}
	default:
		e.Entry.TypedKey(key)
	}
}

// drop opens the list of what the catalogue has; what is chosen is entered.
func (e *fieldEntry) drop() {
	openFieldMenu(e, e.in.choices, e.in.text, func(choice string) {
		e.SetText(choice)
		e.finish(fieldEntered)
	})
}

// fieldDrop is the small arrow that opens an entry's list. Unlike a button it takes no focus from the entry.
type fieldDrop struct {
	widget.BaseWidget
	entry *fieldEntry
}

var (
	_ fyne.Tappable      = (*fieldDrop)(nil)
	_ desktop.Cursorable = (*fieldDrop)(nil)
)

func newFieldDrop(e *fieldEntry) *fieldDrop {
	d := &fieldDrop{entry: e}
	d.ExtendBaseWidget(d)
	return d
}

// Tapped opens the list.
func (d *fieldDrop) Tapped(*fyne.PointEvent) { d.entry.drop() }

// Cursor is the arrow: here nothing is typed.
func (d *fieldDrop) Cursor() desktop.Cursor { return desktop.PointerCursor }

// CreateRenderer draws the arrow.
func (d *fieldDrop) CreateRenderer() fyne.WidgetRenderer {
	return widget.NewSimpleRenderer(widget.NewIcon(theme.Icon(theme.IconNameArrowDropDown)))
}
