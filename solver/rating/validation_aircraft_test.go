package rating_test

import (
	"fmt"
	"testing"

	"packrise/solver/rating"
)

const advisory = "FAA AC 43.13-1B change 1 (public domain)"

// airWire is one of the three single wires that the worked examples of the advisory circular read off its free-air chart.
type airWire struct {
	awg             int
	ambientC, freeA float64
}

// limitAirC is the conductor temperature of the examples' wires.
const limitAirC = 200

// The examples: 14 AWG was seen in a public copy; 20 and 12 AWG are from memory.
var airWires = []airWire{{14, 50, 47}, {12, 25, 68}, {20, 60, 21.5}}

// alone draws one wire.
func (w airWire) alone(altitudeM float64) plan {
	return plan{
		surroundings: w.around(altitudeM), holder: "{kind: none}", limitC: limitAirC, start: w.freeA,
		parts: []string{fmt.Sprintf("{id: W1, kind: core, stock: etfe-%d, at_mm: [0, 0]}", w.awg)}, loaded: []string{"W1"},
	}
}

func (w airWire) around(altitudeM float64) string {
	return fmt.Sprintf("{kind: still-air, ambient_c: %g, altitude_m: %g}", w.ambientC, altitudeM)
}

// bundle draws n of the wires laid up in an open bundle. Of these, the given places of the lay, from the middle outwards, carry current.
func (w airWire) bundle(n int, loaded []int, altitudeM float64) plan {
	p := plan{surroundings: w.around(altitudeM), holder: "{kind: open-bundle}", lay: rating.LayUp, limitC: limitAirC, start: w.freeA / 2}
	for i := range n {
		p.parts = append(p.parts, fmt.Sprintf("{id: W%d, kind: core, stock: etfe-%d}", i+1, w.awg))
	}
	for _, i := range loaded {
		p.loaded = append(p.loaded, fmt.Sprintf("W%d", i+1))
	}
	return p
}

// inner returns the k places in the middle of a lay.
func inner(_, k int) []int {
	out := make([]int, k)
	for i := range out {
		out[i] = i
	}
	return out
}

// evenly returns k of n places of a lay, spread over its layers.
func evenly(n, k int) []int {
	out := make([]int, k)
	for i := range out {
		out[i] = (2*i + 1) * n / (2 * k)
	}
	return out
}

// over computes the permitted current of one plan over that of another: a factor.
func over(a, b plan) func(*rig) (float64, error) {
	return func(r *rig) (float64, error) {
		x, err := r.permitted(a)
		if err != nil {
			return 0, err
		}
		y, err := r.permitted(b)
		return x / y, err
	}
}

// ask computes the permitted current of a plan.
func ask(p plan) func(*rig) (float64, error) {
	return func(r *rig) (float64, error) { return r.permitted(p) }
}

const feet = 0.3048 // m

func aircraftFamilies(t testing.TB) []family {
	out := append([]family{singlesFamily(), altitudeFamily(), bundleFamily(t)}, partLoadFamilies(t)...)
	return append(out, harnessFamily())
}

func singlesFamily() family {
	f := family{
		name: "AC 43.13-1B, single wires in free air", source: advisory + ", figure 11-4 and examples of chapter 11; 14 AWG seen, 12 and 20 AWG from memory",
		conditions: "conductor 200 °C, sea level", unit: "A", low: 0.93, high: 1.07,
		drawn: "one wire with the document's own tinned strands (table 11-9), horizontal in still air",
	}
	for _, w := range airWires {
		f.rows = append(f.rows, comparison{name: fmt.Sprintf("%d AWG, %g °C around", w.awg, w.ambientC), published: w.freeA, compute: ask(w.alone(0)), quick: true})
	}
	return f
}

func altitudeFamily() family {
	f := family{
		name: "AC 43.13-1B, altitude", source: advisory + ", figure 11-7; 20 000 ft seen, 60 000 ft from memory", conditions: "conductor 200 °C",
		drawn: "the single wires above at the pressure of the altitude; factor on their current at sea level", unit: "×", low: 0.93, high: 1.07,
	}
	for _, w := range airWires {
		for _, at := range []struct{ ft, factor float64 }{{20000, 0.91}, {60000, 0.79}} {
			f.rows = append(f.rows, comparison{
				name: fmt.Sprintf("%d AWG, %g ft", w.awg, at.ft), published: at.factor,
				compute: over(w.alone(at.ft*feet), w.alone(0)), quick: w.awg == 14,
			})
		}
	}
	return f
}

const bundleCurves = "MIL-W-5088L bundle curves (the family of AC 43.13-1B figures 11-5 and 11-6), digitised by hand to ±0.01"

func bundleFamily(t testing.TB) family {
	curves := open(t, "mil_bundle_derating.csv")
	f := family{
		name: "bundles, all loaded", source: bundleCurves, conditions: "conductor 200 °C, sea level",
		drawn: "open bundle of equal wires laid up in layers, all with the same current; factor on the computed single wire", unit: "×", low: 0.92, high: 1.15,
	}
	for _, w := range airWires {
		for _, n := range []int{3, 7, 12, 19} {
			f.rows = append(f.rows, comparison{
				name: fmt.Sprintf("%d × %d AWG", n, w.awg), published: curves.number("load100pct", fmt.Sprint(n)),
				compute: over(w.bundle(n, inner(n, n), 0), w.alone(0)), quick: n <= 7 && w.awg == 20,
			})
		}
	}
	return f
}

// partLoadFamilies draw the loaded wires in the middle of the bundle, since the curves have to hold wherever they lie, and once more spread out.
func partLoadFamilies(t testing.TB) []family {
	curves := open(t, "mil_bundle_derating.csv")
	const drawn = "as above with some wires at the same current and the others idle; published read between the curves at the share of wires loaded; "
	middle := family{
		name: "bundles, part loaded in the middle", source: bundleCurves, conditions: "conductor 200 °C, sea level", unit: "×", low: 0.95, high: 1.22,
		drawn: drawn + "the loaded ones in the middle",
	}
	spread := middle
	spread.name, spread.drawn, spread.low, spread.high = "bundles, part loaded all over", drawn+"the loaded ones spread over the layers", 0, 0
	for _, w := range airWires {
		for _, c := range []struct{ wires, loaded int }{{12, 5}, {12, 7}, {19, 4}, {19, 8}, {19, 11}, {19, 15}} {
			row := comparison{
				name: fmt.Sprintf("%d of %d × %d AWG", c.loaded, c.wires, w.awg), published: curves.between(c.wires, 100*float64(c.loaded)/float64(c.wires)),
				compute: over(w.bundle(c.wires, inner(c.wires, c.loaded), 0), w.alone(0)), quick: w.awg == 20 && c.loaded == 4 && !testing.Short(),
			}
			middle.rows = append(middle.rows, row)
			row.compute, row.quick = over(w.bundle(c.wires, evenly(c.wires, c.loaded), 0), w.alone(0)), false
			spread.rows = append(spread.rows, row)
		}
	}
	return []family{middle, spread}
}

// between reads the factor for a percentage of loaded wires, linear between the curves.
func (s *sheet) between(wires int, percent float64) float64 {
	s.t.Helper()
	lower := min(int(percent/20)*20, 80)
	at := func(load int) float64 { return s.number(fmt.Sprintf("load%dpct", load), fmt.Sprint(wires)) }
	a, b := at(lower), at(lower+20)
	return a + (b-a)*(percent-float64(lower))/20
}

func harnessFamily() family {
	w14, w12 := airWires[0], airWires[1]
	return family{
		name: "AC 43.13-1B, harnesses", source: advisory + ", chapter 11 example 2 (seen) and a worked example from memory", conditions: "conductor 200 °C",
		drawn: "open bundle as above, loaded wires in the middle, in amperes; the altitude by its pressure", unit: "A", low: 0.92, high: 1.22,
		rows: []comparison{
			{name: "5 of 8 × 14 AWG, 50 °C, 20 000 ft", published: 26, compute: ask(w14.bundle(8, inner(8, 5), 20000*feet)), quick: true},
			{name: "12 × 12 AWG, 25 °C, sea level", published: 29.2, compute: ask(w12.bundle(12, inner(12, 12), 0))},
			{name: "12 × 12 AWG, 25 °C, 60 000 ft", published: 23.1, compute: ask(w12.bundle(12, inner(12, 12), 60000*feet))},
		},
	}
}
