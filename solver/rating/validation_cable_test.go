package rating_test

import (
	"fmt"
	"math"
	"testing"

	"packrise/solver/pack"
)

// roundCable is a cable of n equal cores laid up in layers, lengths in mm.
type roundCable struct {
	cores            int
	size, class      string
	insulation       float64
	fill             string
	covering, sheath float64 // inner covering of filling compound, 0: none
}

// core is the diameter of an insulated core.
func (c roundCable) core() float64 {
	metal, err := shelf.Conductor(c.size+" mm2", "copper", c.class)
	if err != nil {
		panic(err)
	}
	return metal.DiameterM*1e3 + 2*c.insulation
}

// lay places the cores and returns the diameter of the circle that holds them.
func (c roundCable) lay() ([]pack.Disc, float64) {
	radii := make([]float64, c.cores)
	for i := range radii {
		radii[i] = c.core() / 2
	}
	discs, r := pack.LayUp(radii)
	return discs, 2 * r
}

// outside is the diameter over the sheath.
func (c roundCable) outside() float64 {
	_, inside := c.lay()
	return inside + 2*(c.covering+c.sheath)
}

// plan draws the cable as the whole section, all cores loaded.
func (c roundCable) plan(around string) plan {
	discs, inside := c.lay()
	layers := fmt.Sprintf("{material: pvc, thickness_mm: %g}", c.sheath)
	if c.covering > 0 {
		layers = fmt.Sprintf("{material: filler, thickness_mm: %g}, %s", c.covering, layers)
	}
	p := plan{surroundings: around, holder: fmt.Sprintf("{kind: jacket, inside_mm: %.5f, fill: %s, layers: [%s]}", inside+1e-5, c.fill, layers)}
	for i, d := range discs {
		p.loaded = append(p.loaded, fmt.Sprintf("C%d", i+1))
		p.parts = append(p.parts, fmt.Sprintf("{id: C%d, kind: core, conductor: {size: %s mm2, class: %s}, layers: [{material: pvc, thickness_mm: %g}], at_mm: [%.5f, %.5f]}",
			i+1, c.size, c.class, c.insulation, d.X, d.Y))
	}
	return p
}

// lightCable is a cable of IEC 60227-4:1992, type 227 IEC 10, table 1 (from memory); without insulation where the type ends, above 35 mm².
func lightCable(n int, size string) roundCable {
	// Insulation, inner covering with 2 and 3 cores, sheath with 2 and 3 cores, mm.
	row := map[string][5]float64{
		"1.5": {0.7, 0.4, 0.4, 1.2, 1.2}, "2.5": {0.8, 0.4, 0.4, 1.2, 1.2}, "4": {0.8, 0.4, 0.4, 1.2, 1.2}, "6": {0.8, 0.4, 0.4, 1.2, 1.4},
		"10": {1.0, 0.6, 0.6, 1.4, 1.4}, "16": {1.0, 0.6, 0.8, 1.4, 1.4}, "25": {1.2, 0.8, 0.8, 1.4, 1.6}, "35": {1.2, 1.0, 1.0, 1.6, 1.6},
	}[size]
	return roundCable{cores: n, size: size, class: "stranded", insulation: row[0], fill: "filler", covering: row[n-1], sheath: row[n+1]}
}

// powerCable is a cable of IEC 60502-1:2004 for 0.6/1 kV with PVC (from memory): insulation of table 5, inner covering of table 8, sheath of
// 0.035 D + 1.0 mm, at least 1.4 with one core and 1.8 with several. One core has no inner covering.
func powerCable(n int, size string) roundCable {
	c := roundCable{cores: n, size: size, class: "stranded", fill: "filler"}
	c.insulation = map[string]float64{"25": 1.2, "35": 1.2, "50": 1.4, "70": 1.4, "95": 1.6}[size]
	_, laid := c.lay()
	least := 1.4
	if n > 1 {
		least, c.covering = 1.8, 1.0
		for _, step := range []float64{25, 35, 45} {
			if laid > step {
				c.covering += 0.2
			}
		}
	}
	c.sheath = max(least, tenths(0.035*(laid+2*c.covering)+1))
	return c
}

// controlCable is a flexible control cable with numbered cores of 1.5 mm²: insulation 0.7 mm and a sheath of 0.08 D + 0.4 mm, at most 2.4 mm, after
// EN 50525-2-51:2011, H05VV5-F (from memory).
func controlCable(n int, fill string) roundCable {
	c := roundCable{cores: n, size: "1.5", class: "flexible", insulation: 0.7, fill: fill}
	_, laid := c.lay()
	c.sheath = min(2.4, tenths(0.08*laid+0.4))
	return c
}

func tenths(mm float64) float64 { return math.Round(mm*10) / 10 }

// controlFamilies compare cables with many loaded cores with DIN VDE 0298-4.
func controlFamilies(t testing.TB) []family {
	factors, base := open(t, "vde0298_t26_multicore.csv"), open(t, "vde0298_t11.csv").number("two_or_three_loaded_on_surface_A", "1.5")
	const drawn = "flexible control cable of 1.5 mm² cores laid up in layers, PVC, horizontal in still air, "
	shared := family{source: "DIN VDE 0298-4:2013, table 26", conditions: "conductor 70 °C, 30 °C, 50 Hz, all cores loaded", low: 1.00, high: 1.20}
	var out []family
	for _, fill := range []struct{ word, material string }{{"filled", "filler"}, {"unfilled", "air"}} {
		factor, amperes := shared, shared
		factor.name, factor.unit, factor.drawn = "VDE multicore factors, "+fill.word, "×", drawn+fill.word+"; factor on the same cable with three cores"
		amperes.name, amperes.unit, amperes.drawn = "VDE multicore amperes, "+fill.word, "A", drawn+fill.word
		amperes.source += " × table 11 (18 A for two or three loaded on a surface)"
		amperes.low, amperes.high = 0, 0
		ask3 := many(3, fill.material)
		amperes.rows = append(amperes.rows, comparison{name: "3 × 1.5 mm²", published: base, compute: ask(ask3)})
		for _, n := range []int{7, 19, 61} {
			table := factors.number("factor", fmt.Sprint(n))
			name := fmt.Sprintf("%d × 1.5 mm²", n)
			factor.rows = append(factor.rows, comparison{name: name, published: table, compute: over(many(n, fill.material), ask3), quick: n == 7})
			amperes.rows = append(amperes.rows, comparison{name: name, published: base * table, compute: ask(many(n, fill.material))})
		}
		out = append(out, factor, amperes)
	}
	return out
}

func many(n int, fill string) plan {
	p := controlCable(n, fill).plan(roomAir)
	p.hz, p.limitC, p.start = 50, 70, 15
	return p
}
