package render

import "packrise/solver/section"

// contour returns the lines where the grid has the value t, as polylines in pixels (marching squares: each cell's crossings are
// joined, ambiguous saddles by the cell's mean). Cells with an unknown corner have none.
func (g *tempGrid) contour(t float64) [][]section.Point {
	c := &tracer{g: g, t: t, at: map[int]section.Point{}, next: map[int][]int{}}
	for j := range g.ny - 1 {
		for i := range g.nx - 1 {
			c.cell(i, j)
		}
	}
	return c.chain()
}

// tracer collects crossings by the number of the grid edge they lie on: 2·node for the edge to the right of a node, 2·node + 1
// for the edge below it.
type tracer struct {
	g     *tempGrid
	t     float64
	at    map[int]section.Point
	next  map[int][]int
	order []int // edges as first met, so that the result does not hang on map order
}

func (c *tracer) cell(i, j int) {
	g := c.g
	n := j*g.nx + i
	v := [4]float64{g.v[n], g.v[n+1], g.v[n+g.nx+1], g.v[n+g.nx]}
	var crossed [4]int
	k := 0
	for e := range 4 {
		a, b := v[e], v[(e+1)%4]
		if a != a || b != b {
			return
		}
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
	c.next[a] = append(c.next[a], b)
	c.next[b] = append(c.next[b], a)
}

// chain walks the joined crossings into lines, open ones first.
func (c *tracer) chain() [][]section.Point {
	var out [][]section.Point
	done := map[int]bool{}
	walk := func(from int) {
		var line []section.Point
		for e, ok := from, true; ok; {
			done[e] = true
			line = append(line, c.at[e])
			ok = false
			for _, n := range c.next[e] {
				if !done[n] {
					e, ok = n, true
					break
				}
			}
			if !ok && len(line) > 2 {
				for _, n := range c.next[e] {
					if n == from {
						line = append(line, c.at[from])
					}
				}
			}
		}
		if len(line) > 1 {
			out = append(out, line)
		}
	}
	for _, pass := range []int{1, 2} {
		for _, e := range c.order {
			if !done[e] && len(c.next[e]) <= pass {
				walk(e)
			}
		}
	}
	return out
}
