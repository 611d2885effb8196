package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// series is Re Σ x[n-1] z^n within the unit circle, summed only as far as it counts.
type series struct {
	x   []complex128
	top [bands]int // terms that count where |z|² is up to (band+1)/bands
}

const (
	bands   = 8
	nothing = 1e-4 // K
)

// trim sets top.
func (s *series) trim() {
	for b := range s.top {
		r := math.Sqrt(float64(b+1) / bands)
		n := len(s.x)
		p := math.Pow(r, float64(n))
		for n > 0 && math.Hypot(real(s.x[n-1]), imag(s.x[n-1]))*p < nothing {
			n--
			p /= r
		}
		s.top[b] = n
	}
}

// at sums at z, r2 = |z|².
func (s *series) at(z complex128, r2 float64) float64 {
	return harmonic.Sum(s.x[:s.top[min(bands-1, max(0, int(r2*bands)))]], z)
}
