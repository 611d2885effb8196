package ui

import (
	"cmp"
	"math"
	"slices"

	"packrise/solver/section"
)

// While a part is dragged it follows the pointer as far as its neighbours and the wall allow: it is held at the free place nearest to the pointer,
// touching what is in the way.

const (
	holdGap  = 1e-4 // mm left to what is touched, well under the micrometre that counts as touching
	holdSlip = 5e-5 // mm of overlap that a place may have and still be free
)

// disc is a round outline in millimetres.
type disc struct {
	at section.Point
	r  float64
}

// room is the inside of a holder: round about the origin (r > 0), a rectangle with its lower left corner at the origin (w, h > 0), or open.
type room struct{ r, w, h float64 }

// roomOf reads the holder's inside from its shape, which stands first.
func roomOf(shapes []section.Shape) room {
	if len(shapes) == 0 || shapes[0].ID != "" {
		return room{}
	}
	h := shapes[0]
	switch {
	case h.Width > 0:
		return room{w: h.Width, h: h.Height}
	case h.Kind == section.OpenBundle || h.Kind == section.Apart || h.Kind == section.NoHolder || len(h.Rings) == 0:
		return room{}
	}
	r := h.Rings[0].R0
	if r == 0 {
		r = h.Rings[0].R1
	}
	return room{r: r}
}

// inside returns the place nearest to p where a disc of radius r lies within the room.
func (m room) inside(p section.Point, r float64) section.Point {
	switch {
	case m.r > 0:
		most := max(0, m.r-r-holdGap)
		if d := math.Hypot(p.X, p.Y); d > most {
			return section.Point{X: p.X * most / d, Y: p.Y * most / d}
		}
	case m.w > 0:
		return section.Point{X: between(p.X, r+holdGap, m.w-r-holdGap), Y: between(p.Y, r+holdGap, m.h-r-holdGap)}
	}
	return p
}

// between clamps v; where low is above high (the part is too big) it returns the middle.
func between(v, low, high float64) float64 {
	if low > high {
		return (low + high) / 2
	}
	return min(max(v, low), high)
}

// within tells whether the disc lies in the room.
func (m room) within(d disc) bool {
	in := m.inside(d.at, d.r)
	return math.Hypot(in.X-d.at.X, in.Y-d.at.Y) <= holdGap+holdSlip
}

// free tells whether the disc overlaps neither the others nor the wall.
func free(d disc, others []disc, in room) bool {
	for _, o := range others {
		if math.Hypot(o.at.X-d.at.X, o.at.Y-d.at.Y) < o.r+d.r-holdSlip {
			return false
		}
	}
	return in.within(d)
}

// nearestFree returns the free place nearest to the one wanted; ok is false if there is none.
func nearestFree(want disc, others []disc, in room) (at section.Point, ok bool) {
	if free(want, others, in) {
		return want.at, true
	}
	places := contacts(want, others, in)
	far := func(p section.Point) float64 { return math.Hypot(p.X-want.at.X, p.Y-want.at.Y) }
	slices.SortFunc(places, func(a, b section.Point) int { return cmp.Compare(far(a), far(b)) })
	for _, p := range places {
		if free(disc{p, want.r}, others, in) {
			return p, true
		}
	}
	return want.at, false
}

// contacts lists the places where the disc touches one neighbour or the wall on the way to where it is wanted, or two of them at once: the nearest
// free place is one of these.
func contacts(want disc, others []disc, in room) []section.Point {
	places := []section.Point{in.inside(want.at, want.r)}
	places = append(places, in.corners(want.r)...)
	for i, o := range others {
		reach := o.r + want.r + holdGap
		places = append(places, towards(o.at, want.at, reach))
		places = append(places, in.beside(o.at, reach, want.r)...)
		for _, q := range others[:i] {
			places = append(places, meet(o.at, reach, q.at, q.r+want.r+holdGap)...)
		}
	}
	return places
}

// towards returns the point at distance r from a in the direction of b, upwards where they coincide.
func towards(a, b section.Point, r float64) section.Point {
	dx, dy := b.X-a.X, b.Y-a.Y
	d := math.Hypot(dx, dy)
	if d == 0 {
		return section.Point{X: a.X, Y: a.Y + r}
	}
	return section.Point{X: a.X + dx*r/d, Y: a.Y + dy*r/d}
}

// meet returns where two circles cross: none or two points.
func meet(a section.Point, ra float64, b section.Point, rb float64) []section.Point {
	dx, dy := b.X-a.X, b.Y-a.Y
	d2 := dx*dx + dy*dy
	if d2 == 0 || d2 > (ra+rb)*(ra+rb) || d2 < (ra-rb)*(ra-rb) {
		return nil
	}
	along := (d2 + ra*ra - rb*rb) / (2 * d2)
	across := math.Sqrt(max(0, ra*ra/d2-along*along))
	return []section.Point{
		{X: a.X + along*dx - across*dy, Y: a.Y + along*dy + across*dx},
		{X: a.X + along*dx + across*dy, Y: a.Y + along*dy - across*dx},
	}
}

// beside lists the places at distance reach from a where a disc of radius r touches the wall.
func (m room) beside(a section.Point, reach, r float64) []section.Point {
	switch {
	case m.r > 0 && m.r > r+holdGap:
		return meet(a, reach, section.Point{}, m.r-r-holdGap)
	case m.w > 0:
		var places []section.Point
		for _, x := range []float64{r + holdGap, m.w - r - holdGap} {
			if c := reach*reach - (x-a.X)*(x-a.X); c >= 0 {
				s := math.Sqrt(c)
				places = append(places, section.Point{X: x, Y: a.Y - s}, section.Point{X: x, Y: a.Y + s})
			}
		}
		for _, y := range []float64{r + holdGap, m.h - r - holdGap} {
			if c := reach*reach - (y-a.Y)*(y-a.Y); c >= 0 {
				s := math.Sqrt(c)
				places = append(places, section.Point{X: a.X - s, Y: y}, section.Point{X: a.X + s, Y: y})
			}
		}
		return places
	}
	return nil
}

// corners lists the places in the corners of a rectangle.
func (m room) corners(r float64) []section.Point {
	if m.w == 0 {
		return nil
	}
	var places []section.Point
	for _, x := range []float64{r + holdGap, m.w - r - holdGap} {
		for _, y := range []float64{r + holdGap, m.h - r - holdGap} {
			places = append(places, section.Point{X: x, Y: y})
		}
	}
	return places
}

// heldShift returns how far a group may be shifted of what is wanted: all of it, or as far along the way from a shift that is known to be free.
func heldShift(group, others []disc, in room, from, want section.Point) section.Point {
	ok := func(s section.Point) bool {
		for _, g := range group {
			if !free(disc{section.Point{X: g.at.X + s.X, Y: g.at.Y + s.Y}, g.r}, others, in) {
				return false
			}
		}
		return true
	}
	if ok(want) {
		return want
	}
	low, high := 0.0, 1.0
	at := func(f float64) section.Point {
		return section.Point{X: from.X + f*(want.X-from.X), Y: from.Y + f*(want.Y-from.Y)}
	}
	for range 24 {
		if mid := (low + high) / 2; ok(at(mid)) {
			low = mid
		} else {
			high = mid
		}
	}
	return at(low)
}
