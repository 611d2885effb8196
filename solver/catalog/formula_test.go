package catalog

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// The allowances for strands and tin against NFPA 70 chapter 9 table 8, which has both: what the formula gives for the sizes that the table lists is within
// 1 % of the table (which is rounded to three digits).
func TestAllowancesAgainstTable8(t *testing.T) {
	c := Load()
	for _, row := range reference(t, "nec_ch9_t8.csv") {
		n := row.must(t, "strands")
		class := Stranded
		if n == 1 {
			class = Solid
		} else if n > 61 {
			continue
		}
		for _, metal := range []string{"copper", "tinned-copper", "aluminium"} {
			k := mustConductor(t, americanSize(row["size"]), metal, class)
			m, _ := c.Metal(metal)
			f := c.formula
			if class == Stranded { // the table's own number of strands, which sets how thick the tin lies
				s := f.Classes[Stranded]
				s.Strands = n
				f.Classes = map[string]formulaClass{Stranded: s}
			}
			near(t, row["size"]+" "+metal+" "+class, m.Rho20/k.AreaM2*f.allowance(class, metal, k.AreaM2*1e6), k.R20, 0.011)
		}
	}
}

func TestConductorOf(t *testing.T) {
	c := Load()
	// closed form: ρ/A with ρ20 = 1.7241e-8 Ω·m (IEC 60287-1-1 table 1)
	k, err := c.ConductorOf(3e-6, 0, "copper", Solid)
	if err != nil || !k.Formula || k.Size != "3 mm2" {
		t.Fatal(k, err)
	}
	near(t, "solid resistance", k.R20, 1.7241e-8/3e-6, 1e-9)
	near(t, "solid diameter", k.DiameterM, math.Sqrt(4*3e-6/math.Pi), 1e-9)
	k, _ = c.ConductorOf(0, 2e-3, "aluminium", Solid)
	near(t, "area of 2 mm", k.AreaM2, math.Pi*1e-6, 1e-9)
	near(t, "aluminium resistance", k.R20, 2.8264e-8/(math.Pi*1e-6), 1e-9)
	// seven strands: 3 strand diameters across, 7/9 filled
	k, _ = c.ConductorOf(7*math.Pi/4*1e-6, 0, "copper", Stranded)
	near(t, "seven strands of 1 mm", k.DiameterM, 3e-3, 1e-4)
	// 2 % for stranding, ASTM B8
	near(t, "strand allowance", k.R20*k.AreaM2/1.7241e-8, 1.02, 1e-9)
	// both given
	k, err = c.ConductorOf(2.5e-6, 2.1e-3, "copper", Flexible)
	if err != nil || math.Abs(k.AreaM2-2.5e-6) > 1e-18 || math.Abs(k.DiameterM-2.1e-3) > 1e-15 || !strings.Contains(k.Source.Note, "resistivity / area") {
		t.Error(k, err)
	}
}

func TestConductorOfRefuses(t *testing.T) {
	for _, c := range []struct {
		area, diameter float64
		metal, class   string
		want           string
	}{
		{0, 0, "copper", Solid, "needs size, area_mm2 or diameter_mm"},
		{-1e-6, 0, "copper", Solid, "above zero"},
		{0, math.NaN(), "copper", Solid, "above zero"},
		{math.Inf(1), 0, "copper", Solid, "below 100000"},
		{5e-6, 2e-3, "copper", Solid, "5 mm² of metal do not fit within a circle of 2 mm"},
		{1e-6, 0, "gold", Solid, `"gold" is not a conductor metal`},
		{1e-6, 0, "copper", "woven", `"woven" is not a class`},
	} {
		k, err := Load().ConductorOf(c.area, c.diameter, c.metal, c.class)
		if err == nil || !strings.Contains(err.Error(), c.want) || k != (Conductor{}) {
			t.Errorf("%+v: %v", c, err)
		}
	}
}

// Area to diameter and back gives the area; the resistance falls as 1/area and never goes below ρ/A.
func TestConductorOfGoesRound(t *testing.T) {
	c := Load()
	rapid.Check(t, func(t *rapid.T) {
		area := math.Pow(10, rapid.Float64Range(-9, -3).Draw(t, "log area"))
		metal := rapid.SampledFrom(c.metals.order).Draw(t, "metal")
		class := rapid.SampledFrom(classes).Draw(t, "class")
		a, err := c.ConductorOf(area, 0, metal, class)
		if err != nil {
			t.Fatal(err)
		}
		b, err := c.ConductorOf(0, a.DiameterM, metal, class)
		if err != nil {
			t.Fatal(err)
		}
		m, _ := c.Metal(metal)
		k := a.R20 * area / m.Rho20
		if math.Abs(b.AreaM2/area-1) > 1e-9 || math.Abs(b.R20/a.R20-1) > 1e-9 || k < 1-1e-9 || k > 1.14 {
			t.Fatalf("%+v\n%+v", a, b)
		}
	})
}
