package fluid_test

import (
	"math"
	"testing"

	"packrise/solver/fluid"
)

// TestStandardPressure compares with the printed tables of U.S. Standard Atmosphere 1976 (geopotential altitude; from memory) and with the
// ratios of the standard atmosphere (from memory) for the altitudes of AC 43.13-1B.
func TestStandardPressure(t *testing.T) {
	for _, c := range []struct{ m, pa, tol float64 }{
		{0, 101325, 1e-12},
		{-1000, 113929, 2e-4},
		{1000, 89874.6, 1e-5},
		{5000, 54019.9, 1e-5},
		{11000, 22632.1, 1e-5},
		{20000, 5474.89, 1e-5},
		{30000, 1171.87, 1e-4},
		{32000, 868.019, 1e-5},
		{47000, 110.906, 1e-4},
		{20000 * 0.3048, 0.4595 * 101325, 2e-4},
		{40000 * 0.3048, 0.1851 * 101325, 2e-4},
		{60000 * 0.3048, 0.0708 * 101325, 5e-4},
	} {
		p, _ := fluid.StandardPressure(c.m)
		near(t, "pressure", p, c.pa, c.tol)
	}
	last := math.Inf(1)
	for m := -2000.0; m < 50000; m += 250 {
		p, in := fluid.StandardPressure(m)
		if p > last || (p == last && m <= 47000) {
			t.Errorf("pressure does not fall at %g m", m)
		}
		if in != (m >= fluid.AltitudeLowM && m <= fluid.AltitudeHighM) {
			t.Errorf("%g m: in range %v", m, in)
		}
		last = p
	}
}
