package ui

import (
	"context"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/widget"

	"packrise/solver/section"
	"packrise/solver/study"
)

// askSheet is a dialog that asks one long question, shows how far it is, and then the answer with what can be done about it. Closing it ends the work.
type askSheet struct {
	a      *asks
	d      *dialog.CustomDialog
	body   *fyne.Container
	bar    *widget.ProgressBar
	before string // what is said meanwhile
	asked  *question
	work   func(ctx context.Context, s *study.Study, d *section.Document, o study.Options) (any, error)
	// answered returns what to show, and buttons beside Close.
	answered func(answer any) (text []string, buttons []fyne.CanvasObject)
}

// askIn opens the dialog and asks.
func (a *asks) askIn(title string, size fyne.Size, s *askSheet) {
	s.a, s.body, s.bar = a, container.NewStack(), widget.NewProgressBar()
	s.d = dialog.NewCustomWithoutButtons(title, s.body, a.w.win)
	s.ask()
	a.w.show(s.d, size)
	a.w.closing(s.d, func() { a.asker.withdraw(s.asked) })
}

func (s *askSheet) ask() {
	s.bar.SetValue(0)
	s.say([]string{s.before}, s.bar)
	s.d.SetButtons([]fyne.CanvasObject{widget.NewButton("Cancel", s.a.w.hide)})
	s.asked = s.a.asker.ask(question{
		work: s.work,
		told: forward(s.bar.SetValue),
		then: func(answer any, err error) {
			if err != nil {
				s.end([]string{askWords(err)}, nil)
				return
			}
			s.end(s.answered(answer))
		},
		drop: func() {
			again := widget.NewButton("Ask again", s.ask)
			s.end([]string{"The design has changed, or something else was asked meanwhile."}, []fyne.CanvasObject{again})
		},
	})
}

// end shows an answer.
func (s *askSheet) end(text []string, buttons []fyne.CanvasObject) {
	s.say(text, nil)
	s.d.SetButtons(append([]fyne.CanvasObject{widget.NewButton("Close", s.a.w.hide)}, buttons...))
}

func (s *askSheet) say(text []string, below fyne.CanvasObject) {
	box := container.NewVBox()
	for _, t := range text {
		box.Add(selectable(t, false))
	}
	if below != nil {
		box.Add(below)
	}
	s.body.Objects = []fyne.CanvasObject{container.NewVScroll(box)}
	s.body.Refresh()
}

// applyButton makes a design of an answer's the present one, as one step, unless the design has changed since.
func (a *asks) applyButton(label, step string, doc *section.Document) *widget.Button {
	rev := a.w.desk.Revision()
	b := widget.NewButton(label, func() {
		a.w.hide()
		if a.w.desk.Revision() == rev {
			a.w.desk.Apply(section.Edit{Name: step, Object: "asked", Do: func(*section.Document) *section.Document { return doc }}, false)
		}
	})
	b.Importance = widget.HighImportance
	return b
}
