package pack

import "math"

// spot is a place for a disc's centre and what it costs to lie there; the cheapest free one is taken.
type spot struct{ cost, tie, x, y float64 }

func (s spot) before(t spot, eps float64) bool {
	if math.Abs(s.cost-t.cost) > eps {
		return s.cost < t.cost
	}
	return s.tie < t.tie
}

// bed is what already lies in the box, and finds places for the next disc that touch two things (two discs, or a disc and the wall).
type bed struct {
	in    Box
	discs []Disc
	eps   float64 // overlap that counts as touching
	spots []spot  // scratch
}

func newBed(in Box, scale float64, n int) *bed {
	return &bed{in: in, eps: slack * scale, discs: make([]Disc, 0, n)}
}

// best returns the free place of least cost for a disc of radius r. tie decides between places of equal cost.
func (b *bed) best(r float64, cost func(x, y float64) (cost, tie float64)) (x, y float64, ok bool) {
	b.spots = b.spots[:0]
	add := func(x, y float64) {
		if b.in.clear(x, y, r) >= -b.eps {
			c, t := cost(x, y)
			b.spots = append(b.spots, spot{c, t, x, y})
		}
	}
	b.wallSpots(r, add)
	b.discSpots(r, add)
	less := func(s, t spot) bool { return s.before(t, b.eps) }
	heapify(b.spots, less)
	for len(b.spots) > 0 {
		s := b.spots[0]
		if b.free(s.x, s.y, r) {
			return s.x, s.y, true
		}
		b.spots = pop(b.spots, less)
	}
	return 0, 0, false
}

// free reports whether a disc of radius r at (x, y) overlaps no disc.
func (b *bed) free(x, y, r float64) bool {
	for _, d := range b.discs {
		dx, dy, s := d.X-x, d.Y-y, d.R+r-b.eps
		if dx*dx+dy*dy < s*s {
			return false
		}
	}
	return true
}

// wallSpots adds the places on the wall alone: the deepest point, the corners, the middle of the floor.
func (b *bed) wallSpots(r float64, add func(x, y float64)) {
	switch {
	case b.in.round():
		add(0, -(b.in.R - r))
	case b.in.rect():
		add(b.in.W/2, r)
		add(r, r)
		add(b.in.W-r, r)
		add(r, b.in.H-r)
		add(b.in.W-r, b.in.H-r)
	default:
		b.openSpots(r, add)
	}
}

// openSpots adds, without a wall, the middle and the places where a disc lies on one other, towards the middle and away from it.
func (b *bed) openSpots(r float64, add func(x, y float64)) {
	add(0, 0)
	for _, p := range b.discs {
		a, h := p.R+r, math.Hypot(p.X, p.Y)
		ux, uy := 1.0, 0.0
		if h > 0 {
			ux, uy = p.X/h, p.Y/h
		}
		add(p.X-a*ux, p.Y-a*uy)
		add(p.X+a*ux, p.Y+a*uy)
	}
}

// discSpots adds the places that touch a disc and the wall, and those that touch two discs.
func (b *bed) discSpots(r float64, add func(x, y float64)) {
	for i, p := range b.discs {
		a := p.R + r
		switch {
		case b.in.round():
			meet(p.X, p.Y, a, 0, 0, b.in.R-r, add)
		case b.in.rect():
			for _, y := range [2]float64{r, b.in.H - r} {
				if h := a*a - (y-p.Y)*(y-p.Y); h >= 0 {
					add(p.X-math.Sqrt(h), y)
					add(p.X+math.Sqrt(h), y)
				}
			}
			for _, x := range [2]float64{r, b.in.W - r} {
				if h := a*a - (x-p.X)*(x-p.X); h >= 0 {
					add(x, p.Y-math.Sqrt(h))
					add(x, p.Y+math.Sqrt(h))
				}
			}
		}
		for _, q := range b.discs[:i] {
			dx, dy, s := q.X-p.X, q.Y-p.Y, p.R+q.R+2*r
			if dx*dx+dy*dy <= s*s {
				meet(p.X, p.Y, a, q.X, q.Y, q.R+r, add)
			}
		}
	}
}

// meet calls add with the two points where circles cross.
func meet(x1, y1, r1, x2, y2, r2 float64, add func(x, y float64)) {
	dx, dy := x2-x1, y2-y1
	d2 := dx*dx + dy*dy
	if d2 == 0 {
		return
	}
	t := (d2 + r1*r1 - r2*r2) / (2 * d2) // share of the way from centre 1 to centre 2
	h2 := r1*r1/d2 - t*t
	if h2 < 0 {
		return
	}
	h := math.Sqrt(h2)
	add(x1+t*dx-h*dy, y1+t*dy+h*dx)
	add(x1+t*dx+h*dy, y1+t*dy-h*dx)
}

func heapify(s []spot, less func(a, b spot) bool) {
	for i := len(s)/2 - 1; i >= 0; i-- {
		sift(s, i, less)
	}
}

func pop(s []spot, less func(a, b spot) bool) []spot {
	n := len(s) - 1
	s[0] = s[n]
	sift(s[:n], 0, less)
	return s[:n]
}

func sift(s []spot, i int, less func(a, b spot) bool) {
	for {
		k := 2*i + 1
		if k >= len(s) {
			return
		}
		if k+1 < len(s) && less(s[k+1], s[k]) {
			k++
		}
		if !less(s[k], s[i]) {
			return
		}
		s[i], s[k] = s[k], s[i]
		i = k
	}
}
