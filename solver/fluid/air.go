package fluid

import "math"

// Range of the gases, K. The formulas are compared with tables from 200 to 1000 K.
const (
	GasLowK  = 200
	GasHighK = 1000
)

const (
	molarR   = 8.31432   // J/molK, U.S. Standard Atmosphere 1976, table 2
	molarAir = 0.0289644 // kg/mol, same
)

// AirConductivity returns the thermal conductivity of dry air (W/mK) at t kelvin, independent of pressure near the atmosphere's:
// U.S. Standard Atmosphere 1976, equation 53.
func AirConductivity(t float64) float64 {
	return 2.64638e-3 * math.Pow(t, 1.5) / (t + 245.4*math.Pow(10, -12/t))
}

// AirViscosity returns the dynamic viscosity of dry air (Pa·s) at t kelvin, independent of pressure: U.S. Standard Atmosphere 1976,
// equation 51.
func AirViscosity(t float64) float64 { return 1.458e-6 * math.Pow(t, 1.5) / (t + 110.4) }

// Air returns dry air at t kelvin and p pascal, an ideal gas: up to some bar it is one within 0.1 %.
func Air(t, p float64) State {
	r := molarR / molarAir
	return State{
		Density:      p / (r * t),
		Viscosity:    AirViscosity(t),
		Conductivity: AirConductivity(t),
		Cp:           diatomicCp(r, 3055, t), // NACA report 1135 (1953), equation 180: one vibration temperature for air, 5500 °R
		Expansion:    1 / t,
		InRange:      t >= GasLowK && t <= GasHighK,
	}
}

// diatomicCp is the heat capacity (J/kgK) of a gas of two-atom molecules that vibrate at the temperature v: 7/2 R and Einstein's
// function.
func diatomicCp(r, v, t float64) float64 {
	x := v / t
	s := x / (2 * math.Sinh(x/2))
	return r * (3.5 + s*s)
}
