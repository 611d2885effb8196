package main

import (
	"encoding/json"
	"fmt"
	"path/filepath"

	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/study"
)

type adviseCommand struct {
	Files      []string `arg:"" name:"file" help:"Section documents (YAML)."`
	JSON       bool     `name:"json" help:"One JSON object a line and design, full precision."`
	AssumeIdle bool     `help:"Count conductors of unknown or unassigned current as idle."`
}

// Run says for every file what to change first.
func (c *adviseCommand) Run(a *app) error {
	for i, file := range c.Files {
		advice := a.advise(file, study.Options{AssumeIdle: c.AssumeIdle, Dir: filepath.Dir(file)})
		if advice == nil {
			continue
		}
		if c.JSON {
			line, err := json.Marshal(adviceOf(advice))
			if err != nil {
				return fmt.Errorf("%s: %w", file, err)
			}
			fmt.Fprintf(a.out, "%s\n", line)
			continue
		}
		if i > 0 {
			fmt.Fprintln(a.out)
		}
		printAdvice(a, file, advice)
	}
	return nil
}

// advise answers for one file, nil when it can't. Its status is that of the design as it is.
func (a *app) advise(file string, o study.Options) *study.Advice {
	d := a.open(file)
	if d == nil {
		return nil
	}
	advice, err := study.New(a.cat).Advise(a.ctx, d, nil, o)
	if err != nil {
		a.failed(file, d, err)
		return nil
	}
	if advice.Factor < 1 {
		a.worse(exitOver)
	}
	a.worse(statusOf(advice.Base))
	return advice
}

// printAdvice writes advice for people.
func printAdvice(a *app, file string, v *study.Advice) {
	title := v.Base.Title
	if title == "" {
		title = file
	}
	fmt.Fprintf(a.out, "%s\n%s\n", title, v.Now())
	for i := range v.Changes {
		fmt.Fprintf(a.out, "%2d. %s\n", i+1, v.Changes[i].Sentence())
	}
	fmt.Fprintf(a.out, "%s\n%s\n", v.Looked(), rating.Caution)
}

// advice is the JSON of `advise`.
type advice struct {
	Title    string       `json:"title"`
	Case     string       `json:"case"` // "": the loads as written
	Governs  *string      `json:"governs"`
	RoomK    *float64     `json:"room_k"`
	Factor   float64      `json:"at_factor"` // below 1: no steady temperature exists as written, all is compared at this factor on currents
	Screened int          `json:"screened"`
	Solved   int          `json:"solved"`
	Changes  []changeJSON `json:"changes"`
	Notes    []string     `json:"notes"`
	Caution  string       `json:"caution"`
}

type changeJSON struct {
	Kind      string   `json:"kind"`
	IDs       []string `json:"ids"`
	Text      string   `json:"text"`
	GainK     float64  `json:"gain_k"`
	AtK       *float64 `json:"gain_at_governing_k"` // null: it is gone
	Governs   string   `json:"governs"`
	TempC     float64  `json:"temperature_c"`
	LimitC    float64  `json:"limit_c"`
	CopperKgM float64  `json:"copper_kg_m"`
	OutsideMM float64  `json:"outside_mm"`
	Fill      float64  `json:"fill"`
	Worse     []string `json:"worse"`
}

func adviceOf(v *study.Advice) advice {
	out := advice{
		Title: v.Base.Title, Case: v.Case, Governs: text(v.Governs), Factor: v.Factor, Screened: v.Screened, Solved: v.Solved, Changes: []changeJSON{},
		Notes: append([]string{}, v.Base.Notes...), Caution: rating.Caution,
	}
	if v.Governs != "" {
		out.RoomK = number(v.RoomK)
	}
	for i := range v.Changes {
		c := &v.Changes[i]
		out.Changes = append(out.Changes, changeJSON{
			c.Kind, append([]string{}, c.IDs...), c.Text, quantity.RoundDown(c.GainK, 6), number(c.AtK), c.Governs, c.TempC, c.LimitC, c.CopperKgM, c.OutsideMM, c.Fill,
			append([]string{}, c.Worse...),
		})
	}
	return out
}
