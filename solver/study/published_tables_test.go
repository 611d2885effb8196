package study

import (
	"fmt"
	"testing"

	"packrise/solver/pack"
	"packrise/solver/section"
)

const room30 = "{kind: still-air, ambient_c: 30}"

// trade writes a size of the NFPA tables with its unit.
func trade(size string) string {
	if len(size) == 3 && size[1] != '/' {
		return size + " kcmil"
	}
	return size + " AWG"
}

// adjustment is NEC 310.15(C)(1), 2023, for n current-carrying conductors.
func adjustment(t testing.TB, n int) float64 {
	table := openReference(t, "nec_factors.csv")
	for _, r := range []struct {
		most int
		row  string
	}{{6, "4–6"}, {9, "7–9"}, {20, "10–20"}, {30, "21–30"}, {40, "31–40"}} {
		switch {
		case n <= 3:
			return 1
		case n <= r.most:
			return table.number("c60_or_value", "310.15(C)(1) number of current-carrying conductors (percent)", r.row) / 100
		}
	}
	t.Fatalf("no factor for %d conductors", n)
	return 0
}

// tubes are equal THHN in EMT: 1 in where they fit, else the next that holds them by chapter 9.
func tubes(t testing.TB) []publishing {
	f := publishing{
		name: "equal THHN in EMT", source: "NFPA 70, 2023, table 310.16, 90 °C column, × table 310.15(C)(1)",
		conditions: "30 °C, 60 Hz, all conductors loaded alike; from ten on the factor holds a diversity of loads, which none of these has",
		drawn:      "EMT free and level in still air, dry, wires settled on its bottom; 1 in, or the next that holds them by chapter 9",
	}
	base := openReference(t, "nec_310_16.csv")
	for _, n := range []int{3, 6, 9, 12, 20, 31} {
		for _, size := range []string{"14", "12", "10", "8"} {
			holder := tubeFor(n, size)
			p := published{
				name: fmt.Sprintf("%d × %s in %s", n, trade(size), holder), figure: adjustment(t, n) * base.number("cu90", size), rule: "nec-310", of: "W1",
				quick: n == 3 && size == "12",
				doc: alike{
					n: n, surroundings: room30, holder: "{kind: conduit, stock: " + holder + "}", part: "stock: thhn-" + size, amperes: 15, hz: 60,
				}.doc,
			}
			if n == 9 && (size == "12" || size == "8") {
				p.quick = true
				want := map[string]float64{"12": 21.6, "8": 35}[size] / p.figure // finite elements with the same clearance
				p.low, p.high = 0.95*want, 1.05*want
			}
			f.rows = append(f.rows, p)
		}
	}
	return []publishing{f}
}

// tubeFor is the smallest EMT from 1 in that holds n THHN: NEC annex C, table C.1 (1 in 35, 26, 16, 9 of 14, 12, 10, 8 AWG; 1¼ in 61, 45, 28, 16;
// 1½ in 84, 61, 38, 22; 2 in 138, 101, 63, 36; from memory beyond 1 in).
func tubeFor(n int, size string) string {
	most := map[string][4]int{"14": {35, 61, 84, 138}, "12": {26, 45, 61, 101}, "10": {16, 28, 38, 63}, "8": {9, 16, 22, 36}}[size]
	for i, stock := range []string{"emt-1", "emt-1-1/4", "emt-1-1/2"} {
		if n <= most[i] {
			return stock
		}
	}
	return "emt-2"
}

// singlesInAir are single THHN in free air at 75 °C (a table on the safe side).
func singlesInAir(t testing.TB) publishing {
	table := openReference(t, "nec_310_17.csv")
	f := publishing{
		name: "NEC 310.17, single in free air", source: "NFPA 70, 2023, table 310.17, 75 °C column", conditions: "30 °C, copper, 60 Hz",
		drawn: "one THHN, its limit set to 75 °C, horizontal in still air", low: 0.90, high: 1.20,
	}
	for _, size := range []string{"14", "12", "10", "8", "6", "4", "3", "2", "1", "1/0", "2/0", "3/0", "4/0", "250", "300", "350", "400", "500"} {
		f.rows = append(f.rows, published{
			name: trade(size), figure: table.number("cu75", size), rule: "nec-310-17", of: "W", quick: size == "12" || size == "500",
			doc: func(t testing.TB) *section.Document {
				return read(t, fmt.Sprintf(`packrise: 1
surroundings: %s
holder: {kind: none}
parts: [{id: W, kind: core, stock: thhn-%s, at_mm: [0, 0], limit_c: 75}]
loads: [{id: a, conductors: [W], current_a: %g, frequency_hz: 60, terminals: {rating_c: 75}}]
`, room30, size, table.number("cu75", size)))
			},
		})
	}
	return f
}

// layered is a cable of n equal cores laid up in layers, lengths in mm.
type layered struct {
	n                            int
	size, class                  string
	insulation, covering, sheath float64
	fill                         string
	limitC                       float64
}

func (c layered) doc(t testing.TB) *section.Document {
	metal, err := cat.Conductor(c.size+" mm2", "copper", c.class)
	if err != nil {
		t.Fatal(err)
	}
	core := metal.DiameterM*1e3 + 2*c.insulation
	radii := make([]float64, c.n)
	for i := range radii {
		radii[i] = core / 2
	}
	_, inside := pack.LayUp(radii)
	layers := fmt.Sprintf("{material: sheath, thickness_mm: %g}", c.sheath)
	if c.covering > 0 {
		layers = fmt.Sprintf("{material: filler, thickness_mm: %g}, %s", c.covering, layers)
	}
	return alike{
		n: c.n, surroundings: room30, holder: fmt.Sprintf("{kind: jacket, inside_mm: %.5f, fill: %s, layers: [%s]}", 2*inside+1e-5, c.fill, layers), lay: true,
		part:    fmt.Sprintf("conductor: {size: %s mm2, class: %s}, layers: [{material: pvc, thickness_mm: %g}], limit_c: %g", c.size, c.class, c.insulation, c.limitC),
		amperes: 15, hz: 50, more: "rules: {use: [iec-52, vde-0298-4]}\nmaterials: {sheath: {k_w_mk: 0.2, limit_c: 70, emissivity: 0.9, source: \"PVC for 70 °C conductors; the catalogue's PVC with no type is judged at 60 °C\"}}\n",
	}.doc(t)
}

// cablesInAir are three-core cables with PVC by method E. Layers of IEC 60227-4:1992, table 1 (from memory).
func cablesInAir(t testing.TB) publishing {
	table := openReference(t, "iec60364_ampacity_cu.csv")
	f := publishing{
		name: "IEC method E, three-core cable in free air", source: "IEC 60364-5-52:2009, table B.52.10", conditions: "copper, PVC, conductor 70 °C, 30 °C, 50 Hz, three loaded",
		drawn: "filled cable of three laid-up cores (IEC 60227-4), horizontal in still air", low: 0.93, high: 1.07,
	}
	for _, c := range []struct {
		size                         string
		insulation, covering, sheath float64
	}{{"2.5", 0.8, 0.4, 1.2}, {"6", 0.8, 0.4, 1.4}, {"16", 1.0, 0.8, 1.4}, {"25", 1.2, 0.8, 1.6}} {
		f.rows = append(f.rows, published{
			name: "3 × " + c.size + " mm²", figure: table.number("I", "PVC", "E", "3", c.size), rule: "iec-52", of: "W1", quick: c.size == "2.5" || c.size == "25",
			doc: layered{3, c.size, "stranded", c.insulation, c.covering, c.sheath, "filler", 70}.doc,
		})
	}
	return f
}

// multicores are control cables with many loaded cores. Layers after EN 50525-2-51 (from memory).
func multicores(t testing.TB) publishing {
	base := openReference(t, "vde0298_t11.csv").number("two_or_three_loaded_on_surface_A", "1.5")
	factors := openReference(t, "vde0298_t26_multicore.csv")
	f := publishing{
		name: "VDE control cables, all cores loaded", source: "DIN VDE 0298-4:2013, table 11 × table 26",
		conditions: "conductor 70 °C, 30 °C, 50 Hz; the table's base lies on a surface", drawn: "flexible filled control cable of 1.5 mm² cores laid up in layers, PVC, free in still air",
	}
	for _, n := range []int{7, 19, 61} {
		sheath := map[int]float64{7: 1.1, 19: 1.6, 61: 2.4}[n]
		f.rows = append(f.rows, published{
			name: fmt.Sprintf("%d × 1.5 mm²", n), figure: base * factors.number("factor", fmt.Sprint(n)), rule: "vde-0298-4", of: "W1", quick: n == 7,
			doc: layered{n, "1.5", "flexible", 0.7, 0, sheath, "filler", 70}.doc,
		})
	}
	return f
}

// tied are wires of one size tied together, all loaded.
func tied(t testing.TB) publishing {
	table := openReference(t, "mil_bundle_derating.csv")
	f := publishing{
		name: "tied bundles, all loaded", factor: true, source: "MIL-W-5088L bundle curves (the family of AC 43.13-1B figure 11-5), read to ±0.01", conditions: "conductor 200 °C, 50 °C, sea level",
		drawn: "14 AWG laid up in layers in still air; factor on one of them alone here", low: 0.88, high: 1.12,
	}
	for _, n := range []int{3, 7, 12, 19} {
		f.rows = append(f.rows, published{
			name: fmt.Sprintf("%d × 14 AWG", n), figure: table.number("load100pct", fmt.Sprint(n)), rule: "ac-43-13", exact: 0.02, of: "W1", quick: n == 7,
			doc: alike{
				n: n, surroundings: "{kind: still-air, ambient_c: 50}", holder: "{kind: open-bundle}", part: "stock: ptfe-200-14", amperes: 15, lay: true,
				more: "rules: {use: [ac-43-13]}\n",
			}.doc,
		})
	}
	return f
}
