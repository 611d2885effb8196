package pack

import (
	"math"
	"slices"
)

// PushApart removes overlaps with the least movement. The disc with index held (−1: none) stays where it is unless the wall forbids it. gap is the least
// distance to keep between discs and to the wall. ok is false if no place without overlap was found; the discs are then returned as they came.
func PushApart(discs []Disc, in Box, held int, gap float64) (placed []Disc, ok bool) {
	out := slices.Clone(discs)
	tol := 1e-10 * reach(discs, in)
	free := func(i int) float64 {
		if out[i].Fixed || i == held {
			return 0
		}
		return 1
	}
	clamp := func(i int) {
		if !out[i].Fixed {
			out[i].X, out[i].Y, _ = in.clamp(out[i].X, out[i].Y, out[i].R+gap)
		}
	}
	for range 2000 {
		worst := 0.0
		for i := range out {
			clamp(i)
			for j := range i {
				wi, wj := free(i), free(j)
				dx, dy := out[i].X-out[j].X, out[i].Y-out[j].Y
				need := out[i].R + out[j].R + gap
				d := math.Hypot(dx, dy)
				if d >= need {
					continue
				}
				worst = max(worst, need-d)
				if wi+wj == 0 {
					continue
				}
				if d == 0 {
					s, c := math.Sincos(2.4 * float64(i))
					dx, dy, d = c, s, 1
					need++
				}
				k := (need - d) / d / (wi + wj)
				out[i].X, out[i].Y = out[i].X+wi*k*dx, out[i].Y+wi*k*dy
				out[j].X, out[j].Y = out[j].X-wj*k*dx, out[j].Y-wj*k*dy
			}
		}
		if worst <= tol {
			break
		}
	}
	for i := range out {
		clamp(i)
		out[i].R += gap / 2
	}
	wall := in
	if in.round() {
		wall.R -= gap / 2
	}
	if _, _, depth := Overlap(out, Box{}); depth > 2*tol {
		return discs, false
	}
	for i := range out {
		out[i].R = discs[i].R
		if in.clear(out[i].X, out[i].Y, out[i].R) < gap-2*tol {
			return discs, false
		}
	}
	return out, true
}
