package catalog

import (
	"math"
	"strings"
	"testing"
)

func mustWire(t testing.TB, id string) (w Wire, metal Conductor) {
	t.Helper()
	w, ok := Load().Wire(id)
	if !ok {
		t.Fatalf("no wire %s", id)
	}
	metal, err := Load().WireConductor(w)
	if err != nil {
		t.Fatal(err)
	}
	return w, metal
}

// NFPA 70 chapter 9 table 5 by testdata/reference/nec_ch9_t5_thhn.csv, and its larger sizes from memory: diameter in inches and the area that
// the table prints beside it.
func TestWiresOfNFPA70Table5(t *testing.T) {
	rows := reference(t, "nec_ch9_t5_thhn.csv")
	for size, v := range map[string][2]string{
		"600": {"1.051", "0.8676"}, "700": {"1.122", "0.9887"}, "750": {"1.156", "1.0496"}, "800": {"1.188", "1.1085"}, "900": {"1.252", "1.2311"},
		"1000": {"1.310", "1.3478"},
	} {
		rows = append(rows, csvRow{"size": size, "OD_in": v[0], "area_in2": v[1]})
	}
	for _, row := range rows {
		for _, typ := range []string{"thhn-", "thwn-2-"} {
			w, _ := mustWire(t, typ+row["size"])
			in := w.DiameterM * 1e3 / 25.4
			near(t, w.ID+" diameter", in, row.must(t, "OD_in"), 1e-9)
			if area := math.Pi / 4 * in * in; math.Abs(area-row.must(t, "area_in2")) > 1e-4 { // printed to four decimals
				t.Errorf("%s has %.4f in², the table %s", w.ID, area, row["area_in2"])
			}
		}
	}
}

// UL 83: insulation and nylon of THHN in mils by size (from memory). Tables 5 and 8 of the code meet it within their rounding.
func TestThicknessOfTHHN(t *testing.T) {
	for size, mils := range map[string]float64{
		"14": 15 + 4, "12": 15 + 4, "10": 20 + 4, "8": 30 + 5, "6": 30 + 5, "4": 40 + 6, "3": 40 + 6, "2": 40 + 6, "1": 50 + 7, "1/0": 50 + 7, "4/0": 50 + 7,
		"250": 60 + 8, "500": 60 + 8, "600": 70 + 9, "1000": 70 + 9,
	} {
		w, metal := mustWire(t, "thhn-"+size)
		if got := (w.DiameterM - metal.DiameterM) / 2 / 25.4e-6; math.Abs(got-mils) > 0.6 {
			t.Errorf("thhn-%s has %.2f mil of insulation, want %g", size, got, mils)
		}
		if th, _, ok := Load().TypicalWire(americanSize(size), "thhn"); !ok || math.Abs(th/25.4e-6-mils) > 0.6 {
			t.Errorf("the usual thickness of thhn %s is %.2f mil", size, th/25.4e-6)
		}
	}
}

// EN 50525-2-31 (IEC 60227-3): lower and upper limit of the mean outside diameter in mm (from memory).
func TestDiametersOfFixedWiring(t *testing.T) {
	for typ, sizes := range map[string]map[string][2]float64{
		"h05v-k-": {"0.5": {2.1, 2.5}, "0.75": {2.2, 2.7}, "1": {2.4, 2.8}},
		"h07v-k-": {
			"1.5": {2.8, 3.4}, "2.5": {3.4, 4.1}, "4": {3.9, 4.8}, "6": {4.4, 5.3}, "10": {5.7, 6.8}, "16": {6.7, 8.1}, "25": {8.4, 10.2}, "35": {9.7, 11.7},
			"50": {11.5, 13.9}, "70": {13.2, 16.0}, "95": {15.1, 18.2}, "120": {16.7, 20.2}, "150": {18.6, 22.5}, "185": {20.6, 24.9}, "240": {23.5, 28.4},
		},
		"h07v-u-": {"1.5": {2.6, 3.2}, "2.5": {3.2, 3.9}, "4": {3.6, 4.4}, "6": {4.1, 5.0}, "10": {5.3, 6.4}},
		"h07v-r-": {
			"1.5": {2.7, 3.3}, "2.5": {3.3, 4.0}, "4": {3.8, 4.6}, "6": {4.3, 5.2}, "10": {5.6, 6.7}, "16": {6.4, 7.8}, "25": {8.1, 9.7}, "35": {9.0, 10.9},
			"50": {10.6, 12.8}, "70": {12.1, 14.6}, "95": {14.1, 17.1}, "120": {15.6, 18.8}, "150": {17.3, 20.9}, "185": {19.3, 23.3}, "240": {22.0, 26.6},
		},
	} {
		for size, limits := range sizes {
			w, _ := mustWire(t, typ+size)
			if d := w.DiameterM * 1e3; d < limits[0] || d > limits[1] {
				t.Errorf("%s is %.2f mm thick, the standard's limits are %g to %g", w.ID, d, limits[0], limits[1])
			}
		}
	}
}

// FAA AC 43.13-1B table 11-9 by testdata/reference/ac43_wire.csv: circular mils and highest resistance of tinned strands.
func TestHighTemperatureWires(t *testing.T) {
	const circularMil = 506.7075e-12 // m²
	found := 0
	for _, row := range reference(t, "ac43_wire.csv") {
		if _, ok := Load().Wire("etfe-" + row["awg"]); !ok {
			continue
		}
		_, metal := mustWire(t, "etfe-"+row["awg"])
		near(t, row["awg"]+" area", metal.AreaM2, row.must(t, "cmil")*circularMil, 1e-3)
		near(t, row["awg"]+" resistance", metal.R20*304.8, row.must(t, "Rmax20_tinned_ohm_per_kft"), 1e-3)
		// silver has no allowance for tin, which ASTM B33 makes 1.06 to 1.08 for such strands
		_, silver := mustWire(t, "ptfe-200-"+row["awg"])
		near(t, row["awg"]+" on silver", metal.R20/silver.R20, 1.07, 0.02)
		found++
	}
	if found != 9 {
		t.Errorf("%d sizes were compared, want 24 to 8 AWG", found)
	}
}

func TestWiresAreInOrder(t *testing.T) {
	c := Load()
	var last Wire
	for _, w := range c.Wires() {
		metal, err := c.WireConductor(w)
		if err != nil {
			t.Fatal(err)
		}
		if th := (w.DiameterM - metal.DiameterM) / 2; !(th > 5e-5 && th < 4e-3) {
			t.Errorf("%s has %.3f mm of insulation", w.ID, th*1e3)
		}
		typ, _ := c.WireType(w.Type)
		if w.Type == last.Type && w.DiameterM <= last.DiameterM {
			t.Errorf("%s is not thicker than %s", w.ID, last.ID)
		}
		if w.Insulation != typ.Insulation || w.Class != typ.Class || w.Metal != typ.Metal || !strings.HasPrefix(w.ID, w.Type+"-") {
			t.Errorf("%+v does not fit its type %+v", w, typ)
		}
		last = w
	}
}
