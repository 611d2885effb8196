package ui

import (
	"math"
	"slices"
	"strings"

	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

// remark is something that a person should know about the answer, and what can be done about it at once.
type remark struct {
	text   string
	ids    []string // parts to select, nil for none
	label  string   // of a remedy, "" for none
	remedy string   // which: remedySettle …
}

// Remedies that a remark may offer.
const (
	remedySettle = "settle"
	remedyAdvice = "advice"
	remedyRules  = "rules"
	remedyAround = "surroundings"
)

// remarksOf lists what is worth knowing about the desk's answer, most serious first.
func remarksOf(k *Desk) (list []remark) {
	d := k.Document()
	for _, p := range k.Problems() {
		r := remark{text: upperFirst(p.Sentence()) + ".", ids: touchedParts(d, p.IDs)}
		switch {
		case p.Rule == "unplaced":
			r.label, r.remedy = "Settle", remedySettle
		case strings.Contains(p.Key, "ambient_c"):
			r.label, r.remedy = "Surroundings", remedyAround
		}
		list = append(list, r)
	}
	res, fresh := k.Result()
	if res == nil || !fresh {
		return list
	}
	list = append(list, resultRemarks(d, res)...)
	if r := k.Ratings(); r != nil {
		list = append(list, ratedRemarks(r)...)
	}
	if d.DesignMarginK.OK && d.DesignMarginK.V == 0 {
		list = append(list, remark{text: "The design margin is " + withUnit("0", "K") + ": " + orWord(d.Reason(section.ReasonMargin), "no reason is written") + "."})
	}
	return list
}

// resultRemarks are about the temperatures.
func resultRemarks(d *section.Document, r *rating.Result) (list []remark) {
	if n := len(r.Unassigned); n > 0 {
		text := counted(n, "conductor") + " of unknown current left out, so that everything reads too cool: " + someIDs(r.Unassigned, 6) + "."
		list = append(list, remark{text: text, ids: touchedParts(d, r.Unassigned)})
	}
	if g := r.Governing; g != nil && r.Over() {
		list = append(list, remark{text: g.Part + " is over its limit.", ids: touchedParts(d, []string{g.Part}), label: adviceTitle, remedy: remedyAdvice})
	}
	if g := r.Governing; g != nil && !g.Heats && !slices.Contains(r.Unassigned, g.Part) {
		text := g.Part + " governs and makes no heat of its own: what lies beside it decides how much may be carried."
		list = append(list, remark{text: text, ids: touchedParts(d, []string{g.Part})})
	}
	var open []string
	for i := range d.Loads {
		l := &d.Loads[i]
		if l.Protection.Kind == "" && !l.HeatWM.OK && !(l.CurrentA.OK && l.CurrentA.V == 0) {
			open = append(open, l.ID)
		}
	}
	if len(open) > 0 {
		text := "Protection is unknown for " + someIDs(open, 6) + ": permitted currents are not a device rating."
		list = append(list, remark{text: text, ids: touchedParts(d, open)})
	}
	var assumed []string
	for i := range r.Conductors {
		if c := &r.Conductors[i]; c.LimitAssumed {
			assumed = append(assumed, c.ID)
		}
	}
	if len(assumed) > 0 {
		text := "The limit of " + someIDs(assumed, 6) + " is assumed from the insulation: no wire type and no limit is given."
		list = append(list, remark{text: text, ids: touchedParts(d, assumed)})
	}
	return list
}

// ratedRemarks are about the permitted currents.
func ratedRemarks(r *study.Ratings) (list []remark) {
	if r.State == study.Close || r.State == study.Over && !r.Base.Over() {
		list = append(list, remark{text: "With its band, or in a load case, something reaches over its limit.", label: adviceTitle, remedy: remedyAdvice})
	}
	if r.Heater != "" && r.Base.Governing != nil {
		text := r.Heater + " heats and " + r.Base.Governing.Part + " suffers: " + withUnit(written(float64(r.HeaterShare)), "%") + " of its rise."
		list = append(list, remark{text: text, ids: touchedParts(r.Doc, []string{r.Heater})})
	}
	if r.Codes == nil {
		return list
	}
	list = append(list, differRemarks(r)...)
	for i := range r.Codes.Outcomes {
		o := &r.Codes.Outcomes[i]
		for _, m := range o.Remarks {
			if m.Kind == "step-ahead" && o.Applies {
				list = append(list, remark{text: m.Text, ids: touchedParts(r.Doc, m.IDs), label: "Show the rules", remedy: remedyRules})
			}
		}
	}
	for _, p := range r.Codes.Problems {
		list = append(list, remark{text: upperFirst(p.String()) + "."})
	}
	return append(list, checkRemarks(r)...)
}

// differRemarks name the conductors whose rule differs from the computed current by more than a fifth, in amperes, alike ones together.
func differRemarks(r *study.Ratings) (list []remark) {
	for k := range r.Codes.Outcomes {
		o := &r.Codes.Outcomes[k]
		var texts []string
		var ids [][]string
		for i := range r.Lowest {
			l := &r.Lowest[i]
			a, ok := l.Rules[o.Rule]
			if !ok || !(l.Computed > 0) || math.Abs(a/l.Computed-1) <= farOff {
				continue
			}
			t := study.Amps(a) + " by " + o.Title + " against " + study.Amps(l.Computed) + " computed, to rely on: more than 20 % apart."
			if n := slices.Index(texts, t); n >= 0 {
				ids[n] = append(ids[n], l.ID)
			} else {
				texts, ids = append(texts, t), append(ids, []string{l.ID})
			}
		}
		for n, t := range texts {
			list = append(list, remark{text: someIDs(ids[n], 6) + ": " + t, ids: touchedParts(r.Doc, ids[n]), label: "Show the rules", remedy: remedyRules})
		}
	}
	return list
}

// farOff is the share by which a rule may differ from the computed current before it is said.
const farOff = 0.2

// checkRemarks are the comparisons of loads, devices and permitted currents that fail, and the soft faults that nothing clears.
func checkRemarks(r *study.Ratings) (list []remark) {
	for _, p := range r.Protected {
		for _, c := range p.Checks {
			if c.Known && !c.Within && !c.NextSizeUp {
				list = append(list, remark{text: fullStop(c.Text), ids: touchedParts(r.Doc, []string{p.Load}), label: "Show the rules", remedy: remedyRules})
			}
		}
	}
	for i := range r.Faults {
		if f := &r.Faults[i]; f.Over() {
			list = append(list, remark{text: f.Sentence(), ids: touchedParts(r.Doc, []string{f.Load})})
		}
	}
	return list
}

func fullStop(s string) string {
	if s == "" || s[len(s)-1] == '.' {
		return s
	}
	return s + "."
}
