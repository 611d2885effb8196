package pack

import "math"

// skyline is a symmetric positive definite matrix, kept by rows from each row's first entry to the diagonal. Its Cholesky factor fills the same
// places (A. George and J. W. H. Liu, "Computer Solution of Large Sparse Positive Definite Systems", 1981, the envelope method).
type skyline struct {
	first []int // column of the first entry in each row
	start []int // of each row in v, so that entry (i, j) is v[start[i]+j-first[i]]
	v     []float64
}

// shape sets the first columns and clears the entries.
func (m *skyline) shape(first []int) {
	n := len(first)
	m.first = append(m.first[:0], first...)
	m.start = append(m.start[:0], 0)
	for i := range n {
		m.start = append(m.start, m.start[i]+i-first[i]+1)
	}
	if size := m.start[n]; cap(m.v) < size {
		m.v = make([]float64, size)
	} else {
		m.v = m.v[:size]
	}
	clear(m.v)
}

func (m *skyline) clear() { clear(m.v) }

// add adds x to entry (i, j), j ≤ i, which must be inside the shape.
func (m *skyline) add(i, j int, x float64) { m.v[m.start[i]+j-m.first[i]] += x }

// factor overwrites the matrix with its Cholesky factor, two rows at a time: rows 2k and 2k+1 are one disc's and begin in the same column. An odd last
// row stands alone. A pivot that rounding made too small is replaced by a huge one, which freezes that unknown.
func (m *skyline) factor(floor float64) {
	n := len(m.first)
	for i := 0; i+1 < n; i += 2 {
		fi := m.first[i]
		p, q := m.v[m.start[i]:m.start[i+1]], m.v[m.start[i+1]:m.start[i+2]]
		for j := fi; j < i; j += 2 {
			m.eliminate(p, q, fi, j)
		}
		w := i - fi
		pp, pq, qq := norms(p[:w], q[:w])
		p[w] = pivot(p[w]-pp, floor)
		q[w] = (q[w] - pq) / p[w]
		q[w+1] = pivot(q[w+1]-qq-q[w]*q[w], floor)
	}
	if n%2 == 1 {
		m.last(floor)
	}
}

// eliminate finds the entries of the two rows p and q, which begin in column fi, in columns j and j+1.
func (m *skyline) eliminate(p, q []float64, fi, j int) {
	fj := m.first[j]
	s, t := m.v[m.start[j]:m.start[j+1]], m.v[m.start[j+1]:m.start[j+2]]
	lo, k, w := max(fi, fj), j-fi, j-fj
	ps, pt, qs, qt := dots(p[lo-fi:k], q[lo-fi:k], s[lo-fj:w], t[lo-fj:w])
	p[k] = (p[k] - ps) / s[w]
	q[k] = (q[k] - qs) / s[w]
	p[k+1] = (p[k+1] - pt - p[k]*t[w]) / t[w+1]
	q[k+1] = (q[k+1] - qt - q[k]*t[w]) / t[w+1]
}

// last factors the odd last row.
func (m *skyline) last(floor float64) {
	i := len(m.first) - 1
	fi := m.first[i]
	row := m.v[m.start[i]:m.start[i+1]]
	for j := fi; j < i; j++ {
		fj := m.first[j]
		other := m.v[m.start[j]:m.start[j+1]]
		lo := max(fi, fj)
		row[j-fi] = (row[j-fi] - dot(row[lo-fi:j-fi], other[lo-fj:j-fj])) / other[j-fj]
	}
	row[i-fi] = pivot(row[i-fi]-dot(row[:i-fi], row[:i-fi]), floor)
}

func pivot(d, floor float64) float64 {
	if !(d > floor) {
		d = 1e60
	}
	return math.Sqrt(d)
}

// solve replaces b by the solution, after factor.
func (m *skyline) solve(b []float64) {
	for i, fi := range m.first {
		row := m.v[m.start[i]:m.start[i+1]]
		b[i] = (b[i] - dot(row[:i-fi], b[fi:i])) / row[i-fi]
	}
	for i := len(b) - 1; i >= 0; i-- {
		fi := m.first[i]
		row := m.v[m.start[i]:m.start[i+1]]
		b[i] /= row[i-fi]
		for k, l := range row[:i-fi] {
			b[fi+k] -= l * b[i]
		}
	}
}

// dot is written in four chains because the additions of one must wait for each other.
func dot(a, b []float64) float64 {
	var s0, s1, s2, s3 float64
	b = b[:len(a)]
	for len(a) >= 4 {
		s0 += a[0] * b[0]
		s1 += a[1] * b[1]
		s2 += a[2] * b[2]
		s3 += a[3] * b[3]
		a, b = a[4:], b[4:]
	}
	for i, x := range a {
		s0 += x * b[i]
	}
	return s0 + s1 + s2 + s3
}

// dots are the four products of two rows with two rows, which reads each number once for two of them.
func dots(p, q, s, t []float64) (ps, pt, qs, qt float64) {
	q, s, t = q[:len(p)], s[:len(p)], t[:len(p)]
	for i, x := range p {
		y, u, v := q[i], s[i], t[i]
		ps += x * u
		pt += x * v
		qs += y * u
		qt += y * v
	}
	return ps, pt, qs, qt
}

func norms(p, q []float64) (pp, pq, qq float64) {
	q = q[:len(p)]
	for i, x := range p {
		y := q[i]
		pp += x * x
		pq += x * y
		qq += y * y
	}
	return pp, pq, qq
}
