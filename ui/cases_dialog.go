package ui

import (
	"math"
	"slices"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/widget"

	"packrise/solver/section"
	"packrise/solver/study"
)

// casesSheet is the dialog of load cases: one is edited at the left, what all of them come to stands at the right.
type casesSheet struct {
	w      *Window
	chosen string // id of the case that is edited; "" none
	pick   *widget.Select
	remove *widget.Button
	sheet  *inputSheet
	found  *findings
}

// showCases edits the load cases. Each entry is an undo step of its own.
func (a *asks) showCases() {
	s := &casesSheet{w: a.w, found: newFindings()}
	k := a.w.desk
	sheet, fields := newInputSheet(k, func(k *Desk) []*input {
		return caseInputs(k, s.chosen, func(to string) {
			s.chosen = to
			s.follow()
		})
	})
	s.sheet = sheet
	s.pick = widget.NewSelect(nil, func(id string) {
		if id != s.chosen {
			s.chosen = id
			s.follow()
		}
	})
	s.pick.PlaceHolder = "no case yet"
	s.remove = widget.NewButton("Remove", s.removeChosen)
	if c := k.Document().Cases; len(c) > 0 {
		s.chosen = c[0].ID
	}
	s.follow()
	stop := k.listenUntil(func(c Changed) {
		if c&(ChangedDocument|ChangedRatings|ChangedResult) != 0 {
			s.follow()
		}
	})
	top := container.NewBorder(nil, nil, nil, container.NewHBox(widget.NewButton("Add", s.add), s.remove), s.pick)
	d := dialog.NewCustom("Load cases", "Close", twoSides(container.NewBorder(top, nil, nil, nil, fields), s.found.scroll), a.w.win)
	a.w.show(d, fyne.NewSize(940, 600))
	a.w.closing(d, stop)
}

func (s *casesSheet) add() {
	d := s.w.desk.Document()
	id := section.FreshCaseID(d)
	s.chosen = id
	s.w.desk.Apply(section.Edit{Name: "add case " + id, Object: id, Do: func(d *section.Document) *section.Document {
		return section.SetCase(d, section.Case{ID: id})
	}}, false)
	s.follow()
}

func (s *casesSheet) removeChosen() {
	id := s.chosen
	s.w.desk.Apply(section.Edit{Name: "remove case " + id, Object: id, Do: func(d *section.Document) *section.Document {
		return section.RemoveCase(d, id)
	}}, false)
	s.follow()
}

// follow brings the dialog up to the desk.
func (s *casesSheet) follow() {
	d := s.w.desk.Document()
	var ids []string
	for i := range d.Cases {
		ids = append(ids, d.Cases[i].ID)
	}
	if !slices.Contains(ids, s.chosen) {
		if s.chosen = ""; len(ids) > 0 {
			s.chosen = ids[0]
		}
	}
	if !slices.Equal(s.pick.Options, ids) {
		s.pick.SetOptions(ids)
	}
	if s.pick.Selected != s.chosen {
		if s.chosen == "" {
			s.pick.ClearSelected()
		} else {
			s.pick.SetSelected(s.chosen)
		}
	}
	enable(s.remove, s.chosen != "")
	s.sheet.follow()
	s.found.say(caseFindings(s.w.desk))
}

// caseFindings say what the cases come to.
func caseFindings(k *Desk) []ruleBlock {
	d := k.Document()
	if len(d.Cases) == 0 {
		return []ruleBlock{{"", []string{"A case is one way in which the loads run together: other currents, some of them off, any so many of them, another ambient. What it does not name runs as the design says. With cases every permitted current holds whichever of them runs."}}}
	}
	r := k.Ratings()
	switch {
	case r != nil && r.Cases != nil:
		return caseBlocks(r)
	case len(k.RatingRefusal()) > 0:
		return []ruleBlock{{"Not solved", []string{fullStop(upperFirst(refusalWords(k.RatingRefusal())))}}}
	case k.RatingFailure() != nil:
		return []ruleBlock{{"Not solved", []string{sentence(k.RatingFailure())}}}
	case k.Rating() || k.Solving():
		return []ruleBlock{{"", []string{"The cases are being solved …"}}}
	}
	return []ruleBlock{{"", []string{"The section can't be solved as it is."}}}
}

// caseBlocks are a sentence for each case and the worst one for each thing, alike ones together.
func caseBlocks(r *study.Ratings) []ruleBlock {
	c := r.Cases
	each := ruleBlock{title: "What each case comes to"}
	for i := range c.List {
		a := &c.List[i]
		each.add(upperFirst(a.State) + ". " + a.Sentence())
	}
	worst := ruleBlock{title: "The worst case of each part"}
	var g grouped
	for i := range c.Worst {
		w := &c.Worst[i]
		name := "the loads as written"
		if w.Case != "" {
			name = "case " + w.Case
		}
		if len(w.Off) > 0 {
			name += " with " + someIDs(w.Off, 6) + " off"
		}
		t := "no steady temperature"
		if math.IsInf(w.TempC, -1) || math.IsNaN(w.TempC) {
			continue
		} else if !math.IsInf(w.TempC, 1) {
			q, _ := readingOf(r.Base, w.ID)
			t = withUnit(degrees(w.TempC, q.limit), "°C")
		}
		g.add(w.ID+" ("+t+")", name)
	}
	for n, w := range g.words {
		worst.add(upperFirst(w) + ": " + allIDs(g.ids[n]) + ".")
	}
	return []ruleBlock{each, worst}
}
