package harmonic

import (
	"math/rand/v2"
	"testing"
)

// BenchmarkFlows is all that goes between 91 touching discs in rows, for one vector and for many.
func BenchmarkFlows(b *testing.B) {
	var discs []Disc
	for i := range 91 {
		d := Disc{C: complex(2*float64(i%10)-9, 2*float64(i/10)-9), A: 1}
		for range 12 {
			d.S = append(d.S, 0.8)
		}
		discs = append(discs, d)
	}
	s := NewSystem(discs, &Circle{R: 15, RhoInf: -0.7, Sigma: []float64{0.4, 0.3, 0.2}}, nil, 1e-5)
	s.Build(1, never)
	c := s.Charges()
	r := rand.New(rand.NewPCG(1, 2))
	var flows []*Flow
	for range Many {
		f := c.NewFlow()
		for i := range f.X {
			f.X[i] = r.NormFloat64()
		}
		for j := range f.Q {
			f.Q[j] = r.NormFloat64()
		}
		flows = append(flows, f)
	}
	b.Run("one", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			c.Send(flows[0])
			c.Receive(flows[0])
		}
	})
	b.Run("many", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			c.SendMany(flows)
			c.ReceiveMany(flows)
		}
	})
}
