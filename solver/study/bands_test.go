package study

import (
	"context"
	"math"
	"math/rand/v2"
	"os"
	"slices"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

func ranged(d *section.Document) *section.Document {
	return d.With(func(d *section.Document) {
		d.Ranges.AmbientK, d.Ranges.LoadPercent = section.Some(5.0), section.Some(10.0)
	})
}

// TestBandsAgainstFull: P5 and P95 from responses one at a time, against solutions in full with everything drawn at once.
func TestBandsAgainstFull(t *testing.T) {
	draws := 120
	names := []string{"filled-control-cable"}
	if os.Getenv("PACKRISE_SOAK") != "" {
		draws = 600
		names = append(names, "nine-in-emt", "roof-strings")
	}
	for _, name := range names {
		d := ranged(demo(t, name))
		d = d.With(func(d *section.Document) { d.Ranges.PositionMM = section.Some(0.0) })
		s := New(cat)
		ctx := context.Background()
		base, err := s.solve(ctx, d, Options{})
		if err != nil {
			t.Fatal(err)
		}
		b, err := s.Bands(ctx, d, base, Options{})
		if err != nil {
			t.Fatal(err)
		}
		list := things(base)
		full := make([][]float64, len(list))
		random := rand.New(rand.NewPCG(7, 7))
		docs, varies := make([]*section.Document, draws), make([]rating.Vary, draws)
		for n := range draws {
			docs[n], varies[n] = together(d, base, b, random)
		}
		all := make([]*rating.Result, draws)
		err = s.each(ctx, draws, Options{}, func(e *rating.Engine, n int) (err error) {
			all[n], err = solveVaried(ctx, e, docs[n], Options{}, varies[n])
			return err
		})
		if err != nil {
			t.Fatal(err)
		}
		for _, r := range all {
			if r.Status != heat.Converged {
				t.Fatal(name, r.Status)
			}
			for i, x := range things(r) {
				full[i] = append(full[i], x.tempC-list[i].tempC)
			}
		}
		worst := 0.0
		for i := range list {
			slices.Sort(full[i])
			low, high := -full[i][draws/20], full[i][draws-1-draws/20]
			got := b.Spreads[i]
			miss := math.Max(math.Abs(got.LowK-low), math.Abs(got.HighK-high)) / math.Max(1, (low+high)/2)
			worst = math.Max(worst, miss)
			if miss > 0.25 {
				t.Errorf("%s, %s: −%.2f +%.2f K, in full −%.2f +%.2f K", name, list[i].id, got.LowK, got.HighK, low, high)
			}
		}
		t.Logf("%s: worst %.3f of a half band; %s: −%.1f +%.1f K", name, worst, list[0].id, b.Spreads[0].LowK, b.Spreads[0].HighK)
		for _, e := range b.Effects {
			t.Logf("  %s, %s to %s: %+.2f, %+.2f K", e.Name, e.From, e.To, e.LowK[0], e.HighK[0])
		}
	}
}

// together draws every input of the bands at once.
func together(d *section.Document, base *rating.Result, b *Bands, random *rand.Rand) (*section.Document, rating.Vary) {
	v := rating.Vary{K: map[string]float64{}, Film: 1}
	for _, e := range b.Effects {
		u := 2*random.Float64() - 1
		end := e.high
		if u < 0 {
			u, end = -u, e.low
		}
		if end.none {
			continue
		}
		if end.vary.Film > 0 {
			v.Film = 1 + u*(end.vary.Film-1)
		}
		v.Emissivity += u * end.vary.Emissivity
		for id, f := range end.vary.K {
			v.K[id] = 1 + u*(f-1)
		}
		if end.d == nil || e.Name == "all currents" {
			continue
		}
		d = warmer(d, u*(end.d.Surroundings.AmbientC.V-base.AmbientC))
		if c := end.d.Holder.ClearanceMM; e.Name == "mean clearance" {
			d = d.With(func(d *section.Document) {
				d.Holder.ClearanceMM = section.Some(base.ClearanceMM.V + u*(c.V-base.ClearanceMM.V))
			})
		}
	}
	return d.With(func(d *section.Document) {
		d.Loads = slices.Clone(d.Loads)
		for i := range d.Loads {
			d.Loads[i].CurrentA.V *= 1 + d.Ranges.LoadPercent.V/100*(2*random.Float64()-1)
		}
	}), v
}

// TestBandsStated: no range, no band; the ambient alone shifts everything by itself.
func TestBandsStated(t *testing.T) {
	d := read(t, oneWire).With(func(d *section.Document) {
		zero := section.Some(0.0)
		d.Ranges = section.Ranges{FilmPercent: zero, Emissivity: zero, PositionMM: zero, AmbientK: section.Some(6.0)}
		d.Materials = slices.Clone(d.Materials)
		d.Materials[0].KWMK = 6 // a metal's: nobody doubts it
	})
	s := New(cat)
	base, err := s.solve(context.Background(), d, Options{})
	if err != nil {
		t.Fatal(err)
	}
	b, err := s.Bands(context.Background(), d, base, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if len(b.Effects) != 1 || b.Effects[0].Name != "ambient" || !b.Effects[0].Stated {
		t.Fatalf("%+v", b.Effects)
	}
	// The resistance follows the temperature, so a little more than the ambient's own 0.9 × 6 K.
	if got := b.Spreads[0]; got.HighK < 5.3 || got.HighK > 5.7 || got.LowK < 5.3 || got.LowK > 5.7 {
		t.Errorf("%+v", got)
	}
}
