package study

import (
	"context"
	"math"
	"os"
	"testing"
	"time"

	"packrise/solver/section"
)

// TestAdvise holds every change to a full solution of its own document by a fresh study: the gain, what governs, what it costs.
func TestAdvise(t *testing.T) {
	names := []string{"nine-in-emt"}
	if os.Getenv("PACKRISE_SOAK") != "" {
		names = append(names, "stage-multicore", "robot-umbilical", "wireway-38", "harness-altitude", "filled-control-cable", "roof-strings", "strings-spread")
	}
	for _, name := range names {
		d := demo(t, name)
		ctx := context.Background()
		o := Options{AssumeIdle: true}
		start := time.Now()
		a, err := New(cat).Advise(ctx, d, nil, o)
		if err != nil {
			t.Fatal(name, err)
		}
		t.Logf("%s: %s governs, %.1f K; %d looked at, %d solved, %.2f s", name, a.Governs, a.RoomK, a.Screened, a.Solved, time.Since(start).Seconds())
		s := New(cat)
		last := math.Inf(1)
		for i := range a.Changes {
			c := &a.Changes[i]
			t.Logf("  %s", c.Sentence())
			if c.GainK > last+1e-6 || c.GainK < leastGainK {
				t.Errorf("%s: %s gains %.2f K after %.2f K", name, c.Text, c.GainK, last)
			}
			last = c.GainK
			if problems := section.Check(c.Doc); len(problems) > 0 {
				t.Errorf("%s: %s: %v", name, c.Text, problems)
			}
			r, err := s.solve(ctx, scaleAll(c.Doc, a.Factor), o)
			if err != nil {
				t.Fatal(err)
			}
			if g := r.Governing; g.Part != c.Governs || math.Abs(g.MarginK-a.RoomK-c.GainK) > 0.02 {
				t.Errorf("%s: %s: %s with %.2f K, solved anew %s with %.2f K", name, c.Text, c.Governs, a.RoomK+c.GainK, g.Part, g.MarginK)
			}
		}
		if len(a.Changes) < 2 || len(a.Changes) > mostChanges {
			t.Errorf("%s: %d changes", name, len(a.Changes))
		}
	}
}
