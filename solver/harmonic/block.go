package harmonic

import "math"

// block couples two discs: for harmonic n of the first, cols[n] reals per row, one row for the real and one for the imaginary part, over the
// leading cols[n]/2 harmonics of the second. Real 2 × 2 entries merge the direct coupling and the wall's image.
type block struct {
	cols []uint16
	data []float64
}

// builder holds the scratch for writing blocks, and the store that they are cut from.
type builder struct {
	pi, pj []complex128 // scaled powers
	ai, aj []float64    // their sizes
	p, q   []complex128 // recursion of the image's Taylor coefficients
	image  []complex128 // [m][n]
	dw, iw []int        // widths of the rows: direct part, image
	line   []complex128 // one harmonic in the circle
	cols   []uint16     // a map to the circle before its size is known
	flat   []float64
	reals  []float64
	chunk  int
	widths []uint16
}

// write fills b with the coupling of discs i and j: direct unless they are the same, image if there is a circle. The image of a disc in
// itself is halved, for a product that counts both triangles.
func (w *builder) write(b *block, di, dj Disc, same bool, circle *Circle, cut float64) {
	mi := len(di.S)
	var rows, across, irows, icols int
	if !same {
		rows, across = w.direct(di, dj, over(1, apart(di, dj)), cut)
	}
	if circle != nil && circle.RhoInf != 0 {
		irows, icols = w.images(di, dj, circle, cut, same)
	}
	w.dw, w.iw = w.dw[:0], w.iw[:0]
	last, total := 0, 0
	for n := range max(rows, irows) {
		dw, iw := 0, 0
		if n < rows {
			dw = w.reach(n, across, cut)
		}
		if n < irows {
			for iw = icols; iw > 0 && small(w.image[(iw-1)*mi+n], cut); iw-- {
			}
		}
		w.dw, w.iw = append(w.dw, dw), append(w.iw, iw)
		if max(dw, iw) > 0 {
			last = n + 1
			total += 4 * max(dw, iw)
		}
	}
	w.room(b, last, total)
	at := 0
	for n := range last {
		b.cols[n] = uint16(2 * max(w.dw[n], w.iw[n]))
		w.row(b.data[at:], n, mi, w.dw[n], w.iw[n])
		at += 2 * int(b.cols[n])
	}
}

// Reals and widths are made many at once, first few and then more.
const (
	firstChunk = 1 << 11
	lastChunk  = 1 << 15
)

// room gives b space for rows and reals, its own if that is enough.
func (w *builder) room(b *block, rows, reals int) {
	if cap(b.cols) < rows {
		if len(w.widths) < rows {
			w.widths = make([]uint16, max(lastChunk/16, rows))
		}
		b.cols, w.widths = w.widths[:rows:rows], w.widths[rows:]
	}
	if cap(b.data) < reals {
		if len(w.reals) < reals {
			w.chunk = min(max(firstChunk, 2*w.chunk), lastChunk)
			w.reals = make([]float64, max(w.chunk, reals))
		}
		b.data, w.reals = w.reals[:reals:reals], w.reals[reals:]
	}
	b.cols, b.data = b.cols[:rows], b.data[:reals]
}

// row writes the two rows of harmonic n+1, dw harmonics wide for the direct part and iw for the image.
func (w *builder) row(to []float64, n, mi, dw, iw int) {
	width := 2 * max(dw, iw)
	r0, r1 := to[:width], to[width:][:width]
	if dw > 0 {
		t := table()[n][:dw]
		f := w.pi[n]
		for m, g := range w.pj[:dw] {
			p, q := t[m]*(real(f)*real(g)-imag(f)*imag(g)), t[m]*(real(f)*imag(g)+imag(f)*real(g))
			k := 2 * m
			r0[k], r0[k+1] = p, -q
			r1[k], r1[k+1] = -q, -p
		}
	}
	for k := 2 * dw; k < width; k++ {
		r0[k], r1[k] = 0, 0
	}
	for m := range iw {
		e := w.image[m*mi+n]
		p, q := real(e), imag(e)
		k := 2 * m
		r0[k] += p
		r0[k+1] += q
		r1[k] -= q
		r1[k+1] += p
	}
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
func (w *builder) images(di, dj Disc, circle *Circle, cut float64, same bool) (rows, cols int) {
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
	rho := circle.RhoInf
	if same {
		rho /= 2
	}
	for m := 1; m <= cols; m++ {
		q[0] = al * p[0]
		f := rho * dj.S[m-1] / roots[m-1]
		out := w.image[(m-1)*mi:][:rows]
		for n := 1; n <= rows; n++ {
			q[n] = al*p[n] + be*p[n-1] - de*q[n-1]
			out[n-1] = scale(f*di.S[n-1]*roots[n-1], q[n])
		}
		p, q = q, p
	}
	return rows, cols
}
