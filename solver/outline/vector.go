package outline

// Short vectors: the library's assembly costs an allocation of everything it is given and gains nothing at these lengths.

// dot is Σ x_i y_i over the length of x.
func dot(x, y []float64) float64 {
	var s, t float64
	y = y[:len(x)]
	for len(x) >= 2 {
		s += x[0] * y[0]
		t += x[1] * y[1]
		x, y = x[2:], y[2:]
	}
	if len(x) > 0 {
		s += x[0] * y[0]
	}
	return s + t
}

// addScaled adds c x to dst over the length of x.
func addScaled(dst []float64, c float64, x []float64) {
	dst = dst[:len(x)]
	for i, v := range x {
		dst[i] += c * v
	}
}
