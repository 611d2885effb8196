package pack

import (
	"math"
	"math/rand/v2"
	"slices"
	"testing"
)

// TestEncloseClosedForms: plane geometry; 1+2/√3 is the ratio for three touching equals.
func TestEncloseClosedForms(t *testing.T) {
	h := math.Sqrt(3)
	for _, c := range []struct {
		name    string
		discs   []Disc
		x, y, r float64
	}{
		{"none", nil, 0, 0, 0},
		{"one", []Disc{{3, 4, 2, false}}, 3, 4, 2},
		{"two", []Disc{{-3, 0, 1, false}, {4, 0, 2, false}}, 1, 0, 5},
		{"one inside another", []Disc{{0, 0, 5, false}, {1, 1, 2, false}}, 0, 0, 5},
		{"touching inside", []Disc{{3, 0, 2, false}, {0, 0, 5, false}}, 0, 0, 5},
		{"the same twice", []Disc{{1, 2, 3, false}, {1, 2, 3, false}}, 1, 2, 3},
		{"three touching", []Disc{{-1, 0, 1, false}, {1, 0, 1, false}, {0, h, 1, false}}, 0, h / 3, 1 + 2/h},
		{"points", []Disc{{0, 0, 0, false}, {6, 0, 0, false}, {0, 8, 0, false}, {1, 1, 0, false}}, 3, 4, 5},
		{"in line", []Disc{{0, 0, 1, false}, {2, 0, 1, false}, {4, 0, 1, false}, {6, 0, 1, false}}, 3, 0, 4},
	} {
		x, y, r := Enclose(c.discs)
		if math.Hypot(x-c.x, y-c.y) > 1e-12 || math.Abs(r-c.r) > 1e-12 {
			t.Errorf("%s: %g %g %g, want %g %g %g", c.name, x, y, r, c.x, c.y, c.r)
		}
	}
}

// TestEncloseIsLeast: the circle holds all discs, and the touched ones leave no half-plane free, without which a smaller circle would do.
func TestEncloseIsLeast(t *testing.T) {
	for seed := range uint64(500) {
		discs := nasty(1+int(seed)%40, seed)
		x, y, r := Enclose(discs)
		var at []float64
		same := false
		for i, d := range discs {
			h := math.Hypot(d.X-x, d.Y-y)
			if h+d.R > r*(1+1e-12) {
				t.Errorf("seed %d: disc %d sticks out by %g", seed, i, h+d.R-r)
			}
			if h+d.R > r-1e-8 {
				at = append(at, math.Atan2(d.Y-y, d.X-x))
				same = same || h < 1e-9
			}
		}
		slices.Sort(at)
		widest := at[0] + 2*math.Pi - at[len(at)-1]
		for k := range at[1:] {
			widest = max(widest, at[k+1]-at[k])
		}
		if !same && widest > math.Pi+1e-6 {
			t.Errorf("seed %d: nothing touched over %g of the circle", seed, widest)
		}
	}
}

func TestEncloseOrder(t *testing.T) {
	for seed := range uint64(50) {
		discs := nasty(25, seed)
		_, _, r := Enclose(discs)
		rand.New(rand.NewPCG(seed, 6)).Shuffle(len(discs), func(i, j int) { discs[i], discs[j] = discs[j], discs[i] })
		if _, _, other := Enclose(discs); math.Abs(other-r) > 1e-12*r {
			t.Errorf("seed %d: radius %.15g and in another order %.15g", seed, r, other)
		}
	}
}
