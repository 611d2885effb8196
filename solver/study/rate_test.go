package study

import (
	"context"
	"math"
	"os"
	"testing"
	"time"
)

// TestRateDemos holds every demo's ratings to what they must satisfy, and logs them.
func TestRateDemos(t *testing.T) {
	names := []string{"stage-multicore", "filled-control-cable"}
	if os.Getenv("PACKRISE_SOAK") != "" {
		names = append(names, "nine-in-emt", "roof-strings", "harness-altitude", "robot-umbilical", "wireway-38")
	}
	for _, name := range names {
		d := demo(t, name)
		s := New(cat)
		ctx := context.Background()
		var stages []Stage
		start := time.Now()
		r, err := s.Rate(ctx, d, nil, Options{AssumeIdle: true, Stage: func(r *Ratings) { stages = append(stages, r.Done) }})
		if err != nil {
			t.Fatal(name, err)
		}
		t.Logf("%s: %s, %.3f nominal by %s, %.3f to rely on by %s (%.2f s)", name, r.State, r.All.Nominal.Factor, r.All.Nominal.Governs, r.All.Rely.Factor, r.All.Rely.Governs, time.Since(start).Seconds())
		if len(stages) != int(Last) || r.Done != Last {
			t.Errorf("%s: stages %v", name, stages)
		}
		if !(r.All.Rely.Factor < r.All.Nominal.Factor) {
			t.Errorf("%s: to rely on %.3f, nominal %.3f", name, r.All.Rely.Factor, r.All.Nominal.Factor)
		}
		// Found anew where it is relied on, P95 of everything is inside its limit to the accuracy of the search.
		there := scaleAll(d, r.All.Rely.Factor)
		at, err := s.solve(ctx, there, Options{AssumeIdle: true})
		if err != nil {
			t.Fatal(err)
		}
		b, err := s.Bands(ctx, there, at, Options{AssumeIdle: true})
		if err != nil {
			t.Fatal(err)
		}
		for i, x := range things(at) {
			if x.limit.OK && !math.IsNaN(x.tempC) && x.tempC+math.Max(b.Spreads[i].HighK, r.MarginK) > x.limit.V+0.5 {
				t.Errorf("%s: %s at %.1f °C + %.1f K, limit %.0f °C", name, x.id, x.tempC, b.Spreads[i].HighK, x.limit.V)
			}
		}
	}
}

// TestStates: the state words at and around a limit.
func TestStates(t *testing.T) {
	s := New(cat)
	d := demo(t, "stage-multicore")
	ctx := context.Background()
	all := map[string]bool{}
	for _, f := range []float64{0.5, 0.75, 1.5} {
		r, err := s.solve(ctx, scaleAll(d, f), Options{})
		if err != nil {
			t.Fatal(err)
		}
		b, err := s.Bands(ctx, scaleAll(d, f), r, Options{})
		if err != nil {
			t.Fatal(err)
		}
		word := StateOf(r, b.Spreads)
		all[word] = true
		t.Logf("at %.2f: %s, %.1f °C", f, word, r.Governing.TempC)
		switch {
		case r.Governing.MarginK < 0 && word != Over, r.Governing.MarginK > 30 && word != Within:
			t.Errorf("at %.2f: %s with a margin of %.1f K", f, word, r.Governing.MarginK)
		}
	}
	if !all[Within] || !all[Close] || !all[Over] {
		t.Errorf("only %v", all)
	}
}
