package outline

import (
	"math"
	"math/cmplx"
	"testing"
)

// A string covers an arc and meets its end along the tangent, but for rounding: what a bend of the arc sends through the string's cells is 1/2π of the
// angle under which the bend sees each, on average (Gauss's law in the plane; the average by a Gauss rule).
func TestFluxPastSharedEnd(t *testing.T) {
	at := cellsOf[modes].at
	var f curved
	x, w := gauss(40)
	for i := range 400 {
		turn, r := 0.1+0.37*float64(i), 1e-3*(1+float64(i%7))
		c := cmplx.Rect(3e-3, 1.3*float64(i))
		span := []float64{0.7, 0.2, 0.01}[i%3]
		arc := Stroke{From: c + cmplx.Rect(r, turn-span), To: c + cmplx.Rect(r, turn), Centre: c, R: r}
		ulp := cmplx.Rect(4e-19*float64(i%4), 2.1*float64(i))
		length := r * []float64{0.05, 0.7, 4}[i/3%3]
		string := Stroke{From: arc.To - cmplx.Rect(length, turn+math.Pi/2), To: arc.To + ulp}
		if i%2 == 1 { // the string goes from the arc's beginning
			string = Stroke{From: arc.From + ulp, To: arc.From + cmplx.Rect(length, turn-span+math.Pi/2)}
		}
		from, to := newBend(&arc, 0, 0, 0, 1), newBend(&string, 1, 0, 0, 1)
		var spots [modes + 1]spot
		var g [modes + 1][modes]complex128
		for l, u := range at {
			spots[l] = from.spotOf(&to, u)
			from.complexPotential(&f, spots[l], &g[l])
		}
		for l := range modes {
			var a [modes]float64
			from.flux(&to, l, &spots, &g, a[:], 1)
			want := 0.0
			for k, u := range x {
				want -= w[k] * from.half * to.sweep(at[l], at[l+1], from.at(u)) / (2 * math.Pi)
			}
			if math.Abs(a[0]-want) > 0.02*from.half {
				t.Errorf("%d: arc of %g mm, string of %g mm, cell %d: flux %g, want %g", i, arc.Length()*1e3, length*1e3, l, a[0], want)
			}
		}
	}
}
