package rating_test

import (
	"fmt"
	"testing"

	"packrise/solver/rating"
)

const roomAir = "{kind: still-air, ambient_c: 30}"

// freeAirFamily compares single wires with NFPA 70 table 310.17 (check 10 of practitioners: a table on the safe side).
func freeAirFamily(t testing.TB) family {
	table := open(t, "nec_310_17.csv")
	f := family{
		name: "NEC 310.17, single in free air", source: "NFPA 70, 2023, table 310.17", conditions: "30 °C, copper, 60 Hz",
		drawn: "one THHN/THWN-2 wire, horizontal in still air", unit: "A", low: 0.92, high: 1.20,
	}
	sizes := []string{"14", "12", "10", "8", "6", "4", "3", "2", "1", "1/0", "2/0", "3/0", "4/0", "250", "300", "350", "400", "500"}
	for _, size := range sizes {
		for _, limit := range []float64{75, 90} {
			f.rows = append(f.rows, comparison{
				name: fmt.Sprintf("%s, %g °C", trade(size), limit), published: table.number(fmt.Sprintf("cu%g", limit), size), quick: size == "14" || size == "4/0" || size == "500",
				compute: ask(plan{
					surroundings: roomAir, holder: "{kind: none}", hz: 60, limitC: limit, start: 50, loaded: []string{"W"},
					parts: []string{fmt.Sprintf("{id: W, kind: core, stock: thhn-%s, at_mm: [0, 0]}", size)},
				}),
			})
		}
	}
	return f
}

// trade writes a size of the NFPA tables with its unit.
func trade(size string) string {
	if len(size) == 3 && size[1] != '/' {
		return size + " kcmil"
	}
	return size + " AWG"
}

// tubeFamilies compare THHN in a 1-inch EMT with table 310.16 × the adjustment factor.
func tubeFamilies(t testing.TB) []family {
	table, factors := open(t, "nec_310_16.csv"), open(t, "nec_factors.csv")
	const adjustment = "310.15(C)(1) number of current-carrying conductors (percent)"
	row := func(n int, size string) comparison {
		factor := 1.0
		for _, f := range []struct {
			most int
			row  string
		}{{3, ""}, {6, "4–6"}, {9, "7–9"}, {20, "10–20"}} {
			if n <= f.most {
				if f.row != "" {
					factor = factors.number("c60_or_value", adjustment, f.row) / 100
				}
				break
			}
		}
		p := plan{surroundings: roomAir, holder: "{kind: conduit, stock: emt-1}", lay: rating.Settle, hz: 60, limitC: 90, start: 20}
		for i := range n {
			p.loaded = append(p.loaded, fmt.Sprintf("W%d", i+1))
			p.parts = append(p.parts, fmt.Sprintf("{id: W%d, kind: core, stock: thhn-%s}", i+1, size))
		}
		return comparison{name: fmt.Sprintf("%d × %s", n, trade(size)), published: factor * table.number("cu90", size), compute: ask(p), quick: n == 3 || n <= 9 && !testing.Short()}
	}
	f := family{
		name: "THHN in EMT, up to nine", source: "NFPA 70, 2023, table 310.16 × table 310.15(C)(1)", conditions: "30 °C, conductor 90 °C, 60 Hz",
		drawn: "1-inch EMT, free and horizontal in still air, wires settled on its bottom, all with the same current", unit: "A", low: 0.88, high: 1.20,
		rows: []comparison{row(3, "12"), row(6, "12"), row(9, "12"), row(9, "8")},
	}
	more := f
	more.name, more.low, more.high = "THHN in EMT, twelve and twenty", 0, 0
	more.conditions += "; the factor 0.5 contains a diversity of loads, so no band"
	more.rows = []comparison{row(12, "12"), row(20, "12")}
	return []family{f, more}
}
