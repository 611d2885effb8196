package pack

import (
	"math/rand/v2"
	"testing"
)

func TestPushApartKeepsTheHeldDisc(t *testing.T) {
	for seed := range uint64(20) {
		discs := mixed(30, 4, seed)
		in := conduit(discs, 0.35)
		out, err := Settle(discs, in, seed)
		if err != nil {
			t.Fatal(err)
		}
		rng := rand.New(rand.NewPCG(seed, 2))
		held := rng.IntN(len(out))
		out[held].X, out[held].Y, _ = in.clamp(out[held].X+4*rng.NormFloat64(), out[held].Y+4*rng.NormFloat64(), out[held].R)
		got, ok := PushApart(out, in, held, 0)
		if !ok {
			t.Errorf("seed %d: no place found", seed)
			continue
		}
		if got[held] != out[held] {
			t.Errorf("seed %d: the held disc went from %v to %v", seed, out[held], got[held])
		}
		if i, j, depth := Overlap(got, in); depth > 1e-9*in.R {
			t.Errorf("seed %d: %d and %d overlap by %g", seed, i, j, depth)
		}
	}
}
