package main

import (
	"math"

	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/study"
)

// rates is the JSON of `rate`.
type rates struct {
	Title      string                `json:"title"`
	State      string                `json:"state"`
	Answer     string                `json:"answer"`
	Amperes    string                `json:"amperes"`
	ScaleAll   scaleJSON             `json:"scale_all"`
	Conductors []ratedJSON           `json:"conductors"`
	Others     []bandedJSON          `json:"others"`
	Rules      []ruleJSON            `json:"rules"`
	Protection []protectedJSON       `json:"protection"`
	Faults     []faultJSON           `json:"soft_faults"`
	Inputs     []inputJSON           `json:"inputs"`
	Lowest     map[string]lowestJSON `json:"lowest"`
	MarginK    float64               `json:"design_margin_k"`
	Notes      []string              `json:"notes"`
	Caution    string                `json:"caution"`
	whyJSON
}

type scaleJSON struct {
	Factor      *float64 `json:"factor"` // null: nothing reaches its limit
	Rely        *float64 `json:"rely_factor"`
	Governs     *string  `json:"governs"`
	RelyGoverns *string  `json:"rely_governs"`
	Runaway     bool     `json:"runaway"`
}

type ratedJSON struct {
	ID        string      `json:"id"`
	LimitC    *float64    `json:"limit_c"`
	Permitted *float64    `json:"permitted_a"`
	Rely      *float64    `json:"rely_a"`
	One       *float64    `json:"one_at_a_time_a"`
	OneRely   *float64    `json:"one_at_a_time_rely_a"`
	Alone     *float64    `json:"alone_a"`
	Three     *float64    `json:"three_here_a"`
	Grouping  *float64    `json:"grouping_factor"`       // permitted_a / alone_a
	OfThree   *float64    `json:"grouping_factor_three"` // permitted_a / three_here_a
	BandC     *[2]float64 `json:"band_c"`
	Governs   *string     `json:"governs"`
}

type bandedJSON struct {
	ID    string      `json:"id"`
	TempC *float64    `json:"temperature_c"`
	BandC *[2]float64 `json:"band_c"`
}

type ruleJSON struct {
	Rule        string             `json:"rule"`
	Title       string             `json:"title"`
	Edition     string             `json:"edition"`
	Informative bool               `json:"informative"`
	Applies     bool               `json:"applies"`
	Why         string             `json:"why,omitempty"`
	Factor      *float64           `json:"factor"`
	Permitted   map[string]float64 `json:"permitted_a"`
	Counts      []string           `json:"counts"`
	Steps       []string           `json:"steps"`
	Fill        *fillJSON          `json:"fill"`
	Remarks     []string           `json:"remarks"`
}

type fillJSON struct {
	Share float64 `json:"share"`
	Limit float64 `json:"limit"`
	Text  string  `json:"text"`
}

type protectedJSON struct {
	Load    string   `json:"load"`
	Unknown bool     `json:"unknown"`
	Checks  []string `json:"checks"`
}

type faultJSON struct {
	Load    string   `json:"load"`
	A       float64  `json:"current_a"`
	Governs string   `json:"governs"`
	TempC   *float64 `json:"temperature_c"`
	LimitC  *float64 `json:"limit_c"`
	Runaway bool     `json:"runaway"`
}

type inputJSON struct {
	Name   string   `json:"name"`
	From   string   `json:"from"`
	To     string   `json:"to"`
	Stated bool     `json:"stated"`
	LowK   *float64 `json:"low_k"`  // change of the governing temperature at from
	HighK  *float64 `json:"high_k"` // and at to
}

type lowestJSON struct {
	A       *float64 `json:"a"`
	Because string   `json:"because"`
}

func ratesOf(r *study.Ratings) rates {
	out := rates{
		Title: r.Base.Title, State: r.State, MarginK: r.MarginK, Notes: append([]string{}, r.Base.Notes...), Caution: rating.Caution,
		ScaleAll: scaleJSON{
			number(r.All.Nominal.Factor), number(r.All.Rely.Factor), text(r.All.Nominal.Governs), text(r.All.Rely.Governs), r.All.Nominal.Runaway,
		},
		Conductors: []ratedJSON{}, Others: []bandedJSON{}, Rules: []ruleJSON{}, Protection: []protectedJSON{}, Faults: []faultJSON{}, Inputs: []inputJSON{},
		Lowest: map[string]lowestJSON{},
	}
	out.Answer, out.Amperes = r.Sentence()
	out.whyJSON = whyOf(r)
	for i := range r.Base.Conductors {
		out.Conductors = append(out.Conductors, ratedOf(r, i))
		l := r.Lowest[i]
		out.Lowest[l.ID] = lowestJSON{number(l.A), l.Because}
	}
	for k, o := range r.Base.Others {
		out.Others = append(out.Others, bandedJSON{o.ID, number(o.TempC), band(r, len(r.Base.Conductors)+k)})
	}
	for k := range r.Codes.Outcomes {
		out.Rules = append(out.Rules, ruleOf(r, k))
	}
	for _, p := range r.Protected {
		q := protectedJSON{p.Load, p.Unknown, []string{}}
		for _, c := range p.Checks {
			q.Checks = append(q.Checks, c.Text)
		}
		out.Protection = append(out.Protection, q)
	}
	for _, f := range r.Faults {
		out.Faults = append(out.Faults, faultJSON{f.Load, f.A, f.Governs, number(f.TempC), number(f.LimitC), f.Runaway})
	}
	if r.Bands != nil {
		for _, e := range r.Bands.Effects {
			low, high := r.Bands.AtGoverning(&e)
			out.Inputs = append(out.Inputs, inputJSON{e.Name, e.From, e.To, e.Stated, number(low), number(high)})
		}
	}
	return out
}

func band(r *study.Ratings, i int) *[2]float64 {
	low, high, ok := r.Band(i)
	if !ok || math.IsInf(high, 0) {
		return nil
	}
	return &[2]float64{low, high}
}

func ratedOf(r *study.Ratings, i int) ratedJSON {
	c := r.Base.Conductors[i]
	out := ratedJSON{ID: c.ID, LimitC: opt(c.LimitC), BandC: band(r, i), Governs: text(r.All.Nominal.Governs)}
	al := r.Alone[i]
	out.Alone, out.Three = number(al.One.NominalA), number(al.Three.NominalA)
	now := c.CurrentA.V
	if !(now > 0) {
		out.Governs = nil
		return out
	}
	out.Permitted, out.Rely = number(now*r.All.Nominal.Factor), number(now*r.All.Rely.Factor)
	out.Grouping, out.OfThree = number(now*r.All.Nominal.Factor/al.One.NominalA), number(now*r.All.Nominal.Factor/al.Three.NominalA)
	for _, l := range r.Loads {
		if l.ID == c.Load {
			out.One, out.OneRely = number(now*l.Nominal.Factor), number(now*l.Rely.Factor)
		}
	}
	return out
}

func ruleOf(r *study.Ratings, k int) ruleJSON {
	o := &r.Codes.Outcomes[k]
	out := ruleJSON{
		Rule: o.Rule, Title: o.Title, Edition: o.Edition, Informative: o.Informative, Applies: o.Applies, Why: o.Why, Factor: number(o.Factor),
		Permitted: map[string]float64{}, Counts: []string{}, Steps: []string{}, Remarks: []string{},
	}
	for _, n := range o.Counts {
		out.Counts = append(out.Counts, n.Text)
	}
	for _, w := range o.Conductors {
		if !math.IsNaN(w.A) {
			out.Permitted[w.ID] = quantity.RoundDown(w.A, 6)
		}
		for _, s := range w.Steps {
			out.Steps = append(out.Steps, w.ID+": "+s.Text)
		}
	}
	if f := o.Fill; f != nil {
		out.Fill = &fillJSON{f.Share, f.Limit, f.Text}
	}
	for _, m := range o.Remarks {
		out.Remarks = append(out.Remarks, m.Text)
	}
	return out
}
