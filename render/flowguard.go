package render

import (
	"math"

	"packrise/solver/section"
)

// flowGuard keeps heat-flow lines apart. Two of them never meet in truth; where they come closer than steps and grid are good for,
// the later one goes on beside the earlier one to its end.
type flowGuard struct {
	lines []flowLine
	size  float64          // of a bucket, mm
	near  map[[2]int][]way // pieces by the buckets of the boxes round them
}

// way is the piece of a line that ends at a point.
type way struct{ line, point int }

func newFlowGuard(size float64) *flowGuard { return &flowGuard{size: size, near: map[[2]int][]way{}} }

// add keeps a finished line.
func (g *flowGuard) add(l flowLine) {
	for i := 1; i < len(l.points); i++ {
		g.buckets(l.points[i-1], l.points[i], func(at [2]int) bool {
			g.near[at] = append(g.near[at], way{len(g.lines), i})
			return false
		})
	}
	g.lines = append(g.lines, l)
}

// buckets calls f for all buckets round a piece until it is true.
func (g *flowGuard) buckets(a, b section.Point, f func([2]int) bool) {
	x0, x1 := int(math.Floor(min(a.X, b.X)/g.size)), int(math.Floor(max(a.X, b.X)/g.size))
	y0, y1 := int(math.Floor(min(a.Y, b.Y)/g.size)), int(math.Floor(max(a.Y, b.Y)/g.size))
	for y := y0; y <= y1; y++ {
		for x := x0; x <= x1; x++ {
			if f([2]int{x, y}) {
				return
			}
		}
	}
}

// meets finds the first piece that the way from a to b crosses or touches.
func (g *flowGuard) meets(a, b section.Point) (w way, ok bool) {
	first := math.Inf(1)
	g.buckets(a, b, func(at [2]int) bool {
		for _, n := range g.near[at] {
			l := g.lines[n.line].points
			if u, met := meeting(a, b, l[n.point-1], l[n.point]); met && u < first {
				first, w, ok = u, n, true
			}
		}
		return false
	})
	return w, ok
}

// free tells whether a whole line meets no other.
func (g *flowGuard) free(points []section.Point) bool {
	for i := 1; i < len(points); i++ {
		if _, met := g.meets(points[i-1], points[i]); met {
			return false
		}
	}
	return true
}

// meeting finds where the way from a to b meets the piece from p to q, as a share of the way.
func meeting(a, b, p, q section.Point) (u float64, ok bool) {
	d, e, f := section.Point{X: b.X - a.X, Y: b.Y - a.Y}, section.Point{X: q.X - p.X, Y: q.Y - p.Y}, section.Point{X: p.X - a.X, Y: p.Y - a.Y}
	det := d.X*e.Y - d.Y*e.X
	if det == 0 {
		return 0, false
	}
	u, v := (f.X*e.Y-f.Y*e.X)/det, (f.X*d.Y-f.Y*d.X)/det
	return u, u >= 0 && u <= 1 && v >= -1e-9 && v <= 1+1e-9
}

// beside lets a line, whose last point is still on its own side of another, go on along that one at a distance, and along the next
// where that one is in the way at half of it. It is false where there is no room.
func (g *flowGuard) beside(l *flowLine, w way, off float64) bool {
	for range 8 {
		o := g.lines[w.line]
		left := sideOf(o.points[w.point-1], o.points[w.point], l.points[len(l.points)-1])
		blocked := false
		for k := w.point; k < len(o.points) && !blocked; k++ {
			q, last := shifted(o.points, k, left*off), l.points[len(l.points)-1]
			if w, blocked = g.meets(last, q); !blocked {
				l.points = append(l.points, q)
			}
		}
		if !blocked {
			l.end, l.to = o.end, o.to
			return true
		}
		off /= 2
	}
	return false
}

// sideOf is 1 where q lies to the left of the way from a to b, else −1.
func sideOf(a, b, q section.Point) float64 {
	return math.Copysign(1, (b.X-a.X)*(q.Y-a.Y)-(b.Y-a.Y)*(q.X-a.X))
}

// shifted returns point k of a line moved to its left.
func shifted(line []section.Point, k int, off float64) section.Point {
	a, b := line[max(0, k-1)], line[min(len(line)-1, k+1)]
	d := between(a, b)
	if d == 0 {
		return line[k]
	}
	return section.Point{X: line[k].X - off*(b.Y-a.Y)/d, Y: line[k].Y + off*(b.X-a.X)/d}
}
