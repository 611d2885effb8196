package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// Widths of a field's label and of the narrowest field that has it at its side.
const (
	fieldLabelWidth = 108
	fieldSideBySide = 240
)

// field is an input with its label, and below it how the text is understood or what is wrong with it.
type field struct {
	widget.BaseWidget

	label   *prose
	entry   *fieldEntry
	frame   fyne.CanvasObject // the entry with less padding
	message *prose
	moved   func()       // the height may have changed
	about   func(string) // what the entry takes, while it has the focus
	width   float32
}

func newField(k *Desk, in *input, moved func()) *field {
	f := &field{label: newProse(k), message: newProse(k), entry: newFieldEntry(k, in), moved: moved}
	f.message.size = smallText(f.message)
	f.entry.say = f.say
	f.entry.about = func(text string) {
		if f.about != nil {
			f.about(text)
		}
	}
	f.frame = container.NewThemeOverride(f.entry, denseTheme{fieldPad})
	f.ExtendBaseWidget(f)
	f.show(in)
	return f
}

// smallText is the size of what accompanies: a little below the text's, never under 12 px.
func smallText(w fyne.Widget) func() float32 {
	return func() float32 { return max(12, theme.CurrentForWidget(w).Size(theme.SizeNameCaptionText)) }
}

// show puts an input into the field, for other parts or as it stands now.
func (f *field) show(in *input) {
	f.entry.show(in)
	label := in.label
	if in.unit != "" {
		label += ", " + in.unit
	}
	f.label.say(run{text: label, tone: quiet})
}

// say writes below the entry.
func (f *field) say(understood string, err error) {
	if understood == "" && err == nil && len(f.message.runs) == 0 {
		return
	}
	before := f.heightFor(f.width)
	switch {
	case err != nil:
		f.message.say(run{text: sentence(err), tone: alarm})
	case understood != "":
		f.message.say(run{text: understood, tone: quiet})
	default:
		f.message.say()
	}
	if f.heightFor(f.width) != before && f.moved != nil {
		f.moved()
	}
	f.Refresh()
}

func (f *field) columns(width float32) (label, entry float32) {
	if width < fieldSideBySide {
		return width, width
	}
	return fieldLabelWidth, width - fieldLabelWidth
}

// heightFor returns the height at a width.
func (f *field) heightFor(width float32) float32 {
	f.width = width
	label, entry := f.columns(width)
	h := max(f.label.heightFor(label), f.frame.MinSize().Height)
	if label == width {
		h = f.label.heightFor(label) + f.frame.MinSize().Height
	}
	if len(f.message.runs) > 0 {
		h += f.message.heightFor(entry) + proseLeading
	}
	return h
}

// MinSize is the height at the width laid out last.
func (f *field) MinSize() fyne.Size {
	f.ExtendBaseWidget(f)
	return fyne.NewSize(80, f.heightFor(max(f.width, 80)))
}

// CreateRenderer lays label, entry and message out.
func (f *field) CreateRenderer() fyne.WidgetRenderer {
	return widget.NewSimpleRenderer(&fyne.Container{Layout: fieldLayout{f}, Objects: []fyne.CanvasObject{f.label, f.frame, f.message}})
}

type fieldLayout struct{ f *field }

func (l fieldLayout) MinSize([]fyne.CanvasObject) fyne.Size { return l.f.MinSize() }

func (l fieldLayout) Layout(_ []fyne.CanvasObject, s fyne.Size) {
	f := l.f
	f.heightFor(s.Width)
	label, entry := f.columns(s.Width)
	tall := f.frame.MinSize().Height
	at := fyne.NewPos(s.Width-entry, 0)
	high := f.label.heightFor(label)
	if label == s.Width {
		at.Y = high
		f.label.Move(fyne.NewPos(0, 0))
	} else {
		f.label.Move(fyne.NewPos(0, max(0, (tall-high)/2)))
	}
	f.label.Resize(fyne.NewSize(label, high))
	f.frame.Move(at)
	f.frame.Resize(fyne.NewSize(entry, tall))
	f.message.Move(at.AddXY(0, tall+proseLeading/2))
	f.message.Resize(fyne.NewSize(entry, f.message.heightFor(entry)))
}
