package pack

import "math"

// worth is what it costs to lie at a place, and the direction in which the cost rises; tie decides between equal costs.
type worth func(x, y float64) (cost, tie, upx, upy float64)

// bed is what already lies in the box. It finds places for the next disc that touch two things (two discs, or a disc and the wall) and from
// which it cannot slide to where it would cost less.
type bed struct {
	in    Box
	discs []Disc
	eps   float64 // overlap that counts as touching
	grid  grid

	worth  worth
	near   *Disc              // where cost is the distance from; nil: cost is a height
	queues map[float64]*queue // the places for each radius

	r    float64 // of the disc that is being placed
	q    *queue  // its places
	seen []int   // last disc for which each was looked at, so that none is twice
}

// newBed makes a bed for discs of the mean radius that lie within scale of the origin.
func newBed(in Box, scale, mean float64) *bed {
	b := &bed{in: in, eps: slack * scale}
	if in.rect() {
		b.grid = newGrid(0, 0, in.W, in.H, 2*mean)
	} else {
		b.grid = newGrid(-scale, -scale, 2*scale, 2*scale, 2*mean)
	}
	return b
}

// want sets what places cost. With near, cost is the distance from it.
func (b *bed) want(w worth, near *Disc) {
	b.worth, b.near, b.queues = w, near, map[float64]*queue{}
}

// wantNear sets the distance from a place as the cost.
func (b *bed) wantNear(d Disc) {
	b.want(func(x, y float64) (cost, tie, upx, upy float64) {
		dx, dy := x-d.X, y-d.Y
		return math.Hypot(dx, dy), math.Atan2(dy, dx), dx, dy
	}, &d)
}

// put lays a disc in its place.
func (b *bed) put(d Disc) {
	b.grid.put(d, len(b.discs))
	b.discs = append(b.discs, d)
	b.seen = append(b.seen, -1)
}

// best returns the free place of least cost for a disc of radius r. Places that were found taken are not looked at again.
func (b *bed) best(r float64) (x, y float64, ok bool) {
	b.r, b.q = r, b.queues[r]
	if b.q == nil {
		b.q = &queue{eps: b.eps}
		b.queues[r] = b.q
		b.wallSpots()
	}
	b.discSpots()
	for len(b.q.spots) > 0 {
		if s := b.q.spots[0]; b.free(s.x, s.y, r) {
			return s.x, s.y, true
		}
		b.q.pop()
	}
	return 0, 0, false
}

// free reports whether a disc of radius r at (x, y) overlaps no disc.
func (b *bed) free(x, y, r float64) bool {
	i0, j0, i1, j1 := b.grid.span(x, y, r)
	for j := j0; j <= j1; j++ {
		for i := i0; i <= i1; i++ {
			for _, k := range b.grid.cells[j*b.grid.nx+i] {
				d := &b.discs[k]
				dx, dy, s := d.X-x, d.Y-y, d.R+r-b.eps
				if dx*dx+dy*dy < s*s {
					return false
				}
			}
		}
	}
	return true
}

// add takes a place into the choice if it is inside.
func (b *bed) add(x, y float64) {
	if b.in.clear(x, y, b.r) >= -b.eps {
		c, t, _, _ := b.worth(x, y)
		b.q.push(spot{c, t, x, y})
	}
}

// rest takes a place into the choice if the two supports, whose pushes point along p and q, hold the disc there.
func (b *bed) rest(x, y, px, py, qx, qy float64) {
	if b.in.clear(x, y, b.r) < -b.eps {
		return
	}
	c, t, ux, uy := b.worth(x, y)
	// Components of the pushes across and along the rise of cost: held when a mix of both points straight up.
	pc, pu, qc, qu := px*uy-py*ux, px*ux+py*uy, qx*uy-qy*ux, qx*ux+qy*uy
	if pc > qc {
		pc, pu, qc, qu = qc, qu, pc, pu
	}
	tiny := 1e-9 * b.r * b.r
	if pc*qc > tiny || qc*pu-pc*qu < -tiny {
		return
	}
	b.q.push(spot{c, t, x, y})
}

// wallSpots adds the places that touch no disc: the deepest point, the corners, the middle of the floor; the nearest.
func (b *bed) wallSpots() {
	in, r := b.in, b.r
	switch {
	case in.round():
		b.add(0, -(in.R - r))
	case in.rect():
		b.add(in.W/2, r)
		b.add(r, r)
		b.add(in.W-r, r)
		b.add(r, in.H-r)
		b.add(in.W-r, in.H-r)
	}
	if b.near != nil {
		x, y, _ := in.clamp(b.near.X, b.near.Y, r)
		b.add(x, y)
	}
}

// discSpots adds the places that touch a disc that is new to the queue, and one more: the wall, or a disc before it.
func (b *bed) discSpots() {
	for k := range b.seen {
		b.seen[k] = -1
	}
	for ; b.q.done < len(b.discs); b.q.done++ {
		p := b.discs[b.q.done]
		a := p.R + b.r
		if b.near != nil {
			b.nearSpot(p, a)
		}
		switch {
		case b.in.round():
			if math.Hypot(p.X, p.Y)+a >= b.in.R-b.r {
				b.meet(p.X, p.Y, a, 0, 0, b.in.R-b.r, -1)
			}
		case b.in.rect():
			b.sideSpots(p, a)
		}
		b.pairSpots(b.q.done)
	}
}

// nearSpot adds the place at distance a from disc p that is nearest to where cost is measured from.
func (b *bed) nearSpot(p Disc, a float64) {
	dx, dy := b.near.X-p.X, b.near.Y-p.Y
	h := math.Hypot(dx, dy)
	if h == 0 {
		dx, h = 1, 1
	}
	b.add(p.X+a*dx/h, p.Y+a*dy/h)
}

// pairSpots adds the places that touch disc i and one before it.
func (b *bed) pairSpots(i int) {
	p := b.discs[i]
	i0, j0, i1, j1 := b.grid.span(p.X, p.Y, p.R+2*b.r)
	for row := j0; row <= j1; row++ {
		for col := i0; col <= i1; col++ {
			for _, k := range b.grid.cells[row*b.grid.nx+col] {
				if int(k) >= i || b.seen[k] == i {
					continue
				}
				b.seen[k] = i
				q := b.discs[k]
				dx, dy, s := q.X-p.X, q.Y-p.Y, p.R+q.R+2*b.r
				if dx*dx+dy*dy <= s*s {
					b.meet(p.X, p.Y, p.R+b.r, q.X, q.Y, q.R+b.r, 1)
				}
			}
		}
	}
}

// sideSpots adds the places at distance a from disc p that touch a side.
func (b *bed) sideSpots(p Disc, a float64) {
	for k, y := range [2]float64{b.r, b.in.H - b.r} {
		if h := a*a - (y-p.Y)*(y-p.Y); h >= 0 {
			h, n := math.Sqrt(h), b.r*float64(1-2*k)
			b.rest(p.X-h, y, -h, y-p.Y, 0, n)
			b.rest(p.X+h, y, h, y-p.Y, 0, n)
		}
	}
	for k, x := range [2]float64{b.r, b.in.W - b.r} {
		if h := a*a - (x-p.X)*(x-p.X); h >= 0 {
			h, n := math.Sqrt(h), b.r*float64(1-2*k)
			b.rest(x, p.Y-h, x-p.X, -h, n, 0)
			b.rest(x, p.Y+h, x-p.X, h, n, 0)
		}
	}
}

// meet adds the two points where circles cross; the second pushes outwards (side 1) or, as a wall does, inwards (−1).
func (b *bed) meet(x1, y1, r1, x2, y2, r2, side float64) {
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
	for _, h := range [2]float64{math.Sqrt(h2), -math.Sqrt(h2)} {
		ex, ey := t*dx-h*dy, t*dy+h*dx
		b.rest(x1+ex, y1+ey, ex, ey, side*(ex-dx), side*(ey-dy))
	}
}
