package fluid

import "math"

// Range of liquid water, K: from freezing to boiling at the pressure of the atmosphere.
const (
	WaterLowK  = 273.15
	WaterHighK = 373.15
)

// Water returns liquid water at t kelvin near the pressure of the atmosphere.
//
//   - density and expansion: Kell, Journal of Chemical and Engineering Data 20 (1975) 97, 0–150 °C
//   - viscosity and conductivity: IAPWS SR6-08 (2011), 253–383 K
//   - heat capacity: Popiel and Wojtkowiak, Heat Transfer Engineering 19 (1998) 87, 0–150 °C
//
// All three from memory. Beyond 0–150 °C the values of the nearer end are returned.
func Water(t float64) State {
	in := t >= WaterLowK && t <= WaterHighK
	c := math.Min(math.Max(t-273.15, 0), 150)
	rho, slope := kell(c)
	u := (c + 273.15) / 300
	return State{
		Density:      rho,
		Viscosity:    1e-6 * (280.68*math.Pow(u, -1.9) + 511.45*math.Pow(u, -7.7) + 61.131*math.Pow(u, -19.6) + 0.45903*math.Pow(u, -40)),
		Conductivity: 1.6630*math.Pow(u, -1.15) - 1.7781*math.Pow(u, -3.4) + 1.1567*math.Pow(u, -6) - 0.432115*math.Pow(u, -7.6),
		Cp:           waterCp(c),
		Expansion:    -slope / rho,
		InRange:      in,
	}
}

// kell returns the density of water (kg/m³) at c °C and its slope.
func kell(c float64) (rho, slope float64) {
	a := [...]float64{999.83952, 16.945176, -7.9870401e-3, -46.170461e-6, 105.56302e-9, -280.54253e-12}
	n, dn := 0.0, 0.0
	for i := len(a) - 1; i >= 0; i-- {
		dn = dn*c + n
		n = n*c + a[i]
	}
	const b = 16.879850e-3
	d := 1 + b*c
	return n / d, (dn - n*b/d) / d
}

func waterCp(c float64) float64 {
	s := math.Sqrt(c)
	return 1e3 * (4.2174356 + c*(-0.0056181625+s*(0.0012992528+s*(-0.00011535353+s*4.14964e-6))))
}
