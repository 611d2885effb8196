package study

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"packrise/solver/section"
)

// sourcesOf are the indices of a load's conductors.
func (a *adviser) sourcesOf(load string) (out []int) {
	for j, c := range a.p.Conductors {
		if c.Load == load {
			out = append(out, j)
		}
	}
	return out
}

// less is the change of heat when the heat of a load falls by a share.
func (a *adviser) less(load string, share float64) map[int]float64 {
	dq := map[int]float64{}
	for _, j := range a.sourcesOf(load) {
		dq[j] = -share * a.p.Conductors[j].HeatWM
	}
	return dq
}

// warm tells whether a load makes heat.
func (a *adviser) warm(l *section.Load) bool {
	for _, j := range a.sourcesOf(l.ID) {
		if a.p.Conductors[j].HeatWM > 0 {
			return true
		}
	}
	return false
}

// loads: off, out, cut.
func (a *adviser) loads() {
	for i := range a.w.Loads {
		l := a.w.Loads[i]
		if !a.warm(&l) {
			continue
		}
		if !a.chosen(l.ID) { // of N that run, another would
			a.add(candidate{
				kind: ChangeOff, ids: []string{l.ID}, text: "Switch off " + l.ID + " while the others run", room: a.expect(a.less(l.ID, 1), nil),
				make: func(d *section.Document) (*section.Document, bool) { return switchedOff(d, l.ID), true },
			})
		}
		if parts := wholeParts(a.w, []string{l.ID}); len(parts) > 0 && len(parts) < len(a.w.Parts) {
			a.add(candidate{
				kind: ChangeOut, ids: parts, text: fmt.Sprintf("Lay the wires of %s elsewhere (%s)", l.ID, list(parts)), room: a.expect(a.less(l.ID, 1), l.Conductors),
				make: func(d *section.Document) (*section.Document, bool) { return section.Delete(d, parts...), true },
			})
		}
		if !l.CurrentA.OK {
			continue
		}
		for _, cut := range []float64{0.1, 0.2} {
			now := l.CurrentA.V / a.out.Factor
			a.add(candidate{
				kind: ChangeCut, ids: []string{l.ID}, room: a.expect(a.less(l.ID, 1-(1-cut)*(1-cut)), nil),
				text: fmt.Sprintf("Cut %s by %.0f %%, from %s to %s", l.ID, 100*cut, Amps(now), Amps(now*(1-cut))),
				make: func(d *section.Document) (*section.Document, bool) { return scaledLoad(d, l.ID, 1-cut), true },
			})
		}
	}
}

// chosen tells whether a load is one of any N in the case.
func (a *adviser) chosen(load string) bool {
	c := section.CaseNamed(a.d, a.out.Case)
	return c != nil && slices.ContainsFunc(c.Any, func(g section.AnyOf) bool { return has(g.Of, load) })
}

// states changes what cases say of one load.
func states(d *section.Document, load string, change func(*section.CaseLoad)) *section.Document {
	for _, c := range d.Cases {
		if i := slices.IndexFunc(c.Loads, func(l section.CaseLoad) bool { return l.Load == load }); i >= 0 {
			c.Loads = slices.Clone(c.Loads)
			change(&c.Loads[i])
			d = section.SetCase(d, c)
		}
	}
	return d
}

// switchedOff has a load off, in every case that names it too.
func switchedOff(d *section.Document, load string) *section.Document {
	return states(section.SwitchOff(d, load), load, func(l *section.CaseLoad) { *l = section.CaseLoad{Load: load, Off: true} })
}

// scaledLoad has a factor on the currents of a load, as written and in every case that names it. An unknown one is its device's rating.
func scaledLoad(d *section.Document, load string, factor float64) *section.Document {
	at, _, _ := AtDevices(d)
	now := section.LoadNamed(at, load).CurrentA
	d = states(d, load, func(l *section.CaseLoad) { l.CurrentA *= factor })
	if !now.OK {
		return d
	}
	return section.WithStates(d, []section.CaseLoad{{Load: load, CurrentA: now.V * factor}})
}

// wholeParts are the parts of the top level whose conductors are all in the loads: what goes when the loads go.
func wholeParts(d *section.Document, loads []string) (out []string) {
	in, all := map[string]int{}, map[string]int{}
	for _, p := range section.Unfold(d) {
		top, _, _ := strings.Cut(p.ID, "/")
		all[top]++
		if l := section.LoadOf(d, p.ID); l != nil && has(loads, l.ID) {
			in[top]++
		}
	}
	conductors := 0
	for _, id := range loads {
		if l := section.LoadNamed(d, id); l != nil {
			conductors += len(l.Conductors)
		}
	}
	for i := range d.Parts {
		if id := d.Parts[i].ID; in[id] > 0 && in[id] == all[id] {
			out = append(out, id)
			conductors -= in[id]
		}
	}
	if conductors > 0 { // some lie in cables that others use too
		return nil
	}
	return out
}

// cables: each with everything in it, where that is more than one load.
func (a *adviser) cables() {
	for i := range a.w.Parts {
		id := a.w.Parts[i].ID
		if a.w.Parts[i].Kind != section.Cable || len(a.w.Parts) < 2 {
			continue
		}
		dq := map[int]float64{}
		var inside []string
		loads := map[string]bool{}
		for j, c := range a.p.Conductors {
			if strings.HasPrefix(c.ID, id+"/") {
				dq[j] = -c.HeatWM
				inside = append(inside, c.ID)
				loads[c.Load] = true
			}
		}
		if len(loads) < 2 { // with one it is among the loads
			continue
		}
		for _, o := range a.list[len(a.p.Conductors):] {
			if strings.HasPrefix(o.id, id+"/") {
				inside = append(inside, o.id)
			}
		}
		a.add(candidate{
			kind: ChangeOut, ids: []string{id}, text: "Lay " + id + " elsewhere, with all that is in it", room: a.expect(dq, inside),
			make: func(d *section.Document) (*section.Document, bool) { return section.Delete(d, id), true },
		})
	}
}

// idle: what governs and carries nothing may go.
func (a *adviser) idle() {
	id := a.out.Governs
	p := section.Find(a.w, id)
	if p == nil || strings.Contains(id, "/") || p.Role == section.RoleEarth || len(a.w.Parts) < 2 || a.at >= len(a.p.Conductors) || a.p.Conductors[a.at].Heats {
		return
	}
	a.add(candidate{
		kind: ChangeOut, ids: []string{id}, text: "Take out " + id + ", which carries nothing and governs", room: a.expect(nil, []string{id}),
		make: func(d *section.Document) (*section.Document, bool) { return section.Delete(d, id), true },
	})
}

// split: half of the loads, by heat, into a second holder like this one. The half with more heat stays, and is what is solved.
func (a *adviser) split() {
	type heated struct {
		id string
		w  float64
	}
	var loads []heated
	for i := range a.w.Loads {
		id := a.w.Loads[i].ID
		w := 0.0
		for _, j := range a.sourcesOf(id) {
			w += a.p.Conductors[j].HeatWM
		}
		if w > 0 && len(wholeParts(a.w, []string{id})) > 0 {
			loads = append(loads, heated{id, w})
		}
	}
	if len(loads) < 2 {
		return
	}
	slices.SortStableFunc(loads, func(x, y heated) int {
		return cmp.Compare(y.w, x.w)
	})
	var halves [2][]string
	var sums [2]float64
	for _, l := range loads {
		h := 0
		if sums[1] < sums[0] {
			h = 1
		}
		halves[h], sums[h] = append(halves[h], l.id), sums[h]+l.w
	}
	keep := 0
	if sums[1] > sums[0] {
		keep = 1
	}
	const worth = 0.2 // of all heat: less is no half
	leave := halves[1-keep]
	parts := wholeParts(a.w, leave)
	if len(parts) == 0 || sums[1-keep] < worth*(sums[0]+sums[1]) || len(parts) == len(a.w.Parts) {
		return
	}
	a.add(candidate{
		kind: ChangeSplit, ids: leave, always: true,
		text: fmt.Sprintf("Split it: lay %s into a second holder like this one; %s left here", list(leave), list(halves[keep])+isAre(halves[keep])),
		make: func(d *section.Document) (*section.Document, bool) { return section.Delete(d, parts...), true },
	})
}

func isAre(list []string) string {
	if len(list) == 1 {
		return " is"
	}
	return " are"
}
