package catalog

import (
	"math"
	"strings"
	"testing"

	"packrise/solver/quantity"
)

func mustConductor(t testing.TB, size, metal, class string) Conductor {
	t.Helper()
	k, err := Load().Conductor(size, metal, class)
	if err != nil {
		t.Fatal(err)
	}
	return k
}

// IEC 60228:2004 tables 1, 2 and 3 by testdata/reference/iec60228.csv: every number, and none where the standard has none.
func TestConductorsOfIEC60228(t *testing.T) {
	c := Load()
	columns := map[string]string{
		"class1_cu_plain": Solid, "class1_cu_coated": Solid, "class1_al": Solid, "class2_cu_plain": Stranded, "class2_cu_coated": Stranded,
		"class2_al": Stranded, "class5_cu_plain": Flexible, "class5_cu_coated": Flexible,
	}
	found := 0
	for _, row := range reference(t, "iec60228.csv") {
		for column, class := range columns {
			want, ok := row.number(t, column)
			got, err := c.Conductor(row["mm2"]+" mm²", metalWord(column), class)
			switch {
			case !ok && err == nil:
				t.Errorf("%s mm² %s is in the catalogue but not in the standard", row["mm2"], column)
			case ok && err != nil:
				t.Errorf("%s mm² %s: %v", row["mm2"], column, err)
			case ok:
				near(t, row["mm2"]+" "+column, got.R20*1e3, want, 1e-12)
				near(t, row["mm2"]+" area", got.AreaM2*1e6, row.must(t, "mm2"), 1e-12)
				if got.Formula {
					t.Errorf("%s mm² %s says that it is by formula", row["mm2"], column)
				}
				found++
			}
		}
	}
	if found != 147 {
		t.Errorf("%d numbers were compared, the table has 147", found)
	}
}

// NFPA 70 chapter 9 table 8 by testdata/reference/nec_ch9_t8.csv: resistance at 75 °C by our coefficients (IEC 60287-1-1 table 1) gives the
// table back. The code's own coefficient (0.00323, 0.00330 at 75 °C) and ours differ by less than 0.02 %.
func TestConductorsOfNFPA70Table8(t *testing.T) {
	c := Load()
	found := 0
	for _, row := range reference(t, "nec_ch9_t8.csv") {
		class := Stranded
		if row["strands"] == "1" {
			class = Solid
		}
		for _, column := range []string{"R75_cu_uncoated_ohm_per_kft", "R75_cu_coated_ohm_per_kft", "R75_al_ohm_per_kft"} {
			k, err := c.Conductor(americanSize(row["size"]), metalWord(strings.TrimPrefix(strings.Replace(column, "uncoated", "plain", 1), "R75_")), class)
			if row.must(t, "strands") > 61 {
				continue // above 1000 kcmil, not in the catalogue
			}
			if err != nil {
				t.Error(err)
				continue
			}
			m, _ := c.Metal(k.Metal)
			r75 := k.R20 * (1 + 55*m.Alpha20) * 304.8 // Ω per 1000 ft
			near(t, row["size"]+" "+class+" "+column, r75, row.must(t, column), 3e-4)
			found++
		}
	}
	if found != 96 {
		t.Errorf("%d numbers were compared, the table has 96 up to 1000 kcmil", found)
	}
}

// ASTM B258 by testdata/reference/awg.csv (area, diameter), with the resistivities of IEC 60287-1-1.
func TestSolidAWG(t *testing.T) {
	for _, row := range reference(t, "awg.csv") {
		k := mustConductor(t, row["awg"]+" AWG", "copper", Solid)
		near(t, row["awg"]+" area", k.AreaM2*1e6, row.must(t, "area_mm2"), 1e-4)
		near(t, row["awg"]+" diameter", k.DiameterM*1e3, row.must(t, "d_mm"), 7e-4)
		// the sizes of NFPA 70 table 8 are rounded to three digits there
		near(t, row["awg"]+" resistance", k.R20*1e3, row.must(t, "R20_cu_ohm_per_km"), 5e-3)
	}
	// check 1: 26 and 30 AWG by common wire tables 133.9 and 338.6 Ω/km; 14 AWG at 75 °C 3.07 Ω/kft (NFPA 70 chapter 9 table 8)
	near(t, "26 AWG", mustConductor(t, "26 AWG", "copper", Solid).R20*1e3, 133.9, 1e-3)
	near(t, "30 AWG", mustConductor(t, "30 AWG", "copper", Solid).R20*1e3, 338.6, 1e-3)
	m, _ := Load().Metal("copper")
	near(t, "14 AWG at 75 °C", mustConductor(t, "14 AWG", "copper", Solid).R20*(1+55*m.Alpha20)*304.8, 3.07, 2e-3)
}

// Below 0.5 mm²: highest resistances of fine-stranded plain copper that German tables of equipment wire give (DIN VDE 0812 and 0295, from
// memory): 0.14 mm² 138, 0.25 mm² 79.0, 0.34 mm² 57.5 Ω/km.
func TestBelowIEC60228(t *testing.T) {
	for size, want := range map[string]float64{"0.14 mm2": 138, "0.25 mm2": 79, "0.34 mm2": 57.5} {
		k := mustConductor(t, size, "copper", Flexible)
		near(t, size, k.R20*1e3, want, 0.015)
		if !k.Formula || !strings.Contains(k.Source.Note, "below the range of the standard") {
			t.Errorf("%s doesn't say that it is below the standard's range: %+v", size, k)
		}
	}
}

// More metal, less resistance and more room, within one metal, class and system of sizes.
func TestConductorsAreInOrder(t *testing.T) {
	c := Load()
	for _, american := range []bool{false, true} {
		sizes := c.Sizes(american)
		for _, m := range c.Metals() {
			for _, class := range classes {
				var last Conductor
				n := 0
				for _, size := range sizes {
					k, err := c.Conductor(size, m.ID, class)
					if err != nil {
						continue
					}
					if n++; n > 1 && !(k.AreaM2 > last.AreaM2 && k.R20 < last.R20 && k.DiameterM > last.DiameterM) {
						t.Errorf("%s %s: %s then %s are not in order", m.ID, class, last.Size, k.Size)
					}
					last = k
				}
				if n == 0 && (m.ID != "aluminium" || class != Flexible) {
					t.Errorf("no %s %s, american %t", class, m.ID, american)
				}
			}
		}
	}
}

// The list that the job asks for: AWG 40 to 4/0, 250 to 1000 kcmil, 0.05 to 1000 mm².
func TestSizes(t *testing.T) {
	c := Load()
	us, iec := c.Sizes(true), c.Sizes(false)
	if us[0] != "40 AWG" || us[len(us)-1] != "1000 kcmil" || iec[0] != "0.05 mm2" || iec[len(iec)-1] != "1000 mm2" || len(us) != 55 || len(iec) != 31 {
		t.Errorf("%d sizes %s to %s, %d sizes %s to %s", len(us), us[0], us[len(us)-1], len(iec), iec[0], iec[len(iec)-1])
	}
	for n := quantity.ThinnestAWG; n >= quantity.ThickestAWG; n-- {
		for _, class := range classes {
			mustConductor(t, quantity.AWGSize(n).String(), "copper", class)
		}
	}
}

// Overall diameters of class B strands: seven round strands of the same area lie in 3/√7 of the solid's diameter, 19 in 5/√19, 37 in 7/√37, 61 in
// 9/√61 (geometry of concentric lay; NFPA 70 chapter 9 table 8 rounds to a mil).
func TestDiameterOverStrands(t *testing.T) {
	for _, row := range reference(t, "nec_ch9_t8.csv") {
		n := row.must(t, "strands")
		over := map[float64]float64{7: 3, 19: 5, 37: 7, 61: 9}[n]
		if over == 0 {
			continue
		}
		k := mustConductor(t, americanSize(row["size"]), "copper", Stranded)
		want := over / math.Sqrt(n) * math.Sqrt(4/math.Pi*k.AreaM2)
		near(t, row["size"]+" diameter", k.DiameterM, want, 0.01)
	}
}

func TestConductorReadsWhatPeopleWrite(t *testing.T) {
	for text, want := range map[string]string{
		"12awg": "12 AWG", "#12": "12 AWG", "4/0": "4/0 AWG", "0000 AWG": "4/0 AWG", "250 MCM": "250 kcmil", "2,5 mm²": "2.5 mm2", "2.50 mm2": "2.5 mm2",
	} {
		if k := mustConductor(t, text, "copper", Stranded); k.Size != want {
			t.Errorf("%s was read as %s", text, k.Size)
		}
	}
}

func TestConductorRefuses(t *testing.T) {
	for _, c := range []struct{ size, metal, class, want string }{
		{"3 mm2", "copper", Stranded, "no stranded copper conductor of 3 mm2 in the tables; the nearest are 2.5 mm2 and 4 mm2; or write area_mm2"},
		{"275 kcmil", "copper", Stranded, "the nearest are 250 kcmil and 300 kcmil"},
		{"2000 kcmil", "copper", Stranded, "the nearest is 1000 kcmil"},
		{"1200 mm2", "copper", Stranded, "the nearest is 1000 mm2"},
		{"800 mm2", "copper", Flexible, "the nearest is 630 mm2"},
		{"250 kcmil", "copper", Solid, "the nearest is 4/0 AWG"},
		{"25 mm2", "tinned-copper", Solid, "the nearest is 16 mm2"},
		{"2.5 mm2", "aluminium", Stranded, "the nearest is 10 mm2"},
		{"25 mm2", "aluminium", Flexible, "no table here has flexible aluminium conductors in mm² sizes"},
		{"12", "copper", Stranded, `write "12 AWG" or "12 mm2"`},
		{"12 AWG", "silver", Stranded, `"silver" is not a conductor metal; write copper, tinned-copper or aluminium`},
		{"12 AWG", "copper", "class 5", `"class 5" is not a class of conductor; write solid, stranded or flexible`},
		{"", "copper", Stranded, "size"},
	} {
		k, err := Load().Conductor(c.size, c.metal, c.class)
		if err == nil || !strings.Contains(err.Error(), c.want) || k != (Conductor{}) {
			t.Errorf("%s %s %s: %v\nwant %s", c.size, c.metal, c.class, err, c.want)
		}
	}
}

func BenchmarkConductor(b *testing.B) {
	c := Load()
	for b.Loop() {
		if _, err := c.Conductor("2.5 mm2", "copper", Flexible); err != nil {
			b.Fatal(err)
		}
	}
}
