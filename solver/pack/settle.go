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
	Disc  int     // index of a disc that is too large or fixed in the way, −1: all together
	Fill  float64 // discs' area over the box's
	Count int     // discs in all
	Fixed bool    // the disc is held where it overlaps another or the wall
}

// Error names the fill and what to do, in one sentence.
func (e *FitError) Error() string {
	switch {
	case e.Fixed:
		return fmt.Sprintf("part number %d is held in a place where it overlaps another held part or the wall: move it or let it go", e.Disc+1)
	case e.Disc >= 0:
		return fmt.Sprintf("part number %d is larger than the inside of the holder: choose a larger holder or a smaller part", e.Disc+1)
	}
	return fmt.Sprintf("no arrangement found for the %d parts, which would fill %.0f %% of the inside: choose a larger holder or take parts out", e.Count, 100*e.Fill)
}

// Settle lets the discs fall (towards −y) until they rest on each other and the wall. Same seed, same result; never an overlap. The error is
// one sentence when they do not fit (*FitError, or ErrNoWall without a wall); the discs' places are ignored except for Fixed ones.
func Settle(discs []Disc, in Box, seed uint64) ([]Disc, error) {
	if in.open() {
		return nil, ErrNoWall
	}
	if err := checkFit(discs, in); err != nil {
		return nil, err
	}
	rng := rand.New(rand.NewPCG(seed, 0x5e771e))
	for try := range 12 {
		order := rng.Perm(len(discs))
		if try%2 == 1 {
			largestFirst(order, discs)
		}
		if out, ok := drop(discs, in, order, rng); ok {
			return out, nil
		}
	}
	return nil, &FitError{Disc: -1, Fill: fill(discs, in), Count: len(discs)}
}

func fill(discs []Disc, in Box) float64 {
	s := 0.0
	for _, d := range discs {
		s += math.Pi * d.R * d.R
	}
	return s / in.area()
}

// checkFit finds discs that can never fit: too large, or held in an overlap.
func checkFit(discs []Disc, in Box) error {
	var held []Disc
	var index []int
	for i, d := range discs {
		if !(d.R <= in.room()) {
			return &FitError{Disc: i, Fill: fill(discs, in), Count: len(discs)}
		}
		if d.Fixed {
			held, index = append(held, d), append(index, i)
		}
	}
	if i, j, depth := Overlap(held, in); depth > 1e-9*reach(discs, in) {
		return &FitError{Disc: index[max(i, j)], Fill: fill(discs, in), Count: len(discs), Fixed: true}
	}
	if f := fill(discs, in); f > 1 {
		return &FitError{Disc: -1, Fill: f, Count: len(discs)}
	}
	return nil
}

func largestFirst(order []int, discs []Disc) {
	slices.SortStableFunc(order, func(a, b int) int { return cmp.Compare(discs[b].R, discs[a].R) })
}

// drop puts one disc after the other into the lowest free place.
func drop(discs []Disc, in Box, order []int, rng *rand.Rand) ([]Disc, bool) {
	out := slices.Clone(discs)
	b := newBed(in, reach(discs, in), len(discs))
	for _, d := range discs {
		if d.Fixed {
			b.discs = append(b.discs, d)
		}
	}
	for _, i := range order {
		if out[i].Fixed {
			continue
		}
		side := float64(1 - 2*int(rng.Uint64()&1)) // equal heights left and right: toss
		x, y, ok := b.best(out[i].R, func(x, y float64) (cost, tie float64) {
			if in.rect() {
				x -= in.W / 2
			}
			return y, math.Abs(x) + 1e-9*side*x
		})
		if !ok {
			return nil, false
		}
		out[i].X, out[i].Y = x, y
		b.discs = append(b.discs, out[i])
	}
	return out, true
}
