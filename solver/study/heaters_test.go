package study

import (
	"context"
	"math"
	"strings"
	"testing"

	"packrise/solver/section"
)

// aHeats is a hot pair beside an idle spare of a lower limit.
const aHeats = `
packrise: 1
surroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 9}
holder: {kind: jacket, inside_mm: 14, fill: sand, layers: [{material: ins, thickness_mm: 1}]}
materials: {sand: {k_w_mk: 0.3}, ins: {k_w_mk: 0.2, limit_c: 90}}
parts:
  - {id: L1, kind: core, conductor: {area_mm2: 2.5}, layers: [{material: ins, thickness_mm: 0.6}], at_mm: [-3, 0], limit_c: 90}
  - {id: L2, kind: core, conductor: {area_mm2: 2.5}, layers: [{material: ins, thickness_mm: 0.6}], at_mm: [3, 0], limit_c: 90}
  - {id: B, kind: core, conductor: {area_mm2: 1}, layers: [{material: ins, thickness_mm: 0.5}], at_mm: [0, 2.4], limit_c: 60}
loads:
  - {id: motor, conductors: [L1, L2], current_a: 20}
  - {id: bell, conductors: [B], current_a: 0.5}
`

// TestHeaters: shares add to 100 and are those of full solutions with a source off; the spare that governs is told who heats it.
func TestHeaters(t *testing.T) {
	s := New(cat)
	ctx := context.Background()
	for name, d := range map[string]*section.Document{"a heats": read(t, aHeats), "stage-multicore": demo(t, "stage-multicore")} {
		h, err := s.Heaters(ctx, d, nil, Options{})
		if err != nil {
			t.Fatal(err)
		}
		for _, row := range h.Rows {
			sum, k := 0, 0.0
			for _, f := range row.Shares {
				sum, k = sum+f.Percent, k+f.K
			}
			if sum != 100 || math.Abs(k-row.RiseK) > 1e-6 {
				t.Errorf("%s: %s: shares of %d %% and %.4f K of %.4f K", name, row.ID, sum, k, row.RiseK)
			}
		}
	}
	d := read(t, aHeats)
	h, err := s.Heaters(ctx, d, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	now, err := s.solve(ctx, d, Options{})
	if err != nil {
		t.Fatal(err)
	}
	off, err := s.solve(ctx, section.SwitchOff(d, "motor"), Options{})
	if err != nil {
		t.Fatal(err)
	}
	row, _ := h.Of("B")
	share := 0.0
	for _, f := range row.Shares {
		if f.From != "B" {
			share += f.K
		}
	}
	if fell := now.Conductors[2].TempC - off.Conductors[2].TempC; math.Abs(share-fell) > 0.02*fell {
		t.Errorf("the motor's share of B is %.2f K, with it off it is %.2f K cooler", share, fell)
	}
	if load, percent, ok := h.heater(d, "B"); !ok || load != "motor" || percent < 95 {
		t.Errorf("heater of B: %s %d %v", load, percent, ok)
	}
	if _, _, ok := h.heater(d, "L1"); ok {
		t.Error("L1 heats itself")
	}
	if text := row.Sentence(); !strings.Contains(text, "from L1 and L2") {
		t.Error(text)
	}
	t.Log(row.Sentence())
}

// TestHeatersOfJacket: a thing that is no conductor, by full solutions; with the sun, what it is with every load off is the surroundings'.
func TestHeatersOfJacket(t *testing.T) {
	s := New(cat)
	ctx := context.Background()
	d := demo(t, "roof-strings")
	h, err := s.HeatersWith(ctx, d, "outside", Options{AssumeIdle: true})
	if err != nil {
		t.Fatal(err)
	}
	row, ok := h.Of("outside")
	if !ok || row.Percent(Around) < 20 || row.Percent(d.Loads[0].ID) == 0 {
		t.Fatalf("%+v", row)
	}
	t.Log(row.Sentence())
	sum := 0
	for _, f := range row.Shares {
		sum += f.Percent
	}
	if sum != 100 {
		t.Errorf("shares of %d %%", sum)
	}
	if _, ok := h.Of("nobody"); ok {
		t.Error("a row for nobody")
	}
}

// TestHeatersFixed: heats given per metre are split too.
func TestHeatersFixed(t *testing.T) {
	d := section.SetHeat(section.SetHeat(read(t, aHeats), "L1", 3), "B", 1)
	h, err := New(cat).Heaters(context.Background(), d, nil, Options{})
	if err != nil || h == nil {
		t.Fatal(h, err)
	}
	if row, _ := h.Of("L2"); row.Percent("L1") < 30 || row.Percent("L1") >= row.Percent("L2") || row.Percent("B") == 0 {
		t.Errorf("%+v", row)
	}
}

// TestWholePercents: thirds add to 100, zeros stay.
func TestWholePercents(t *testing.T) {
	list := []HeatShare{{K: 1}, {K: 1}, {K: 1}, {K: 0}}
	wholePercents(list)
	if list[0].Percent != 34 || list[1].Percent != 33 || list[2].Percent != 33 || list[3].Percent != 0 {
		t.Errorf("%+v", list)
	}
}
