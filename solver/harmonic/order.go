package harmonic

import "math"

// Scale returns the length over which the field near a contact varies: the gap gap (m, 0 for touching) between two surfaces of
// combined radius reff in a medium of conductivity k. y(x) is the conductivity that the pair shows to fields of length x: the harmonic mean
// of both sides, so that metal on one side counts like a mirror. The field then lives on reff·k/y, or on √(2 reff gap) if
// that is longer.
func Scale(reff, gap, k float64, y func(x float64) float64) float64 {
	open := math.Sqrt(2 * reff * math.Max(gap, 0))
	x := reff * math.Min(k/y(reff), 1.5)
	for range 4 {
		x = math.Sqrt(x * reff * math.Min(k/y(x), 1.5))
	}
	return math.Max(open, x)
}

// Order returns the highest harmonic of a disc of radius a beside a contact of length x: ⌈c a/x⌉ between low and high.
func Order(c, a, x float64, low, high int) int {
	m := c * a / x
	if !(m < float64(high)) {
		return high
	}
	return max(low, int(math.Ceil(m)))
}
