package pack

import (
	"math"
	"testing"
)

func TestOverlap(t *testing.T) {
	for _, c := range []struct {
		name  string
		discs []Disc
		in    Box
		i, j  int
		depth float64
	}{
		{"none", nil, Box{R: 1}, -1, -1, math.Inf(-1)},
		{"alone without a wall", []Disc{{R: 1}}, Box{}, 0, -1, math.Inf(-1)},
		{"touching", []Disc{{R: 1}, {X: 3, R: 2}}, Box{}, 0, 1, 0},
		{"apart", []Disc{{R: 1}, {X: 5, R: 2}}, Box{}, 0, 1, -2},
		{"deeper of two", []Disc{{R: 1}, {X: 1.5, R: 1}, {X: 3, R: 1.25}}, Box{}, 1, 2, 0.75},
		{"round wall", []Disc{{X: 3, Y: 4, R: 1}}, Box{R: 5.5}, 0, -1, 0.5},
		{"floor", []Disc{{X: 3, Y: 0.75, R: 1}}, Box{W: 6, H: 9}, 0, -1, 0.25},
		{"right side", []Disc{{X: 5.5, Y: 2, R: 1}}, Box{W: 6, H: 9}, 0, -1, 0.5},
		{"wall deeper than disc", []Disc{{X: 1, Y: 1, R: 1}, {X: 2.75, Y: 0.5, R: 1}}, Box{W: 6, H: 9}, 1, -1, 0.5},
		{"one upon the other", []Disc{{X: 1, R: 1}, {X: 1, R: 1}}, Box{}, 0, 1, 2},
	} {
		i, j, depth := Overlap(c.discs, c.in)
		if len(c.discs) == 1 && c.in.open() {
			i, j = c.i, c.j // nothing to overlap: any answer will do
		}
		if i != c.i || j != c.j || math.Abs(depth-c.depth) > 1e-15 && depth != c.depth {
			t.Errorf("%s: %d %d %g, want %d %d %g", c.name, i, j, depth, c.i, c.j, c.depth)
		}
	}
}

// TestOverlapFindsTheDeepest compares with plain arithmetic over all pairs.
func TestOverlapFindsTheDeepest(t *testing.T) {
	for seed := range uint64(100) {
		discs := nasty(2+int(seed)%30, seed)
		in := Box{R: 4}
		want := math.Inf(-1)
		for a, p := range discs {
			want = max(want, math.Hypot(p.X, p.Y)+p.R-in.R)
			for _, q := range discs[:a] {
				want = max(want, p.R+q.R-math.Hypot(p.X-q.X, p.Y-q.Y))
			}
		}
		if _, _, depth := Overlap(discs, in); math.Abs(depth-want) > 1e-14 {
			t.Errorf("seed %d: %g, want %g", seed, depth, want)
		}
	}
}
