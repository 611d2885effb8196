package ui

import (
	"fmt"
	"math"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// rod tells of a filler, hose or strength member.
func (t *telling) rod(id string, p section.Part, in []*input) {
	what := " · rod ⌀" + noBreak
	if p.BoreMM.OK {
		what = " · hose ⌀" + noBreak
	}
	title := paragraph{{text: id, tone: strong}, faint(what), word(inputNamed(in, "diameter"))}
	if p.BoreMM.OK {
		title = append(title, faint(", bore "), word(inputNamed(in, "bore")))
	}
	t.out = append(t.out, append(title, faint(" · "), word(inputNamed(in, "rodmaterial"))))
	t.runs(id, inputNamed(in, "limit"))
	if t.result == nil {
		return
	}
	for _, o := range t.result.Others {
		if o.ID == id && o.AbsorbedWM.OK {
			t.fact(say("Its bore takes up " + withUnit(quantity.Significant(o.AbsorbedWM.V, 2), "W/m") + "."))
		}
	}
}

// cable tells of a nested cable.
func (t *telling) cable(id string, p section.Part) {
	t.out = append(t.out, append(paragraph{{text: id, tone: strong}, faint(" · cable " + p.Build)}, t.over(id)...))
	n, heat, known := 0, 0.0, t.result != nil
	hottest := ""
	peak := math.Inf(-1)
	for _, q := range section.Unfold(t.doc) {
		if !strings.HasPrefix(q.ID, id+"/") {
			continue
		}
		n++
		if c := t.conductor(q.ID); c == nil || math.IsNaN(c.TempC) {
			known = false
		} else if heat += c.HeatWM; c.TempC > peak {
			peak, hottest = c.TempC, q.ID
		}
	}
	t.add(say("It holds " + counted(n, "conductor") + "."))
	if known && hottest != "" {
		t.fact(say(fmt.Sprintf("Together they make %s; the hottest, %s, runs at %s.", withUnit(quantity.Significant(heat, 2), "W/m"), hottest,
			withUnit(degrees(peak, section.Opt[float64]{}), "°C"))))
	}
	t.runs(id+"/"+section.Jacket, nil)
}
