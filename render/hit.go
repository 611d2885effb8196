package render

import (
	"math"

	"packrise/solver/section"
)

// Hit returns the id of the innermost part at p (mm), "" for none. A part of a cable counts before the cable, any part before
// the holder, and of parts that overlap the one whose centre is nearest in terms of its radius.
func Hit(shapes []section.Shape, p section.Point) string {
	id, depth, nearest := "", -1, math.Inf(1)
	for _, s := range shapes {
		if s.ID == "" || s.Depth < depth || s.OuterR() <= 0 {
			continue
		}
		t := math.Hypot(p.X-s.At.X, p.Y-s.At.Y) / s.OuterR()
		if len(s.Loops) > 0 && !insideLoop(s.Loops[len(s.Loops)-1], p) {
			continue
		}
		if t > 1 || s.Depth == depth && t >= nearest {
			continue
		}
		id, depth, nearest = s.ID, s.Depth, t
	}
	return id
}
