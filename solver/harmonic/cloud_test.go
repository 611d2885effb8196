package harmonic

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"testing"
)

// randomCloud is a few discs inside a circle with arbitrary amplitudes.
func randomCloud(r *rand.Rand, rho float64, sigma []float64) *Cloud {
	c := &Cloud{Circle: &Circle{R: 10, RhoInf: rho, Sigma: sigma}}
	for _, at := range []complex128{0, complex(4, 1), complex(-3, 4.5), complex(-1, -6)} {
		c.C = append(c.C, at)
		c.A = append(c.A, 0.8+r.Float64())
		d := make([]complex128, 7)
		for m := range d {
			d[m] = complex(r.NormFloat64(), r.NormFloat64())
		}
		c.D = append(c.D, d)
		c.Q = append(c.Q, r.NormFloat64())
	}
	c.Remainder()
	return c
}

// The expansion about a disc must give the field itself at every point of the disc.
func TestAboutReproducesTheField(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 1))
	c := randomCloud(r, -0.7, []float64{0.3, -0.2, 0.1, 0.05})
	for i := range c.C {
		b := make([]complex128, 120)
		c.About(c.C[i], c.A[i], i, b)
		for range 5 {
			w := cmplx.Rect(0.6+0.4*r.Float64(), 2*math.Pi*r.Float64())
			z := c.C[i] + w*complex(c.A[i], 0)
			want := c.At(z) - c.disc(i, z)
			got := real(b[0]) + Sum(b[1:], w)
			if math.Abs(got-want) > 1e-9 {
				t.Errorf("disc %d at %v: series %.12f, field %.12f", i, w, got, want)
			}
		}
	}
}

// Images and remainder against a boundary of known reflection: on the circle, every harmonic of the field must be (1+ρ_n) times the outgoing one.
func TestImageAgainstFourier(t *testing.T) {
	r := rand.New(rand.NewPCG(4, 4))
	c := randomCloud(r, -0.55, []float64{0.3, -0.2, 0.1, 0.05})
	a := c.Outgoing(40)
	const points = 512
	for n := 1; n <= 30; n++ {
		var f complex128
		for k := range points {
			e := cmplx.Rect(1, 2*math.Pi*float64(k)/points)
			f += complex(c.At(e*complex(c.Circle.R, 0)), 0) * cmplx.Rect(1, -2*math.Pi*float64(k*n)/points)
		}
		f *= 2.0 / points
		rho := c.Circle.RhoInf
		if n <= len(c.Circle.Sigma) {
			rho += c.Circle.Sigma[n-1]
		}
		want := conj(a[n-1]) * complex(1+rho, 0)
		if cmplx.Abs(f-want) > 1e-9 {
			t.Errorf("harmonic %d on the wall: %v, want %v", n, f, want)
		}
	}
}
