package harmonic

import (
	"math"
	"math/rand/v2"
	"testing"
)

// mixed is a random section of discs in a circle with a mix.
func mixed(rnd *rand.Rand, sign float64) *System {
	const top = 9
	m := &Mix{Sign: sign}
	for range 4 {
		w := make([]float64, 2*top)
		for i := range w {
			w[i] = 0.3 * rnd.NormFloat64() / float64(1+i/2)
		}
		m.W, m.W0 = append(m.W, w), append(m.W0, rnd.NormFloat64())
	}
	c := &Circle{R: 1, RhoInf: -0.7, Sigma: []float64{0.3, 0.1, 0.02}, Mix: m}
	var discs []Disc
	for _, at := range []complex128{0.5, 0.5i, -0.4 - 0.3i} {
		discs = append(discs, Disc{C: at, A: 0.2, S: []float64{0.9, 0.8, 0.7, 0.6, 0.5}})
	}
	s := NewSystem(discs, c, nil, 1e-13)
	s.Build(1, func() bool { return false })
	return s
}

// TestMixIsReciprocal: amplitudes bring to monopoles what monopoles bring to them, monopoles to each other the same both ways, and many products
// are one product many times.
func TestMixIsReciprocal(t *testing.T) {
	rnd := rand.New(rand.NewPCG(1, 2))
	s := mixed(rnd, -1)
	random := func(n int) []float64 {
		x := make([]float64, n)
		for i := range x {
			x[i] = rnd.NormFloat64()
		}
		return x
	}
	x, z, q := random(s.Len()), random(s.Len()), random(3)
	y, w, mono := make([]float64, s.Len()), make([]float64, s.Len()), make([]float64, s.Len())
	s.Apply(y, x)
	s.Apply(w, z)
	near(t, "product", Dot(y, z), Dot(w, x))
	s.Mono(mono, q)
	mean := make([]float64, 3)
	s.MonoDot(mean, x)
	near(t, "monopoles", Dot(mono, x), Dot(mean, q))
	logs := make([]float64, 3)
	s.Logs(logs, q)
	for i := range logs {
		sum := 0.0
		for j := range q {
			sum += s.Log(i, j) * q[j]
			near(t, "logarithm", s.Log(i, j), s.Log(j, i))
		}
		near(t, "logarithms", logs[i], sum)
	}
	both, out := make([]float64, Many*s.Len()), make([]float64, Many*s.Len())
	for i := range x {
		both[Many*i], both[Many*i+3] = x[i], z[i]
	}
	s.ApplyMany(out, both)
	for i := range y {
		near(t, "many", out[Many*i], y[i])
		near(t, "many", out[Many*i+3], w[i])
	}
}

// TestMixFlow: flows say what products say, and what Answer says.
func TestMixFlow(t *testing.T) {
	rnd := rand.New(rand.NewPCG(3, 4))
	s := mixed(rnd, 1)
	c := s.Charges()
	f := c.NewFlow()
	f.Omega = make([]complex128, s.Top())
	for i := range f.X {
		f.X[i] = rnd.NormFloat64()
	}
	for i := range f.Q {
		f.Q[i] = rnd.NormFloat64()
		f.Through += f.Q[i]
	}
	const more = 0.7
	f.Through += more
	c.Send(f)
	c.Receive(f)
	y := make([]float64, s.Len())
	s.Apply(y, f.X)
	s.Mono(y, f.Q)
	s.Drive(y, more)
	for i, v := range y {
		near(t, "incoming", f.Y[i], v)
	}
	mean, dots := make([]float64, 3), make([]float64, 3)
	s.Logs(mean, f.Q)
	s.MonoDot(dots, f.X)
	s.Rise(mean, more)
	lift, omega := s.Answer(f.X, f.Q, more)
	near(t, "lift", f.Lift, lift)
	for i := range mean {
		near(t, "mean", f.Mean[i]+f.Lift, mean[i]+dots[i])
	}
	for n, w := range omega {
		near(t, "back", real(f.Back[n]), real(w))
		near(t, "back", imag(f.Back[n]), imag(w))
	}
}

func near(t *testing.T, what string, got, want float64) {
	t.Helper()
	if math.Abs(got-want) > 1e-9*(1+math.Abs(want)) {
		t.Errorf("%s: %v, want %v", what, got, want)
	}
}
