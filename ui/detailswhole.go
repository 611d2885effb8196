package ui

import (
	"math"
	"strings"

	"packrise/solver/heat"
	"packrise/solver/quantity"
	"packrise/solver/section"
)

// several tells of more than one part.
func (t *telling) several(ids []string) {
	kinds := map[string]string{section.Core: "conductor", section.Rod: "rod", section.Cable: "cable"}
	what := orWord(kinds[kindOf(t.doc, ids)], "part")
	t.add(run{text: counted(len(ids), what), tone: strong}, faint(" · "+someIDs(ids, 8)))
	if kindOf(t.doc, ids) == section.Core {
		t.carryTogether(ids)
	}
	t.runTogether(ids)
	for _, id := range ids {
		t.wrong(id)
	}
}

// carryTogether tells what several conductors carry and make.
func (t *telling) carryTogether(ids []string) {
	current := currentInput(t.k, ids)
	sentence := paragraph{say("Each carries "), word(current)}
	if current.mixed {
		sentence = paragraph{say("They carry "), run{text: "different currents", in: current}}
	} else if current.missing {
		sentence = paragraph{say("Their current is "), word(current)}
	}
	sum, known := 0.0, t.result != nil
	for _, id := range ids {
		if c := t.conductor(id); c == nil || !c.CurrentA.OK && c.HeatWM == 0 || math.IsNaN(c.HeatWM) {
			known = false
		} else {
			sum += c.HeatWM
		}
	}
	if known && sum > 0 {
		heat := say("; together they make " + withUnit(quantity.Significant(sum, 2), "W/m"))
		if t.aged {
			heat.tone = old
		}
		sentence = append(sentence, heat)
	}
	t.out = append(t.out, append(sentence, say(".")))
}

// runTogether tells the hottest and the closest of several parts.
func (t *telling) runTogether(ids []string) {
	hottest, closest, peak, least := "", "", math.Inf(-1), math.Inf(1)
	for _, id := range ids {
		row, ok := readingOf(t.result, id)
		if !ok || math.IsNaN(row.temp) || t.unknown(id) {
			continue
		}
		if row.temp > peak {
			hottest, peak = id, row.temp
		}
		if m := row.limit.V - row.temp; row.limit.OK && m < least {
			closest, least = id, m
		}
	}
	if hottest == "" {
		return
	}
	row, _ := readingOf(t.result, hottest)
	near, _ := readingOf(t.result, closest)
	sentence := []run{say("The hottest of them, " + hottest + ", runs at " + withUnit(degrees(peak, row.limit), "°C"))}
	switch {
	case closest == "":
		sentence = append(sentence, say("; none has a limit."))
	case near.temp > near.limit.V:
		sentence = append(sentence, run{text: "; " + closest + " is over its limit by " + withUnit(overWords(near.temp, near.limit.V), "K") + ".", tone: alarm})
	default:
		sentence = append(sentence, say("; the smallest margin is "+withUnit(marginWords(near.temp, near.limit.V), "K")+" ("+closest+")."))
	}
	t.fact(sentence...)
}

// whole tells of the section.
func (t *telling) whole() {
	in := designInputs(t.k)
	title := word(inputNamed(in, "title"))
	title.tone = strong
	t.add(title)
	t.contents(in)
	ambient := paragraph{say("Its surroundings are at "), word(inputNamed(in, "ambient"))}
	switch t.doc.Surroundings.Kind {
	case section.FixedFilm:
		ambient = append(ambient, say(" and take heat up by "), word(inputNamed(in, "film")))
	case section.FixedWall:
		ambient = paragraph{say("Its outer surface is held at "), word(inputNamed(in, "ambient"))}
	}
	t.out = append(t.out, append(ambient, say(".")))
	t.around(in)
	t.balance()
	t.rates(in)
	t.wrong("")
	if t.result == nil || len(t.result.Notes) == 0 {
		return
	}
	t.add(run{text: "Assumed or left out", tone: strong})
	for _, n := range t.result.Notes {
		t.fact(faint("– " + upperFirst(strings.TrimSuffix(n, ".")) + "."))
	}
}

// contents tells what the section holds.
func (t *telling) contents(in []*input) {
	cores, rods := 0, 0
	for _, p := range section.UnfoldAll(t.doc) {
		switch p.Part.Kind {
		case section.Core:
			cores++
		case section.Rod:
			rods++
		}
	}
	sentence := paragraph{say("It has " + counted(cores, "conductor"))}
	if rods > 0 {
		sentence = append(sentence, say(" and "+counted(rods, "rod")))
	}
	switch holder := inputNamed(in, "holder"); {
	case holder == nil:
	case t.doc.Holder.Stock != "":
		sentence = append(sentence, say(" in "), word(holder))
	default:
		sentence = append(sentence, say(" in a "+holderWord(t.doc.Holder.Kind)+" of "))
		if w := inputNamed(in, "width"); w != nil {
			sentence = append(sentence, word(w), say(" × "), word(inputNamed(in, "height")))
		} else {
			sentence = append(sentence, word(inputNamed(in, "inside")))
		}
		sentence = append(sentence, say(" inside"))
	}
	if fill := inputNamed(in, "fill"); fill != nil && t.doc.Holder.Kind != section.NoHolder {
		sentence = append(sentence, say(", with "), word(fill), say(" between the parts"))
	}
	t.out = append(t.out, append(sentence, say(".")))
}

// balance tells where the heat goes.
func (t *telling) balance() {
	r := t.result
	if r == nil {
		return
	}
	if r.Status == heat.ThermalRunaway {
		answer, _ := r.Sentence()
		t.fact(run{text: answer, tone: alarm})
		return
	}
	if math.IsNaN(r.Generated) || math.IsNaN(r.SurfaceC) {
		return
	}
	t.fact(say("It makes " + withUnit(quantity.Significant(r.Generated, 3), "W/m") + " and gives off " + withUnit(quantity.Significant(r.Released+r.Absorbed, 3), "W/m") +
		"; the outside is at " + withUnit(degrees(r.SurfaceC, section.Opt[float64]{}), "°C") + "."))
	if len(r.Unassigned) > 0 {
		t.add(run{text: "Unknown currents are left out of it: ", tone: strong}, say(someIDs(r.Unassigned, 8)+"."))
	}
}
