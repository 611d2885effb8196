package main

import (
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"path/filepath"
	"strings"
	"text/tabwriter"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/rules"
	"packrise/solver/section"
	"packrise/solver/study"
)

type rateCommand struct {
	Files      []string `arg:"" name:"file" help:"Section documents (YAML)."`
	JSON       bool     `name:"json" help:"One JSON object a line and design, full precision."`
	AssumeIdle bool     `help:"Count conductors of unknown or unassigned current as idle (the notes say so)."`
	Nominal    bool     `help:"Exit with 1 only where something is over its limit, not where its band reaches it."`
}

// Run rates every file in turn.
func (c *rateCommand) Run(a *app) error {
	for i, file := range c.Files {
		r := a.rate(file, study.Options{AssumeIdle: c.AssumeIdle, Dir: filepath.Dir(file)}, c.Nominal)
		if r == nil {
			continue
		}
		if c.JSON {
			line, err := json.Marshal(ratesOf(r))
			if err != nil {
				return fmt.Errorf("%s: %w", file, err)
			}
			fmt.Fprintf(a.out, "%s\n", line)
			continue
		}
		if i > 0 {
			fmt.Fprintln(a.out)
		}
		printRates(a, file, r)
	}
	return nil
}

// open reads a design; nil when it can't be read, with the reasons on stderr and the status set.
func (a *app) open(file string) *section.Document {
	d, problems, err := section.Open(file)
	if err != nil {
		fmt.Fprintf(a.err, "%s: %v\n", file, err)
		a.worse(exitInput)
		return nil
	}
	if a.refused(file, problems) {
		return nil
	}
	return d
}

// failed reports why a question was not answered.
func (a *app) failed(file string, d *section.Document, err error) {
	var no *study.Refusal
	if errors.As(err, &no) {
		a.refused(file, d.Locate(no.Problems))
		return
	}
	fmt.Fprintf(a.err, "%s: %v\n", file, err)
	a.worse(exitProgram)
}

// rate answers for one file, nil when it can't.
func (a *app) rate(file string, o study.Options, nominal bool) *study.Ratings {
	d := a.open(file)
	if d == nil {
		return nil
	}
	r, err := study.New(a.cat).Rate(a.ctx, d, nil, o)
	if err != nil {
		a.failed(file, d, err)
		return nil
	}
	switch {
	case r.Base.Status == heat.StoppedEarly:
		a.worse(exitProgram)
	case r.State == study.Within, r.State == study.Close && nominal:
	default:
		a.worse(exitOver)
	}
	return r
}

// printRates writes ratings for people.
func printRates(a *app, file string, r *study.Ratings) {
	title := r.Base.Title
	if title == "" {
		title = file
	}
	answer, amperes := r.Sentence()
	_, assumed := r.Base.Sentence()
	fmt.Fprintf(a.out, "%s\n%s\n%s\n%s\n\n", title, answer, amperes, assumed)
	fmt.Fprintf(a.out, "Permitted currents%s. All loads together: %s to rely on, %s nominal.\n", unprotected(r), study.Percent(r.All.Rely.Factor), study.Percent(r.All.Nominal.Factor))
	t := tabwriter.NewWriter(a.out, 0, 0, 2, ' ', tabwriter.AlignRight)
	fmt.Fprintln(t, "\tto rely on\tnominal\tits load alone raised\talone here\tthree here\tlowest\tbecause of\t")
	for i, c := range r.Base.Conductors {
		row := rowOf(r, i)
		fmt.Fprintln(t, c.ID+"\t"+strings.Join(row[:], "\t")+"\t")
	}
	t.Flush()
	printCodes(a, r)
	printWhy(a, r)
	for _, n := range r.Base.Notes {
		fmt.Fprintf(a.out, "Note: %s.\n", n)
	}
	fmt.Fprintf(a.out, "%s\n", rating.Caution)
}

// unprotected heads currents that no known device stands behind.
func unprotected(r *study.Ratings) string {
	for _, p := range r.Protected {
		if p.Unknown {
			return " (not a device rating)"
		}
	}
	return ""
}

// rowOf is one conductor's currents for people.
func rowOf(r *study.Ratings, i int) (row [7]string) {
	c := r.Base.Conductors[i]
	for k := range row {
		row[k] = "–"
	}
	if now := c.CurrentA.V; now > 0 {
		row[0], row[1] = study.Amps(now*r.All.Rely.Factor), study.Amps(now*r.All.Nominal.Factor)
		for _, l := range r.Loads {
			if l.ID == c.Load {
				row[2] = study.Amps(now * l.Rely.Factor)
			}
			if l.ID == c.Load && l.Rely.Hopeless {
				row[2] = "none" // the others as given leave no room
			}
		}
	}
	if al := r.Alone[i]; al.Why == "" {
		row[3] = study.Amps(al.One.RelyA)
		if !math.IsNaN(al.Three.RelyA) {
			row[4] = study.Amps(al.Three.RelyA)
		}
	}
	if l := r.Lowest[i]; !math.IsNaN(l.A) {
		row[5], row[6] = study.Amps(l.A), l.Because
	}
	return row
}

// printCodes writes the arithmetic of every rule set, terminals and devices.
func printCodes(a *app, r *study.Ratings) {
	for k := range r.Codes.Outcomes {
		o := &r.Codes.Outcomes[k]
		fmt.Fprintf(a.out, "\n%s (%s)", o.Title, o.Edition)
		if !o.Applies {
			fmt.Fprintf(a.out, ": %s\n", o.Why)
			continue
		}
		fmt.Fprintln(a.out)
		for _, n := range o.Counts {
			fmt.Fprintf(a.out, "  %s\n", n.Text)
		}
		for _, line := range arithmetic(o) {
			fmt.Fprintf(a.out, "  %s\n", line)
		}
		if o.Fill != nil {
			fmt.Fprintf(a.out, "  %s\n", o.Fill.Text)
		}
		for _, m := range o.Remarks {
			fmt.Fprintf(a.out, "  %s\n", m.Text)
		}
	}
	fmt.Fprintln(a.out)
	for _, p := range r.Codes.Problems {
		fmt.Fprintf(a.out, "%s\n", p)
	}
	for _, p := range r.Protected {
		for _, c := range p.Checks {
			fmt.Fprintf(a.out, "%s\n", c.Text)
		}
	}
	for _, f := range r.Faults {
		fmt.Fprintf(a.out, "%s\n", f.Sentence())
	}
	for _, e := range r.Bands.Largest(5) {
		fmt.Fprintf(a.out, "%s\n", e)
	}
}

// arithmetic writes the steps of a rule set, one line for all conductors that have the same.
func arithmetic(o *rules.Outcome) (out []string) {
	ids := map[string][]string{}
	var order []string
	for _, w := range o.Conductors {
		var steps []string
		for _, s := range w.Steps {
			steps = append(steps, s.Text)
		}
		text := strings.Join(steps, "; ")
		if text == "" {
			text = strings.TrimPrefix(w.Why, w.ID+": ")
		}
		if text == "" {
			continue
		}
		if ids[text] == nil {
			order = append(order, text)
		}
		ids[text] = append(ids[text], w.ID)
	}
	for _, text := range order {
		out = append(out, study.List(ids[text])+": "+text)
	}
	return out
}
