package fluid_test

import (
	"math"
	"testing"

	"packrise/solver/fluid"
)

// TestWater compares with Çengel, Heat Transfer, table A-9, saturated liquid (from memory).
func TestWater(t *testing.T) {
	for _, c := range []struct{ c, rho, cp, k, mu, pr, beta float64 }{
		{0.01, 999.8, 4217, 0.561, 1.792e-3, 13.5, -0.068e-3},
		{10, 999.7, 4194, 0.580, 1.307e-3, 9.45, 0.0733e-3},
		{20, 998.0, 4182, 0.598, 1.002e-3, 7.01, 0.195e-3},
		{40, 992.1, 4179, 0.631, 0.653e-3, 4.32, 0.377e-3},
		{60, 983.3, 4185, 0.654, 0.467e-3, 2.99, 0.517e-3},
		{80, 971.8, 4197, 0.670, 0.355e-3, 2.22, 0.653e-3},
		{100, 957.9, 4217, 0.679, 0.282e-3, 1.75, 0.750e-3},
	} {
		s := fluid.Water(c.c + 273.15)
		if !s.InRange {
			t.Errorf("%g °C is out of range", c.c)
		}
		near(t, "density", s.Density, c.rho, 0.001)
		near(t, "heat capacity", s.Cp, c.cp, 0.002)
		near(t, "conductivity", s.Conductivity, c.k, 0.01) // the table is older than the formula: 0.561 against 0.556 W/mK at 0 °C
		near(t, "viscosity", s.Viscosity, c.mu, 0.005)
		near(t, "Prandtl number", s.Prandtl(), c.pr, 0.01)
		if math.Abs(s.Expansion-c.beta) > 0.02e-3 {
			t.Errorf("%g °C: expansion %.4g, table %.4g", c.c, s.Expansion, c.beta)
		}
	}
}

// TestWaterDensest: water is densest at 3.98 °C (any handbook).
func TestWaterDensest(t *testing.T) {
	if below, above := fluid.Water(273.15+3.9).Expansion, fluid.Water(273.15+4.1).Expansion; below >= 0 || above <= 0 {
		t.Errorf("expansion %g at 3.9 °C, %g at 4.1 °C", below, above)
	}
}

func TestWaterBeyond(t *testing.T) {
	for _, k := range []float64{1, 200, 272, 374, 600, 4000} {
		s := fluid.Water(k)
		if s.InRange {
			t.Errorf("%g K counts as inside the range", k)
		}
		for _, v := range []float64{s.Density, s.Viscosity, s.Conductivity, s.Cp} {
			if !(v > 0) || math.IsInf(v, 0) {
				t.Errorf("%g K: %+v", k, s)
			}
		}
	}
}
