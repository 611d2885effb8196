package fluid

import "math"

// AirConductivity returns the thermal conductivity of dry air (W/mK) at t kelvin, independent of pressure near the atmosphere's:
// U.S. Standard Atmosphere 1976, equation 53.
func AirConductivity(t float64) float64 {
	return 2.64638e-3 * math.Pow(t, 1.5) / (t + 245.4*math.Pow(10, -12/t))
}
