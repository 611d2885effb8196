package rating_test

import (
	"context"
	"math"
	"testing"

	"packrise/assets"
	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

func demo(t *testing.T, name string) *section.Document {
	t.Helper()
	raw, err := assets.Designs.ReadFile("designs/" + name + ".yaml")
	if err != nil {
		t.Fatal(err)
	}
	d, problems := section.Read(raw)
	if err != nil || len(problems) > 0 {
		t.Fatal(err, problems)
	}
	return d
}

func scaled(d *section.Document, factor float64) *section.Document {
	return d.With(func(d *section.Document) {
		d.Loads = append([]section.Load(nil), d.Loads...)
		for i := range d.Loads {
			if d.Loads[i].CurrentA.OK {
				d.Loads[i].CurrentA.V *= factor
			}
		}
	})
}

// TestPointPredicts holds the first order to full solutions: 10 % more current within a quarter of the change before Learn (films
// and radiation follow the temperature), 4 % after it.
func TestPointPredicts(t *testing.T) {
	for _, name := range []string{"nine-in-emt", "filled-control-cable", "roof-strings"} {
		d := demo(t, name)
		e := rating.NewEngine(catalog.Load())
		p, _, problems, err := e.Point(context.Background(), d, rating.Options{AssumeIdle: true})
		if err != nil || p == nil {
			t.Fatal(name, err, problems)
		}
		at := func(f float64) *rating.Result {
			r, _, err := e.Solve(context.Background(), scaled(d, f), rating.Options{AssumeIdle: true})
			if err != nil {
				t.Fatal(err)
			}
			return r
		}
		far, near := at(1.2), at(1.1)
		miss := func() (worst float64) {
			x := make([]float64, len(p.Sources))
			for j := range x {
				x[j] = 1.1 * 1.1
			}
			for i, c := range p.Predict(x, nil) {
				worst = math.Max(worst, math.Abs(c-near.Conductors[i].TempC)/math.Max(1, near.Conductors[i].TempC-p.Conductors[i].TempC))
			}
			return worst
		}
		before := miss()
		p.Learn(far)
		after := miss()
		t.Logf("%s: off by %.3f of the change, %.4f with what a solution at 1.2 taught", name, before, after)
		if before > 0.25 || after > 0.04 || after > before/3 {
			t.Errorf("%s: off by %.3f of the change, then %.4f", name, before, after)
		}
	}
}
