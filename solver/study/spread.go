package study

import "math"

// DesignMarginK is kept below every limit where the person wrote no other margin. Common practice, no source.
const DesignMarginK = 10

// Spread is how uncertain one temperature is: P5 and P95 lie LowK below and HighK above it. StillK is the part of HighK that does not grow
// with the rise over the ambient (the ambient's own); LowStillK that of LowK.
type Spread struct {
	LowK, HighK       float64
	LowStillK, StillK float64
	AtRiseK           float64 // rise over the ambient at which it was found
}

// Upper is P95 of the temperature at another rise, in K above it. What grows does so with the rise: heats, conductivities and films err by
// shares.
func (s Spread) Upper(riseK float64) float64 { return grown(s.HighK, s.StillK, riseK, s.AtRiseK) }

// Lower is P5, in K below it.
func (s Spread) Lower(riseK float64) float64 { return grown(s.LowK, s.LowStillK, riseK, s.AtRiseK) }

func grown(whole, still, rise, at float64) float64 {
	if at <= 0 || rise < 0 {
		return whole
	}
	grows := math.Sqrt(math.Max(0, whole*whole-still*still))
	return math.Hypot(still, grows*rise/at)
}

// rely judges by what may be relied on: P95 within the limit, and the design margin kept below it, whichever is lower. spreads belong to the
// things of a result, in its order; nil spreads leave the margin alone.
func rely(spreads []Spread, ambientC, marginK float64) judge {
	return func(i int, t thing) float64 {
		room := t.limit.V - t.tempC
		up := marginK
		if i < len(spreads) {
			up = math.Max(up, spreads[i].Upper(t.tempC-ambientC))
		}
		return room - up
	}
}
