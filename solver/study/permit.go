package study

import (
	"context"
	"fmt"
	"math"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// Pair is a ceiling twice: by the limits alone, and to rely on.
type Pair struct{ Nominal, Rely Ceiling }

// LoadPermit is what one load may carry with all others as given.
type LoadPermit struct {
	ID         string
	Conductors []string
	NowA       float64
	Pair
}

// Alone is what a conductor may carry in the same holder and surroundings with every other part taken out, or with two others like it beside it,
// all three loaded: the base of most tables. Parts that lie loose in a conduit or wireway come to lie on its floor.
type Alone struct {
	ID      string
	One     Amperes
	Three   Amperes // the part, of the top level, three times
	Governs string  // with one
	Why     string  // of currents that are not known: "an earth conductor"
}

// Amperes are a current twice: by the limits alone, and with the design margin kept. +Inf: nothing reaches its limit; NaN: not known.
type Amperes struct{ NominalA, RelyA float64 }

var noAmperes = Amperes{math.NaN(), math.NaN()}

// Permits is how much the conductors of a design may carry.
type Permits struct {
	Base    *rating.Result
	MarginK float64 // the design margin
	Spreads []Spread
	All     Pair         // all currents scaled together
	Loads   []LoadPermit // in the design's order; loads of a fixed heat or of no current left out
	Alone   []Alone      // in the order of Base.Conductors
}

// MarginK is the design margin of a document.
func MarginK(d *section.Document) float64 { return d.DesignMarginK.Or(DesignMarginK) }

// known refuses designs with currents that nobody wrote, unless idle is assumed, and with limits raised for no reason.
func known(r *rating.Result, o Options) error {
	if len(r.Unreasoned) > 0 {
		return &Refusal{[]section.Problem{{
			Rule: rating.RuleNoReason, IDs: r.Unreasoned, Key: "limit_c",
			What: "the limits of " + list(r.Unreasoned) + " are above the catalogue's and no reason is written",
			Do:   "write reasons: {limit …: why} for each, or a lower limit",
		}}}
	}
	if o.AssumeIdle || len(r.Unassigned) == 0 {
		return nil
	}
	return &Refusal{[]section.Problem{{
		Rule: "unknown-current", IDs: r.Unassigned, Key: "loads",
		What: "the currents of " + list(r.Unassigned) + " are unknown, and every rating depends on them",
		Do:   "write current_a, 0 where idle, or the rating of their protection, or assume them idle",
	}}}
}

// All finds how far all currents may be scaled together. base is the solution of d at standard accuracy; spreads belong to its things (nil:
// the design margin alone).
func (s *Study) All(ctx context.Context, d *section.Document, base *rating.Result, spreads []Spread, o Options) (Pair, error) {
	if err := known(base, o); err != nil {
		return Pair{}, err
	}
	return s.pair(ctx, s.engines[0], d, base, nil, spreads, 0, o)
}

// pair climbs twice: to the limits, then, from there, to what can be relied on. loads nil scales all.
func (s *Study) pair(ctx context.Context, e *rating.Engine, d *section.Document, base *rating.Result, loads []string, spreads []Spread, first float64, o Options) (p Pair, err error) {
	with := func(f float64) *section.Document { return scaleLoads(d, f, loads) }
	if !carries(d, loads) {
		none := Ceiling{Factor: math.Inf(1), Unbounded: true}
		return Pair{none, none}, nil
	}
	if p.Nominal, err = s.climb(ctx, e, base, with, nominal, first, o); err != nil {
		return p, err
	}
	room := rely(spreads, base.AmbientC, MarginK(d))
	guess := 0.0
	if f := p.Nominal.Factor; f > 0 && !math.IsInf(f, 1) {
		guess = f * relyGuess(p.Nominal, base.AmbientC, MarginK(d))
	}
	p.Rely, err = s.climb(ctx, e, base, with, room, guess, o)
	return p, err
}

// relyGuess is the factor from the nominal ceiling to one with the margin kept, if rises went with the square of currents.
func relyGuess(c Ceiling, ambientC, marginK float64) float64 {
	rise := c.LimitC - ambientC
	if rise <= 1.2*marginK {
		return 0.5
	}
	return math.Sqrt((rise - marginK) / rise)
}

// carries tells whether any of the loads has a current to scale.
func carries(d *section.Document, loads []string) bool {
	for i := range d.Loads {
		l := &d.Loads[i]
		if l.CurrentA.OK && l.CurrentA.V > 0 && (loads == nil || has(loads, l.ID)) {
			return true
		}
	}
	return false
}

// One finds how much each load may carry with the others as given.
func (s *Study) One(ctx context.Context, d *section.Document, base *rating.Result, spreads []Spread, o Options) ([]LoadPermit, error) {
	if err := known(base, o); err != nil {
		return nil, err
	}
	var out []LoadPermit
	for i := range d.Loads {
		if l := &d.Loads[i]; l.CurrentA.OK && l.CurrentA.V > 0 {
			out = append(out, LoadPermit{ID: l.ID, Conductors: l.Conductors, NowA: l.CurrentA.V})
		}
	}
	err := s.each(ctx, len(out), o, func(e *rating.Engine, i int) (err error) {
		out[i].Pair, err = s.pair(ctx, e, d, base, []string{out[i].ID}, spreads, 0, o)
		return err
	})
	return out, err
}

// AloneHere finds what each conductor may carry with every other part taken out. Those that then lie alike are solved once.
func (s *Study) AloneHere(ctx context.Context, d *section.Document, base *rating.Result, o Options) ([]Alone, error) {
	out := make([]Alone, len(base.Conductors))
	jobs := map[string]int{}
	var list []soloist
	of := make([]int, len(out))
	for i, c := range base.Conductors {
		if ctx.Err() != nil {
			return nil, context.Cause(ctx)
		}
		of[i] = -1
		job, why := s.soloist(d, c.ID)
		if out[i] = (Alone{ID: c.ID, One: noAmperes, Three: noAmperes, Why: why}); why != "" {
			continue
		}
		k, known := jobs[job.key]
		if !known {
			k = len(list)
			jobs[job.key], list = k, append(list, job)
		}
		of[i] = k
	}
	found := make([]Alone, len(list))
	err := s.each(ctx, len(list), o, func(e *rating.Engine, k int) (err error) {
		found[k], err = s.solo(ctx, e, &list[k], o)
		return err
	})
	for i, k := range of {
		if k < 0 {
			continue
		}
		a := found[k]
		if a.Governs == list[k].id {
			a.Governs = out[i].ID
		}
		a.ID = out[i].ID
		out[i] = a
	}
	return out, err
}

// soloist is a design with one conductor left.
type soloist struct {
	id   string
	nowA float64 // the current it starts from
	d    *section.Document
	key  string // equal for conductors that differ in name alone
}

// usualA starts a search for a conductor that carries nothing.
const usualA = 1

// soloist takes everything else out. why is not empty for what has no permitted current.
func (s *Study) soloist(d *section.Document, id string) (job soloist, why string) {
	now, hertz := usualA+0.0, section.Opt[float64]{}
	if p := section.Find(d, id); p != nil && p.Role == section.RoleEarth {
		return job, "an earth conductor"
	}
	if l := section.LoadOf(d, id); l != nil {
		if l.HeatWM.OK {
			return job, "its heat is fixed"
		}
		hertz = l.FrequencyHz
		if l.CurrentA.V > 0 {
			now = l.CurrentA.V
		}
	}
	job = soloist{id: id, nowA: now, d: rest(isolate(d, id, now, hertz), s.cat), key: id}
	if p := job.d.Parts; len(p) == 1 && p[0].ID == id {
		q, wire := p[0], section.Conductor{}
		if q.Conductor != nil {
			wire = *q.Conductor
		}
		q.ID, q.Conductor, q.Role, q.Group, q.Pinned = "", nil, "", "", false
		job.key = fmt.Sprintf("%v %v %v", q, wire, hertz)
	}
	return job, ""
}

func (s *Study) solo(ctx context.Context, e *rating.Engine, job *soloist, o Options) (Alone, error) {
	a := Alone{ID: job.id, One: noAmperes, Three: noAmperes}
	p, err := s.fromScratch(ctx, e, job.d, o)
	if err != nil {
		return a, err
	}
	a.One, a.Governs = Amperes{job.nowA * p.Nominal.Factor, job.nowA * p.Rely.Factor}, p.Nominal.Governs
	three, ok := thrice(job.d, s.cat)
	if !ok {
		return a, nil
	}
	if p, err = s.fromScratch(ctx, e, three, o); err == nil {
		a.Three = Amperes{job.nowA * p.Nominal.Factor, job.nowA * p.Rely.Factor}
	}
	return a, err
}

// fromScratch is pair for a design that nobody has solved.
func (s *Study) fromScratch(ctx context.Context, e *rating.Engine, d *section.Document, o Options) (Pair, error) {
	base, err := solveWith(ctx, e, d, o)
	if err != nil {
		return Pair{}, err
	}
	return s.pair(ctx, e, d, base, nil, nil, 0, o)
}
