package section

import (
	"math"
	"testing"
)

func TestInnerR(t *testing.T) {
	round := Shape{Rings: []Ring{{R1: 3}}}
	if round.InnerR() != 3 {
		t.Errorf("round: %g, want 3", round.InnerR())
	}
	bar := Shape{At: Point{5, 1}, Rings: []Ring{{R1: math.Hypot(4, 2)}}, Loops: [][]Point{{{1, -1}, {9, -1}, {9, 3}, {1, 3}}}}
	if r := bar.InnerR(); math.Abs(r-2) > 1e-12 {
		t.Errorf("bar of 8 × 4: %g, want 2", r)
	}
	if bar.OuterR() != math.Hypot(4, 2) {
		t.Error("its circle is another")
	}
}
