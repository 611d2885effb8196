package pack

import (
	"cmp"
	"math"
	"slices"
)

// contact is a pair that may come to touch: a disc with a disc, or with a wall.
type contact struct {
	i, j   int     // discs; j < 0: a wall
	need   float64 // least distance of the centres, or of the centre from the wall, at full size
	nx, ny float64 // unit vector that opens the gap when i moves along it
	g      float64 // gap
	s, f   float64 // slack and force of the interior-point method
}

// walls: the round one, and the four sides.
const (
	wallRound = -1 - iota
	wallLeft
	wallRight
	wallFloor
	wallTop
)

// crowd is discs in a box that press on each other.
type crowd struct {
	discs []Disc
	in    Box
	gap   float64 // least distance to keep
	size  float64 // share of their full radius that the discs have
	near  float64 // pairs farther apart than this are left out

	order    []int // free discs in the order of the unknowns
	rank     []int // of each disc in order, −1 when it stays
	contacts []contact
	since    []Disc // places when the contacts were listed
	sizeThen float64
}

func newCrowd(discs []Disc, in Box, gap, near float64) *crowd {
	return &crowd{discs: discs, in: in, gap: gap, size: 1, near: near}
}

// list finds the pairs that are near, keeping what is known of old ones; force is the push that a new one starts with.
func (c *crowd) list(mu, slack float64) {
	old := make(map[[2]int]contact, len(c.contacts))
	for _, k := range c.contacts {
		old[[2]int{k.i, k.j}] = k
	}
	c.sort()
	c.contacts = c.contacts[:0]
	add := func(i, j int, need float64) {
		k := contact{i: i, j: j, need: need}
		c.look(&k)
		if k.g > c.near {
			return
		}
		if o, ok := old[[2]int{i, j}]; ok {
			k.s, k.f = o.s, o.f
		} else {
			k.s = max(k.g, slack)
			k.f = mu / k.s
		}
		c.contacts = append(c.contacts, k)
	}
	c.pairs(add)
	for _, i := range c.order {
		switch {
		case c.in.round():
			add(i, wallRound, c.discs[i].R)
		case c.in.rect():
			for w := wallLeft; w >= wallTop; w-- {
				add(i, w, c.discs[i].R)
			}
		}
	}
	c.since, c.sizeThen = append(c.since[:0], c.discs...), c.size
}

// sort orders the unknowns along the longer side, which keeps neighbours near each other in the matrix.
func (c *crowd) sort() {
	c.order, c.rank = c.order[:0], c.rank[:0]
	x0, x1, y0, y1 := math.Inf(1), math.Inf(-1), math.Inf(1), math.Inf(-1)
	for i, d := range c.discs {
		c.rank = append(c.rank, -1)
		if !d.Fixed {
			c.order = append(c.order, i)
		}
		x0, x1, y0, y1 = min(x0, d.X), max(x1, d.X), min(y0, d.Y), max(y1, d.Y)
	}
	along := func(i int) float64 { return c.discs[i].X }
	if y1-y0 > x1-x0 {
		along = func(i int) float64 { return c.discs[i].Y }
	}
	slices.SortStableFunc(c.order, func(a, b int) int { return cmp.Compare(along(a), along(b)) })
	for k, i := range c.order {
		c.rank[i] = k
	}
}

// pairs calls add for the pairs of discs that are near, not both fixed, in the order of a sweep along x; the first has the higher rank.
func (c *crowd) pairs(add func(i, j int, need float64)) {
	sweep := make([]int, len(c.discs))
	most := 0.0
	for i, d := range c.discs {
		sweep[i] = i
		most = max(most, d.R)
	}
	slices.SortStableFunc(sweep, func(a, b int) int { return cmp.Compare(c.discs[a].X, c.discs[b].X) })
	for k, i := range sweep {
		p := c.discs[i]
		for _, j := range sweep[k+1:] {
			q := c.discs[j]
			if q.X-p.X > c.size*(p.R+most)+c.gap+c.near {
				break
			}
			if math.Abs(q.Y-p.Y) > c.size*(p.R+q.R)+c.gap+c.near || p.Fixed && q.Fixed {
				continue
			}
			if c.rank[i] > c.rank[j] {
				add(i, j, p.R+q.R)
			} else {
				add(j, i, p.R+q.R)
			}
		}
	}
}

// look measures a contact where the discs are.
func (c *crowd) look(k *contact) {
	p := c.discs[k.i]
	need := c.size*k.need + c.gap
	switch k.j {
	case wallRound:
		d := math.Sqrt(p.X*p.X + p.Y*p.Y)
		k.nx, k.ny = 0, 1
		if d > 0 {
			k.nx, k.ny = -p.X/d, -p.Y/d
		}
		k.g = c.in.R - d - need
	case wallLeft:
		k.nx, k.ny, k.g = 1, 0, p.X-need
	case wallRight:
		k.nx, k.ny, k.g = -1, 0, c.in.W-p.X-need
	case wallFloor:
		k.nx, k.ny, k.g = 0, 1, p.Y-need
	case wallTop:
		k.nx, k.ny, k.g = 0, -1, c.in.H-p.Y-need
	default:
		q := c.discs[k.j]
		dx, dy := p.X-q.X, p.Y-q.Y
		d := math.Sqrt(dx*dx + dy*dy) // math.Hypot is several times slower and guards against nothing here
		if d > 0 {
			k.nx, k.ny = dx/d, dy/d
		} else { // one upon the other: any way out, but always the same
			k.ny, k.nx = math.Sincos(2.4 * float64(k.i))
		}
		k.g = d - need
	}
}

// shape is the first unknown that each row of the normal matrix couples with; with grow the last unknown is the size, which couples with all.
func (c *crowd) shape(grow bool) []int {
	first := make([]int, 2*len(c.order), 2*len(c.order)+1)
	for k := range c.order {
		first[2*k], first[2*k+1] = 2*k, 2*k
	}
	for _, k := range c.contacts {
		if k.j < 0 || c.rank[k.j] < 0 {
			continue
		}
		i, j := c.rank[k.i], c.rank[k.j]
		first[2*i] = min(first[2*i], 2*j)
		first[2*i+1] = min(first[2*i+1], 2*j)
	}
	if grow {
		first = append(first, 0)
	}
	return first
}
