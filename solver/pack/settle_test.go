package pack

import (
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"
)

// mixed draws n radii between 1 and ratio, small ones more often.
func mixed(n int, ratio float64, seed uint64) []Disc {
	rng := rand.New(rand.NewPCG(seed, 1))
	out := make([]Disc, n)
	for i := range out {
		u := rng.Float64()
		out[i].R = math.Pow(ratio, u*u)
	}
	return out
}

// fewer is a tenth under -short.
func fewer(n int) int {
	if testing.Short() {
		return n / 10
	}
	return n
}

func alike(n int) []Disc {
	out := make([]Disc, n)
	for i := range out {
		out[i].R = 1
	}
	return out
}

// conduit is a round box that the discs fill to the given share of its area; wireway one of twice its height.
func conduit(discs []Disc, share float64) Box {
	s := 0.0
	for _, d := range discs {
		s += d.R * d.R
	}
	return Box{R: math.Sqrt(s / share)}
}

func wireway(discs []Disc, share float64) Box {
	a := conduit(discs, share).area()
	return Box{W: math.Sqrt(2 * a), H: math.Sqrt(a / 2)}
}

// mustSettle settles and checks what is promised of every result: no overlap, nothing resized, and all at rest.
func mustSettle(t testing.TB, name string, discs []Disc, in Box, seed uint64) []Disc {
	t.Helper()
	out, err := Settle(discs, in, seed)
	if err != nil {
		t.Errorf("%s: %v", name, err)
		return nil
	}
	if i, j, depth := Overlap(out, in); depth > 1e-11*reach(out, in) {
		t.Errorf("%s: %d and %d overlap by %g", name, i, j, depth)
	}
	hanging := 0
	for i, d := range out {
		switch {
		case d.R != discs[i].R || d.Fixed != discs[i].Fixed:
			t.Errorf("%s: disc %d came back as %v", name, i, d)
		case d.Fixed && d != discs[i]:
			t.Errorf("%s: the fixed disc %d moved to %v", name, i, d)
		case !d.Fixed && !rests(out, i, in):
			hanging++
		}
	}
	if hanging > 0 {
		t.Errorf("%s: %d discs hang in the air", name, hanging)
	}
	return out
}

// rests reports whether the things that disc i touches hold it up: their pushes can be mixed into one that points straight up.
func rests(discs []Disc, i int, in Box) bool {
	tol := 1e-9 * reach(discs, in)
	var push [][2]float64
	add := func(gap, nx, ny float64) {
		if gap < tol {
			push = append(push, [2]float64{nx, ny})
		}
	}
	d := discs[i]
	if in.round() {
		h := math.Hypot(d.X, d.Y)
		add(in.R-h-d.R, -d.X/h, -d.Y/h)
	} else {
		add(d.X-d.R, 1, 0)
		add(in.W-d.X-d.R, -1, 0)
		add(d.Y-d.R, 0, 1)
	}
	for j, e := range discs {
		if h := math.Hypot(d.X-e.X, d.Y-e.Y); j != i {
			add(h-d.R-e.R, (d.X-e.X)/h, (d.Y-e.Y)/h)
		}
	}
	for _, p := range push {
		if p[1] > 1-1e-9 {
			return true
		}
		for _, q := range push {
			if p[0] <= 0 && q[0] >= 0 && q[0]*p[1]-p[0]*q[1] > -1e-6 {
				return true
			}
		}
	}
	return false
}

func TestSettleHoldsItsPromises(t *testing.T) {
	for _, n := range []int{1, 2, 3, 7, 20, 60, fewer(150)} {
		for _, ratio := range []float64{1, 3, 10, 50} {
			discs := mixed(n, ratio, uint64(n))
			for _, share := range []float64{0.1, 0.3, 0.45} {
				mustSettle(t, fmt.Sprintf("n %d ratio %g conduit %g", n, ratio, share), discs, conduit(discs, share), 1)
				if in := wireway(discs, share); 2.1*slices.MaxFunc(discs, bySize).R < in.H {
					mustSettle(t, fmt.Sprintf("n %d ratio %g wireway %g", n, ratio, share), discs, in, 1)
				}
			}
		}
	}
}

func bySize(a, b Disc) int { return int(math.Copysign(1, a.R-b.R)) }

// TestSettleClosedForms: where few equal discs come to rest by symmetry. Two lie side by side on the wall. Of three in a wide conduit (cradled) one lies at
// the bottom and two beside it.
func TestSettleClosedForms(t *testing.T) {
	const tol = 1e-8
	one := mustSettle(t, "one", alike(1), Box{R: 3}, 1)
	if math.Hypot(one[0].X, one[0].Y+2) > tol {
		t.Errorf("one: %v", one)
	}
	for _, d := range mustSettle(t, "two", alike(2), Box{R: 3}, 1) {
		if math.Abs(math.Abs(d.X)-1) > tol || math.Abs(d.Y+math.Sqrt(3)) > tol {
			t.Errorf("two: %v", d)
		}
	}
	// Centres on the circle of radius 4 at angles 0 and ±2 asin(1/4) from the bottom.
	turn := 2 * math.Asin(0.25)
	for _, d := range mustSettle(t, "three", alike(3), Box{R: 5}, 1) {
		a := math.Abs(math.Atan2(d.X, -d.Y))
		if math.Abs(math.Hypot(d.X, d.Y)-4) > tol || min(a, math.Abs(a-turn)) > tol {
			t.Errorf("three: %v", d)
		}
	}
	// On a level floor: in contact, about the middle.
	var xs []float64
	for _, d := range mustSettle(t, "floor", alike(5), Box{W: 20, H: 6}, 1) {
		xs = append(xs, d.X)
		if math.Abs(d.Y-1) > tol {
			t.Errorf("floor: %v", d)
		}
	}
	slices.Sort(xs)
	for k, x := range xs {
		if math.Abs(x-(6+2*float64(k))) > tol {
			t.Errorf("floor: places %v", xs)
			break
		}
	}
}

// TestSettleTightEquals: equal circles in a holder 5 % larger than the best known (circle_packing.csv) always go in.
func TestSettleTightEquals(t *testing.T) {
	ref := bestKnown(t)
	for n := 1; n <= 37; n++ {
		mustSettle(t, fmt.Sprintf("%d equals", n), alike(n), Box{R: 1.05 * ref[n]}, uint64(n))
	}
}

// TestSettleToTheLastDigit: a holder that the discs fill exactly still takes them.
func TestSettleToTheLastDigit(t *testing.T) {
	for _, n := range []int{1, 2, 3, 4, 5, 7, 8, 12, 19} {
		_, r := SmallestHolder(equals(n, 1), 1)
		mustSettle(t, fmt.Sprintf("%d equals", n), alike(n), Box{R: r}, 1)
	}
	mustSettle(t, "slot", alike(4), Box{W: 8, H: 2}, 1)
}

// TestSettleSeventyPercent: mixed discs go in up to 70 % of the area.
func TestSettleSeventyPercent(t *testing.T) {
	for _, n := range []int{20, 60, fewer(200)} {
		for _, ratio := range []float64{1.5, 5, 30} {
			for seed := range uint64(2) {
				discs := mixed(n, ratio, seed)
				mustSettle(t, fmt.Sprintf("n %d ratio %g seed %d conduit", n, ratio, seed), discs, conduit(discs, 0.7), seed)
				mustSettle(t, fmt.Sprintf("n %d ratio %g seed %d wireway", n, ratio, seed), discs, wireway(discs, 0.7), seed)
			}
		}
	}
}

func TestSettleSeed(t *testing.T) {
	discs := mixed(40, 4, 9)
	in := conduit(discs, 0.5)
	a, b, c := mustSettle(t, "a", discs, in, 5), mustSettle(t, "b", discs, in, 5), mustSettle(t, "c", discs, in, 6)
	if !slices.Equal(a, b) {
		t.Error("the same seed gave two results")
	}
	if slices.Equal(a, c) {
		t.Error("another seed gave the same result")
	}
}

// TestSettleKeepsFixed: discs held in mid-air stay, and others come to lie on them.
func TestSettleKeepsFixed(t *testing.T) {
	for seed := range uint64(10) {
		discs := mixed(30, 3, seed)
		in := conduit(discs, 0.35)
		discs[3] = Disc{X: 0, Y: -in.R / 2, R: discs[3].R, Fixed: true}
		discs[8] = Disc{X: in.R / 2, Y: 0, R: discs[8].R, Fixed: true}
		mustSettle(t, fmt.Sprint("seed ", seed), discs, in, seed)
	}
}

func TestSettleRefuses(t *testing.T) {
	for _, c := range []struct {
		name  string
		discs []Disc
		in    Box
		want  string
	}{
		{"no wall", alike(3), Box{}, "without a holder"},
		{"too large", []Disc{{R: 1}, {R: 3}}, Box{R: 2}, "part number 2 is larger"},
		{"too wide", []Disc{{R: 1}, {R: 3}}, Box{W: 20, H: 5}, "part number 2 is larger"},
		{"not a number", []Disc{{R: math.NaN()}}, Box{R: 2}, "part number 1 has no size"},
		{"nothing", []Disc{{R: 1}, {}}, Box{R: 2}, "part number 2 has no size"},
		{"too full", alike(20), Box{R: 4.7}, "fill 91 %"},
		{"more than full", alike(20), Box{R: 4}, "fill 125 %"},
		{"held in the wall", []Disc{{R: 1}, {X: 3.5, R: 1, Fixed: true}}, Box{R: 4}, "part number 2 is held"},
		{"held in each other", []Disc{{R: 1, Fixed: true}, {R: 0.5}, {X: 1, R: 1, Fixed: true}}, Box{R: 4}, "part number 3 is held"},
	} {
		out, err := Settle(c.discs, c.in, 1)
		if err == nil || out != nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: %v, %v, want %q", c.name, out, err, c.want)
		}
		if strings.Contains(fmt.Sprint(err), "\n") || strings.HasSuffix(fmt.Sprint(err), ".") {
			t.Errorf("%s: not one sentence: %v", c.name, err)
		}
	}
	if _, err := Settle(nil, Box{}, 1); !errors.Is(err, ErrNoWall) {
		t.Errorf("no wall: %v", err)
	}
	if out, err := Settle(nil, Box{R: 1}, 1); len(out) != 0 || err != nil {
		t.Errorf("nothing to settle: %v, %v", out, err)
	}
}

func BenchmarkSettle(b *testing.B) {
	for _, n := range []int{37, 200, 500} {
		for _, share := range []float64{0.45, 0.7} {
			b.Run(fmt.Sprintf("n=%d/fill=%g", n, share), func(b *testing.B) {
				discs := mixed(n, 5, 3)
				in := conduit(discs, share)
				for b.Loop() {
					if _, err := Settle(discs, in, 1); err != nil {
						b.Fatal(err)
					}
				}
			})
		}
	}
}
