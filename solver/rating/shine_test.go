package rating_test

import (
	"math"
	"strings"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/rating"
)

// busbars are two bars on edge in a wireway; layers are theirs.
func busbars(layers, fill string) string {
	bar := func(id, x string) string {
		return "  - {id: " + id + ", kind: core, conductor: {shape: bar, width_mm: 30, height_mm: 5, corner_mm: 0.5, metal: copper, class: solid}, layers: " + layers + ", at_mm: [" + x + ", 40], turn_deg: 90}\n"
	}
	return head + "holder: {kind: wireway, width_mm: 100, height_mm: 80" + fill + "}\nparts:\n" + bar("B1", "35") + bar("B2", "65") +
		"loads: [{id: a, conductors: [B1, B2], current_a: 400}]\n"
}

// Bars in a wireway radiate and their air moves; bright metal is told to radiate little, and runs cooler under a thin layer that radiates well.
func TestBusbarsRadiate(t *testing.T) {
	bare := solve(t, parse(t, busbars("[]", "")), rating.Options{})
	taped := solve(t, parse(t, busbars("[{material: pvc, thickness_mm: 0.2}]", "")), rating.Options{})
	notes := strings.Join(bare.Notes, "; ")
	for _, want := range []string{"surfaces radiate through the gas between them, emissivity 0.08, 0.9", "bright metal radiates little (B1, B2): painted or taped", "Raithby and Hollands"} {
		if !strings.Contains(notes, want) {
			t.Errorf("%q is not told: %s", want, notes)
		}
	}
	if strings.Contains(notes, "too hot") {
		t.Errorf("something is left out: %s", notes)
	}
	if notes := strings.Join(taped.Notes, "; "); strings.Contains(notes, "bright metal") {
		t.Errorf("taped bars are called bright: %s", notes)
	}
	b, p := bare.Conductors[0].TempC, taped.Conductors[0].TempC
	t.Logf("bare %.2f °C, taped %.2f °C, ambient %g °C", b, p, bare.AmbientC)
	if bare.Status != heat.Converged || !(p < b-2) || p < bare.AmbientC {
		t.Errorf("bare %.2f °C, taped %.2f °C", b, p)
	}
	if math.Abs(bare.Released-bare.Generated) > 1e-3*bare.Generated {
		t.Errorf("%g W/m made, %g released", bare.Generated, bare.Released)
	}
}

// What a vacuum is reckoned with is put in numbers: 3e-4 W/mK across 0.2 mm against 4σT³ of 6.12 W/m²K at 300 K.
func TestVacuumIsTold(t *testing.T) {
	d := parse(t, strings.Replace(busbars("[]", ", fill: void"), "current_a: 400", "current_a: 150", 1)+"materials: {void: {k_w_mk: 0.0001, gas: true}}\n")
	notes := strings.Join(solve(t, d, rating.Options{}).Notes, "; ")
	if want := "across 0.2 mm it carries 0.24 times what black surfaces at 27 °C exchange, across 1 mm 0.05 times"; !strings.Contains(notes, want) {
		t.Errorf("%s", notes)
	}
}

// Whatever parts are not round, their surfaces radiate, nothing is left out, and heat balances: sectors loose in a conduit, a flat cable full of air in one,
// round wires in a flat jacket, bars and wires in an open bundle.
func TestNotRoundRadiates(t *testing.T) {
	wire := func(id, at string) string {
		return "  - {id: " + id + ", kind: core, conductor: {diameter_mm: 2, class: solid}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: " + at + "}\n"
	}
	sector := func(id, at, turn string) string {
		return "  - {id: " + id + ", kind: core, conductor: {shape: sector, radius_mm: 9, angle_deg: 120, corner_mm: 1, class: stranded}, layers: [{material: xlpe, thickness_mm: 1}], at_mm: " + at + ", turn_deg: " + turn + "}\n"
	}
	for name, text := range map[string]string{
		"sectors": "holder: {kind: conduit, inside_mm: 50, layers: [{material: pvc, thickness_mm: 2}]}\nparts:\n" + sector("A", "[9, 0]", "0") + sector("B", "[-9, 6]", "120") +
			"loads: [{id: a, conductors: [A, B], current_a: 120}]\n",
		"flat jacket": "holder: {kind: jacket, width_mm: 12, height_mm: 5, layers: [{material: pvc, thickness_mm: 1}]}\nparts:\n" + wire("A", "[-3.5, 0]") + wire("B", "[3, 0.4]") +
			"loads: [{id: a, conductors: [A, B], current_a: 25}]\n",
		"flat cable": "holder: {kind: conduit, inside_mm: 25, layers: [{material: pvc, thickness_mm: 1.5}]}\nbuilds:\n  twin:\n    holder: {kind: jacket, width_mm: 9, height_mm: 4.4, layers: [{material: pvc, thickness_mm: 1}]}\n    parts:\n    " +
			wire("1", "[-2.5, 0]") + "    " + wire("2", "[2.5, 0]") + "parts:\n  - {id: C, kind: cable, build: twin, at_mm: [0, -3], turn_deg: 20}\n" +
			"loads: [{id: a, conductors: [C/1, C/2], current_a: 18}]\n",
		"bundle": "holder: {kind: open-bundle}\nparts:\n  - {id: B1, kind: core, conductor: {shape: bar, width_mm: 20, height_mm: 4, corner_mm: 0.5, metal: copper, class: solid}, layers: [{material: pvc, thickness_mm: 0.5}], at_mm: [0, 0]}\n" +
			"  - {id: B2, kind: core, conductor: {shape: bar, width_mm: 20, height_mm: 4, corner_mm: 0.5, metal: copper, class: solid}, layers: [{material: pvc, thickness_mm: 0.5}], at_mm: [0, 12]}\n" +
			wire("W", "[0, 6]") + "loads: [{id: a, conductors: [B1, B2], current_a: 200}, {id: w, conductors: [W], current_a: 10}]\n",
	} {
		r := solve(t, parse(t, head+text), rating.Options{})
		notes := strings.Join(r.Notes, "; ")
		if r.Status != heat.Converged || !strings.Contains(notes, "surfaces radiate through the gas") || strings.Contains(notes, "too hot") {
			t.Errorf("%s: %v, %s", name, r.Status, notes)
		}
		if math.Abs(r.Released-r.Generated) > 2e-3*r.Generated {
			t.Errorf("%s: %g W/m made, %g released", name, r.Generated, r.Released)
		}
		t.Logf("%s: %.2f °C", name, r.Conductors[0].TempC)
	}
}
