package study

import (
	"cmp"
	"context"
	"fmt"
	"math"
	"slices"
	"strings"

	"packrise/solver/heat"
	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Around is the source of what sun, warm sides and the like do with every load off.
const Around = "surroundings"

// Heaters tells who heats whom.
type Heaters struct {
	// Rows are the conductors of the result, in its order, and behind them the thing that was asked for if it is no conductor.
	Rows []Heating
	// Unknown are conductors whose currents nobody wrote: what they add is in no row.
	Unknown []string
}

// Heating is where the rise of one thing comes from.
type Heating struct {
	ID      string
	RiseK   float64     // over the ambient
	CooledK float64     // how far below the ambient it would be with every load off; the shares are then of RiseK + CooledK
	Shares  []HeatShare // largest first; percents add to exactly 100; empty where nothing rises
}

// HeatShare is what one source does. From is a conductor, Around, or, in a row that is no conductor, a load.
type HeatShare struct {
	From    string
	K       float64
	Percent int
}

// Of returns the row of a thing.
func (h *Heaters) Of(id string) (Heating, bool) {
	if h == nil {
		return Heating{}, false
	}
	i := slices.IndexFunc(h.Rows, func(r Heating) bool { return r.ID == id })
	if i < 0 {
		return Heating{}, false
	}
	return h.Rows[i], true
}

// Percent returns the share of a source, 0 for none.
func (h Heating) Percent(from string) int {
	for _, s := range h.Shares {
		if s.From == from {
			return s.Percent
		}
	}
	return 0
}

// Heaters splits the rise of every conductor of d, whose solution is base (nil: it is solved here), over what heats it, and that of the governing
// thing if it is no conductor. nil where no steady temperature exists.
func (s *Study) Heaters(ctx context.Context, d *section.Document, base *rating.Result, o Options) (*Heaters, error) {
	if base == nil {
		var err error
		if base, err = s.solve(ctx, d, o); err != nil {
			return nil, err
		}
	}
	at := ""
	if base.Governing != nil {
		at = base.Governing.Part
	}
	return s.HeatersWith(ctx, d, at, o)
}

// HeatersWith is Heaters with a row for another thing than the governing one: a layer, the outside, a rod.
//
// What all loads together add to a thing, over what it is with every load off, is split by K_ij·q_j: the influence matrix at the answer times
// the heats. A thing that is no conductor has no row in the matrix; how it answers to half the heat of each load is solved in full.
func (s *Study) HeatersWith(ctx context.Context, d *section.Document, thing string, o Options) (*Heaters, error) {
	p, r, err := s.point(ctx, d, o)
	if err != nil || p == nil {
		return nil, err
	}
	off, err := s.solve(ctx, allOff(d), o)
	if err != nil || off.Status == heat.ThermalRunaway { // with no heat at all a solution may stop early, and is right
		return nil, err
	}
	h := &Heaters{Unknown: r.Unassigned}
	for i, c := range r.Conductors {
		var from []HeatShare
		for j := range p.Sources {
			if k := p.K[i][j] * r.Conductors[j].HeatWM; k > 0 {
				from = append(from, HeatShare{From: r.Conductors[j].ID, K: k})
			}
		}
		h.Rows = append(h.Rows, heating(c.ID, c.TempC, off.Conductors[i].TempC, r.AmbientC, from))
	}
	if _, ok := h.Of(thing); ok || thing == "" {
		return h, nil
	}
	row, ok, err := s.heatingOf(ctx, d, r, off, thing, o)
	if ok {
		h.Rows = append(h.Rows, row)
	}
	return h, err
}

// point is a solution with its influence matrix, or nil with how it ended.
func (s *Study) point(ctx context.Context, d *section.Document, o Options) (*rating.Point, *rating.Result, error) {
	p, r, problems, err := s.engines[0].Point(ctx, d, o.rating())
	switch {
	case err != nil:
		return nil, nil, err
	case r == nil:
		return nil, nil, &Refusal{refused(problems)}
	case r.Status == heat.Cancelled:
		return nil, nil, context.Cause(ctx)
	}
	return p, r, nil
}

// allOff switches every load off, fixed heats too.
func allOff(d *section.Document) *section.Document {
	return section.SwitchOff(d, loadIDs(d)...)
}

func loadIDs(d *section.Document) (out []string) {
	for i := range d.Loads {
		out = append(out, d.Loads[i].ID)
	}
	return out
}

// heatingOf is the row of a thing that is no conductor.
func (s *Study) heatingOf(ctx context.Context, d *section.Document, r, off *rating.Result, id string, o Options) (Heating, bool, error) {
	is := func(t thing) bool { return t.id == id }
	i := slices.IndexFunc(things(r), is)
	if i < 0 || i >= len(things(off)) {
		return Heating{}, false, nil
	}
	now := things(r)[i].tempC
	var loads []string
	for k := range d.Loads {
		if l := &d.Loads[k]; l.CurrentA.V > 0 || l.HeatWM.V > 0 {
			loads = append(loads, l.ID)
		}
	}
	from := make([]HeatShare, len(loads))
	err := s.each(ctx, len(loads), o, func(e *rating.Engine, k int) error {
		half, err := solveWith(ctx, e, halved(d, loads[k]), o)
		if err != nil {
			return err
		}
		from[k] = HeatShare{From: loads[k], K: math.Max(0, 2*(now-things(half)[i].tempC))}
		return nil
	})
	return heating(id, now, things(off)[i].tempC, r.AmbientC, from), true, err
}

// halved is the design with half the heat in one load.
func halved(d *section.Document, load string) *section.Document {
	return section.ChangeLoad(d, load, func(l *section.Load) {
		l.CurrentA.V *= math.Sqrt(0.5)
		l.HeatWM.V *= 0.5
	})
}

// heating makes one row: what the loads add is shared by from.
func heating(id string, now, off, ambient float64, from []HeatShare) Heating {
	h := Heating{ID: id, RiseK: now - ambient, CooledK: math.Max(0, ambient-off)}
	sum := 0.0
	for _, f := range from {
		sum += f.K
	}
	const least = 0.01 // K
	if sum > 0 && now-off > least {
		for _, f := range from {
			f.K *= (now - off) / sum
			h.Shares = append(h.Shares, f)
		}
	}
	if off-ambient > least {
		h.Shares = append(h.Shares, HeatShare{From: Around, K: off - ambient})
	}
	slices.SortStableFunc(h.Shares, func(a, b HeatShare) int {
		return cmp.Compare(b.K, a.K)
	})
	wholePercents(h.Shares)
	return h
}

// wholePercents rounds shares so that they add to 100, by largest remainders.
func wholePercents(list []HeatShare) {
	sum, given := 0.0, 0
	for _, f := range list {
		sum += f.K
	}
	if !(sum > 0) {
		return
	}
	rest := make([]int, len(list))
	left := make([]float64, len(list))
	for i := range list {
		exact := 100 * list[i].K / sum
		list[i].Percent = int(exact)
		given += list[i].Percent
		rest[i], left[i] = i, exact-math.Floor(exact)
	}
	slices.SortStableFunc(rest, func(a, b int) int {
		switch {
		case left[a] > left[b]+1e-9:
			return -1
		case left[a] < left[b]-1e-9:
			return 1
		}
		return a - b
	})
	for k := 0; k < 100-given; k++ {
		list[rest[k%len(rest)]].Percent++
	}
}

// Sentence says it in one sentence whose percents add to 100.
func (h Heating) Sentence() string {
	if len(h.Shares) == 0 {
		return h.ID + " is as warm as its surroundings leave it; no load heats it."
	}
	const named, alike = 6, 0.5
	own, around := h.Percent(h.ID), h.Percent(Around)
	var names []string
	top, rest, others, most := 0, 0, 0, 0.0
	for _, s := range h.Shares {
		if s.From == h.ID || s.From == Around || s.Percent == 0 {
			continue
		}
		if most == 0 {
			most = s.K
		}
		if len(names) < named && s.K >= alike*most {
			names, top = append(names, s.From), top+s.Percent
		} else {
			others, rest = others+1, rest+s.Percent
		}
	}
	var parts []string
	add := func(percent int, text string) {
		if percent > 0 {
			parts = append(parts, fmt.Sprintf("%d %% %s", percent, text))
		}
	}
	add(own, "it makes itself")
	add(top, "comes from "+listAnd(names))
	add(rest, "from "+count(others, "other"))
	add(around, "from sun and warm surroundings")
	whole := fmt.Sprintf("%s is %s K over the ambient: of this rise ", h.ID, quantity.Fixed(h.RiseK, 1))
	if h.CooledK >= 0.05 {
		whole = fmt.Sprintf("With every load off %s would be %s K below the ambient; of the %s K that loads add ", h.ID, quantity.Fixed(h.CooledK, 1), quantity.Fixed(h.RiseK+h.CooledK, 1))
	}
	return whole + listAnd(parts) + "."
}

// listAnd writes "a, b and c".
func listAnd(list []string) string {
	if n := len(list); n > 1 {
		return strings.Join(list[:n-1], ", ") + " and " + list[n-1]
	}
	return strings.Join(list, "")
}

// heater names the load that does most of the heating of a thing that makes little heat of its own: "A heats, B suffers". ok is false where the
// thing's own load does as much.
func (h *Heaters) heater(d *section.Document, id string) (load string, percent int, ok bool) {
	row, found := h.Of(id)
	if !found {
		return "", 0, false
	}
	by := map[string]int{}
	var order []string
	for _, s := range row.Shares {
		name := s.From
		if l := section.LoadOf(d, s.From); l != nil {
			name = l.ID
		} else if section.LoadNamed(d, s.From) == nil {
			continue
		}
		if by[name] == 0 {
			order = append(order, name)
		}
		by[name] += s.Percent
	}
	own := 0
	if l := section.LoadOf(d, id); l != nil {
		own = by[l.ID]
	}
	for _, name := range order {
		if by[name] > percent {
			load, percent = name, by[name]
		}
	}
	const little, much = 20, 20 // percent
	return load, percent, own < little && percent >= much && percent > 2*own
}
