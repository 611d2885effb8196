package heat

import (
	"math"
	"math/rand/v2"
	"testing"
)

// Many right-hand sides are solved as each alone is, and what is left of them is f − A x. A right-hand side of nought has the solution nought.
func TestGmresMany(t *testing.T) {
	const n = 40
	r := rand.New(rand.NewPCG(6, 6))
	a := make([]float64, n*n)
	for i := range a {
		a[i] = r.NormFloat64() / 12
		if i%(n+1) == 0 {
			a[i]++
		}
	}
	product := func(y, x []float64) {
		for i := range y {
			y[i] = dot(a[n*i:n*(i+1)], x)
		}
	}
	f := make([][]float64, 5)
	for v := range f {
		f[v] = make([]float64, n)
		for i := range f[v] {
			f[v][i] = float64(v) * r.NormFloat64()
		}
	}
	room := &vectors{n: n}
	many := func(ys, xs [][]float64, _ []int) {
		for k := range ys {
			product(ys[k], xs[k])
		}
	}
	bases, ok := gmresMany(many, f, 1e-3, room, func() bool { return false })
	if !ok {
		t.Fatal("stopped")
	}
	for v, k := range bases {
		x, left, y := make([]float64, n), make([]float64, n), make([]float64, n)
		k.improve(x)
		k.rest(left)
		product(y, x)
		for i := range y {
			if want := f[v][i] - y[i]; math.Abs(left[i]-want) > 1e-12 {
				t.Fatalf("vector %d: %g is left of %d, want %g", v, left[i], i, want)
			}
		}
		if got := norm(left); got > 1e-3*norm(f[v]) {
			t.Errorf("vector %d: residual %g of %g", v, got, norm(f[v]))
		}
		room.put(k.basis...)
	}
	if _, ok := gmresMany(many, f, 1e-3, room, func() bool { return true }); ok {
		t.Error("did not stop when asked")
	}
}
