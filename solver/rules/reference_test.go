package rules

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/quantity"
)

// csvRow is a row of testdata/reference by the names of its columns; each row names its own source there.
type csvRow map[string]string

func reference(t testing.TB, name string) (rows []csvRow) {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "..", "testdata", "reference", name))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	read := csv.NewReader(f)
	read.FieldsPerRecord = -1 // some notes at the end of a row hold a comma
	all, err := read.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	for _, line := range all[1:] {
		row := csvRow{}
		for i, key := range all[0] {
			if i < len(line) {
				row[key] = line[i]
			}
		}
		rows = append(rows, row)
	}
	if len(rows) < 5 {
		t.Fatalf("%s has only %d rows", name, len(rows))
	}
	return rows
}

// number reads a cell; "-" and "" are NaN.
func (r csvRow) number(t testing.TB, key string) float64 {
	t.Helper()
	text, known := r[key]
	if !known {
		t.Fatalf("no column %s", key)
	}
	if text == "" || text == "-" {
		return math.NaN()
	}
	v, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Fatalf("%s: %v", key, err)
	}
	return v
}

func size(t testing.TB, text string) quantity.Size {
	t.Helper()
	s, err := quantity.ParseSize(text)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// americanSize writes "12" as "12 AWG" and "250" as "250 kcmil".
func americanSize(s string) string {
	if n, err := strconv.Atoi(s); err == nil && n >= 250 {
		return s + " kcmil"
	}
	return s + " AWG"
}

func same(a, b float64) bool { return a == b || math.IsNaN(a) && math.IsNaN(b) }

// cell returns a table's value for exactly one column.
func cell(t *testing.T, tab *currents, s quantity.Size, metal string, rating float64, method string, loaded int) float64 {
	t.Helper()
	i := slices.Index(tab.sizes, s)
	if i < 0 {
		t.Fatalf("%s has no %s", tab.id, s)
	}
	for _, c := range tab.columns {
		if c.metal == metal && c.ratingC == rating && c.method == method && c.loaded == loaded {
			return c.amperes[i]
		}
	}
	t.Fatalf("%s has no column %s %g °C %q %d", tab.id, metal, rating, method, loaded)
	return 0
}

// Every value of the NEC's tables 310.16 and 310.17 (testdata/reference/nec_310_16.csv, nec_310_17.csv: NEC 2023).
func TestNECCurrents(t *testing.T) {
	checked := 0
	for file, id := range map[string]string{"nec_310_16.csv": "nec-310-16", "nec_310_17.csv": "nec-310-17"} {
		tab := Shipped().currents[id]
		rows := reference(t, file)
		if len(rows) != len(tab.sizes) {
			t.Errorf("%s has %d sizes, the reference %d", id, len(tab.sizes), len(rows))
		}
		for _, row := range rows {
			for _, metal := range []string{"copper", "aluminium"} {
				for _, c := range []float64{60, 75, 90} {
					key := map[string]string{"copper": "cu", "aluminium": "al"}[metal] + strconv.Itoa(int(c))
					want, got := row.number(t, key), cell(t, tab, size(t, americanSize(row["size"])), metal, c, "", 0)
					if !same(got, want) {
						t.Errorf("%s %s %s: %g, want %g", id, row["size"], key, got, want)
					}
					checked++
				}
			}
		}
	}
	if checked != 2*30*6 {
		t.Errorf("%d values checked", checked)
	}
}

// Every value of NEC 310.15(B)(1)(1), 310.15(C)(1) and annex B (testdata/reference/nec_factors.csv).
func TestNECFactors(t *testing.T) {
	b := Shipped()
	checked := 0
	for _, row := range reference(t, "nec_factors.csv") {
		words := strings.FieldsFunc(strings.NewReplacer(" or less", "", " and above", "", "(50% diversity)", "").Replace(row["row"]), func(r rune) bool { return r == '–' || r == '-' || r == ' ' })
		top, err := strconv.Atoi(words[len(words)-1])
		if err != nil {
			t.Fatal(row["row"])
		}
		var grouping *groupings
		switch table := row["table"]; {
		case strings.HasPrefix(table, "310.15(B)(1)(1)"):
			for key, c := range map[string]float64{"c60_or_value": 60, "c75": 75, "c90": 90} {
				for _, ta := range []float64{float64(top), float64(top) - 4} { // both ends of the band
					f, _, why := b.ambients["nec-310-15-b1"].pick(ta, c)
					if want := row.number(t, key); math.IsNaN(want) != (why != "") || why == "" && f != want {
						t.Errorf("ambient %g °C, %g °C wire: %g %q, want %g", ta, c, f, why, want)
					}
					checked++
				}
			}
		case strings.HasPrefix(table, "310.15(C)(1)"):
			grouping = b.groupings["nec-310-15-c1"]
		case strings.HasPrefix(table, "Annex B"):
			grouping = b.groupings["nec-annex-b"]
		}
		if grouping == nil {
			continue
		}
		low, _ := strconv.Atoi(words[0])
		for _, n := range []int{low, top} {
			f, _, why := grouping.pick(n, "current-carrying conductor")
			if want := row.number(t, "c60_or_value") / 100; why != "" || math.Abs(f-want) > 1e-12 {
				t.Errorf("%s, %d: %g %q, want %g", grouping.id, n, f, why, want)
			}
			checked++
		}
	}
	if checked != 16*3*2+(6+5)*2 {
		t.Errorf("%d values checked", checked)
	}
}

// The published ambient factors follow √((Tc−Ta)/(Tc−30)), Ta the top of a band (NEC 310.15(B)(2); IEC 60364-5-52 B.52.14; IEC 60204-1 D.1 about 40 °C): a
// check of the tables, not what rates.
func TestAmbientRule(t *testing.T) {
	checked := 0
	for _, c := range []struct {
		table string
		base  float64
	}{{"nec-310-15-b1", 30}, {"iec-52-14", 30}, {"vde-0298-4-17", 30}, {"iec-60204-d1", 40}} {
		tab := Shipped().ambients[c.table]
		for _, col := range tab.columns {
			for i, f := range col.factors {
				if math.IsNaN(f) {
					continue
				}
				want := math.Sqrt((col.ratingC - tab.upToC[i]) / (col.ratingC - c.base))
				if math.Abs(f-want) > 0.01 {
					t.Errorf("%s, %g °C wire at %g °C: %g, the rule gives %.4f", c.table, col.ratingC, tab.upToC[i], f, want)
				}
				checked++
			}
		}
	}
	// CHECKS 11: PVC at 50 °C 0.71, XLPE 0.82 (IEC 60364-5-52 B.52.14)
	for rating, want := range map[float64]float64{70: 0.71, 90: 0.82} {
		if f, _, _ := Shipped().ambients["iec-52-14"].pick(50, rating); f != want {
			t.Errorf("%g °C wire at 50 °C: %g, want %g", rating, f, want)
		}
	}
	if checked < 80 {
		t.Errorf("only %d factors checked", checked)
	}
}

// Every value of IEC 60364-5-52 (testdata/reference/iec60364_*.csv: 2009).
func TestIECTables(t *testing.T) {
	b := Shipped()
	methods := map[string]string{"F two touching": "F", "F trefoil": "F", "F flat touching": "F flat", "G vertical spaced": "G", "G horizontal spaced": "G horizontal"}
	checked := 0
	for _, row := range reference(t, "iec60364_ampacity_cu.csv") {
		rating := map[string]float64{"PVC": 70, "XLPE": 90}[row["insulation"]]
		if rating == 0 {
			continue // a header repeated inside the file
		}
		got := cell(t, b.currents["iec-52"], size(t, row["mm2"]+" mm2"), copper, rating, wordOr(methods[row["method"]], row["method"]), int(row.number(t, "loaded_conductors")))
		if want := row.number(t, "I"); got != want {
			t.Errorf("%s %s %s mm²: %g, want %g", row["insulation"], row["method"], row["mm2"], got, want)
		}
		checked++
	}
	for _, row := range reference(t, "iec60364_b52_14.csv") {
		for key, c := range map[string]float64{"PVC_70": 70, "XLPE_EPR_90": 90} {
			f, _, why := b.ambients["iec-52-14"].pick(row.number(t, "ambient_C"), c)
			if want := row.number(t, key); math.IsNaN(want) != (why != "") || why == "" && f != want {
				t.Errorf("B.52.14 at %s °C, %s: %g %q, want %g", row["ambient_C"], key, f, why, want)
			}
			checked++
		}
	}
	arrangements := []string{"bunched", "layer-wall", "layer-ceiling", "layer-tray", "layer-ladder"}
	for i, row := range reference(t, "iec60364_b52_17.csv") {
		for _, n := range []int{1, 2, 3, 4, 5, 6, 7, 8, 9, 12, 16, 20} {
			f, _, _ := b.groupings["iec-52-17-"+arrangements[i]].pick(n, "circuit")
			if want := row.number(t, "n"+strconv.Itoa(n)); f != want {
				t.Errorf("B.52.17 %s, %d: %g, want %g", arrangements[i], n, f, want)
			}
			checked++
		}
	}
	if checked != 24*11+10*5+15*2+5*12 {
		t.Errorf("%d values checked", checked)
	}
}

// Every value of IEC 60204-1 table 6 and DIN VDE 0298-4 tables 11 and 26 (testdata/reference/iec60204_t6.csv, vde0298_*.csv).
func TestMachineAndFlexibleTables(t *testing.T) {
	b := Shipped()
	for _, row := range reference(t, "iec60204_t6.csv") {
		for _, m := range []string{"B1", "B2", "C", "E"} {
			if got, want := cell(t, b.currents["iec-60204-6"], size(t, row["mm2"]+" mm2"), copper, 70, m, 0), row.number(t, m); got != want {
				t.Errorf("60204 %s mm² %s: %g, want %g", row["mm2"], m, got, want)
			}
		}
	}
	for _, row := range reference(t, "vde0298_t11.csv") {
		for key, loaded := range map[string]int{"single_core_free_air_A": 1, "two_or_three_loaded_on_surface_A": 3} {
			if got, want := cell(t, b.currents["vde-0298-4-11"], size(t, row["mm2"]+" mm2"), copper, 70, "", loaded), row.number(t, key); !same(got, want) {
				t.Errorf("VDE table 11, %s mm²: %g, want %g", row["mm2"], got, want)
			}
		}
	}
	for _, row := range reference(t, "vde0298_t26_multicore.csv") {
		if f, _, _ := b.groupings["vde-0298-4-26"].pick(int(row.number(t, "loaded_cores")), "loaded core"); f != row.number(t, "factor") {
			t.Errorf("VDE table 26, %s cores: %g", row["loaded_cores"], f)
		}
	}
	// from 1.5 mm² table 6 is 0.87 × the IEC 60364 currents for three loaded, rounded to half an ampere below 20 A or so (the table's own note in the reference)
	for _, mm2 := range []float64{1.5, 2.5, 4, 6, 10, 16, 25, 35, 50, 70, 95} {
		s := quantity.MM2Size(mm2)
		for _, m := range []string{"B1", "B2", "C", "E"} {
			got, fixed := cell(t, b.currents["iec-60204-6"], s, copper, 70, m, 0), cell(t, b.currents["iec-52"], s, copper, 70, m, 3)
			if math.Abs(got-0.87*fixed) > 0.6 {
				t.Errorf("%s %s: %g against 0.87 × %g", s, m, got, fixed)
			}
		}
	}
}

// Every value of AC 43.13-1B table 11-9 and of the bundle curves (testdata/reference/ac43_wire.csv, mil_bundle_derating.csv).
func TestAircraftTables(t *testing.T) {
	b := Shipped()
	for _, row := range reference(t, "ac43_wire.csv") {
		for _, c := range []int{105, 150, 200} {
			if got, want := cell(t, b.currents["ac-43-13-9"], size(t, americanSize(row["awg"])), copper, float64(c), "", 0), row.number(t, "I_"+strconv.Itoa(c)+"C_A"); got != want {
				t.Errorf("table 11-9, %s AWG at %d °C: %g, want %g", row["awg"], c, got, want)
			}
		}
	}
	rows := reference(t, "mil_bundle_derating.csv")
	curves := b.bundles["ac-43-13-5"]
	if len(rows) != len(curves.upTo) {
		t.Errorf("%d rows, want %d", len(curves.upTo), len(rows))
	}
	for i, row := range rows {
		for j, share := range []string{"20", "40", "60", "80", "100"} {
			if got, want := curves.factors[i][j], row.number(t, "load"+share+"pct"); !same(got, want) || curves.upTo[i] != row.number(t, "wires") {
				t.Errorf("bundle of %s wires, %s %%: %g, want %g", row["wires"], share, got, want)
			}
		}
	}
}

// TestHoldersOfTable4 checks fill against chapter 9 table 4 (testdata/reference/conduit_nec_t4.csv), whose columns are 53, 31 and 40 % of the inside.
func TestHoldersOfTable4(t *testing.T) {
	u := Shipped().find("nec-ch9")
	for _, row := range reference(t, "conduit_nec_t4.csv") {
		id := strings.ToLower(row["type"]) + "-" + row["trade_size"]
		h, ok := catalog.Load().Holder(id)
		if !ok {
			t.Errorf("no %s", id)
			continue
		}
		inside := Holder{Kind: Conduit, InsideMM: 1e3 * h.InsideM}.Area() / (25.4 * 25.4)
		for key, n := range map[string]int{"fill53_in2": 1, "fill31_in2": 2, "fill40_in2": 3} {
			if got, want := inside*u.fill.limit(n, false), row.number(t, key); math.Abs(got-want) > 0.0006+0.001*want {
				t.Errorf("%s, %s: %.4f in², want %g", id, key, got, want)
			}
		}
	}
}
