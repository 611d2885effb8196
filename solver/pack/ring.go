package pack

import "math"

// ring is a closed row of discs about the origin, each at its own distance from it.
type ring struct {
	r, a  []float64 // radius, distance of the centre from the origin
	theta []float64 // angle of the centre, the first at 0, as tight as it goes
	span  float64   // angle that the whole closed row needs
}

// add puts one more disc at the end of the row, against whichever disc before it stops it first.
func (g *ring) add(r, a float64) {
	at := 0.0
	for m := range g.theta {
		at = max(at, g.theta[m]+apart(g.r[m], g.a[m], r, a))
	}
	for m := range g.theta { // the way round behind the row
		g.span = max(g.span, at-g.theta[m]+apart(g.r[m], g.a[m], r, a))
	}
	g.r, g.a, g.theta = append(g.r, r), append(g.a, a), append(g.theta, at)
}

// apart is the angle at the origin between two touching discs at distances a and b from it: 0 when they cannot meet, +Inf when
// they always do.
func apart(r, a, s, b float64) float64 {
	t := r + s
	switch c := (a*a + b*b - t*t) / (2 * a * b); {
	case math.Abs(a-b) >= t:
		return 0
	case a+b < t*(1-1e-15):
		return math.Inf(1)
	default:
		return math.Acos(min(1, max(-1, c)))
	}
}

// discs places the row with what is left of the circle shared out equally between the gaps.
func (g *ring) discs(turn float64) []Disc {
	out := make([]Disc, len(g.r))
	left := max(0, 2*math.Pi-g.span) / float64(len(g.r))
	for k := range out {
		s, c := math.Sincos(turn + g.theta[k] + float64(k)*left)
		out[k] = Disc{X: g.a[k] * c, Y: g.a[k] * s, R: g.r[k]}
	}
	return out
}

// fullTurn allows for rounding: six equal discs round a seventh need 2π exactly.
const fullTurn = 2*math.Pi + 1e-12

// ringWithin returns the row in the given order that lies along the inside of the smallest circle, and its radius.
func ringWithin(radii []float64) (ring, float64) {
	build := func(out float64) ring {
		var g ring
		for _, r := range radii {
			g.add(r, out-r)
		}
		return g
	}
	lo, hi := 0.0, 0.0
	for _, r := range radii {
		lo, hi = max(lo, r), hi+2*r
	}
	for range 200 {
		mid := (lo + hi) / 2
		if mid <= lo || mid >= hi {
			break
		}
		if g := build(mid); g.span <= 2*math.Pi {
			hi = mid
		} else {
			lo = mid
		}
	}
	return build(hi), hi
}
