package heat

import (
	"math"
	"math/rand/v2"
	"testing"
)

// Both iterations must reach the true residual on a random symmetric matrix, positive and of both signs.
func TestIterations(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 5))
	const n = 30
	for _, mixed := range []bool{false, true} {
		m := make([]float64, n*n)
		for i := range n {
			for j := i; j < n; j++ {
				v := 0.1 * r.NormFloat64()
				m[i*n+j], m[j*n+i] = v, v
			}
			m[i*n+i] += 2
			if mixed && i%3 == 0 {
				m[i*n+i] -= 4
			}
		}
		a := func(y, x []float64) {
			for i := range y {
				y[i] = dot(m[i*n:(i+1)*n], x)
			}
		}
		f := make([]float64, n)
		for i := range f {
			f[i] = r.NormFloat64()
		}
		solvers := map[string]func(operator, []float64, []float64, float64, func() bool) (int, bool){"minres": minres, "gmres": gmres}
		if !mixed {
			solvers["conjugate"] = conjugate
		}
		for name, solve := range solvers {
			x, y := make([]float64, n), make([]float64, n)
			for i := range x {
				x[i] = r.NormFloat64() // a warm start
			}
			steps, ok := solve(a, x, f, 1e-10, func() bool { return false })
			a(y, x)
			e := 0.0
			for i := range y {
				e += (y[i] - f[i]) * (y[i] - f[i])
			}
			if e = math.Sqrt(e / dot(f, f)); !ok || e > 2e-10 {
				t.Errorf("%s, mixed %v: residual %g after %d steps", name, mixed, e, steps)
			}
		}
	}
}
