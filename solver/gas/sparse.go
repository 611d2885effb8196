package gas

import "math"

// sparse is the symmetric matrix of A_i F_ij, row by row, with the diagonal apart.
type sparse struct {
	start []int32
	col   []int32
	val   []float64
	diag  []float64
}

// balance rounds of scaling make the rows add up to the areas; what is then left, some 1e-6 of them, goes to the diagonal.
const balance = 6

// close makes the view factors reciprocal, A_i F_ij being the mean of what both patches found, and complete.
func (e *Enclosure) close() {
	n := len(e.area)
	back := e.transposed()
	e.start = append(e.start[:0], 0)
	e.col, e.val = e.col[:0], e.val[:0]
	e.diag = make([]float64, n)
	sum := make([]float64, n)
	var hit []int32
	add := func(j int32, v float64) {
		if sum[j] == 0 {
			hit = append(hit, j)
		}
		sum[j] += v
	}
	for i := range n {
		hit = hit[:0]
		for _, s := range e.raw[i] {
			add(s.patch, s.f*e.area[i]/2)
		}
		for _, s := range back.row(i) {
			add(s.patch, s.f/2)
		}
		for _, j := range hit {
			if int(j) == i {
				e.diag[i] = sum[j]
			} else {
				e.col, e.val = append(e.col, j), append(e.val, sum[j])
			}
			sum[j] = 0
		}
		e.start = append(e.start, int32(len(e.col)))
	}
	e.scale()
}

// scale multiplies rows and columns alike until the rows add up.
func (e *Enclosure) scale() {
	n := len(e.area)
	d, sum := make([]float64, n), make([]float64, n)
	for i := range d {
		d[i] = 1
	}
	for range balance {
		for i := range sum {
			s := e.diag[i] * d[i]
			for k := e.start[i]; k < e.start[i+1]; k++ {
				s += e.val[k] * d[e.col[k]]
			}
			sum[i] = d[i] * s
		}
		for i := range d {
			if sum[i] > 0 {
				d[i] *= math.Sqrt(e.area[i] / sum[i])
			}
		}
	}
	for i := range n {
		rest := e.area[i]
		for k := e.start[i]; k < e.start[i+1]; k++ {
			e.val[k] *= d[i] * d[e.col[k]]
			rest -= e.val[k]
		}
		e.diag[i] = rest
	}
}

// columns of the raw shares, each f times the area of the patch that saw.
type columns struct {
	start []int32
	s     []sight
}

func (c *columns) row(i int) []sight { return c.s[c.start[i]:c.start[i+1]] }

func (e *Enclosure) transposed() columns {
	n := len(e.area)
	c := columns{start: make([]int32, n+1)}
	for _, row := range e.raw {
		for _, s := range row {
			c.start[s.patch+1]++
		}
	}
	for i := range n {
		c.start[i+1] += c.start[i]
	}
	c.s = make([]sight, c.start[n])
	at := append([]int32(nil), c.start[:n]...)
	for i, row := range e.raw {
		for _, s := range row {
			c.s[at[s.patch]] = sight{int32(i), s.f * e.area[i]}
			at[s.patch]++
		}
	}
	return c
}

// Product sets y_i = Σ A_i F_ij x_j.
func (m *sparse) Product(y, x []float64) {
	for i := range y {
		s := m.diag[i] * x[i]
		a, b := m.start[i], m.start[i+1]
		val, col := m.val[a:b], m.col[a:b]
		for k, j := range col {
			s += val[k] * x[j]
		}
		y[i] = s
	}
}

// Factor returns the view factor F_ij, from patch i to patch j.
func (e *Enclosure) Factor(i, j int) float64 {
	if i == j {
		return e.diag[i] / e.area[i]
	}
	for k := e.start[i]; k < e.start[i+1]; k++ {
		if int(e.col[k]) == j {
			return e.val[k] / e.area[i]
		}
	}
	return 0
}

// Entries is the number of pairs of patches that see each other, counted twice.
func (m *sparse) Entries() int { return len(m.val) }
