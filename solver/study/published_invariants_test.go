package study

import (
	"context"
	"math"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// What every scenario must satisfy, whatever its numbers.

// invariantDemos are the designs that are tried: the quick ones, all of them in a long run.
func invariantDemos() []string {
	if validating || soaking {
		return []string{"filled-control-cable", "stage-multicore", "roof-strings", "nine-in-emt", "harness-altitude", "robot-umbilical", "wireway-38", "strings-spread"}
	}
	return []string{"filled-control-cable", "roof-strings"}
}

func solved1(t *testing.T, d *section.Document) *rating.Result {
	t.Helper()
	r, err := New(cat).solve(context.Background(), d, Options{})
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// TestNothingCools: more current in any one load, a warmer ambient, thinner air and more sun never lower a temperature; a load switched off never
// raises one.
func TestNothingCools(t *testing.T) {
	const slack = 0.02 // K, what two solutions at standard accuracy may differ by
	for _, name := range invariantDemos() {
		d := demo(t, name)
		base := solved1(t, d)
		if base.Status != heat.Converged {
			t.Fatalf("%s: %v", name, base.Status)
		}
		hold := func(what string, other *section.Document, sign float64) {
			r := solved1(t, other)
			if r.Status == heat.ThermalRunaway && sign > 0 {
				return
			}
			was, is := things(base), things(r)
			if len(was) != len(is) {
				t.Fatalf("%s, %s: %d things, were %d", name, what, len(is), len(was))
			}
			for i := range was {
				if k := sign * (is[i].tempC - was[i].tempC); k < -slack {
					t.Errorf("%s, %s: %s goes from %.3f to %.3f °C", name, what, was[i].id, was[i].tempC, is[i].tempC)
				}
			}
		}
		for i := range d.Loads {
			l := &d.Loads[i]
			if l.CurrentA.V > 0 {
				hold(l.ID+" up by a tenth", scaleLoads(d, 1.1, []string{l.ID}), 1)
				hold(l.ID+" off", section.SwitchOff(d, l.ID), -1)
			}
		}
		hold("5 K more around", ambient(d.Surroundings.AmbientC.V+5)(d), 1)
		hold("3000 m up", around(func(s *section.Surroundings) { s.AltitudeM = section.Some(s.AltitudeM.V + 3000) })(d), 1)
		hold("more sun", around(func(s *section.Surroundings) { s.SunWM2 = section.Some(s.SunWM2.V + 200) })(d), 1)
	}
}

// TestPermitsHoldTogether: permitted currents fall when the ambient rises; a load alone may grow at least as much as all together while all are within;
// grouped wires carry no more than one of them alone in still air.
func TestPermitsHoldTogether(t *testing.T) {
	if testing.Short() {
		t.Skip("many full solutions")
	}
	ctx := context.Background()
	for _, name := range invariantDemos() {
		d := demo(t, name)
		r := rated(t, d, false)
		warm := rated(t, ambient(d.Surroundings.AmbientC.V+5)(d), false)
		if !(warm.All.Nominal.Factor < r.All.Nominal.Factor) || !(warm.All.Rely.Factor < r.All.Rely.Factor) {
			t.Errorf("%s: %.4f and %.4f, with 5 K more around %.4f and %.4f", name, r.All.Nominal.Factor, r.All.Rely.Factor, warm.All.Nominal.Factor, warm.All.Rely.Factor)
		}
		s := New(cat)
		one, err := s.One(ctx, d, r.Base, nil, Options{})
		if err != nil {
			t.Fatal(err)
		}
		for _, l := range one {
			if r.All.Nominal.Factor >= 1 && l.Nominal.Factor < r.All.Nominal.Factor*(1-0.002) {
				t.Errorf("%s: %s alone may be scaled by %.4f, all together by %.4f", name, l.ID, l.Nominal.Factor, r.All.Nominal.Factor)
			}
		}
		if d.Surroundings.Kind != section.StillAir || d.Surroundings.SunWM2.V > 0 {
			continue
		}
		hot := r.Base.Conductors[0]
		for _, c := range r.Base.Conductors {
			if c.ID == r.All.Nominal.Governs && c.CurrentA.V > 0 || c.HeatWM > hot.HeatWM && hot.ID != r.All.Nominal.Governs {
				hot = c
			}
		}
		a, err := s.alone(ctx, s.engines[0], d, hot, Options{})
		if err != nil {
			t.Fatal(err)
		}
		if f := hot.CurrentA.V * r.All.Nominal.Factor / a.One.NominalA; !(f <= 1.002) {
			t.Errorf("%s: %s carries %.3f of what it carries alone", name, hot.ID, f)
		}
	}
}

// TestTerminalIsNoTemperature: a terminal caps the current and leaves every temperature and computed current as it is.
func TestTerminalIsNoTemperature(t *testing.T) {
	d := demo(t, "nine-in-emt")
	free := rated(t, d, false)
	for i := range d.Loads {
		d = section.SetTerminals(d, d.Loads[i].ID, section.Terminals{RatingC: section.Some(60.)})
	}
	capped := rated(t, d, false)
	for i := range capped.Lowest {
		c, f := capped.Lowest[i], free.Lowest[i]
		// NEC table 310.16, 8 AWG copper: 40 A in the 60 °C column, uncorrected (110.14(C)).
		if c.Terminal != 40 || c.Computed != f.Computed || c.Nominal != f.Nominal || !(c.A <= 40) {
			t.Errorf("%s: %+v", c.ID, c)
		}
		if math.Abs(capped.Base.Conductors[i].TempC-free.Base.Conductors[i].TempC) > 1e-9 {
			t.Errorf("%s: %.4f °C with a terminal, %.4f °C without", c.ID, capped.Base.Conductors[i].TempC, free.Base.Conductors[i].TempC)
		}
	}
}
