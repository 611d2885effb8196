package rating_test

import (
	"math"
	"path/filepath"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// The reference sections with parts that are not round (testdata/fe-cases/README.md), from their files to the answer.
func TestFormedReferenceCases(t *testing.T) {
	want := expected(t, "expected.csv")
	for _, name := range []string{"s01_sector4", "s02b_flat_air", "s03_bar_two_wires"} {
		r := solve(t, read(t, filepath.Join(cases, name+".yaml")), rating.Options{})
		for _, c := range r.Conductors {
			if e := c.TempC - want[name][c.ID]; math.Abs(e) > 0.005 {
				t.Errorf("%s: %s is off by %.4f K", name, c.ID, e)
			}
		}
		if math.Abs(r.Released-r.Generated) > 2e-4*r.Generated {
			t.Errorf("%s: %g of %g W/m released", name, r.Released, r.Generated)
		}
		x0, y0, x1, y1 := r.Bounds()
		row := make([]float64, 3)
		r.Row(row, (y0+y1)/2, x0-0.01, (x1-x0+0.02)/2)
		if !math.IsNaN(row[0]) || math.IsNaN(row[1]) || !math.IsNaN(row[2]) {
			t.Errorf("%s: field %v across its bounds", name, row)
		}
		for _, s := range r.Shapes {
			if len(s.Loops) != 0 && len(s.Loops) != len(s.Rings) {
				t.Errorf("%s: %q has %d outlines of %d rings", name, s.ID, len(s.Loops), len(s.Rings))
			}
			for i, l := range s.Loops {
				far := 0.0
				for _, q := range l {
					far = max(far, math.Hypot(q.X-s.At.X, q.Y-s.At.Y))
				}
				if far > s.Rings[i].R1+1e-6 || far < 0.98*s.Rings[i].R1 {
					t.Errorf("%s: %q reaches %g mm in a circle of %g mm", name, s.ID, far, s.Rings[i].R1)
				}
			}
		}
	}
}

const barHead = "packrise: 1\nsurroundings: {kind: still-air, ambient_c: 35}\n"

// A busbar alone in still air: its loss leaves through the film at its own temperature; resistance ρ·l/A of IEC 60228's copper (17.241 nΩm at 20 °C,
// IEC 60028) on the area of the outline.
func TestBareBar(t *testing.T) {
	r := solve(t, parse(t, barHead+`holder: {kind: none}
parts:
  - {id: B, kind: core, conductor: {shape: bar, width_mm: 30, height_mm: 5, corner_mm: 0.5, metal: copper, class: solid}, at_mm: [3, 4], turn_deg: 90}
loads:
  - {id: a, conductors: [B], current_a: 300}
`), rating.Options{})
	c := r.Conductors[0]
	area := 150 - (4-math.Pi)*0.25
	if want := 17.241e-3 / area * (1 + 0.00393*(c.TempC-20)); math.Abs(c.ResistanceOhm/want-1) > 0.01 {
		t.Errorf("resistance %.4g Ω/m, want %.4g", c.ResistanceOhm, want)
	}
	around := (2*(30+5) - 8*0.5 + math.Pi) * 1e-3
	if want := 35 + c.HeatWM/(around*r.FilmWM2K.V); math.Abs(c.TempC-want) > 0.1 {
		t.Errorf("%.3f °C, want %.3f", c.TempC, want)
	}
	if !strings.Contains(strings.Join(r.Notes, "\n"), "cylinder of the same circumference") {
		t.Errorf("notes %q do not say what stands for the film", r.Notes)
	}
	if x0, _, x1, _ := r.Bounds(); x0 > 0.5 || x1 < 5.5 {
		t.Errorf("bounds %g … %g", x0, x1)
	}
}

// A flat twin-and-earth cable in a conduit, turned: the cable is drawn and reckoned turned, as if the conduit were turned the other way.
func TestFlatCableInConduit(t *testing.T) {
	text := func(turn string) string {
		return barHead + `holder: {kind: conduit, inside_mm: 20, layers: [{material: pvc, thickness_mm: 1.5}]}
parts:
  - {id: C, kind: cable, build: twin, at_mm: [0, 0], turn_deg: ` + turn + `}
builds:
  twin:
    holder: {kind: jacket, width_mm: 8.4, height_mm: 4.4, layers: [{material: pvc, thickness_mm: 1}], fill: pvc}
    parts:
      - {id: L, kind: core, conductor: {size: 2.5 mm2}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [-2, 0]}
      - {id: N, kind: core, conductor: {size: 2.5 mm2}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [2, 0]}
loads:
  - {id: a, conductors: [C/L, C/N], current_a: 20}
`
	}
	a, b := solve(t, parse(t, text("0")), rating.Options{}), solve(t, parse(t, text("65")), rating.Options{})
	for i := range a.Conductors {
		if d := a.Conductors[i].TempC - b.Conductors[i].TempC; math.Abs(d) > 0.02 {
			t.Errorf("%s: turned by %.4f K", a.Conductors[i].ID, d)
		}
	}
	if d := a.Conductors[0].TempC - a.Conductors[1].TempC; math.Abs(d) > 0.01 {
		t.Errorf("a symmetric cable is lopsided by %.4f K", d)
	}
}

func TestFormedProblems(t *testing.T) {
	bar := "{id: B, kind: core, conductor: {shape: bar, width_mm: 20, height_mm: 5}, layers: [{material: pvc, thickness_mm: 1}], at_mm: [0, 0]%s}"
	part := func(more string) string { return "parts:\n  - " + strings.Replace(bar, "%s", more, 1) + "\n" }
	for name, c := range map[string]struct{ text, want string }{
		"fits":          {"holder: {kind: conduit, inside_mm: 24}\n" + part(""), ""},
		"sticks out":    {"holder: {kind: conduit, inside_mm: 22}\n" + part(""), "B reaches"},
		"turned":        {"holder: {kind: jacket, width_mm: 25, height_mm: 9}\n" + part(""), ""},
		"across":        {"holder: {kind: jacket, width_mm: 24, height_mm: 9}\n" + part(", turn_deg: 90"), "B reaches"},
		"sector bundle": {"holder: {kind: open-bundle}\n" + part("") + "  - {id: S, kind: core, conductor: {shape: sector, angle_deg: 90, radius_mm: 8, corner_mm: 0.8}, at_mm: [0, 12]}\n", "no sector conductors"},
		"bar bundle":    {"holder: {kind: open-bundle}\n" + part("") + "  - {id: W, kind: core, conductor: {diameter_mm: 4}, at_mm: [0, 5.5]}\n", ""},
		"wire beside":   {"holder: {kind: conduit, inside_mm: 40}\n" + part("") + "  - {id: W, kind: core, conductor: {diameter_mm: 4}, at_mm: [0, 5.5]}\n", ""},
		"wire in it":    {"holder: {kind: conduit, inside_mm: 40}\n" + part("") + "  - {id: W, kind: core, conductor: {diameter_mm: 4}, at_mm: [0, 5.4]}\n", "B overlaps W by 0.1 mm"},
		"metal":         {"holder: {kind: conduit, inside_mm: 40}\n" + strings.Replace(part(""), "height_mm: 5", "height_mm: 5, area_mm2: 120", 1), "do not fit into an outline"},
	} {
		d, problems := section.Read([]byte(barHead + c.text))
		if d == nil {
			t.Fatalf("%s: %v", name, problems)
		}
		_, problems = rating.Outline(d, catalog.Load())
		var all []string
		for _, p := range problems {
			all = append(all, p.Sentence())
		}
		got := strings.Join(all, "; ")
		if c.want == "" && got != "" || !strings.Contains(got, c.want) {
			t.Errorf("%s: %q, want %q", name, got, c.want)
		}
	}
}

// A busbar in an open bundle with three wires on it and one under it: its outside is the string round bar and wires, heat balances, and what is drawn of the
// string reaches exactly as far as they do.
func TestBarInBundle(t *testing.T) {
	r := solve(t, parse(t, barHead+`holder: {kind: open-bundle, clearance_mm: 0}
parts:
  - {id: B, kind: core, conductor: {shape: bar, width_mm: 30, height_mm: 5, corner_mm: 0.5, metal: copper, class: solid}, layers: [{material: pvc, thickness_mm: 1}], at_mm: [0, 0]}
  - {id: w1, kind: core, conductor: {diameter_mm: 2.04}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [-4, 5.32]}
  - {id: w2, kind: core, conductor: {diameter_mm: 2.04}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [0, 5.32]}
  - {id: w3, kind: core, conductor: {diameter_mm: 2.04}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [4, 5.32]}
  - {id: w4, kind: core, conductor: {diameter_mm: 2.04}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [0, -5.32]}
loads:
  - {id: a, conductors: [B], current_a: 250}
  - {id: b, conductors: [w1, w2, w3, w4], current_a: 12}
`), rating.Options{})
	if math.Abs(r.Released-r.Generated) > 1e-3*r.Generated {
		t.Errorf("%g of %g W/m released", r.Released, r.Generated)
	}
	temp := map[string]float64{}
	for _, c := range r.Conductors {
		temp[c.ID] = c.TempC
	}
	if temp["w1"] != 0 && math.Abs(temp["w1"]-temp["w3"]) > 0.01 {
		t.Errorf("mirrored wires at %g and %g °C", temp["w1"], temp["w3"])
	}
	if !(temp["w2"] > temp["w1"] && temp["w2"] > temp["w4"] && temp["w4"] > 36) {
		t.Errorf("the wire between two others is not the hottest: %v", temp)
	}
	hull := r.Shapes[0].Loops[0]
	lo, hi := hull[0], hull[0]
	for _, p := range hull {
		lo.X, lo.Y, hi.X, hi.Y = min(lo.X, p.X), min(lo.Y, p.Y), max(hi.X, p.X), max(hi.Y, p.Y)
	}
	if math.Abs(lo.X+16) > 1e-3 || math.Abs(hi.X-16) > 1e-3 || math.Abs(hi.Y+lo.Y) > 1e-2 || hi.Y < 7 || hi.Y > 7.2 {
		t.Errorf("string from %v to %v", lo, hi)
	}
}

// What stands for the film of a bar that lies flat, and for the skin effect of a large one at 50 Hz, is said. A round copper conductor of 1000 mm² has x_s² =
// 8π·50·10⁻⁷/(1.7241·10⁻⁵ Ω/m) = 7.29 at 20 °C, y_s = x⁴/(192 + 0.8x⁴) = 0.227 (IEC 60287-1-1, 2.1.2).
func TestBarNotes(t *testing.T) {
	r := solve(t, parse(t, barHead+`holder: {kind: none}
parts:
  - {id: B, kind: core, conductor: {shape: bar, width_mm: 100, height_mm: 10, metal: copper, class: solid}, at_mm: [0, 0]}
loads:
  - {id: a, conductors: [B], current_a: 1200, frequency_hz: 50}
`), rating.Options{})
	notes := strings.Join(r.Notes, "\n")
	for _, want := range []string{"lying flat", "round conductor of the same resistance", "22.7 % to B"} {
		if !strings.Contains(notes, want) {
			t.Errorf("notes %q lack %q", notes, want)
		}
	}
}
