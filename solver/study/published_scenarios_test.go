package study

import (
	"context"
	"fmt"
	"math"
	"slices"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/section"
)

// Scenarios of our own, of the kinds that people bring: what a table says of them and what is computed. Demos where there is one.

// using names the rule sets of a document.
func using(d *section.Document, ids ...string) *section.Document {
	return d.With(func(d *section.Document) { d.Rules.Use = ids })
}

// given makes a row's document from a demo.
func given(name string, change ...func(*section.Document) *section.Document) func(testing.TB) *section.Document {
	return func(t testing.TB) *section.Document {
		d := demo(t, name)
		for _, f := range change {
			d = f(d)
		}
		return d
	}
}

func by(ids ...string) func(*section.Document) *section.Document {
	return func(d *section.Document) *section.Document { return using(d, ids...) }
}

func around(f func(*section.Surroundings)) func(*section.Document) *section.Document {
	return func(d *section.Document) *section.Document {
		return d.With(func(d *section.Document) { f(&d.Surroundings) })
	}
}

func ambient(c float64) func(*section.Document) *section.Document {
	return around(func(s *section.Surroundings) { s.AmbientC = section.Some(c) })
}

// sameAmps gives every load that carries something one current.
func sameAmps(a float64) func(*section.Document) *section.Document {
	return func(d *section.Document) *section.Document {
		return d.With(func(d *section.Document) {
			d.Loads = slices.Clone(d.Loads)
			for i := range d.Loads {
				if d.Loads[i].CurrentA.V > 0 {
					d.Loads[i].CurrentA = section.Some(a)
				}
			}
		})
	}
}

// noFloor takes away what the outside rests against.
var noFloor = around(func(s *section.Surroundings) { s.Against = nil })

// someValves gives each valve of the umbilical a load of its own, of which eight run at once, and takes the spares out.
func someValves(d *section.Document) *section.Document {
	var ids []string
	d = section.RemoveLoad(section.RemoveLoad(d, "valves-on"), "valves-off")
	for _, id := range []string{"sp1", "sp2", "sp3"} {
		d = section.WithoutPart(d, id)
	}
	return d.With(func(d *section.Document) {
		d.Loads = slices.Clone(d.Loads)
		for i := range 12 {
			id := fmt.Sprintf("v%d", i+1)
			ids = append(ids, "valve-"+id)
			d.Loads = append(d.Loads, section.Load{ID: "valve-" + id, Conductors: []string{id}, CurrentA: section.Some(float64(min(1, max(0, 8-i)))), System: section.DC})
		}
		d.Rules.AtMost = []section.AnyOf{{Of: ids, Count: 8}}
	})
}

// charger is a lead of five power cores about a control core, 7 m, OD 16.6 mm, that may be touched.
func charger(sun, phase, neutral float64) func(testing.TB) *section.Document {
	return func(t testing.TB) *section.Document {
		text := fmt.Sprintf("packrise: 1\nsurroundings: {kind: still-air, ambient_c: 40, sun_w_m2: %g}\n", sun) +
			"holder: {kind: jacket, inside_mm: 13, fill: rubber, layers: [{material: rubber, thickness_mm: 1.8}], touch_limit_c: 60}\nparts:\n" +
			"  - {id: CP, kind: core, role: signal, conductor: {size: 0.5 mm2, class: flexible}, layers: [{material: epr, thickness_mm: 0.5}], at_mm: [0, 0], limit_c: 90}\n"
		for i, id := range []string{"L1", "L2", "L3", "N", "PE"} {
			a := 2 * math.Pi * float64(i) / 5
			role := map[string]string{"N": ", role: neutral", "PE": ", role: earth"}[id]
			text += fmt.Sprintf("  - {id: %s, kind: core, conductor: {size: 6 mm2, class: flexible}, layers: [{material: epr, thickness_mm: 0.77}], at_mm: [%.4f, %.4f], limit_c: 90%s}\n",
				id, 4.09*math.Cos(a), 4.09*math.Sin(a), role)
		}
		loads := fmt.Sprintf("loads:\n  - {id: one, conductors: [L1], current_a: %g, frequency_hz: 50}\n  - {id: others, conductors: [L2, L3], current_a: %g, frequency_hz: 50}\n  - {id: back, conductors: [N], current_a: %g, frequency_hz: 50}\n",
			32., phase, neutral)
		return read(t, text+loads)
	}
}

// wireway4 is a painted 4 × 4 in wireway on a wall, with THHN settled in it.
func wireway4(loads string, kinds ...kind) func(testing.TB) *section.Document {
	return alike{
		surroundings: room30, holder: "{kind: wireway, width_mm: 102, height_mm: 102, sides: {right: insulated}, layers: [{material: painted-steel, thickness_mm: 1.6}]}",
		kinds: kinds, loads: loads,
	}.doc
}

// feeders are 12 × 2 AWG, 6 × 1/0 and 20 × 12 AWG.
func feeders(two, oneOught float64) func(testing.TB) *section.Document {
	return wireway4(fmt.Sprintf("  - {id: two, conductors: [%s], current_a: %g, frequency_hz: 60}\n  - {id: thick, conductors: [%s], current_a: %g, frequency_hz: 60}\n  - {id: sockets, conductors: [%s], current_a: 12, frequency_hz: 60}\n",
		numbered("P", 1, 12), two, numbered("Q", 1, 6), oneOught, numbered("R", 1, 20)),
		kind{"Q", 6, "stock: thhn-1/0"}, kind{"P", 12, "stock: thhn-2"}, kind{"R", 20, "stock: thhn-12"})
}

// sockets are n 12 AWG at 12 A.
func sockets(n int) func(testing.TB) *section.Document {
	return wireway4(fmt.Sprintf("  - {id: sockets, conductors: [%s], current_a: 12, frequency_hz: 60}\n", numbered("A", 1, n)), kind{"A", n, "stock: thhn-12"})
}

// inTube are n THHN that carry the same in a conduit.
func inTube(n int, size, holder, surroundings string, amperes float64, more string) func(testing.TB) *section.Document {
	return alike{n: n, surroundings: surroundings, holder: holder, part: "stock: thhn-" + size, amperes: amperes, hz: 60, more: more}.doc
}

const (
	hot110 = "{kind: still-air, ambient_c: 43.3}"
	hot75  = "{kind: still-air, ambient_c: 75}"
	nec    = "rules: {use: [nec-310]}\n"
)

func scenarios() []publishing {
	const vde, necText = "DIN VDE 0298-4:2013, tables 11, 17 and 26", "NFPA 70, 2023, "
	nan := math.NaN()
	return []publishing{
		{
			name: "37-core umbilical", source: vde, conditions: "40 °C, still air", drawn: "the demo design",
			rows: []published{
				{name: "phase, spares counted: 34 × 0.87 × 0.40", figure: 34 * 0.87 * 0.40, rule: "vde-0298-4", of: "U", doc: given("robot-umbilical", by("vde-0298-4"))},
				{name: "phase, 8 of 12 valves, no spares: 34 × 0.87 × 0.45", figure: 34 * 0.87 * 0.45, rule: "vde-0298-4", of: "U", doc: given("robot-umbilical", by("vde-0298-4"), someValves)},
			},
		},
		{
			name: "charger lead, 5G6 + 1 × 0.5", source: "no table stated: its outside may be touched, 60 °C", conditions: "40 °C, still air, all conductors 90 °C", drawn: "five cores about the control core, filled with rubber",
			rows: []published{
				{name: "three phases, shade", figure: nan, of: "L1", doc: charger(0, 32, 9.6)},
				{name: "three phases, 1000 W/m²", figure: nan, of: "L1", doc: charger(1000, 32, 9.6)},
				{name: "one phase, 1000 W/m²", figure: nan, of: "L1", doc: charger(1000, 0, 32)},
			},
		},
		{
			name: "4 × 4 in wireway", source: necText + "376.22(B) and table 310.16", conditions: "30 °C, 60 Hz, metal, back against a wall", drawn: "the demo design; others settled in the same wireway",
			rows: []published{
				{name: "38 wires, 12 AWG: 30 × 0.40", figure: 12, rule: "nec-376-22", of: "A1", doc: given("wireway-38", by("nec-376-22"))},
				{name: "38 wires, 10 AWG: 40 × 0.40", figure: 16, rule: "nec-376-22", of: "B1", doc: given("wireway-38", by("nec-376-22"))},
				{name: "38 wires, 8 AWG: 55 × 0.40", figure: 22, rule: "nec-376-22", of: "M1", doc: given("wireway-38", by("nec-376-22"))},
				{name: "30 × 12 AWG", figure: 30, rule: "nec-376-22", of: "A1", doc: sockets(30)},
				{name: "31 × 12 AWG", figure: 12, rule: "nec-376-22", of: "A1", doc: sockets(31)},
				{name: "38 heavy, 2 AWG: 130 × 0.40", figure: 52, rule: "nec-376-22", of: "P1", doc: feeders(52, 68)},
				{name: "38 heavy, 1/0 AWG: 170 × 0.40", figure: 68, rule: "nec-376-22", of: "Q1", doc: feeders(52, 68)},
			},
		},
		{
			name: "nine 8 AWG in 1-inch EMT", source: necText + "table 310.16, 90 °C column, × 310.15(C)(1) × 310.15(B)(1)", conditions: "60 Hz", drawn: "the demo design; variants settled in the same tube",
			rows: []published{
				{name: "30 °C: 55 × 0.70", figure: 38.5, rule: "nec-310", of: "A1", quick: true, doc: given("nine-in-emt", by("nec-310"))},
				{name: "43.3 °C: 55 × 0.70 × 0.87", figure: 55 * 0.7 * 0.87, rule: "nec-310", of: "A1", doc: given("nine-in-emt", by("nec-310"), ambient(43.3))},
				{name: "painted tube", figure: 38.5, rule: "nec-310", of: "W1", doc: inTube(9, "8", "{kind: conduit, inside_mm: 26.6, layers: [{material: painted-steel, thickness_mm: 1.45}]}", room30, 32, nec)},
				{name: "1¼ in", figure: 38.5, rule: "nec-310", of: "W1", doc: inTube(9, "8", "{kind: conduit, stock: emt-1-1/4}", room30, 32, nec)},
				{name: "1½ in", figure: 38.5, rule: "nec-310", of: "W1", doc: inTube(9, "8", "{kind: conduit, stock: emt-1-1/2}", room30, 32, nec)},
				{name: "nipple of 0.6 m: 55 × 1.00 (computed as if long)", figure: 55, rule: "nec-310", of: "W1", doc: inTube(9, "8", "{kind: conduit, stock: emt-1, length_m: 0.6}", room30, 32, nec)},
				{name: "22 × 12 AWG: 30 × 0.45", figure: 13.5, rule: "nec-310", of: "W1", doc: inTube(22, "12", "{kind: conduit, stock: emt-1}", room30, 6, nec)},
				{name: "3 × 8 AWG at 43.3 °C: 55 × 0.87", figure: 55 * 0.87, rule: "nec-310", of: "W1", doc: inTube(3, "8", "{kind: conduit, stock: emt-1}", hot110, 32, nec)},
			},
		},
		{
			name: "35-wire harness", source: "AC 43.13-1B: 24 of 35 wires loaded is outside its curves, which give no current", conditions: "55 °C, 150 °C wires", drawn: "the demo design",
			rows: []published{
				{name: "16 AWG, sea level", figure: nan, of: "F1", doc: given("harness-altitude", around(func(s *section.Surroundings) { s.AltitudeM = section.Some(0.) }))},
				{name: "16 AWG, 40 000 ft", figure: nan, of: "F1", doc: given("harness-altitude")},
				{name: "16 AWG, 60 000 ft", figure: nan, of: "F1", doc: given("harness-altitude", around(func(s *section.Surroundings) { s.AltitudeM = section.Some(18288.) }))},
			},
		},
		{
			name: "stage multicore, 19 × 2.5 mm²", source: vde, conditions: "35 °C, rubber 60 °C; 13 loaded cores take the row of 14", drawn: "the demo design, straight",
			rows: []published{
				{name: "on a floor, a quarter of it against it: 26 × 0.50 × 0.91", figure: 26 * 0.5 * 0.91, rule: "vde-0298-4", of: "L1", quick: true, doc: given("stage-multicore", by("vde-0298-4"))},
				{name: "free in air", figure: 26 * 0.5 * 0.91, rule: "vde-0298-4", of: "L1", doc: given("stage-multicore", by("vde-0298-4"), noFloor)},
			},
		},
		{
			name: "photovoltaic strings on a roof", source: necText + "table 310.16 × 310.15(C)(1) × 310.15(B)(1), 42 °C and a roof adder of 33 K", conditions: "11 A by six strings; 13.75 A asked for with 125 %",
			drawn: "twelve 10 AWG in 1¼ in EMT at 75 °C for the table; the demo design of 6 mm², whose size it does not hold",
			rows: []published{
				{name: "12 × 10 AWG in a tube: 40 × 0.50 × 0.50", figure: 10, rule: "nec-310", of: "W1", doc: inTube(12, "10", "{kind: conduit, stock: emt-1-1/4}", hot75, 11, nec)},
				{name: "12 × 6 mm² tied, 42 °C, sun", figure: nan, of: "S4n", doc: given("roof-strings")},
				{name: "12 × 6 mm² tied, 42 °C, night", figure: nan, of: "S4n", doc: given("roof-strings", around(func(s *section.Surroundings) { s.SunWM2 = section.Opt[float64]{} }))},
				{name: "12 × 6 mm² tied, 60 °C, sun", figure: nan, of: "S4n", doc: given("roof-strings", ambient(60))},
				{name: "12 × 6 mm² spread, 42 °C, sun", figure: nan, of: "S4n", doc: given("strings-spread")},
			},
		},
	}
}

// smoke is how far a temperature may be from a hand model of one lump (homogeneous bundle, an air gap, convection and radiation by handbook): a
// band for mistakes and no target.
const smoke = 12

// TestScenarioTemperatures holds the hottest conductor to a hand model, and what must fail to failing.
func TestScenarioTemperatures(t *testing.T) {
	breeze := func(d *section.Document) *section.Document {
		return d.With(func(d *section.Document) {
			d.Surroundings.Kind, d.Surroundings.AirSpeedMS = section.MovingAir, section.Some(0.5)
		})
	}
	for _, c := range []struct {
		name    string
		doc     func(testing.TB) *section.Document
		hottest float64 // °C by the hand model; NaN: none
		over    int     // 1 must be over, −1 must not, 0 no matter
		quick   bool
	}{
		{"umbilical, 22 A for good", given("robot-umbilical"), 61, -1, true},
		{"charger, shade", charger(0, 32, 9.6), 62, 0, true},
		{"charger, sun", charger(1000, 32, 9.6), 81, 1, true},
		{"charger, one phase in the sun", charger(1000, 0, 32), 74, 1, true},
		// By hand the wires were one round pile in the middle of the air (65 and 80 °C); here they lie side by side on the steel, which is cooler.
		{"wireway of 38", given("wireway-38"), math.NaN(), -1, false},
		{"wireway, heavy, at 40 %", feeders(52, 68), math.NaN(), -1, false},
		{"wireway, heavy, at 90 and 120 A", feeders(90, 120), math.NaN(), 1, false},
		{"nine 8 AWG at what the table gives", given("nine-in-emt", sameAmps(38.5)), math.NaN(), 1, true},
		{"harness, 40 000 ft", given("harness-altitude"), 85, -1, false},
		{"harness A, 7 × 8.8 A", example{"", 60, 60000, exampleA.kinds, loaded("A", 7), 8.8}.doc, 140, -1, false},
		{"stage, 10 A free", given("stage-multicore", sameAmps(10), noFloor), 52, -1, true},
		{"stage, 13 A free", given("stage-multicore", noFloor), 63, 0, true},
		{"stage, 16 A free", given("stage-multicore", sameAmps(16), noFloor), 77, 1, true},
		{"stage, 16 A on the floor", given("stage-multicore", sameAmps(16)), math.NaN(), 1, true}, // by hand the floor was spread over the outside
		{"strings, shade", given("roof-strings", around(func(s *section.Surroundings) { s.SunWM2 = section.Opt[float64]{} })), 50, -1, true},
		{"strings, sun", given("roof-strings"), 71, -1, true},
		{"strings, sun and breeze", given("roof-strings", breeze), 61, -1, true},
		{"strings, sun, 60 °C", given("roof-strings", ambient(60)), 88, 0, true},
	} {
		if !c.quick && !validating && !soaking || testing.Short() {
			continue
		}
		r, err := New(cat).solve(context.Background(), c.doc(t), Options{})
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		hot := math.Inf(-1)
		for _, w := range r.Conductors {
			hot = math.Max(hot, w.TempC)
		}
		t.Logf("%-36s %6.1f °C, by hand %g °C, over %v", c.name, hot, c.hottest, r.Over())
		if r.Status == heat.Converged && math.Abs(hot-c.hottest) > smoke {
			t.Errorf("%s: %.1f °C, by hand %g °C", c.name, hot, c.hottest)
		}
		if over := r.Over() || r.Status == heat.ThermalRunaway; c.over != 0 && over != (c.over > 0) {
			t.Errorf("%s: over %v at %.1f °C", c.name, over, hot)
		}
	}
}
