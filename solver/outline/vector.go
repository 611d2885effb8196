package outline

// Short vectors: the library's assembly costs an allocation of everything it is given and gains nothing at these lengths.

// dot is Σ x_i y_i over the length of x.
func dot(x, y []float64) (s float64) {
	y = y[:len(x)]
	for i, v := range x {
		s += v * y[i]
	}
	return s
}

// addScaled adds c x to dst over the length of x.
func addScaled(dst []float64, c float64, x []float64) {
	dst = dst[:len(x)]
	for i, v := range x {
		dst[i] += c * v
	}
}

// addProduct adds to y the product of the matrix in a, one row of cols for each mode of a panel, and v, which may be shorter.
func addProduct(y, a []float64, cols int, v []float64) {
	n := min(cols, len(v))
	v = v[:n]
	r0, r1, r2, r3, r4 := a[:n], a[cols:][:n], a[2*cols:][:n], a[3*cols:][:n], a[4*cols:][:n]
	var s0, s1, s2, s3, s4 float64
	for i, x := range v {
		s0 += r0[i] * x
		s1 += r1[i] * x
		s2 += r2[i] * x
		s3 += r3[i] * x
		s4 += r4[i] * x
	}
	y = y[:modes]
	y[0] += s0
	y[1] += s1
	y[2] += s2
	y[3] += s3
	y[4] += s4
}

// addTransposed adds to v the product of the transposed matrix and y.
func addTransposed(v, a []float64, cols int, y []float64) {
	y = y[:modes]
	y0, y1, y2, y3, y4 := y[0], y[1], y[2], y[3], y[4]
	v = v[:cols]
	r0, r1, r2, r3, r4 := a[:cols], a[cols:][:cols], a[2*cols:][:cols], a[3*cols:][:cols], a[4*cols:][:cols]
	for i := range v {
		v[i] += y0*r0[i] + y1*r1[i] + y2*r2[i] + y3*r3[i] + y4*r4[i]
	}
}

// The two products above are written out for five modes.
var _ = [1]struct{}{}[modes-5]
