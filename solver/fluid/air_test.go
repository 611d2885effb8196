package fluid_test

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"testing"

	"packrise/solver/fluid"
)

// TestAirConductivity compares with Çengel, Heat Transfer, table A-15 (testdata/reference/air.csv), which is the lowest of the
// handbooks, within 2.7 %, and with Incropera, table A.4 (from memory), within 1 %.
func TestAirConductivity(t *testing.T) {
	f, err := os.Open("../../testdata/reference/air.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	for _, row := range rows[1:] {
		c, err1 := strconv.ParseFloat(row[0], 64)
		k, err2 := strconv.ParseFloat(row[3], 64)
		if err1 != nil || err2 != nil {
			t.Fatalf("row %v", row)
		}
		if got := fluid.AirConductivity(c + 273.15); math.Abs(got/k-1) > 0.027 {
			t.Errorf("%g °C: %.5f W/mK, table %.5f", c, got, k)
		}
	}
	for kelvin, k := range map[float64]float64{300: 0.0263, 350: 0.0300, 400: 0.0338} {
		if got := fluid.AirConductivity(kelvin); math.Abs(got/k-1) > 0.01 {
			t.Errorf("%g K: %.5f W/mK, table %.5f", kelvin, got, k)
		}
	}
}
