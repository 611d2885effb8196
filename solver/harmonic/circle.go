package harmonic

import "math"

// Circle is a round wall about the origin: inside radius R, reflection B_n = (RhoInf + Sigma[n-1]) conj(A_n), where A_n are the outgoing
// and B_n the regular coefficients about the origin, both referred to R. RhoInf acts by images in closed form; Sigma, for
// n = 1 … len(Sigma), as a short sum; the rest of Sigma is nought. Logarithms are relative to R.
type Circle struct {
	R      float64
	RhoInf float64
	Sigma  []float64
}

// portCut drops entries of the maps from discs to the circle's own harmonics.
const portCut = 1e-8

// portRows returns the map from disc i's scaled amplitudes to the circle's: P[n,m] = s_m √(n/m) C(n−1, m−1) (a/R)^m (c/R)^(n−m), for
// n ≤ top. Row m-1 holds n = m, m+1, … up to where the entries stay below portCut.
func portRows(d Disc, r float64, top int) [][]complex128 {
	rows := make([][]complex128, len(d.S))
	c := scale(1/r, d.C)
	size := math.Hypot(real(c), imag(c))
	am := 1.0
	for m := 1; m <= len(d.S) && m <= top; m++ {
		am *= d.A / r
		p := complex(am*d.S[m-1], 0)
		abs := am * d.S[m-1]
		var row []complex128
		for n := m; n <= top; n++ {
			row = append(row, p)
			f := float64(n) / float64(n-m+1) * math.Sqrt(float64(n+1)/float64(n))
			if abs *= f * size; abs < portCut && f*size < 1 {
				break
			}
			p = scale(f, p) * c
		}
		rows[m-1] = row
	}
	return rows
}

// gather adds disc i's share of the circle's outgoing amplitudes: alpha += P x.
func gather(rows [][]complex128, x []float64, alpha []complex128) {
	rows = rows[:min(len(rows), len(alpha))]
	for m, row := range rows {
		v := complex(x[2*m], x[2*m+1])
		a := alpha[m : m+len(row)]
		for k, p := range row {
			a[k] += p * v
		}
	}
}

// spread is gather's adjoint: y += Pᴴ omega.
func spread(rows [][]complex128, omega []complex128, y []float64) {
	rows = rows[:min(len(rows), len(omega))]
	for m, row := range rows {
		o := omega[m : m+len(row)]
		var re, im float64
		for k, p := range row {
			w := o[k]
			re += real(p)*real(w) + imag(p)*imag(w)
			im += real(p)*imag(w) - imag(p)*real(w)
		}
		y[2*m] += re
		y[2*m+1] += im
	}
}
