package fluid_test

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"testing"

	"packrise/solver/fluid"
)

// near fails unless got is within tol (relative) of want.
func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got/want-1) <= tol) {
		t.Errorf("%s: %.6g, want %.6g within %g %%, is %+.3f %% off", what, got, want, 100*tol, 100*(got/want-1))
	}
}

// TestAirTable compares with Çengel, Heat Transfer, table A-15 (testdata/reference/air.csv): its conductivity is the lowest of the
// handbooks, within 2.7 %, and its Prandtl number therefore the highest.
func TestAirTable(t *testing.T) {
	f, err := os.Open("../../testdata/reference/air.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	if len(rows) < 10 {
		t.Fatalf("only %d rows", len(rows))
	}
	for _, row := range rows[1:] {
		var v [6]float64 // T_C, rho, cp, k, nu, Pr
		for i := range v {
			if v[i], err = strconv.ParseFloat(row[i], 64); err != nil {
				t.Fatal(row)
			}
		}
		s := fluid.Air(v[0]+273.15, fluid.Atmosphere)
		if !s.InRange {
			t.Errorf("%g °C is out of range", v[0])
		}
		near(t, row[0]+" °C density", s.Density, v[1], 0.001)
		near(t, row[0]+" °C heat capacity", s.Cp, v[2], 0.003)
		near(t, row[0]+" °C conductivity", s.Conductivity, v[3], 0.027)
		near(t, row[0]+" °C kinematic viscosity", s.Kinematic(), v[4], 0.01)
		near(t, row[0]+" °C Prandtl number", s.Prandtl(), v[5], 0.035)
	}
}

// TestAirHandbook compares with Incropera and DeWitt, Fundamentals of Heat and Mass Transfer, table A.4, whose densities are those of 1 bar (from memory):
// a second handbook whose conductivity is on the other side of Çengel's.
func TestAirHandbook(t *testing.T) {
	for _, c := range []struct{ k, rho, cp, mu, cond, pr, tol float64 }{
		{200, 1.7458, 1007, 132.5e-7, 18.1e-3, 0.737, 0.015},
		{250, 1.3947, 1006, 159.6e-7, 22.3e-3, 0.720, 0.015},
		{300, 1.1614, 1007, 184.6e-7, 26.3e-3, 0.707, 0.015},
		{350, 0.9950, 1009, 208.2e-7, 30.0e-3, 0.700, 0.015},
		{400, 0.8711, 1014, 230.1e-7, 33.8e-3, 0.690, 0.015},
		{500, 0.6964, 1030, 270.1e-7, 40.7e-3, 0.684, 0.015},
		{1000, 0.3482, 1141, 424.4e-7, 66.7e-3, 0.726, 0.04},
	} {
		s := fluid.Air(c.k, 1e5)
		near(t, "density", s.Density, c.rho, 0.003) // a real gas at 200 K
		near(t, "heat capacity", s.Cp, c.cp, 0.006)
		near(t, "viscosity", s.Viscosity, c.mu, 0.025)
		near(t, "conductivity", s.Conductivity, c.cond, 0.015)
		near(t, "Prandtl number", s.Prandtl(), c.pr, c.tol)
		near(t, "expansion", s.Expansion, 1/c.k, 1e-12)
	}
	if half := fluid.Air(300, 50662.5); math.Abs(half.Kinematic()/fluid.Air(300, 101325).Kinematic()-2) > 1e-9 {
		t.Error("half the pressure does not double the kinematic viscosity")
	}
	if fluid.Air(150, 1e5).InRange || fluid.Air(1100, 1e5).InRange {
		t.Error("out of range is not told")
	}
}
