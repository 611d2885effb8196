package ui

import (
	"slices"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// Details tells about the selection, or the whole section, in sentences whose inputs edit in place, and below them in fields.
type Details struct {
	widget.BaseWidget

	desk   *Desk
	column *fyne.Container
	scroll *container.Scroll
	help   *prose // about the field that has the focus

	helpBack  *fill
	helpShown bool

	sentences []*prose
	rule      *fill
	more      *prose // folds the fields
	folded    bool
	fields    []*field
	known     map[string]*field // by key, to keep an entry while its part changes
	selection []string
	relaying  bool
	tall      fyne.Size // of all sentences and fields
}

// NewDetails shows the desk's selection.
func NewDetails(k *Desk) *Details {
	d := &Details{desk: k, known: map[string]*field{}}
	d.column = &fyne.Container{Layout: &fieldColumn{gap: 7, margin: detailsEdge}}
	d.scroll = container.NewVScroll(d.column)
	d.help = newProse(k)
	d.help.size = smallText(d.help)
	d.helpBack = newFill(ColorNameStrip)
	d.rule = newFill(theme.ColorNameSeparator)
	d.more = newProse(k)
	d.more.moved = d.relay
	d.ExtendBaseWidget(d)
	k.Listen(d.changed)
	d.rewrite(true)
	return d
}

func (d *Details) changed(c Changed) {
	moved := !slices.Equal(d.selection, d.desk.Selection())
	if c&(ChangedDocument|ChangedResult|ChangedRatings) == 0 && !moved {
		return // pointed at
	}
	d.rewrite(c&ChangedDocument != 0 || moved)
	if moved {
		d.scroll.ScrollToTop()
	}
}

// Fold hides or shows the fields below the sentences.
func (d *Details) Fold(folded bool) {
	d.folded = folded
	d.rewrite(true)
}

// EditCurrent puts the cursor into the current of the selection, where it has one.
func (d *Details) EditCurrent() bool { return d.edit("current") }

// FocusFirst puts the keyboard into what is most often entered: the current of conductors, else the first field.
func (d *Details) FocusFirst() {
	if d.EditCurrent() {
		return
	}
	if d.folded {
		d.Fold(false)
	}
	if c := fyne.CurrentApp().Driver().CanvasForObject(d); c != nil && len(d.fields) > 0 {
		c.Focus(d.fields[0].entry)
	}
}

// edit opens the first word of that input.
func (d *Details) edit(key string) bool {
	for _, p := range d.sentences {
		for i, r := range p.runs {
			if r.in != nil && r.in.key == key {
				p.edit(i)
				return true
			}
		}
	}
	return false
}

// rewrite writes the sentences anew and, where inputs may have changed, the fields.
func (d *Details) rewrite(inputs bool) {
	d.selection = slices.Clone(d.desk.Selection())
	paragraphs := tell(d.desk)
	for len(d.sentences) < len(paragraphs) {
		p := newProse(d.desk)
		p.moved, p.about = d.relay, d.about
		d.sentences = append(d.sentences, p)
	}
	d.relaying = true // one lay-out for all
	d.sentences = d.sentences[:len(paragraphs)]
	for i, p := range paragraphs {
		d.sentences[i].say(p...)
	}
	if inputs {
		d.refill()
	}
	d.relaying = false
	d.relay()
}

// refill puts the inputs of the selection into the fields.
func (d *Details) refill() {
	word := "Hide the fields"
	if d.folded {
		word = "Show the fields"
	}
	d.more.say(run{text: word, tap: func() { d.Fold(!d.folded) }})
	d.fields = d.fields[:0]
	if d.folded {
		return
	}
	ins := designInputs(d.desk)
	if len(d.selection) > 0 {
		ins = inputsOf(d.desk, d.selection)
	}
	for _, in := range ins {
		f := d.known[in.key]
		if f == nil {
			f = newField(d.desk, in, d.relay)
			f.about = func(text string) {
				d.about(text)
				if text != "" {
					d.reveal(f)
				}
			}
			d.known[in.key] = f
		}
		f.show(in)
		d.fields = append(d.fields, f)
	}
}

// reveal scrolls a field into sight, for the keyboard.
func (d *Details) reveal(f *field) {
	seen := d.scroll.Size().Height
	if d.helpShown {
		seen -= d.helpBack.Size().Height
	}
	reveal(d.scroll, f, seen)
}

// reveal scrolls a field into the part of a height that is in sight.
func reveal(scroll *container.Scroll, f *field, seen float32) {
	top, bottom, at := f.Position().Y, f.Position().Y+f.Size().Height, scroll.Offset
	switch {
	case top < at.Y:
		at.Y = max(0, top-proseLeading)
	case bottom > at.Y+seen:
		at.Y = bottom - seen + proseLeading
	}
	scroll.ScrollToOffset(at)
}

// about tells over the pane's lower edge what the entry with the focus takes, "" when none has it.
func (d *Details) about(text string) {
	d.help.say(run{text: text, tone: quiet})
	d.place()
}

// place lays the line of help over the lower edge, where nothing moves for it.
func (d *Details) place() {
	s := d.Size()
	high := d.help.heightFor(max(1, s.Width-2*detailsEdge)) + 2*proseLeading + 2
	d.helpShown = d.help.String() != "" && s.Height >= detailsHelpHeight
	if !d.helpShown {
		high = 0
	}
	setVisible(d.helpShown, d.help, d.helpBack)
	put(d.helpBack, 0, s.Height-high, s.Width, high)
	put(d.help, detailsEdge, s.Height-high+proseLeading+1, s.Width-2*detailsEdge, high)
}

// relay stacks sentences and fields for their heights as they are now.
func (d *Details) relay() {
	if d.relaying {
		return
	}
	objects := make([]fyne.CanvasObject, 0, len(d.sentences)+len(d.fields)+2)
	for _, p := range d.sentences {
		objects = append(objects, p)
	}
	objects = append(objects, d.rule, d.more)
	for _, f := range d.fields {
		objects = append(objects, f)
	}
	same := slices.Equal(objects, d.column.Objects)
	held := d.held(objects)
	was := float32(0)
	if held != nil {
		was = held.Position().Y
	}
	d.column.Objects = objects
	d.column.Layout.Layout(objects, fyne.NewSize(d.scroll.Size().Width, 0))
	if tall := d.column.MinSize(); !same || tall != d.tall {
		d.tall = tall
		d.scroll.Refresh()
	}
	if held != nil && held.Position().Y != was {
		d.scroll.ScrollToOffset(d.scroll.Offset.AddXY(0, held.Position().Y-was))
	}
}

// held is the sentence or field that the person is typing in: it stays where it is while sentences above it come and go.
func (d *Details) held(objects []fyne.CanvasObject) fyne.CanvasObject {
	c := fyne.CurrentApp().Driver().CanvasForObject(d)
	if c == nil || c.Focused() == nil {
		return nil
	}
	for _, o := range objects {
		switch o := o.(type) {
		case *prose:
			if o.entry != nil && c.Focused() == fyne.Focusable(o.entry) {
				return o
			}
		case *field:
			if c.Focused() == fyne.Focusable(o.entry) {
				return o
			}
		}
	}
	return nil
}

const (
	detailsEdge       = 14  // left and right of the text
	detailsHelpHeight = 220 // of the pane, from which on there is room for help
)

// MinSize is small: the pane scrolls.
func (d *Details) MinSize() fyne.Size {
	d.ExtendBaseWidget(d)
	return fyne.NewSize(200, 80)
}

// CreateRenderer lays out the scroll and the line of help over it.
func (d *Details) CreateRenderer() fyne.WidgetRenderer {
	objects := []fyne.CanvasObject{d.scroll, newFieldWheel(d.scroll), d.helpBack, d.help}
	return widget.NewSimpleRenderer(&fyne.Container{Layout: detailsLayout{d}, Objects: objects})
}

type detailsLayout struct{ d *Details }

func (l detailsLayout) MinSize([]fyne.CanvasObject) fyne.Size { return l.d.MinSize() }

func (l detailsLayout) Layout(objects []fyne.CanvasObject, s fyne.Size) {
	l.d.scroll.Resize(s)
	objects[1].Resize(s) // the wheel
	l.d.place()
	l.d.relay()
}
