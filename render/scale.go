package render

import "math"

// Scale maps temperature to colour: from Low to High °C.
type Scale struct{ Low, High float64 }

// at returns where t lies between Low (0) and High (1), not clamped.
func (sc Scale) at(t float64) float64 { return (t - sc.Low) / (sc.High - sc.Low) }

// leastSpanK is the shortest automatic scale, so that a section of tenths of a kelvin does not look like a fire.
const leastSpanK = 10

// fieldSlackK is how far a side's own temperature may be missed without the scale reaching for the next round number.
const fieldSlackK = 0.02

// ScaleOf returns the automatic scale of a scene: ambient, or what the outside has below it, to the hottest reading or nearby limit, at
// round numbers.
func ScaleOf(s Scene) Scale {
	low, high := s.AmbientC, s.AmbientC
	for _, r := range s.Readings {
		if finite(r.TempC) {
			low, high = min(low, r.TempC), max(high, r.TempC)
		}
	}
	if !finite(low) || !finite(high) {
		return Scale{0, 100}
	}
	low = min(low, lastColdest.of(s)+fieldSlackK)
	top := high
	for _, r := range s.Readings {
		near := max(10, 0.35*(high-low))
		if r.Governs {
			near = max(15, 0.75*(high-low))
		}
		if r.LimitC.OK && r.LimitC.V <= high+near {
			top = max(top, r.LimitC.V)
		}
	}
	step := roundStep((top-low)/6) / 2
	sc := Scale{math.Floor(low/step+1e-9) * step, math.Ceil(top/step-1e-9) * step}
	if sc.High-sc.Low < leastSpanK {
		sc.High = sc.Low + leastSpanK
	}
	return sc
}

// roundStep returns the smallest of 1, 2, 5 × a power of ten that is not below x (x > 0); at least 1e-6.
func roundStep(x float64) float64 {
	if !(x > 1e-6) {
		return 1
	}
	p := math.Pow(10, math.Floor(math.Log10(x)))
	for _, m := range []float64{1, 2, 5} {
		if x <= m*p*(1+1e-9) {
			return m * p
		}
	}
	return 10 * p
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// levels returns the multiples of step within [low, high].
func levels(low, high, step float64) []float64 {
	var out []float64
	for i := math.Ceil(low/step - 1e-9); i*step <= high+1e-9*step; i++ {
		out = append(out, i*step)
		if len(out) > 200 {
			break
		}
	}
	return out
}
