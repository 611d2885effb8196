package film_test

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"testing"

	"packrise/solver/film"
	"packrise/solver/fluid"
)

func pow(a, b float64) float64 { return math.Pow(a, b) }

// wire is one insulated round wire for the closed form.
type wire struct {
	metalM, outsideM float64
	k                float64                 // of the insulation, W/mK
	ohm              func(c float64) float64 // Ω/m
}

// ampacity is the closed form of one wire in free air: I²R(T) passes the insulation, ln(D/d)/2πk, and leaves by the film.
func (w wire) ampacity(o film.Outside, emissivity, hotC float64) float64 {
	f := film.Face{Shape: film.Round, DiameterM: w.outsideM, Emissivity: emissivity}
	low, high := o.AmbientK, hotC+zero
	through := math.Log(w.outsideM/w.metalM) / (2 * math.Pi * w.k)
	q := 0.0
	for range 100 {
		k := (low + high) / 2
		q = o.Film(f, k).Flux(k) * math.Pi * w.outsideM
		if k+q*through > hotC+zero {
			high = k
		} else {
			low = k
		}
	}
	return math.Sqrt(q / w.ohm(hotC))
}

func table(t *testing.T, name string) [][]string {
	t.Helper()
	f, err := os.Open("../../testdata/reference/" + name)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	r := csv.NewReader(f)
	r.FieldsPerRecord = -1 // some sources hold a comma
	rows, err := r.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	return rows[1:]
}

func number(t *testing.T, s string) float64 {
	t.Helper()
	v, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return v
}

// aircraftWire is a tinned wire with 0.25 mm of fluoropolymer (common practice, no source), strands by the trade's lay-ups, resistance by AC
// 43.13-1B table 11-9 (testdata/reference/ac43_wire.csv).
func aircraftWire(t *testing.T, awg string, strands, across float64) wire {
	for _, row := range table(t, "ac43_wire.csv") {
		if row[0] != awg {
			continue
		}
		r20, cmil := number(t, row[4])/304.8, number(t, row[5])
		d := across * math.Sqrt(cmil/strands) * 25.4e-6
		return wire{metalM: d, outsideM: d + 0.5e-3, k: 0.25, ohm: func(c float64) float64 { return r20 * (1 + 0.00393*(c-20)) }}
	}
	t.Fatalf("no row for %s AWG", awg)
	return wire{}
}

// TestAircraftSingles is check 7: AC 43.13-1B, single wires in free air at sea level (14 AWG seen, the others from memory), computed over
// published within 0.93–1.07. The first three are the check's, with its ±8 % the wider of the two.
func TestAircraftSingles(t *testing.T) {
	for _, c := range []struct {
		awg             string
		strands, across float64
		ambient, amps   float64
	}{
		{"14", 19, 5, 50, 47}, {"12", 37, 7, 25, 68}, {"20", 19, 5, 60, 21.5}, {"22", 19, 5, 60, 16.2},
	} {
		w := aircraftWire(t, c.awg, c.strands, c.across)
		i := w.ampacity(still(c.ambient), 0.9, 200)
		o := still(c.ambient)
		o.Cautious = true
		j := w.ampacity(o, 0.9, 200)
		t.Logf("AC 43.13-1B %s AWG, %g to 200 °C: published %.1f A, computed %.1f A, ratio %.3f (cautious %.3f)", c.awg, c.ambient, c.amps, i, i/c.amps, j/c.amps)
		if r := i / c.amps; r < 0.93 || r > 1.07 {
			t.Errorf("%s AWG: ratio %.3f", c.awg, r)
		}
	}
}

// TestAltitude is the second half of check 7: factors 0.91 at 20 000 ft (seen) and 0.79 at 60 000 ft (from memory), ±0.06.
func TestAltitude(t *testing.T) {
	w := aircraftWire(t, "14", 19, 5)
	sea := w.ampacity(still(50), 0.9, 200)
	for _, c := range []struct{ feet, factor float64 }{{20000, 0.91}, {60000, 0.79}} {
		o := still(50)
		p, in := fluid.StandardPressure(c.feet * 0.3048)
		if !in {
			t.Errorf("%g ft out of range", c.feet)
		}
		o.PressurePa = p
		f := w.ampacity(o, 0.9, 200) / sea
		t.Logf("AC 43.13-1B altitude %g ft: published %.2f, computed %.3f, ratio %.3f", c.feet, c.factor, f, f/c.factor)
		if math.Abs(f-c.factor) > 0.06 {
			t.Errorf("%g ft: factor %.3f, published %.2f", c.feet, f, c.factor)
		}
	}
}

// TestFreeAirTable: NEC 310.17 (testdata/reference/nec_310_17.csv), 14 AWG to 500 kcmil at 75 and 90 °C, with resistances of chapter 9 table 8
// and outsides of table 5 (THHN), emissivity 0.9, PVC 0.20 W/mK, skin effect at 60 Hz by IEC 60287-1-1. Computed over table within 0.92–1.20
// (testdata/validation): the table is rounded down.
func TestFreeAirTable(t *testing.T) {
	outside, ohm75 := map[string]float64{}, map[string]float64{}
	for _, row := range table(t, "nec_ch9_t5_thhn.csv") {
		outside[row[0]] = number(t, row[2]) * 1e-3
	}
	for _, row := range table(t, "nec_ch9_t8.csv") {
		ohm75[row[0]] = number(t, row[2]) / 304.8 // the stranded row stands last
	}
	seen := 0
	for _, row := range table(t, "nec_310_17.csv") {
		d, ok := outside[row[0]]
		if !ok {
			continue
		}
		r75 := ohm75[row[0]]
		area := 1.7241e-8 * (1 + 0.00393*55) / r75 // of copper of that resistance
		w := wire{metalM: 1.13 * math.Sqrt(4*area/math.Pi), outsideM: d, k: 0.20, ohm: func(c float64) float64 {
			r := r75 * (1 + 0.00323*(c-75)) // note of table 8
			x := 8 * math.Pi * 60 / r * 1e-7
			return r * (1 + x*x/(192+0.8*x*x))
		}}
		for col := 2; col <= 3; col++ {
			hot := map[int]float64{2: 75, 3: 90}[col]
			published := number(t, row[col])
			i := w.ampacity(still(30), 0.9, hot)
			t.Logf("NEC 310.17 %s at %g °C: published %g A, computed %.1f A, ratio %.3f", row[0], hot, published, i, i/published)
			if r := i / published; r < 0.92 || r > 1.20 {
				t.Errorf("%s at %g °C: ratio %.3f", row[0], hot, r)
			}
			seen++
		}
	}
	if seen < 30 {
		t.Errorf("only %d cells", seen)
	}
}
