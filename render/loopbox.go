package render

import "packrise/solver/section"

// loopBox is the box around points.
func loopBox(points []section.Point) box {
	b := noBox()
	for _, p := range points {
		b = b.with(box{p.X, p.Y, p.X, p.Y})
	}
	return b
}

// loopMeetsBox tells whether the inside of a convex line through points and a box have a point in common: no side of either parts them.
func loopMeetsBox(points []section.Point, b box) bool {
	var mid section.Point
	for _, p := range points {
		mid.X, mid.Y = mid.X+p.X/float64(len(points)), mid.Y+p.Y/float64(len(points))
	}
	if !loopBox(points).meets(b) {
		return false
	}
	for i, p := range points {
		q := points[(i+1)%len(points)]
		side := func(x, y float64) float64 { return (q.X-p.X)*(y-p.Y) - (q.Y-p.Y)*(x-p.X) }
		in := side(mid.X, mid.Y)
		if in == 0 {
			continue // two points in one place
		}
		apart := true
		for _, c := range [4]float64{side(b.x0, b.y0), side(b.x1, b.y0), side(b.x0, b.y1), side(b.x1, b.y1)} {
			apart = apart && c*in <= 0
		}
		if apart {
			return false
		}
	}
	return true
}
