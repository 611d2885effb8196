package study

import (
	"context"
	"fmt"
	"math"
	"testing"

	"packrise/solver/section"
)

// inFilm is one wire of a flexible copper conductor in a fixed film.
func inFilm(t testing.TB, size string, insulationMM, filmW, ambientC, limitC float64) *section.Document {
	return read(t, fmt.Sprintf(`packrise: 1
surroundings: {kind: fixed-film, ambient_c: %g, film_w_m2k: %g}
holder: {kind: none}
parts: [{id: W, kind: core, conductor: {size: %s mm2, class: flexible}, layers: [{material: ins, thickness_mm: %g}], at_mm: [0, 0], limit_c: %g}]
materials: {ins: {k_w_mk: 0.2}}
loads: [{id: a, conductors: [W], current_a: 1, frequency_hz: 0}]
`, ambientC, filmW, size, insulationMM, limitC))
}

// TestClosedForm: I² = (θ − θa) / (R(θ) (ln(r1/r0)/(2πk) + 1/(2π r1 h))) with R of IEC 60228:2004, table 3, class 5, and α20 0.00393 /K (IEC 60287-1-1). What
// is found stops up to 0.1 K below the limit and never over: held to 0.1 % at the temperature found, and between the currents of both ends.
func TestClosedForm(t *testing.T) {
	r20 := openReference(t, "iec60228.csv")
	for _, size := range []string{"0.5", "1.5", "4", "10", "35", "95"} {
		for _, film := range []float64{5, 12, 40} {
			const ambientC, limitC, insulation = 20., 90., 0.8
			d := inFilm(t, size, insulation, film, ambientC, limitC)
			p := rated(t, d, false)
			shape := p.Base.Shapes[0]
			for _, s := range p.Base.Shapes {
				if s.ID == "W" {
					shape = s
				}
			}
			r0 := shape.Rings[0].R1
			r1 := r0 + insulation
			thermal := math.Log(r1/r0)/(2*math.Pi*0.2) + 1/(2*math.Pi*r1*1e-3*film)
			amperes := func(c float64) float64 {
				r := 1e-3 * r20.number("class5_cu_plain", size) * (1 + 0.00393*(c-20))
				return math.Sqrt((c - ambientC) / (r * thermal))
			}
			n := p.All.Nominal
			if want := amperes(n.TempC); math.Abs(n.Factor/want-1) > 0.001 {
				t.Errorf("%s mm², film %g: %.4f A at %.3f °C, closed form %.4f A", size, film, n.Factor, n.TempC, want)
			}
			if most, least := amperes(limitC), amperes(limitC-closeK); n.Factor > most*1.00005 || n.Factor < least*0.9999 || n.Factor < 0.999*most {
				t.Errorf("%s mm², film %g: %.4f A, closed form %.4f A", size, film, n.Factor, most)
			}
			if want := amperes(limitC - DesignMarginK); math.Abs(p.All.Rely.Factor/want-1) > 0.001 || p.All.Rely.Factor > want*1.00005 {
				t.Errorf("%s mm², film %g: %.4f A with the margin kept, closed form %.4f A", size, film, p.All.Rely.Factor, want)
			}
		}
	}
}

// TestAmbientComputed: computed currents follow √((Tc−Ta)/(Tc−30)) where the film is fixed, and with it IEC 60364-5-52:2009 table B.52.14: at 50 °C PVC 0.71, XLPE 0.82
// (CHECKS 11, ±0.005).
func TestAmbientComputed(t *testing.T) {
	for limit, want := range map[float64]float64{70: 0.71, 90: 0.82} {
		at30, at50 := rated(t, inFilm(t, "2.5", 0.8, 12, 30, limit), false), rated(t, inFilm(t, "2.5", 0.8, 12, 50, limit), false)
		got := at50.All.Nominal.Factor / at30.All.Nominal.Factor
		if rule := math.Sqrt((limit - 50) / (limit - 30)); math.Abs(got/rule-1) > 0.002 || math.Abs(got-want) > 0.005 {
			t.Errorf("%g °C wire: %.4f, the rule %.4f, the table %.2f", limit, got, rule, want)
		}
		if !(at50.All.Rely.Factor < at30.All.Rely.Factor) {
			t.Errorf("%g °C wire: to rely on %.3f at 50 °C, %.3f at 30 °C", limit, at50.All.Rely.Factor, at30.All.Rely.Factor)
		}
	}
}

// TestUnitsOfSize: the same area carries the same, written in AWG, as an area in mm² or as a diameter. 12 AWG is 3.3088 mm², 2.0525 mm (ASTM B258).
func TestUnitsOfSize(t *testing.T) {
	one := func(conductor string) float64 {
		d := read(t, `packrise: 1
surroundings: {kind: still-air, ambient_c: 30}
holder: {kind: none}
parts: [{id: W, kind: core, conductor: {`+conductor+`, class: solid}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [0, 0], limit_c: 60}]
loads: [{id: a, conductors: [W], current_a: 10}]
`)
		p := rated(t, d, false)
		return 10 * p.All.Nominal.Factor * math.Sqrt(30/(p.All.Nominal.TempC-30)) // both ceilings lie up to 0.1 of 30 K below the limit
	}
	want := one("area_mm2: 3.3088")
	for _, c := range []string{"size: 12 AWG", "diameter_mm: 2.0525"} {
		if got := one(c); math.Abs(got/want-1) > 0.001 {
			t.Errorf("%s carries %.4f A, as an area %.4f A", c, got, want)
		}
	}
}

// TestRoundedDown: what people are shown is never more than what was found.
func TestRoundedDown(t *testing.T) {
	for _, a := range []float64{0.999, 9.999, 9.9949, 11.8399, 99.99, 38.4999, 101.9, 1234.9} {
		var shown float64
		if _, err := fmt.Sscan(Amps(a), &shown); err != nil || shown > a || shown < 0.9*a {
			t.Errorf("%g A is shown as %q", a, Amps(a))
		}
	}
	r := rated(t, demo(t, "nine-in-emt"), false)
	there, err := New(cat).solve(context.Background(), scaleAll(r.Doc, math.Floor(3200*r.All.Nominal.Factor)/3200), Options{})
	if err != nil || there.Over() {
		t.Errorf("at the nominal current rounded down: %v, over %v", err, there.Over())
	}
}
