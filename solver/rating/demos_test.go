package rating_test

import (
	"io/fs"
	"math"
	"strings"
	"testing"

	"packrise/assets"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// TestDemos: every demo design reads, solves, closes its heat balance, has no metal below ambient and says in its
// notes which question it answers.
func TestDemos(t *testing.T) {
	files, err := fs.Glob(assets.Designs, "designs/*.yaml")
	if err != nil || len(files) < 3 {
		t.Fatalf("%d demos (%v)", len(files), err)
	}
	for _, file := range files {
		t.Run(file, func(t *testing.T) {
			data, err := fs.ReadFile(assets.Designs, file)
			if err != nil {
				t.Fatal(err)
			}
			d, problems := section.Read(data)
			if len(problems) > 0 {
				t.Fatal(problems)
			}
			if !strings.Contains(d.Notes, "Question:") {
				t.Error("the notes do not say which question it answers")
			}
			if d.Surroundings.Kind == section.FixedFilm && !strings.Contains(d.Notes, "film") {
				t.Error("the notes do not say that the film is fixed")
			}
			r := solve(t, d, rating.Options{})
			if r.Status != heat.Converged || math.Abs(r.Generated-r.Released-r.Absorbed) > 1e-6*r.Generated {
				t.Errorf("%v: in %g, out %g", r.Status, r.Generated, r.Released+r.Absorbed)
			}
			for _, c := range r.Conductors {
				if c.TempC <= r.AmbientC || !c.LoadKnown || !c.LimitC.OK {
					t.Errorf("%+v", c)
				}
			}
			if len(r.Unassigned) > 0 {
				t.Errorf("unassigned: %v", r.Unassigned)
			}
		})
	}
}
