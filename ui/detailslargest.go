package ui

import "packrise/solver/study"

// largest tells how the loads would carry most together, and what then stands at its limit.
func (t *telling) largest() {
	r := t.ratings
	if r == nil || r.Largest == nil {
		return
	}
	rely := &r.Largest.Rely
	switch {
	case rely.Hopeless || rely.Unbounded:
		t.rated(say(rely.Sentence()))
		return
	case len(rely.Loads) == 0:
		return
	}
	var each []string
	for _, l := range rely.Loads {
		each = append(each, l.ID+" "+study.Amps(l.A))
	}
	t.rated(say("The loads together could carry most with " + someIDs(each, 8) + ": " + study.Amps(rely.Sum) + " in all, to rely on" + atLimits(rely.Governs) + "."))
	if n := &r.Largest.Nominal; len(n.Loads) > 0 && !n.Hopeless && !n.Unbounded {
		t.rated(faint("Nominal, " + study.Amps(n.Sum) + " in all."))
	}
}

// atLimits says what holds a sum, "" for nothing.
func atLimits(ids []string) string {
	switch len(ids) {
	case 0:
		return ""
	case 1:
		return "; then " + ids[0] + " stands at its limit, its band and the margin counted"
	}
	return "; then " + someIDs(ids, 8) + " stand at their limits, their bands and the margin counted"
}
