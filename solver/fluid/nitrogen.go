package fluid

import "math"

const molarNitrogen = 0.02801348 // kg/mol

// Nitrogen returns nitrogen at t kelvin and p pascal, an ideal gas. Viscosity and conductivity are the dilute gas's of Lemmon and
// Jacobsen, International Journal of Thermophysics 25 (2004) 21 (from memory; within 2 %).
func Nitrogen(t, p float64) State {
	r := molarR / molarNitrogen
	mu := nitrogenViscosity(t)
	tau := 126.192 / t
	k := 1.511*mu*1e6 + 2.117/tau - 3.332*math.Pow(tau, -0.7) // mW/mK, equation 5
	return State{
		Density:      p / (r * t),
		Viscosity:    mu,
		Conductivity: k * 1e-3,
		Cp:           diatomicCp(r, 3390, t), // characteristic vibration temperature of N₂, textbook of statistical mechanics, from memory
		Expansion:    1 / t,
		InRange:      t >= GasLowK && t <= GasHighK,
	}
}

// nitrogenViscosity is the collision integral form of the same paper, equations 2 and 3.
func nitrogenViscosity(t float64) float64 {
	l := math.Log(t / 98.94)
	omega := math.Exp(0.431 + l*(-0.4623+l*(0.08406+l*(0.005341-0.00331*l))))
	return 0.0266958 * math.Sqrt(28.01348*t) / (0.3656 * 0.3656 * omega) * 1e-6
}
