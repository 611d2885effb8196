package study

import (
	"context"
	"math"
	"slices"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/rules"
	"packrise/solver/section"
)

// State words of a rated answer.
const (
	Within    = "within" // P95 of everything is inside its limit
	Close     = "close"  // what is most likely is inside, P95 of something is not
	Over      = "over"
	Undecided = "undecided" // currents are unknown, or nothing has a limit
)

// Ratings is how much the conductors of a design may carry, how sure that is, and what the codes say.
type Ratings struct {
	Permits
	Doc   *section.Document
	Bands *Bands // at the currents as given; nil where no steady temperature exists
	// State is the worst of the loads as written and of every case; StateHere that of the loads as written.
	State, StateHere string
	AtDevice         []string // loads of unknown current, taken at the rating of their device: Doc has it, and a note of Base says so

	Heaters *Heaters
	// Heater is the load that does most of the heating of the governing thing, where that makes little heat of its own: "A heats, B suffers".
	Heater      string
	HeaterShare int    // percent
	Cases       *Cases // nil without any; All is then how far all loads may be scaled whichever case runs

	Codes     *Codes
	Lowest    []Lowest // in the order of Base.Conductors
	Protected []rules.Protected
	Faults    []SoftFault
	Largest   *Largest // sum of the loads' currents; nil where fewer than two carry one
	// Done tells how far the answer is: what a later stage brings is nil until then.
	Done Stage
}

// Stage of a rating, in order.
type Stage int

// Stages.
const (
	StageAll     Stage = iota + 1 // all scaled together, by the limits and the design margin
	StageBands                    // the bands, and what may be relied on with them
	StageHeaters                  // who heats whom
	StageCases                    // the load cases
	StageLoads                    // each load with the others as given
	StageCodes                    // code tables, terminals, devices, and the lowest of all
	StageAlone                    // each conductor alone here, and three of it
	StageFaults                   // each circuit at the tripping current of its device
	StageLargest                  // the largest sum of the loads' currents
)

// Last is the last stage.
const Last = StageLargest

// Rate answers in stages; o.Stage, if there is one, gets a copy after each. base may be nil, or the solution of d at standard accuracy.
func (s *Study) Rate(ctx context.Context, d *section.Document, base *rating.Result, o Options) (*Ratings, error) {
	r := &rater{s: s, ctx: ctx, o: o, out: Ratings{Doc: d}}
	if err := r.start(base); err != nil {
		return nil, err
	}
	for _, stage := range []struct {
		is Stage
		do func() error
	}{
		{StageAll, r.all},
		{StageBands, r.bands},
		{StageHeaters, r.heaters},
		{StageCases, r.cases},
		{StageLoads, r.loads},
		{StageCodes, r.codes},
		{StageAlone, r.alone},
		{StageFaults, r.faults},
		{StageLargest, r.largest},
	} {
		if err := stage.do(); err != nil {
			return nil, err
		}
		r.out.Done = stage.is
		if o.Stage != nil {
			c := r.out
			o.Stage(&c)
		}
	}
	return &r.out, nil
}

type rater struct {
	s   *Study
	ctx context.Context
	o   Options
	out Ratings
}

func (r *rater) start(base *rating.Result) (err error) {
	d, loads, notes := AtDevices(r.out.Doc)
	if len(loads) > 0 {
		r.out.Doc, r.out.AtDevice, base = d, loads, nil
	}
	if base == nil {
		if base, err = r.s.solve(r.ctx, d, r.o); err != nil {
			return err
		}
	}
	if len(notes) > 0 {
		c := *base
		c.Notes = append(slices.Clone(notes), base.Notes...)
		base = &c
	}
	r.out.Base, r.out.MarginK = base, MarginK(d)
	return known(base, r.o)
}

func (r *rater) all() (err error) {
	r.out.All, err = r.s.All(r.ctx, r.out.Doc, r.out.Base, nil, r.o)
	r.judged(StateOf(r.out.Base, nil))
	return err
}

func (r *rater) judged(state string) { r.out.State, r.out.StateHere = state, state }

// bands finds the bands as loaded and, at what may be relied on, those that decide it: there they are found anew, since they do not grow
// exactly with the rise.
func (r *rater) bands() (err error) {
	d, s := r.out.Doc, r.s
	if r.out.Base.Status == heat.Converged {
		if r.out.Bands, err = s.Bands(r.ctx, d, r.out.Base, r.o); err != nil {
			return err
		}
		r.judged(StateOf(r.out.Base, r.out.Bands.Spreads))
	}
	f := r.out.All.Rely.Factor
	if f <= 0 || math.IsInf(f, 1) {
		if r.out.Bands != nil {
			r.out.Spreads = r.out.Bands.Spreads
		}
		return nil
	}
	for range 2 {
		there := scaleAll(d, f)
		at, err := s.solve(r.ctx, there, r.o)
		if err != nil {
			return err
		}
		if at.Status != heat.Converged {
			return nil
		}
		b, err := s.Bands(r.ctx, there, at, r.o)
		if err != nil {
			return err
		}
		r.out.Spreads = b.Spreads
		with := func(g float64) *section.Document { return scaleAll(d, g*f) }
		c, err := s.climb(r.ctx, s.engines[0], at, with, rely(b.Spreads, at.AmbientC, r.out.MarginK), 0, r.o)
		if err != nil {
			return err
		}
		c.Factor *= f
		r.out.All.Rely = c
		if c.Factor <= 0 || math.Abs(c.Factor/f-1) < 0.05 {
			return nil
		}
		f = c.Factor
	}
	return nil
}

// heaters finds who heats whom, and who heats what governs.
func (r *rater) heaters() (err error) {
	at, ok := r.out.governing()
	if !ok || r.out.Base.Status != heat.Converged {
		return nil
	}
	id := things(r.out.Base)[at].id
	if r.out.Heaters, err = r.s.HeatersWith(r.ctx, r.out.Doc, id, r.o); err != nil {
		return err
	}
	if load, percent, ok := r.out.Heaters.heater(r.out.Doc, id); ok {
		r.out.Heater, r.out.HeaterShare = load, percent
	}
	return nil
}

// cases solves the load cases. How far all loads may be scaled is then so whichever case runs.
func (r *rater) cases() (err error) {
	own := r.out.All
	c, err := r.s.Cases(r.ctx, r.out.Doc, r.out.Base, &own, r.out.Spreads, r.o)
	if err != nil || c == nil {
		return err
	}
	r.out.Cases, r.out.All = c, c.Smallest
	for i := range c.List[1:] {
		r.out.State = worse(r.out.State, c.List[1+i].State)
	}
	return nil
}

// worse is the more serious of two states.
func worse(a, b string) string {
	order := []string{Within, Undecided, Close, Over}
	if slices.Index(order, b) > slices.Index(order, a) {
		return b
	}
	return a
}

func (r *rater) loads() (err error) {
	r.out.Loads, err = r.s.One(r.ctx, r.out.Doc, r.out.Base, r.out.Spreads, r.o)
	return err
}

func (r *rater) codes() error {
	c := r.s.Codes(r.out.Doc, r.o.Dir)
	r.out.Codes = c
	r.out.Lowest = lowest(&r.out.Permits, c)
	r.out.Protected = c.Protect(permitted(&r.out.Permits, c))
	return nil
}

func (r *rater) faults() (err error) {
	r.out.Faults, err = r.s.SoftFaults(r.ctx, r.out.Doc, r.o)
	return err
}

func (r *rater) largest() (err error) {
	n := 0
	for i := range r.out.Doc.Loads {
		if r.out.Doc.Loads[i].CurrentA.V > 0 {
			n++
		}
	}
	if n > 1 {
		r.out.Largest, err = r.s.Largest(r.ctx, r.out.Doc, r.out.Base, r.out.Spreads, nil, r.o)
	}
	return err
}

func (r *rater) alone() (err error) {
	r.out.Alone, err = r.s.AloneHere(r.ctx, r.out.Doc, r.out.Base, r.o)
	return err
}

// StateOf judges a solution with the bands of its things (nil: without).
func StateOf(r *rating.Result, spreads []Spread) string {
	if r.Over() {
		return Over
	}
	at, _, ok := closest(things(r), rely(spreads, r.AmbientC, 0))
	switch {
	case !ok || len(r.Unassigned) > 0 || r.Status != heat.Converged:
		return Undecided
	case rely(spreads, r.AmbientC, 0)(at, things(r)[at]) < 0:
		return Close
	}
	return Within
}
