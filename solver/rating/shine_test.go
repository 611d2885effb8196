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
