package outline

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"gopkg.in/yaml.v3"
)

// TestCases solves whole sections and compares with converged finite elements (testdata/fe-cases, good to about 0.003 K; sides to 0.0005 W/m).
func TestCases(t *testing.T) {
	for _, c := range []struct {
		name   string
		within float64 // K
		sides  bool
	}{
		{"c09_rect7_floor_air", 0.006, false},
		{"c11_rect6_spaced_filler", 0.004, false},
		{"c13_sides_steel8", 0.008, true},
		{"c14b_sides_bare4", 0.002, true},
	} {
		t.Run(c.name, func(t *testing.T) {
			r, rods := readCase(t, c.name)
			orders(r, rods, 1)
			w := solveWhole(r, rods, 1, true)
			want := expected(t, "expected.csv", c.name)
			total := 0.0
			for i, p := range rods {
				total += p.heat
				if d := w.core[i] - want[p.id]; !(math.Abs(d) < c.within) {
					t.Errorf("%s: %.4f °C, want %.4f, off by %.4f K", p.id, w.core[i], want[p.id], d)
				}
			}
			_, _, out := w.wall.Faces(w.y, w.src)
			if d := out[0] + out[1] + out[2] + out[3] - total; !(math.Abs(d) < 1e-7*total) {
				t.Errorf("heat balance off by %g of %g W/m", d, total)
			}
			if !c.sides {
				return
			}
			want = expected(t, "expected_sides.csv", c.name)
			for i, side := range []string{"bottom", "right", "top", "left"} {
				if d := out[i] - want[side]; !(math.Abs(d) < 0.001) {
					t.Errorf("%s: %.4f W/m, want %.4f", side, out[i], want[side])
				}
			}
		})
	}
}

type caseFile struct {
	Surroundings struct {
		Ambient float64 `yaml:"ambient_c"`
		Film    float64 `yaml:"film_w_m2k"`
	}
	Holder struct {
		Width  float64 `yaml:"width_mm"`
		Height float64 `yaml:"height_mm"`
		Layers []layerFile
		Fill   string
		Sides  map[string]yaml.Node
	}
	Parts []struct {
		ID        string
		Conductor struct {
			Diameter float64 `yaml:"diameter_mm"`
		}
		Layers []layerFile
		At     [2]float64 `yaml:"at_mm"`
	}
	Loads []struct {
		Conductors []string
		Heat       float64 `yaml:"heat_w_m"`
	}
	Materials map[string]struct {
		K float64 `yaml:"k_w_mk"`
	}
}

type layerFile struct {
	Material  string
	Thickness float64 `yaml:"thickness_mm"`
}

const casesDir = "../../testdata/fe-cases"

// readCase reads one of the finite-element cases.
func readCase(t testing.TB, name string) (Rect, []rod) {
	t.Helper()
	raw, err := os.ReadFile(filepath.Join(casesDir, name+".yaml"))
	if err != nil {
		t.Fatal(err)
	}
	var f caseFile
	if err := yaml.Unmarshal(raw, &f); err != nil {
		t.Fatal(err)
	}
	r := Rect{W: f.Holder.Width / 1000, H: f.Holder.Height / 1000, MediumK: f.Materials[f.Holder.Fill].K}
	for _, l := range f.Holder.Layers {
		r.Layers = append(r.Layers, Layer{f.Materials[l.Material].K, l.Thickness / 1000})
	}
	for i, side := range []string{"bottom", "right", "top", "left"} {
		r.Sides[i] = Side{Kind: Open, Film: f.Surroundings.Film, Temp: f.Surroundings.Ambient}
		node, ok := f.Holder.Sides[side]
		switch {
		case !ok:
		case node.Value == "insulated":
			r.Sides[i] = Side{Kind: Insulated}
		default:
			var held struct {
				Fixed float64 `yaml:"fixed_c"`
			}
			if err := node.Decode(&held); err != nil {
				t.Fatal(err)
			}
			r.Sides[i] = Side{Kind: Held, Temp: held.Fixed}
		}
	}
	heat := map[string]float64{}
	for _, l := range f.Loads {
		for _, c := range l.Conductors {
			heat[c] = l.Heat
		}
	}
	var rods []rod
	for _, p := range f.Parts {
		q := rod{id: p.ID, c: complex(p.At[0]/1000, p.At[1]/1000), core: p.Conductor.Diameter / 2000, heat: heat[p.ID]}
		q.radius = q.core
		for _, l := range p.Layers {
			q.k, q.t = append(q.k, f.Materials[l.Material].K), append(q.t, l.Thickness/1000)
			q.radius += l.Thickness / 1000
		}
		rods = append(rods, q)
	}
	return r, rods
}

// expected reads a column of numbers of a case from one of the CSV files, by conductor or side.
func expected(t testing.TB, file, name string) map[string]float64 {
	t.Helper()
	f, err := os.Open(filepath.Join(casesDir, file))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	out := map[string]float64{}
	for _, row := range rows {
		if row[0] == name {
			out[row[1]] = number(t, row[2])
		}
	}
	if len(out) == 0 {
		t.Fatalf("%s has no %s", file, name)
	}
	return out
}

func number(t testing.TB, s string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}
