package rating_test

import (
	"slices"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

const head = "packrise: 1\nsurroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 10}\n"

// TestProblems: every problem of substance is one clear sentence with the ids, what was found and what to do.
func TestProblems(t *testing.T) {
	for _, c := range []struct{ name, text, rule, says string }{
		{
			"overlap", `holder: {kind: conduit, inside_mm: 20}
parts:
  - {id: L1, kind: core, stock: thhn-12, at_mm: [0, 0]}
  - {id: L2, kind: core, stock: thhn-12, at_mm: [2, 0]}`, "overlap", "L1 overlaps L2 by 1.3",
		},
		{"outside", `holder: {kind: conduit, inside_mm: 20}
parts: [{id: L1, kind: core, stock: thhn-12, at_mm: [9, 0]}]`, "outside-holder", "L1 reaches 0.65"},
		{"outside a wireway", `holder: {kind: wireway, width_mm: 20, height_mm: 20}
parts: [{id: L1, kind: core, stock: thhn-12, at_mm: [1, 10]}]`, "outside-holder", "L1 reaches 0.65"},
		{"unplaced", `holder: {kind: conduit, inside_mm: 20}
parts: [{id: L1, kind: core, stock: thhn-12}]`, "unplaced", "L1 has no place yet; give it at_mm"},
		{"material", `holder: {kind: conduit, inside_mm: 20}
parts: [{id: L1, kind: core, conductor: {size: 12 AWG}, layers: [{material: pvd, thickness_mm: 1}], at_mm: [0, 0]}]`, "unknown-material", `material "pvd" is not in the catalogue; write pvc`},
		{"size", `holder: {kind: conduit, inside_mm: 20}
parts: [{id: L1, kind: core, conductor: {size: 2.6 mm2}, layers: [{material: pvc, thickness_mm: 1}], at_mm: [0, 0]}]`, "unknown-size", "2.5"},
		{"type", `holder: {kind: conduit, inside_mm: 20}
parts: [{id: L1, kind: core, conductor: {size: 12 AWG}, layers: [{material: pvc, thickness_mm: 1}], type: thhm, at_mm: [0, 0]}]`, "unknown-type", "thhn"},
		{"stock", `holder: {kind: conduit, inside_mm: 20}
parts: [{id: L1, kind: core, stock: thhn-13, at_mm: [0, 0]}]`, "unknown-wire", "thhn-1"},
		{"holder stock", `holder: {kind: conduit, stock: emt-11}
parts: [{id: L1, kind: core, stock: thhn-12, at_mm: [0, 0]}]`, "unknown-holder", "emt-1"},
		{"holder kind", `holder: {kind: jacket, stock: emt-1}
parts: [{id: L1, kind: core, stock: thhn-12, at_mm: [0, 0]}]`, "holder-kind", "write kind: conduit"},
		{"empty", "holder: {kind: conduit, inside_mm: 20}\nparts: []", "empty", "no parts"},
	} {
		t.Run(c.name, func(t *testing.T) {
			d := parse(t, head+c.text+"\n")
			_, problems := rating.Outline(d, catalog.Load())
			for _, p := range problems {
				if p.Rule == c.rule {
					if s := p.Sentence(); !strings.Contains(s, c.says) || p.Do == "" {
						t.Errorf("%q does not say %q", s, c.says)
					}
					return
				}
			}
			t.Errorf("no problem %s among %v", c.rule, problems)
		})
	}
}

// TestProblemsInMemory: what the reader of files refuses is refused again for a document that was made in the window.
func TestProblemsInMemory(t *testing.T) {
	d := parse(t, head+`holder: {kind: conduit, inside_mm: 20}
parts:
  - {id: H1, kind: rod, diameter_mm: 4, bore_mm: 3, material: pur, at_mm: [0, 0]}
  - {id: H2, kind: rod, diameter_mm: 4, material: pur, at_mm: [5, 0]}
`)
	for rule, f := range map[string]func(*section.Document){
		"thick-bore": func(d *section.Document) {
			d.Parts = append([]section.Part(nil), d.Parts...)
			d.Parts[0].BoreMM = section.Some(4.0)
		},
		"none-holds-one": func(d *section.Document) { d.Holder = section.Holder{Kind: section.NoHolder} },
		"unplaced": func(d *section.Document) {
			d.Parts = append([]section.Part(nil), d.Parts...)
			d.Parts[1].At = section.Opt[section.Point]{}
		},
	} {
		_, problems := rating.Outline(d.With(f), catalog.Load())
		if len(problems) != 1 || problems[0].Rule != rule {
			t.Errorf("%s: %v", rule, problems)
		}
	}
	if _, problems := rating.Outline(d, catalog.Load()); len(problems) != 0 {
		t.Errorf("before: %v", problems)
	}
}

// TestProblemsAtOnce: an unplaced part does not hide that two others overlap.
func TestProblemsAtOnce(t *testing.T) {
	d := parse(t, head+`holder: {kind: conduit, inside_mm: 20}
parts:
  - {id: L1, kind: core, stock: thhn-12, at_mm: [0, 0]}
  - {id: L2, kind: core, stock: thhn-12, at_mm: [2, 0]}
  - {id: L3, kind: core, stock: thhn-12}
  - {id: L4, kind: core, stock: thhn-12, at_mm: [0, 9]}
`)
	_, problems := rating.Outline(d, catalog.Load())
	got := map[string]bool{}
	for _, p := range problems {
		got[p.Rule] = true
	}
	if len(problems) != 3 || !got["overlap"] || !got["unplaced"] || !got["outside-holder"] {
		t.Errorf("%v", problems)
	}
}

// TestSlightOverlap: up to 20 µm is pushed apart for solving with a note, and the document is left as it was.
func TestSlightOverlap(t *testing.T) {
	d := parse(t, head+`holder: {kind: conduit, inside_mm: 20, fill: pvc}
parts:
  - {id: L1, kind: core, stock: thhn-12, at_mm: [0, 0]}
  - {id: L2, kind: core, stock: thhn-12, at_mm: [3.29, 0]}
loads: [{id: a, conductors: [L1, L2], current_a: 5}]
`)
	r := solve(t, d, rating.Options{})
	if !strings.Contains(strings.Join(r.Notes, "; "), "pushed apart") {
		t.Errorf("notes: %q", r.Notes)
	}
	if d.Parts[1].At.V != (section.Point{X: 3.29}) {
		t.Errorf("the document was touched: %v", d.Parts[1].At.V)
	}
}

// TestUnknownIsNotZero: a conductor in no load or of unknown current makes the answer undecided, by name.
func TestUnknownIsNotZero(t *testing.T) {
	d := parse(t, head+`holder: {kind: conduit, inside_mm: 20}
parts:
  - {id: L1, kind: core, stock: thhn-12, at_mm: [0, 0]}
  - {id: L2, kind: core, stock: thhn-12, at_mm: [4, 0]}
  - {id: L3, kind: core, stock: thhn-12, at_mm: [0, 4]}
  - {id: PE, kind: core, stock: thhn-12, at_mm: [0, -4], role: earth}
loads:
  - {id: a, conductors: [L1], current_a: 5}
  - {id: b, conductors: [L2], current_a: unknown}
`)
	r := solve(t, d, rating.Options{})
	if got := strings.Join(r.Unassigned, " "); got != "L2 L3" {
		t.Errorf("unassigned %q", got)
	}
	answer, assumed := r.Sentence()
	if !strings.HasPrefix(answer, rating.Undecided) || !strings.Contains(assumed, "2 conductors of unknown current") {
		t.Errorf("%s / %s", answer, assumed)
	}
	idle := solve(t, d, rating.Options{AssumeIdle: true})
	if idle.State() != rating.Within || !strings.Contains(strings.Join(idle.Notes, "; "), "assumed idle") {
		t.Errorf("%s, %q", idle.State(), idle.Notes)
	}
}

// TestRadiationIsTold: what surfaces do through the gas between them is said in the notes, with their emissivities; a solid has none.
func TestRadiationIsTold(t *testing.T) {
	d := parse(t, head+`holder: {kind: conduit, inside_mm: 20}
parts: [{id: L1, kind: core, stock: thhn-12, at_mm: [0, 0]}]
loads: [{id: a, conductors: [L1], current_a: 5}]
`)
	const told = "surfaces radiate through the gas between them, emissivity 0.9"
	r := solve(t, d, rating.Options{})
	_, assumed := r.Sentence()
	if strings.Contains(assumed, "too hot") || !slices.Contains(r.Notes, told) {
		t.Errorf("%s / %q", assumed, r.Notes)
	}
	solid := solve(t, d.With(func(d *section.Document) { d.Holder.Fill = "pvc" }), rating.Options{})
	if strings.Contains(strings.Join(solid.Notes, "; "), "radiate") {
		t.Errorf("a solid lets nothing radiate: %q", solid.Notes)
	}
	wide := solve(t, parse(t, head+`holder: {kind: wireway, width_mm: 100, height_mm: 100}
parts: [{id: L1, kind: core, stock: thhn-12, at_mm: [50, 20]}]
loads: [{id: a, conductors: [L1], current_a: 30}]
`), rating.Options{})
	if !strings.Contains(strings.Join(wide.Notes, "; "), "Raithby and Hollands") {
		t.Errorf("the air of a wide wireway does not move: %q", wide.Notes)
	}
}

// TestLimits: the person's limit, the wire type's, the polymer's lowest marked assumed; whatever governs may be no conductor at all.
func TestLimits(t *testing.T) {
	d := parse(t, head+`holder: {kind: jacket, inside_mm: 20, layers: [{material: skin, thickness_mm: 1}], fill: pvc}
parts:
  - {id: own, kind: core, stock: thhn-12, limit_c: 85, at_mm: [0, 0]}
  - {id: type, kind: core, stock: thhn-12, at_mm: [4, 0]}
  - {id: bare, kind: core, conductor: {size: 12 AWG}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [0, 4]}
loads: [{id: a, conductors: [own, type, bare], current_a: 10}]
materials: {skin: {k_w_mk: 0.2, limit_c: 31}}
`)
	r := solve(t, d, rating.Options{})
	for i, want := range []struct {
		c       float64
		assumed bool
	}{{85, false}, {90, false}, {0, true}} {
		c := r.Conductors[i]
		if c.LimitAssumed != want.assumed || (want.c > 0 && c.LimitC.V != want.c) || !c.LimitC.OK {
			t.Errorf("%s: limit %v, assumed %v", c.ID, c.LimitC, c.LimitAssumed)
		}
	}
	if g := r.Governing; g == nil || g.Part != "jacket" || g.MarginK >= 0 || r.State() != rating.OverWord {
		t.Errorf("governs %+v, state %s", g, r.State())
	}
}
