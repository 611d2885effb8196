package pack

// grid files discs under the square cells that they reach into. What lies outside goes to the cells of the rim.
type grid struct {
	x0, y0, h float64
	nx, ny    int
	cells     [][]int32
}

// newGrid divides a rectangle into cells of about the given size, at most 64 along a side.
func newGrid(x0, y0, w, h, size float64) grid {
	size = max(size, max(w, h)/64)
	if !(size > 0) {
		size = 1
	}
	g := grid{x0: x0, y0: y0, h: size, nx: int(w/size) + 1, ny: int(h/size) + 1}
	g.cells = make([][]int32, g.nx*g.ny)
	return g
}

// span is the range of cells that a disc reaches into.
func (g *grid) span(x, y, r float64) (i0, j0, i1, j1 int) {
	at := func(v float64, n int) int { return int(min(max(v/g.h, 0), float64(n-1))) }
	return at(x-r-g.x0, g.nx), at(y-r-g.y0, g.ny), at(x+r-g.x0, g.nx), at(y+r-g.y0, g.ny)
}

// put files a disc under number k.
func (g *grid) put(d Disc, k int) {
	i0, j0, i1, j1 := g.span(d.X, d.Y, d.R)
	for j := j0; j <= j1; j++ {
		for i := i0; i <= i1; i++ {
			c := &g.cells[j*g.nx+i]
			*c = append(*c, int32(k))
		}
	}
}
