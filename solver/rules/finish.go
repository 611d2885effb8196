package rules

import (
	"fmt"
	"math"
	"slices"
	"strings"
)

// finish adds what concerns all conductors: the common factor, what one more would do, lightly loaded circuits, and what a reader has to know.
func (u rule) finish(r Run, out *Outcome) {
	out.Factor = commonFactor(out.Conductors)
	for _, count := range out.Counts {
		u.stepAhead(r, count, out)
	}
	u.lightlyLoaded(r, out)
	u.remarkRoles(r, out)
	if u.counting.of == ofCircuits && !u.mixed(r) && u.span(r) > 3 && len(out.Counts) > 0 && out.Counts[0].N > 1 {
		out.remark("mixed-sizes", nil, "The factors are for cables of similar size, at most three neighbouring standard sizes, and these span more.")
	}
	var memory []string
	for _, d := range out.Conductors {
		for _, s := range d.Steps {
			if s.FromMemory && !slices.Contains(memory, s.Clause) {
				memory = append(memory, s.Clause)
			}
		}
	}
	if len(memory) > 0 {
		out.remark("from-memory", nil, "From memory, not read in the standard: "+andList(memory)+". Check these figures before relying on them.")
	}
}

// commonFactor is the product of the factors for lying together where all rated conductors share it, else NaN.
func commonFactor(rated []Rated) float64 {
	common := math.NaN()
	for _, d := range rated {
		if math.IsNaN(d.A) {
			continue
		}
		f := 1.0
		for _, s := range d.Steps {
			if s.Kind == StepCount || s.Kind == StepVariant {
				f *= s.Factor
			}
		}
		if !math.IsNaN(common) && math.Abs(f-common) > 1e-12 {
			return math.NaN()
		}
		common = f
	}
	return common
}

// stepAhead says what one more or one fewer would do where a step of the table lies there.
func (u rule) stepAhead(r Run, count Count, out *Outcome) {
	c, method, ok := u.someone(r, count)
	noun := countNoun[u.counting.of]
	n := count.N
	if u.counting.diversityFrom > 0 {
		n = count.Total
	}
	if !ok || n == 0 {
		return
	}
	now, why := u.factorFor(r, c, method, n, noun)
	if why != "" {
		return
	}
	for _, d := range []int{1, -1} {
		then, why := u.factorFor(r, c, method, n+d, noun)
		if why != "" || n+d < 1 || then.f == now.f {
			continue
		}
		more := "One more " + noun
		if d < 0 {
			more = "One fewer " + noun
		}
		if u.smooth() && math.Abs(then.f-now.f) < 0.1 {
			continue // every number has a factor of its own there, which is no step
		}
		out.remark("step-ahead", nil, fmt.Sprintf("%s would take the factor from %s to %s (%s).", more, factor(now.f), factor(then.f), then.clauseOr(now)))
	}
}

// smooth tells whether nearly every number has its own factor.
func (u rule) smooth() bool { return u.counting.of == ofCircuits }

func (s share) clauseOr(other share) string {
	if s.f < 1 {
		return s.clause
	}
	return other.clause
}

// someone returns a conductor that the count is about.
func (u rule) someone(r Run, count Count) (c Conductor, method string, ok bool) {
	for _, c := range r.Conductors {
		if c.Role != Earth && slices.ContainsFunc(count.Items, func(i Counted) bool { return i.ID == c.ID }) {
			return c, u.method(r, c), true
		}
	}
	return c, "", false
}

// lightlyLoaded works out what is gained by leaving out circuits that carry only a small share of their grouped rating. The count itself stays.
func (u rule) lightlyLoaded(r Run, out *Outcome) {
	if u.counting.lightlyLoaded == 0 || len(out.Counts) != 1 || math.IsNaN(out.Factor) {
		return
	}
	a := Allowance{Kind: "lightly-loaded", N: out.Counts[0].N, Clause: u.counting.lightlyClause, Currents: map[string]float64{}}
	for _, l := range r.Loads {
		grouped := out.lowest(r, l.ID)
		if n, _, _ := r.circuitsOf(l); l.CurrentA <= u.counting.lightlyLoaded*grouped && u.counted(out.Counts[0], r, l.ID) {
			a.LeftOut, a.N = append(a.LeftOut, l.ID), a.N-n
		}
	}
	c, method, ok := u.someone(r, out.Counts[0])
	if len(a.LeftOut) == 0 || a.N < 1 || !ok {
		return
	}
	f, why := u.factorFor(r, c, method, a.N, countNoun[u.counting.of])
	if why != "" || f.f <= out.Factor {
		return
	}
	a.Factor = f.f
	for _, d := range out.Conductors {
		i := slices.IndexFunc(r.Conductors, func(c Conductor) bool { return c.ID == d.ID })
		if !math.IsNaN(d.A) && !slices.Contains(a.LeftOut, r.Conductors[i].Load) {
			a.Currents[d.ID] = d.A * f.f / out.Factor
		}
	}
	a.Text = fmt.Sprintf("%s carry at most %s %% of their grouped rating and may be left out for the others (%s): then %s count, with %s instead of %s.",
		andList(a.LeftOut), trim(100*u.counting.lightlyLoaded), a.Clause, numbered(a.N, countNoun[u.counting.of]), factor(a.Factor), factor(out.Factor))
	if len(a.LeftOut) == 1 {
		a.Text = strings.Replace(strings.Replace(a.Text, " carry at most", " carries at most", 1), "their grouped", "its grouped", 1)
	}
	out.Allowances = append(out.Allowances, a)
}

// counted tells whether a load's conductors are in the count.
func (u rule) counted(count Count, r Run, load string) bool {
	return slices.ContainsFunc(r.Conductors, func(c Conductor) bool {
		return c.Load == load && slices.ContainsFunc(count.Items, func(i Counted) bool { return i.ID == c.ID && i.Counts })
	})
}

// lowest is the lowest current of a load's conductors, NaN where one has none.
func (o *Outcome) lowest(r Run, load string) float64 {
	least := math.NaN()
	for i, c := range r.Conductors {
		if c.Load != load || c.Role == Earth || c.Role == Spare || i >= len(o.Conductors) {
			continue
		}
		if a := o.Conductors[i].A; math.IsNaN(a) {
			return a
		} else if math.IsNaN(least) || a < least {
			least = a
		}
	}
	return least
}

// remarkRoles names assumptions about neutrals and control wires.
func (u rule) remarkRoles(r Run, out *Outcome) {
	var control, balanced []string
	for _, c := range r.Conductors {
		switch v := u.verdict(r, c); {
		case u.counting.of != ofConductors:
		case c.Role == Control && v.counts:
			control = append(control, c.ID)
		case c.Role == Neutral && !v.counts:
			balanced = append(balanced, c.ID)
		}
	}
	if len(control) > 0 {
		out.remark("control", control, "Control wires are counted here; those that never carry more than 10 % of their ampacity for long need not be (NEC 724.51, from memory).")
	}
	if len(balanced) > 0 {
		out.remark("neutral", balanced, "Where the major part of the load is nonlinear the neutral counts as well ("+u.counting.neutrals+"(3)).")
	}
	u.remarkStarting(r, out)
}

// remarkStarting names the control wires that are taken as serving only the starting of motors, and what would become of the factor if they served longer.
func (u rule) remarkStarting(r Run, out *Outcome) {
	var ids []string
	for _, c := range r.Conductors {
		if c.Role == Control {
			ids = append(ids, c.ID)
		}
	}
	if u.counting.controlFree == "" || len(ids) == 0 || len(out.Counts) == 0 {
		return
	}
	text := andList(ids) + " are taken as serving only the starting of motors and do not count (" + u.counting.controlFree + ")"
	if len(ids) == 1 {
		text = ids[0] + " is taken as serving only the starting of motors and does not count (" + u.counting.controlFree + ")"
	}
	noun := countNoun[u.counting.of]
	if c, method, ok := u.someone(r, out.Counts[0]); ok {
		now, why := u.factorFor(r, c, method, out.Counts[0].N, noun)
		then, whyThen := u.factorFor(r, c, method, out.Counts[0].N+len(ids), noun)
		switch {
		case why == "" && whyThen == "" && then.f < now.f:
			text += fmt.Sprintf("; serving longer they would make it %s, with %s instead of %s", numbered(out.Counts[0].N+len(ids), noun), factor(then.f), factor(now.f))
		case why == "" && whyThen == "":
			text += "; serving longer they would count and change no factor here"
		}
	}
	out.remark("control", ids, text+".")
}
