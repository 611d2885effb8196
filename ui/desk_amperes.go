package ui

import (
	"fmt"
	"math"
	"strings"

	"packrise/solver/heat"
	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

// ratedAnswer is the sentence with its band, once the ratings have come so far that something can be relied on.
func (k *Desk) ratedAnswer() (answer string, state State, ok bool) {
	r := k.Ratings()
	if r == nil || r.Done < study.StageBands {
		return "", Unknown, false
	}
	answer, _ = r.Sentence()
	return answer, ratedStates[r.State], true
}

// ratedStates are the colours of the state words; what is undecided has none of its own.
var ratedStates = map[string]State{study.Within: Within, study.Close: Close, study.Over: Over}

// amperes is the line of permitted currents below the answer.
type amperes struct {
	text  string
	waits bool // the numbers are still to come
	wrong bool // nothing can be rated, and the text says why
}

// Amperes returns what may be carried, to rely on first, or why that is not known. It is empty where nothing was solved.
func (k *Desk) Amperes() (text string, known bool) {
	a := k.amperes()
	return a.text, a.text != "" && !a.waits && !a.wrong
}

func (k *Desk) amperes() amperes {
	r, fresh := k.Result()
	switch {
	case k.Failure() != nil, r == nil, !fresh && k.Stale():
		return amperes{}
	case k.rated.failure != nil:
		return amperes{text: "The permitted currents could not be worked out: " + k.rated.failure.Error() + ".", wrong: true}
	case len(k.rated.refusal) > 0:
		return amperes{text: "No permitted currents: " + strings.TrimSuffix(refusalWords(k.rated.refusal), ".") + ".", wrong: true}
	}
	if now := k.Ratings(); now != nil && now.Done >= study.StageBands {
		_, text := now.Sentence()
		return amperes{text: text}
	}
	switch {
	case k.trial != nil || k.Draft():
		return amperes{text: "What it may carry follows at the end of the drag.", waits: true}
	case k.rated.running || k.Solving():
		return amperes{text: "Working out what it may carry …", waits: true}
	}
	return amperes{}
}

// ratedByHand says what to do in the window about what stands against a rating; the problems say it for a file.
var ratedByHand = map[string]string{
	"unknown-current":   "enter them, 0 where idle, or what protects them",
	rating.RuleNoReason: "write the reason with each, or lower it",
}

// refusalWords joins what stands against a rating.
func refusalWords(all []section.Problem) string {
	first := all[0].What
	if do := orWord(ratedByHand[all[0].Rule], all[0].Do); do != "" {
		first += "; " + do
	}
	if n := len(all) - 1; n > 0 {
		first += fmt.Sprintf(" (and %d more)", n)
	}
	return first
}

// assumptions adds to what the answer assumes what only ratings depend on: what protects the loads, and another design margin.
func (k *Desk) assumptions(assumed string) string {
	d := k.Document()
	if n := unprotected(d); n > 0 {
		assumed += "; protection unknown for " + counted(n, "load")
	}
	if d.DesignMarginK.OK && d.DesignMarginK.V != study.DesignMarginK {
		assumed += "; design margin " + withUnit(written(d.DesignMarginK.V), "K")
		if why := d.Reason(section.ReasonMargin); why != "" {
			assumed += " (" + why + ")"
		}
	}
	return strings.TrimPrefix(assumed, "; ")
}

// unprotected counts the loads that carry something and whose device nobody has named.
func unprotected(d *section.Document) int {
	n := 0
	for i := range d.Loads {
		l := &d.Loads[i]
		if l.Protection.Kind == "" && !l.HeatWM.OK && !(l.CurrentA.OK && l.CurrentA.V == 0) {
			n++
		}
	}
	return n
}

// bandOf returns P5 and P95 of a part or layer, °C.
func bandOf(r *study.Ratings, id string) (low, high float64, ok bool) {
	if r == nil || r.Bands == nil || r.Base == nil || r.Base.Status != heat.Converged {
		return 0, 0, false
	}
	i := indexIn(r.Base, id)
	if i < 0 {
		return 0, 0, false
	}
	return r.Band(i)
}

// indexIn returns the place of a thing in a result: conductors, then others.
func indexIn(r *rating.Result, id string) int {
	for i := range r.Conductors {
		if r.Conductors[i].ID == id {
			return i
		}
	}
	for i := range r.Others {
		if r.Others[i].ID == id {
			return len(r.Conductors) + i
		}
	}
	return -1
}

// bandWords writes a band in whole degrees, outwards: "72–89".
func bandWords(low, high float64) string {
	up := "no bound"
	if !math.IsInf(high, 0) {
		up = quantity.Fixed(math.Ceil(high-1e-9), 0)
	}
	return quantity.Fixed(math.Floor(low+1e-9), 0) + "–" + up
}
