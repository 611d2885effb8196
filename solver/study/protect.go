package study

import (
	"context"
	"fmt"
	"math"

	"packrise/solver/heat"
	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/rules"
	"packrise/solver/section"
)

// SoftFault is a circuit that draws the current at which its device trips by convention, or any less, with the rest at load: nothing clears it.
type SoftFault struct {
	Load    string
	A       float64 // conventional tripping current in each conductor
	Stated  bool    // trips_at is written; else the usual of its kind
	Governs string
	TempC   float64
	LimitC  float64
	Runaway bool // no steady temperature exists
}

// Over tells whether something passes its limit.
func (f *SoftFault) Over() bool { return f.Runaway || f.TempC > f.LimitC }

// SoftFaults solves each circuit that has a device at its tripping current.
func (s *Study) SoftFaults(ctx context.Context, d *section.Document, o Options) ([]SoftFault, error) {
	var out []SoftFault
	for i := range d.Loads {
		l := &d.Loads[i]
		if l.Protection.Kind == "" || !(l.Protection.RatingA > 0) || l.HeatWM.OK {
			continue
		}
		factor, stated := TripsAt(l.Protection)
		if factor > 0 {
			out = append(out, SoftFault{Load: l.ID, A: factor * l.Protection.RatingA, Stated: stated})
		}
	}
	err := s.each(ctx, len(out), o, func(e *rating.Engine, i int) error {
		f := &out[i]
		r, err := solveWith(ctx, e, section.WithStates(d, []section.CaseLoad{{Load: f.Load, CurrentA: f.A}}), o)
		if err != nil {
			return err
		}
		if f.Runaway = r.Status == heat.ThermalRunaway; f.Runaway {
			f.Governs, f.TempC, f.LimitC = r.RunawayAt, math.NaN(), math.NaN()
			return nil
		}
		list := things(r)
		if at, _, ok := closest(list, nominal); ok {
			f.Governs, f.TempC, f.LimitC = list[at].id, list[at].tempC, list[at].limit.V
		}
		return nil
	})
	return out, err
}

// permitted are the currents to hold devices against: what each conductor may carry to rely on when all loads go together, and each rule's.
func permitted(p *Permits, c *Codes) []rules.Permitted {
	own := rules.Permitted{By: Computed, A: map[string]float64{}}
	for _, w := range p.Base.Conductors {
		if a := w.CurrentA.V * p.All.Rely.Factor; w.CurrentA.V > 0 && !math.IsInf(a, 1) {
			own.A[w.ID] = a
		}
	}
	out := []rules.Permitted{own}
	for k := range c.Outcomes {
		o := &c.Outcomes[k]
		if !o.Applies || o.Informative || len(o.Conductors) == 0 {
			continue
		}
		q := rules.Permitted{By: o.Rule, A: map[string]float64{}}
		for _, w := range o.Conductors {
			if !math.IsNaN(w.A) {
				q.A[w.ID] = w.A
			}
		}
		if len(q.A) > 0 {
			out = append(out, q)
		}
	}
	return out
}

// Sentence says what happens then.
func (f *SoftFault) Sentence() string {
	how := "its conventional tripping current"
	if !f.Stated {
		how += " (assumed for its kind)"
	}
	switch {
	case f.Runaway:
		return fmt.Sprintf("Should %s draw %s, %s, with the rest at load: no steady temperature exists, %s would keep heating, and nothing has to trip before.", f.Load, Amps(f.A), how, f.Governs)
	case f.Governs == "":
		return fmt.Sprintf("Should %s draw %s, %s, with the rest at load: nothing here has a limit.", f.Load, Amps(f.A), how)
	}
	return fmt.Sprintf("Should %s draw %s, %s, with the rest at load: %s at %s °C, limit %s °C.", f.Load, Amps(f.A), how, f.Governs,
		quantity.Trimmed(quantity.BesideLimit(f.TempC, f.LimitC), 1), quantity.Trimmed(f.LimitC, 1))
}
