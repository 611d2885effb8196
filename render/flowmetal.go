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

// pieces cuts the outline, counterclockwise.
func (m flowMetal) pieces() []flowPiece {
	points := m.corners()
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

func (m flowMetal) corners() []section.Point {
	var out []section.Point
	if m.loop == nil {
		for i := range flowPieces {
			sin, cos := math.Sincos(2 * pi * (float64(i) - 0.5) / flowPieces)
			out = append(out, section.Point{X: m.at.X + m.r*cos, Y: m.at.Y + m.r*sin})
		}
		return out
	}
	area, round := 0.0, 0.0
	for i, a := range m.loop {
		b := m.loop[(i+1)%len(m.loop)]
		area += a.X*b.Y - b.X*a.Y
		round += between(a, b)
	}
	for i, a := range m.loop {
		b := m.loop[(i+1)%len(m.loop)]
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

// seeds returns n places on the metal's surface and the ways outwards there, so that between each and the next the same heat
// leaves. They stand evenly about the place where least does.
func (m flowMetal) seeds(f Field, n int, reach float64) (at, out []section.Point) {
	pieces := m.pieces()
	total, least, from := 0.0, math.Inf(1), 0
	for i := range pieces {
		p := &pieces[i]
		mid := section.Point{X: (p.a.X + p.b.X) / 2, Y: (p.a.Y + p.b.Y) / 2}
		far := section.Point{X: mid.X + reach*p.normal.X, Y: mid.Y + reach*p.normal.Y}
		near := section.Point{X: mid.X + 0.02*reach*p.normal.X, Y: mid.Y + 0.02*reach*p.normal.Y}
		density := fieldAt(f, near) - fieldAt(f, far)
		if !finite(density) { // the metal is the outside
			density = 0
		}
		p.flow = density * between(p.a, p.b)
		total += max(0, p.flow)
		if density < least-1e-6*math.Abs(least) {
			least, from = density, i
		}
	}
	if !(total > 0) {
		return nil, nil
	}
	sum := 0.0
	for k := range pieces {
		p := pieces[(from+k)%len(pieces)]
		flow := max(0, p.flow)
		for len(at) < n {
			want := (float64(len(at)) + 0.5) / float64(n) * total
			if want > sum+flow {
				break
			}
			u := (want - sum) / flow
			at = append(at, section.Point{X: p.a.X + u*(p.b.X-p.a.X), Y: p.a.Y + u*(p.b.Y-p.a.Y)})
			out = append(out, p.normal)
		}
		sum += flow
	}
	return at, out
}
