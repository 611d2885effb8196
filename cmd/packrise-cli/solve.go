package main

import (
	"encoding/json"
	"fmt"
	"strings"
	"text/tabwriter"

	"packrise/solver/rating"
)

type solveCommand struct {
	Files      []string `arg:"" name:"file" help:"Section documents (YAML)."`
	JSON       bool     `name:"json" help:"One JSON object a line and design, full precision."`
	Accuracy   string   `enum:"draft,standard,fine" default:"standard" help:"draft, standard or fine."`
	AssumeIdle bool     `help:"Count conductors of unknown or unassigned current as idle (the notes say so)."`
}

// Run solves every file in turn.
func (c *solveCommand) Run(a *app) error {
	for i, file := range c.Files {
		r := a.answer(file, c.Accuracy, c.AssumeIdle)
		if r == nil {
			continue
		}
		if c.JSON {
			line, err := json.Marshal(reportOf(r))
			if err != nil {
				return fmt.Errorf("%s: %w", file, err)
			}
			fmt.Fprintf(a.out, "%s\n", line)
			continue
		}
		if i > 0 {
			fmt.Fprintln(a.out)
		}
		printAnswer(a, file, r)
	}
	return nil
}

// printAnswer writes an answer for people.
func printAnswer(a *app, file string, r *rating.Result) {
	title := r.Title
	if title == "" {
		title = file
	}
	answer, assumed := r.Sentence()
	fmt.Fprintf(a.out, "%s\n%s\n%s\n\n", title, answer, assumed)
	if r.Solved() {
		t := tabwriter.NewWriter(a.out, 0, 0, 2, ' ', tabwriter.AlignRight)
		fmt.Fprintln(t, "part\tcarries\tmakes\tat\tlimit\tmargin\t")
		for _, row := range r.Table() {
			fmt.Fprintln(t, strings.Join(row[:], "\t")+"\t")
		}
		t.Flush()
		fmt.Fprintf(a.out, "\n%s\n", r.Balance())
	}
	for _, n := range r.Notes {
		fmt.Fprintf(a.out, "Note: %s.\n", n)
	}
	fmt.Fprintf(a.out, "%s\n", rating.Caution)
}
