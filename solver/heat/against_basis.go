package heat

import "math"

// arcBasis are series on an arc of half angle half about its middle: Legendre polynomials P_j, or T_j/√(1−x²) for what is held. Their integrals with
// e^{inθ} are at(j, n), for odd j times i.
type arcBasis struct {
	half  float64
	modes int
	top   int // harmonics
	held  bool
	p     []float64 // modes for each n = 0 … top
}

func (b *arcBasis) at(j, n int) float64 { return b.p[n*b.modes+j] }

// Harmonics in which the arc's own answer is summed: so many of the narrowest term's own, no fewer and no more.
const (
	ownEach  = 3.0
	leastOwn = 400
	mostOwn  = 6000
)

// newArcBasis prepares modes terms on an arc; biot is film × radius / conductivity, up to which harmonics of a film do not die out.
func newArcBasis(half float64, modes int, biot float64, held bool) *arcBasis {
	b := &arcBasis{half: half, modes: modes, held: held}
	b.top = min(max(leastOwn+int(10*biot), int(ownEach*float64(modes)/half)), mostOwn)
	b.p = make([]float64, (b.top+1)*modes)
	for n := range b.top + 1 {
		row := b.p[n*modes:][:modes]
		f := 2 * half
		if held {
			f = math.Pi * half
			besselJ(row, float64(n)*half)
		} else {
			sphericalJ(row, float64(n)*half)
		}
		for j := range row {
			row[j] *= f
			if j%4 >= 2 { // i^j
				row[j] = -row[j]
			}
		}
	}
	return b
}

// factor is the Cholesky factor of the arc's own answer: of 1/h − Z between bounded terms, of Z between those of what is held.
func (b *arcBasis) factor(t *rest, own []float64) [][]float64 {
	m := b.modes
	a := make([][]float64, m)
	for j := range a {
		a[j] = make([]float64, j+1)
	}
	w := make([]float64, b.top+1) // weight of each harmonic
	lead := t.r / t.k
	w[0] = 1 / (2 * math.Pi * t.film)
	for n, z := range own {
		w[n+1] = z / math.Pi
		if b.held {
			w[n+1] -= lead / float64(n+1) / math.Pi
		}
	}
	for n, f := range w {
		row := b.p[n*m:][:m]
		for j, p := range row {
			p *= f
			for k := j & 1; k <= j; k += 2 {
				a[j][k] += p * row[k]
			}
		}
	}
	if b.held {
		b.logarithm(a, lead/math.Pi)
	} else {
		for j := range a {
			for k := range a[j] {
				a[j][k] = -a[j][k]
			}
			a[j][j] += 2 * b.half / float64(2*j+1) / t.film
		}
	}
	cholesky(a)
	return a
}

// logarithm adds f times the integrals of −ln(2 sin(|θ−θ'|/2)) = Σ cos n(θ−θ')/n between the terms: in closed form for −ln|x−y|, by Gauss and Chebyshev's rule
// for the rest, which is smooth.
func (b *arcBasis) logarithm(a [][]float64, f float64) {
	f *= b.half * b.half
	a[0][0] += f * math.Pi * math.Pi * (math.Ln2 - math.Log(b.half))
	for j := 1; j < b.modes; j++ {
		a[j][j] += f * math.Pi * math.Pi / (2 * float64(j))
	}
	q := 48
	if left := 1 - b.half/math.Pi; left < 0.15 { // near the other end of the arc
		q = max(q, int(60/math.Sqrt(left)))
	}
	m := min(b.modes, q/2) // of what is so smooth, higher terms see nothing
	x := make([]float64, q)
	poly := make([]float64, q*m)
	for i := range x {
		angle := math.Pi * (float64(i) + 0.5) / float64(q)
		x[i] = math.Cos(angle)
		for j := range m {
			poly[i*m+j] = math.Cos(float64(j) * angle)
		}
	}
	weight := f * (math.Pi / float64(q)) * (math.Pi / float64(q))
	v := make([]float64, m)
	for i := range x {
		clear(v)
		for k := range x {
			u := b.half * (x[i] - x[k]) / 2
			if u == 0 {
				continue
			}
			axpy(v, -weight*math.Log(math.Abs(math.Sin(u)/u)), poly[k*m:][:m])
		}
		for j := range m {
			p := poly[i*m+j]
			for k := j & 1; k <= j; k += 2 {
				a[j][k] += p * v[k]
			}
		}
	}
}

// cholesky overwrites the lower triangle of a positive matrix, rows of even and odd number having nothing to do with each other.
func cholesky(a [][]float64) {
	for i := range a {
		for j := i & 1; j <= i; j += 2 {
			sum := a[i][j]
			for k := i & 1; k < j; k += 2 {
				sum -= a[i][k] * a[j][k]
			}
			if i == j {
				a[i][i] = math.Sqrt(math.Max(sum, 1e-14*a[i][i]))
			} else {
				a[i][j] = sum / a[j][j]
			}
		}
	}
}

// besselJ sets j to J_0(x) … of integer order.
func besselJ(j []float64, x float64) {
	if x > float64(len(j)) {
		j0, j1 := math.J0(x), math.J1(x)
		for n := range j {
			j[n] = j0
			j0, j1 = j1, 2*float64(n+1)/x*j1-j0
		}
		return
	}
	// J_0 + 2 ΣJ_2k = 1
	sum := downward(j, x, func(n int) float64 { return 2 * float64(n) / x }, func(n int) float64 {
		if n == 0 {
			return 1
		}
		return float64(2 - 2*(n&1))
	})
	for n := range j {
		j[n] /= sum
	}
}

// sphericalJ sets j to the spherical Bessel functions j_0(x) …
func sphericalJ(j []float64, x float64) {
	if x > float64(len(j)) {
		s, c := math.Sincos(x)
		j0, j1 := s/x, s/(x*x)-c/x
		for n := range j {
			j[n] = j0
			j0, j1 = j1, float64(2*n+3)/x*j1-j0
		}
		return
	}
	downward(j, x, func(n int) float64 { return float64(2*n+1) / x }, func(int) float64 { return 0 })
	f := 1.0
	if x > 0 {
		s, c := math.Sincos(x)
		if f = s / x / j[0]; math.Abs(j[0]) < math.Abs(at1(j)) {
			f = (s/(x*x) - c/x) / j[1]
		}
	}
	for n := range j {
		j[n] *= f
	}
}

func at1(j []float64) float64 {
	if len(j) > 1 {
		return j[1]
	}
	return 0
}

// downward fills j by Miller's recursion f_(n−1) = c(n) f_n − f_(n+1) and returns Σ w(n) f_n.
func downward(j []float64, x float64, c, w func(n int) float64) (sum float64) {
	clear(j)
	if x == 0 {
		j[0] = 1
		return 1
	}
	above, f := 0.0, 1e-280
	for n := len(j) + 24 + int(x/4); n >= 0; n-- {
		if n < len(j) {
			j[n] = f
		}
		sum += w(n) * f
		if math.Abs(f) > 1e200 {
			f, above, sum = f*1e-200, above*1e-200, sum*1e-200
			for k := n; k < len(j); k++ {
				j[k] *= 1e-200
			}
		}
		if n > 0 {
			above, f = f, c(n)*f-above
		}
	}
	return sum
}
