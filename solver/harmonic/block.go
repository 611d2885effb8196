package harmonic

import "math"

// block couples two discs: for harmonic n of the first, cols[n] reals per row, one row for the real and one for the imaginary part, over the
// leading cols[n]/2 harmonics of the second. Real 2 × 2 entries merge the direct coupling and the wall's image.
type block struct {
	cols []uint16
	data []float64
}

// apply adds B x_j to y_i and Bᵀ x_i to y_j.
func (b *block) apply(xi, xj, yi, yj []float64) {
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

// applySelf adds B x to y for a symmetric block of a disc with itself, whose upper part alone counts twice where it is cut.
func (b *block) applySelf(x, y []float64) {
	p := 0
	for n, c := range b.cols {
		w := int(c)
		r0 := b.data[p : p+w]
		r1 := b.data[p+w:][:w]
		p += 2 * w
		var a0, a1 float64
		for k, v := range x[:w] {
			a0 += r0[k] * v
			a1 += r1[k] * v
		}
		y[2*n] += a0
		y[2*n+1] += a1
	}
}

// builder holds the scratch for writing blocks.
type builder struct {
	pi, pj []complex128 // scaled powers
	ai, aj []float64    // their sizes
	p, q   []complex128 // recursion of the image's Taylor coefficients
	image  []complex128 // [m][n]
}

// write fills b with the coupling of discs i and j: direct unless they are the same, image if there is a circle.
func (w *builder) write(b *block, di, dj Disc, same bool, circle *Circle, cut float64) {
	mi := len(di.S)
	var rows, across int
	var step complex128
	if !same {
		d := apart(di, dj)
		step = over(1, d)
		rows, across = w.direct(di, dj, step, cut)
	}
	var irows, icols int
	if circle != nil && circle.RhoInf != 0 {
		irows, icols = w.images(di, dj, circle, cut)
	}
	b.cols = b.cols[:0]
	b.data = b.data[:0]
	for n := 0; n < mi && n < max(rows, irows); n++ {
		dw := 0
		if n < rows {
			dw = w.reach(n, across, cut)
		}
		iw := 0
		if n < irows {
			for iw = icols; iw > 0 && small(w.image[(iw-1)*mi+n], cut); iw-- {
			}
		}
		if same && n < irows {
			iw = icols // square, so that the block stays symmetric
		}
		w.row(b, n, mi, dw, iw)
	}
	for len(b.cols) > 0 && b.cols[len(b.cols)-1] == 0 {
		b.cols = b.cols[:len(b.cols)-1]
	}
}

// row appends the two rows of harmonic n, dw harmonics wide for the direct part and iw for the image.
func (w *builder) row(b *block, n, mi, dw, iw int) {
	width := max(dw, iw)
	b.cols = append(b.cols, uint16(2*width))
	at := len(b.data)
	b.data = grow(b.data, 4*width)
	r0 := b.data[at : at+2*width]
	r1 := b.data[at+2*width:][:2*width]
	if dw > 0 {
		t := table()[n][:dw]
		f := w.pi[n]
		for m, g := range w.pj[:dw] {
			e := f * g
			p, q := t[m]*real(e), t[m]*imag(e)
			r0[2*m], r0[2*m+1] = p, -q
			r1[2*m], r1[2*m+1] = -q, -p
		}
	}
	for k := 2 * dw; k < 2*width; k++ {
		r0[k], r1[k] = 0, 0
	}
	for m := range iw {
		e := w.image[m*mi+n]
		p, q := real(e), imag(e)
		r0[2*m] += p
		r0[2*m+1] += q
		r1[2*m] -= q
		r1[2*m+1] += p
	}
}

func grow(s []float64, n int) []float64 {
	if need := len(s) + n; need > cap(s) {
		t := make([]float64, len(s), need+need/2)
		copy(t, s)
		s = t
	}
	return s[:len(s)+n]
}

func small(z complex128, cut float64) bool {
	return math.Abs(real(z)) < cut && math.Abs(imag(z)) < cut
}

// direct prepares the scaled powers of the direct coupling and returns how many harmonics of each disc can exceed the cut.
func (w *builder) direct(di, dj Disc, step complex128, cut float64) (rows, cols int) {
	x, y := di.A*size(step), dj.A*size(step)
	rows = bounded(len(di.S), x/(1-y), cut)
	cols = bounded(len(dj.S), y/(1-x), cut)
	w.pi, w.ai = powers(w.pi[:0], w.ai[:0], scale(-di.A, step), di.S[:rows])
	w.pj, w.aj = powers(w.pj[:0], w.aj[:0], scale(dj.A, step), dj.S[:cols])
	return rows, cols
}

// reach returns how many harmonics of the second disc harmonic n+1 of the first reaches.
func (w *builder) reach(n, cols int, cut float64) int {
	t := table()[n]
	f := w.ai[n]
	m := cols
	for m > 0 && t[m-1]*f*w.aj[m-1] < cut {
		m--
	}
	return m
}

// bounded returns how many of m harmonics with ratio r can exceed the cut; the margin covers the root in the scaled coupling.
func bounded(m int, r, cut float64) int {
	if r >= 1 {
		return m
	}
	if r <= 0 {
		return 0
	}
	return min(m, 1+int(math.Log(cut/4)/math.Log(r)))
}

// powers appends s[n-1] z^n and its size for n = 1 … len(s).
func powers(dst []complex128, abs []float64, z complex128, s []float64) ([]complex128, []float64) {
	p := complex(1, 0)
	a, r := 1.0, size(z)
	for _, f := range s {
		p *= z
		a *= r
		dst = append(dst, scale(f, p))
		abs = append(abs, a*f)
	}
	return dst, abs
}

func size(z complex128) float64 { return math.Sqrt(real(z)*real(z) + imag(z)*imag(z)) }

// images writes ρ∞ √(n/m) s_n s_m p_n^(m) to w.image[m-1][n-1]: the image of harmonic m of disc j about disc i is ρ∞ conj(d_m) u^m, u =
// a_j z/(R² − conj(c_j) z), whose Taylor coefficients in (z−c_i)/a_i follow from those of u^(m−1).
func (w *builder) images(di, dj Disc, circle *Circle, cut float64) (rows, cols int) {
	mi := len(di.S)
	r2 := circle.R * circle.R
	cj := complex(real(dj.C), -imag(dj.C))
	gamma := complex(r2, 0) - cj*di.C
	inv := over(1, gamma)
	al := scale(dj.A, di.C) * inv
	be := scale(di.A*dj.A, inv)
	de := scale(-di.A, cj) * inv
	rows = bounded(mi, (size(de)+size(be))/(1-math.Min(size(al), 1)), cut)
	cols = bounded(len(dj.S), (size(al)+size(be))/(1-math.Min(size(de), 1)), cut)
	if rows == 0 || cols == 0 {
		return 0, 0
	}
	if len(w.image) < mi*cols {
		w.image = make([]complex128, mi*cols)
	}
	if len(w.p) < rows+1 {
		w.p, w.q = make([]complex128, 2*rows+1), make([]complex128, 2*rows+1)
	}
	p, q := w.p[:rows+1], w.q[:rows+1]
	for n := range p {
		p[n] = 0
	}
	p[0] = 1
	for m := 1; m <= cols; m++ {
		q[0] = al * p[0]
		f := circle.RhoInf * dj.S[m-1] / roots[m-1]
		out := w.image[(m-1)*mi:][:rows]
		for n := 1; n <= rows; n++ {
			q[n] = al*p[n] + be*p[n-1] - de*q[n-1]
			out[n-1] = scale(f*di.S[n-1]*roots[n-1], q[n])
		}
		p, q = q, p
	}
	return rows, cols
}
