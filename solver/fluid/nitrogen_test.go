package fluid_test

import (
	"testing"

	"packrise/solver/fluid"
)

// TestNitrogen compares with Incropera and DeWitt, table A.4, whose densities are those of 1 bar (from memory).
func TestNitrogen(t *testing.T) {
	for _, c := range []struct{ k, rho, cp, mu, cond, pr float64 }{
		{200, 1.6883, 1043, 129.2e-7, 18.3e-3, 0.736},
		{300, 1.1233, 1041, 178.2e-7, 25.9e-3, 0.716},
		{400, 0.8425, 1045, 220.4e-7, 32.7e-3, 0.704},
		{500, 0.6739, 1056, 257.7e-7, 38.9e-3, 0.700},
	} {
		s := fluid.Nitrogen(c.k, 1e5)
		near(t, "density", s.Density, c.rho, 0.003)
		near(t, "heat capacity", s.Cp, c.cp, 0.005)
		near(t, "viscosity", s.Viscosity, c.mu, 0.015)
		near(t, "conductivity", s.Conductivity, c.cond, 0.025)
		near(t, "Prandtl number", s.Prandtl(), c.pr, 0.025)
	}
	if fluid.Nitrogen(1500, 1e5).InRange {
		t.Error("out of range is not told")
	}
}
