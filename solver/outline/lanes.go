package outline

// Lanes is the number of right-hand sides that go together: element k of vector v stands at Lanes·k + v.
const Lanes = 8

// Many are Sources of up to Lanes vectors: for each disc q, Re d_1, Im d_1, … .
type Many [][]float64

// NewMany makes room for the sources of the discs, or for what comes to them: b_0, Re b_1, Im b_1, ….
func NewMany(discs []Disc) Many {
	m := make(Many, len(discs))
	for i := range m {
		m[i] = make([]float64, Lanes*(1+2*discs[i].M))
	}
	return m
}

type lanes = [Lanes]float64

// in2Plain adds to a the products of the rows r0 and r1 with x: a has two rows of lanes, x as many as r0 has numbers.
func in2Plain(r0, r1, x, a []float64) {
	a0, a1 := (*lanes)(a), (*lanes)(a[Lanes:])
	r1 = r1[:len(r0)]
	for k, e := range r0 {
		f, v := r1[k], (*lanes)(x[Lanes*k:])
		for l := range Lanes {
			a0[l] += e * v[l]
			a1[l] += f * v[l]
		}
	}
}

// out2Plain adds to y the products of the columns r0 and r1 with two rows of lanes u.
func out2Plain(r0, r1, u, y []float64) {
	u0, u1 := (*lanes)(u), (*lanes)(u[Lanes:])
	r1 = r1[:len(r0)]
	for k, e := range r0 {
		f, v := r1[k], (*lanes)(y[Lanes*k:])
		for l := range Lanes {
			v[l] += e*u0[l] + f*u1[l]
		}
	}
}

// in1 is in2 for one row.
func in1(r, x, a []float64) {
	var room [2 * Lanes]float64
	in2(r, r, x, room[:])
	add(a[:Lanes], room[:Lanes])
}

// out1 is out2 for one column.
func out1(r, u, y []float64) {
	var room [2 * Lanes]float64
	copy(room[:Lanes], u)
	out2(r, r, room[:], y)
}

func add(y, x []float64) {
	y = y[:len(x)]
	for i, v := range x {
		y[i] += v
	}
}

// rows adds to a the products of n rows of m, from its row first on, with x; each is wide numbers of a matrix whose rows are stride apart.
func rowsMany(m []float64, stride, first, n, wide int, x, a []float64) {
	k := 0
	for ; k+1 < n; k += 2 {
		o := (first + k) * stride
		in2(m[o:][:wide], m[o+stride:][:wide], x, a[Lanes*k:])
	}
	if k < n {
		in1(m[(first+k)*stride:][:wide], x, a[Lanes*k:])
	}
}

// substituteMany overwrites the right-hand sides y with the unknowns of a matrix that is taken apart.
func substituteMany(data []float64, pivots []int, y []float64) {
	n := len(pivots)
	for i, p := range pivots {
		a, b := (*lanes)(y[Lanes*i:]), (*lanes)(y[Lanes*p:])
		*a, *b = *b, *a
	}
	var sum [2 * Lanes]float64
	for i := 0; i < n; i += 2 { // L, two rows at a time
		clear(sum[:])
		j := min(i+1, n-1)
		r0, r1 := data[i*n:], data[j*n:]
		if i > 0 {
			in2(r0[:i], r1[:i], y, sum[:])
		}
		a, b := (*lanes)(y[Lanes*i:]), (*lanes)(y[Lanes*j:])
		for l := range Lanes {
			a[l] -= sum[l]
		}
		if j > i {
			for l := range Lanes {
				b[l] -= sum[Lanes+l] + r1[i]*a[l]
			}
		}
	}
	for j := n - 1; j >= 0; j -= 2 { // U
		clear(sum[:])
		i := max(j-1, 0)
		r0, r1 := data[i*n:], data[j*n:]
		if j+1 < n {
			in2(r0[j+1:n], r1[j+1:n], y[Lanes*(j+1):], sum[:])
		}
		a, b := (*lanes)(y[Lanes*i:]), (*lanes)(y[Lanes*j:])
		inv := 1 / r1[j]
		for l := range Lanes {
			b[l] = (b[l] - sum[Lanes+l]) * inv
		}
		if j > i {
			inv = 1 / r0[i]
			for l := range Lanes {
				a[l] = (a[l] - sum[l] - r0[j]*b[l]) * inv
			}
		}
	}
}

// Lot is work space for many right-hand sides of one border: what the parts send, what comes to them, and the border's unknowns.
type Lot struct {
	Src, In Many
	Y       []float64
	tmp     []float64
}

// NewLot makes room for a border of n unknowns (Len) round the discs.
func NewLot(discs []Disc, n int) *Lot {
	return &Lot{Src: NewMany(discs), In: NewMany(discs), Y: make([]float64, Lanes*n), tmp: make([]float64, Lanes*n)}
}

// takeUp adds to the rows of a patch what w, of Lanes vectors, brings there.
func takeUp(y, w []float64, gain float64) {
	v, t := (*lanes)(y), (*lanes)(w)
	for l := range Lanes {
		v[l] += gain * t[l]
	}
}
