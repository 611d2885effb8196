package harmonic

// applyPlain adds B x_j to y_i and Bᵀ x_i to y_j. The two may be the same disc: its block then holds half of its symmetric coupling.
func (b *block) applyPlain(xi, xj, yi, yj []float64) {
	p := 0
	for n, c := range b.cols {
		w := int(c)
		r0 := b.data[p : p+w]
		r1 := b.data[p+w:][:w]
		p += 2 * w
		x, y := xj[:w], yj[:w]
		u0, u1 := xi[2*n], xi[2*n+1]
		var a0, a1 float64
		for k, e0 := range r0 {
			e1 := r1[k]
			a0 += e0 * x[k]
			a1 += e1 * x[k]
			y[k] += e0*u0 + e1*u1
		}
		yi[2*n] += a0
		yi[2*n+1] += a1
	}
}

// many is the number of vectors that apply8 takes at once: element k of vector v is at many·k + v.
const many = 8

// apply8Plain is applyPlain for many vectors.
func (b *block) apply8Plain(xi, xj, yi, yj []float64) {
	p := 0
	for n, c := range b.cols {
		w := int(c)
		r0 := b.data[p : p+w]
		r1 := b.data[p+w:][:w]
		p += 2 * w
		u, v := (*[many]float64)(xi[2*n*many:]), (*[many]float64)(xi[(2*n+1)*many:])
		var a0, a1 [many]float64
		for k, e := range r0 {
			f := r1[k]
			x, y := (*[many]float64)(xj[k*many:]), (*[many]float64)(yj[k*many:])
			for s := range many {
				a0[s] += e * x[s]
				a1[s] += f * x[s]
				y[s] += e*u[s] + f*v[s]
			}
		}
		y0, y1 := (*[many]float64)(yi[2*n*many:]), (*[many]float64)(yi[(2*n+1)*many:])
		for s := range many {
			y0[s] += a0[s]
			y1[s] += a1[s]
		}
	}
}

func dotPlain(a, b []float64) float64 {
	s := 0.0
	b = b[:len(a)]
	for i, v := range a {
		s += v * b[i]
	}
	return s
}

func axpyPlain(y []float64, f float64, x []float64) {
	y = y[:len(x)]
	for i, v := range x {
		y[i] += f * v
	}
}
