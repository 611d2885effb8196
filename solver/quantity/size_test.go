package quantity

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func TestParseSize(t *testing.T) {
	for text, want := range map[string]string{
		"12 AWG": "12 AWG", "12awg": "12 AWG", "#12": "12 AWG", "# 12": "12 AWG", "AWG 12": "12 AWG", "AWG12": "12 AWG",
		"#12 AWG": "12 AWG", "awg #12": "12 AWG", "No. 12": "12 AWG", "12 ga": "12 AWG", "40 AWG": "40 AWG", " 12\u00a0AWG ": "12 AWG",
		"1/0 AWG": "1/0 AWG", "4/0": "4/0 AWG", "4/0AWG": "4/0 AWG", "#2/0": "2/0 AWG", "AWG 3/0": "3/0 AWG", "1 / 0 AWG": "1/0 AWG",
		"0 AWG": "1/0 AWG", "00 AWG": "2/0 AWG", "000awg": "3/0 AWG", "0000 AWG": "4/0 AWG", "012 AWG": "12 AWG",
		"250 kcmil": "250 kcmil", "250 MCM": "250 kcmil", "250kcmil": "250 kcmil", "250.0 kcmil": "250 kcmil", "350.5 kcmil": "350.5 kcmil",
		"2.5 mm2": "2.5 mm2", "2,5 mm²": "2.5 mm2", "2.50mm²": "2.5 mm2", "2.5 mm^2": "2.5 mm2", "2.5 sq mm": "2.5 mm2", "2.5 sqmm": "2.5 mm2",
		"2.5 sq. mm": "2.5 mm2", "2,5 qmm": "2.5 mm2", ".5 mm2": "0.5 mm2", "1000 mm²": "1000 mm2", "0.05 MM2": "0.05 mm2",
	} {
		s, err := ParseSize(text)
		if err != nil || s.String() != want {
			t.Errorf("ParseSize(%q) = %q, %v; want %q", text, s, err, want)
		}
	}
}

func TestParseSizeRefuses(t *testing.T) {
	for text, want := range map[string]string{
		"2.5": `"2.5 AWG" or "2.5 mm2"`, "12": `"12 AWG" or "12 mm2"`, "": "is missing", "  ": "is missing",
		"41 AWG": "thinner than 40 AWG", "99999999999999999999 AWG": "thinner", "5/0": "thicker than 4/0 AWG", "0/0": `"1/0 AWG" to "4/0 AWG"`,
		"00000 AWG": "whole number", "12.5 AWG": "whole number", "-1 AWG": "whole number", "AWG": "whole number", "#": "whole number",
		"0 mm2": "not above zero", "-2.5 mm2": "not above zero", "0 kcmil": "not above zero", "1e3 mm2": "not a conductor size",
		"1,234,5 mm2": "thousands", "1,500 mm2": "two ways", "NaN mm2": "not a conductor size", "2.5 mm": "is a length", "12 swg": "not a conductor size",
		"99999 mm2": "larger than any", "mm2": "number is missing", "12 AWG copper": "not a conductor size", "1/2 kcmil": "not a number", "0x10 AWG": "not a conductor size",
		"AWG 12 mm2": "whole number",
	} {
		s, err := ParseSize(text)
		if err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("ParseSize(%q) = %q, %v; want an error with %q", text, s, err, want)
		}
	}
}

func TestPretty(t *testing.T) {
	for _, c := range [][2]string{{"2,5 mm2", "2.5 mm²"}, {"#12", "12 AWG"}, {"250 mcm", "250 kcmil"}} {
		if s, _ := ParseSize(c[0]); s.Pretty() != c[1] {
			t.Errorf("%s is %q; want %q", c[0], s.Pretty(), c[1])
		}
	}
	if (Size{}).String() != "" {
		t.Error("the zero Size has a text")
	}
}

// The gauge against the published table: awg.csv has ASTM B258 diameters and areas, to five and five digits. Circular mils of
// 4/0 (211 600), 10 (10 380) and 36 (25) are those of NEC chapter 9 table 8, rounded there.
func TestAWGTable(t *testing.T) {
	f, err := os.Open("../../testdata/reference/awg.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil || len(rows) != 45 {
		t.Fatalf("%d rows, %v; want 4/0 to 40 and a head", len(rows), err)
	}
	near := func(name string, got float64, field string, tol float64) {
		want, _ := strconv.ParseFloat(field, 64)
		if math.Abs(got/want-1) > tol {
			t.Errorf("%s is %g; want %g", name, got, want)
		}
	}
	for _, r := range rows[1:] {
		s, err := ParseSize(r[0] + " AWG")
		if err != nil {
			t.Fatal(err)
		}
		if n, ok := s.AWG(); !ok || strconv.Itoa(n) != r[1] {
			t.Errorf("%s has number %d", s, n)
		}
		near(s.String()+" diameter", s.DiameterMM(), r[3], 6e-4) // four decimals of a mm: half of 0.0001 in 0.0799
		near(s.String()+" area", s.AreaMM2(), r[4], 1e-4)
		near(s.String()+" circular mils", s.AreaMM2()/MM2PerKcmil*1000, r[5], 1e-4)
	}
}

// Exact points of the definition in ASTM B258: 36 AWG is 0.005 in, 4/0 is 0.46 in. 250 kcmil is 126.7 mm² (NEC chapter 9
// table 8 gives 127).
func TestSizeAnchors(t *testing.T) {
	for _, c := range []struct {
		size     Size
		d, a     float64
		tol      float64
		equalsTo string
	}{
		{AWGSize(36), 0.127, math.Pi / 4 * 0.127 * 0.127, 1e-12, "36 AWG"},
		{AWGSize(-3), 0.46 * 25.4, math.Pi / 4 * 0.46 * 25.4 * 0.46 * 25.4, 1e-12, "4/0"},
		{KcmilSize(250), 12.7, 126.677, 1e-5, "250 MCM"},
		{MM2Size(2.5), 1.78412, 2.5, 1e-5, "2,50 mm²"},
	} {
		if math.Abs(c.size.DiameterMM()/c.d-1) > c.tol || math.Abs(c.size.AreaMM2()/c.a-1) > c.tol {
			t.Errorf("%s: diameter %g mm, area %g mm²; want %g, %g", c.size, c.size.DiameterMM(), c.size.AreaMM2(), c.d, c.a)
		}
		if s, err := ParseSize(c.equalsTo); err != nil || s != c.size {
			t.Errorf("ParseSize(%q) = %v, %v; want %v", c.equalsTo, s, err, c.size)
		}
	}
	if KcmilSize(250).Compare(AWGSize(-3)) <= 0 || AWGSize(12).Compare(MM2Size(4)) >= 0 || AWGSize(0).Compare(AWGSize(0)) != 0 {
		t.Error("sizes are not ordered by area")
	}
}

func TestSizeMisusePanics(t *testing.T) {
	for name, f := range map[string]func(){
		"awg 41": func() { AWGSize(41) }, "awg 5/0": func() { AWGSize(-4) }, "no kcmil": func() { KcmilSize(0) }, "nan mm2": func() { MM2Size(math.NaN()) },
	} {
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%s did not panic", name)
				}
			}()
			f()
		}()
	}
}

func genSize(t *rapid.T) Size {
	switch rapid.IntRange(1, 3).Draw(t, "kind") {
	case 1:
		return AWGSize(rapid.IntRange(ThickestAWG, ThinnestAWG).Draw(t, "n"))
	case 2:
		return KcmilSize(rapid.Float64Range(1e-3, 1e5).Draw(t, "kcmil"))
	}
	return MM2Size(rapid.Float64Range(1e-3, 5e4).Draw(t, "mm2"))
}

// A size reads back from its canonical text and from the pretty one, in either case of letters.
func TestSizeRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := genSize(t)
		for _, text := range []string{s.String(), s.Pretty(), strings.ToUpper(s.String()), strings.ReplaceAll(s.String(), " ", "")} {
			if got, err := ParseSize(text); err != nil || got != s {
				t.Fatalf("ParseSize(%q) = %v, %v; want %v", text, got, err, s)
			}
		}
	})
}

func FuzzParseSize(f *testing.F) {
	for _, s := range []string{"12 AWG", "#12", "1/0", "250 MCM", "2,5 mm²", "2.5", "awg", "No. 0000", "mm2 sq"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) {
		s, err := ParseSize(text)
		if err != nil {
			return
		}
		if again, err := ParseSize(s.String()); err != nil || again != s {
			t.Fatalf("%q is %q, which reads as %q, %v", text, s, again, err)
		}
		if a := s.AreaMM2(); !(a > 0) || math.IsInf(a, 0) {
			t.Fatalf("%q has area %g", text, a)
		}
	})
}
