package ui

import (
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/widget"

	"packrise/solver/rating"
	"packrise/solver/study"
)

// rulesSheet is the dialog of what the rules say, in step with the desk.
type rulesSheet struct {
	a      *asks
	box    *fyne.Container
	blocks []ruleBlock
	codes  *study.Codes // without ratings, which the design may refuse
	rev    uint64       // that codes belong to
	asked  uint64
}

// showRules shows what code tables, terminals and devices say, with the arithmetic.
func (a *asks) showRules() {
	s := &rulesSheet{a: a, box: container.NewVBox()}
	s.follow()
	stop := a.w.desk.listenUntil(func(c Changed) {
		if c&(ChangedDocument|ChangedRatings) != 0 {
			s.follow()
		}
	})
	d := dialog.NewCustomWithoutButtons("What the rules say", container.NewVScroll(s.box), a.w.win)
	d.SetButtons([]fyne.CanvasObject{
		widget.NewButton("Copy as text", func() { a.w.app.Clipboard().SetContent(ruleText(s.blocks) + "\n" + rating.Caution + "\n") }),
		widget.NewButton("Close", a.w.hide),
	})
	a.w.show(d, fyne.NewSize(900, 640))
	a.w.closing(d, stop)
}

// follow writes the sheet from the ratings, or, where there are none, from the tables alone.
func (s *rulesSheet) follow() {
	k := s.a.w.desk
	switch r := k.Ratings(); {
	case r != nil && r.Codes != nil:
		s.fill(ruleBlocks(r.Codes, r))
	case s.codes != nil && s.rev == k.Revision():
		s.fill(ruleBlocks(s.codes, nil))
	default:
		if s.asked != k.Revision() {
			s.asked = k.Revision()
			s.ask()
		}
	}
}

// ask has the tables read beside the window.
func (s *rulesSheet) ask() {
	if len(s.blocks) == 0 {
		s.fill([]ruleBlock{{"Being looked up", []string{"…"}}})
	}
	k := s.a.w.desk
	d, rev, dir := k.Document(), k.Revision(), k.folder()
	s.a.w.beside(func() func() {
		c := study.New(k.cat).Codes(d, dir)
		return func() {
			if k.Revision() == rev {
				s.codes, s.rev = c, rev
				s.follow()
			}
		}
	})
}

// fill shows the blocks as text that can be selected.
func (s *rulesSheet) fill(blocks []ruleBlock) {
	s.blocks = blocks
	s.box.Objects = nil
	for _, b := range blocks {
		s.box.Add(selectable(b.title, true))
		s.box.Add(selectable(strings.Join(b.lines, "\n"), false))
	}
	s.box.Refresh()
}

// selectable is text that wraps and can be selected and copied.
func selectable(text string, bold bool) *widget.Label {
	l := widget.NewLabelWithStyle(text, fyne.TextAlignLeading, fyne.TextStyle{Bold: bold})
	l.Wrapping, l.Selectable = fyne.TextWrapWord, true
	return l
}
