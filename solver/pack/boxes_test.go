package pack

import (
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"slices"
	"testing"
)

// TestRandomBoxes repeats the promises over random boxes, many more under PACKRISE_SOAK=1. Of 2000, one holds two discs that cannot lie side by side, and three have the dragged disc
// where it leaves no room for the others; a random search found none either.
func TestRandomBoxes(t *testing.T) {
	runs, refused := uint64(120), 0
	switch {
	case os.Getenv("PACKRISE_SOAK") != "":
		runs = 2000
	case testing.Short():
		runs = 30
	}
	for seed := range runs {
		rng := rand.New(rand.NewPCG(seed, 99))
		discs := mixed(1+rng.IntN(1+rng.IntN(120)), math.Pow(50, rng.Float64()), seed)
		share := 0.05 + 0.5*rng.Float64()
		in := conduit(discs, share)
		if rng.IntN(2) == 0 {
			in = wireway(discs, share)
		}
		if most := slices.MaxFunc(discs, bySize).R; 1.3*most > in.room() {
			s := 1.3 * most / in.room()
			in = Box{R: s * in.R, W: s * in.W, H: s * in.H}
		}
		name := fmt.Sprintf("seed %d: %d in %v", seed, len(discs), in)
		if _, err := Settle(discs, in, seed); err != nil {
			refused++
			continue
		}
		out := mustSettle(t, name, discs, in, seed)
		far := in.room() * math.Pow(10, -2*rng.Float64())
		held := dragged(out, in, far, seed)
		if _, ok := PushApart(out, in, held, 0); !ok {
			refused++
			continue
		}
		mustPush(t, name, out, in, held, 0)
	}
	if refused > 4 {
		t.Errorf("%d of %d refused", refused, runs)
	}
}
