package film

import "math"

// Soil returns the thermal resistance (K·m/W) from a buried cylinder to the surface of the ground: IEC 60287-2-1, single isolated buried
// cable, ln(u + √(u² − 1)) with u = 2·depth/diameter. The depth is that of the axis; it must be more than the radius.
func Soil(depthM, diameterM, soilWMK float64) float64 {
	u := math.Max(2*depthM/diameterM, 1+1e-9)
	return math.Log(u+math.Sqrt(u*u-1)) / (2 * math.Pi * soilWMK)
}

// equivalentBuried is the diameter of the cylinder that stands for a buried rectangle: J. H. Neher and M. H. McGrath, AIEE Transactions 76
// (1957) 752, as in IEC 60287-2-1 for duct banks, from memory; for sides up to 3 to 1.
func equivalentBuried(w, h float64) (d float64, inRange bool) {
	x, y := math.Min(w, h), math.Max(w, h)
	r := x / 2 * math.Exp(x/(2*y)*(4/math.Pi-x/y)*math.Log(1+y*y/(x*x)))
	return 2 * r, y <= 3*x
}

// dryingK is the surface temperature above which moisture leaves most soils: about 50 °C, IEC 60287-1-1 (partial drying-out), from memory.
const dryingK = 50 + 273.15
