package rules

import (
	"fmt"
	"slices"
)

// circuitsOf returns how many circuits a load is, by its system and the number of its conductors here, and how many of a circuit's conductors are loaded
// (2 or 3).
func (r Run) circuitsOf(l Load) (circuits, loaded int, why string) {
	lines, neutrals := r.lines(l.ID), 0
	for _, c := range r.Conductors {
		if c.Role == Neutral && slices.ContainsFunc(r.loadsOfNeutral(c), func(o Load) bool { return o.ID == l.ID }) {
			neutrals++
		}
	}
	n := lines + neutrals
	switch {
	case n == 0:
		return 0, 3, ""
	case l.System == ThreePhase:
		return up(lines, 3), 3, "circuit " + l.ID
	case l.System != "":
		return max(1, up(n, 2)), 2, "circuit " + l.ID
	case n == 2:
		return 1, 2, "circuit " + l.ID
	case n <= 4 && lines <= 3:
		return 1, 3, "circuit " + l.ID
	}
	return up(n, 2), 3, fmt.Sprintf("circuit %s, %d conductors of a system that is not stated", l.ID, n)
}

func up(n, by int) int { return max(1, (n+by-1)/by) }

// countCircuits counts loads; conductors without one count in threes as further circuits, those of one cable as one.
func countCircuits(r Run) (Count, []string) {
	weights := map[string]int{}
	why := map[string]string{}
	total := 0
	for _, l := range r.Loads {
		if r.onlySignals(l.ID) {
			continue
		}
		weights[l.ID], _, why[l.ID] = r.circuitsOf(l)
		total += weights[l.ID]
	}
	on, tangled := energised(r.Loads, r.AtMost, func(id string) int { return weights[id] })
	out := Count{Of: "circuits", Total: total}
	for id, running := range on {
		if running {
			out.N += weights[id]
		}
	}
	loose := 0
	var cables []string
	for _, c := range r.Conductors {
		item, spare := r.inCircuit(c, on, why)
		out.Items = append(out.Items, item)
		switch {
		case spare && c.Cable == "":
			loose++
		case spare && !slices.Contains(cables, c.Cable):
			cables = append(cables, c.Cable)
		}
	}
	spare := (loose+2)/3 + r.spareCables(cables)
	out.N += spare
	out.Total += spare
	out.Text = numbered(out.N, "circuit")
	return out, tangled
}

// inCircuit tells whether a conductor counts, given what runs and the reasons of the loads; spare is one that forms a circuit with others.
func (r Run) inCircuit(c Conductor, on map[string]bool, why map[string]string) (item Counted, spare bool) {
	loads := r.circuitsAt(c)
	switch {
	case c.Role == Earth:
		return Counted{c.ID, false, "earth"}, false
	case c.Role == Signal:
		return Counted{c.ID, false, "signal, which carries no current that warms"}, false
	case len(loads) == 0:
		return Counted{c.ID, true, "spare, which counts with others as a circuit"}, true
	case slices.ContainsFunc(loads, func(id string) bool { return on[id] }):
		return Counted{c.ID, true, why[loads[0]]}, false
	}
	return Counted{c.ID, false, why[loads[0]] + ", which can't run together with others that count"}, false
}

// circuitsAt are the loads of a conductor; a spare has none, whatever it stands in.
func (r Run) circuitsAt(c Conductor) (ids []string) {
	switch {
	case c.Role == Spare:
		return nil
	case c.Role == Neutral:
		for _, l := range r.loadsOfNeutral(c) {
			ids = append(ids, l.ID)
		}
		return ids
	}
	if l, ok := r.load(c.Load); ok {
		return []string{l.ID}
	}
	return nil
}

// spareCables counts cables with spare cores that hold no circuit of a load, since in others the spare is part of a counted cable.
func (r Run) spareCables(cables []string) (n int) {
	for _, id := range cables {
		if !slices.ContainsFunc(r.Conductors, func(c Conductor) bool { return c.Cable == id && len(r.circuitsAt(c)) > 0 && c.Role != Earth }) {
			n++
		}
	}
	return n
}

func (r Run) onlySignals(load string) bool {
	return !slices.ContainsFunc(r.Conductors, func(c Conductor) bool {
		return c.Load == load && c.Role != Signal && c.Role != Earth && c.Role != Spare
	})
}
