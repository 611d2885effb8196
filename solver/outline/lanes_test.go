package outline

import (
	"math"
	"math/rand/v2"
	"testing"

	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/lapack/lapack64"
)

func normals(r *rand.Rand, n int) []float64 {
	v := make([]float64, n)
	for i := range v {
		v[i] = r.NormFloat64()
	}
	return v
}

// The vector kernels must do what the plain ones do, whatever the length.
func TestLanes(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 8))
	for n := range 20 {
		r0, r1 := normals(r, n), normals(r, n)
		long, short := normals(r, Lanes*n), normals(r, 2*Lanes)
		y, a := append([]float64(nil), long...), append([]float64(nil), short...)
		in2(r0, r1, long, a)
		out2(r0, r1, short, y)
		y2, a2 := append([]float64(nil), long...), append([]float64(nil), short...)
		in2Plain(r0, r1, long, a2)
		out2Plain(r0, r1, short, y2)
		for i := range a {
			if math.Abs(a[i]-a2[i]) > 1e-13 {
				t.Fatalf("%d in: lane %d: %g, want %g", n, i, a[i], a2[i])
			}
		}
		for i := range y {
			if math.Abs(y[i]-y2[i]) > 1e-13 {
				t.Fatalf("%d out: lane %d: %g, want %g", n, i, y[i], y2[i])
			}
		}
	}
}

// Many right-hand sides give what each gives alone.
func TestSubstituteMany(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 8))
	for n := 1; n < 12; n++ {
		lu := blas64.General{Rows: n, Cols: n, Stride: n, Data: normals(r, n*n)}
		pivots := make([]int, n)
		lapack64.Getrf(lu, pivots)
		many := normals(r, Lanes*n)
		var each [Lanes][]float64
		for v := range each {
			for i := range n {
				each[v] = append(each[v], many[Lanes*i+v])
			}
			substitute(lu, pivots, each[v])
		}
		substituteMany(lu.Data, pivots, many)
		for v := range each {
			for i, want := range each[v] {
				if got := many[Lanes*i+v]; math.Abs(got-want) > 1e-9*(1+math.Abs(want)) {
					t.Fatalf("%d unknowns: lane %d: y[%d] = %g, want %g", n, v, i, got, want)
				}
			}
		}
	}
}
