package section

import (
	"fmt"
	"strings"
)

// checkIDs reports ids that stand twice in one list of parts.
func checkIDs(r *report, parts []Part, at path) {
	first := map[string]int{}
	for i, p := range parts {
		if j, ok := first[p.ID]; ok && p.ID != "" {
			where := fmt.Sprintf("part number %d", j+1)
			if r.root != nil {
				where = fmt.Sprintf("the part on line %d", locate(r.root, at.at(j)))
			}
			r.add(at.at(i).key("id"), "duplicate-id", "its id is also that of "+where, "give one of them another id")
			continue
		}
		first[p.ID] = i
	}
}

func buildOf(d *Document, name string) *Build {
	for i := range d.Builds {
		if d.Builds[i].Name == name {
			return &d.Builds[i]
		}
	}
	return nil
}

// tally is what a build unfolds to.
type tally struct {
	parts, depth int
	cycle        []string // builds that contain each other, first = last
	state        int      // 1: under way, 2: done
}

// checkNesting reports builds that contain themselves, cables nested too deeply and too many parts. It reports whether the
// document can be unfolded.
func checkNesting(r *report, d *Document) bool {
	done := map[string]*tally{}
	ok := true
	for i := range d.Builds {
		t := count(d, d.Builds[i].Name, done, nil)
		if t.cycle != nil && t.cycle[0] == d.Builds[i].Name {
			r.add(path("").key("builds").key(d.Builds[i].Name), "endless-build", "it contains itself ("+show(strings.Join(t.cycle, " → "))+")",
				"take one of these cables out of its build")
		}
		ok = ok && t.cycle == nil
	}
	top := countParts(d, d.Parts, done, nil)
	at := path("").key("parts")
	if top.parts > MaxParts {
		r.add(at, "too-many-parts", fmt.Sprintf("the design has %s parts with those inside its cables, and at most %d are read", atLeast(top.parts), MaxParts),
			"split it into several designs")
	}
	if top.depth > MaxNesting && ok {
		r.add(at, "too-deep", fmt.Sprintf("cables are nested %d deep, and at most %d are read", top.depth, MaxNesting), "flatten the inner builds")
	}
	return ok && top.parts <= MaxParts && top.depth <= MaxNesting
}

const countCap = 1_000_000

func atLeast(n int) string {
	if n >= countCap {
		return "over a million"
	}
	return fmt.Sprint(n)
}

// count tallies a build, remembering what is done, so that builds of builds of builds take no time.
func count(d *Document, name string, done map[string]*tally, above []string) *tally {
	t := done[name]
	if t == nil {
		t = &tally{state: 1}
		done[name] = t
	} else {
		if t.state == 1 {
			for i, a := range above {
				if a == name {
					return &tally{cycle: append(append([]string{}, above[i:]...), name)}
				}
			}
		}
		return t
	}
	if b := buildOf(d, name); b != nil {
		sum := countParts(d, b.Parts, done, append(above, name))
		t.parts, t.depth, t.cycle = sum.parts, sum.depth, sum.cycle
	}
	t.state = 2
	return t
}

// countParts tallies a list of parts; depth is how many cables lie within each other.
func countParts(d *Document, parts []Part, done map[string]*tally, above []string) (sum tally) {
	for _, p := range parts {
		sum.parts++
		if p.Kind != Cable || p.Build == "" {
			continue
		}
		t := count(d, p.Build, done, above)
		sum.parts += t.parts
		sum.depth = max(sum.depth, t.depth+1)
		if sum.cycle == nil {
			sum.cycle = t.cycle
		}
		sum.parts = min(sum.parts, countCap)
	}
	return sum
}

func checkLoad(r *report, l *Load, at path) {
	var given []string
	if l.CurrentA.OK || l.Unknown {
		given = append(given, "current_a")
	}
	if l.HeatWM.OK {
		given = append(given, "heat_w_m")
	}
	switch {
	case len(given) == 0:
		r.addWhole(at, "one-of", "it has neither current_a nor heat_w_m", "write one of them; a current that is not known is current_a: unknown")
	case len(given) > 1 || l.CurrentA.OK && l.Unknown:
		r.addWhole(at, "one-of", "it has both "+strings.Join(given, " and "), "keep one of them")
	}
	if l.StartingDuty && (l.Continuous || l.Motor) {
		r.add(at.key("starting_duty"), "contradiction", "a load that runs only while a motor starts is neither a motor's own nor runs three hours", "keep one of starting_duty, motor and continuous")
	}
	if l.HeatWM.OK && l.FrequencyHz.OK {
		r.add(at.key("frequency_hz"), "key-of-kind", "¤ belongs to a current, and this load is a fixed heat", "take it out")
	}
}

// checkLoads resolves the conductors of the loads through the builds.
func checkLoads(r *report, d *Document) {
	kinds, all := map[string]string{}, UnfoldAll(d)
	var ids []string
	for _, p := range all {
		kinds[p.ID] = p.Part.Kind
		if p.Part.Kind == Core {
			ids = append(ids, p.ID)
		}
	}
	taken, seen := map[string]string{}, map[string]bool{}
	for i, l := range d.Loads {
		at := path("").key("loads").at(i)
		if seen[l.ID] && l.ID != "" {
			r.add(at.key("id"), "duplicate-id", "its id is also that of a load before it", "give one of them another id")
		}
		seen[l.ID] = true
		if r.full() {
			return
		}
		for j, id := range l.Conductors {
			at := at.key("conductors").at(j)
			switch kind, ok := kinds[id]; {
			case id == "":
			case !ok:
				r.add(at, "unknown-conductor", "there is no conductor "+show(id), conductorAdvice(id, ids), id)
			case kind != Core && kind != Cable && kind != Rod: // reported already
			case kind != Core:
				r.add(at, "not-a-conductor", fmt.Sprintf("%s is a %s and no conductor", show(id), kind), loadAdvice(id, kind, ids), id)
			case taken[id] != "":
				r.add(at, "loaded-twice", fmt.Sprintf("conductor %s is already in load %s", show(id), show(taken[id])), "take it out of one of them", id)
			default:
				taken[id] = l.ID
			}
		}
	}
}

func conductorAdvice(id string, ids []string) string {
	var ends []string
	for _, c := range ids {
		if strings.HasSuffix(c, "/"+id) {
			ends = append(ends, c)
		}
	}
	near := nearest(id, ids)
	switch {
	case len(ends) > 0:
		return "did you mean " + show(strings.Join(ends[:min(3, len(ends))], " or ")) + "?"
	case near != "":
		return "did you mean " + show(near) + "?"
	}
	return "take it out, or add a part with that id"
}

func loadAdvice(id, kind string, ids []string) string {
	if kind == Cable {
		for _, c := range ids {
			if strings.HasPrefix(c, id+"/") {
				return "name the conductors in it, such as " + show(c)
			}
		}
	}
	return "take it out of the load"
}
