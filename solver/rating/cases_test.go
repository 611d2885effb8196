package rating_test

import (
	"context"
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

const cases = "../../testdata/fe-cases"

// read opens a design and fails the test on any problem.
func read(t testing.TB, path string) *section.Document {
	t.Helper()
	d, problems, err := section.Open(path)
	if err != nil {
		t.Fatal(err)
	}
	for _, p := range problems {
		t.Fatal(p.At(path))
	}
	return d
}

// parse reads a design from text.
func parse(t testing.TB, text string) *section.Document {
	t.Helper()
	d, problems := section.Read([]byte(text))
	for _, p := range problems {
		t.Fatal(p.At("text"))
	}
	return d
}

func solve(t testing.TB, d *section.Document, o rating.Options) *rating.Result {
	t.Helper()
	r, problems, err := rating.NewEngine(catalog.Load()).Solve(context.Background(), d, o)
	if err != nil {
		t.Fatal(err)
	}
	for _, p := range problems {
		t.Fatal(p.Sentence())
	}
	return r
}

// expected reads a CSV of case, name, value, error.
func expected(t testing.TB, file string) map[string]map[string]float64 {
	t.Helper()
	f, err := os.Open(filepath.Join(cases, file))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	out := map[string]map[string]float64{}
	for _, row := range rows[1:] {
		v, err := strconv.ParseFloat(row[2], 64)
		if err != nil {
			t.Fatal(err)
		}
		if out[row[0]] == nil {
			out[row[0]] = map[string]float64{}
		}
		out[row[0]][row[1]] = v
	}
	return out
}

// TestFiniteElementSections solves the round and rectangular cases of testdata/fe-cases, conducting and radiating ones, from their files and compares every conductor with converged
// quadratic finite elements (Richardson values good to about 0.001 K, testdata/fe-cases/README.md).
func TestFiniteElementSections(t *testing.T) {
	files, err := filepath.Glob(filepath.Join(cases, "c*.yaml"))
	if err != nil || len(files) < 8 {
		t.Fatalf("only %d cases (%v)", len(files), err)
	}
	radiating, err := filepath.Glob(filepath.Join(cases, "r*.yaml"))
	if err != nil || len(radiating) < 6 {
		t.Fatalf("only %d radiating cases (%v)", len(radiating), err)
	}
	files = append(files, radiating...)
	want := expected(t, "expected.csv")
	for _, file := range files {
		name := strings.TrimSuffix(filepath.Base(file), ".yaml")
		t.Run(name, func(t *testing.T) {
			r := solve(t, read(t, file), rating.Options{})
			if r.Status != heat.Converged {
				t.Fatalf("status %v", r.Status)
			}
			if len(want[name]) == 0 {
				t.Fatal("no expected values")
			}
			worst := 0.0
			for _, c := range r.Conductors {
				w, ok := want[name][c.ID]
				if !ok {
					t.Fatalf("no expected value for %s", c.ID)
				}
				worst = max(worst, math.Abs(c.TempC-w))
				if d := math.Abs(c.TempC - w); d > 0.05 {
					t.Errorf("%s: %.4f °C, want %.4f", c.ID, c.TempC, w)
				}
			}
			t.Logf("largest difference %.4f K, estimated %.4f K, %d unknowns, %.1f ms", worst, r.ErrorK, r.Unknowns, r.Seconds*1e3)
			if in, out := r.Generated, r.Released+r.Absorbed; math.Abs(in-out) > 1e-6*math.Max(1, in) {
				t.Errorf("heat in %.9g W/m, out %.9g W/m", in, out)
			}
		})
	}
}

// TestSidesOfWireways compares the heat given off by each side with the finite-element values.
func TestSidesOfWireways(t *testing.T) {
	for name, sides := range expected(t, "expected_sides.csv") {
		r := solve(t, read(t, filepath.Join(cases, name+".yaml")), rating.Options{})
		scale := 0.0
		for _, w := range sides {
			scale = max(scale, math.Abs(w))
		}
		for side, w := range sides {
			if got := r.Sides[side]; math.Abs(got-w) > 0.005*scale {
				t.Errorf("%s, %s side: %.4f W/m, want %.4f", name, side, got, w)
			}
		}
	}
}
