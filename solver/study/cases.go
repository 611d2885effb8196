package study

import (
	"cmp"
	"context"
	"math"
	"slices"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Cases is what the named load cases of a design come to.
type Cases struct {
	List  []CaseAnswer // the design's own loads first (ID ""), then the document's order
	Worst []WorstCase  // per thing of the design's own result: conductors, then others
	// Smallest is how far all loads may be scaled together whichever case runs; NominalIn and RelyIn name the case that stops it, "" the design's
	// own loads.
	Smallest          Pair
	NominalIn, RelyIn string
}

// CaseAnswer is one case, with the worst choice of what it leaves open.
type CaseAnswer struct {
	ID  string
	Off []string // loads that any leaves off in the worst choice
	// Of is how many choices any allows, Tried how many were solved in full. With all of at most 2000 screened Searched is false; beyond that the
	// worst was searched and Of is 0.
	Of, Tried int
	Searched  bool
	BoundC    float64 // searched: estimate of what no choice takes the governing thing above, °C; else NaN
	Doc       *section.Document
	Result    *rating.Result
	State     string
	Governs   string // "" where nothing has a limit
	Pair
	spread []Spread
}

// WorstCase is the case in which a thing is hottest.
type WorstCase struct {
	ID    string
	Case  string // "" the design's own loads
	Off   []string
	TempC float64 // +Inf where no steady temperature exists
}

const (
	fewChoices = 12 // of a case, solved in full
	fewClimbs  = 3  // of those, climbed
)

// solved is one choice of a case, solved in full.
type solved struct {
	at  int // case, in Cases.List
	off []string
	doc *section.Document
	r   *rating.Result
	k   float64 // least room
	gov string
}

// Cases solves every load case of d in full and finds the worst for each thing. base is the solution of d, own how far its own loads may be
// scaled (nil: it is found here). nil where d names no case.
func (s *Study) Cases(ctx context.Context, d *section.Document, base *rating.Result, own *Pair, spreads []Spread, o Options) (*Cases, error) {
	if len(d.Cases) == 0 {
		return nil, nil
	}
	if err := known(base, o); err != nil {
		return nil, err
	}
	out := &Cases{List: []CaseAnswer{{Of: 1, Tried: 1, BoundC: math.NaN(), Doc: d, Result: base, spread: spreads}}}
	first := solved{doc: d, r: base}
	first.rank()
	all := []solved{first}
	for i := range d.Cases {
		c := &d.Cases[i]
		answer := CaseAnswer{ID: c.ID, BoundC: math.NaN(), spread: spreads}
		list, err := s.choices(ctx, d, c, &answer, o)
		if err != nil {
			return nil, err
		}
		for _, v := range list {
			v.at = len(out.List)
			all = append(all, v)
		}
		out.List = append(out.List, answer)
	}
	out.settle(base, all)
	if err := s.climbCases(ctx, out, all, own, spreads, o); err != nil {
		return nil, err
	}
	out.smallest()
	return out, nil
}

// rank notes the least room of a solution.
func (v *solved) rank() {
	v.k = math.Inf(1)
	if v.r.Status == heat.ThermalRunaway {
		v.k, v.gov = math.Inf(-1), v.r.RunawayAt
		return
	}
	list := things(v.r)
	if at, k, ok := closest(list, nominal); ok {
		v.k, v.gov = k, list[at].id
	}
}

// choices solves the choices of a case that are worth it.
func (s *Study) choices(ctx context.Context, d *section.Document, c *section.Case, answer *CaseAnswer, o Options) ([]solved, error) {
	doc := section.WithCase(d, c.ID)
	picks := [][]string{nil}
	var sc *screen
	var on []choice
	answer.Of = 1
	if len(c.Any) > 0 {
		p, factor, err := s.settling(ctx, shared(doc, c.Any), o)
		if err != nil {
			return nil, err
		}
		if p == nil {
			picks = [][]string{fallback(c.Any)}
		} else {
			sc = newScreen(p, c.Any, factor)
			on, answer.Searched = sc.worst(fewChoices)
			if answer.Of = sc.number(); answer.Searched {
				answer.Of = 0
			}
			picks = nil
			for _, v := range on {
				picks = append(picks, sc.off(v))
			}
			if len(picks) == 0 {
				picks = [][]string{fallback(c.Any)}
			}
		}
	}
	list := make([]solved, len(picks))
	err := s.each(ctx, len(list), o, func(e *rating.Engine, i int) (err error) {
		v := &list[i]
		v.off, v.doc = picks[i], section.SwitchOff(doc, picks[i]...)
		if v.r, err = solveWith(ctx, e, v.doc, o); err == nil {
			v.rank()
		}
		return err
	})
	answer.Tried = len(list)
	if err == nil && answer.Searched {
		answer.BoundC = bound(sc, on, list)
	}
	return list, err
}

// settling is a working point at the largest currents tried that have a steady temperature, and their factor; nil if none was found.
func (s *Study) settling(ctx context.Context, d *section.Document, o Options) (*rating.Point, float64, error) {
	factor := 1.0
	for range 6 {
		p, r, err := s.point(ctx, scaleAll(d, factor), o)
		if err != nil || p != nil || r.Status != heat.ThermalRunaway || !(r.Settles > 0) {
			return p, factor, err
		}
		factor *= 0.8 * min(r.Settles, 1)
	}
	return nil, factor, nil
}

// fallback leaves the last loads of each group off.
func fallback(any []section.AnyOf) (off []string) {
	for _, g := range any {
		off = append(off, g.Of[min(g.Count, len(g.Of)):]...)
	}
	return off
}

// bound estimates what no choice takes the governing thing of the worst solved choice above: the loads that add most to it, moved by what the
// first order missed in the solutions.
func bound(sc *screen, on []choice, list []solved) float64 {
	w := slices.MinFunc(list, byRoom)
	if w.r.Status != heat.Converged {
		return math.NaN()
	}
	i := slices.IndexFunc(sc.list, func(t thing) bool { return t.id == w.gov })
	if i < 0 {
		return math.NaN()
	}
	miss, hot := math.Inf(-1), math.Inf(-1)
	for n, v := range list {
		if l := things(v.r); i < len(l) && !math.IsNaN(l[i].tempC) {
			miss, hot = math.Max(miss, l[i].tempC-sc.temp(i, on[n])), math.Max(hot, l[i].tempC)
		}
	}
	return math.Max(hot, sc.temp(i, sc.hottest(i))+miss)
}

func byRoom(a, b solved) int {
	return cmp.Compare(a.k, b.k)
}

// settle takes the worst choice of each case, and the worst case of each thing.
func (c *Cases) settle(base *rating.Result, all []solved) {
	for i := range c.List {
		a := &c.List[i]
		var mine []solved
		for _, v := range all {
			if v.at == i {
				mine = append(mine, v)
			}
		}
		w := slices.MinFunc(mine, byRoom)
		a.Off, a.Doc, a.Result, a.Governs = w.off, w.doc, w.r, w.gov
		a.State = StateOf(w.r, a.spread)
	}
	for i, t := range things(base) {
		w := WorstCase{ID: t.id, TempC: math.Inf(-1)}
		for _, v := range all {
			at := math.Inf(1)
			if v.r.Status == heat.Converged {
				list := things(v.r)
				if i >= len(list) || list[i].id != t.id {
					continue
				}
				at = list[i].tempC
			}
			if at > w.TempC {
				w.TempC, w.Case, w.Off = at, c.List[v.at].ID, v.off
			}
		}
		c.Worst = append(c.Worst, w)
	}
}

// climbCases finds how far the loads of each case may be scaled: of its choices with the least room, one for each thing that governs.
func (s *Study) climbCases(ctx context.Context, c *Cases, all []solved, own *Pair, spreads []Spread, o Options) error {
	var jobs []solved
	for i := range c.List {
		if i == 0 && own != nil {
			c.List[0].Pair = *own
			continue
		}
		var mine []solved
		for _, v := range all {
			if v.at == i {
				mine = append(mine, v)
			}
		}
		slices.SortStableFunc(mine, byRoom)
		seen := map[string]bool{}
		for _, v := range mine {
			if !seen[v.gov] && len(seen) < fewClimbs {
				seen[v.gov] = true
				jobs = append(jobs, v)
			}
		}
	}
	found := make([]Pair, len(jobs))
	err := s.each(ctx, len(jobs), o, func(e *rating.Engine, i int) (err error) {
		found[i], err = s.pair(ctx, e, jobs[i].doc, jobs[i].r, nil, spreads, 0, o)
		return err
	})
	if err != nil {
		return err
	}
	set := map[int]bool{}
	for i, p := range found {
		a := &c.List[jobs[i].at]
		if !set[jobs[i].at] || p.Nominal.Factor < a.Nominal.Factor {
			a.Nominal = p.Nominal
		}
		if !set[jobs[i].at] || p.Rely.Factor < a.Rely.Factor {
			a.Rely = p.Rely
		}
		set[jobs[i].at] = true
	}
	return nil
}

func (c *Cases) smallest() {
	for i := range c.List {
		a := &c.List[i]
		if i == 0 || a.Nominal.Factor < c.Smallest.Nominal.Factor {
			c.Smallest.Nominal, c.NominalIn = a.Nominal, a.ID
		}
		if i == 0 || a.Rely.Factor < c.Smallest.Rely.Factor {
			c.Smallest.Rely, c.RelyIn = a.Rely, a.ID
		}
	}
}
