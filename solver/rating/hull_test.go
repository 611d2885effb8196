package rating_test

import (
	"math"
	"path/filepath"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// TestBundlesAgainstFiniteElements solves the open bundles of testdata/fe-cases from their files: converged finite elements, good to 1 to 5 mK,
// with radiation in the pockets in all but b02.
func TestBundlesAgainstFiniteElements(t *testing.T) {
	files, err := filepath.Glob(filepath.Join(cases, "b*.yaml"))
	if err != nil || len(files) < 5 {
		t.Fatalf("only %d bundles (%v)", len(files), err)
	}
	want := expected(t, "expected.csv")
	for _, file := range files {
		name := strings.TrimSuffix(filepath.Base(file), ".yaml")
		for acc, within := range map[heat.Accuracy]float64{heat.Standard: 0.03, heat.Fine: 0.01} {
			r := solve(t, read(t, file), rating.Options{Accuracy: acc})
			worst := 0.0
			for _, c := range r.Conductors {
				worst = max(worst, math.Abs(c.TempC-want[name][c.ID]))
			}
			if !(worst <= within) || r.Status != heat.Converged {
				t.Errorf("%s, accuracy %d: off by %.4f K, %v", name, acc, worst, r.Status)
			}
			if math.Abs(r.Generated-r.Released) > 1e-6*r.Generated {
				t.Errorf("%s: heat in %.9g W/m, out %.9g W/m", name, r.Generated, r.Released)
			}
		}
	}
}

// perimeter of a closed line.
func perimeter(p []section.Point) (l float64) {
	for i, a := range p {
		b := p[(i+1)%len(p)]
		l += math.Hypot(a.X-b.X, a.Y-b.Y)
	}
	return l
}

// TestBundleIsDrawnByItsHull: the drawn string is as long as the reference says (testdata/fe-cases/expected_geometry.csv), the polygon's own
// shortness of 0.01 % allowed for.
func TestBundleIsDrawnByItsHull(t *testing.T) {
	for name, values := range expected(t, "expected_geometry.csv") {
		want, ok := values["hull_perimeter_mm"]
		if !ok {
			continue
		}
		shapes, problems := rating.Outline(read(t, filepath.Join(cases, name+".yaml")), catalog.Load())
		if len(problems) > 0 {
			t.Fatal(problems)
		}
		h := shapes[0]
		if h.ID != "" || h.Kind != section.OpenBundle || len(h.Loops) != 1 {
			t.Fatalf("%s: the holder is drawn as %+v", name, h)
		}
		if l := perimeter(h.Loops[0]); math.Abs(l-want) > 2e-4*want {
			t.Errorf("%s: hull of %.5f mm, want %.5f", name, l, want)
		}
		x0, y0, x1, y1 := solve(t, read(t, filepath.Join(cases, name+".yaml")), rating.Options{}).Bounds()
		for _, p := range h.Loops[0] {
			if p.X < x0-1e-9 || p.X > x1+1e-9 || p.Y < y0-1e-9 || p.Y > y1+1e-9 {
				t.Errorf("%s: %v outside the bounds", name, p)
			}
			if math.Hypot(p.X-h.At.X, p.Y-h.At.Y) > h.OuterR()*(1+1e-6) {
				t.Errorf("%s: %v outside the circle round the bundle", name, p)
			}
		}
	}
}

const bundleOfThree = `packrise: 1
title: bundle of three
surroundings: {kind: still-air, ambient_c: 30}
holder: {kind: open-bundle, fill: air}
parts:
  - {id: a, kind: core, conductor: {diameter_mm: 2, metal: copper}, layers: [{material: pvc, thickness_mm: 1}], at_mm: [-2, 0]}
  - {id: b, kind: core, conductor: {diameter_mm: 2, metal: copper}, layers: [{material: pvc, thickness_mm: 1}], at_mm: [2, 0]}
  - {id: c, kind: core, conductor: {diameter_mm: 2, metal: copper}, layers: [{material: pvc, thickness_mm: 1}], at_mm: [0, 3.4641016]}
loads: [{id: all, conductors: [a, b, c], current_a: 20}]
`

// gap of two parts as drawn, mm.
func gap(shapes []section.Shape, a, b string) float64 {
	var p, q section.Shape
	for _, s := range shapes {
		switch s.ID {
		case a:
			p = s
		case b:
			q = s
		}
	}
	return math.Hypot(p.At.X-q.At.X, p.At.Y-q.At.Y) - p.OuterR() - q.OuterR()
}

// TestBundleClearance: in a gas the parts are moved apart by 0.05 mm, or as given; no part gets smaller, and the hull follows.
func TestBundleClearance(t *testing.T) {
	for _, c := range []struct {
		from, to string
		gap      float64
	}{{"", "", 0.05}, {"fill: air", "fill: air, clearance_mm: 0.3", 0.3}, {"fill: air", "fill: air, clearance_mm: 0", 0}, {"fill: air", "fill: pvc", 0}} {
		d := parse(t, strings.Replace(bundleOfThree, c.from, c.to, 1))
		shapes, problems := rating.Outline(d, catalog.Load())
		if len(problems) > 0 {
			t.Fatal(problems)
		}
		for _, pair := range [][2]string{{"a", "b"}, {"b", "c"}, {"c", "a"}} {
			if g := gap(shapes, pair[0], pair[1]); math.Abs(g-c.gap) > 2e-6 {
				t.Errorf("%s: gap of %s and %s is %.7f mm, want %g", c.to, pair[0], pair[1], g, c.gap)
			}
		}
		// the string round three equal parts: their circumference and three centre distances
		want := 2*math.Pi*2 + 3*(4+c.gap)
		if l := perimeter(shapes[0].Loops[0]); math.Abs(l-want) > 2e-4*want {
			t.Errorf("%s: hull of %.4f mm, want %.4f", c.to, l, want)
		}
		r := solve(t, d, rating.Options{})
		if c.gap == 0.05 {
			found := false
			for _, n := range r.Notes {
				found = found || strings.Contains(n, "clearance") && strings.Contains(n, "0.05")
				if strings.Contains(n, "enclosing circle") {
					t.Error("still reckoned as a circle: " + n)
				}
			}
			if !found {
				t.Errorf("no word of the clearance in %q", r.Notes)
			}
		}
	}
}

// TestStringEmissivity: what the strings' inner faces take up makes a little difference, and only in a gas.
func TestStringEmissivity(t *testing.T) {
	at := func(text string) float64 { return solve(t, parse(t, text), rating.Options{}).Conductors[0].TempC }
	with := func(e string) string {
		return strings.Replace(bundleOfThree, "fill: air", "fill: air, string_emissivity: "+e, 1)
	}
	usual, dark, bright := at(bundleOfThree), at(with("0.9")), at(with("0.05"))
	if math.Abs(usual-dark) > 1e-9 {
		t.Errorf("%.4f °C by default, %.4f with 0.9", usual, dark)
	}
	if d := bright - dark; d < 0.01 || d > 3 {
		t.Errorf("bright strings change the temperature by %.4f K", d)
	}
}

// TestWrappedBundle: thermal insulation makes a round wall of a bundle, and says so.
func TestWrappedBundle(t *testing.T) {
	text := strings.Replace(bundleOfThree, "kind: still-air, ambient_c: 30", "kind: insulation, ambient_c: 30, wrap: {material: mineral-wool, thickness_mm: 20}", 1)
	r := solve(t, parse(t, text), rating.Options{})
	if !strings.Contains(strings.Join(r.Notes, "\n"), "enclosing circle of ⌀ 8.62 mm") { // 2·(2 + 4/√3) mm
		t.Errorf("notes %q", r.Notes)
	}
	open := solve(t, parse(t, bundleOfThree), rating.Options{})
	if r.Conductors[0].TempC < open.Conductors[0].TempC+5 {
		t.Errorf("wrapped %.1f °C, open %.1f °C", r.Conductors[0].TempC, open.Conductors[0].TempC)
	}
}

// TestBundleOfOne is a bare part: the same as holder kind none.
func TestBundleOfOne(t *testing.T) {
	i := strings.Index(bundleOfThree, "  - {id: b")
	j := strings.Index(bundleOfThree, "loads")
	one := bundleOfThree[:i] + strings.Replace(bundleOfThree[j:], "[a, b, c]", "[a]", 1)
	a := solve(t, parse(t, one), rating.Options{})
	b := solve(t, parse(t, strings.Replace(one, "kind: open-bundle, fill: air", "kind: none", 1)), rating.Options{})
	if d := a.Conductors[0].TempC - b.Conductors[0].TempC; math.Abs(d) > 0.005 {
		t.Errorf("alone in a bundle %.4f °C, bare %.4f °C", a.Conductors[0].TempC, b.Conductors[0].TempC)
	}
}
