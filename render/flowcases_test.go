package render

import (
	"context"
	"math"
	"os"
	"path/filepath"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// TestFlowOfSolvedSections: in sections as they are solved, no two heat-flow lines cross, every one leaves, and as many leave as there
// is heat made and let in; where surfaces radiate to a part more than its own metal sends out, a few end and are left out.
func TestFlowOfSolvedSections(t *testing.T) {
	names := []string{
		"fe-cases/b04b_hex19_4loaded_gas", "fe-cases/c06_mixed19_settled_air", "fe-cases/c09_rect7_floor_air", "fe-cases/c13_sides_steel8",
		"fe-cases/c14b_sides_bare4", "fe-cases/h02b_ratio12", "fe-cases/m02_hose_air", "fe-cases/r03_wireway24_steel", "fe-cases/r09b_sides10_steel",
		"fe-cases/s03_bar_two_wires", "fe-cases/t91_settled_air",
	}
	if testing.Short() {
		names = names[4:5]
	}
	in := 0
	for _, name := range names {
		s, sheds := solvedScene(t, filepath.Join("..", "testdata", filepath.FromSlash(name)+".yaml"))
		fl := flowOf(s)
		left, want := 0, 0
		for _, m := range metalsOf(s) {
			want += int(math.Round(m.heat / fl.each))
		}
		for i, l := range fl.lines {
			if l.from < 0 {
				in++
				want++
			}
			if l.end != flowMet {
				left++
			}
			for j := range i {
				if q, met := crossing(l.points, fl.lines[j].points); met {
					t.Errorf("%s: lines %d and %d cross at %v", name, j, i, q)
				}
			}
		}
		if left > want || left < want && !sheds || float64(left) < 0.95*float64(want) || want < 10 {
			t.Errorf("%s: %d lines leave, the heat is %d", name, left, want)
		}
	}
	if in < 10 {
		t.Errorf("%d lines come in through hot sides", in)
	}
}

// solvedScene is a design solved, and whether surfaces radiate in it.
func solvedScene(t *testing.T, path string) (s Scene, radiates bool) {
	t.Helper()
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	d, problems := section.Read(data)
	if d == nil {
		t.Fatal(problems)
	}
	r, problems, err := rating.NewEngine(catalog.Load()).Solve(context.Background(), d, rating.Options{})
	if err != nil || r == nil {
		t.Fatal(path, err, problems)
	}
	for _, m := range d.Materials {
		radiates = radiates || m.Gas
	}
	return Scene{Shapes: r.Shapes, Readings: r.Readings(), AmbientC: r.AmbientC, Field: r, Flow: true}, radiates
}
