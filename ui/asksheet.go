package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/theme"
)

// newInputSheet is a column of fields for a dialog, with room for a line of help below.
func newInputSheet(k *Desk, inputs func(*Desk) []*input) (s *inputSheet, body fyne.CanvasObject) {
	s = &inputSheet{desk: k, inputs: inputs, known: map[string]*field{}, help: newProse(k)}
	s.column = &fyne.Container{Layout: &fieldColumn{gap: 8, margin: 8}}
	s.scroll = container.NewVScroll(s.column)
	s.help.size = smallText(s.help)
	return s, container.NewBorder(nil, container.New(helpLines{}, s.help), nil, nil, s.scroll)
}

// findings is text beside the fields of a dialog, a paragraph each, that can be selected.
type findings struct {
	box    *fyne.Container
	scroll *container.Scroll
}

func newFindings() *findings {
	f := &findings{box: container.NewVBox()}
	f.scroll = container.NewVScroll(f.box)
	return f
}

// say replaces the text; objects stand below it.
func (f *findings) say(paragraphs []ruleBlock, below ...fyne.CanvasObject) {
	f.box.Objects = nil
	for _, b := range paragraphs {
		if b.title != "" {
			f.box.Add(selectable(b.title, true))
		}
		for _, l := range b.lines {
			f.box.Add(selectable(l, false))
		}
	}
	for _, o := range below {
		f.box.Add(o)
	}
	f.box.Refresh()
	f.scroll.Refresh()
}

// twoSides lays out fields at the left and findings at the right of a dialog, with a line between them.
func twoSides(left, right fyne.CanvasObject) fyne.CanvasObject {
	return &fyne.Container{Layout: twoSidesLayout{}, Objects: []fyne.CanvasObject{left, newFill(theme.ColorNameSeparator), right}}
}

type twoSidesLayout struct{}

// twoSidesGap is the room on each side of the line.
const twoSidesGap = 8

// MinSize is small: both sides scroll.
func (twoSidesLayout) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(320, 160) }

// Layout gives the left a little less.
func (twoSidesLayout) Layout(o []fyne.CanvasObject, s fyne.Size) {
	x := 0.46 * s.Width
	put(o[0], 0, 0, x-twoSidesGap, s.Height)
	put(o[1], x, 0, 1, s.Height)
	put(o[2], x+twoSidesGap, 0, s.Width-x-twoSidesGap, s.Height)
}
