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

// factor overwrites the matrix with its Cholesky factor. A pivot that rounding made too small is lifted to floor, which freezes that unknown.
func (m *skyline) factor(floor float64) {
	for i, fi := range m.first {
		row := m.v[m.start[i]:m.start[i+1]]
		for j := fi; j < i; j++ {
			fj := m.first[j]
			other := m.v[m.start[j]:m.start[j+1]]
			lo := max(fi, fj)
			s := row[j-fi] - dot(row[lo-fi:j-fi], other[lo-fj:j-fj])
			row[j-fi] = s / other[j-fj]
		}
		d := row[i-fi] - dot(row[:i-fi], row[:i-fi])
		if !(d > floor) {
			d = 1e60
		}
		row[i-fi] = math.Sqrt(d)
	}
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
