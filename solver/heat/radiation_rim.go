package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// Harmonics of emissions that are told apart, at most.
const (
	maxRim  = 64
	maxRing = 48
)

// rim is a circle whose patches emit, in harmonics.
type rim struct {
	from, n   int       // patches
	cuts      []float64 // angles of their ends
	harmonics int       // that they are told apart in
	rows      []float64 // per patch Re and Im of the mean of e^{inθ}/√n over it
}

// newRim prepares the patches between cuts, of which the first is from. Piecewise constant emissions are told apart by as many harmonics as half
// the patches of that size would make a turn.
func newRim(from int, cuts []float64, blank []bool, most int) rim {
	narrow := 2 * math.Pi
	for k := 1; k < len(cuts); k++ {
		if blank == nil || !blank[k-1] {
			narrow = math.Min(narrow, cuts[k]-cuts[k-1])
		}
	}
	r := rim{from: from, n: len(cuts) - 1, cuts: cuts}
	r.harmonics = min(max(int(math.Round(math.Pi/narrow))-1, 1), most)
	r.rows = make([]float64, 2*r.n*r.harmonics)
	for k := range r.n {
		row := r.row(k)
		mid, half := (cuts[k]+cuts[k+1])/2, (cuts[k+1]-cuts[k])/2
		for n := 1; n <= r.harmonics; n++ {
			x := float64(n)
			f := math.Sin(x*half) / (x * half) / math.Sqrt(x)
			s, c := math.Sincos(x * mid)
			row[2*n-2], row[2*n-1] = f*c, f*s
		}
	}
	return r
}

func (r *rim) row(k int) []float64 { return r.rows[2*k*r.harmonics:][:2*r.harmonics] }

// emit sets e to the scaled harmonics Σ E w/√n of the emissions of the patches and returns their sum.
func (r *rim) emit(e, emission []float64) (sum float64) {
	clear(e)
	for k := range r.n {
		v := emission[r.from+k]
		sum += v
		axpy(e, v, r.row(k))
	}
	return sum
}

// feel sets the temperatures of the patches from the scaled harmonics tau = √n conj(T_n) of the rim and its mean.
func (r *rim) feel(t, tau []float64, mean float64) {
	for k := range r.n {
		t[r.from+k] = mean + harmonic.Dot(r.row(k), tau)
	}
}
