package render

import (
	"math"

	"packrise/solver/section"
)

// Nodes along the longer side of the grid in which heat-flow lines are followed: usually, at most, and across the smallest metal.
const (
	flowNodes      = 480
	flowMostNodes  = 900
	flowMetalNodes = 10
)

// flowGrid holds temperatures and their slopes at nodes (x0 + i·h, y0 + j·h), in mm and °C. The metal of conductors has one
// temperature, so that its slope says nothing: there, and a little past the outer surface, nodes continue what is beside them.
type flowGrid struct {
	field  Field
	x0, y0 float64
	h      float64
	nx, ny int
	t      []float64
	known  []bool // the field has a value there
	gx, gy []float64
	edge   box                      // the field's bounds
	wall   func(section.Point) bool // the metal of a rectangle's wall, at which lines end; nil for none
}

// newFlowGrid samples a field; ok is false where it has no size.
func newFlowGrid(f Field, metals []flowMetal, wall func(section.Point) bool) (g *flowGrid, ok bool) {
	x0, y0, x1, y1 := f.Bounds()
	long := max(x1-x0, y1-y0)
	if !(long > 0) || !finite(long) || !(x1 > x0 && y1 > y0) {
		return nil, false
	}
	n := float64(flowNodes)
	for _, m := range metals {
		n = max(n, min(flowMostNodes, flowMetalNodes*long/(2*m.r)))
	}
	g = &flowGrid{field: f, h: long / n, edge: box{x0, y0, x1, y1}, wall: wall}
	g.x0, g.y0 = x0-5.5*g.h, y0-5.5*g.h // room past the edge for what extend continues
	g.nx, g.ny = int((x1-x0)/g.h)+12, int((y1-y0)/g.h)+12
	g.t, g.known = make([]float64, g.nx*g.ny), make([]bool, g.nx*g.ny)
	parallelRows(g.ny, func(next func() (int, bool)) {
		for j, ok := next(); ok; j, ok = next() {
			row := g.t[j*g.nx : (j+1)*g.nx]
			f.Row(row, g.y0+float64(j)*g.h, g.x0, g.h)
			for i, t := range row {
				g.known[j*g.nx+i] = finite(t)
			}
		}
	})
	for _, m := range metals {
		g.blank(m)
	}
	if wall != nil {
		for k := range g.t {
			if wall(section.Point{X: g.x0 + float64(k%g.nx)*g.h, Y: g.y0 + float64(k/g.nx)*g.h}) {
				g.t[k] = math.NaN()
			}
		}
	}
	for range 3 {
		g.extend()
	}
	g.slopes()
	return g, true
}

// blank forgets the nodes in metal.
func (g *flowGrid) blank(m flowMetal) {
	i0, i1 := max(0, int((m.at.X-m.r-g.x0)/g.h)), min(g.nx-1, int((m.at.X+m.r-g.x0)/g.h)+1)
	j0, j1 := max(0, int((m.at.Y-m.r-g.y0)/g.h)), min(g.ny-1, int((m.at.Y+m.r-g.y0)/g.h)+1)
	for j := j0; j <= j1; j++ {
		for i := i0; i <= i1; i++ {
			if m.has(section.Point{X: g.x0 + float64(i)*g.h, Y: g.y0 + float64(j)*g.h}) {
				g.t[j*g.nx+i] = math.NaN()
			}
		}
	}
}

// extend continues straight lines through known neighbours by one node.
func (g *flowGrid) extend() {
	type fill struct {
		k int
		t float64
	}
	var fills []fill
	for j := 2; j < g.ny-2; j++ {
		for i := 2; i < g.nx-2; i++ {
			k := j*g.nx + i
			if g.t[k] == g.t[k] {
				continue
			}
			sum, n := 0.0, 0.0
			for _, d := range [8]int{1, -1, g.nx, -g.nx, g.nx + 1, -g.nx - 1, g.nx - 1, 1 - g.nx} {
				if t := 2*g.t[k+d] - g.t[k+2*d]; t == t {
					sum, n = sum+t, n+1
				}
			}
			if n > 0 {
				fills = append(fills, fill{k, sum / n})
			}
		}
	}
	for _, f := range fills {
		g.t[f.k] = f.t
	}
}

// slopes differences the temperatures, on one side only where the other is not known.
func (g *flowGrid) slopes() {
	g.gx, g.gy = make([]float64, len(g.t)), make([]float64, len(g.t))
	slope := func(a, t, b float64) float64 {
		switch {
		case a == a && b == b:
			return (b - a) / (2 * g.h)
		case a == a:
			return (t - a) / g.h
		}
		return (b - t) / g.h
	}
	nan := math.NaN()
	for j := range g.ny {
		for i := range g.nx {
			k := j*g.nx + i
			if i == 0 || j == 0 || i == g.nx-1 || j == g.ny-1 {
				g.gx[k], g.gy[k] = nan, nan
				continue
			}
			g.gx[k], g.gy[k] = slope(g.t[k-1], g.t[k], g.t[k+1]), slope(g.t[k-g.nx], g.t[k], g.t[k+g.nx])
		}
	}
}

// cell returns the node below and left of a point and how far it lies from it, in steps.
func (g *flowGrid) cell(q section.Point) (k int, u, v float64, ok bool) {
	x, y := (q.X-g.x0)/g.h, (q.Y-g.y0)/g.h
	if !(x >= 0 && y >= 0 && x < float64(g.nx-1) && y < float64(g.ny-1)) {
		return 0, 0, 0, false
	}
	i, j := int(x), int(y)
	return j*g.nx + i, x - float64(i), y - float64(j), true
}

func (g *flowGrid) between(a []float64, k int, u, v float64) float64 {
	return (1-v)*((1-u)*a[k]+u*a[k+1]) + v*((1-u)*a[k+g.nx]+u*a[k+g.nx+1])
}

// down returns the unit vector of steepest fall; ok is false where there is none.
func (g *flowGrid) down(q section.Point) (d section.Point, ok bool) {
	k, u, v, ok := g.cell(q)
	if !ok {
		return d, false
	}
	x, y := -g.between(g.gx, k, u, v), -g.between(g.gy, k, u, v)
	l := math.Hypot(x, y)
	if !(l > 1e-9) {
		return d, false
	}
	return section.Point{X: x / l, Y: y / l}, true
}

// temp returns the temperature at a point, continued past the edges.
func (g *flowGrid) temp(q section.Point) float64 {
	k, u, v, ok := g.cell(q)
	if !ok {
		return math.NaN()
	}
	return g.between(g.t, k, u, v)
}

// inside tells whether the field has a value at a point. Only beside the edge is the field itself asked.
func (g *flowGrid) inside(q section.Point) bool {
	k, _, _, ok := g.cell(q)
	if !ok || q.X < g.edge.x0 || q.X > g.edge.x1 || q.Y < g.edge.y0 || q.Y > g.edge.y1 {
		return false
	}
	if g.known[k] && g.known[k+1] && g.known[k+g.nx] && g.known[k+g.nx+1] {
		return true
	}
	return finite(fieldAt(g.field, q))
}

// fieldAt asks a field for one point.
func fieldAt(f Field, q section.Point) float64 {
	if at, ok := f.(interface{ At(x, y float64) float64 }); ok {
		return at.At(q.X, q.Y)
	}
	var t [1]float64
	f.Row(t[:], q.Y, q.X, 1)
	return t[0]
}
