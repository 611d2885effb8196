package ui

import (
	"errors"
	"slices"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

// showHolder edits what encloses the parts. Each entry is an undo step of its own and takes effect at once; the section behind the dialog follows.
func (w *Window) showHolder() {
	w.showInputs(upperFirst(holderWord(w.desk.Document().Holder.Kind)), func(k *Desk) []*input {
		return append([]*input{holderKindInput(k)}, slices.DeleteFunc(wholeInputs(k), func(in *input) bool {
			return slices.Contains([]string{"title", "ambient", "film"}, in.key)
		})...)
	})
}

// showInputs is a dialog of fields that follow the document.
func (w *Window) showInputs(title string, inputs func(*Desk) []*input) {
	s := &inputSheet{desk: w.desk, inputs: inputs, known: map[string]*field{}, help: newProse(w.desk)}
	s.column = &fyne.Container{Layout: &fieldColumn{gap: 8, margin: 8}}
	s.scroll = container.NewVScroll(s.column)
	s.help.size = smallText(s.help)
	s.follow()
	stop := w.desk.listenUntil(func(c Changed) {
		if c&ChangedDocument != 0 {
			s.follow()
		}
	})
	d := dialog.NewCustom(title, "Close", container.NewBorder(nil, container.New(helpLines{}, s.help), nil, nil, s.scroll), w.win)
	w.show(d, fyne.NewSize(460, 560))
	w.closing(d, stop)
}

// inputSheet is a column of fields, kept while their inputs stay.
type inputSheet struct {
	desk    *Desk
	inputs  func(*Desk) []*input
	known   map[string]*field
	column  *fyne.Container
	scroll  *container.Scroll
	help    *prose // what the entry with the focus takes
	focused *field // nil: none
}

// helpLines keeps room for what an entry takes, so that nothing moves when it is said.
type helpLines struct{}

// helpLeast is the height for that, of two lines at the width of the dialog.
const helpLeast = 48

// MinSize is the room that is kept.
func (helpLines) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(80, helpLeast) }

// Layout leaves a margin.
func (helpLines) Layout(o []fyne.CanvasObject, s fyne.Size) {
	put(o[0], 8, 6, s.Width-16, s.Height-6)
}

func (s *inputSheet) follow() {
	s.column.Objects = nil
	for _, in := range s.inputs(s.desk) {
		f := s.known[in.key]
		if f == nil {
			f = newField(s.desk, in, s.relay)
			f.about = func(text string) { s.about(f, text) }
			s.known[in.key] = f
		} else {
			f.show(in)
		}
		s.column.Objects = append(s.column.Objects, f)
	}
	s.relay()
}

// relay lays the fields out and keeps the one with the focus in sight, with what it says.
func (s *inputSheet) relay() {
	s.column.Refresh()
	s.scroll.Refresh()
	if s.focused != nil {
		reveal(s.scroll, s.focused, s.scroll.Size().Height)
	}
}

// about says what an entry takes, and brings it into sight for the keyboard; "" says that it has lost the focus.
func (s *inputSheet) about(f *field, text string) {
	s.help.say(run{text: text, tone: quiet})
	s.focused = nil
	if text != "" {
		s.focused = f
		s.relay()
	}
}

// choice is one of few words, with what it does.
type choice struct {
	kind, word string
}

// choiceInput is an input that takes one of few words.
func choiceInput(in input, now string, of []choice, do func(d *section.Document, kind string) *section.Document) *input {
	for _, c := range of {
		in.choices = append(in.choices, c.word)
		if c.kind == now {
			in.text = c.word
		}
	}
	if in.text == "" {
		in.text = now
	}
	made := wholeInput(in, func(string) (string, func(*section.Document), error) { return "", nil, nil })
	made.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		for _, c := range of {
			if squeezed(c.word) == squeezed(text) || c.kind == squeezed(text) {
				return "", func(d *section.Document) *section.Document { return do(d, c.kind) }, nil
			}
		}
		return "", nil, errors.New("choose one of " + strings.Join(in.choices, ", "))
	}
	return made
}

// holderKindInput is the kind of the holder.
func holderKindInput(k *Desk) *input {
	kinds := []choice{
		{section.Jacket, "jacket"},
		{section.Conduit, "conduit"},
		{section.Wireway, "wireway"},
		{section.OpenBundle, "bundle"},
		{section.Apart, "bodies apart"},
		{section.NoHolder, "bare part"},
	}
	if slices.Contains(wholeOnly, k.Document().Surroundings.Kind) {
		kinds = slices.DeleteFunc(kinds, func(c choice) bool { return c.kind == section.Apart })
	}
	in := input{key: "kind", label: "Kind", step: "kind of holder", about: "What is around the parts. Bodies apart: each group of parts that touch has an outside of its own."}
	return choiceInput(in, k.Document().Holder.Kind, kinds, func(d *section.Document, kind string) *section.Document {
		return withHolderKind(k.Catalog(), d, kind)
	})
}

// wholeOnly are surroundings of a section as a whole, which bodies apart can't have.
var wholeOnly = []string{section.FixedWall, section.Insulation}

// withHolderKind changes the kind of the holder and keeps what the new one can have; parts keep their place relative to the middle.
func withHolderKind(cat *catalog.Catalog, d *section.Document, kind string) *section.Document {
	was := spelledHolder(cat, d.Holder)
	now := section.Holder{Kind: kind, Fill: was.Fill, ClearanceMM: was.ClearanceMM, Layers: was.Layers, LengthM: was.LengthM, TouchLimitC: was.TouchLimitC}
	round := was.InsideMM.Or(min(was.WidthMM.Or(20), was.HeightMM.Or(20)))
	switch kind {
	case section.Jacket, section.Conduit:
		now.InsideMM = section.Some(round)
	case section.Wireway:
		now.WidthMM, now.HeightMM = section.Some(was.WidthMM.Or(round)), section.Some(was.HeightMM.Or(round))
		now.Sides = was.Sides
	case section.NoHolder:
		now.Layers, now.Fill, now.ClearanceMM = nil, "", section.Opt[float64]{}
	default:
		now.Layers, now.StringEmissivity = nil, was.StringEmissivity
	}
	return withMiddle(section.SetHolder(d, now), middleOf(cat, was), middleOf(cat, now))
}
