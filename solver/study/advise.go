package study

import (
	"cmp"
	"context"
	"errors"
	"fmt"
	"math"
	"slices"

	"packrise/solver/heat"
	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Advice is what to change first.
type Advice struct {
	Base    *rating.Result // at Factor
	Governs string         // now; "" where nothing has a limit
	RoomK   float64
	Case    string   // the load case that all is compared in, the worst; "" the loads as written
	Changes []Change // best first; every one of them helps
	// Factor is 1; where the loads as written have no steady temperature, all is compared with all currents at this factor.
	Factor   float64
	Screened int // changes looked at
	Solved   int // of them solved in full
}

const (
	mostChanges = 10
	mostSolved  = 24
	leastGainK  = 0.2
	lowerK      = 5.0
)

// mostOf is how many changes of a kind are solved, so that no kind crowds out the rest.
var mostOf = map[string]int{ChangeOff: 2, ChangeOut: 2, ChangeCut: 3, ChangeUpsize: 3, ChangeSwap: 4, ChangeMove: 2}

// asBuilt are the kinds that leave the section as it is: solved first, while what is prepared for it is warm.
var asBuilt = []string{ChangeOff, ChangeCut, ChangeAmbient}

// candidate is a change that might help.
type candidate struct {
	kind   string
	ids    []string
	text   string
	room   float64 // least room that the first order expects
	always bool    // the first order knows nothing of it: solved in any case
	make   func(d *section.Document) (*section.Document, bool)
}

// adviser holds the working point that changes are screened at.
type adviser struct {
	s    *Study
	ctx  context.Context
	o    Options
	d    *section.Document // as written
	w    *section.Document // as it is solved: see work
	off  []string          // loads that the case leaves off by choice
	p    *rating.Point
	e    [][]float64 // K per W/m with resistances following
	list []thing
	at   int // governing
	room float64
	out  Advice
	cand []candidate
}

// Advise looks at every single change that might help, screens them to first order, solves the best in full and ranks them by what they gain:
// the least room of anything, in kelvins. Of a design with load cases the worst is taken. base may be nil.
func (s *Study) Advise(ctx context.Context, d *section.Document, base *rating.Result, o Options) (*Advice, error) {
	a := &adviser{s: s, ctx: ctx, o: o, d: d, out: Advice{Factor: 1}}
	if err := a.situation(base); err != nil {
		return nil, err
	}
	if err := a.start(); err != nil || a.out.Governs == "" {
		return &a.out, err
	}
	for _, look := range []func(){a.loads, a.cables, a.idle, a.sizes, a.classes, a.outside, a.split, a.swaps, a.moves} {
		if look(); ctx.Err() != nil {
			return nil, context.Cause(ctx)
		}
	}
	a.out.Screened = len(a.cand)
	if err := a.solve(a.pick()); err != nil {
		return nil, err
	}
	return &a.out, nil
}

// situation takes the case with the least room, with the worst choice of what it leaves open, if that is worse than the loads as written.
func (a *adviser) situation(base *rating.Result) error {
	d, loads, _ := AtDevices(a.d)
	if len(d.Cases) == 0 {
		return nil
	}
	worst := solved{r: base}
	if base == nil || len(loads) > 0 {
		var err error
		if worst.r, err = a.s.solve(a.ctx, d, a.o); err != nil {
			return err
		}
	}
	if err := known(worst.r, a.o); err != nil {
		return err
	}
	worst.rank()
	for i := range d.Cases {
		var answer CaseAnswer
		list, err := a.s.choices(a.ctx, d, &d.Cases[i], &answer, a.o)
		if err != nil {
			return err
		}
		for _, v := range list {
			if v.k < worst.k {
				worst = v
				a.out.Case, a.off = d.Cases[i].ID, v.off
			}
		}
	}
	return nil
}

// start finds the working point: the design as it is, or, where it has no steady temperature, at lower currents.
func (a *adviser) start() error {
	p, factor, err := a.s.settling(a.ctx, a.work(a.d), a.o)
	if err != nil {
		return err
	}
	a.out.Factor = factor
	if a.w = a.work(a.d); p == nil {
		a.out.Base, err = a.s.solve(a.ctx, a.w, a.o)
		return err
	}
	a.p, a.out.Base = p, p.Result
	if err := known(p.Result, a.o); err != nil {
		return err
	}
	a.list, a.e = things(a.p.Result), answers(a.p)
	at, k, ok := closest(a.list, nominal)
	if ok {
		a.at, a.room, a.out.Governs, a.out.RoomK = at, k, a.list[at].id, k
	}
	return nil
}

// work is what is solved of a design: unknown currents at their devices' ratings, in the worst case, all at the factor.
func (a *adviser) work(d *section.Document) *section.Document {
	d, _, _ = AtDevices(d)
	if a.out.Case != "" {
		d = section.SwitchOff(section.WithCase(d, a.out.Case), a.off...)
	}
	if a.out.Factor == 1 {
		return d
	}
	return scaleAll(d, a.out.Factor)
}

func (a *adviser) add(c candidate) { a.cand = append(a.cand, c) }

// expect is the least room when heats (W/m per source) change by dq; without names things that are then gone.
func (a *adviser) expect(dq map[int]float64, without []string) float64 {
	order := make([]int, 0, len(dq))
	for j := range dq {
		order = append(order, j)
	}
	slices.Sort(order)
	k := math.Inf(1)
	for i, t := range a.list {
		if !t.limit.OK || math.IsNaN(t.tempC) || has(without, t.id) {
			continue
		}
		c := t.tempC
		for _, j := range order {
			c += answer(a.p, a.e, i, j) * dq[j]
		}
		k = math.Min(k, t.limit.V-c)
	}
	return k
}

// pick chooses what to solve: what the screen can't tell, and the best of the rest.
func (a *adviser) pick() (out []candidate) {
	kinds := map[string]int{}
	for _, c := range a.cand {
		if c.always {
			out = append(out, c)
			kinds[c.kind]++
		}
	}
	order := slices.Clone(a.cand)
	slices.SortStableFunc(order, func(x, y candidate) int {
		return cmp.Compare(y.room, x.room)
	})
	for _, c := range order {
		if !c.always && c.room > a.room+leastGainK && len(out) < mostSolved && kinds[c.kind] < mostOf[c.kind] {
			kinds[c.kind]++
			out = append(out, c)
		}
	}
	rebuilt := func(c candidate) bool { return !has(asBuilt, c.kind) }
	return append(slices.DeleteFunc(slices.Clone(out), rebuilt), slices.DeleteFunc(out, func(c candidate) bool { return !rebuilt(c) })...)
}

// solve makes, solves and ranks the changes that were picked.
func (a *adviser) solve(picked []candidate) error {
	done := make([]*Change, len(picked))
	err := a.s.each(a.ctx, len(picked), a.o, func(e *rating.Engine, i int) error {
		doc, ok := picked[i].make(a.d)
		if !ok || doc == a.d {
			return nil
		}
		r, err := solveWith(a.ctx, e, a.work(doc), a.o)
		var no *Refusal
		switch {
		case errors.As(err, &no): // it can't be built like that
			return nil
		case err != nil:
			return err
		}
		done[i] = a.judge(&picked[i], doc, r)
		return nil
	})
	if err != nil {
		return err
	}
	for _, c := range done {
		if c != nil {
			a.out.Solved++
			if c.GainK >= leastGainK {
				a.out.Changes = append(a.out.Changes, *c)
			}
		}
	}
	slices.SortStableFunc(a.out.Changes, func(x, y Change) int { // by twentieths of a kelvin, so that the last digits of a solution decide nothing
		return cmp.Compare(math.Round(20*y.GainK), math.Round(20*x.GainK))
	})
	a.out.Changes = a.out.Changes[:min(len(a.out.Changes), mostChanges)]
	return nil
}

// Now says how it stands before any change.
func (a *Advice) Now() string {
	at := ""
	if a.Case != "" {
		at = "In case " + a.Case + ", the worst: "
	}
	if a.Factor < 1 {
		at += fmt.Sprintf("no steady temperature exists with all of the currents; all is compared with %s of them. ", Percent(a.Factor))
	}
	if a.Base.Status == heat.ThermalRunaway {
		return at + "No steady temperature was found at any of the currents tried, so nothing can be compared."
	}
	if a.Governs == "" {
		return at + "Nothing here has a limit, so nothing tells what would help."
	}
	list := things(a.Base)
	i := slices.IndexFunc(list, func(t thing) bool { return t.id == a.Governs })
	t := list[i]
	return fmt.Sprintf("%s%s governs: %s °C, limit %s °C.", at, t.id, quantity.Trimmed(quantity.BesideLimit(t.tempC, t.limit.V), 1), quantity.Trimmed(t.limit.V, 1))
}

// Looked says what was looked at.
func (a *Advice) Looked() string {
	what := fmt.Sprintf("Of %s looked at, %d were solved in full and %d helped; each is one change by itself.", count(a.Screened, "change"), a.Solved, len(a.Changes))
	if a.Governs != "" && len(a.Changes) == 0 {
		what = fmt.Sprintf("Of %s looked at, none helps by %s K or more.", count(a.Screened, "change"), quantity.Trimmed(leastGainK, 1))
	}
	return what
}
