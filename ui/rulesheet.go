package ui

import (
	"math"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/rules"
	"packrise/solver/study"
)

// ruleBlock is one part of what the rules say: a heading and its lines.
type ruleBlock struct {
	title string
	lines []string
}

func (b *ruleBlock) add(lines ...string) {
	for _, l := range lines {
		if l != "" {
			b.lines = append(b.lines, l)
		}
	}
}

// ruleBlocks writes out what code tables, terminals and devices say of a design, every number with its unit and clause. r is nil where the computed
// currents are not known; the tables do not depend on them.
func ruleBlocks(c *study.Codes, r *study.Ratings) (blocks []ruleBlock) {
	first := ruleBlock{title: "Which rules apply"}
	if c.Run.ListedPanel {
		first.add("This lies inside a listed panel: there the panel's own standard rules, not the wiring code.")
	} else {
		first.add("Inside a listed panel the panel's own standard rules, not the wiring code: where this lies is said in the details.")
	}
	for _, p := range c.Problems {
		first.add(fullStop(upperFirst(p.String())))
	}
	blocks = append(blocks, first)
	for i := range c.Outcomes {
		blocks = append(blocks, outcomeBlock(&c.Outcomes[i], r))
	}
	if b := capBlock(c.Caps); len(b.lines) > 0 {
		blocks = append(blocks, b)
	}
	if c.Jam.Text != "" {
		blocks = append(blocks, ruleBlock{"Jam ratio", []string{fullStop(c.Jam.Text)}})
	}
	if r != nil {
		blocks = append(blocks, lowestBlock(r), protectionBlock(r))
		if b := faultBlock(r); len(b.lines) > 0 {
			blocks = append(blocks, b)
		}
	}
	return slices.DeleteFunc(blocks, func(b ruleBlock) bool { return len(b.lines) == 0 })
}

// outcomeBlock is one rule set.
func outcomeBlock(o *rules.Outcome, r *study.Ratings) ruleBlock {
	b := ruleBlock{title: o.Title}
	b.add("Source: " + fullStop(orWord(o.Source.String(), o.Edition)))
	if !o.Applies {
		b.add("Does not apply: " + fullStop(o.Why))
		return b
	}
	if o.Informative {
		b.add("Informative: shown beside the others and never taken as the lowest.")
	}
	for i := range o.Counts {
		b.add(countLines(&o.Counts[i])...)
	}
	b.add(ratedLines(o)...)
	if r != nil {
		b.add(againstLines(o, r)...)
	}
	for _, a := range o.Allowances {
		b.add("Allowed beyond: " + fullStop(a.Text))
	}
	if o.Fill != nil {
		b.add(fullStop(upperFirst(o.Fill.Text)))
		if len(o.Fill.Unknown) > 0 {
			b.add("The outside of " + someIDs(o.Fill.Unknown, 6) + " is unknown: the fill is at least that.")
		}
	}
	if o.Harness != nil {
		b.add(fullStop(upperFirst(o.Harness.Text)))
	}
	for _, m := range o.Remarks {
		b.add("Remark: " + fullStop(m.Text))
	}
	return b
}

// grouped joins ids that have the same words, in order.
type grouped struct {
	words []string
	ids   [][]string
}

func (g *grouped) add(id, words string) {
	n := slices.Index(g.words, words)
	if n < 0 {
		n = len(g.words)
		g.words, g.ids = append(g.words, words), append(g.ids, nil)
	}
	g.ids[n] = append(g.ids[n], id)
}

// withoutID takes the id off that a sentence begins with, so that alike ones stand together.
func withoutID(id, text string) string { return strings.TrimPrefix(text, id+": ") }

// allIDs writes every id: a count that can be checked.
func allIDs(ids []string) string { return strings.Join(ids, ", ") }

// countLines are a count with the reason for every conductor.
func countLines(c *rules.Count) []string {
	head := "Counted: " + c.Text
	if c.Group != "" {
		head += " in " + c.Group
	}
	if c.Total > c.N {
		head += ", the most that can run together of " + written(float64(c.Total))
	}
	lines := []string{fullStop(head)}
	var yes, no grouped
	for _, i := range c.Items {
		if i.Counts {
			yes.add(i.ID, i.Why)
		} else {
			no.add(i.ID, i.Why)
		}
	}
	for n, w := range yes.words {
		lines = append(lines, "    counts: "+allIDs(yes.ids[n])+" ("+w+")")
	}
	for n, w := range no.words {
		lines = append(lines, "    does not count: "+allIDs(no.ids[n])+" ("+w+")")
	}
	return lines
}

// ratedLines are the arithmetic, step by step, conductors with the same steps together.
func ratedLines(o *rules.Outcome) (lines []string) {
	var g grouped
	for i := range o.Conductors {
		c := &o.Conductors[i]
		if math.IsNaN(c.A) {
			if c.Why != "" {
				g.add(c.ID, "    no current: "+fullStop(withoutID(c.ID, c.Why)))
			}
			continue
		}
		var steps []string
		for _, s := range c.Steps {
			t := "    " + s.Text
			if s.FromMemory {
				t += " (from memory)"
			}
			steps = append(steps, t)
		}
		g.add(c.ID, strings.Join(append(steps, "    permitted "+ampsWords(c.A)), "\n"))
	}
	for n, w := range g.words {
		lines = append(lines, allIDs(g.ids[n])+":\n"+w)
	}
	return lines
}

// againstLines compare amperes per conductor, never factors.
func againstLines(o *rules.Outcome, r *study.Ratings) (lines []string) {
	var g grouped
	for i := range r.Lowest {
		l := &r.Lowest[i]
		a, ok := l.Rules[o.Rule]
		if !ok || !(l.Computed > 0) {
			continue
		}
		d := asShown(a) - asShown(l.Computed)
		words := ampsWords(a) + " by this rule, " + ampsWords(l.Computed) + " computed, to rely on"
		switch {
		case math.Abs(d) < 0.005:
			words += ": the same"
		case d > 0:
			words += ": the rule permits " + withUnit(quantity.Trimmed(d, 2), "A") + " more"
		default:
			words += ": the rule permits " + withUnit(quantity.Trimmed(-d, 2), "A") + " less"
		}
		if math.Abs(a/l.Computed-1) > farOff {
			words += ", more than 20 % apart"
		}
		g.add(l.ID, words)
	}
	for n, w := range g.words {
		lines = append(lines, "Difference for "+allIDs(g.ids[n])+": "+w+".")
	}
	return lines
}

// asShown is a current as study.Amps writes it, so that a difference agrees with the numbers beside it.
func asShown(a float64) float64 {
	switch {
	case a < 10:
		return quantity.RoundDown(a, 2)
	case a < 100:
		return quantity.RoundDown(a, 1)
	}
	return quantity.RoundDown(a, 0)
}

// ampsWords is a current rounded down, its unit on the same line.
func ampsWords(a float64) string { return strings.ReplaceAll(study.Amps(a), " A", noBreak+"A") }

func capBlock(caps []rules.Cap) ruleBlock {
	b := ruleBlock{title: "Terminals"}
	var g grouped
	for _, c := range caps {
		t := fullStop(withoutID(c.Conductor, c.Text))
		if c.Assumed {
			t += " Nobody has said what terminal it is."
		}
		if c.Memory {
			t += " (From memory.)"
		}
		g.add(c.Conductor, t)
	}
	for n, w := range g.words {
		b.add(allIDs(g.ids[n]) + ": " + w)
	}
	return b
}

// lowestBlock is the lowest of all, per conductor.
func lowestBlock(r *study.Ratings) ruleBlock {
	b := ruleBlock{title: "The lowest of all, per conductor"}
	var g grouped
	for i := range r.Lowest {
		l := &r.Lowest[i]
		if math.IsNaN(l.A) {
			g.add(l.ID, "nothing is known that limits it")
			continue
		}
		g.add(l.ID, ampsWords(l.A)+" ("+l.Text+")")
	}
	for n, w := range g.words {
		b.add(allIDs(g.ids[n]) + ": " + fullStop(w))
	}
	return b
}

// protectionBlock is what protects each load, check by check.
func protectionBlock(r *study.Ratings) ruleBlock {
	b := ruleBlock{title: "Protection"}
	for _, p := range r.Protected {
		if p.Unknown && len(p.Checks) == 0 {
			b.add(p.Load + ": protection unknown; its permitted currents are not a device rating.")
		}
		for i := range p.Checks {
			c := &p.Checks[i]
			b.add(p.Load + ": " + checkWord(c) + fullStop(c.Text))
		}
	}
	return b
}

// checkWord says how a comparison ended.
func checkWord(c *rules.Check) string {
	switch {
	case !c.Known:
		return "not known: "
	case c.Within:
		return "within: "
	case c.NextSizeUp:
		return "over, which the next standard size up lets stand: "
	}
	return "over: "
}

func faultBlock(r *study.Ratings) ruleBlock {
	b := ruleBlock{title: "Soft faults: a circuit draws as much as its device lets through for good"}
	for i := range r.Faults {
		f := &r.Faults[i]
		word := "within: "
		if f.Over() {
			word = "over: "
		}
		b.add(f.Load + ": " + word + f.Sentence())
	}
	return b
}

// ruleText is all of it as plain text.
func ruleText(blocks []ruleBlock) string {
	var s strings.Builder
	for i, b := range blocks {
		if i > 0 {
			s.WriteString("\n")
		}
		s.WriteString(b.title + "\n")
		for _, l := range b.lines {
			s.WriteString(l + "\n")
		}
	}
	return strings.ReplaceAll(s.String(), noBreak, " ")
}
