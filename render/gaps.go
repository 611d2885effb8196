package render

import (
	"math"

	"packrise/solver/section"
)

// gaps is the network of free room between discs: voids (centres of the circles that touch three discs and hold none) joined
// through gates (the middle of the gap between two). A leader from a part in the midst of others runs along it.
type gaps struct {
	discs []disc
	slack float64
	nodes []gapNode
	gate  map[[2]int]int
}

type gapNode struct {
	at   section.Point
	of   []int // the discs beside it
	next []int
}

// newGaps returns the network between discs; its voids and gates are only found by build.
func newGaps(discs []disc, slack float64) *gaps { return &gaps{discs: discs, slack: slack} }

// build finds the voids and gates, once.
func (g *gaps) build() {
	if g.gate != nil {
		return
	}
	g.gate = map[[2]int]int{}
	discs := g.discs
	near := make([][]int, len(discs))
	for i, a := range discs {
		for j, b := range discs {
			if j > i && math.Hypot(a.x-b.x, a.y-b.y)-a.r-b.r < 0.9*(a.r+b.r) {
				near[i] = append(near[i], j)
			}
		}
	}
	for i := range discs {
		for m, j := range near[i] {
			for _, k := range near[i][m+1:] {
				g.addVoid(i, j, k)
			}
		}
	}
}

func (g *gaps) addVoid(i, j, k int) {
	for _, v := range touchThree(g.discs[i], g.discs[j], g.discs[k]) {
		if v.r < -g.slack || !g.empty(v) {
			continue
		}
		n := len(g.nodes)
		g.nodes = append(g.nodes, gapNode{at: section.Point{X: v.x, Y: v.y}, of: []int{i, j, k}})
		for _, pair := range [][2]int{{i, j}, {i, k}, {j, k}} {
			m := g.gateOf(pair)
			if segmentClear(g.discs, g.nodes[n].at, g.nodes[m].at, g.slack) {
				g.nodes[n].next = append(g.nodes[n].next, m)
				g.nodes[m].next = append(g.nodes[m].next, n)
			}
		}
	}
}

// gateOf returns the node in the middle of the gap between two discs.
func (g *gaps) gateOf(pair [2]int) int {
	if n, ok := g.gate[pair]; ok {
		return n
	}
	a, b := g.discs[pair[0]], g.discs[pair[1]]
	d := math.Hypot(b.x-a.x, b.y-a.y)
	t := 0.5
	if d > 0 {
		t = (a.r + (d-a.r-b.r)/2) / d
	}
	n := len(g.nodes)
	g.nodes = append(g.nodes, gapNode{at: section.Point{X: a.x + t*(b.x-a.x), Y: a.y + t*(b.y-a.y)}, of: pair[:]})
	g.gate[pair] = n
	return n
}

// empty tells whether no disc reaches into v by more than slack.
func (g *gaps) empty(v disc) bool {
	for _, d := range g.discs {
		if math.Hypot(d.x-v.x, d.y-v.y) < d.r+v.r-g.slack {
			return false
		}
	}
	return true
}

// touchThree returns the circles that touch three discs from outside (Apollonius' problem, by subtracting the first circle's
// equation from the others').
func touchThree(p, q, s disc) []disc {
	a, b := q.x-p.x, q.y-p.y
	c, d := s.x-p.x, s.y-p.y
	det := a*d - b*c
	if math.Abs(det) < 1e-9*(math.Abs(a*d)+math.Abs(b*c)+1e-12) {
		return nil
	}
	e, f := (a*a+b*b-q.r*q.r+p.r*p.r)/2, (c*c+d*d-s.r*s.r+p.r*p.r)/2
	x0, x1 := (e*d-f*b)/det, -((q.r-p.r)*d-(s.r-p.r)*b)/det
	y0, y1 := (a*f-c*e)/det, -(a*(s.r-p.r)-c*(q.r-p.r))/det
	qa, qb, qc := x1*x1+y1*y1-1, x0*x1+y0*y1-p.r, x0*x0+y0*y0-p.r*p.r
	var out []disc
	for _, r := range roots(qa, qb, qc) {
		if r+p.r > 0 && r+q.r > 0 && r+s.r > 0 {
			out = append(out, disc{p.x + x0 + x1*r, p.y + y0 + y1*r, r})
		}
	}
	return out
}

// roots returns the real roots of a·r² + 2·b·r + c = 0.
func roots(a, b, c float64) []float64 {
	if math.Abs(a) < 1e-12 {
		if b == 0 {
			return nil
		}
		return []float64{-c / (2 * b)}
	}
	q := b*b - a*c
	if q < 0 {
		return nil
	}
	h := math.Sqrt(q)
	return []float64{(-b + h) / a, (-b - h) / a}
}

// straight returns the ways out of disc i that run square through the middle of a gap: between discs that touch, no other
// direction is free.
func (g *gaps) straight(i int) []lead {
	t := g.discs[i]
	others := append(append([]disc(nil), g.discs[:i]...), g.discs[i+1:]...)
	var out []lead
	for _, n := range g.nodes {
		if len(n.of) != 2 || n.of[0] == i || n.of[1] == i {
			continue
		}
		a, b := g.discs[n.of[0]], g.discs[n.of[1]]
		l := math.Hypot(b.x-a.x, b.y-a.y)
		dx, dy := -(b.y-a.y)/l, (b.x-a.x)/l
		if (n.at.X-t.x)*dx+(n.at.Y-t.y)*dy < 0 {
			dx, dy = -dx, -dy
		}
		off := (t.x-n.at.X)*dy - (t.y-n.at.Y)*dx
		if math.Abs(off) > 0.95*t.r {
			continue
		}
		// the foot of the target's centre on the line, then along it to the outline
		along := (t.x-n.at.X)*dx + (t.y-n.at.Y)*dy + math.Sqrt(t.r*t.r-off*off)
		x, y := n.at.X+along*dx, n.at.Y+along*dy
		if rayClear(others, x, y, dx, dy, g.slack) {
			out = append(out, lead{[]section.Point{{X: x, Y: y}}, dx, dy})
		}
	}
	return out
}

// enough leads are looked at before the search through the gaps ends.
const enough = 40

// from returns ways out of disc i through the gaps, shortest first.
func (g *gaps) from(i int) []lead {
	target := g.discs[i]
	dist := make([]float64, len(g.nodes))
	back := make([]int, len(g.nodes))
	done := make([]bool, len(g.nodes))
	for n := range g.nodes {
		dist[n], back[n] = math.Inf(1), -1
		for _, o := range g.nodes[n].of {
			if o == i {
				dist[n] = max(0, math.Hypot(g.nodes[n].at.X-target.x, g.nodes[n].at.Y-target.y)-target.r)
			}
		}
	}
	var out []lead
	for len(out) < enough {
		n := -1
		for m := range dist {
			if !done[m] && !math.IsInf(dist[m], 1) && (n < 0 || dist[m] < dist[n]) {
				n = m
			}
		}
		if n < 0 {
			break
		}
		done[n] = true
		out = append(out, g.exits(i, n, back)...)
		for _, m := range g.nodes[n].next {
			if d := dist[n] + between(g.nodes[n].at, g.nodes[m].at); d < dist[m] {
				dist[m], back[m] = d, n
			}
		}
	}
	return out
}

func between(a, b section.Point) float64 { return math.Hypot(a.X-b.X, a.Y-b.Y) }

// exits returns the leads that leave the discs for good at node n.
func (g *gaps) exits(target, n int, back []int) []lead {
	at := g.nodes[n].at
	var out []lead
	var way []section.Point
	for h := range headings / 2 {
		sin, cos := math.Sincos(4 * pi * float64(h) / headings)
		if !rayClear(g.discs, at.X, at.Y, cos, sin, g.slack) {
			continue
		}
		if way == nil {
			for m := n; m >= 0; m = back[m] {
				way = append(way, g.nodes[m].at)
			}
			way = g.tighten(g.discs[target], way)
		}
		if way == nil {
			return nil
		}
		out = append(out, lead{way, cos, sin})
	}
	return out
}

// tighten turns a way (its last point first) into one that starts on the target's outline and has no needless bends; nil if
// its first step is not free.
func (g *gaps) tighten(target disc, way []section.Point) []section.Point {
	pts := make([]section.Point, 0, len(way)+1)
	for i := len(way) - 1; i >= 0; i-- {
		pts = append(pts, way[i])
	}
	for len(pts) > 1 && g.clearFrom(target, pts[1]) {
		pts = pts[1:]
	}
	if !g.clearFrom(target, pts[0]) {
		return nil
	}
	pts = append([]section.Point{onOutline(target, pts[0])}, pts...)
	for i := 1; i+1 < len(pts); {
		if segmentClear(g.discs, pts[i-1], pts[i+1], g.slack) {
			pts = append(pts[:i:i], pts[i+1:]...)
			continue
		}
		i++
	}
	return pts
}

// clearFrom tells whether the straight way from the target's outline to p is free.
func (g *gaps) clearFrom(target disc, p section.Point) bool {
	return segmentClear(g.discs, onOutline(target, p), p, g.slack)
}

// onOutline returns the point of a circle nearest to p.
func onOutline(d disc, p section.Point) section.Point {
	l := math.Hypot(p.X-d.x, p.Y-d.y)
	if l == 0 {
		return section.Point{X: d.x + d.r, Y: d.y}
	}
	return section.Point{X: d.x + (p.X-d.x)*d.r/l, Y: d.y + (p.Y-d.y)*d.r/l}
}
