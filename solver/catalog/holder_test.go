package catalog

import (
	"math"
	"strings"
	"testing"
)

func mustHolder(t testing.TB, id string) Holder {
	t.Helper()
	h, ok := Load().Holder(id)
	if !ok {
		t.Fatalf("no holder %s", id)
	}
	return h
}

// NFPA 70 chapter 9 table 4 by testdata/reference/conduit_nec_t4.csv: inside diameter and total area.
func TestConduitsOfNFPA70Table4(t *testing.T) {
	rows := reference(t, "conduit_nec_t4.csv")
	for _, row := range rows {
		h := mustHolder(t, strings.ToLower(row["type"])+"-"+row["trade_size"])
		in := h.InsideM * 1e3 / 25.4
		near(t, h.ID+" inside", in, row.must(t, "ID_in"), 1e-9)
		if area := math.Pi / 4 * in * in; math.Abs(area-row.must(t, "area_in2")) > 6e-4 {
			t.Errorf("%s has %.3f in², the table %s", h.ID, area, row["area_in2"])
		}
	}
	if len(rows) != 50 {
		t.Errorf("%d conduits were compared, want 5 kinds of 10", len(rows))
	}
}

// Walls of EMT in inches by ANSI C80.3, and the outsides of RMC and PVC, which are those of steel pipe (ASME B36.10, mm); both from memory.
func TestConduitWalls(t *testing.T) {
	sizes := []string{"1/2", "3/4", "1", "1-1/4", "1-1/2", "2", "2-1/2", "3", "3-1/2", "4"}
	walls := []float64{0.042, 0.049, 0.057, 0.065, 0.065, 0.065, 0.072, 0.072, 0.083, 0.083}
	pipe := []float64{21.3, 26.7, 33.4, 42.2, 48.3, 60.3, 73.0, 88.9, 101.6, 114.3}
	for i, size := range sizes {
		near(t, "emt-"+size+" wall", mustHolder(t, "emt-"+size).WallM/0.0254, walls[i], 1e-6)
		for _, kind := range []string{"rmc-", "pvc40-", "pvc80-"} {
			h := mustHolder(t, kind+size)
			near(t, h.ID+" outside", 1e3*(h.InsideM+2*h.WallM), pipe[i], 2e-3)
		}
		if a, b := mustHolder(t, "pvc40-"+size), mustHolder(t, "pvc80-"+size); b.WallM <= a.WallM {
			t.Errorf("schedule 80 of size %s has a thinner wall than schedule 40", size)
		}
	}
}

// How many equal THHN fit by the 40 % rule, NFPA 70 annex C tables C.1 for EMT (public copies; also a worked example of handbooks):
// the count rounds up from 0.8.
func TestConduitFill(t *testing.T) {
	for conduit, counts := range map[string]map[string]float64{
		"emt-1/2": {"14": 12, "12": 9, "10": 5, "8": 3},
		"emt-1":   {"14": 35, "12": 26, "10": 16, "8": 9, "6": 7},
	} {
		inside := mustHolder(t, conduit).InsideM
		for size, want := range counts {
			w, _ := mustWire(t, "thhn-"+size)
			if n := 0.4 * inside * inside / (w.DiameterM * w.DiameterM); math.Floor(n+0.2) != want {
				t.Errorf("%s holds %.2f of %s, want %g", conduit, n, size, want)
			}
		}
	}
}

// EN 60423: outside diameters of metric conduits are their names.
func TestMetricConduits(t *testing.T) {
	for name, d := range map[string]float64{"16": 16, "20": 20, "25": 25, "32": 32, "40": 40, "50": 50, "63": 63} {
		h := mustHolder(t, "m"+name)
		near(t, h.ID+" outside", 1e3*(h.InsideM+2*h.WallM), d, 1e-9)
	}
}

func TestHolders(t *testing.T) {
	c := Load()
	var last Holder
	kinds := 0
	for _, h := range c.Holders() {
		m := mustMaterial(t, h.Wall)
		if h.Emissivity < m.Emissivity.Low || h.Emissivity > m.Emissivity.High {
			t.Errorf("%s has emissivity %g, its wall of %s %g to %g", h.ID, h.Emissivity, m.ID, m.Emissivity.Low, m.Emissivity.High)
		}
		if round := h.InsideM > 0; round != (h.Kind == KindConduit) || round == (h.WidthM > 0) || round == (h.HeightM > 0) {
			t.Errorf("%s: %+v", h.ID, h)
		}
		if h.Kind != last.Kind {
			kinds++
		}
		if family(h) == family(last) && rank(h) <= rank(last) {
			t.Errorf("%s is not larger than %s", h.ID, last.ID)
		}
		last = h
	}
	if kinds != 2 {
		t.Errorf("the kinds are mixed: %d changes", kinds)
	}
	// nominal inside of wireways in inches, outside of trunking in mm (common practice, no source)
	if h := mustHolder(t, "wireway-4x4"); math.Abs(h.WidthM-0.1016) > 1e-9 || h.WidthM != h.HeightM {
		t.Errorf("%+v", h)
	}
	if h := mustHolder(t, "trunking-100x50"); math.Abs(h.WidthM+2*h.WallM-0.1) > 1e-9 || math.Abs(h.HeightM+2*h.WallM-0.05) > 1e-9 {
		t.Errorf("%+v", h)
	}
}

func family(h Holder) string {
	name, rest, _ := strings.Cut(h.ID, "-")
	if metricName.MatchString(name) {
		return "m" + rest
	}
	if strings.HasPrefix(rest, "pvc-") {
		return name + "-pvc"
	}
	return name
}

// rank orders by outside width, then height.
func rank(h Holder) float64 { return h.InsideM + 1000*math.Round(1e4*(h.WidthM+2*h.WallM)) + h.HeightM }
