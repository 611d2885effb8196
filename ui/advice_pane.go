package ui

import (
	"context"
	"math"
	"slices"
	"strings"

	"fyne.io/fyne/v2"

	"packrise/solver/quantity"
	"packrise/solver/section"
	"packrise/solver/study"
)

const adviceTitle = "What to change first"

// showAdvice asks what to change first, or shows the answer that is there.
func (a *asks) showAdvice() {
	a.showPane(paneAdvice)
	switch {
	case a.advice != nil:
		a.fillAdvice()
	case len(a.w.desk.Document().Parts) == 0:
		a.pane.waiting(false, nil)
		a.pane.show(adviceTitle, nil, a.note("There is nothing in the section yet."))
	default:
		a.askAdvice()
	}
}

func (a *asks) askAdvice() {
	a.rows = nil
	a.pane.show(adviceTitle, nil, a.note("Every single change that might help is looked at, and the best are solved in full …"))
	a.asked = a.asker.ask(question{
		work: func(ctx context.Context, s *study.Study, d *section.Document, o study.Options) (any, error) {
			return s.Advise(ctx, d, nil, o)
		},
		told: forward(a.pane.bar.SetValue),
		then: func(answer any, err error) {
			a.pane.waiting(false, nil)
			if err != nil {
				a.pane.show(adviceTitle, a.askAdvice, a.note(askWords(err)))
				return
			}
			a.advice = answer.(*study.Advice)
			a.fillAdvice()
		},
		drop: func() {
			if a.shown == paneAdvice {
				a.adviceGone("It was stopped.")
			}
		},
	})
	a.pane.waiting(true, a.withdraw)
	a.side.Refresh()
}

// withdraw stops looking for what to change first.
func (a *asks) withdraw() { a.asker.withdraw(a.asked) }

// adviceGone says why there is no list any more.
func (a *asks) adviceGone(why string) {
	a.rows = nil
	a.pane.waiting(false, nil)
	a.pane.show(adviceTitle, a.askAdvice, a.note(why+" Ask again for what to change next."))
}

// note is a quiet sentence in the pane.
func (a *asks) note(text string) fyne.CanvasObject { return newProse(a.w.desk, faint(text)) }

// fillAdvice lists the changes.
func (a *asks) fillAdvice() {
	a.pane.waiting(false, nil)
	ad := a.advice
	a.gone = "The design has changed since."
	objects := []fyne.CanvasObject{a.note(ad.Now())}
	a.rows = nil
	for i := range ad.Changes {
		c := &ad.Changes[i]
		r := newAskRow(a.w.desk, c.Text, gainWords(c.GainK), costWords(c))
		at := i
		r.preview = func(on bool) { a.preview(c, on) }
		r.take = func() { a.apply(c) }
		r.step = func(by int) { a.focusRow(at + by) }
		a.rows = append(a.rows, r)
		objects = append(objects, r)
	}
	objects = append(objects, a.note(ad.Looked()))
	a.pane.show(adviceTitle, nil, objects...)
}

// focusRow puts the keyboard on a row and brings it into sight.
func (a *asks) focusRow(i int) {
	if i < 0 || i >= len(a.rows) {
		return
	}
	a.w.win.Canvas().Focus(a.rows[i])
	revealIn(a.pane.scroll, a.rows[i])
}

// preview shows what a change would do.
func (a *asks) preview(c *study.Change, on bool) {
	if !on || a.advice == nil || c.Result == nil {
		a.w.view.SetGhost(nil)
		return
	}
	a.w.view.SetGhost(ghostOf(a.w.desk.shownShapes(), c.Result.Shapes, touchedParts(a.w.desk.Document(), c.IDs)))
}

// apply makes the change, as one step.
func (a *asks) apply(c *study.Change) {
	if a.advice == nil {
		return
	}
	doc := c.Doc
	a.w.view.SetGhost(nil)
	a.gone = "Done: " + fullStop(stepName(c.Text)) + " Undo takes it back."
	a.w.desk.Apply(section.Edit{Name: stepName(c.Text), Object: "advice", Do: func(*section.Document) *section.Document { return doc }}, false)
}

// stepName is a sentence as it stands behind Undo.
func stepName(text string) string {
	if text == "" {
		return text
	}
	r := []rune(text)
	return strings.ToLower(string(r[:1])) + string(r[1:])
}

// touchedParts are the parts among ids and the conductors of the loads among them, by their parts of the top level.
func touchedParts(d *section.Document, ids []string) (parts []string) {
	add := func(id string) {
		for _, top := range topsOf([]string{id}) {
			if !slices.Contains(parts, top) {
				parts = append(parts, top)
			}
		}
	}
	for _, id := range ids {
		if l := section.LoadNamed(d, id); l != nil {
			for _, c := range l.Conductors {
				add(c)
			}
			continue
		}
		if section.Find(d, id) != nil {
			add(id)
		}
	}
	return parts
}

// gainWords are kelvins gained, rounded down.
func gainWords(k float64) string {
	switch {
	case math.IsInf(k, 1):
		return "settles"
	case k < 1:
		return "under " + withUnit("1", "K")
	}
	return "+" + withUnit(quantity.Fixed(quantity.RoundDown(k, 0), 0), "K")
}

// costWords say what governs after a change and what it takes.
func costWords(c *study.Change) string {
	words := []string{"then " + c.Governs + " governs: " + withUnit(degrees(c.TempC, section.Some(c.LimitC)), "°C") + ", limit " + degreesC(c.LimitC)}
	for _, v := range []struct {
		is, least float64
		decimals  int
		unit      string
	}{{c.CopperKgM, 0.0005, 3, noBreak + "kg/m copper"}, {c.OutsideMM, 0.05, 1, noBreak + "mm across"}, {100 * c.Fill, 0.05, 1, " points of fill"}} {
		if math.Abs(v.is) >= v.least {
			words = append(words, signedWords(v.is, v.decimals)+v.unit)
		}
	}
	return upperFirst(strings.Join(append(words, c.Worse...), " · "))
}

// signedWords writes a difference with its sign.
func signedWords(v float64, decimals int) string {
	s := quantity.Fixed(math.Abs(v), decimals)
	if v < 0 {
		return minusSign + s
	}
	return "+" + s
}
