package quantity

import "math"

// BesideLimit rounds a temperature (°C) for people beside its limit: to the nearest whole kelvin, but to a tenth away from the limit where
// whole kelvins would carry it onto or across the limit, so that 90.04 at a limit of 90 reads 90.1 and 89.96 reads 89.9. Without a
// limit (NaN) it is the nearest whole kelvin. A margin for people is the limit less this value, so that the two agree.
func BesideLimit(t, limit float64) float64 {
	near := math.Round(t)
	switch {
	case math.IsNaN(limit) || t == limit || (near != limit && (t > limit) == (near > limit)):
		return near
	case t > limit:
		return math.Ceil(t*10) / 10
	}
	return math.Floor(t*10) / 10
}
