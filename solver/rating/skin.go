package rating

import "math"

// skin returns the skin effect factor y_s of IEC 60287-1-1 (clause 2.1.2, k_s = 1) for a d.c. resistance in Ω/m at working
// temperature and a frequency in Hz: R_ac = R_dc (1 + y_s). Beyond x_s = 2.8 the standard's further ranges are used; the last
// is its linear one. Proximity is left out.
func skin(ohm, hz float64) float64 {
	if hz <= 0 || ohm <= 0 {
		return 0
	}
	x2 := 8 * math.Pi * hz * 1e-7 / ohm
	x := math.Sqrt(x2)
	switch {
	case x <= 2.8:
		return x2 * x2 / (192 + 0.8*x2*x2)
	case x <= 3.8:
		return -0.136 - 0.0177*x + 0.0563*x2
	}
	return 0.354*x - 0.733
}

// resistance returns the resistance (Ω/m) of a conductor at t °C and the frequency of its load.
func (p *item) resistance(t float64) float64 {
	dc := p.wire.R20 * (1 + p.alpha*(t-20))
	if p.load == nil {
		return dc
	}
	return dc * (1 + skin(dc, p.load.FrequencyHz.V))
}

// heat returns what the part makes at t °C in W/m: I²R, a fixed heat, or nothing.
func (p *item) heat(t float64) float64 {
	if !p.metal || p.load == nil {
		return 0
	}
	if p.load.HeatWM.OK {
		return p.load.HeatWM.V
	}
	i := p.load.CurrentA.V
	return i * i * p.resistance(t)
}
