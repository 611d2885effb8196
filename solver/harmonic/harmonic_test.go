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

// The system's product must be the translated amplitudes.
func TestApplyIsTheTranslation(t *testing.T) {
	r := rand.New(rand.NewPCG(2, 2))
	c := randomCloud(r, 0.6, []float64{0.3, -0.2, 0.1, 0.05})
	discs := make([]Disc, len(c.C))
	for i := range discs {
		s := make([]float64, 7)
		for n := range s {
			s[n] = 0.2 + r.Float64()
		}
		discs[i] = Disc{C: c.C[i], A: c.A[i], S: s}
	}
	s := NewSystem(discs, c.Circle, nil, 1e-13)
	s.Build(1, never)
	x, y := make([]float64, s.n()), make([]float64, s.n())
	for i := range discs {
		for m, d := range c.D[i] {
			v := d * complex(roots[m]/discs[i].S[m], 0)
			x[s.off[i]+2*m], x[s.off[i]+2*m+1] = real(v), imag(v)
		}
	}
	s.Apply(y, x)
	s.Mono(y, c.Q)
	mean := make([]float64, len(discs))
	s.MonoDot(mean, x)
	for i := range discs {
		b := make([]complex128, 8)
		c.About(c.C[i], c.A[i], i, b)
		for n := 1; n <= 7; n++ {
			want := conj(b[n]) * complex(roots[n-1]*discs[i].S[n-1], 0)
			got := complex(y[s.off[i]+2*(n-1)], y[s.off[i]+2*(n-1)+1])
			if cmplx.Abs(got-want) > 3e-8 {
				t.Errorf("disc %d harmonic %d: %v, want %v", i, n, got, want)
			}
		}
		for j := range discs {
			if j != i {
				mean[i] += s.Log(i, j) * c.Q[j]
			}
		}
		mean[i] += c.Q[i] * (s.Log(i, i) + math.Log(c.A[i]/c.Circle.R))
		if math.Abs(mean[i]-real(b[0])) > 3e-8 {
			t.Errorf("disc %d mean %.12f, want %.12f", i, mean[i], real(b[0]))
		}
	}
}

func never() bool { return false }

func (s *System) n() int { return s.Len() }

// The product is symmetric, with and without a wall, whatever was cut.
func TestApplyIsSymmetric(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 3))
	for _, circle := range []*Circle{nil, {R: 10, RhoInf: -0.8, Sigma: []float64{0.5, 0.3, 0.2, 0.1, 0.05}}} {
		c := randomCloud(r, 0, nil)
		discs := make([]Disc, len(c.C))
		for i := range discs {
			discs[i] = Disc{C: c.C[i], A: c.A[i], S: []float64{1, .9, .8, .7, .6, .5}}
		}
		s := NewSystem(discs, circle, nil, 1e-3)
		s.Build(1, never)
		u, v := make([]float64, s.n()), make([]float64, s.n())
		for i := range u {
			u[i], v[i] = r.NormFloat64(), r.NormFloat64()
		}
		au, av := make([]float64, s.n()), make([]float64, s.n())
		s.Apply(au, u)
		s.Apply(av, v)
		var p, q float64
		for i := range u {
			p += v[i] * au[i]
			q += u[i] * av[i]
		}
		if math.Abs(p-q) > 1e-13*math.Abs(p) {
			t.Errorf("vᵀAu = %.15g, uᵀAv = %.15g", p, q)
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

// A disc beside another: b_n from a dense Fourier transform of the field on its rim.
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

// Many products at once are the products one by one.
func TestApplyMany(t *testing.T) {
	r := rand.New(rand.NewPCG(8, 8))
	c := randomCloud(r, 0.4, []float64{0.3, -0.2})
	discs := make([]Disc, len(c.C))
	for i := range discs {
		discs[i] = Disc{C: c.C[i], A: c.A[i], S: []float64{1, .9, .8, .7, .6, .5}[:3+i%3]}
	}
	s := NewSystem(discs, c.Circle, nil, 1e-4)
	s.Build(1, never)
	x, y := make([]float64, Many*s.Len()), make([]float64, Many*s.Len())
	for i := range x {
		x[i] = r.NormFloat64()
	}
	s.ApplyMany(y, x)
	u, w := make([]float64, s.Len()), make([]float64, s.Len())
	for v := range Many {
		for i := range u {
			u[i] = x[Many*i+v]
		}
		s.Apply(w, u)
		for i := range w {
			if math.Abs(w[i]-y[Many*i+v]) > 1e-12 {
				t.Fatalf("vector %d, element %d: %g, want %g", v, i, y[Many*i+v], w[i])
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

// Many goroutines write and multiply like one.
func TestSharedProduct(t *testing.T) {
	r := rand.New(rand.NewPCG(10, 10))
	var discs []Disc
	for len(discs) < 160 {
		c := complex(2*r.Float64()-1, 2*r.Float64()-1)
		if a := 0.03 + 0.02*r.Float64(); size(c)+a < 1 {
			s := make([]float64, 12)
			for n := range s {
				s[n] = 0.9
			}
			discs = append(discs, Disc{C: c, A: a, S: s}) // overlaps count as contacts
		}
	}
	circle := &Circle{R: 1, RhoInf: -0.7, Sigma: []float64{0.2, 0.1}}
	one, two := NewSystem(discs, circle, nil, 1e-5), NewSystem(discs, circle, nil, 1e-5)
	one.Build(1, never)
	two.Build(3, never)
	if one.parts != nil || len(two.parts) != 4 {
		t.Fatalf("parts %v and %v of %d entries", one.parts, two.parts, two.Entries())
	}
	x := make([]float64, one.Len())
	for i := range x {
		x[i] = r.NormFloat64()
	}
	y, z := make([]float64, one.Len()), make([]float64, one.Len())
	one.Apply(y, x)
	two.Apply(z, x)
	for i := range y {
		if math.Abs(y[i]-z[i]) > 1e-12 {
			t.Fatalf("element %d: %g, want %g", i, z[i], y[i])
		}
	}
	if two.Build(2, func() bool { return true }) {
		t.Error("a build that was stopped says that it came to the end")
	}
}
