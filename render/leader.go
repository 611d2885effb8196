package render

import (
	"math"

	"packrise/solver/section"
)

// lead is a way out for a leader: points in pixels from the part's outline on, then straight along (dx, dy) for as long as needed.
type lead struct {
	pts    []section.Point
	dx, dy float64
}

// headings is how many directions a straight leader tries, offsets from where it starts across its part (in radii).
const headings = 96

var leadOffsets = []float64{0, 0.3, -0.3, 0.6, -0.6, 0.85, -0.85}

// straightLeads returns the straight ways out of target that enter none of the others by more than slack.
func straightLeads(target disc, others []disc, slack float64) []lead {
	var out []lead
	for n := range headings {
		sin, cos := math.Sincos(2 * pi * float64(n) / headings)
		for _, off := range leadOffsets {
			along := math.Sqrt(1-off*off) * target.r
			x := target.x - off*target.r*sin + along*cos
			y := target.y + off*target.r*cos + along*sin
			if rayClear(others, x, y, cos, sin, slack) {
				out = append(out, lead{[]section.Point{{X: x, Y: y}}, cos, sin})
				break
			}
		}
	}
	return out
}

// rayClear tells whether a ray enters none of the discs by more than slack.
func rayClear(discs []disc, x, y, dx, dy, slack float64) bool {
	for _, d := range discs {
		px, py := d.x-x, d.y-y
		t := max(0, px*dx+py*dy)
		if q, r := (px-t*dx)*(px-t*dx)+(py-t*dy)*(py-t*dy), d.r-slack; r > 0 && q < r*r {
			return false
		}
	}
	return true
}

// segmentClear tells whether the way from a to b enters none of the discs by more than slack.
func segmentClear(discs []disc, a, b section.Point, slack float64) bool {
	for _, d := range discs {
		if r := d.r - slack; r > 0 && segmentDistance(section.Point{X: d.x, Y: d.y}, a, b) < r {
			return false
		}
	}
	return true
}

// segmentDistance returns the distance of p from the straight line between a and b.
func segmentDistance(p, a, b section.Point) float64 {
	dx, dy := b.X-a.X, b.Y-a.Y
	l := dx*dx + dy*dy
	t := 0.0
	if l > 0 {
		t = max(0, min(1, ((p.X-a.X)*dx+(p.Y-a.Y)*dy)/l))
	}
	return math.Hypot(p.X-a.X-t*dx, p.Y-a.Y-t*dy)
}
