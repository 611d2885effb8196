package rating_test

import (
	"context"
	"fmt"
	"math"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// one is a single insulated conductor in open surroundings with a fixed film.
func one(current, film, ambient float64, fixed string) string {
	load := fmt.Sprintf("current_a: %g", current)
	if fixed != "" {
		load = fixed
	}
	return fmt.Sprintf(`packrise: 1
surroundings: {kind: fixed-film, ambient_c: %g, film_w_m2k: %g}
holder: {kind: none}
parts:
  - {id: L1, kind: core, conductor: {diameter_mm: 3, class: solid}, layers: [{material: cover, thickness_mm: 2}], at_mm: [5, -7]}
loads: [{id: a, conductors: [L1], %s}]
materials: {cover: {k_w_mk: 0.15, limit_c: 105}}
`, ambient, film, load)
}

// TestInsulatedWire is the textbook's wire: d 3 mm, 2 mm of k 0.15 W/mK, 10 A × 8 V over 5 m, h 12 W/m²K, 30 °C: the metal is at 105 °C
// (Çengel, Heat Transfer, insulated electric wire; from memory, the arithmetic gives 105.0).
func TestInsulatedWire(t *testing.T) {
	r := solve(t, parse(t, one(0, 12, 30, "heat_w_m: 16")), rating.Options{})
	if got := r.Conductors[0].TempC; math.Abs(got-105.0) > 0.2 {
		t.Errorf("%.3f °C, want 105.0", got)
	}
}

// TestResistanceFollowsTemperature compares the fixed point with the closed form for one wire: T − Ta = R20 I² Rth (1 + α(T − 20)).
func TestResistanceFollowsTemperature(t *testing.T) {
	rth := math.Log(7.0/3)/(2*math.Pi*0.15) + 1/(12*math.Pi*0.007)
	r20 := 1.7241e-8 / (math.Pi / 4 * 9e-6) // IEC 60287-1-1 table 1
	for _, i := range []float64{10, 40, 60} {
		r := solve(t, parse(t, one(i, 12, 30, "")), rating.Options{Accuracy: heat.Fine})
		c := r.Conductors[0]
		// the catalogue may add a stranding allowance: take R20 from its own answer
		r20c := c.ResistanceOhm / (1 + 0.00393*(c.TempC-20))
		if r20c < r20*0.999 || r20c > r20*1.05 {
			t.Fatalf("R20 %.4g Ω/m, want near %.4g", r20c, r20)
		}
		g := r20c * i * i * rth
		want := (30 + g*(1-20*0.00393)) / (1 - g*0.00393)
		if math.Abs(c.TempC-want) > 1e-3 {
			t.Errorf("%g A: %.5f °C, want %.5f", i, c.TempC, want)
		}
	}
}

// TestRunaway: for one wire a steady state exists up to I² R20 α Rth = 1 or 1000 °C, in closed form.
func TestRunaway(t *testing.T) {
	d := parse(t, one(150, 12, 30, ""))
	r := solve(t, d, rating.Options{})
	if r.Status != heat.ThermalRunaway || r.RunawayAt != "L1" {
		t.Fatalf("status %v at %q", r.Status, r.RunawayAt)
	}
	small := solve(t, parse(t, one(10, 12, 30, "")), rating.Options{Accuracy: heat.Fine}).Conductors[0]
	r20 := small.ResistanceOhm / (1 + 0.00393*(small.TempC-20))
	rth := math.Log(7.0/3)/(2*math.Pi*0.15) + 1/(12*math.Pi*0.007)
	// 1000 = 30 + s² I² R20 Rth (1 + α 980)
	want := math.Sqrt(970/(r20*rth*(1+0.00393*980))) / 150
	if math.Abs(r.Settles-want) > 1e-3*want {
		t.Errorf("settles up to %.5f, want %.5f", r.Settles, want)
	}
	answer, _ := r.Sentence()
	if !strings.Contains(answer, "No steady temperature") || !strings.Contains(answer, "L1") {
		t.Errorf("sentence: %s", answer)
	}
	if again := solve(t, parse(t, one(150*r.Settles*0.999, 12, 30, "")), rating.Options{}); again.Status != heat.Converged || again.Conductors[0].TempC > 1000 {
		t.Errorf("just below: %v, %.1f °C", again.Status, again.Conductors[0].TempC)
	}
	if again := solve(t, parse(t, one(150*r.Settles*1.001, 12, 30, "")), rating.Options{}); again.Status != heat.ThermalRunaway {
		t.Errorf("just above: %v", again.Status)
	}
}

// TestSkin: 300 mm² copper at 90 °C and 50 Hz, d.c. resistance 0.0601 Ω/km at 20 °C (IEC 60228): y_s = 0.01385 (IEC 60287-1-1 with k_s = 1,
// computed).
func TestSkin(t *testing.T) {
	dc := 0.0601e-3 * (1 + 0.00393*70)
	if got := rating.Skin(dc, 50); math.Abs(got-0.01385) > 0.01*0.01385 {
		t.Errorf("y_s = %.5f, want 0.01385", got)
	}
	if rating.Skin(dc, 0) != 0 {
		t.Error("a direct current has no skin effect")
	}
	for _, x := range []float64{2.8, 3.8} { // the standard's ranges meet
		ohm := 8 * math.Pi * 50e-7 / (x * x)
		if a, b := rating.Skin(ohm*1.0001, 50), rating.Skin(ohm*0.9999, 50); math.Abs(a-b) > 0.01*a {
			t.Errorf("x_s = %g: %.4f below, %.4f above", x, a, b)
		}
	}
}

// TestEngineReuse: an engine that has seen other documents gives the same numbers as a fresh one.
func TestEngineReuse(t *testing.T) {
	a := read(t, cases+"/c04_hex7_touch_wall_air.yaml")
	b := section.Move(a, a.Parts[0].ID, section.Point{X: a.Parts[0].At.V.X, Y: a.Parts[0].At.V.Y})
	b = b.With(func(d *section.Document) {
		d.Surroundings.FilmWM2K = section.Some(12.0)
	})
	e := rating.NewEngine(catalog.Load())
	for _, d := range []*section.Document{a, b, a} {
		got, _, err := e.Solve(context.Background(), d, rating.Options{})
		if err != nil {
			t.Fatal(err)
		}
		want := solve(t, d, rating.Options{})
		for i := range want.Conductors {
			if math.Abs(got.Conductors[i].TempC-want.Conductors[i].TempC) > 2e-3 {
				t.Errorf("%s: %.5f, fresh %.5f", got.Conductors[i].ID, got.Conductors[i].TempC, want.Conductors[i].TempC)
			}
		}
	}
}
