package study

import (
	"context"
	"fmt"
	"math"
	"slices"
	"strings"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// What stops more parts from being put in.
const (
	StopsRule = "rule" // the fill that a rule permits
	StopsRoom = "room" // no place is left
	StopsHeat = "heat" // something has no more than the design margin left
)

// Fit is how many more of a part go in, each loaded like it.
type Fit struct {
	ID               string
	Rule, Room, Heat HowMany
	N                int    // the least of them
	Stops            string // what stops first; "" where nothing does
	RuleID           string // the rule set that Rule is by
	Next             string // catalogue id of the next holder that takes one more than N by the rule, "" for none
	NextName         string
	Doc              *section.Document // with N more
	Result           *rating.Result    // of Doc
}

// HowMany is a number of parts by one measure. Known is false where the measure says nothing; More: so many and maybe more, nobody counted on.
type HowMany struct {
	N           int
	Known, More bool
	Text        string
}

// mostMore is how many more are looked for.
const mostMore = 100

// Fit finds how many more of a part of the top level go into the holder: by the fill that rules permit, by finding places for them, and by
// temperature, each more one loaded like it and every step solved in full.
func (s *Study) Fit(ctx context.Context, d *section.Document, base *rating.Result, id string, o Options) (*Fit, error) {
	p := section.Find(d, id)
	if p == nil || strings.Contains(id, "/") {
		return nil, &Refusal{[]section.Problem{{
			Rule: "unknown-part", IDs: []string{id}, Key: "parts", What: "how many more of " + id + " fit can't be told: it is no part of the top level",
			Do: "name a core, cable or rod directly in the holder",
		}}}
	}
	d, loads, _ := AtDevices(d)
	if base == nil || len(loads) > 0 {
		var err error
		if base, err = s.solve(ctx, d, o); err != nil {
			return nil, err
		}
	}
	if err := known(base, o); err != nil {
		return nil, err
	}
	f := &filler{s: s, ctx: ctx, o: o, docs: []*section.Document{d}, solved: map[int]*rating.Result{0: base}, out: Fit{ID: id}}
	f.rule()
	if err := f.room(); err != nil {
		return nil, err
	}
	if err := f.heat(); err != nil {
		return nil, err
	}
	return f.finish()
}

type filler struct {
	s      *Study
	ctx    context.Context
	o      Options
	docs   []*section.Document // with 0, 1, 2 … more, all placed
	solved map[int]*rating.Result
	out    Fit
}

// outsides are the diameters of the parts of the top level, mm.
func (s *Study) outsides(d *section.Document) map[string]float64 {
	inv, _ := rating.Take(d, s.cat)
	out := map[string]float64{}
	for _, w := range inv.Wires {
		if w.Cable == "" {
			out[w.ID] = w.OutsideMM
		}
	}
	for _, b := range inv.Bulks {
		out[b.ID] = b.OutsideMM
	}
	return out
}

// rule: the least of what rules with a limit of fill let in.
func (f *filler) rule() {
	d := f.docs[0]
	c := f.s.Codes(d, f.o.Dir)
	across := f.s.outsides(d)[f.out.ID]
	f.out.Rule.Text = "no rule here limits the fill"
	for k := range c.Outcomes {
		r := &c.Outcomes[k]
		if !r.Applies || r.Fill == nil {
			continue
		}
		if n := r.Fill.MoreOf(across); !f.out.Rule.Known || n < f.out.Rule.N {
			f.out.Rule = HowMany{N: n, Known: true, Text: fmt.Sprintf("%d more by fill (%s, %s)", n, r.Title, r.Fill.Clause)}
			f.out.RuleID = r.Rule
		}
	}
	if !f.out.Rule.Known {
		if next, ok := f.s.larger(d.Holder.Stock); ok {
			f.out.Next, f.out.NextName = next.ID, next.Name
		}
		return
	}
	more := d
	for range f.out.Rule.N + 1 {
		more, _ = section.Duplicate(more, f.out.ID)
	}
	if next, _, ok := c.book.NextHolder(f.s.run(more), f.out.RuleID, f.s.cat); ok && next.ID != d.Holder.Stock {
		f.out.Next, f.out.NextName = next.ID, next.Name
	}
}

// room puts in one after the other while a place is found.
func (f *filler) room() error {
	switch f.docs[0].Holder.Kind {
	case section.NoHolder:
		f.out.Room = HowMany{Known: true, Text: "a bare part has no room for others"}
		return nil
	case section.OpenBundle, section.Apart:
		f.out.Room.Text = "nothing encloses the parts, so there is always room"
	}
	most := min(mostMore, section.MaxParts-len(section.UnfoldAll(f.docs[0])))
	for n := 1; n <= most; n++ {
		if f.ctx.Err() != nil {
			return context.Cause(f.ctx)
		}
		d, ok := f.s.oneMore(f.docs[n-1], f.out.ID)
		if !ok {
			break
		}
		f.docs = append(f.docs, d)
	}
	n := len(f.docs) - 1
	if f.out.Room.Text != "" {
		f.out.Room.More = true
		return nil
	}
	f.out.Room = HowMany{N: n, Known: true, More: n == mostMore, Text: fmt.Sprintf("%d more find a place", n)}
	if f.out.Room.More {
		f.out.Room.Text = fmt.Sprintf("%d or more find a place", n)
	}
	return nil
}

// oneMore adds a copy of a part at a free place, or, where there is none, lets all of them settle or lays them up anew.
func (s *Study) oneMore(d *section.Document, id string) (*section.Document, bool) {
	more, name := section.Duplicate(d, id)
	if name == "" {
		return d, false
	}
	across := s.outsides(more)
	inv, _ := rating.Take(d, s.cat)
	var discs []disc
	for i := range d.Parts {
		if p := &d.Parts[i]; p.At.OK {
			discs = append(discs, disc{p.ID, p.At.V.X, p.At.V.Y, across[p.ID] / 2})
		}
	}
	if len(discs) == len(d.Parts) && d.Holder.Kind != section.Apart && !d.Holder.Flat() {
		far := section.Point{X: math.Inf(1), Y: math.Inf(1)}
		in := insideOf(d, &inv.Holder)
		if list := free(discs, movable{id: name, outsideMM: across[name], at: far}, in); len(list) > 0 {
			at := slices.MinFunc(list, func(a, b section.Point) int { return in.before(a, b, discs) })
			return section.Move(more, name, section.Point{X: round3(at.X), Y: round3(at.Y)}), true
		}
	}
	at, err := rating.Settle(more, s.cat)
	if err != nil && d.Holder.Kind == section.Jacket {
		at, err = rating.LayUp(more, s.cat)
	}
	if err != nil {
		return d, false
	}
	return section.PlaceAll(more, at), true
}

// heat finds by bisection how many more leave everything its design margin.
func (f *filler) heat() error {
	margin := MarginK(f.docs[0])
	if _, _, ok := closest(things(f.solved[0]), nominal); !ok && f.solved[0].Status == heat.Converged {
		f.out.Heat.Text = "nothing here has a limit, so temperature says nothing"
		return nil
	}
	fits := func(n int) (bool, error) {
		r := f.solved[n]
		if r == nil {
			var err error
			if r, err = f.s.solve(f.ctx, f.docs[n], f.o); err != nil {
				return false, err
			}
			f.solved[n] = r
		}
		if r.Status == heat.ThermalRunaway {
			return false, nil
		}
		_, k, ok := closest(things(r), rely(nil, r.AmbientC, margin))
		return !ok || k >= 0, nil
	}
	lo, hi := -1, len(f.docs) // lo fits, hi does not or is not there
	for step := 1; hi-lo > 1; {
		n := (lo + hi) / 2
		if lo >= 0 && hi == len(f.docs) { // feel the way up
			n, step = min(lo+step, hi-1), 2*step
		} else if lo < 0 {
			n = 0
		}
		f.o.tell(min(len(f.solved), 8), 8)
		ok, err := fits(n)
		if err != nil {
			return err
		}
		switch {
		case ok:
			lo = n
		case n == 0:
			hi = 0
		default:
			hi = n
		}
	}
	n := max(lo, 0)
	f.out.Heat = HowMany{N: n, Known: true, More: hi == len(f.docs), Text: fmt.Sprintf("%d more by temperature, each loaded like %s and %s K kept below every limit", n, f.out.ID, trimmed(margin))}
	switch {
	case lo < 0:
		f.out.Heat.Text = fmt.Sprintf("none by temperature: something has less than %s K left already", trimmed(margin))
	case len(f.docs) == 1:
		f.out.Heat.Text = "temperature was not tried for more"
	case f.out.Heat.More:
		f.out.Heat.Text = fmt.Sprintf("temperature does not stop the %d that were tried, each loaded like %s", n, f.out.ID)
	}
	return nil
}

// finish finds what stops first.
func (f *filler) finish() (*Fit, error) {
	o := &f.out
	o.N = len(f.docs) - 1
	for _, m := range []struct {
		what string
		how  HowMany
	}{{StopsHeat, o.Heat}, {StopsRoom, o.Room}, {StopsRule, o.Rule}} { // what comes later wins a tie
		if m.how.Known && !m.how.More && m.how.N <= o.N {
			o.N, o.Stops = m.how.N, m.what
		}
	}
	o.Doc = f.docs[o.N]
	if o.Result = f.solved[o.N]; o.Result == nil {
		var err error
		if o.Result, err = f.s.solve(f.ctx, o.Doc, f.o); err != nil {
			return nil, err
		}
	}
	return o, nil
}

// Sentence says how many more fit and what stops them.
func (f *Fit) Sentence() string {
	by := map[string]string{StopsRule: "the rule's fill", StopsRoom: "room", StopsHeat: "temperature"}
	s := fmt.Sprintf("%d more like %s", f.N, f.ID)
	if f.Stops == "" {
		s += " were tried and nothing stopped them"
	} else {
		s += ": " + by[f.Stops] + " stops first"
	}
	for _, m := range []HowMany{f.Rule, f.Room, f.Heat} {
		if m.Text != "" {
			s += "; " + m.Text
		}
	}
	if f.NextName != "" && (f.Stops == StopsRule || f.Stops == StopsRoom) {
		s += "; next size: " + f.NextName
	}
	return s + "."
}
