package harmonic

import "math"

// Scale returns the length over which the field near a contact varies: the gap gap (m, 0 for touching) between two surfaces of
// combined radius reff in a medium of conductivity k. y(x) is the conductivity that the pair shows to fields of length x, the harmonic mean
// of both sides, so that metal on one side counts like a mirror; skin that of the outermost layers alone.
//
// Touching, the field lives on reff·k/y; across a gap, on √(2 reff gap). Where the medium conducts better than the discs the flow squeezes round
// the contact instead, on the mirrored ratio. The more heat crosses near the point of contact, the more of the short lengths count: up to 2.2 times
// where metal lies bare or thinly covered. The factors are fitted to two wires and to a wire at a wall, gaps of 0 to 1 mm.
func Scale(reff, gap, k, skin float64, y func(x float64) float64) float64 {
	x := reff * contrast(k/y(reff))
	for range 4 {
		x = math.Sqrt(x * reff * contrast(k/y(x)))
	}
	touching := x
	if m := y(x); m > skin {
		touching /= 1 + 1.2*(1-skin/m)
	}
	open := math.Sqrt(2 * reff * math.Max(gap, 0))
	if open > x {
		open /= 1.4 + 0.8*(1-x/open)
	}
	return math.Max(open, touching)
}

// contrast is the ratio that counts: no more than 1.5, and mirrored beyond.
func contrast(r float64) float64 {
	if r > 1.5 {
		return 1.5 * 1.5 / r
	}
	return r
}

// Order returns the highest harmonic of a disc of radius a beside a contact of length x: ⌈c a/x⌉ between low and high.
func Order(c, a, x float64, low, high int) int {
	m := c * a / x
	if !(m < float64(high)) {
		return high
	}
	return max(low, int(math.Ceil(m)))
}
