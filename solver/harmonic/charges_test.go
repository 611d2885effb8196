package harmonic

import (
	"math"
	"math/rand/v2"
	"testing"
)

// A flow is what Apply, Mono, Logs, MonoDot and the circle's maps give one by one, after a disc has moved too.
func TestFlow(t *testing.T) {
	r := rand.New(rand.NewPCG(4, 9))
	for _, circle := range []*Circle{nil, {R: 10, RhoInf: -0.7, Sigma: []float64{0.5, 0.3, -0.2, 0.1}}} {
		cloud := randomCloud(r, 0, nil)
		discs := make([]Disc, len(cloud.C))
		for i := range discs {
			discs[i] = Disc{C: cloud.C[i], A: cloud.A[i], S: []float64{1, .9, .8, .7, .6, .5}}
		}
		weight := make([]float64, 9)
		for n := range weight {
			weight[n] = 1
		}
		s := NewSystem(discs, circle, weight, 1e-13)
		s.Build(1, never)
		c := s.Charges()
		for round := range 2 {
			if round == 1 {
				d := s.Disc(1)
				d.C *= 1.01
				s.Put(1, d)
				c.Follow()
			}
			checkFlow(t, r, s, c)
			checkFlows(t, r, s, c)
		}
	}
}

func checkFlow(t *testing.T, r *rand.Rand, s *System, c *Charges) {
	t.Helper()
	f := c.NewFlow()
	for i := range f.X {
		f.X[i] = r.Float64() - 0.5
	}
	for j := range f.Q {
		f.Q[j] = r.Float64() - 0.5
	}
	for range s.Top() {
		f.Omega = append(f.Omega, complex(r.Float64(), r.Float64()))
	}
	c.Send(f)
	c.Receive(f)
	y, mean, dots := make([]float64, s.Len()), make([]float64, len(f.Q)), make([]float64, len(f.Q))
	s.Apply(y, f.X)
	s.Mono(y, f.Q)
	s.Spread(y, f.Omega)
	s.Logs(mean, f.Q)
	s.MonoDot(dots, f.X)
	for i := range y {
		if math.Abs(y[i]-f.Y[i]) > 1e-7 {
			t.Fatalf("amplitude %d: %g, want %g", i, f.Y[i], y[i])
		}
	}
	for i := range mean {
		want := mean[i] + dots[i]
		for n, w := range f.Omega {
			z := c.wall[i][n]
			want += real(w)*real(z) + imag(w)*imag(z)
		}
		if math.Abs(want-f.Mean[i]) > 1e-7 {
			t.Errorf("mean %d: %g, want %g", i, f.Mean[i], want)
		}
	}
	if s.circle == nil {
		return
	}
	alpha, own := make([]complex128, s.Top()), make([]complex128, s.Top())
	s.Gather(alpha, f.X)
	s.ChargeOut(own, f.Q)
	for n := range alpha {
		want := alpha[n] + own[n]
		if d := want - f.Alpha[n]; size(d) > 1e-10 {
			t.Errorf("outgoing %d: %v, want %v", n, f.Alpha[n], want)
		}
		if n < len(s.circle.Sigma) {
			want = scale(s.circle.Sigma[n], want)
		} else {
			want = 0
		}
		if d := want + f.Omega[n] - f.Regular[n]; size(d) > 1e-10 {
			t.Errorf("regular %d is off by %v", n, d)
		}
	}
}

// Many flows at once are what each of them is alone.
func checkFlows(t *testing.T, r *rand.Rand, s *System, c *Charges) {
	t.Helper()
	var flows []*Flow
	for range 5 {
		f := c.NewFlow()
		for i := range f.X {
			f.X[i] = r.NormFloat64()
		}
		for j := range f.Q {
			f.Q[j] = r.NormFloat64()
		}
		for range s.Top() {
			f.Omega = append(f.Omega, complex(r.NormFloat64(), r.NormFloat64()))
		}
		flows = append(flows, f)
	}
	c.SendMany(flows)
	c.ReceiveMany(flows)
	for _, f := range flows {
		g := c.NewFlow()
		copy(g.X, f.X)
		copy(g.Q, f.Q)
		g.Omega = f.Omega
		c.Send(g)
		c.Receive(g)
		for i := range g.Y {
			if math.Abs(f.Y[i]-g.Y[i]) > 1e-12 {
				t.Fatalf("amplitude %d: %g, want %g", i, f.Y[i], g.Y[i])
			}
		}
		for i := range g.Mean {
			if math.Abs(f.Mean[i]-g.Mean[i]) > 1e-12 {
				t.Errorf("mean %d: %g, want %g", i, f.Mean[i], g.Mean[i])
			}
		}
		for n := range g.Alpha {
			if size(f.Alpha[n]-g.Alpha[n]) > 1e-12 || size(f.Regular[n]-g.Regular[n]) > 1e-12 {
				t.Errorf("the circle's harmonic %d: %g and %g, want %g and %g", n+1, f.Alpha[n], f.Regular[n], g.Alpha[n], g.Regular[n])
			}
		}
	}
}
