package film

import "math"

// Surface returns the temperature at which a face gives off fluxWM2, and the film there. The flux rises with the temperature, so there is one
// answer; below 1 K and above 1e5 K the nearer of these is returned.
func (o Outside) Surface(f Face, fluxWM2 float64) (surfaceK float64, a Answer) {
	const low, high = 1, 1e5
	miss := func(t float64) float64 { return o.Film(f, t).Flux(t) - fluxWM2 }
	x0 := math.Min(math.Max(o.AmbientK, low), high)
	f0 := miss(x0)
	x1, f1 := x0, f0
	for step := 5.0; f0*f1 > 0 && x1 > low && x1 < high; step *= 2 {
		x0, f0 = x1, f1
		x1 = math.Min(math.Max(x1-math.Copysign(step, f1), low), high)
		f1 = miss(x1)
	}
	if f0*f1 > 0 {
		return x1, o.Film(f, x1)
	}
	t := illinois(miss, x0, f0, x1, f1)
	return t, o.Film(f, t)
}

// illinois is the method of false position with the Illinois step (M. Dowell and P. Jarratt, BIT 11 (1971) 168) to a nanokelvin.
func illinois(miss func(float64) float64, x0, f0, x1, f1 float64) float64 {
	for range 100 {
		if f1 == 0 || math.Abs(x1-x0) < 1e-9 {
			return x1
		}
		if f0 == 0 {
			return x0
		}
		x := x1 - f1*(x1-x0)/(f1-f0)
		y := miss(x)
		if y*f1 < 0 {
			x0, f0 = x1, f1
		} else {
			f0 /= 2
		}
		if math.Abs(x-x1) < 1e-10 {
			return x
		}
		x1, f1 = x, y
	}
	return x1
}
