package rules

import (
	"math"
	"slices"
	"strings"
)

// Apply returns one outcome for each known rule set, in the order of the ids, and a problem for each unknown one.
func (b *Book) Apply(r Run, ids []string) (out []Outcome, problems []Problem) {
	for _, id := range ids {
		if u := b.find(id); u != nil {
			out = append(out, u.apply(r))
		} else {
			problems = append(problems, b.unknown(id))
		}
	}
	return out, problems
}

// slottedDuct starts the catalogue ids of the ducts of panels.
const slottedDuct = "duct-"

// Usual lists the rule sets to show when the design names none: American sizes by the NEC, others by IEC, flexible cables and harnesses by their own.
func (b *Book) Usual(r Run) []string {
	american, hot := 0, 0
	for _, c := range r.Conductors {
		if american--; c.american() {
			american += 2
		}
		if hot--; c.RatingC >= 105 {
			hot += 2
		}
	}
	switch {
	case american > 0 && (r.AltitudeM > 0 || hot > 0 && r.Holder.Kind == OpenBundle):
		return []string{"ac-43-13"}
	case american > 0:
		return usualAmerican(r)
	case r.ListedPanel || strings.HasPrefix(r.Holder.Stock, slottedDuct):
		return []string{"iec-60204"}
	case r.Holder.Kind == Wireway:
		return []string{"iec-52", "uk-trunking"}
	case r.Holder.Kind == Jacket && len(r.Conductors) > 3:
		return []string{"iec-52", "vde-0298-4"}
	}
	return []string{"iec-52"}
}

func usualAmerican(r Run) []string {
	switch {
	case r.Holder.Kind == Conduit:
		return []string{"nec-310", "nec-annex-b", "nec-ch9"}
	case r.Holder.Kind == Jacket:
		return []string{"nec-310"}
	case r.Holder.Kind == Wireway && r.Holder.Metal:
		return []string{"nec-376-22"}
	case r.Holder.Kind == Wireway:
		return []string{"nec-378-22"}
	}
	if r.cables() > 0 {
		return []string{"nec-310", "nec-310-17"}
	}
	return []string{"nec-310-17"}
}

// apply rates a run by one rule set.
func (u rule) apply(r Run) Outcome {
	out := Outcome{Rule: u.id, Title: u.title, Edition: u.edition, Source: u.source, Informative: u.informative, Applies: true, Factor: math.NaN()}
	if why, ok := u.applies(r); !ok {
		return out.refuse(r, why)
	}
	out.Fill = u.fillOf(r)
	for _, text := range u.remarks {
		out.Remarks = append(out.Remarks, Remark{"rule", nil, text})
	}
	switch {
	case u.currents == nil && out.Fill == nil:
		return out.refuse(r, u.name+" does not apply: the inside of the holder is unknown.")
	case u.currents == nil:
		if u.source.FromMemory {
			out.remark("from-memory", nil, "From memory, not read in the standard: "+u.fill.Clause+". Check these figures before relying on them.")
		}
		return out
	case math.IsNaN(r.AmbientC):
		return out.refuse(r, "No ambient temperature was entered, and "+u.name+" needs one.")
	}
	var tangled []string
	out.Counts, tangled = u.counts(r)
	if len(tangled) > 0 {
		out.remark("assumed", tangled, "What can't run together is too tangled to search among "+andList(tangled)+", so all of them count.")
	}
	if u.harness != nil {
		u.rateHarness(r, &out)
		return out
	}
	for _, c := range r.Conductors {
		out.Conductors = append(out.Conductors, u.rate(r, c, out.Counts))
	}
	u.finish(r, &out)
	return out
}

// refuse is the outcome of a rule that gives no current, and says why for every conductor.
func (o Outcome) refuse(r Run, why string) Outcome {
	o.Applies, o.Why = false, why
	for _, c := range r.Conductors {
		o.Conductors = append(o.Conductors, Rated{ID: c.ID, A: math.NaN(), Why: why})
	}
	return o
}

func (o *Outcome) remark(kind string, ids []string, text string) {
	o.Remarks = append(o.Remarks, Remark{kind, ids, text})
}

// rate works out one conductor: table, count, ambient.
func (u rule) rate(r Run, c Conductor, counts []Count) Rated {
	none := func(why string) Rated { return Rated{ID: c.ID, A: math.NaN(), Why: c.ID + ": " + why + "."} }
	if c.Role == Earth {
		return none("an earth carries no current in service, so it is not rated")
	}
	if why := u.rates(r, c); why != "" {
		return none(why)
	}
	method, loaded := u.method(r, c), u.loaded(r, c)
	p, why := u.currents.pick(c, method, loaded)
	if why != "" {
		return none(why)
	}
	out := Rated{ID: c.ID, Steps: []Step{base(p.a, p.label, p.column.clause, p.column.memory)}}
	together, why := u.together(r, c, method, countFor(counts, c))
	if why != "" {
		return none(why)
	}
	for _, f := range together {
		out.Steps = append(out.Steps, times(f.kind, out.last(), f.f, f.label, f.clause, f.memory))
	}
	f, label, why := u.ambient.pick(r.AmbientC, p.column.ratingC)
	if why != "" {
		return none(why)
	}
	out.Steps = append(out.Steps, times(StepAmbient, out.last(), f, label, u.ambient.name, u.ambient.memory))
	out.A = out.last()
	return out
}

func (d Rated) last() float64 { return d.Steps[len(d.Steps)-1].To }

// loaded is how many conductors of the circuit or cable are loaded, as tables ask for it.
func (u rule) loaded(r Run, c Conductor) int {
	if u.counting.of == ofCores && r.Holder.Kind != Jacket && c.Cable == "" {
		return 1
	}
	if u.counting.of != ofCircuits {
		return 3
	}
	loaded := 3
	for i, id := range r.circuitsAt(c) {
		l, _ := r.load(id)
		if _, n, _ := r.circuitsOf(l); i == 0 || n > loaded {
			loaded = n
		}
	}
	return loaded
}

// countFor is the count that a conductor belongs to.
func countFor(counts []Count, c Conductor) Count {
	for _, n := range counts {
		if slices.ContainsFunc(n.Items, func(i Counted) bool { return i.ID == c.ID }) {
			return n
		}
	}
	return Count{}
}
