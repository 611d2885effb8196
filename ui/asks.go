package ui

import (
	"fyne.io/fyne/v2"

	"packrise/solver/study"
)

// asks is what the menu Ask leads to: the questions that are put to the open design, and where their answers stand.
type asks struct {
	w        *Window
	asker    *asker
	side     *side
	pane     *askPane
	shown    askShown
	advice   *study.Advice // nil: not known for the document as it is
	rows     []*askRow
	asked    *question   // for the list of what to change first
	gone     string      // what is said when the design changes under the list
	matching *matchSheet // the dialog of a measurement that was opened last
}

// askShown is what the pane at the side shows.
type askShown int

const (
	paneNothing askShown = iota
	paneAdvice
	paneRemarks
)

func newAsks(w *Window, d *Details) *asks {
	a := &asks{w: w, asker: newAsker(w.desk)}
	a.pane = newAskPane(w.desk, a.hidePane)
	a.pane.waiting(false, nil)
	a.side = newSide(d, a.pane)
	w.desk.Listen(a.changed)
	return a
}

// menu is the menu of questions.
func (a *asks) menu() *fyne.Menu {
	return fyne.NewMenu("Ask",
		item("What to change first", ctrl(fyne.Key1), a.showAdvice),
		item("Remarks", ctrl(fyne.Key2), a.showRemarks),
		item("What the rules say …", ctrl(fyne.Key3), a.showRules),
		item("Load cases …", ctrl(fyne.Key4), a.showCases),
		fyne.NewMenuItemSeparator(),
		item("Best seating …", ctrl(fyne.Key5), a.showSeating),
		item("How many more fit …", ctrl(fyne.Key6), a.showFit),
		item("Match a measurement …", ctrl(fyne.Key7), a.showMatch),
	)
}

// changed keeps what is shown in step with the desk.
func (a *asks) changed(c Changed) {
	if c&ChangedDocument != 0 {
		a.w.view.SetGhost(nil)
		if a.advice != nil {
			a.advice = nil
			if a.shown == paneAdvice {
				a.adviceGone(a.gone)
			}
		}
	}
	if a.shown == paneRemarks && c&(ChangedDocument|ChangedResult|ChangedRatings) != 0 {
		a.fillRemarks()
	}
}

// showPane opens the side, the details too where they were folded away.
func (a *asks) showPane(what askShown) {
	a.shown = what
	a.pane.Show()
	show := true
	a.w.frame.detailsShown = &show
	a.w.relayout()
	a.side.Refresh()
}

// hidePane puts the pane away and ends what runs for it.
func (a *asks) hidePane() {
	a.withdraw()
	a.shown, a.rows = paneNothing, nil
	a.w.view.SetGhost(nil)
	a.pane.Hide()
	a.side.Refresh()
}

// close ends what runs.
func (a *asks) close() { a.asker.close() }

// forward makes a progress that never steps back out of one that may start again.
func forward(show func(share float64)) func(done, of int) {
	most := 0.0
	return func(done, of int) {
		if of > 0 {
			most = max(most, float64(done)/float64(of))
			show(most)
		}
	}
}
