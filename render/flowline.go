package render

import (
	"math"

	"packrise/solver/section"
)

// flowEnd tells where a heat-flow line ends.
type flowEnd int

const (
	flowOut  flowEnd = iota // at the outer surface
	flowWall                // on the metal of a rectangle's wall
	flowMet                 // on the metal of another part, from whose cooler side another goes on
)

// flowLine is one line in mm, from hot to cold.
type flowLine struct {
	from, to int // metals; from is −1 where the line comes in from outside, to is −1 unless it ends on one
	points   []section.Point
	end      flowEnd
}

// flowPatience is for how many steps of the grid a line may go without getting colder: at the face of good metal the slopes on
// either side are unlike, and the grid, which has their mean, leads along it for a while.
const flowPatience = 12

// follow walks from a surface downhill by an embedded Runge–Kutta pair of orders 2 and 3 (Bogacki & Shampine 1989) over the unit
// vectors of steepest fall: what it steps along is length. It is false where the heat does not go on by conduction: at the surface of
// a part that radiates more than its own metal sends out, what comes through the gas ends.
func (g *flowGrid) follow(guard *flowGuard, metals []flowMetal, from int, at, out section.Point) (flowLine, bool) {
	l := flowLine{from: from, to: -1, points: []section.Point{at}}
	if !g.descend(&l, guard, metals, section.Point{X: at.X + 0.75*g.h*out.X, Y: at.Y + 0.75*g.h*out.Y}) { // heat leaves metal squarely
		return l, false
	}
	if thin := thinned(l.points, 0.03*g.h); guard.free(thin) {
		l.points = thin
	}
	return l, guard.free(l.points)
}

// descend adds the points of a line, of which the first is given.
func (g *flowGrid) descend(l *flowLine, guard *flowGuard, metals []flowMetal, q section.Point) bool {
	if done, ok := g.advance(l, guard, metals, q); done {
		return ok
	}
	most := 10 * float64(g.nx+g.ny) * g.h
	low, since := g.temp(q), 0.0
	for step, long := g.h, 0.0; long < most; {
		next, miss, ok := g.step(q, step)
		tolerance := 0.004 * g.h
		if ok && miss > tolerance && step > 0.02*g.h {
			step *= max(0.2, 0.9*math.Cbrt(tolerance/miss))
			continue
		}
		if !ok && step > 0.02*g.h { // beside an edge past which nothing is known
			step /= 2
			continue
		}
		if !ok {
			return false
		}
		long, since = long+step, since+step
		q = next
		if done, ok := g.advance(l, guard, metals, q); done {
			return ok
		}
		if t := g.temp(q); t < low {
			low, since = t, 0
		}
		if since > flowPatience*g.h {
			return false
		}
		step = min(1.5*g.h, step*min(3, 0.9*math.Cbrt(tolerance/max(miss, 1e-12*g.h))))
	}
	return false
}

// advance takes a line one point further, beside another line where that is in the way; done tells that it has come to an end, ok
// that it has a good one.
func (g *flowGrid) advance(l *flowLine, guard *flowGuard, metals []flowMetal, q section.Point) (done, ok bool) {
	last := len(l.points)
	done = g.ends(l, metals, q)
	if w, met := guard.meets(l.points[last-1], l.points[last]); met {
		l.points, l.to = l.points[:last], -1
		return true, guard.beside(l, w, 0.02*g.h)
	}
	return done, done
}

// step goes one step of a length and tells by how much the two orders differ.
func (g *flowGrid) step(q section.Point, s float64) (next section.Point, miss float64, ok bool) {
	add := func(f1 float64, a section.Point, f2 float64, b section.Point, f3 float64, c section.Point) section.Point {
		return section.Point{X: q.X + s*(f1*a.X+f2*b.X+f3*c.X), Y: q.Y + s*(f1*a.Y+f2*b.Y+f3*c.Y)}
	}
	k1, ok1 := g.down(q)
	k2, ok2 := g.down(add(0.5, k1, 0, k1, 0, k1))
	k3, ok3 := g.down(add(0, k1, 0.75, k2, 0, k1))
	next = add(2.0/9, k1, 3.0/9, k2, 4.0/9, k3)
	k4, ok4 := g.down(next)
	low := section.Point{
		X: q.X + s*(7*k1.X/24+k2.X/4+k3.X/3+k4.X/8),
		Y: q.Y + s*(7*k1.Y/24+k2.Y/4+k3.Y/3+k4.Y/8),
	}
	return next, between(next, low), ok1 && ok2 && ok3 && ok4
}

// ends adds a point to a line, or the place between it and the one before where the line meets metal or the outside.
func (g *flowGrid) ends(l *flowLine, metals []flowMetal, q section.Point) bool {
	last := l.points[len(l.points)-1]
	for i, m := range metals {
		if i != l.from && m.has(q) {
			l.to, l.end = i, flowMet
			l.points = append(l.points, lastWhere(last, q, func(p section.Point) bool { return !m.has(p) }))
			return true
		}
	}
	if g.wall != nil && g.wall(q) {
		l.end = flowWall
		l.points = append(l.points, lastWhere(last, q, func(p section.Point) bool { return !g.wall(p) }))
		return true
	}
	if !g.inside(q) {
		l.end = flowOut
		l.points = append(l.points, lastWhere(last, q, g.inside))
		return true
	}
	l.points = append(l.points, q)
	return false
}

// lastWhere returns the last point from a towards b where something that holds at a still does.
func lastWhere(a, b section.Point, holds func(section.Point) bool) section.Point {
	for range 20 {
		mid := section.Point{X: (a.X + b.X) / 2, Y: (a.Y + b.Y) / 2}
		if holds(mid) {
			a = mid
		} else {
			b = mid
		}
	}
	return a
}

// thinned drops points that lie within off of the line through those that stay (Ramer 1972, Douglas & Peucker 1973).
func thinned(points []section.Point, off float64) []section.Point {
	if len(points) < 3 {
		return points
	}
	a, b := points[0], points[len(points)-1]
	worst, at := off, 0
	for i, q := range points[1 : len(points)-1] {
		if d := segmentDistance(q, a, b); d > worst {
			worst, at = d, i+1
		}
	}
	if at == 0 {
		return []section.Point{a, b}
	}
	left, right := thinned(points[:at+1], off), thinned(points[at:], off)
	return append(left[:len(left)-1:len(left)-1], right...)
}
