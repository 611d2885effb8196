package study

import (
	"cmp"
	"math"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// disc is a part of the top level as an obstacle.
type disc struct {
	id      string
	x, y, r float64
}

func (a *adviser) discs() (out []disc, ok bool) {
	for i := range a.p.Shapes {
		sh := &a.p.Shapes[i]
		if sh.ID == "" || sh.Depth > 0 {
			continue
		}
		if sh.Unset {
			return nil, false
		}
		r := sh.OuterR()
		for _, l := range sh.Loops {
			for _, q := range l {
				r = math.Max(r, math.Hypot(q.X-sh.At.X, q.Y-sh.At.Y))
			}
		}
		out = append(out, disc{sh.ID, sh.At.X, sh.At.Y, r})
	}
	return out, true
}

// within is the inside of a holder: a circle about the origin, a rectangle from the origin, or no wall. falls: parts lie on what is below them.
type within struct {
	r, w, h float64
	falls   bool
}

func (a *adviser) inside() within {
	inv, _ := rating.Take(a.w, a.s.cat)
	return insideOf(a.w, &inv.Holder)
}

func insideOf(d *section.Document, h *rating.Enclosing) within {
	in := within{falls: d.Holder.Kind == section.Conduit || d.Holder.Kind == section.Wireway}
	switch h.Kind {
	case section.Wireway:
		in.w, in.h = h.WidthMM, h.HeightMM
	case section.Conduit, section.Jacket:
		in.r = h.InsideMM / 2
	}
	return in
}

// before orders places for one more part: where parts fall the lowest, else the nearest to the middle.
func (in within) before(a, b section.Point, discs []disc) int {
	if in.falls {
		return cmp.Or(cmp.Compare(round3(a.Y), round3(b.Y)), cmp.Compare(a.X, b.X))
	}
	x, y := 0.0, 0.0
	if in.r <= 0 {
		for _, d := range discs {
			x, y = x+d.x/float64(len(discs)), y+d.y/float64(len(discs))
		}
	}
	return cmp.Or(cmp.Compare(round3(math.Hypot(a.X-x, a.Y-y)), round3(math.Hypot(b.X-x, b.Y-y))), cmp.Compare(a.Y, b.Y), cmp.Compare(a.X, b.X))
}

// free lists places where a part touches two others, or one and the wall, and overlaps nothing; where parts fall, only those that it rests in.
func free(discs []disc, m movable, in within) (out []section.Point) {
	r := m.outsideMM / 2
	var others []disc
	for _, d := range discs {
		if d.id != m.id {
			others = append(others, disc{d.id, d.x, d.y, d.r + r + gapMM}) // the centre stays on or outside of this
		}
	}
	try := func(x, y float64) {
		if !in.holds(x, y, r) || math.Hypot(x-m.at.X, y-m.at.Y) < r/2 {
			return
		}
		for _, d := range others {
			if math.Hypot(x-d.x, y-d.y) < d.r-1e-6 {
				return
			}
		}
		if in.falls && !in.rests(x, y, r, others) {
			return
		}
		for _, p := range out {
			if math.Hypot(p.X-x, p.Y-y) < 0.1 {
				return
			}
		}
		out = append(out, section.Point{X: x, Y: y})
	}
	for i, d := range others {
		for _, e := range others[i+1:] {
			cross(d.x, d.y, d.r, e.x, e.y, e.r, try)
		}
		if in.r > r {
			cross(d.x, d.y, d.r, 0, 0, in.r-r-gapMM, try)
		}
		if in.w > 0 {
			d.beside(r+gapMM, in.w-r-gapMM, r+gapMM, try)
		}
	}
	if in.w > 0 {
		try(r+gapMM, r+gapMM)
		try(in.w-r-gapMM, r+gapMM)
	}
	return out
}

// beside tries where the circle about a disc meets the lines of the left and right walls and of the floor.
func (d disc) beside(left, right, floor float64, try func(x, y float64)) {
	for _, x := range []float64{left, right} {
		if s := d.r*d.r - (x-d.x)*(x-d.x); s >= 0 {
			try(x, d.y+math.Sqrt(s))
			try(x, d.y-math.Sqrt(s))
		}
	}
	if s := d.r*d.r - (floor-d.y)*(floor-d.y); s >= 0 {
		try(d.x+math.Sqrt(s), floor)
		try(d.x-math.Sqrt(s), floor)
	}
}

// cross tries where two circles meet.
func cross(x0, y0, r0, x1, y1, r1 float64, try func(x, y float64)) {
	dx, dy := x1-x0, y1-y0
	d := math.Hypot(dx, dy)
	if d == 0 || d > r0+r1 || d < math.Abs(r0-r1) {
		return
	}
	along := (d*d + r0*r0 - r1*r1) / (2 * d)
	up := math.Sqrt(math.Max(0, r0*r0-along*along))
	x, y := x0+along*dx/d, y0+along*dy/d
	try(x-up*dy/d, y+up*dx/d)
	try(x+up*dy/d, y-up*dx/d)
}

func (in within) holds(x, y, r float64) bool {
	switch {
	case in.r > 0:
		return math.Hypot(x, y) <= in.r-r-gapMM+1e-6
	case in.w > 0:
		return x >= r && x <= in.w-r && y >= r && y <= in.h-r
	}
	return true
}

// rests tells whether what lies at a place is held from below: straight, or from the left and from the right.
func (in within) rests(x, y, r float64, others []disc) bool {
	const touch = 0.05
	left, right := false, false
	hold := func(px, py float64) { // direction to a contact
		if py < 0 {
			left, right = left || px <= 1e-6, right || px >= -1e-6
		}
	}
	for _, d := range others {
		if math.Abs(math.Hypot(x-d.x, y-d.y)-d.r) < touch {
			hold(d.x-x, d.y-y)
		}
	}
	if in.r > 0 && math.Hypot(x, y) > in.r-r-gapMM-touch {
		hold(x, y)
	}
	if in.w > 0 {
		if y < r+touch {
			return true
		}
		left, right = left || x < r+touch, right || x > in.w-r-touch
	}
	return left && right
}
