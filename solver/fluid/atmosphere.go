package fluid

import "math"

// Atmosphere is the standard pressure at sea level, Pa.
const Atmosphere = 101325

// Range of StandardPressure, m of pressure altitude. Above, the air in gaps of tenths of a millimetre no longer conducts like a continuum.
const (
	AltitudeLowM  = -1000
	AltitudeHighM = 30000
)

// StandardPressure returns the pressure (Pa) at a pressure altitude (geopotential, m) and whether that is inside the range: ISO 2533
// and U.S. Standard Atmosphere 1976, equations 33a and 33b with table 4.
func StandardPressure(altitudeM float64) (pa float64, inRange bool) {
	const g = 9.80665
	const gMR = g * molarAir / molarR // K/m
	inRange = altitudeM >= AltitudeLowM && altitudeM <= AltitudeHighM
	h := math.Min(math.Max(altitudeM, -5000), 47000)
	p, t, base := float64(Atmosphere), 288.15, 0.0
	for _, l := range []struct{ top, lapse float64 }{{11000, -0.0065}, {20000, 0}, {32000, 0.001}, {47000, 0.0028}} {
		dh := math.Min(h, l.top) - base
		if l.lapse == 0 {
			p *= math.Exp(-gMR * dh / t)
		} else {
			p *= math.Pow(t/(t+l.lapse*dh), gMR/l.lapse)
		}
		t += l.lapse * dh
		base = l.top
		if h <= l.top {
			break
		}
	}
	return p, inRange
}
