package rating_test

import (
	"fmt"
	"math"
	"testing"

	"packrise/solver/rating"
)

const (
	installations = "IEC 60364-5-52:2009, tables B.52.2 to B.52.12"
	onWall        = "{kind: still-air, ambient_c: 30, against: {at_deg: 180, share: 0.25, is: insulated}}"
)

// Sizes of the tables, mm². Those of single-core cables in free air start at 25.
var (
	allSizes   = []string{"1.5", "2.5", "4", "6", "10", "16", "25", "35", "50", "70", "95"}
	thickSizes = allSizes[6:]
)

// method is a column of the tables and how it is drawn.
type method struct {
	key    string // in the reference file
	loaded int
	word   string // added to the rows' names
	sizes  []string
	draw   func(n int, size string) plan
}

// installFamilies compare copper with PVC by the methods of IEC 60364-5-52.
func installFamilies(t testing.TB) []family {
	const (
		conduit = "single wires H07V-R settled in the smallest rigid PVC conduit, from M20, that they fill to at most a third, "
		cable   = "filled cable of laid-up cores; insulation, inner covering and sheath of IEC 60227-4 to 35 mm², of IEC 60502-1 above; "
		sealed  = " against a wall that lets no heat pass; the conductor nearest to it is the hottest, which an even film would not tell, and single figures fall below the band"
		single  = "single-core cables (insulation and sheath of IEC 60502-1), "
	)
	wall := func(draw func(int, string, string) plan, around string) func(int, string) plan {
		return func(n int, size string) plan { return draw(n, size, around) }
	}
	out := []family{
		{name: "IEC method B1, conduit drawn free", low: 0.88, high: 1.05, drawn: conduit + "free in still air where the method has it on a wall"},
		{name: "IEC method B1, conduit on a wall", low: 0.88, high: 1.05, ofMean: true, drawn: conduit + "a quarter of its outside" + sealed},
		{name: "IEC method C, cable on a wall", low: 0.88, high: 1.12, ofMean: true, drawn: cable + "a quarter of its outside" + sealed},
		{name: "IEC method E, cable in free air", low: 0.93, high: 1.05, drawn: cable + "horizontal in still air"},
		{name: "IEC method F, touching single-core cables", low: 0.88, high: 1.12, drawn: single + "an open bundle in still air"},
		{name: "IEC method G, one cable drawn alone", low: 0.88, high: 1.12, drawn: single + "alone in still air where the method has three side by side, a diameter apart"},
		{name: "IEC method G, spaced single-core cables", low: 0.88, high: 1.12, drawn: single + "a diameter apart, each a body of its own in still air"},
	}
	for i, methods := range [][]method{
		{{"B1", 2, "", allSizes, wall(inConduit, roomAir)}, {"B1", 3, "", allSizes, wall(inConduit, roomAir)}},
		{{"B1", 2, "", allSizes, wall(inConduit, onWall)}, {"B1", 3, "", allSizes, wall(inConduit, onWall)}},
		{{"C", 2, "", allSizes, wall(installed, onWall)}, {"C", 3, "", allSizes, wall(installed, onWall)}},
		{{"E", 2, "", allSizes, wall(installed, roomAir)}, {"E", 3, "", allSizes, wall(installed, roomAir)}},
		{{"F two touching", 2, " in a row", thickSizes, inRow}, {"F trefoil", 3, " in trefoil", thickSizes, trefoil}, {"F flat touching", 3, " in a row", thickSizes, inRow}},
		{{"G horizontal spaced", 3, " side by side", thickSizes, solitary}},
		{{"G horizontal spaced", 3, " side by side", thickSizes, beside}, {"G vertical spaced", 3, " one above the other", thickSizes, above}},
	} {
		f := &out[i]
		f.source, f.conditions, f.unit = installations, "copper, PVC, conductor 70 °C, 30 °C, 50 Hz", "A"
		for _, m := range methods {
			f.rows = append(f.rows, m.rows(t)...)
		}
	}
	return out
}

// rows makes the comparisons of a method; 2.5 and 25 mm² are quick.
func (m method) rows(t testing.TB) []comparison {
	table := open(t, "iec60364_ampacity_cu.csv")
	var out []comparison
	for _, size := range m.sizes {
		p := m.draw(m.loaded, size)
		p.hz, p.limitC, p.start = 50, 70, 30
		out = append(out, comparison{
			name:      fmt.Sprintf("%s mm², %d loaded%s", size, m.loaded, m.word),
			published: table.number("I", "PVC", m.key, fmt.Sprint(m.loaded), size),
			compute:   ask(p), quick: size == "2.5" || size == "25",
		})
	}
	return out
}

// inConduit draws n wires in a conduit.
func inConduit(n int, size, around string) plan {
	w, _ := shelf.Wire("h07v-r-" + size)
	p := plan{surroundings: around, lay: rating.Settle}
	for _, id := range []string{"m20", "m25", "m32", "m40", "m50", "m63"} {
		if h, _ := shelf.Holder(id); float64(n)*math.Pow(w.DiameterM/h.InsideM, 2) <= 1./3 {
			p.holder = "{kind: conduit, stock: " + id + "}"
			break
		}
	}
	for i := range n {
		p.loaded = append(p.loaded, fmt.Sprintf("L%d", i+1))
		p.parts = append(p.parts, fmt.Sprintf("{id: L%d, kind: core, stock: h07v-r-%s}", i+1, size))
	}
	return p
}

// installed draws a cable for fixed installation with n cores as the whole section.
func installed(n int, size, around string) plan {
	c := lightCable(n, size)
	if c.insulation == 0 {
		c = powerCable(n, size)
	}
	return c.plan(around)
}

// singles draws single-core cables at multiples of their diameter.
func singles(size, holder string, at ...[2]float64) plan {
	c := powerCable(1, size)
	p := plan{surroundings: roomAir, holder: holder}
	for i, a := range at {
		x, y := a[0]*c.outside(), a[1]*c.outside()
		p.loaded = append(p.loaded, fmt.Sprintf("L%d", i+1))
		p.parts = append(p.parts, fmt.Sprintf("{id: L%d, kind: core, conductor: {size: %s mm2}, layers: [{material: pvc, thickness_mm: %g}, {material: pvc, thickness_mm: %g}], at_mm: [%.5f, %.5f]}",
			i+1, size, c.insulation, c.sheath, x, y))
	}
	return p
}

func inRow(n int, size string) plan {
	return singles(size, "{kind: open-bundle}", [][2]float64{{0, 0}, {1, 0}, {2, 0}}[:n]...)
}

func trefoil(_ int, size string) plan {
	return singles(size, "{kind: open-bundle}", [2]float64{0, 0}, [2]float64{1, 0}, [2]float64{0.5, math.Sqrt(3) / 2})
}

func solitary(_ int, size string) plan { return singles(size, "{kind: none}", [2]float64{0, 0}) }

func beside(_ int, size string) plan {
	return singles(size, "{kind: apart}", [2]float64{0, 0}, [2]float64{2, 0}, [2]float64{4, 0})
}

func above(_ int, size string) plan {
	return singles(size, "{kind: apart}", [2]float64{0, 0}, [2]float64{0, 2}, [2]float64{0, 4})
}
