package pack

import (
	"math"
	"math/rand/v2"
	"testing"
)

// TestSkylineSolves checks A x = b for A = B Bᵀ + I with a ragged B, even and odd sizes.
func TestSkylineSolves(t *testing.T) {
	rng := rand.New(rand.NewPCG(4, 2))
	for n := 1; n <= 41; n++ {
		first := make([]int, n)
		for i := range first {
			switch {
			case n%2 == 1 && i == n-1:
				first[i] = 0
			case i%2 == 1:
				first[i] = first[i-1]
			default:
				first[i] = 2 * rng.IntN(i/2+1)
			}
		}
		var m skyline
		m.shape(first)
		a := make([][]float64, n)
		for i := range a {
			a[i] = make([]float64, n)
		}
		for i := range n { // strictly diagonally dominant, so positive definite
			for j := first[i]; j < i; j++ {
				x := rng.NormFloat64()
				m.add(i, j, x)
				a[i][j], a[j][i] = x, x
			}
		}
		for i := range n {
			d := 1.0
			for _, x := range a[i] {
				d += math.Abs(x)
			}
			m.add(i, i, d)
			a[i][i] = d
		}
		want := make([]float64, n)
		b := make([]float64, n)
		for i := range want {
			want[i] = rng.NormFloat64()
		}
		for i := range b {
			b[i] = dot(a[i], want)
		}
		m.factor(1e-14)
		m.solve(b)
		for i := range b {
			if math.Abs(b[i]-want[i]) > 1e-12 { // well conditioned: a few roundings
				t.Fatalf("n %d: x[%d] = %g, want %g", n, i, b[i], want[i])
			}
		}
	}
}
