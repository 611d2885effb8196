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
// 4-10-16, 5-11-17); the centre is the one that makes the smallest circle. Mixed discs sink into the valleys below them where that makes the circle smaller, and when it saves more
// than 3 % the larger go in first.
func LayUp(radii []float64) ([]Disc, float64) {
	if len(radii) == 0 {
		return nil, 0
	}
	best, r := layered(radii)
	if equal(radii) {
		return best, r
	}
	if d, nr, ok := nested(radii, false); ok && nr < 0.99*r {
		best, r = d, nr
	}
	if d, nr, ok := nested(radii, true); ok && nr < 0.97*r {
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
		case n < len(rest) && centre == 1 && len(out) == 1:
			if w, loose := ringWithin(rest); loose-2*slices.Max(rest) <= base+looseCore*slices.Min(rest) {
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

// nested puts each disc as near to the middle as it goes, in valleys where there are any.
func nested(radii []float64, largest bool) ([]Disc, float64, bool) {
	out := make([]Disc, len(radii))
	order := make([]int, len(radii))
	sum := 0.0
	for i, r := range radii {
		out[i].R, order[i] = r, i
		sum += r
	}
	if largest {
		slices.SortStableFunc(order, func(a, b int) int { return cmp.Compare(radii[b], radii[a]) })
	}
	b := newBed(Box{}, 2*sum, sum/float64(len(radii)))
	b.near = &Disc{}
	for _, i := range order {
		x, y, ok := b.best(out[i].R, func(x, y float64) (cost, tie, upx, upy float64) {
			return math.Hypot(x, y), math.Atan2(y, x), x, y
		})
		if !ok {
			return nil, 0, false
		}
		out[i].X, out[i].Y = x, y
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
