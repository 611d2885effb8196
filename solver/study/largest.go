package study

import (
	"context"
	"math"
	"slices"

	"packrise/solver/heat"
	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Largest is the largest weighted sum of load currents with nothing over what it may reach.
type Largest struct{ Nominal, Rely Optimum }

// Optimum is such a sum. Its result is a full solution in which nothing is over.
type Optimum struct {
	Sum     float64 // Σ weight × amperes, not rounded
	Loads   []LoadAmperes
	Governs []string       // things that hold it: within 1 K of what they may reach
	Result  *rating.Result // nil where nothing is permitted
	Doc     *section.Document
	// Hopeless: something is over with these loads off; all are 0. Unbounded: nothing here has a limit.
	Hopeless, Unbounded bool
	Weighted            bool // other weights than 1 were given
}

// LoadAmperes is what one load then carries, in each conductor.
type LoadAmperes struct {
	ID      string
	NowA, A float64
}

const (
	largestRounds = 30
	atLimitK      = 1.0 // counts as held
)

// Largest finds the currents with the largest sum of weight × amperes (weights by load; nil: 1 for each that carries a current) with all limits
// kept. Loads without a weight, of a fixed heat, or off stay as they are. Heats go with squares of currents and temperatures with heats, so that in
// x = I² limits are linear through the influence matrix while the sum is concave: one hill, climbed by Newton's method with a barrier. The matrix is
// taken anew at each full solution until the two agree; what is returned is a full solution with nothing over.
func (s *Study) Largest(ctx context.Context, d *section.Document, base *rating.Result, spreads []Spread, weights map[string]float64, o Options) (*Largest, error) {
	d, _, _ = AtDevices(d)
	if base == nil || len(base.Unassigned) > 0 {
		var err error
		if base, err = s.solve(ctx, d, o); err != nil {
			return nil, err
		}
	}
	if err := known(base, o); err != nil {
		return nil, err
	}
	var out Largest
	var err error
	if out.Nominal, err = s.optimum(ctx, d, weights, nominal, o); err != nil {
		return nil, err
	}
	out.Rely, err = s.optimum(ctx, d, weights, rely(spreads, base.AmbientC, MarginK(d)), o)
	return &out, err
}

// summed is the search for one optimum.
type summed struct {
	loads  []LoadAmperes
	weight []float64
	limit  []float64   // °C per thing that has one
	low    []float64   // °C with these loads off
	gain   [][]float64 // K per A²
}

func (s *Study) optimum(ctx context.Context, d *section.Document, weights map[string]float64, room judge, o Options) (Optimum, error) {
	m := newSummed(d, weights)
	off, err := s.solve(ctx, m.with(d, 0), o)
	if err != nil {
		return Optimum{}, err
	}
	list := things(off)
	_, k, ok := closest(list, room)
	none := Optimum{Loads: m.zeros(), Result: off, Doc: m.with(d, 0), Weighted: weights != nil}
	switch {
	case !ok || len(m.loads) == 0:
		none.Unbounded = !ok
		return none, nil
	case k < 0 || off.Status == heat.ThermalRunaway:
		none.Hopeless = true
		return none, nil
	}
	good, err := s.approach(ctx, m, d, room, o)
	if err != nil || good == nil {
		none.Hopeless = good == nil
		return none, err
	}
	out := good.optimum(m, d, room)
	out.Weighted = weights != nil
	return out, nil
}

func newSummed(d *section.Document, weights map[string]float64) *summed {
	m := &summed{}
	for i := range d.Loads {
		l := &d.Loads[i]
		w, named := weights[l.ID]
		if weights == nil && l.CurrentA.V > 0 {
			w, named = 1, true
		}
		if l.HeatWM.OK || !l.CurrentA.OK || !named || !(w > 0) || len(l.Conductors) == 0 {
			continue
		}
		m.loads, m.weight = append(m.loads, LoadAmperes{l.ID, l.CurrentA.V, math.Max(l.CurrentA.V, 0.1)}), append(m.weight, w)
	}
	return m
}

// with is the design with the loads at a factor on the present trial.
func (m *summed) with(d *section.Document, factor float64) *section.Document {
	var states []section.CaseLoad
	for _, l := range m.loads {
		states = append(states, section.CaseLoad{Load: l.ID, CurrentA: l.A * factor})
	}
	return section.WithStates(d, states)
}

func (m *summed) zeros() (out []LoadAmperes) {
	for _, l := range m.loads {
		out = append(out, LoadAmperes{l.ID, l.NowA, 0})
	}
	return out
}

// feasible is a full solution with nothing over.
type feasible struct {
	loads []LoadAmperes
	sum   float64
	r     *rating.Result
}

// approach alternates between the programme and full solutions. Every full solution is scaled down, or up, to where the first thing is at its
// limit, so that each round leaves one with nothing over; the best is kept until the sum stands still.
func (s *Study) approach(ctx context.Context, m *summed, d *section.Document, room judge, o Options) (best *feasible, err error) {
	still := 0
	for round := range largestRounds {
		o.tell(round, largestRounds)
		at, err := s.solve(ctx, m.with(d, 1), o)
		if err != nil {
			return nil, err
		}
		with := func(f float64) *section.Document { return m.with(d, f) }
		c, err := s.climb(ctx, s.engines[0], at, with, room, 0, o)
		if err != nil {
			return nil, err
		}
		if c.Factor <= 0 || math.IsInf(c.Factor, 1) || c.Result == nil {
			return best, nil
		}
		for i := range m.loads {
			m.loads[i].A *= c.Factor
		}
		now := &feasible{slices.Clone(m.loads), m.sum(), c.Result}
		if best == nil || now.sum > best.sum {
			still++
			if best == nil || now.sum > best.sum*(1+2e-4) {
				still = 0
			}
			best = now
		} else {
			still++
		}
		if still >= 2 {
			return best, nil
		}
		p, _, err := s.point(ctx, m.with(d, 1), o)
		if err != nil || p == nil {
			return best, err
		}
		m.linear(p, room)
		m.programme()
	}
	return best, nil
}

func (m *summed) sum() (sum float64) {
	for i, l := range m.loads {
		sum += m.weight[i] * l.A
	}
	return sum
}

// linear writes limits and temperatures out at a working point: T = low + Σ gain·I².
func (m *summed) linear(p *rating.Point, room judge) {
	e := answers(p)
	m.limit, m.low, m.gain = nil, nil, nil
	for i, t := range things(p.Result) {
		if !t.limit.OK || math.IsNaN(t.tempC) {
			continue
		}
		row := make([]float64, len(m.loads))
		low := t.tempC
		for l, load := range m.loads {
			for j, c := range p.Conductors {
				if c.Load == load.ID && load.A > 0 {
					row[l] += answer(p, e, i, j) * p.Sources[j].Square * (1 + p.Sources[j].Alpha*(c.TempC-20)) / (load.A * load.A)
				}
			}
			low -= row[l] * load.A * load.A
		}
		m.limit, m.low, m.gain = append(m.limit, t.tempC+room(i, t)), append(m.low, low), append(m.gain, row)
	}
}

// optimum words a solution.
func (f *feasible) optimum(m *summed, d *section.Document, room judge) Optimum {
	m.loads = f.loads
	out := Optimum{Sum: f.sum, Loads: f.loads, Result: f.r, Doc: m.with(d, 1)}
	for i, t := range things(f.r) {
		if t.limit.OK && !math.IsNaN(t.tempC) && room(i, t) < atLimitK {
			out.Governs = append(out.Governs, t.id)
		}
	}
	return out
}

// Sentence says what the sum is.
func (b *Optimum) Sentence() string {
	switch {
	case b.Unbounded:
		return "Nothing here has a limit, so nothing bounds the sum of the currents."
	case b.Hopeless:
		return "Something is over what it may reach with these loads off: none of them may carry anything."
	}
	var each []string
	for _, l := range b.Loads {
		each = append(each, l.ID+" "+Amps(l.A))
	}
	what := "sum"
	if b.Weighted {
		what = "weighted sum"
	}
	return "Largest " + what + " of the loads' currents: " + quantity.Trimmed(quantity.RoundDown(b.Sum, 1), 1) + " A (" + listAnd(each) + "), held by " + list(b.Governs) + "."
}
