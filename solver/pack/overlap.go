package pack

import "math"

// Overlap returns the deepest overlap, of two discs (i, j) or of a disc with the wall (j = −1). depth ≤ 0 when there is none; it is then minus the
// least gap. Without discs i and j are −1 and depth is −Inf.
func Overlap(discs []Disc, in Box) (i, j int, depth float64) {
	i, j, depth = -1, -1, math.Inf(-1)
	for a, p := range discs {
		if d := -in.clear(p.X, p.Y, p.R); d > depth {
			i, j, depth = a, -1, d
		}
		for b := a + 1; b < len(discs); b++ {
			q := discs[b]
			// Most pairs are far apart: compare squares before taking a root.
			dx, dy, s := p.X-q.X, p.Y-q.Y, p.R+q.R-depth
			if s < 0 || dx*dx+dy*dy >= s*s {
				continue
			}
			if d := p.R + q.R - math.Hypot(dx, dy); d > depth {
				i, j, depth = a, b, d
			}
		}
	}
	return i, j, depth
}
