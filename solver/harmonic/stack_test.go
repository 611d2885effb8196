package harmonic

import (
	"math"
	"testing"
)

// The two-port and the waves of a stack of layers, against the layer matrices from the inside to the outside.
func TestPortAgainstLayers(t *testing.T) {
	s := Stack{
		Inner: End{Medium, 0.3}, Outer: End{Medium, 0.026}, R: 3,
		Rings: []Ring{{0.2, 3, 3.4}, {40, 3.4, 3.5}, {0.17, 3.5, 4.2}},
	}
	for _, n := range []int{1, 2, 5, 11} {
		p := s.Port(n)
		for _, drive := range []struct{ b, a float64 }{{1, 0}, {0, 1}, {0.7, -1.3}} {
			d := p.T*drive.b + p.Tau*drive.a
			in := p.Rho*drive.a + p.TauIn*drive.b
			// March (T, k r T') from the inside to the outside with the layer matrices.
			fn := float64(n)
			temp, flux := in+drive.a, s.Inner.V*fn*(in-drive.a)
			for _, g := range s.Rings {
				x := fn * math.Log(g.R1/g.R0)
				temp, flux = math.Cosh(x)*temp+math.Sinh(x)/(g.K*fn)*flux, g.K*fn*math.Sinh(x)*temp+math.Cosh(x)*flux
			}
			if e := math.Abs(temp - (drive.b + d)); e > 1e-7 {
				t.Errorf("n %d: temperature at the outside off by %g", n, e)
			}
			if e := math.Abs(flux - s.Outer.V*fn*(drive.b-d)); e > 1e-6 {
				t.Errorf("n %d: flux at the outside off by %g", n, e)
			}
			checkWaves(t, &s, n, complex(drive.b, 0), complex(drive.a, 0), in, d)
		}
		if e := p.Tau*s.Outer.V - p.TauIn*s.Inner.V; math.Abs(e) > 1e-14 {
			t.Errorf("n %d: reciprocity off by %g", n, e)
		}
	}
	if p := s.Port(4000); math.IsNaN(p.T) || math.Abs(p.T-(0.17-0.026)/(0.17+0.026)*-1) > 1e-12 {
		t.Errorf("port at n 4000: %+v", p)
	}
}

// checkWaves checks that the waves in the rings are continuous with each other and with both ends.
func checkWaves(t *testing.T, s *Stack, n int, b, a complex128, in, d float64) {
	t.Helper()
	waves := s.Waves(n, nil)
	edge := real(a) + in
	for i, w := range waves {
		f, g := w.Split(b, a)
		if e := math.Abs(real(f)*w.W + real(g) - edge); e > 1e-9 {
			t.Errorf("n %d ring %d: jump of %g at its inner face", n, i, e)
		}
		edge = real(f) + real(g)*w.W
	}
	if e := math.Abs(edge - real(b) - d); e > 1e-9 {
		t.Errorf("n %d: jump of %g at the outside", n, e)
	}
}

// A film outside, against the recursion of the boundary condition from the outside inwards.
func TestFilmReflection(t *testing.T) {
	s := Stack{Inner: End{Medium, 0.026}, Outer: End{Film, 10}, R: 0.012, Rings: []Ring{{0.2, 0.012, 0.0135}, {50, 0.0135, 0.0145}}}
	for n := 1; n <= 30; n++ {
		mu := 10.0
		fn := float64(n)
		for i := len(s.Rings) - 1; i >= 0; i-- {
			g := s.Rings[i]
			eta := mu * g.R1 / (g.K * fn)
			u := math.Pow(g.R0/g.R1, 2*fn)
			mu = g.K * fn / g.R0 * ((1 + eta) - (1-eta)*u) / ((1 + eta) + (1-eta)*u)
		}
		z := 0.026 * fn / 0.012
		if want := (z - mu) / (z + mu); math.Abs(s.Port(n).Rho-want) > 1e-12 {
			t.Errorf("n %d: ρ %.12f, want %.12f", n, s.Port(n).Rho, want)
		}
	}
}
