package pack

import (
	"math"
	"math/rand/v2"
	"slices"
)

// fitting is the largest share of their full radius that the discs may have where they lie, with the gap kept.
func fitting(discs []Disc, in Box, gap float64) float64 {
	t := math.Inf(1)
	for i, p := range discs {
		if !p.Fixed {
			t = min(t, (in.clear(p.X, p.Y, 0)-gap)/p.R)
		}
		for _, q := range discs[:i] {
			if p.Fixed && q.Fixed {
				continue
			}
			dx, dy, s := p.X-q.X, p.Y-q.Y, p.R+q.R
			if d2, m := dx*dx+dy*dy, t*s+gap; d2 < m*m {
				t = (math.Sqrt(d2) - gap) / s
			}
		}
	}
	return t
}

// soften pushes overlapping discs of the given size apart pair by pair, which spreads them without making all of them fit.
func soften(discs []Disc, in Box, size float64, sweeps int) {
	r, _ := means(discs)
	c := newCrowd(discs, in, 0, r)
	c.size = size
	for s := range sweeps {
		if s%5 == 0 {
			c.contacts = c.contacts[:0] // nothing of them is worth keeping
			c.list(0, 0)
		}
		for k := range c.contacts {
			t := &c.contacts[k]
			c.look(t)
			if t.g >= 0 {
				continue
			}
			if t.j < 0 || c.rank[t.j] < 0 {
				discs[t.i].X -= t.g * t.nx
				discs[t.i].Y -= t.g * t.ny
				continue
			}
			discs[t.i].X -= t.g / 2 * t.nx
			discs[t.i].Y -= t.g / 2 * t.ny
			discs[t.j].X += t.g / 2 * t.nx
			discs[t.j].Y += t.g / 2 * t.ny
		}
	}
}

// scatter throws the discs that may move anywhere into the box.
func scatter(discs []Disc, in Box, rng *rand.Rand) {
	for i := range discs {
		d := &discs[i]
		if d.Fixed {
			continue
		}
		if in.round() {
			s, c := math.Sincos(2 * math.Pi * rng.Float64())
			h := (in.R - d.R) * math.Sqrt(rng.Float64())
			d.X, d.Y = h*c, h*s
		} else {
			d.X, d.Y = d.R+(in.W-2*d.R)*rng.Float64(), d.R+(in.H-2*d.R)*rng.Float64()
		}
	}
}

// swell grows all discs together from where they lie, as far as they go or until they are enough; it returns the size reached.
func swell(discs []Disc, in Box, gap, enough, precision float64) float64 {
	r, _ := means(discs)
	c := newCrowd(discs, in, gap, r)
	c.size = max(0.95*fitting(discs, in, gap), 1e-3)
	c.press(aim{grow: 4 * float64(len(discs)) * r, enough: enough, rounds: 100, precision: precision})
	return fitting(discs, in, gap)
}

// squeeze looks for any arrangement without overlap, from many random beginnings.
func squeeze(discs []Disc, in Box, rng *rand.Rand) ([]Disc, bool) {
	best := 0.0
	tries := min(max(3000/len(discs), 4), 60)
	for try := range tries {
		out := slices.Clone(discs)
		scatter(out, in, rng)
		soften(out, in, 1, 60)
		size := swell(out, in, 0, 1.001, 1e-4*reach(discs, in))
		if size > 0.999 && size < 1 { // it may fit to the last digit
			size = swell(out, in, 0, 0, 1e-13*reach(discs, in))
		}
		if size >= 1-1e-11 {
			return out, true
		}
		if best = max(best, size); try >= 5 && best < 0.9 {
			break
		}
	}
	return nil, false
}
