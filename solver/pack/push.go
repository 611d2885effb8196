package pack

import (
	"cmp"
	"math"
	"math/rand/v2"
	"slices"
)

// PushApart removes overlaps with the least movement. The disc with index held (−1: none) stays where it is unless the wall or a Fixed disc forbids it, and
// then goes to the nearest place free of them. gap is the least distance to keep between discs and to the wall. ok is false if no place without overlap was found; the discs
// are then returned as they came.
//
// The least sum of squared movements is found to the accuracy of touching (1e-9 of the box) as long as discs need not pass one another. Where they
// must, those in the way change over to the nearest free place.
func PushApart(discs []Disc, in Box, held int, gap float64) (placed []Disc, ok bool) {
	if held < -1 || held >= len(discs) {
		panic("pack: the held disc does not exist")
	}
	for _, d := range discs {
		if !d.finite() {
			return discs, false
		}
	}
	p := pusher{from: discs, in: in, gap: gap, tol: 2e-10 * reach(discs, in), stays: make([]bool, len(discs))}
	for i, d := range discs {
		p.stays[i] = d.Fixed || i == held
	}
	start, ok := p.start(held)
	if !ok {
		return discs, false
	}
	p.from = start
	out, ok := p.run(start)
	if _, _, depth := Overlap(out, in); !ok || !(depth <= 5*p.tol) { // fixed discs may overlap each other for good
		return discs, false
	}
	for i := range out {
		out[i].Fixed = discs[i].Fixed
	}
	return out, true
}

// pusher carries one call of PushApart. Inside it Fixed marks whatever does not move at the time.
type pusher struct {
	from  []Disc // where the discs want to be
	in    Box
	gap   float64
	tol   float64
	stays []bool
}

// start brings the discs inside the wall, and the held one off the fixed ones.
func (p *pusher) start(held int) ([]Disc, bool) {
	out := slices.Clone(p.from)
	for i := range out {
		d := &out[i]
		if d.Fixed {
			continue
		}
		var ok bool
		if d.X, d.Y, ok = p.in.clamp(d.X, d.Y, d.R+p.gap); !ok {
			return nil, false
		}
	}
	if held < 0 || out[held].Fixed {
		return out, true
	}
	r, _ := means(p.from)
	b := newBed(p.in, reach(out, p.in), r)
	for _, d := range out {
		if d.Fixed {
			b.put(d)
		}
	}
	h := &out[held]
	if b.free(h.X, h.Y, h.R+p.gap-p.tol) {
		return out, true
	}
	var ok bool
	h.X, h.Y, ok = b.nearest(*h, p.gap)
	return out, ok
}

// run tries ever harder ways, until one leaves no overlap.
func (p *pusher) run(start []Disc) ([]Disc, bool) {
	if p.clear(start) {
		return start, true
	}
	r, _ := means(p.frozen(start))
	if r == 0 {
		return nil, false
	}
	if out, ok := p.push(start, r); ok {
		return out, true
	}
	// Discs caught in line between the held one and the wall need a nudge to know which way to go.
	rng := rand.New(rand.NewPCG(7, 11))
	if out, ok := p.push(p.nudged(start, 0.1, rng), r); ok {
		return out, true
	}
	if out, ok := p.hop(start); ok {
		return p.shorten(out, r), true
	}
	for k := range 3 {
		out := p.frozen(p.nudged(start, 0.2*float64(k), rng))
		soften(out, p.in, 1, 60)
		if swell(out, p.in, p.gap, 1.001, 1e-3*r) >= 1 {
			return p.shorten(out, r), true
		}
	}
	return nil, false
}

// shorten takes a free arrangement and reduces the movements if it can.
func (p *pusher) shorten(discs []Disc, r float64) []Disc {
	if out, ok := p.push(discs, r); ok {
		return out
	}
	return discs
}

// clear reports whether all gaps are kept.
func (p *pusher) clear(discs []Disc) bool {
	i, _ := p.worst(discs)
	return i < 0
}

// worst finds the disc that lacks most gap, −1 when none does.
func (p *pusher) worst(discs []Disc) (i int, lack float64) {
	c := newCrowd(p.frozen(discs), p.in, p.gap, p.tol)
	c.list(0, 0)
	i, lack = -1, p.tol
	for _, t := range c.contacts {
		if !(-t.g <= lack) {
			i, lack = t.i, -t.g
		}
	}
	return i, lack
}

// frozen marks as Fixed what may not move.
func (p *pusher) frozen(discs []Disc) []Disc {
	out := slices.Clone(discs)
	for i := range out {
		out[i].Fixed = p.stays[i]
	}
	return out
}

func (p *pusher) nudged(discs []Disc, share float64, rng *rand.Rand) []Disc {
	out := slices.Clone(discs)
	for i := range out {
		if d := &out[i]; !p.stays[i] {
			d.X, d.Y, _ = p.in.clamp(d.X+share*d.R*rng.NormFloat64(), d.Y+share*d.R*rng.NormFloat64(), d.R+p.gap)
		}
	}
	return out
}

// push moves all discs to the least sum of squared movements; r is their mean radius.
func (p *pusher) push(start []Disc, r float64) ([]Disc, bool) {
	_, far := p.worst(start)
	far = max(far, 1e-6*r)
	for i, d := range start {
		far = max(far, math.Hypot(d.X-p.from[i].X, d.Y-p.from[i].Y))
	}
	spring := make([]float64, len(start))
	for i := range spring {
		spring[i] = 1 / far
	}
	c := newCrowd(p.frozen(start), p.in, p.gap, r)
	c.press(aim{kx: spring, ky: spring, to: p.from, rounds: 80, precision: p.tol, still: 1e-4 * min(r, far), slack: 0.2 * r})
	for _, little := range [3]float64{1e-3, 1e-4, 1e-6} {
		if out := p.settled(c, little*far); p.clear(out) {
			return out, true
		}
	}
	c.close()
	return c.discs, p.clear(c.discs)
}

// settled puts back the discs that hardly moved and closes the contacts of the others upon them.
func (p *pusher) settled(c *crowd, little float64) []Disc {
	still := newCrowd(slices.Clone(c.discs), p.in, p.gap, c.near)
	for i, d := range c.discs {
		if !p.stays[i] && math.Hypot(d.X-p.from[i].X, d.Y-p.from[i].Y) < little {
			still.discs[i] = p.from[i]
			still.discs[i].Fixed = true
		}
	}
	press := map[[2]int]contact{}
	for _, t := range c.contacts {
		press[[2]int{t.i, t.j}] = t
	}
	still.list(0, 0)
	for k := range still.contacts {
		t := &still.contacts[k]
		o, ok := press[[2]int{t.i, t.j}]
		if !ok {
			o = press[[2]int{t.j, t.i}]
		}
		t.s, t.f = o.s, o.f
	}
	still.close()
	return still.discs
}

// hop takes out what overlaps, smallest first, and puts each, largest first, into the nearest free place.
func (p *pusher) hop(start []Disc) ([]Disc, bool) {
	out := slices.Clone(start)
	order := make([]int, len(out))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int {
		if p.stays[a] != p.stays[b] {
			return cmp.Compare(btoi(p.stays[b]), btoi(p.stays[a]))
		}
		return cmp.Compare(out[b].R, out[a].R)
	})
	r, _ := means(p.from)
	b := newBed(p.in, reach(out, p.in), r)
	var homeless []int
	for _, i := range order {
		if d := out[i]; p.stays[i] || b.free(d.X, d.Y, d.R+p.gap-p.tol) {
			b.put(d)
		} else {
			homeless = append(homeless, i)
		}
	}
	for _, i := range homeless {
		var ok bool
		if out[i].X, out[i].Y, ok = b.nearest(out[i], p.gap); !ok {
			return nil, false
		}
		b.put(out[i])
	}
	return out, true
}

func btoi(b bool) int {
	if b {
		return 1
	}
	return 0
}

// nearest is the free place nearest to where the disc is.
func (b *bed) nearest(d Disc, gap float64) (x, y float64, ok bool) {
	b.wantNear(d)
	return b.best(d.R + gap)
}
