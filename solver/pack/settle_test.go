package pack

import (
	"math"
	"math/rand/v2"
	"testing"
)

// mixed draws n radii between 1 and ratio, small ones more often.
func mixed(n int, ratio float64, seed uint64) []Disc {
	rng := rand.New(rand.NewPCG(seed, 1))
	out := make([]Disc, n)
	for i := range out {
		out[i].R = math.Pow(ratio, math.Pow(rng.Float64(), 2))
	}
	return out
}

// conduit is a round box that the discs fill to the given share of its area.
func conduit(discs []Disc, fill float64) Box {
	s := 0.0
	for _, d := range discs {
		s += d.R * d.R
	}
	return Box{R: math.Sqrt(s / fill)}
}

func TestSettleNeverOverlaps(t *testing.T) {
	for _, n := range []int{1, 2, 3, 7, 20, 100} {
		for _, ratio := range []float64{1, 3, 10, 50} {
			discs := mixed(n, ratio, uint64(n))
			for _, f := range []float64{0.1, 0.3, 0.45} {
				in := conduit(discs, f)
				out, err := Settle(discs, in, 1)
				if err != nil {
					t.Errorf("n %d ratio %g fill %g: %v", n, ratio, f, err)
					continue
				}
				if i, j, depth := Overlap(out, in); depth > 1e-11*in.R {
					t.Errorf("n %d ratio %g fill %g: %d and %d overlap by %g", n, ratio, f, i, j, depth)
				}
			}
		}
	}
}

func BenchmarkSettle37(b *testing.B)  { benchSettle(b, 37) }
func BenchmarkSettle200(b *testing.B) { benchSettle(b, 200) }
func BenchmarkSettle500(b *testing.B) { benchSettle(b, 500) }

func benchSettle(b *testing.B, n int) {
	discs := mixed(n, 5, 3)
	in := conduit(discs, 0.45)
	for b.Loop() {
		if _, err := Settle(discs, in, 1); err != nil {
			b.Fatal(err)
		}
	}
}
