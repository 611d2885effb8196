package main

import (
	"fmt"
	"math"

	"packrise/solver/heat"
	"packrise/solver/study"
)

// printWhy writes who heats what governs, the load cases and the largest sum of currents.
func printWhy(a *app, r *study.Ratings) {
	if g := r.Base.Governing; g != nil {
		if row, ok := r.Heaters.Of(g.Part); ok {
			fmt.Fprintf(a.out, "%s\n", row.Sentence())
		}
	}
	if r.Cases != nil {
		for i := range r.Cases.List {
			fmt.Fprintf(a.out, "%s\n", r.Cases.List[i].Sentence())
		}
	}
	if l := r.Largest; l != nil {
		fmt.Fprintf(a.out, "To rely on: %s\n", l.Rely.Sentence())
	}
}

// whyJSON is what `rate` says of sources, cases and sums.
type whyJSON struct {
	AtDevice []string             `json:"at_device"` // loads of unknown current, taken at the rating of their device
	Heater   *heaterJSON          `json:"heater"`    // null: the governing thing heats itself
	Heaters  []heatingJSON        `json:"heaters"`
	Cases    []caseJSON           `json:"cases"`
	Worst    map[string]worstJSON `json:"worst_case"`
	Largest  *largestJSON         `json:"largest_sum"`
}

type heaterJSON struct {
	Load    string `json:"load"`
	Percent int    `json:"percent"`
}

type heatingJSON struct {
	ID     string      `json:"id"`
	RiseK  float64     `json:"rise_k"`
	Shares []shareJSON `json:"shares"`
}

type shareJSON struct {
	From    string  `json:"from"`
	K       float64 `json:"k"`
	Percent int     `json:"percent"`
}

type caseJSON struct {
	Case     string   `json:"case"` // "": the loads as written
	Off      []string `json:"off"`  // by choice, in the worst of them
	State    string   `json:"state"`
	Governs  *string  `json:"governs"`
	Factor   *float64 `json:"factor"`
	Rely     *float64 `json:"rely_factor"`
	Choices  int      `json:"choices"` // 0: too many to try, the worst was searched
	Solved   int      `json:"solved"`
	Searched bool     `json:"searched"`
	BoundC   *float64 `json:"bound_c"`
	Text     string   `json:"text"`
}

type worstJSON struct {
	Case  string   `json:"case"`
	TempC *float64 `json:"temperature_c"` // null: no steady temperature exists
}

type largestJSON struct {
	SumA     *float64           `json:"sum_a"`
	RelyA    *float64           `json:"rely_sum_a"`
	Loads    map[string]float64 `json:"loads_a"`
	RelyLoad map[string]float64 `json:"rely_loads_a"`
	Governs  []string           `json:"governs"`
}

func whyOf(r *study.Ratings) whyJSON {
	out := whyJSON{AtDevice: append([]string{}, r.AtDevice...), Heaters: []heatingJSON{}, Cases: []caseJSON{}, Worst: map[string]worstJSON{}}
	if r.Heater != "" {
		out.Heater = &heaterJSON{r.Heater, r.HeaterShare}
	}
	if r.Heaters != nil {
		for _, row := range r.Heaters.Rows {
			h := heatingJSON{row.ID, row.RiseK, []shareJSON{}}
			for _, s := range row.Shares {
				h.Shares = append(h.Shares, shareJSON{s.From, s.K, s.Percent})
			}
			out.Heaters = append(out.Heaters, h)
		}
	}
	if r.Cases != nil {
		for i := range r.Cases.List {
			c := &r.Cases.List[i]
			out.Cases = append(out.Cases, caseJSON{
				c.ID, append([]string{}, c.Off...), c.State, text(c.Governs), number(c.Nominal.Factor), number(c.Rely.Factor), c.Of, c.Tried, c.Searched,
				number(c.BoundC), c.Sentence(),
			})
		}
		for _, w := range r.Cases.Worst {
			out.Worst[w.ID] = worstJSON{w.Case, number(w.TempC)}
		}
	}
	if l := r.Largest; l != nil && l.Nominal.Result != nil && l.Nominal.Result.Status == heat.Converged {
		out.Largest = &largestJSON{number(l.Nominal.Sum), number(l.Rely.Sum), map[string]float64{}, map[string]float64{}, append([]string{}, l.Rely.Governs...)}
		for i, v := range l.Nominal.Loads {
			out.Largest.Loads[v.ID], out.Largest.RelyLoad[v.ID] = floor6(v.A), floor6(l.Rely.Loads[i].A)
		}
	}
	return out
}

func floor6(a float64) float64 { return math.Floor(a*1e6) / 1e6 }
