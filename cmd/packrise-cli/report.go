package main

import (
	"math"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// report is the JSON of `solve`: the contract with scripts. What does not apply is null.
type report struct {
	Title      string          `json:"title"`
	AmbientC   float64         `json:"ambient_c"`
	Conductors []conductorJSON `json:"conductors"`
	Others     []otherJSON     `json:"others"`
	Sides      map[string]side `json:"sides"`
	Surface    surfaceJSON     `json:"surface"`
	Balance    balanceJSON     `json:"balance"`
	Hottest    *string         `json:"hottest"`
	Governs    *governsJSON    `json:"governs"`
	Status     string          `json:"status"`
	Runaway    *runawayJSON    `json:"runaway"`
	Unassigned []string        `json:"unassigned"`
	Notes      []string        `json:"notes"`
	Caution    string          `json:"caution"`
	Unknowns   int             `json:"unknowns"`
	ErrorK     *float64        `json:"estimated_error_k"`
	Seconds    float64         `json:"seconds"`
}

type conductorJSON struct {
	ID         string   `json:"id"`
	TempC      *float64 `json:"temperature_c"`
	LimitC     *float64 `json:"limit_c"`
	HeatWM     *float64 `json:"heat_w_m"`
	CurrentA   *float64 `json:"current_a"`
	Resistance *float64 `json:"resistance_ohm_m"`
	Load       *string  `json:"load"`
}

type otherJSON struct {
	ID       string   `json:"id"`
	Kind     string   `json:"kind"`
	TempC    *float64 `json:"temperature_c"`
	LimitC   *float64 `json:"limit_c"`
	Absorbed *float64 `json:"absorbed_w_m,omitempty"`
}

type side struct {
	Released float64 `json:"released_w_m"`
}

type surfaceJSON struct {
	TempC *float64 `json:"temperature_c"`
	Film  *float64 `json:"film_w_m2k"`
}

type balanceJSON struct {
	Generated float64 `json:"generated_w_m"`
	Released  float64 `json:"released_w_m"`
	Absorbed  float64 `json:"absorbed_w_m"`
}

type governsJSON struct {
	Part    string  `json:"part"`
	TempC   float64 `json:"temperature_c"`
	LimitC  float64 `json:"limit_c"`
	MarginK float64 `json:"margin_k"`
}

type runawayJSON struct {
	Part    string  `json:"part"`
	Settles float64 `json:"largest_factor_that_settles"`
}

// number is nil for what is not a finite number, since JSON has no NaN.
func number(v float64) *float64 {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return nil
	}
	return &v
}

func opt(v section.Opt[float64]) *float64 {
	if !v.OK {
		return nil
	}
	return number(v.V)
}

func text(s string) *string {
	if s == "" {
		return nil
	}
	return &s
}

func reportOf(r *rating.Result) report {
	out := report{
		Title: r.Title, AmbientC: r.AmbientC, Surface: surfaceJSON{number(r.SurfaceC), opt(r.FilmWM2K)},
		Conductors: []conductorJSON{}, Others: []otherJSON{},
		Balance: balanceJSON{r.Generated, r.Released, r.Absorbed}, Hottest: text(r.Hottest), Status: r.Status.String(),
		Unassigned: append([]string{}, r.Unassigned...), Notes: append([]string{}, r.Notes...), Caution: rating.Caution,
		Unknowns: r.Unknowns, ErrorK: number(r.ErrorK), Seconds: r.Seconds,
	}
	for _, c := range r.Conductors {
		out.Conductors = append(out.Conductors, conductorJSON{
			c.ID, number(c.TempC), opt(c.LimitC), number(c.HeatWM), opt(c.CurrentA), number(c.ResistanceOhm), text(c.Load),
		})
	}
	for _, o := range r.Others {
		out.Others = append(out.Others, otherJSON{o.ID, o.Kind, number(o.TempC), opt(o.LimitC), opt(o.AbsorbedWM)})
	}
	if r.Sides != nil {
		out.Sides = map[string]side{}
		for name, w := range r.Sides {
			out.Sides[name] = side{w}
		}
	}
	if g := r.Governing; g != nil {
		out.Governs = &governsJSON{g.Part, g.TempC, g.LimitC, g.MarginK}
	}
	if r.RunawayAt != "" {
		out.Runaway = &runawayJSON{r.RunawayAt, r.Settles}
	}
	return out
}
