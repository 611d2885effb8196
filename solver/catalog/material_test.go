package catalog

import (
	"slices"
	"testing"
)

func mustMaterial(t testing.TB, id string) Material {
	t.Helper()
	m, ok := Load().Material(id)
	if !ok {
		t.Fatalf("no material %s", id)
	}
	return m
}

// Thermal resistivities in K·m/W by IEC 60287-2-1 table 1 (testdata/reference/materials.csv: seen in course notes, or from memory), and the
// conductivities of ISO 10456 that disagree: the value is the cable standard's, the range holds both.
func TestConductivities(t *testing.T) {
	for id, want := range map[string]struct {
		resistivity float64   // IEC 60287-2-1
		others      []float64 // W/mK elsewhere: ISO 10456, VDE, IEC above 3 kV
	}{
		"pvc":             {5.0, []float64{1 / 6.0, 0.17, 0.141, 1 / 5.0}},
		"pe":              {3.5, []float64{0.33, 0.50, 0.40}},
		"xlpe":            {3.5, []float64{0.28}},
		"epr":             {3.5, []float64{1 / 5.0, 0.25}},
		"rubber":          {5.0, []float64{0.13, 0.25}},
		"butyl":           {5.0, []float64{0.24}},
		"polychloroprene": {5.5, []float64{0.23}},
		"paper":           {6.0, []float64{1 / 5.0}},
		"jute":            {6.0, nil},
		"pvc-rigid":       {6.0, []float64{1 / 7.0, 0.17}},
	} {
		m := mustMaterial(t, id)
		near(t, id+" conductivity", m.K.V, 1/want.resistivity, 0.003)
		for _, k := range want.others {
			if k < m.K.Low-5e-4 || k > m.K.High+5e-4 {
				t.Errorf("%s: %g W/mK is outside the range %g to %g", id, k, m.K.Low, m.K.High)
			}
		}
	}
	for id, k := range map[string]float64{ // ISO 10456 table 3 (PTFE, PUR, nylon seen; others from memory)
		"ptfe": 0.25, "pur": 0.25, "nylon": 0.25, "polypropylene": 0.22, "epoxy": 0.20, "steel": 50,
	} {
		near(t, id, mustMaterial(t, id).K.V, k, 1e-9)
	}
}

// Volumetric heat capacities: IEC 60853-2 for insulations, IEC 60949 for steel and lead, density × specific heat of ISO 10456 for the rest.
func TestHeatCapacities(t *testing.T) {
	for id, want := range map[string]float64{
		"pvc": 1.7e6, "pe": 2.4e6, "xlpe": 2.4e6, "epr": 2.0e6, "rubber": 2.0e6, "paper": 2.0e6, "steel": 3.8e6, "lead": 1.45e6, "copper": 3.45e6,
		"pur": 1200 * 1800, "nylon": 1150 * 1600, "ptfe": 2200 * 1000, "polypropylene": 910 * 1800, "pvc-rigid": 1390 * 900,
	} {
		near(t, id, mustMaterial(t, id).RhoCp, want, 0.005)
	}
}

// testdata/reference/air.csv (a heat-transfer textbook's table): the constant is air at 50 °C, its range 20 to 100 °C.
func TestAir(t *testing.T) {
	air := mustMaterial(t, "air")
	for _, row := range reference(t, "air.csv") {
		at, k := row.must(t, "T_C"), row.must(t, "k_W_mK")
		switch at {
		case 50:
			near(t, "air at 50 °C", air.K.V, k, 0.003)
			near(t, "heat capacity", air.RhoCp, row.must(t, "rho_kg_m3")*row.must(t, "cp_J_kgK"), 0.01)
		case 20:
			near(t, "air at 20 °C", air.K.Low, k, 0.003)
		case 100:
			near(t, "air at 100 °C", air.K.High, k, 0.003)
		}
	}
}

func TestMaterialsAreGrouped(t *testing.T) {
	c := Load()
	var seen []string
	for _, m := range c.Materials() {
		if len(seen) == 0 || seen[len(seen)-1] != m.Family {
			seen = append(seen, m.Family)
		}
		polymer := m.Family == FamilyInsulation || m.Family == FamilyJacket || m.Family == FamilyFiller
		if polymer && (m.LimitC.Low == 0 || m.Metal || m.Gas) {
			t.Errorf("%s: %+v", m.ID, m)
		}
		if m.Metal != (m.K.V > 5) {
			t.Errorf("%s: metal is %t at %g W/mK", m.ID, m.Metal, m.K.V)
		}
	}
	if !slices.Equal(seen, families) {
		t.Errorf("families come as %v", seen)
	}
}

// What a design can't do without.
func TestMaterialsNeeded(t *testing.T) {
	for _, id := range []string{
		"pvc", "pe", "xlpe", "epr", "rubber", "pur", "tpe", "silicone", "etfe", "fep", "ptfe", "polypropylene", "nylon", "polyimide", "lszh",
		"polychloroprene", "paper", "mineral-wool", "steel", "galvanised-steel", "painted-steel", "stainless-steel", "aluminium", "copper",
		"tinned-copper", "fibreglass", "filler", "air", "nitrogen",
	} {
		mustMaterial(t, id)
	}
	// The one set of surface values that the validation used: 0.9 plastics and paint, 0.25 galvanised steel, 0.08 bright metal.
	for id, e := range map[string]float64{"pvc": 0.9, "rubber": 0.9, "painted-steel": 0.9, "galvanised-steel": 0.25, "copper": 0.08, "aluminium": 0.08} {
		near(t, id+" emissivity", mustMaterial(t, id).Emissivity.V, e, 1e-9)
	}
}
