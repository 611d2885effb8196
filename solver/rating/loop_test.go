package rating_test

import (
	"context"
	"fmt"
	"math"
	"testing"

	"packrise/assets"
	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// TestRunawayInAir: in still air a wire settles where a fixed film of its cold state would let it run away, and the factor told is the
// largest that settles.
func TestRunawayInAir(t *testing.T) {
	at := func(i float64) *rating.Result {
		return solve(t, parse(t, bareWire("kind: still-air, ambient_c: 30", fmt.Sprintf("current_a: %g", i))), rating.Options{})
	}
	r := at(400)
	if r.Status != heat.ThermalRunaway || !(r.Settles > 0 && r.Settles < 1) {
		t.Fatalf("%v, settles %g", r.Status, r.Settles)
	}
	limit := 400 * r.Settles
	for _, f := range []float64{0.5, 0.8, 0.95, 0.99, 0.998} {
		if r := at(limit * f); r.Status != heat.Converged || r.Conductors[0].TempC > 1000 {
			t.Errorf("%.3f of the limit: %v, %.1f °C", f, r.Status, r.Conductors[0].TempC)
		}
	}
	for _, f := range []float64{1.002, 1.05, 1.5} {
		if r := at(limit * f); r.Status != heat.ThermalRunaway || math.Abs(r.Settles*f-1) > 2e-3 {
			t.Errorf("%.3f of the limit: %v, settles %.4f", f, r.Status, r.Settles*f)
		}
	}
}

// TestDraftKeepsFilms: while dragging the films stay as they were, and the answer on release is a fresh one's.
func TestDraftKeepsFilms(t *testing.T) {
	d := parse(t, `packrise: 1
surroundings: {kind: still-air, ambient_c: 30}
holder: {kind: conduit, stock: emt-1}
parts:
  - {id: A, kind: core, stock: thhn-8, at_mm: [0, -8]}
  - {id: B, kind: core, stock: thhn-8, at_mm: [0, 3]}
loads: [{id: a, conductors: [A, B], current_a: 40}]
`)
	e := rating.NewEngine(catalog.Load())
	ask := func(d *section.Document, g heat.Accuracy) *rating.Result {
		r, problems, err := e.Solve(context.Background(), d, rating.Options{Accuracy: g})
		if err != nil || r == nil {
			t.Fatal(problems, err)
		}
		return r
	}
	first := ask(d, heat.Standard)
	for y := 3.0; y > -1; y -= 0.5 {
		d = section.Move(d, "B", section.Point{X: 4, Y: y})
		draft := ask(d, heat.Draft)
		if draft.FilmWM2K != first.FilmWM2K {
			t.Fatalf("the film moved from %v to %v", first.FilmWM2K, draft.FilmWM2K)
		}
	}
	got, want := ask(d, heat.Standard), solve(t, d, rating.Options{})
	for i := range want.Conductors {
		if math.Abs(got.Conductors[i].TempC-want.Conductors[i].TempC) > 0.02 { // the air between the wires is taken to 0.05 % of its conductivity
			t.Errorf("%s on release %.4f °C, fresh %.4f", want.Conductors[i].ID, got.Conductors[i].TempC, want.Conductors[i].TempC)
		}
	}
	if draft := solve(t, d, rating.Options{Accuracy: heat.Draft}); math.Abs(draft.SurfaceC-want.SurfaceC) > 0.3 {
		t.Errorf("a first draft has its outside at %.3f °C, standard %.3f", draft.SurfaceC, want.SurfaceC)
	}
}

// BenchmarkOutside solves sections anew and again after a change of current.
func BenchmarkOutside(b *testing.B) {
	for _, name := range []string{"filled-control-cable", "nine-in-emt", "robot-umbilical"} {
		text, err := assets.Designs.ReadFile("designs/" + name + ".yaml")
		if err != nil {
			b.Fatal(err)
		}
		d := parse(b, string(text)).With(func(d *section.Document) {
			d.Surroundings = section.Surroundings{Kind: section.StillAir, AmbientC: d.Surroundings.AmbientC}
		})
		e := rating.NewEngine(catalog.Load())
		ask := func(e *rating.Engine, d *section.Document) {
			if r, problems, err := e.Solve(context.Background(), d, rating.Options{}); r == nil || r.Status != heat.Converged {
				b.Fatal(problems, err)
			}
		}
		b.Run(name+"/fresh", func(b *testing.B) {
			for b.Loop() {
				ask(rating.NewEngine(catalog.Load()), d)
			}
		})
		b.Run(name+"/again", func(b *testing.B) {
			ask(e, d)
			for n := 0; b.Loop(); n++ {
				ask(e, d.With(func(d *section.Document) {
					d.Loads = append([]section.Load(nil), d.Loads...)
					d.Loads[0].CurrentA.V *= 1 + 0.1*float64(n%2)
				}))
			}
		})
	}
}
