package harmonic

import (
	"math"
	"sync"
)

// MaxOrder is the highest harmonic of any disc. The table's largest entry is then 1e153 and the powers beside it no smaller than 1e-160.
const MaxOrder = 256

// table[n-1][m-1] = √(n m) (n+m−1)!/(n! m!) = √(n/m) C(n+m−1, n): the size of the coupling between harmonic m of one disc and n
// of another, symmetric.
var table = sync.OnceValue(func() [][]float64 {
	lf := make([]float64, 2*MaxOrder+1) // ln n!
	for n := 2; n < len(lf); n++ {
		lf[n] = lf[n-1] + math.Log(float64(n))
	}
	t := make([][]float64, MaxOrder)
	all := make([]float64, MaxOrder*MaxOrder)
	for n := 1; n <= MaxOrder; n++ {
		t[n-1] = all[(n-1)*MaxOrder : n*MaxOrder]
		for m := 1; m <= MaxOrder; m++ {
			t[n-1][m-1] = math.Sqrt(float64(n)*float64(m)) * math.Exp(lf[n+m-1]-lf[n]-lf[m])
		}
	}
	return t
})

// roots[n-1] = √n.
var roots = func() (r [MaxOrder]float64) {
	for i := range r {
		r[i] = math.Sqrt(float64(i + 1))
	}
	return r
}()
