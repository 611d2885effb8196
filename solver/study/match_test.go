package study

import (
	"context"
	"errors"
	"math"
	"strings"
	"testing"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// TestSurfaceOf: galvanised steel (0.25) at 60 °C among things at 30 °C reads 39 °C on an instrument set to 0.95: the law of grey bodies, figures of the
// issue, checked here by the law itself.
func TestSurfaceOf(t *testing.T) {
	if got := SurfaceOf(39, 0.95, 0.25, 30); math.Abs(got-60) > 2 {
		t.Errorf("39 °C read at 0.95 off 0.25 is %.1f °C, want about 60 °C", got)
	}
	if got := SurfaceOf(71, 0.95, 0.95, 20); math.Abs(got-71) > 1e-9 {
		t.Errorf("set right it reads %.2f °C", got)
	}
	if got := SurfaceOf(-200, 0.95, 0.3, 80); !math.IsNaN(got) && got > 20 {
		t.Errorf("got %.1f", got)
	}
}

func surveyed(d *section.Document, m section.Measurement) *section.Document {
	m.ID = "survey"
	return section.SetMeasurement(d, m)
}

// TestMatchFinds plants a film and a clearance and finds them again from the temperature that they give.
func TestMatchFinds(t *testing.T) {
	if testing.Short() {
		t.Skip("many full solutions")
	}
	s := New(cat)
	ctx := context.Background()
	d := demo(t, "nine-in-emt")
	hot, err := solveVaried(ctx, s.engines[0], d, Options{}, rating.Vary{Film: 0.8})
	if err != nil {
		t.Fatal(err)
	}
	outside := hot.Others[len(hot.Others)-1]
	m, err := s.Match(ctx, surveyed(d, section.Measurement{At: section.Conduit, ReadingC: outside.TempC, Along: section.Even, LoadedForMin: section.Some(240.0), Cover: section.Closed}), "survey", Options{})
	if err != nil {
		t.Fatal(err)
	}
	if m.Found != Fitted || m.What != "film outside" || math.Abs(m.Value-0.8) > 0.02 || len(m.Questions) != 0 {
		t.Errorf("%+v", m)
	}
	if !(m.After.Rely.Factor < m.Before.Rely.Factor) || m.Raises || m.Rely() != m.After.Rely.Factor {
		t.Errorf("a worse film lowers what may be carried: %.3f, before %.3f", m.After.Rely.Factor, m.Before.Rely.Factor)
	}
	near := section.SetHolder(d, d.Holder)
	near = near.With(func(d *section.Document) { d.Holder.ClearanceMM = section.Some(0.05) })
	cool, err := s.solve(ctx, near, Options{})
	if err != nil {
		t.Fatal(err)
	}
	id := cool.Conductors[0].ID
	q := surveyed(d, section.Measurement{At: id, ReadingC: cool.Conductors[0].TempC})
	m, err = s.Match(ctx, q, "survey", Options{})
	if err != nil {
		t.Fatal(err)
	}
	if m.Found != Fitted || math.Abs(m.Value-0.05) > 0.01 || len(m.Questions) != 3 {
		t.Errorf("%+v", m)
	}
	if !m.Raises || m.Rely() != m.Before.Rely.Factor {
		t.Errorf("a fit that raises a current is taken without a reason: %+v", m)
	}
	q = section.SetReason(q, section.ReasonMeasurement+"survey", "contact thermometer, three places")
	if m, err = s.Match(ctx, q, "survey", Options{}); err != nil || m.Raises || m.Rely() != m.After.Rely.Factor {
		t.Errorf("with a reason: %+v, %v", m, err)
	}
}

// TestMatchRefuses: what no section explains, a joint, shiny surfaces, readings below the ambient, a light load.
func TestMatchRefuses(t *testing.T) {
	s := New(cat)
	ctx := context.Background()
	d := demo(t, "filled-control-cable")
	match := func(m section.Measurement) (*Match, error) { return s.Match(ctx, surveyed(d, m), "survey", Options{}) }
	m, err := match(section.Measurement{At: section.Outside, ReadingC: 95})
	if err != nil || m.Found != Unexplained || !strings.Contains(strings.Join(m.Remarks, " "), "joint") {
		t.Errorf("%+v, %v", m, err)
	}
	if m, err = match(section.Measurement{At: section.Outside, ReadingC: 50, Along: section.FallsOff}); err != nil || m.Found != Joint {
		t.Errorf("%+v, %v", m, err)
	}
	var no *Refusal
	_, err = match(section.Measurement{At: section.Outside, ReadingC: 50, InstrumentEmissivity: section.Some(0.95), SurfaceEmissivity: section.Some(0.3)})
	if !errors.As(err, &no) || !strings.Contains(no.Problems[0].Do, "tape") {
		t.Errorf("shiny: %v", err)
	}
	if _, err = match(section.Measurement{At: section.Outside, ReadingC: 10}); !errors.As(err, &no) || no.Problems[0].Rule != "below-ambient" {
		t.Errorf("below the ambient: %v", err)
	}
	if _, err = s.Match(ctx, d, "nobody", Options{}); !errors.As(err, &no) {
		t.Errorf("unknown: %v", err)
	}
	var light []section.CaseLoad
	for _, l := range d.Loads {
		light = append(light, section.CaseLoad{Load: l.ID, CurrentA: l.CurrentA.V / 3})
	}
	if m, err = match(section.Measurement{At: section.Outside, ReadingC: 36, Loads: light}); err != nil || !m.Wide {
		t.Errorf("a ninth of the heat: %+v, %v", m, err)
	}
}
