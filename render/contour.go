package render

import "packrise/solver/section"

// contours returns for each value the lines where the grid has it, as polylines in pixels (marching squares: each cell's
// crossings are joined, ambiguous saddles by the cell's mean). Cells with an unknown corner have none.
func (g *tempGrid) contours(values []float64) [][][]section.Point {
	tracers := make([]*tracer, len(values))
	for i, t := range values {
		tracers[i] = &tracer{g: g, t: t, at: map[int]section.Point{}, next: map[int][2]int{}}
	}
	for j := range g.ny - 1 {
		for i := range g.nx - 1 {
			n := j*g.nx + i
			a, b, c, d := g.v[n], g.v[n+1], g.v[n+g.nx+1], g.v[n+g.nx]
			lo, hi := min(a, b, c, d), max(a, b, c, d)
			if lo != lo { // min and max of a NaN are NaN
				continue
			}
			for k, t := range values {
				if lo < t && t <= hi {
					tracers[k].cell(i, j)
				}
			}
		}
	}
	out := make([][][]section.Point, len(values))
	for i, c := range tracers {
		out[i] = c.chain()
	}
	return out
}

// tracer collects crossings by the number of the grid edge they lie on: 2·node for the edge to the right of a node, 2·node + 1
// for the edge below it.
type tracer struct {
	g     *tempGrid
	t     float64
	at    map[int]section.Point
	next  map[int][2]int // the neighbours along the line, plus one; 0 for none
	order []int          // edges as first met, so that the result does not hang on map order
}

func (c *tracer) cell(i, j int) {
	g := c.g
	n := j*g.nx + i
	v := [4]float64{g.v[n], g.v[n+1], g.v[n+g.nx+1], g.v[n+g.nx]}
	var crossed [4]int
	k := 0
	for e := range 4 {
		a, b := v[e], v[(e+1)%4]
		if (a < c.t) != (b < c.t) {
			crossed[k] = e
			k++
		}
	}
	edge := [4]int{2 * n, 2*(n+1) + 1, 2 * (n + g.nx), 2*n + 1}
	for _, e := range crossed[:k] {
		c.cross(edge[e], i, j, e, v)
	}
	switch k {
	case 2:
		c.join(edge[crossed[0]], edge[crossed[1]])
	case 4:
		mid := (v[0] + v[1] + v[2] + v[3]) / 4
		if (mid < c.t) == (v[0] < c.t) {
			c.join(edge[0], edge[1])
			c.join(edge[2], edge[3])
		} else {
			c.join(edge[3], edge[0])
			c.join(edge[1], edge[2])
		}
	}
}

// cross places the crossing of cell edge e (0 above, 1 right, 2 below, 3 left).
func (c *tracer) cross(id, i, j, e int, v [4]float64) {
	if _, ok := c.at[id]; ok {
		return
	}
	corner := [5][2]float64{{0, 0}, {1, 0}, {1, 1}, {0, 1}, {0, 0}}
	a, b := v[e], v[(e+1)%4]
	f := (c.t - a) / (b - a)
	x := float64(i) + corner[e][0] + f*(corner[e+1][0]-corner[e][0])
	y := float64(j) + corner[e][1] + f*(corner[e+1][1]-corner[e][1])
	c.at[id] = section.Point{X: c.g.x0 + x*c.g.step, Y: c.g.y0 + y*c.g.step}
	c.order = append(c.order, id)
}

func (c *tracer) join(a, b int) {
	c.link(a, b)
	c.link(b, a)
}

func (c *tracer) link(from, to int) {
	n := c.next[from]
	if n[0] == 0 {
		n[0] = to + 1
	} else {
		n[1] = to + 1
	}
	c.next[from] = n
}

// chain walks the joined crossings into lines, open ones first so that each is walked from its end.
func (c *tracer) chain() [][]section.Point {
	var out [][]section.Point
	done := make(map[int]bool, len(c.order))
	for _, open := range []bool{true, false} {
		for _, e := range c.order {
			if !done[e] && (c.next[e][1] == 0) == open {
				if line := c.walk(e, done); len(line) > 1 {
					out = append(out, line)
				}
			}
		}
	}
	return out
}

// walk follows a line from one of its crossings to the end, or once round.
func (c *tracer) walk(from int, done map[int]bool) []section.Point {
	var line []section.Point
	for e, ok := from, true; ok; {
		done[e] = true
		line = append(line, c.at[e])
		ok = false
		for _, n := range c.next[e] {
			switch {
			case n == 0:
			case !done[n-1]:
				e, ok = n-1, true
			case n-1 == from && len(line) > 2:
				line = append(line, c.at[from])
			}
			if ok {
				break
			}
		}
	}
	return line
}
