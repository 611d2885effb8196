package ui

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/section"
)

func near(t *testing.T, what string, got, want section.Point, tol float64) {
	t.Helper()
	if math.Hypot(got.X-want.X, got.Y-want.Y) > tol {
		t.Errorf("%s: held at (%.5f, %.5f), want (%.5f, %.5f)", what, got.X, got.Y, want.X, want.Y)
	}
}

// The wanted places are plain geometry: a touching circle, two touching circles, a circle inside a circle or a box.
func TestNearestFree(t *testing.T) {
	pt := func(x, y float64) section.Point { return section.Point{X: x, Y: y} }
	for _, c := range []struct {
		name   string
		want   disc
		others []disc
		in     room
		at     section.Point
	}{
		{"free already", disc{pt(3, 1), 1}, []disc{{pt(0, 0), 1}}, room{r: 10}, pt(3, 1)},
		{"beside one", disc{pt(1, 0), 1}, []disc{{pt(0, 0), 1}}, room{r: 10}, pt(2, 0)},
		{"on the centre of one", disc{pt(0, 0), 1}, []disc{{pt(0, 0), 1}}, room{r: 10}, pt(0, 2)},
		{"against the wall", disc{pt(20, 0), 1}, nil, room{r: 10}, pt(9, 0)},
		{"in the valley of two", disc{pt(0, 0.3), 1}, []disc{{pt(-1, 0), 1}, {pt(1, 0), 1}}, room{}, pt(0, math.Sqrt(3))},
		{"between one and the wall", disc{pt(9, 0.5), 1}, []disc{{pt(9, 0), 1}}, room{r: 10}, pt(9*math.Cos(2*math.Asin(1.0/9)), 9*math.Sin(2*math.Asin(1.0/9)))},
		{"corner of a box", disc{pt(-5, -5), 1}, nil, room{w: 10, h: 8}, pt(1, 1)},
		{"floor of a box", disc{pt(4, -5), 1}, nil, room{w: 10, h: 8}, pt(4, 1)},
		{"floor beside one", disc{pt(4.5, 0.5), 1}, []disc{{pt(4, 1), 1}}, room{w: 10, h: 8}, pt(6, 1)},
		{"bundle without a wall", disc{pt(100, 100), 1}, []disc{{pt(0, 0), 1}}, room{}, pt(100, 100)},
	} {
		t.Run(c.name, func(t *testing.T) {
			at, ok := nearestFree(c.want, c.others, c.in)
			if !ok {
				t.Fatal("no place found")
			}
			near(t, c.name, at, c.at, 1e-3)
		})
	}
}

func TestNoFreePlace(t *testing.T) {
	if at, ok := nearestFree(disc{section.Point{X: 1}, 2}, []disc{{section.Point{}, 2}}, room{r: 3}); ok {
		t.Errorf("found a place at %v where there is none", at)
	}
}

// TestHeldPlaceIsFreeAndNearest drops discs into random sections and compares with a fine grid of places.
func TestHeldPlaceIsFreeAndNearest(t *testing.T) {
	rng := rand.New(rand.NewPCG(7, 11))
	rounds := 200
	if testing.Short() {
		rounds = 30
	}
	for range rounds {
		in := room{r: 10}
		if rng.IntN(2) == 0 {
			in = room{w: 18, h: 14}
		}
		random := func(r float64) disc {
			p := section.Point{X: rng.Float64()*24 - 12, Y: rng.Float64()*24 - 12}
			return disc{in.inside(p, r), r}
		}
		var others []disc
		for range 9 {
			if d := random(0.6 + 2*rng.Float64()); free(d, others, in) {
				others = append(others, d)
			}
		}
		want := random(0.5 + 1.5*rng.Float64())
		at, ok := nearestFree(want, others, in)
		best := math.Inf(1)
		for x := -12.0; x <= 18; x += 0.1 {
			for y := -12.0; y <= 14; y += 0.1 {
				if free(disc{section.Point{X: x, Y: y}, want.r}, others, in) {
					best = min(best, math.Hypot(x-want.at.X, y-want.at.Y))
				}
			}
		}
		if !ok {
			if !math.IsInf(best, 1) {
				t.Fatalf("no place found, the grid has one at %.2f mm", best)
			}
			continue
		}
		if !free(disc{at, want.r}, others, in) {
			t.Fatalf("held at (%g, %g), which isn't free", at.X, at.Y)
		}
		if d := math.Hypot(at.X-want.at.X, at.Y-want.at.Y); d > best+1e-9 {
			t.Fatalf("held %.4f mm away, the grid has a place at %.4f mm", d, best)
		}
	}
}

func TestHeldShiftStopsAtContact(t *testing.T) {
	group := []disc{{section.Point{X: -6}, 1}, {section.Point{X: -4}, 1}}
	others := []disc{{section.Point{X: 2}, 1}}
	in := room{r: 10}
	near(t, "free", heldShift(group, others, in, section.Point{}, section.Point{X: 1}), section.Point{X: 1}, 0)
	near(t, "stopped", heldShift(group, others, in, section.Point{}, section.Point{X: 9}), section.Point{X: 4}, 1e-3)
}

func TestRoomOf(t *testing.T) {
	for _, c := range []struct {
		name   string
		shapes []section.Shape
		want   room
	}{
		{"jacket", []section.Shape{{Kind: section.Jacket, Rings: []section.Ring{{R0: 8, R1: 9}}}}, room{r: 8}},
		{"wireway", []section.Shape{{Kind: section.Wireway, Width: 100, Height: 50, Rings: []section.Ring{{R1: 1}}}}, room{w: 100, h: 50}},
		{"bundle", []section.Shape{{Kind: section.OpenBundle, Rings: []section.Ring{{R0: 4, R1: 4}}}}, room{}},
		{"nothing", nil, room{}},
	} {
		if got := roomOf(c.shapes); got != c.want {
			t.Errorf("%s: %+v, want %+v", c.name, got, c.want)
		}
	}
}

func BenchmarkNearestFree200(b *testing.B) {
	var others []disc
	for i := range 200 {
		a, r := float64(i)*2.399963, 1.1*math.Sqrt(float64(i))
		others = append(others, disc{section.Point{X: r * math.Cos(a), Y: r * math.Sin(a)}, 0.9})
	}
	for b.Loop() {
		nearestFree(disc{section.Point{X: 3.1, Y: 2.2}, 0.9}, others, room{r: 18})
	}
}
