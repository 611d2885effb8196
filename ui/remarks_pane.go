package ui

import (
	"fyne.io/fyne/v2"
)

const remarksTitle = "Remarks"

// showRemarks lists what is worth knowing about the answer.
func (a *asks) showRemarks() {
	if a.shown == paneAdvice {
		a.withdraw()
		a.w.view.SetGhost(nil)
	}
	a.showPane(paneRemarks)
	a.fillRemarks()
}

// fillRemarks writes the list anew: remarks with what can be done at once, then what is assumed or left out.
func (a *asks) fillRemarks() {
	k := a.w.desk
	a.rows = nil
	a.pane.waiting(false, nil)
	var objects []fyne.CanvasObject
	for _, r := range remarksOf(k) {
		objects = append(objects, a.remarkProse(r))
	}
	switch {
	case k.Solving() || k.Rating():
		objects = append(objects, a.note("The permitted currents are being worked out; more may follow."))
	case len(objects) == 0:
		objects = append(objects, a.note("There is nothing to remark."))
	}
	if r, fresh := k.Result(); r != nil && fresh && len(r.Notes) > 0 {
		objects = append(objects, newProse(k, run{text: "Assumed or left out", tone: strong}))
		for _, n := range r.Notes {
			objects = append(objects, a.note(fullStop(upperFirst(n))))
		}
	}
	at := a.pane.scroll.Offset
	a.pane.show(remarksTitle, nil, objects...)
	a.pane.scroll.ScrollToOffset(at)
}

// remarkProse is a remark with its words to tap.
func (a *asks) remarkProse(r remark) *prose {
	runs := []run{say(r.text)}
	if len(r.ids) > 0 {
		runs = append(runs, say("  "), run{text: "Select " + someIDs(r.ids, 3), tap: func() { a.w.desk.Select(r.ids...) }})
	}
	if r.label != "" {
		runs = append(runs, say("  "), run{text: r.label, tap: func() { a.remedy(r.remedy) }})
	}
	return newProse(a.w.desk, runs...)
}

func (a *asks) remedy(which string) {
	switch which {
	case remedySettle:
		a.w.settle()
	case remedyAdvice:
		a.showAdvice()
	case remedyRules:
		a.showRules()
	case remedyAround:
		a.w.showSurroundings()
	}
}
