package render

import "math"

// spread moves the middles of intervals of the given heights as little as possible (least sum of squares) so that they follow
// each other in the given order without overlap inside [lo, hi]: isotonic regression by pooling neighbours that collide. The
// wanted middles must rise. Where they do not fit at all they are squeezed evenly.
func spread(want, height []float64, lo, hi float64) []float64 {
	n := len(want)
	out := make([]float64, n)
	if n == 0 {
		return out
	}
	// middle of i = z + offset[i]: with offsets taken off, "no overlap" is "does not fall"
	offset := make([]float64, n)
	for i := 1; i < n; i++ {
		offset[i] = offset[i-1] + (height[i-1]+height[i])/2
	}
	top, bottom := lo+height[0]/2, hi-height[n-1]/2-offset[n-1]
	if bottom < top {
		squeeze(out, offset, top, hi-height[n-1]/2)
		return out
	}
	type pool struct {
		sum float64
		n   int
	}
	var pools []pool
	mean := func(p pool) float64 { return p.sum / float64(p.n) }
	for i := range want {
		p := pool{want[i] - offset[i], 1}
		for len(pools) > 0 && mean(pools[len(pools)-1]) >= mean(p) {
			q := pools[len(pools)-1]
			pools = pools[:len(pools)-1]
			p = pool{p.sum + q.sum, p.n + q.n}
		}
		pools = append(pools, p)
	}
	i := 0
	for _, p := range pools {
		z := math.Max(top, math.Min(bottom, mean(p)))
		for range p.n {
			out[i] = z + offset[i]
			i++
		}
	}
	return out
}

// squeeze puts the middles between top and bottom with the offsets scaled down to fit.
func squeeze(out, offset []float64, top, bottom float64) {
	f := 0.0
	if all := offset[len(offset)-1]; all > 0 {
		f = max(0, bottom-top) / all
	}
	for i := range out {
		out[i] = top + f*offset[i]
	}
}
