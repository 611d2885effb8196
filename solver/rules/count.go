package rules

import (
	"fmt"
	"slices"
)

// What rules count.
const (
	ofConductors = "conductors" // current-carrying conductors
	ofCircuits   = "circuits"
	ofCores      = "cores" // loaded cores, cable by cable
	ofWires      = "wires"
)

var countNoun = map[string]string{ofConductors: "current-carrying conductor", ofCircuits: "circuit", ofCores: "loaded core", ofWires: "wire"}

// numbered is "1 circuit" or "6 circuits".
func numbered(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return fmt.Sprintf("%d %ss", n, noun)
}

// verdict is whether a conductor could count, and for which loads; without loads it counts whatever runs.
type verdict struct {
	counts bool
	loads  []string
	why    string
}

// counts counts a run by the rule, for each cable by itself where the rule does so. It reads no current.
func (u rule) counts(r Run) (out []Count, tangled []string) {
	if u.counting.of == ofCircuits {
		c, tangled := countCircuits(r)
		return []Count{c}, tangled
	}
	for _, group := range u.groups(r) {
		c, t := u.countGroup(r, group)
		out, tangled = append(out, c), append(tangled, t...)
	}
	return out, tangled
}

// groups lists what is counted by itself: "" is the whole run, else a cable's id.
func (u rule) groups(r Run) []string {
	if u.counting.of != ofCores || r.Holder.Kind == Jacket {
		return []string{""}
	}
	var out []string
	for _, c := range r.Conductors {
		if !slices.Contains(out, c.Cable) {
			out = append(out, c.Cable)
		}
	}
	return out
}

func (u rule) countGroup(r Run, group string) (Count, []string) {
	whole := u.counting.of != ofCores || r.Holder.Kind == Jacket
	verdicts := map[string]verdict{}
	weights := map[string]int{}
	for _, c := range r.Conductors {
		if !whole && c.Cable != group {
			continue
		}
		v := u.verdict(r, c)
		verdicts[c.ID] = v
		if v.counts && len(v.loads) > 0 {
			weights[v.loads[0]]++
		}
	}
	on, tangled := energised(r.Loads, r.AtMost, func(id string) int { return weights[id] })
	out := Count{Group: group, Of: countNoun[u.counting.of] + "s"}
	for _, c := range r.Conductors {
		v, here := verdicts[c.ID]
		if !here {
			continue
		}
		if v.counts {
			out.Total++
			if idle := len(v.loads) > 0 && !slices.ContainsFunc(v.loads, func(id string) bool { return on[id] }); idle && u.counting.of != ofWires {
				v.counts, v.why = false, v.why+", which can't run together with others that count"
			}
		}
		if v.counts {
			out.N++
		}
		out.Items = append(out.Items, Counted{c.ID, v.counts, v.why})
	}
	out.Text = numbered(out.N, countNoun[u.counting.of])
	return out, tangled
}

// verdict tells whether a conductor counts by its role and circuit.
func (u rule) verdict(r Run, c Conductor) verdict {
	switch {
	case c.Role == Earth:
		return verdict{false, nil, "earth"}
	case u.counting.of == ofWires:
		return verdict{true, nil, wireWord(c)}
	case c.Role == Signal:
		return verdict{false, nil, "signal, which carries no current that warms"}
	case c.Role == Control && u.counting.controlFree != "":
		return verdict{false, nil, "control wire of starting duty (" + u.counting.controlFree + ")"}
	case c.Role == Neutral:
		return u.neutral(r, c)
	case c.Role == Spare:
		return verdict{true, nil, "spare, which counts as if it were loaded"}
	case !r.knows(c.Load):
		return verdict{true, nil, "in no load, which counts as a spare"}
	case c.Role == Control:
		return verdict{true, []string{c.Load}, "control wire of " + c.Load}
	}
	return verdict{true, []string{c.Load}, "line of " + c.Load}
}

func wireWord(c Conductor) string {
	if c.Role == Spare || c.Load == "" {
		return "wire without a load, which counts too"
	}
	return "wire of " + c.Load
}

// neutral follows NEC 310.15(E), and for loaded cores the same reasoning: it does not count while it carries only what the lines of one circuit leave.
func (u rule) neutral(r Run, c Conductor) verdict {
	clause := func(n int) string {
		if u.counting.neutrals == "" {
			return ""
		}
		return fmt.Sprintf(" (%s(%d))", u.counting.neutrals, n)
	}
	loads := r.loadsOfNeutral(c)
	switch len(loads) {
	case 0:
		return verdict{true, nil, "neutral whose circuit is not stated, which counts"}
	case 1:
	default:
		var ids []string
		for _, l := range loads {
			ids = append(ids, l.ID)
		}
		return verdict{true, ids, "neutral shared by " + andList(ids) + ", which counts"}
	}
	l := loads[0]
	lines := r.lines(l.ID)
	switch id := []string{l.ID}; {
	case lines <= 1:
		return verdict{true, id, "neutral of " + l.ID + ", which carries its whole current"}
	case l.Nonlinear:
		return verdict{true, id, "neutral of " + l.ID + ", a nonlinear load" + clause(3)}
	case l.System == "":
		return verdict{true, id, "neutral of " + l.ID + ", whose system is not stated, which counts"}
	case l.System == ThreePhase && lines == 2:
		return verdict{true, id, "neutral of " + l.ID + ", two phases of three" + clause(2)}
	}
	return verdict{false, nil, "neutral of " + l.ID + ", which carries only the unbalanced current" + clause(1)}
}

// loadsOfNeutral are the loads that name the conductor as their neutral, else the load that it stands in.
func (r Run) loadsOfNeutral(c Conductor) (out []Load) {
	for _, l := range r.Loads {
		if l.Neutral == c.ID {
			out = append(out, l)
		}
	}
	if len(out) == 0 {
		if l, ok := r.load(c.Load); ok {
			out = append(out, l)
		}
	}
	return out
}

func (r Run) knows(load string) bool {
	_, ok := r.load(load)
	return ok
}

func (r Run) load(id string) (Load, bool) {
	for _, l := range r.Loads {
		if l.ID == id && id != "" {
			return l, true
		}
	}
	return Load{}, false
}

// lines is the number of a load's conductors that are neither neutral nor earth.
func (r Run) lines(load string) (n int) {
	for _, c := range r.Conductors {
		if c.Load == load && c.Role != Neutral && c.Role != Earth && c.Role != Spare {
			n++
		}
	}
	return n
}
