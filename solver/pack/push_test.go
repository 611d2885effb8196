package pack

import (
	"fmt"
	"math/rand/v2"
	"testing"
)

// lying returns settled discs.
func lying(t testing.TB, n int, ratio, fill float64, seed uint64) ([]Disc, Box) {
	t.Helper()
	discs := mixed(n, ratio, seed)
	in := conduit(discs, fill)
	out, err := Settle(discs, in, seed)
	if err != nil {
		t.Fatal(err)
	}
	return out, in
}

// dragged moves a disc to a random place near by.
func dragged(discs []Disc, in Box, seed uint64) int {
	rng := rand.New(rand.NewPCG(seed, 2))
	i := rng.IntN(len(discs))
	d := &discs[i]
	d.X, d.Y, _ = in.clamp(d.X+2*rng.NormFloat64(), d.Y+2*rng.NormFloat64(), d.R)
	return i
}

func TestPushApartKeepsTheHeldDisc(t *testing.T) {
	for seed := range uint64(40) {
		discs, in := lying(t, 30, 4, 0.45, seed)
		held := dragged(discs, in, seed)
		got, ok := PushApart(discs, in, held, 0)
		if !ok {
			t.Errorf("seed %d: no place found", seed)
			continue
		}
		if got[held] != discs[held] {
			t.Errorf("seed %d: the held disc went from %v to %v", seed, discs[held], got[held])
		}
		if i, j, depth := Overlap(got, in); depth > 1e-9*in.R {
			t.Errorf("seed %d: %d and %d overlap by %g", seed, i, j, depth)
		}
	}
}

func BenchmarkPushApart(b *testing.B) {
	for _, n := range []int{37, 200} {
		for _, fill := range []float64{0.4, 0.65} {
			b.Run(fmt.Sprintf("n=%d/fill=%g", n, fill), func(b *testing.B) {
				discs, in := lying(b, n, 4, fill, 1)
				seed := uint64(0)
				for b.Loop() {
					out := append([]Disc(nil), discs...)
					held := dragged(out, in, seed)
					PushApart(out, in, held, 0)
					seed++
				}
			})
		}
	}
}
