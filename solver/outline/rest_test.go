package outline

import (
	"math"
	"testing"
)

// TestRest: what is cut out has its share of the perimeter and lies where the ray meets the loop, also across the loop's beginning.
func TestRest(t *testing.T) {
	loops := map[string]Loop{
		"circle": Circle(3), "flat": Flat(8, 2, 0.5), "bar": Bar(6, 3, 0.4, 0.2), "sector": Sector(5, 1.5, 0.6, 0.3).Placed(2, 1-2i),
	}
	for name, l := range loops {
		for _, angle := range []float64{-math.Pi / 2, 0, math.Pi / 4, 1.7, math.Pi, 3.3, 5.9} {
			for _, share := range []float64{0.01, 0.25, 0.6, 0.97} {
				cut, in := l.Rest(angle, share)
				if math.Abs(cut.Perimeter()-l.Perimeter()) > 1e-9*l.Perimeter() {
					t.Fatalf("%s: perimeter %v becomes %v", name, l.Perimeter(), cut.Perimeter())
				}
				blocked, turns := 0.0, 0
				for i := range cut {
					if in[i] {
						blocked += cut[i].Length()
					}
					if in[i] != in[(i+1)%len(in)] {
						turns++
					}
				}
				if math.Abs(blocked-share*l.Perimeter()) > 2e-6*l.Perimeter() || turns != 2 {
					t.Errorf("%s, %v at %v: %v of %v in %d pieces", name, share, angle, blocked, l.Perimeter(), turns/2)
				}
				_, c := l.Area()
				at := l.point(l.Toward(angle)) - c
				if d := math.Remainder(math.Atan2(imag(at), real(at))-angle, 2*math.Pi); math.Abs(d) > 1e-9 {
					t.Errorf("%s: the ray at %v meets it at %v", name, angle, angle+d)
				}
			}
		}
	}
}

// point is the point at length s along the loop.
func (l Loop) point(s float64) complex128 {
	for i := range l {
		if n := l[i].Length(); s <= n {
			return l[i].At(s / n)
		} else {
			s -= n
		}
	}
	return l[0].From
}
