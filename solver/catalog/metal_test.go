package catalog

import "testing"

// IEC 60287-1-1 table 1 and IEC 60853-2 / 60949 (from memory, as in testdata/reference/materials.csv).
func TestMetals(t *testing.T) {
	c := Load()
	for id, want := range map[string]struct{ rho, alpha, k, kRange, rhoCp float64 }{
		"copper":        {1.7241e-8, 3.93e-3, 393, 8, 3.45e6}, // handbooks 385 to 401 W/mK
		"tinned-copper": {1.7241e-8, 3.93e-3, 393, 8, 3.45e6},
		"aluminium":     {2.8264e-8, 4.03e-3, 233.5, 3.5, 2.5e6}, // 230 to 237 W/mK
	} {
		m, ok := c.Metal(id)
		if !ok {
			t.Fatalf("no %s", id)
		}
		near(t, id+" resistivity", m.Rho20, want.rho, 1e-9)
		near(t, id+" temperature coefficient", m.Alpha20, want.alpha, 1e-9)
		near(t, id+" conductivity", m.K, want.k, want.kRange/want.k)
		near(t, id+" heat capacity", m.RhoCp, want.rhoCp, 1e-9)
	}
	if _, ok := c.Metal("gold"); ok || len(c.Metals()) != 3 {
		t.Errorf("metals are %v", c.metals.order)
	}
}

// Wiedemann–Franz: k ρ / T is the Lorenz number, 2.44e-8 V²/K² by theory; pure copper and aluminium measure 2.2 to 2.3e-8 near room
// temperature (handbooks of physics, from memory).
func TestConductivityBelongsToResistivity(t *testing.T) {
	for _, m := range Load().Metals() {
		near(t, m.ID+" Lorenz number", m.K*m.Rho20/293.15, 2.27e-8, 0.03)
	}
}
