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

// solved solves a document that may have problems which only warn.
func solved(t *testing.T, text string) (*rating.Result, []section.Problem) {
	t.Helper()
	r, problems, err := rating.NewEngine(catalog.Load()).Solve(context.Background(), parse(t, text), rating.Options{Accuracy: heat.Fine})
	if err != nil || r == nil {
		t.Fatal(err, problems)
	}
	return r, problems
}

func ruleOf(problems []section.Problem, rule string) *section.Problem {
	for i := range problems {
		if problems[i].Rule == rule {
			return &problems[i]
		}
	}
	return nil
}

// oneCore is a core of 4 mm radius of metal alone on a wall held at 30 °C, with 12 W/m.
func oneCore(layers, more string) string {
	return "packrise: 1\nsurroundings: {kind: fixed-wall, ambient_c: 30}\nholder: {kind: none}\n" +
		"parts:\n  - {id: L1, kind: core, conductor: {diameter_mm: 8}, layers: [" + layers + "], at_mm: [0, 0]" + more + "}\n" +
		"loads: [{id: a, conductors: [L1], heat_w_m: 12}]\n" +
		"materials: {hot: {k_w_mk: 0.25, limit_c: 90}, cool: {k_w_mk: 0.2, limit_c: 33}, plain: {k_w_mk: 0.2}}\n"
}

// TestCoveringLayers: a layer that bears less than the insulation is judged at its own inside, after the closed form of a cylinder,
// ΔT = q ln(b/a) / (2 π k); the metal by the innermost layer that has a limit.
func TestCoveringLayers(t *testing.T) {
	r, problems := solved(t, oneCore("{material: hot, thickness_mm: 2}, {material: cool, thickness_mm: 3}", ""))
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	inside := 30 + 12*math.Log(9.0/6)/(2*math.Pi*0.2)
	metal := inside + 12*math.Log(6.0/4)/(2*math.Pi*0.25)
	c, g := r.Conductors[0], r.Governing
	if math.Abs(c.TempC-metal) > 1e-6 || c.HottestC != c.TempC || c.LimitC != section.Some(90.0) || !c.Heats {
		t.Errorf("%+v; want %.6f", c, metal)
	}
	if g == nil || g.Part != "L1/layer/2" || math.Abs(g.TempC-inside) > 1e-6 || g.LimitC != 33 || g.Heats || g.Insulation || r.State() != rating.OverWord {
		t.Errorf("%+v; want %.6f", g, inside)
	}
	for _, c := range []struct {
		name, layers, more string
		limit              float64
		layer              bool
	}{
		{"the outer bears more", "{material: cool, thickness_mm: 2}, {material: hot, thickness_mm: 3}", "", 33, false},
		{"the innermost has none", "{material: plain, thickness_mm: 2}, {material: cool, thickness_mm: 3}", "", 33, false},
		{"a layer between", "{material: hot, thickness_mm: 2}, {material: plain, thickness_mm: 1}, {material: cool, thickness_mm: 3}", "", 90, true},
		{"the person's own speaks for all", "{material: hot, thickness_mm: 2}, {material: cool, thickness_mm: 3}", ", limit_c: 33", 33, false},
		{"a type speaks for its insulation", "{material: pvc, thickness_mm: 2}, {material: nylon, thickness_mm: 0.1}", ", type: thhn", 90, false},
		{"a type does not speak for a sleeve", "{material: xlpe, thickness_mm: 2}, {material: pvc, thickness_mm: 1}", ", type: xhhw-2", 90, true},
	} {
		r, _ := solved(t, oneCore(c.layers, c.more))
		layer := false
		for _, o := range r.Others {
			layer = layer || strings.HasPrefix(o.ID, "L1/layer/")
		}
		if r.Conductors[0].LimitC != section.Some(c.limit) || layer != c.layer {
			t.Errorf("%s: %+v, layers %v; want %v, %v", c.name, r.Conductors[0].LimitC, layer, c.limit, c.layer)
		}
	}
}

// TestCoveredRod: a rod's covering is judged at its own faces.
func TestCoveredRod(t *testing.T) {
	r, _ := solved(t, "packrise: 1\nsurroundings: {kind: fixed-wall, ambient_c: 30}\nholder: {kind: conduit, inside_mm: 20}\n"+
		"parts:\n  - {id: F, kind: rod, diameter_mm: 4, material: hot, layers: [{material: cool, thickness_mm: 1}], at_mm: [-4, 0]}\n"+
		"  - {id: L1, kind: core, conductor: {diameter_mm: 4}, layers: [{material: hot, thickness_mm: 1}], at_mm: [3, 0]}\n"+
		"loads: [{id: a, conductors: [L1], heat_w_m: 12}]\nmaterials: {hot: {k_w_mk: 0.25, limit_c: 90}, cool: {k_w_mk: 0.2, limit_c: 33}}\n")
	if len(r.Others) < 2 || r.Others[0].ID != "F" || r.Others[0].LimitC != section.Some(90.0) || r.Others[1].ID != "F/layer/1" || r.Others[1].LimitC != section.Some(33.0) ||
		!(r.Others[1].TempC > 30 && r.Others[1].TempC <= r.Others[0].TempC+1e-9) {
		t.Errorf("%+v", r.Others)
	}
}

// TestSpareIsJudgedAtItsInsulation: the insulation of a spare that touches a hot conductor is hotter than its metal, which evens out.
func TestSpareIsJudgedAtItsInsulation(t *testing.T) {
	text := func(limit float64) string {
		return "packrise: 1\nsurroundings: {kind: fixed-wall, ambient_c: 30}\nholder: {kind: conduit, inside_mm: 14}\n" +
			"parts:\n  - {id: L1, kind: core, conductor: {diameter_mm: 4}, layers: [{material: xlpe, thickness_mm: 1}], at_mm: [-3, 0], limit_c: 90}\n" +
			fmt.Sprintf("  - {id: S, kind: core, role: spare, conductor: {diameter_mm: 4}, layers: [{material: xlpe, thickness_mm: 1}], at_mm: [3, 0], limit_c: %g}\n", limit) +
			"loads: [{id: a, conductors: [L1], heat_w_m: 12}, {id: none, conductors: [S], current_a: 0}]\n"
	}
	r, _ := solved(t, text(80))
	hot, spare := r.Conductors[0], r.Conductors[1]
	if !hot.Heats || spare.Heats || hot.HottestC != hot.TempC || spare.HottestC < spare.TempC+1 || spare.HottestC > hot.TempC {
		t.Fatalf("%.2f %.2f, spare %.2f %.2f", hot.TempC, hot.HottestC, spare.TempC, spare.HottestC)
	}
	limit := math.Floor((spare.TempC + spare.HottestC) / 2)
	r, _ = solved(t, text(limit))
	g := r.Governing
	if g == nil || g.Part != "S" || !g.Insulation || g.Heats || g.TempC != spare.HottestC || r.State() != rating.OverWord {
		t.Fatalf("limit %g: %+v", limit, g)
	}
	if s, _ := r.Sentence(); !strings.Contains(s, "S governs by its insulation") {
		t.Error(s)
	}
}

// TestRaisedLimits: a limit above the catalogue's needs a reason, which then stands on every result.
func TestRaisedLimits(t *testing.T) {
	design := func(limit, surroundings, reasons string) string {
		return "packrise: 1\nsurroundings: {kind: fixed-wall, ambient_c: 30" + surroundings + "}\nholder: {kind: conduit, inside_mm: 20}\n" +
			"parts:\n  - {id: L1, kind: core, stock: thhn-12, at_mm: [0, 0], limit_c: " + limit + "}\n  - {id: L2, kind: core, stock: thhn-12, at_mm: [5, 0], limit_c: " + limit + "}\n" + reasons
	}
	// THHN: 90 °C dry (NFPA 70 table 310.4(A), from memory)
	r, problems := solved(t, design("90", "", ""))
	if len(problems) > 0 || r.Unreasoned != nil {
		t.Errorf("%v %v", problems, r.Unreasoned)
	}
	r, problems = solved(t, design("105", "", "reasons: {limit L2: 'data sheet 7, page 3'}\n"))
	p := ruleOf(problems, rating.RuleNoReason)
	if p == nil || len(problems) != 1 || p.Severity != section.Warned || p.Line != 5 || strings.Join(r.Unreasoned, " ") != "L1" ||
		!strings.Contains(p.Sentence(), "the limit of L1 is 105 °C, above the catalogue's 90 °C (THHN, dry)") || !strings.Contains(p.Sentence(), "reasons: {limit L1: why}") {
		t.Errorf("%v %v", problems, r.Unreasoned)
	}
	if !strings.Contains(strings.Join(r.Notes, "\n"), "limit of L2 raised to 105 °C, above the catalogue's 90 °C (THHN, dry): data sheet 7, page 3") {
		t.Error(r.Notes)
	}
	for _, c := range []struct {
		name, part, extra string
		raised            bool
	}{
		// usual limits of polymers: PVC 70, XLPE 90 (IEC 60364-5-52 table 52.1)
		{"usual PVC", "kind: core, conductor: {size: 2.5 mm2}, layers: [{material: pvc, thickness_mm: 0.8}], limit_c: 70", "", false},
		{"special PVC", "kind: core, conductor: {size: 2.5 mm2}, layers: [{material: pvc, thickness_mm: 0.8}], limit_c: 105", "", true},
		{"PVC over XLPE", "kind: core, conductor: {size: 2.5 mm2}, layers: [{material: xlpe, thickness_mm: 0.8}, {material: pvc, thickness_mm: 0.8}], limit_c: 90", "", true},
		{"an own material", "kind: core, conductor: {size: 2.5 mm2}, layers: [{material: mine, thickness_mm: 0.8}], limit_c: 150", "materials: {mine: {k_w_mk: 0.2, limit_c: 150}}\n", false},
		{"no limit known", "kind: core, conductor: {size: 2.5 mm2}, layers: [{material: mine, thickness_mm: 0.8}], limit_c: 150", "materials: {mine: {k_w_mk: 0.2}}\n", false},
		{"rod", "kind: rod, diameter_mm: 4, material: pvc, limit_c: 90", "", true},
		{"cable", "kind: cable, build: b, limit_c: 90", "builds: {b: {holder: {kind: jacket, inside_mm: 5, layers: [{material: pvc, thickness_mm: 1}]}, parts: [{id: a, kind: core, conductor: {size: 2.5 mm2}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [0, 0]}]}}\n", true},
	} {
		r, problems := solved(t, "packrise: 1\nsurroundings: {kind: fixed-wall, ambient_c: 30}\nholder: {kind: conduit, inside_mm: 20}\nparts:\n  - {id: X, "+c.part+", at_mm: [0, 0]}\n"+c.extra)
		if (ruleOf(problems, rating.RuleNoReason) != nil) != c.raised || (r.Unreasoned != nil) != c.raised {
			t.Errorf("%s: %v", c.name, problems)
		}
	}
	// XHHW: 90 °C dry, 75 °C wet (NFPA 70 table 310.4(A), from memory)
	wet := strings.ReplaceAll(design("90", ", wet: true", ""), "stock: thhn-12", "type: xhhw, conductor: {size: 12 AWG}, layers: [{material: xlpe, thickness_mm: 0.76}]")
	if r, _ := solved(t, wet); strings.Join(r.Unreasoned, " ") != "L1 L2" {
		t.Errorf("in the wet: %v", r.Unreasoned)
	}
	if r, _ := solved(t, strings.Replace(wet, "wet: true", "wet: false", 1)); r.Unreasoned != nil {
		t.Errorf("in the dry: %v", r.Unreasoned)
	}
}

// TestWarnings: what is said of limits below the ambient, small devices, screens and a margin of 0.
func TestWarnings(t *testing.T) {
	r, problems := solved(t, `packrise: 1
surroundings: {kind: fixed-wall, ambient_c: 75}
holder: {kind: conduit, inside_mm: 20, touch_limit_c: 60, layers: [{material: copper, thickness_mm: 0.2, screen: {form: braid, bonded: both-ends}}, {material: pe, thickness_mm: 1}]}
parts:
  - {id: L1, kind: core, stock: thhn-12, at_mm: [0, 0]}
  - {id: L2, kind: core, stock: thhn-12, at_mm: [5, 0], limit_c: 70}
  - {id: L3, kind: core, conductor: {size: 12 AWG}, at_mm: [-5, 0], layers: [{material: pvc, thickness_mm: 0.2, screen: {form: foil}}]}
loads:
  - {id: a, conductors: [L1], current_a: 20, protection: {kind: breaker, rating_a: 20}}
  - {id: b, conductors: [L2], current_a: 20.5, protection: {kind: fuse, rating_a: 20}}
  - {id: c, conductors: [L3], current_a: unknown, protection: {kind: fuse, rating_a: 2}}
design_margin_k: 0
reasons: {design_margin_k: type test 12}
`)
	var got []string
	for _, p := range problems {
		got = append(got, fmt.Sprintf("%d %s %s", p.Line, p.Rule, p.Sentence()))
		if p.Severity != section.Warned {
			t.Errorf("%+v", p)
		}
	}
	for _, want := range []string{
		"6 limit-below-ambient the limit of L2 is 70 °C (given), below the ambient of 75 °C; ",
		"3 limit-below-ambient the limit of outside is 60 °C (touch limit, given), below the ambient",
		"3 limit-below-ambient the limit of conduit is 70 °C (lowest for PE, assumed), below",
		"10 device-below-load load b carries 20.5 A, and its fuse is rated 20 A; ",
		"7 limit-below-ambient the limit of L3 is 60 °C (lowest for PVC, assumed), below",
		"7 screen-not-metal L3: its foil screen is of PVC, which is no metal; ",
	} {
		if !strings.Contains("\n"+strings.Join(got, "\n"), "\n"+want) {
			t.Errorf("no %q", want)
		}
	}
	if len(problems) != 6 {
		t.Error(strings.Join(got, "\n"))
	}
	notes := strings.Join(r.Notes, "\n")
	for _, want := range []string{"currents in screens bonded at both ends (the holder) are left out", "no design margin is kept: type test 12"} {
		if !strings.Contains(notes, want) {
			t.Errorf("no %q in\n%s", want, notes)
		}
	}
}
