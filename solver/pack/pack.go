package pack

import "math"

// Disc is a round part.
type Disc struct {
	X, Y, R float64
	Fixed   bool // must stay where it is
}

// finite reports whether the disc has a size and a place.
func (d Disc) finite() bool {
	return d.R > 0 && !math.IsInf(d.R, 0) && math.Abs(d.X)+math.Abs(d.Y) < math.Inf(1)
}

// checkRadii panics on misuse.
func checkRadii(radii []float64) {
	for _, r := range radii {
		if !(r > 0) || math.IsInf(r, 0) {
			panic("pack: radii must be positive and finite")
		}
	}
}

// Box is the inside of a holder. Round: R > 0, centre at the origin. Rectangle: W, H > 0, lower left corner at the origin. All zero: no
// wall.
type Box struct{ R, W, H float64 }

func (b Box) round() bool { return b.R > 0 }
func (b Box) rect() bool  { return b.R <= 0 && b.W > 0 && b.H > 0 }
func (b Box) open() bool  { return !b.round() && !b.rect() }

// area of the inside, +Inf without a wall.
func (b Box) area() float64 {
	switch {
	case b.round():
		return math.Pi * b.R * b.R
	case b.rect():
		return b.W * b.H
	}
	return math.Inf(1)
}

// room is the largest radius that fits into the empty box.
func (b Box) room() float64 {
	switch {
	case b.round():
		return b.R
	case b.rect():
		return min(b.W, b.H) / 2
	}
	return math.Inf(1)
}

// clear is the gap between the disc and the nearest wall, negative when the disc reaches through it, +Inf without a wall.
func (b Box) clear(x, y, r float64) float64 {
	switch {
	case b.round():
		return b.R - r - math.Hypot(x, y)
	case b.rect():
		return min(x-r, b.W-x-r, y-r, b.H-y-r)
	}
	return math.Inf(1)
}

// clamp moves the centre to the nearest place where a disc of radius r lies inside; ok is false when it is too big for the box.
func (b Box) clamp(x, y, r float64) (cx, cy float64, ok bool) {
	switch {
	case b.round():
		a := b.R - r
		if a < 0 {
			return 0, 0, false
		}
		if d := math.Hypot(x, y); d > a+4e-16*b.R { // not again for the last bit
			return x * a / d, y * a / d, true
		}
	case b.rect():
		if 2*r > b.W || 2*r > b.H {
			return b.W / 2, b.H / 2, false
		}
		return min(max(x, r), b.W-r), min(max(y, r), b.H-r), true
	}
	return x, y, true
}

// reach is the length that tolerances are measured against: the box or, without one, the extent of the discs.
func reach(discs []Disc, in Box) float64 {
	if !in.open() {
		return max(in.R, in.W, in.H)
	}
	s := 0.0
	for _, d := range discs {
		s = max(s, math.Abs(d.X)+d.R, math.Abs(d.Y)+d.R)
	}
	return s
}

// slack is the overlap that counts as touching, as a share of reach: a few roundings, far below the promised 1e-9.
const slack = 2e-12
