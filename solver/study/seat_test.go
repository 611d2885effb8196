package study

import (
	"context"
	"fmt"
	"math"
	"strings"
	"testing"

	"packrise/solver/section"
)

// hex7 is seven equal wires in a filled jacket, those named loaded.
func hex7(t *testing.T, extra string, loaded ...int) *section.Document {
	t.Helper()
	var b strings.Builder
	b.WriteString(`
packrise: 1
surroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 12}
holder: {kind: jacket, inside_mm: 12.2, fill: sand, layers: [{material: ins, thickness_mm: 1}]}
materials: {sand: {k_w_mk: 0.25}, ins: {k_w_mk: 0.2}}
parts:
`)
	for i := range 7 {
		x, y := 0.0, 0.0
		if i > 0 {
			x, y = 4*math.Cos(float64(i)*math.Pi/3), 4*math.Sin(float64(i)*math.Pi/3)
		}
		fmt.Fprintf(&b, "  - {id: W%d, kind: core, conductor: {area_mm2: 2.5}, layers: [{material: ins, thickness_mm: 0.9}], at_mm: [%.5f, %.5f], limit_c: 70%s}\n", i, x, y, extra)
	}
	b.WriteString("loads:\n")
	for i := range 7 {
		a := 0
		for _, l := range loaded {
			if l == i {
				a = 30
			}
		}
		fmt.Fprintf(&b, "  - {id: l%d, conductors: [W%d], current_a: %d}\n", i, i, a)
	}
	return read(t, b.String())
}

// TestSeatFindsTheBest against all ways to seat two and three loaded wires of seven, solved in full.
func TestSeatFindsTheBest(t *testing.T) {
	s := New(cat)
	ctx := context.Background()
	for _, loaded := range [][]int{{0, 1}, {0, 1, 2}} {
		d := hex7(t, "", loaded...)
		got, err := s.Seat(ctx, d, 1, Options{})
		if err != nil {
			t.Fatal(err)
		}
		best := math.Inf(-1)
		for mask := range 1 << 7 {
			var of []int
			for i := range 7 {
				if mask>>i&1 == 1 {
					of = append(of, i)
				}
			}
			if len(of) != len(loaded) {
				continue
			}
			r, err := s.solve(ctx, hex7(t, "", of...), Options{})
			if err != nil {
				t.Fatal(err)
			}
			seat, _ := seatOf(r)
			best = math.Max(best, seat.MarginK)
		}
		if got.Best.MarginK < best-0.05 || got.Best.MarginK > best+0.05 || got.Best.MarginK <= got.Present.MarginK || got.Best.Factor <= got.Present.Factor {
			t.Errorf("%d loaded: found %.3f K, the best of all %.3f K, at first %.3f K", len(loaded), got.Best.MarginK, best, got.Present.MarginK)
		}
		if !(got.WorstK <= got.MeanK && got.MeanK <= got.Best.MarginK+0.1) || len(got.Swaps) == 0 {
			t.Errorf("mean %.2f K, worst %.2f K, best %.2f K, %d moved", got.MeanK, got.WorstK, got.Best.MarginK, len(got.Swaps))
		}
		t.Logf("%d loaded: %.2f → %.2f K, random mean %.2f, worst %.2f; %d judged, %d solved", len(loaded), got.Present.MarginK, got.Best.MarginK, got.MeanK, got.WorstK, got.Searched, got.Solved)
		again, err := New(cat).Seat(ctx, d, 1, Options{})
		if err != nil || fmt.Sprint(again.Swaps) != fmt.Sprint(got.Swaps) {
			t.Errorf("the same seed gives %v, then %v (%v)", got.Swaps, again.Swaps, err)
		}
	}
}

// TestSeatRespects pins and groups.
func TestSeatRespects(t *testing.T) {
	s := New(cat)
	ctx := context.Background()
	pinned, err := s.Seat(ctx, hex7(t, ", pinned: true", 0, 1), 1, Options{})
	if err != nil || pinned.Why == "" || pinned.Movable != 0 || len(pinned.Swaps) != 0 {
		t.Errorf("pinned: %+v, %v", pinned, err)
	}
	d := hex7(t, "", 0, 1, 2)
	for _, id := range []string{"W0", "W1", "W3"} {
		d = section.SetGroup(d, id, "g")
	}
	got, err := s.Seat(ctx, d, 1, Options{})
	if err != nil {
		t.Fatal(err)
	}
	places := map[section.Point]bool{}
	for _, id := range []string{"W0", "W1", "W3"} {
		places[section.Find(d, id).At.V] = true
	}
	for _, id := range []string{"W0", "W1", "W3"} {
		if !places[section.Find(got.Doc, id).At.V] {
			t.Errorf("%s left its group", id)
		}
	}
	if len(section.Check(got.Doc)) > 0 {
		t.Error(section.Check(got.Doc))
	}
	ctx, stop := context.WithCancel(ctx)
	stop()
	if _, err := s.Seat(ctx, hex7(t, "", 0, 1), 1, Options{}); err == nil {
		t.Error("cancelled and no word of it")
	}
}

func BenchmarkSeat(b *testing.B) {
	raw := demo(b, "robot-umbilical")
	for b.Loop() {
		if _, err := New(cat).Seat(context.Background(), raw, 1, Options{AssumeIdle: true}); err != nil {
			b.Fatal(err)
		}
	}
}
