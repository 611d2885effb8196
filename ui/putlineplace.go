package ui

import (
	"cmp"
	"math"
	"slices"

	"packrise/solver/section"
)

// putGap keeps a new part this far (mm) from what is there: it counts as touching, and rounding to whole µm can't make an overlap of it.
const putGap = 0.002

// obstacle is a round thing that a new part must not overlap, in the section's mm.
type obstacle struct{ x, y, r float64 }

// putRoom is where new parts go: the inside of a holder and what lies in it.
type putRoom struct {
	r        float64 // round: inside radius, the origin in the middle
	w, h     float64 // rectangle: inside, the origin in the lower left corner
	lying    []obstacle
	floating bool // no wall
}

// freePlaces finds places for n equal parts, lowest first as if they had been laid in, without moving what lies there. It returns
// fewer than n where there is no more room.
func freePlaces(k *Desk, d *section.Document, p section.Part, n int) []section.Point {
	p.ID = section.FreshID(d, "new")
	p.At = section.Opt[section.Point]{}
	shapes, _ := k.rooms.Outline(section.Add(d, p), k.Catalog())
	in := putRoomOf(shapes)
	r := 0.0
	for _, s := range shapes {
		if s.ID == p.ID {
			r = s.OuterR()
		}
	}
	var out []section.Point
	for range n {
		at, ok := in.lowest(r)
		if r <= 0 || !ok {
			break
		}
		out = append(out, at)
		in.lying = append(in.lying, obstacle{at.X, at.Y, r})
	}
	return out
}

// putRoomOf reads the room out of what is drawn: the holder comes first, parts of the top level are what lies in it.
func putRoomOf(shapes []section.Shape) *putRoom {
	in := &putRoom{floating: true}
	for _, s := range shapes {
		switch {
		case s.ID == "":
			in.wall(s)
		case s.Depth == 0 && !s.Unset:
			in.lying = append(in.lying, obstacle{s.At.X, s.At.Y, s.OuterR()})
		}
	}
	return in
}

// wall takes the inside of the holder's shape.
func (in *putRoom) wall(s section.Shape) {
	switch s.Kind {
	case section.Wireway:
		in.w, in.h = s.Width, s.Height
		in.floating = false
	case section.Jacket, section.Conduit:
		if len(s.Rings) > 0 {
			in.r = s.Rings[0].R0
			in.floating = false
		}
	}
}

// lowest returns the lowest free place of a disc, the one nearest the middle of equally low ones. A lowest place touches two things, or
// the wall's lowest point, so only such places are tried.
func (in *putRoom) lowest(r float64) (section.Point, bool) {
	reach := r + putGap
	var try []section.Point
	try = append(try, in.bottoms(reach)...)
	for i, o := range in.lying {
		try = append(try, in.againstWall(o, reach)...)
		for _, q := range in.lying[i+1:] {
			try = append(try, meeting(o, o.r+reach, q, q.r+reach)...)
		}
	}
	middle := in.w / 2
	slices.SortFunc(try, func(a, b section.Point) int {
		if math.Abs(a.Y-b.Y) > 1e-6 {
			return cmp.Compare(a.Y, b.Y)
		}
		return cmp.Compare(math.Abs(a.X-middle), math.Abs(b.X-middle))
	})
	for _, p := range try {
		p = section.Point{X: micrometres(p.X), Y: micrometres(p.Y)}
		if in.free(p, r) {
			return p, true
		}
	}
	return section.Point{}, false
}

// bottoms are the lowest points of the wall; without a wall the middle of an empty section and a place beside each part.
func (in *putRoom) bottoms(reach float64) []section.Point {
	switch {
	case in.r > 0:
		return []section.Point{{X: 0, Y: -(in.r - reach)}}
	case in.w > 0:
		return []section.Point{{X: in.w / 2, Y: reach}, {X: reach, Y: reach}, {X: in.w - reach, Y: reach}}
	case len(in.lying) == 0:
		return []section.Point{{}}
	}
	var out []section.Point
	for _, o := range in.lying {
		out = append(out, section.Point{X: o.x + o.r + reach, Y: o.y}, section.Point{X: o.x - o.r - reach, Y: o.y})
	}
	return out
}

// againstWall are the places that touch the wall and one part.
func (in *putRoom) againstWall(o obstacle, reach float64) []section.Point {
	switch {
	case in.r > 0:
		return meeting(obstacle{}, in.r-reach, o, o.r+reach)
	case in.w > 0:
		var out []section.Point
		far := o.r + reach
		for _, y := range []float64{reach, in.h - reach} {
			if dy := y - o.y; math.Abs(dy) <= far {
				dx := math.Sqrt(far*far - dy*dy)
				out = append(out, section.Point{X: o.x - dx, Y: y}, section.Point{X: o.x + dx, Y: y})
			}
		}
		for _, x := range []float64{reach, in.w - reach} {
			if dx := x - o.x; math.Abs(dx) <= far {
				dy := math.Sqrt(far*far - dx*dx)
				out = append(out, section.Point{X: x, Y: o.y - dy}, section.Point{X: x, Y: o.y + dy})
			}
		}
		return out
	}
	return nil
}

// meeting returns the points at distance a from one centre and b from the other.
func meeting(o obstacle, a float64, q obstacle, b float64) []section.Point {
	dx, dy := q.x-o.x, q.y-o.y
	d := math.Hypot(dx, dy)
	if a <= 0 || b <= 0 || d == 0 || d > a+b || d < math.Abs(a-b) {
		return nil
	}
	along := (d*d + a*a - b*b) / (2 * d)
	off := math.Sqrt(max(0, a*a-along*along))
	mx, my := o.x+along*dx/d, o.y+along*dy/d
	return []section.Point{{X: mx - off*dy/d, Y: my + off*dx/d}, {X: mx + off*dy/d, Y: my - off*dx/d}}
}

// free tells whether a disc lies inside the wall and over nothing, by a hair less than the gap that was kept.
func (in *putRoom) free(p section.Point, r float64) bool {
	const slack = putGap / 2
	switch {
	case in.r > 0 && math.Hypot(p.X, p.Y)+r > in.r-slack:
		return false
	case in.w > 0 && (p.X-r < slack || p.X+r > in.w-slack || p.Y-r < slack || p.Y+r > in.h-slack):
		return false
	}
	for _, o := range in.lying {
		if math.Hypot(p.X-o.x, p.Y-o.y) < r+o.r+slack {
			return false
		}
	}
	return true
}
