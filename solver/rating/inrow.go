package rating

import (
	"math"

	"packrise/solver/section"
)

// inRow puts the parts without a place in a row to the right of those that have one, as high as these lie on average, each as far from its
// neighbour as the larger of the two is thick.
func (s *scene) inRow(top []int) map[string]section.Point {
	out := make(map[string]section.Point, len(top))
	right, thick, y, n := math.Inf(-1), 0.0, 0.0, 0
	for _, i := range top {
		p := &s.parts[i]
		if p.unset {
			continue
		}
		out[p.id] = p.abs
		y += p.abs.Y
		n++
		if r := p.outer() / mm; p.abs.X+r > right {
			right, thick = p.abs.X+r, 2*r
		}
	}
	if n > 0 {
		y /= float64(n)
	}
	for _, i := range top {
		p := &s.parts[i]
		if !p.unset {
			continue
		}
		d := 2 * p.outer() / mm
		x := 0.0
		if !math.IsInf(right, -1) {
			x = right + max(d, thick) + d/2
		}
		out[p.id] = section.Point{X: x, Y: y}
		right, thick = x+d/2, d
	}
	return out
}
