package ui

import (
	"math"

	"packrise/solver/section"
)

// freePlaces finds places for n equal parts, each the free one nearest to the bottom of the holder (to the middle where there is no holder; of bodies
// apart in a row), without moving what lies there. It returns fewer than n where there is no more room. It may run beside the window.
func freePlaces(outline func(*section.Document) []section.Shape, d *section.Document, p section.Part, n int) []section.Point {
	p.ID = section.FreshID(d, "new")
	p.At = section.Opt[section.Point]{}
	shapes := outline(section.Add(d, p))
	r := 0.0
	for _, s := range shapes {
		if s.ID == p.ID {
			r = s.OuterR()
		}
	}
	if r <= 0 {
		return nil
	}
	in := roomOf(shapes)
	low := section.Point{X: in.w / 2, Y: -in.r}
	_, taken := apart(shapes, []string{p.ID})
	if shapes[0].Kind == section.Apart {
		return rowPlaces(taken, r, n)
	}
	var out []section.Point
	for range n {
		at, ok := nearestFree(disc{in.inside(low, r), r}, taken, in)
		if !ok {
			break
		}
		at = section.Point{X: tidy(at.X), Y: tidy(at.Y)}
		out = append(out, at)
		taken = append(taken, disc{at, r})
	}
	return out
}

// rowPlaces go on to the right of what is there, at its height, a diameter apart, so that each part is a body of its own.
func rowPlaces(taken []disc, r float64, n int) []section.Point {
	right, y := math.Inf(-1), 0.0
	for _, d := range taken {
		right = max(right, d.at.X+d.r)
		y += d.at.Y / float64(len(taken))
	}
	x := 0.0
	if len(taken) > 0 {
		x = right + 3*r
	}
	out := make([]section.Point, n)
	for i := range out {
		out[i] = section.Point{X: tidy(x + 4*r*float64(i)), Y: tidy(y)}
	}
	return out
}
