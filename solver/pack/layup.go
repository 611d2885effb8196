package pack

import (
	"cmp"
	"math"
	"slices"
)

// LayUp places discs in concentric layers, in the given order from the centre outwards, the way that a cable is laid: (1+6+12 for equals), each layer touching the one
// below; it returns the places and the radius of the circle that holds them, which is centred on the origin.
//
// Equal discs follow the trade's layers: a centre of one to five, and six more in each layer than in the one below (1-6-12, 2-8-14, 3-9-15,
// 4-10-16, 5-11-17); the centre is the one that makes the smallest circle. Mixed discs sink into the valleys below them where that makes the circle at least
// 2 % smaller, and where it saves 5 % more the larger go in first. It panics on a radius that is not positive and finite.
func LayUp(radii []float64) ([]Disc, float64) {
	checkRadii(radii)
	if len(radii) == 0 {
		return nil, 0
	}
	best, r := layered(radii)
	if equal(radii) {
		return best, r
	}
	if d, nr := nestedBest(radii, false); nr < 0.98*r {
		best, r = d, nr
	}
	if d, nr := nestedBest(radii, true); nr < 0.95*r {
		best, r = d, nr
	}
	return best, r
}

func equal(radii []float64) bool {
	lo, hi := slices.Min(radii), slices.Max(radii)
	return hi-lo <= 1e-9*hi
}

// layered tries each size of the centre and keeps the smallest circle.
func layered(radii []float64) (best []Disc, r float64) {
	r = math.Inf(1)
	for centre := 1; centre <= min(5, len(radii)); centre++ {
		d := layersOn(radii, centre)
		if nr := centreOn(d); nr < r*(1-1e-9) {
			best, r = d, nr
		}
	}
	return best, r
}

// layersOn lays ring after ring round a centre of the given number of discs.
func layersOn(radii []float64, centre int) []Disc {
	same := equal(radii)
	g, base := ringWithin(radii[:centre])
	out := g.discs(math.Pi / 2)
	below := centre
	if centre == 1 {
		below = 0
	}
	for len(out) < len(radii) {
		rest := radii[len(out):]
		g := ringOn(rest, base)
		n := len(g.r)
		switch {
		case n < len(rest) && len(rest) < 2*n && centre == 1 && len(out) == 1:
			w, out := ringWithin(rest)
			if off := out - 2*slices.Max(rest) - base; off >= 0 && off <= looseCore*slices.Min(rest) {
				g, n = w, len(rest)
			}
		case same && n < len(rest) && n > below+6:
			g = ringOn(rest[:below+6], base)
			n = below + 6
		}
		out = append(out, g.discs(outermost(out))...)
		base, below = base+2*slices.Max(g.r), n
		for k := range g.r {
			base = max(base, g.a[k]+g.r[k])
		}
	}
	return out
}

// looseCore is how far, in radii, a ring may stand off a single core in the middle: seven or eight round one (1+7: 0.30, 1+8: 0.61), as in
// the best packings known of 8 and 9, but not nine (0.92), for which the trade lays 2+8.
const looseCore = 0.65

// ringOn is the longest row, in order, that lies on a circle of radius base.
func ringOn(radii []float64, base float64) ring {
	var g ring
	for _, r := range radii {
		next := ring{slices.Clip(g.r), slices.Clip(g.a), slices.Clip(g.theta), g.span}
		next.add(r, base+r)
		if len(g.r) > 0 && next.span > fullTurn {
			break
		}
		g = next
	}
	return g
}

// outermost is the direction of the disc that reaches farthest out: the next layer's first disc lies on it and so touches it.
func outermost(discs []Disc) float64 {
	far, at := -1.0, math.Pi/2
	for _, d := range discs {
		if h := math.Hypot(d.X, d.Y); h+d.R > far*(1+1e-9) && h > 0 {
			far, at = h+d.R, math.Atan2(d.Y, d.X)
		}
	}
	return at
}

// nestedBest tries each size of the centre and keeps the smallest circle.
func nestedBest(radii []float64, largest bool) (best []Disc, r float64) {
	order := make([]int, len(radii))
	for i := range radii {
		order[i] = i
	}
	if largest {
		slices.SortStableFunc(order, func(a, b int) int { return cmp.Compare(radii[b], radii[a]) })
	}
	r = math.Inf(1)
	for centre := 1; centre <= min(5, len(radii)); centre++ {
		if d, nr, ok := nested(radii, order, centre); ok && nr < r*(1-1e-9) {
			best, r = d, nr
		}
	}
	return best, r
}

// nested puts each disc, in the order, as near to the middle of a centre group as it goes, in valleys where there are any.
func nested(radii []float64, order []int, centre int) ([]Disc, float64, bool) {
	out := make([]Disc, len(radii))
	sum := 0.0
	for _, r := range radii {
		sum += r
	}
	b := newBed(Box{}, 2*sum, sum/float64(len(radii)))
	b.wantNear(Disc{})
	var core []float64
	for _, i := range order[:centre] {
		core = append(core, radii[i])
	}
	g, _ := ringWithin(core)
	for k, d := range g.discs(math.Pi / 2) {
		out[order[k]] = d
		b.put(d)
	}
	for _, i := range order[centre:] {
		x, y, ok := b.best(radii[i])
		if !ok {
			return nil, 0, false
		}
		out[i] = Disc{X: x, Y: y, R: radii[i]}
		b.put(out[i])
	}
	return out, centreOn(out), true
}

// centreOn moves the discs so that the smallest circle round them is about the origin, and returns its radius.
func centreOn(discs []Disc) float64 {
	x, y, r := Enclose(discs)
	for i := range discs {
		discs[i].X -= x
		discs[i].Y -= y
	}
	for _, d := range discs { // rounding
		r = max(r, math.Hypot(d.X, d.Y)+d.R)
	}
	return r
}
