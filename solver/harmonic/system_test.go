package harmonic

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"testing"
)

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
