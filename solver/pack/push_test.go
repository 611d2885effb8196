package pack

import (
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"testing"
)

// lying returns settled discs.
func lying(t testing.TB, n int, ratio, fill float64, seed uint64) ([]Disc, Box) {
	t.Helper()
	discs := mixed(n, ratio, seed)
	in := conduit(discs, fill)
	return mustSettle(t, "lying", discs, in, seed), in
}

// dragged moves a disc by about the given distance and returns which.
func dragged(discs []Disc, in Box, far float64, seed uint64) int {
	rng := rand.New(rand.NewPCG(seed, 2))
	i := rng.IntN(len(discs))
	d := &discs[i]
	d.X, d.Y, _ = in.clamp(d.X+far*rng.NormFloat64(), d.Y+far*rng.NormFloat64(), d.R)
	return i
}

// mustPush pushes apart and checks what is promised of every result.
func mustPush(t *testing.T, name string, discs []Disc, in Box, held int, gap float64) []Disc {
	t.Helper()
	was := slices.Clone(discs)
	out, ok := PushApart(discs, in, held, gap)
	if !ok {
		t.Errorf("%s: no place found", name)
		return out
	}
	if !slices.Equal(discs, was) {
		t.Errorf("%s: the discs given were changed", name)
	}
	tol := 1e-9 * reach(discs, in)
	for i, d := range out {
		if d.R != discs[i].R || d.Fixed != discs[i].Fixed || (d.Fixed || i == held) && d != discs[i] {
			t.Errorf("%s: disc %d went from %v to %v", name, i, discs[i], d)
		}
		if c := in.clear(d.X, d.Y, d.R); !d.Fixed && c < gap-tol {
			t.Errorf("%s: disc %d has %g to the wall, wanted %g", name, i, c, gap)
		}
		for j, e := range out[:i] {
			if c := math.Hypot(d.X-e.X, d.Y-e.Y) - d.R - e.R; c < gap-tol {
				t.Errorf("%s: discs %d and %d have %g, wanted %g", name, i, j, c, gap)
			}
		}
	}
	return out
}

func TestPushApartKeepsTheHeldDisc(t *testing.T) {
	for seed := range uint64(40) {
		discs, in := lying(t, 30, 4, 0.45, seed)
		held := dragged(discs, in, 2, seed)
		mustPush(t, fmt.Sprint("seed ", seed), discs, in, held, 0)
	}
}

// TestPushApartClosedForms: what is least by symmetry and by projection on a line.
func TestPushApartClosedForms(t *testing.T) {
	two := []Disc{{X: 0, Y: 0, R: 1}, {X: 1.5, Y: 0, R: 1}}
	row := []Disc{{X: 0, R: 1}, {X: 2, R: 1}, {X: 3.7, R: 1}}
	s := 1 / math.Sqrt2
	for _, c := range []struct {
		name  string
		discs []Disc
		in    Box
		held  int
		gap   float64
		want  [][2]float64
	}{
		{"both give way by half", two, Box{}, -1, 0, [][2]float64{{-0.25, 0}, {1.75, 0}}},
		{"the other gives way", two, Box{}, 0, 0, [][2]float64{{0, 0}, {2, 0}}},
		{"with a gap", two, Box{}, 1, 0.25, [][2]float64{{-0.75, 0}, {1.5, 0}}},
		// Least squares: pushes λ₁, λ₂ at the two contacts with 2λ₂ − λ₁ = 0.3 and 2λ₁ = λ₂.
		{"three in a row", row, Box{}, -1, 0, [][2]float64{{-0.1, 0}, {1.9, 0}, {3.9, 0}}},
		{"against a wall", []Disc{{X: 0.8, Y: 5, R: 1}, {X: 2.8, Y: 5, R: 1}}, Box{W: 10, H: 10}, -1, 0, [][2]float64{{1, 5}, {3, 5}}},
		{"into the round", []Disc{{X: 4, Y: 4, R: 1}}, Box{R: 4}, -1, 0, [][2]float64{{3 * s, 3 * s}}},
		{"held too, when the wall forbids", []Disc{{X: 9.5, Y: 5, R: 1}}, Box{W: 10, H: 10}, 0, 0.5, [][2]float64{{8.5, 5}}},
		{"held beside a fixed one", []Disc{{X: 5, Y: 5, R: 1, Fixed: true}, {X: 5, Y: 6, R: 1}}, Box{W: 10, H: 10}, 1, 0, [][2]float64{{5, 5}, {5, 7}}},
		{"nothing to do", []Disc{{X: 5, Y: 5, R: 1}, {X: 7, Y: 5, R: 1}}, Box{W: 10, H: 10}, 1, 0, [][2]float64{{5, 5}, {7, 5}}},
	} {
		out, ok := PushApart(c.discs, c.in, c.held, c.gap)
		if !ok {
			t.Errorf("%s: no place found", c.name)
		}
		for i, w := range c.want {
			if math.Hypot(out[i].X-w[0], out[i].Y-w[1]) > 1e-5 {
				t.Errorf("%s: disc %d at %.9f %.9f, want %v", c.name, i, out[i].X, out[i].Y, w)
			}
		}
	}
}

// TestPushApartMovesLeast: no small change of the result without overlap lies nearer to the places given.
func TestPushApartMovesLeast(t *testing.T) {
	for seed := range uint64(15) {
		discs, in := lying(t, 12, 3, 0.4, seed)
		held := dragged(discs, in, 0.5, seed)
		out := mustPush(t, fmt.Sprint("seed ", seed), discs, in, held, 0)
		cost := func(o []Disc) (sum float64) {
			for i := range o {
				sum += math.Pow(o[i].X-discs[i].X, 2) + math.Pow(o[i].Y-discs[i].Y, 2)
			}
			return sum
		}
		least := cost(out)
		rng := rand.New(rand.NewPCG(seed, 3))
		for range 2000 {
			other := slices.Clone(out)
			far := math.Pow(10, -1-3*rng.Float64())
			for i := range other {
				if i != held {
					// Half of them straight back, half anywhere.
					back := rng.Float64() * far
					other[i].X += back*(discs[i].X-out[i].X) + back*rng.NormFloat64()
					other[i].Y += back*(discs[i].Y-out[i].Y) + back*rng.NormFloat64()
				}
			}
			if _, _, depth := Overlap(other, in); depth <= 0 && cost(other) < least*(1-1e-3) {
				t.Errorf("seed %d: moved %g, and %g would do", seed, least, cost(other))
				break
			}
		}
	}
}

// TestPushApartLeavesOthersAlone: what is far from the overlap stays to the last bit.
func TestPushApartLeavesOthersAlone(t *testing.T) {
	var discs []Disc
	for i := range 10 {
		for j := range 10 {
			discs = append(discs, Disc{X: 1 + 2*float64(i), Y: 1 + 3*float64(j), R: 1})
		}
	}
	discs[37].Y += 1.3
	out := mustPush(t, "grid", discs, Box{W: 20, H: 40}, -1, 0)
	for i, d := range out {
		if (i == 37 || i == 38) == (d == discs[i]) {
			t.Errorf("disc %d went from %v to %v", i, discs[i], d)
		}
	}
}

// TestPushApartDrag pulls a large disc across a full conduit in steps of a frame, each from where the last left the others.
func TestPushApartDrag(t *testing.T) {
	discs, in := lying(t, 60, 4, 0.5, 3)
	held := 0
	for i, d := range discs {
		if d.R > discs[held].R {
			held = i
		}
	}
	for frame := range 60 {
		a := in.R - discs[held].R
		s, c := math.Sincos(float64(frame) / 10)
		discs[held].X, discs[held].Y = 0.8*a*s, -0.8*a*c*math.Cos(float64(frame)/17)
		discs = mustPush(t, fmt.Sprint("frame ", frame), discs, in, held, 0)
	}
}

// TestPushApartHops: discs that stand in the way with no room to give way go elsewhere.
func TestPushApartHops(t *testing.T) {
	for _, c := range []struct {
		name  string
		discs []Disc
		in    Box
		held  int
	}{
		{"in line with the wall", []Disc{{X: 1, Y: 3, R: 1}, {X: 2.2, Y: 3, R: 1}}, Box{W: 8, H: 6}, 1},
		{"in the end of a slot", []Disc{{X: 1, Y: 1, R: 1}, {X: 1.5, Y: 1, R: 1}}, Box{W: 8, H: 2}, 1},
		{"one upon the other", []Disc{{X: 3, Y: 3, R: 1}, {X: 3, Y: 3, R: 1}, {X: 3, Y: 3, R: 0.5}}, Box{R: 6}, 0},
		{"all in one place", slices.Repeat([]Disc{{X: 1, Y: 1, R: 1}}, 20), Box{R: 7}, 5},
		{"behind a fixed one", []Disc{{X: 4, Y: 1, R: 1, Fixed: true}, {X: 1, Y: 1, R: 1}, {X: 1.5, Y: 1, R: 1}}, Box{W: 12, H: 2}, 2},
	} {
		mustPush(t, c.name, c.discs, c.in, c.held, 0)
	}
}

func TestPushApartGivesUp(t *testing.T) {
	for _, c := range []struct {
		name  string
		discs []Disc
		in    Box
		held  int
		gap   float64
	}{
		{"too many", alike(30), Box{R: 5}, 3, 0},
		{"too large", []Disc{{R: 3}}, Box{R: 2}, -1, 0},
		{"too large with the gap", []Disc{{R: 1.9}}, Box{R: 2}, -1, 0.2},
		{"held in the middle of a full slot", []Disc{{X: 2, Y: 1, R: 1}, {X: 1, Y: 1, R: 1}, {X: 3, Y: 1, R: 1}}, Box{W: 5.9, H: 2}, 0, 0},
		{"two fixed in one place", []Disc{{X: 2, Y: 1, R: 1, Fixed: true}, {X: 1, Y: 1, R: 1, Fixed: true}}, Box{W: 6, H: 2}, -1, 0},
		{"not a number", []Disc{{X: math.NaN(), R: 1}, {R: 1}}, Box{R: 5}, -1, 0},
	} {
		was := slices.Clone(c.discs)
		out, ok := PushApart(c.discs, c.in, c.held, c.gap)
		if ok {
			t.Errorf("%s: found a place %v", c.name, out)
		}
		for i := range was {
			if out[i].R != was[i].R || out[i].Y != was[i].Y {
				t.Errorf("%s: disc %d went from %v to %v", c.name, i, was[i], out[i])
			}
		}
	}
}

func TestPushApartTwice(t *testing.T) {
	discs, in := lying(t, 40, 4, 0.5, 2)
	held := dragged(discs, in, 1, 1)
	a := mustPush(t, "once", discs, in, held, 0)
	b := mustPush(t, "twice", discs, in, held, 0)
	if !slices.Equal(a, b) {
		t.Error("the same call gave two results")
	}
	if c := mustPush(t, "again", a, in, held, 0); !slices.Equal(a, c) {
		t.Error("what was apart was moved")
	}
}

func BenchmarkPushApart(b *testing.B) {
	for _, n := range []int{37, 200} {
		for _, far := range []float64{0.1, 1} {
			b.Run(fmt.Sprintf("n=%d/step=%g", n, far), func(b *testing.B) {
				discs, in := lying(b, n, 4, 0.5, 1)
				seed := uint64(0)
				for b.Loop() {
					out := slices.Clone(discs)
					held := dragged(out, in, far, seed)
					PushApart(out, in, held, 0)
					seed++
				}
			})
		}
	}
}

// BenchmarkPushApartJammed drags in a cable with no room to give way: most calls fail.
func BenchmarkPushApartJammed(b *testing.B) {
	for _, n := range []int{37, 61, 200} {
		b.Run(fmt.Sprintf("n=%d", n), func(b *testing.B) {
			discs, r := SmallestHolder(equals(n, 1), 1)
			seed, failed := uint64(0), 0
			for b.Loop() {
				out := slices.Clone(discs)
				held := dragged(out, Box{R: r}, 0.5, seed)
				if _, ok := PushApart(out, Box{R: r}, held, 0); !ok {
					failed++
				}
				seed++
			}
			b.ReportMetric(float64(failed)/float64(b.N), "failed")
		})
	}
}
