package study

import (
	"context"
	"errors"
	"math"
	"testing"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// TestPermits holds the three questions of a demo to each other.
func TestPermits(t *testing.T) {
	if testing.Short() {
		t.Skip("many full solutions")
	}
	d := demo(t, "nine-in-emt")
	s := New(cat)
	ctx := context.Background()
	base, err := s.solve(ctx, d, Options{})
	if err != nil {
		t.Fatal(err)
	}
	all, err := s.All(ctx, d, base, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if all.Rely.Factor >= all.Nominal.Factor || all.Rely.TempC > all.Rely.LimitC-DesignMarginK {
		t.Errorf("to rely on %.3f at %.2f °C, nominal %.3f", all.Rely.Factor, all.Rely.TempC, all.Nominal.Factor)
	}
	one, err := s.One(ctx, d, base, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if len(one) != len(d.Loads) {
		t.Fatalf("%d loads, want %d", len(one), len(d.Loads))
	}
	for _, l := range one {
		if l.Nominal.Factor < all.Nominal.Factor { // all are within as given, so one alone may grow at least as much as all together
			t.Errorf("%s alone may be scaled by %.3f, all together by %.3f", l.ID, l.Nominal.Factor, all.Nominal.Factor)
		}
	}
	alone, err := s.AloneHere(ctx, d, base, Options{})
	if err != nil {
		t.Fatal(err)
	}
	for i, a := range alone {
		c := base.Conductors[i]
		now := c.CurrentA.Or(math.NaN())
		t.Logf("%s: %.1f A with all, %.1f A alone, %.1f A for three, factors %.2f and %.2f", a.ID, now*all.Nominal.Factor, a.One.NominalA, a.Three.NominalA,
			now*all.Nominal.Factor/a.One.NominalA, now*all.Nominal.Factor/a.Three.NominalA)
		if a.ID != c.ID || !(a.One.NominalA > a.Three.NominalA) || !(a.Three.NominalA > now*all.Nominal.Factor) || !(a.One.RelyA < a.One.NominalA) {
			t.Errorf("%s: %+v, %.2f A with the others", a.ID, a, now*all.Nominal.Factor)
		}
		if base := 55.0; math.Abs(a.Three.NominalA/base-1) > 0.15 { // NEC 310.16, 8 AWG copper at 90 °C: three current-carrying conductors in a raceway, 30 °C
			t.Errorf("%s: three of them carry %.1f A, the table says %.0f A", a.ID, a.Three.NominalA, base)
		}
	}
}

// TestPermitsNested: a conductor within a construction keeps its jackets and loses its neighbours.
func TestPermitsNested(t *testing.T) {
	d := read(t, `
packrise: 1
surroundings: {kind: fixed-film, ambient_c: 20, film_w_m2k: 10}
holder: {kind: conduit, inside_mm: 30, fill: sand}
materials: {sand: {k_w_mk: 0.3}, ins: {k_w_mk: 0.2, limit_c: 70}}
builds:
  three:
    holder: {kind: jacket, inside_mm: 8, fill: sand, layers: [{material: ins, thickness_mm: 1}]}
    parts:
      - {id: L1, kind: core, conductor: {area_mm2: 2.5}, layers: [{material: ins, thickness_mm: 0.6}], at_mm: [0, 2]}
      - {id: L2, kind: core, conductor: {area_mm2: 2.5}, layers: [{material: ins, thickness_mm: 0.6}], at_mm: [0, -2]}
parts:
  - {id: C1, kind: cable, build: three, at_mm: [-6, 0]}
  - {id: C2, kind: cable, build: three, at_mm: [6, 0]}
loads:
  - {id: a, conductors: [C1/L1, C1/L2, C2/L1, C2/L2], current_a: 10}
`)
	one := isolate(d, "C2/L1", 10, section.Opt[float64]{})
	s := New(cat)
	base, err := s.solve(context.Background(), one, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if len(base.Conductors) != 1 || base.Conductors[0].ID != "C2/L1" {
		t.Fatalf("left: %+v", base.Conductors)
	}
	found := false
	for _, o := range base.Others {
		found = found || o.ID == "C2/jacket"
	}
	if !found {
		t.Error("the jacket of C2 is gone")
	}
	if len(d.Builds) != 1 || len(d.Parts) != 2 || len(d.Builds[0].Parts) != 2 {
		t.Error("the design itself was changed")
	}
}

// TestPermitsRefuse: nothing is rated while a current is unknown.
func TestPermitsRefuse(t *testing.T) {
	d := read(t, oneWire)
	d = d.With(func(d *section.Document) { d.Loads = nil })
	s := New(cat)
	base, err := s.solve(context.Background(), d, Options{})
	if err != nil {
		t.Fatal(err)
	}
	var no *Refusal
	if _, err := s.All(context.Background(), d, base, nil, Options{}); !errors.As(err, &no) || len(no.Problems) != 1 || len(no.Problems[0].IDs) != 1 {
		t.Errorf("got %v", err)
	}
	if p, err := s.All(context.Background(), d, base, nil, Options{AssumeIdle: true}); err != nil || !p.Rely.Unbounded {
		t.Errorf("assumed idle: %+v, %v", p, err)
	}
}

// TestSpread: what grows goes with the rise, what does not stays, and both add as squares.
func TestSpread(t *testing.T) {
	s := Spread{HighK: 5, StillK: 3, LowK: 2, AtRiseK: 40}
	if got := s.Upper(40); math.Abs(got-5) > 1e-12 {
		t.Errorf("at its own rise %.3f", got)
	}
	if got, want := s.Upper(80), math.Hypot(3, 8); math.Abs(got-want) > 1e-12 {
		t.Errorf("at twice the rise %.3f, want %.3f", got, want)
	}
	if got := s.Lower(20); math.Abs(got-1) > 1e-12 {
		t.Errorf("below, at half the rise %.3f", got)
	}
}

// alone is what one conductor may carry with everything else taken out.
func (s *Study) alone(ctx context.Context, e *rating.Engine, d *section.Document, c rating.Conductor, o Options) (Alone, error) {
	job, why := s.soloist(d, c.ID)
	if why != "" {
		return Alone{ID: c.ID, One: noAmperes, Three: noAmperes, Why: why}, nil
	}
	return s.solo(ctx, e, &job, o)
}
