package harmonic

import (
	"math"
	"math/rand/v2"
	"testing"
)

// The vector kernels must do what the plain ones do, for one vector and for many, whatever the widths of the rows.
func TestKernels(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 7))
	for range 50 {
		ni, nj := 1+r.IntN(9), 1+r.IntN(9)
		b := block{}
		for range 1 + r.IntN(ni) {
			w := 2 * r.IntN(nj+1)
			b.cols = append(b.cols, uint16(w))
			for range 2 * w {
				b.data = append(b.data, r.NormFloat64())
			}
		}
		if len(b.data) == 0 {
			continue
		}
		vec := func(n int) []float64 {
			v := make([]float64, n)
			for i := range v {
				v[i] = r.NormFloat64()
			}
			return v
		}
		for _, k := range []int{1, many} {
			xi, xj, yi, yj := vec(2*ni*k), vec(2*nj*k), vec(2*ni*k), vec(2*nj*k)
			zi, zj := append([]float64(nil), yi...), append([]float64(nil), yj...)
			if k == 1 {
				b.apply(xi, xj, yi, yj)
				b.applyPlain(xi, xj, zi, zj)
			} else {
				b.apply8(xi, xj, yi, yj)
				b.apply8Plain(xi, xj, zi, zj)
			}
			for i := range yi {
				if math.Abs(yi[i]-zi[i]) > 1e-12 {
					t.Fatalf("%d vectors: y_i[%d] = %g, want %g", k, i, yi[i], zi[i])
				}
			}
			for i := range yj {
				if math.Abs(yj[i]-zj[i]) > 1e-12 {
					t.Fatalf("%d vectors: y_j[%d] = %g, want %g", k, i, yj[i], zj[i])
				}
			}
		}
	}
}

func TestDot(t *testing.T) {
	r := rand.New(rand.NewPCG(9, 9))
	for n := range 70 {
		a, b := make([]float64, n), make([]float64, n+3)
		for i := range a {
			a[i] = r.NormFloat64()
		}
		for i := range b {
			b[i] = r.NormFloat64()
		}
		if got, want := Dot(a, b), dotPlain(a, b); math.Abs(got-want) > 1e-13*float64(n) {
			t.Errorf("%d: %g, want %g", n, got, want)
		}
	}
}

func TestAxpy(t *testing.T) {
	r := rand.New(rand.NewPCG(9, 4))
	for n := range 70 {
		x, y := make([]float64, n), make([]float64, n+3)
		for i := range x {
			x[i] = r.NormFloat64()
		}
		for i := range y {
			y[i] = r.NormFloat64()
		}
		want := append([]float64(nil), y...)
		Axpy(y, 0.7, x)
		axpyPlain(want, 0.7, x)
		for i := range y {
			if math.Abs(y[i]-want[i]) > 1e-14*(1+math.Abs(want[i])) {
				t.Errorf("%d: %d is %g, want %g", n, i, y[i], want[i])
			}
		}
	}
}
