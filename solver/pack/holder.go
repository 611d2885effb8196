package pack

import (
	"math"
	"math/rand/v2"
	"slices"
)

// SmallestHolder searches for the smallest circle into which the radii fit; it returns centres about the origin and the circle's radius. Same seed, same
// result. It panics on a radius that is not positive and finite.
//
// The best of many local optima: from the concentric lay, from random scatter, and from the best so far with some discs moved into other places. For equal
// discs up to 37 it comes within a few tenths of a percent of the best known; a proof of the least is not to be had.
func SmallestHolder(radii []float64, seed uint64) ([]Disc, float64) {
	if len(radii) == 0 {
		return nil, 0
	}
	best, r := LayUp(radii)
	for _, largest := range []bool{false, true} {
		if d, nr := nestedBest(radii, largest); nr < r {
			best, r = d, nr
		}
	}
	if len(radii) < 3 || slices.Max(radii) >= r*(1-1e-12) {
		return best, r
	}
	s := search{rng: rand.New(rand.NewPCG(seed, 0x401de5)), best: best, r: r}
	s.improve(best)
	rounds := min(max(3000/len(radii), 3), 80)
	for k := range rounds {
		if k%2 == 0 {
			s.scattered()
		} else {
			s.shuffled()
		}
	}
	s.finish()
	return s.best, s.r
}

// search holds the best arrangement so far.
type search struct {
	rng  *rand.Rand
	best []Disc
	r    float64 // radius of the circle round it
}

// improve swells discs in a circle as large as the best so far, and keeps the arrangement when they outgrow it.
func (s *search) improve(discs []Disc) {
	in := Box{R: s.r}
	out := slices.Clone(discs)
	if size := swell(out, in, 0, 0, 1e-5*s.r); size > 1+1e-9 {
		s.keep(out, 1/size)
	}
}

// keep scales places by the share that lets the discs have their full radius.
func (s *search) keep(discs []Disc, scale float64) {
	for i := range discs {
		discs[i].X *= scale
		discs[i].Y *= scale
	}
	if r := centreOn(discs); r < s.r {
		s.best, s.r = discs, r
	}
}

// scattered begins from anywhere.
func (s *search) scattered() {
	out, in := slices.Clone(s.best), Box{R: s.r}
	scatter(out, in, s.rng)
	soften(out, in, 1, 60)
	s.improve(out)
}

// shuffled begins from the best so far: some discs change places or go elsewhere.
func (s *search) shuffled() {
	out, in := slices.Clone(s.best), Box{R: s.r}
	for range 1 + len(out)/20 {
		i, j := s.rng.IntN(len(out)), s.rng.IntN(len(out))
		if math.Abs(out[i].R-out[j].R) > 1e-3*out[i].R {
			out[i].X, out[i].Y, out[j].X, out[j].Y = out[j].X, out[j].Y, out[i].X, out[i].Y
		} else {
			one := []Disc{out[i]}
			scatter(one, in, s.rng)
			out[i] = one[0]
		}
	}
	soften(out, in, 1, 60)
	s.improve(out)
}

// finish closes the contacts to the last digits.
func (s *search) finish() {
	in := Box{R: s.r}
	out := slices.Clone(s.best)
	if size := swell(out, in, 0, 0, 1e-12*s.r); size > 1 {
		s.keep(out, 1/size)
	}
}
