package pack

import (
	"cmp"
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
)

// ErrNoWall is returned by Settle when there is nothing to settle in.
var ErrNoWall = errors.New("parts cannot settle without a holder: give the holder an inside size, or lay the parts up in layers instead")

// FitError says why discs do not go into a box.
type FitError struct {
	Why   Misfit
	Disc  int     // index of the disc that Why is about; −1: all together
	Fill  float64 // area of the discs over that of the box
	Count int     // discs in all
}

// Misfit is the kind of a FitError.
type Misfit int

// Kinds of misfit.
const (
	TooFull  Misfit = iota // no arrangement was found
	TooLarge               // the disc is larger than the empty box
	Stuck                  // the disc is fixed where it overlaps another fixed one or the wall
	NoSize                 // the disc's radius or its fixed place is no usable number
)

// Error names the part or the fill, and what to do, in one sentence.
func (e *FitError) Error() string {
	switch e.Why {
	case TooLarge:
		return fmt.Sprintf("part number %d is larger than the inside of the holder: choose a larger holder or a smaller part", e.Disc+1)
	case Stuck:
		return fmt.Sprintf("part number %d is held in a place where it overlaps another held part or the wall: move it or let it go", e.Disc+1)
	case NoSize:
		return fmt.Sprintf("part number %d has no size that can be used: give it an outside diameter above zero", e.Disc+1)
	}
	return fmt.Sprintf("no arrangement found for the %d parts, which would fill %.0f %% of the inside: choose a larger holder or take parts out", e.Count, 100*e.Fill)
}

// Settle lets the discs fall (towards −y) until they rest on each other and the wall. Same seed, same result; never an overlap. The error is
// one sentence when they do not fit (*FitError, or ErrNoWall without a wall); the discs' places are ignored except for Fixed ones.
//
// In an order drawn from the seed each disc takes the lowest free place; then all sink together, without friction, until weights and contact forces are in
// balance, so that what touches does so to the last digits. Discs too many for that are thrown in and grown until they fit.
func Settle(discs []Disc, in Box, seed uint64) ([]Disc, error) {
	if in.open() {
		return nil, ErrNoWall
	}
	if err := checkFit(discs, in); err != nil {
		return nil, err
	}
	rng := rand.New(rand.NewPCG(seed, 0x5e771e))
	for try := range 3 {
		order := rng.Perm(len(discs))
		if try == 2 {
			largestFirst(order, discs)
		}
		if out, ok := drop(discs, in, order, rng); ok {
			return rest(out, in), nil
		}
	}
	if out, ok := squeeze(discs, in, rng); ok {
		return rest(out, in), nil
	}
	return nil, misfit(TooFull, -1, discs, in)
}

// rest lets discs that lie free of overlap sink together, without friction, until their weights are in balance with the forces at the contacts.
func rest(discs []Disc, in Box) []Disc {
	out := slices.Clone(discs)
	r, r2 := means(discs)
	if r == 0 {
		return out
	}
	n := len(discs)
	a := aim{fy: make([]float64, n), rounds: 600, precision: 1e-10 * reach(discs, in)}
	if in.rect() { // on a level floor a slight pull to the middle keeps them together
		a.kx, a.to = make([]float64, n), make([]Disc, n)
	}
	for i, d := range discs {
		// Weight goes with the area; the lightest are made heavier so that their contacts close to the same precision.
		a.fy[i] = max(d.R*d.R/r2, 0.01)
		if in.rect() {
			a.kx[i], a.to[i].X = 2e-4*a.fy[i]/in.W, in.W/2
		}
	}
	c := newCrowd(out, in, 0, r)
	for range 3 {
		if c.press(a) {
			break
		}
	}
	c.close()
	if _, _, depth := Overlap(out, in); !(depth <= slack*reach(discs, in)) {
		return discs
	}
	return out
}

// means of the radii of the discs that may move, and of their squares.
func means(discs []Disc) (r, r2 float64) {
	n := 0.0
	for _, d := range discs {
		if !d.Fixed {
			n, r, r2 = n+1, r+d.R, r2+d.R*d.R
		}
	}
	if n == 0 {
		return 0, 0
	}
	return r / n, r2 / n
}

// misfit makes the error with the fill counted.
func misfit(why Misfit, disc int, discs []Disc, in Box) *FitError {
	s := 0.0
	for _, d := range discs {
		s += math.Pi * d.R * d.R
	}
	return &FitError{Why: why, Disc: disc, Fill: s / in.area(), Count: len(discs)}
}

// checkFit finds discs that can never fit: too large, or held in an overlap.
func checkFit(discs []Disc, in Box) error {
	var held []Disc
	var index []int
	for i, d := range discs {
		if !d.Fixed {
			d.X, d.Y = 0, 0
		}
		switch {
		case !d.finite():
			return misfit(NoSize, i, discs, in)
		case d.R > in.room():
			return misfit(TooLarge, i, discs, in)
		case d.Fixed:
			held, index = append(held, d), append(index, i)
		}
	}
	if i, j, depth := Overlap(held, in); depth > 1e-9*reach(discs, in) {
		return misfit(Stuck, index[max(i, j)], discs, in)
	}
	if e := misfit(TooFull, -1, discs, in); e.Fill > 1+1e-9 {
		return e
	}
	return nil
}

func largestFirst(order []int, discs []Disc) {
	slices.SortStableFunc(order, func(a, b int) int { return cmp.Compare(discs[b].R, discs[a].R) })
}

// drop puts one disc after the other into the lowest free place.
func drop(discs []Disc, in Box, order []int, rng *rand.Rand) ([]Disc, bool) {
	out := slices.Clone(discs)
	r, _ := means(discs)
	b := newBed(in, reach(discs, in), r)
	for _, d := range discs {
		if d.Fixed {
			b.put(d)
		}
	}
	side := 1e-9 * float64(1-2*int(rng.Uint64()&1)) // equal heights left and right: toss
	b.want(func(x, y float64) (cost, tie, upx, upy float64) {
		if in.rect() {
			x -= in.W / 2
		}
		return y, math.Abs(x) + side*x, 0, 1
	}, nil)
	for _, i := range order {
		if out[i].Fixed {
			continue
		}
		x, y, ok := b.best(out[i].R)
		if !ok {
			return nil, false
		}
		out[i].X, out[i].Y = x, y
		b.put(out[i])
	}
	return out, true
}
