package render

import (
	"math"
	"slices"

	"packrise/solver/section"
)

// flowMetal is the metal of one part: where heat-flow lines begin, and where they end to go on from its cooler side.
type flowMetal struct {
	id   string
	at   section.Point
	r    float64         // of a circle round it
	loop []section.Point // its outline where it is not round
	heat float64         // W/m
	temp float64
}

// has tells whether a point lies in the metal.
func (m flowMetal) has(q section.Point) bool {
	if math.Hypot(q.X-m.at.X, q.Y-m.at.Y) >= m.r {
		return false
	}
	return m.loop == nil || insideLoop(m.loop, q)
}

// metalsOf returns the solid metal of all parts, the hottest first: heat flows from the earlier to the later ones.
func metalsOf(s Scene) []flowMetal {
	read := readingsByID(s.Readings)
	var out []flowMetal
	for _, sh := range s.Shapes {
		if sh.ID == "" || sh.Unset || sh.Kind == section.Cable || len(sh.Rings) == 0 || !sh.Rings[0].Metal {
			continue
		}
		i := 0
		for i+1 < len(sh.Rings) && sh.Rings[i+1].Metal {
			i++
		}
		m := flowMetal{id: sh.ID, at: sh.At, r: sh.Rings[i].R1, heat: max(0, read[sh.ID].HeatWM), temp: read[sh.ID].TempC}
		if i < len(sh.Loops) {
			m.loop = sh.Loops[i]
		}
		if m.r > 0 {
			out = append(out, m)
		}
	}
	slices.SortStableFunc(out, func(a, b flowMetal) int {
		switch {
		case a.temp > b.temp:
			return -1
		case a.temp < b.temp:
			return 1
		}
		return 0
	})
	return out
}

// wallMetal tells what lies in the metal of a rectangle's wall, nil where there is none. Thin sheet round corners spreads heat at
// slopes of a few millikelvin, less than the field is good for: lines end where they reach it.
func wallMetal(s Scene) func(section.Point) bool {
	h := holderOf(s.Shapes)
	if h == nil || !(h.Width > 0 && h.Height > 0) {
		return nil
	}
	for _, r := range h.Rings {
		if r.Metal {
			return func(q section.Point) bool { return rectDepth(h, q) > r.R0 }
		}
	}
	return nil
}

// rectDepth is how far a point lies outside the inside face of a rectangle, negative within.
func rectDepth(h *section.Shape, q section.Point) float64 {
	return max(h.At.X-q.X, q.X-h.At.X-h.Width, h.At.Y-q.Y, q.Y-h.At.Y-h.Height)
}

// flowPieces is into how many pieces of about one length an outline is cut.
const flowPieces = 144

// flowPiece is a short piece of a metal's surface.
type flowPiece struct {
	a, b   section.Point
	normal section.Point // outwards
	flow   float64       // heat that leaves it, in a unit common to the whole outline; negative where it comes in
}

// pieces cuts the outline, counterclockwise, and weighs what leaves.
func (m flowMetal) pieces(f Field, reach float64) []flowPiece {
	points := m.loop
	if points == nil {
		points = roundLoop(m.at, m.r)
	} else {
		points = cut(points)
	}
	out := piecesOf(points)
	weigh(out, f, reach)
	return out
}

// piecesOf makes pieces of the sides of an outline, counterclockwise.
func piecesOf(points []section.Point) []flowPiece {
	var out []flowPiece
	for i, a := range points {
		b := points[(i+1)%len(points)]
		l := between(a, b)
		if l == 0 {
			continue
		}
		out = append(out, flowPiece{a: a, b: b, normal: section.Point{X: (b.Y - a.Y) / l, Y: (a.X - b.X) / l}})
	}
	return out
}

// roundLoop is a polygon in place of one.
func roundLoop(at section.Point, r float64) []section.Point {
	out := make([]section.Point, flowPieces)
	for i := range out {
		sin, cos := math.Sincos(2 * pi * (float64(i) - 0.5) / flowPieces)
		out[i] = section.Point{X: at.X + r*cos, Y: at.Y + r*sin}
	}
	return out
}

// cut divides the sides of an outline into pieces of about one length and turns it counterclockwise.
func cut(loop []section.Point) []section.Point {
	var out []section.Point
	area, round := 0.0, 0.0
	for i, a := range loop {
		b := loop[(i+1)%len(loop)]
		area += a.X*b.Y - b.X*a.Y
		round += between(a, b)
	}
	for i, a := range loop {
		b := loop[(i+1)%len(loop)]
		n := math.Ceil(between(a, b) / round * flowPieces)
		for k := 0.0; k < n; k++ {
			out = append(out, section.Point{X: a.X + k/n*(b.X-a.X), Y: a.Y + k/n*(b.Y-a.Y)})
		}
	}
	if area < 0 {
		slices.Reverse(out)
	}
	return out
}
