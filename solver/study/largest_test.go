package study

import (
	"context"
	"math"
	"testing"

	"packrise/solver/section"
)

// TestLargestBruteForce: two loads of unlike wires; no pair of currents along the border, each found by full solutions, has a larger sum.
func TestLargestBruteForce(t *testing.T) {
	d := read(t, aHeats)
	d = section.ChangeLoad(d, "bell", func(l *section.Load) { l.CurrentA = section.Some(5.0) })
	s := New(cat)
	ctx := context.Background()
	for _, w := range []map[string]float64{nil, {"motor": 1, "bell": 4}, {"motor": 2, "bell": 1}} {
		got, err := s.Largest(ctx, d, nil, nil, w, Options{})
		if err != nil {
			t.Fatal(err)
		}
		t.Log(got.Nominal.Sentence(), "To rely on:", got.Rely.Sum)
		if got.Rely.Sum >= got.Nominal.Sum || len(got.Nominal.Governs) == 0 {
			t.Errorf("%v: %.2f to rely on, %.2f nominal, held by %v", w, got.Rely.Sum, got.Nominal.Sum, got.Nominal.Governs)
		}
		r, err := s.solve(ctx, got.Nominal.Doc, Options{})
		if err != nil {
			t.Fatal(err)
		}
		if r.Over() {
			t.Errorf("%v: over by %.3f K", w, -r.Governing.MarginK)
		}
		weigh := func(m, b float64) float64 {
			if w == nil {
				return m + b
			}
			return w["motor"]*m + w["bell"]*b
		}
		best := 0.0
		for _, share := range []float64{0.02, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.8, 1, 1.5, 3, 8} { // bell over motor
			doc := section.WithStates(d, []section.CaseLoad{{Load: "motor", CurrentA: 10}, {Load: "bell", CurrentA: 10 * share}})
			from, err := s.solve(ctx, doc, Options{})
			if err != nil {
				t.Fatal(err)
			}
			c, err := s.climb(ctx, s.engines[0], from, func(f float64) *section.Document { return scaleAll(doc, f) }, nominal, 0, Options{})
			if err != nil {
				t.Fatal(err)
			}
			best = math.Max(best, weigh(10*c.Factor, 10*share*c.Factor))
		}
		if got.Nominal.Sum < best*0.998 || got.Nominal.Sum > best*1.05 {
			t.Errorf("%v: sum %.2f, along the border %.2f", w, got.Nominal.Sum, best)
		}
	}
}

// TestLargestDemos: never over, never less than all scaled together; fixed heats and loads that are off stay.
func TestLargestDemos(t *testing.T) {
	s := New(cat)
	ctx := context.Background()
	o := Options{AssumeIdle: true}
	for _, name := range []string{"stage-multicore", "filled-control-cable"} {
		d := demo(t, name)
		base, err := s.solve(ctx, d, o)
		if err != nil {
			t.Fatal(err)
		}
		all, err := s.All(ctx, d, base, nil, o)
		if err != nil {
			t.Fatal(err)
		}
		got, err := s.Largest(ctx, d, base, nil, nil, o)
		if err != nil {
			t.Fatal(err)
		}
		now := 0.0
		for _, l := range got.Nominal.Loads {
			now += l.NowA
		}
		t.Logf("%s: %s All scaled: %.1f A", name, got.Nominal.Sentence(), now*all.Nominal.Factor)
		if got.Nominal.Sum < now*all.Nominal.Factor*0.9995 || got.Rely.Sum < now*all.Rely.Factor*0.9995 {
			t.Errorf("%s: %.2f A, all scaled %.2f A", name, got.Nominal.Sum, now*all.Nominal.Factor)
		}
		if r := got.Nominal.Result; r.Over() {
			t.Errorf("%s: over by %.3f K", name, -r.Governing.MarginK)
		}
	}
	d := read(t, oneWire)
	hot := section.SetLimit(d, "W", section.Some(25.0))
	if got, err := s.Largest(ctx, hot, nil, nil, nil, Options{}); err != nil || !got.Nominal.Hopeless || got.Nominal.Sum != 0 {
		t.Errorf("limit below the ambient: %+v, %v", got, err)
	}
	fixed := section.SetHeat(d, "W", 3)
	if got, err := s.Largest(ctx, fixed, nil, nil, nil, Options{}); err != nil || len(got.Nominal.Loads) != 0 || got.Nominal.Sum != 0 {
		t.Errorf("a fixed heat: %+v, %v", got, err)
	}
}
