package render

import (
	"math"

	"packrise/solver/section"
)

// flowHead is an arrow head in pixels: its middle and the unit vector that it points along.
type flowHead struct{ at, along section.Point }

// Arrow heads at device scale 1: their length, half their width, the way between them along a line, the shortest line that gets
// one, and how far other lines and heads must be.
const (
	headLong  = 7
	headWide  = 2.7
	headEvery = 170
	headLeast = 18
	headClear = 5
	headApart = 13
)

// flowHeads draws the arrow heads of all lines where there is room for them.
func (p *sectionPainter) flowHeads(lines [][]section.Point, quiet [][]bool) {
	near := newFlowCrowd(lines, 8*p.k)
	var heads []flowHead
	for i, line := range lines {
		long := lengthOf(line)
		if long < headLeast*p.k {
			continue
		}
		n := max(1, math.Round(long/(headEvery*p.k)))
		for k := 0.0; k < n; k++ {
			if h, ok := p.headPlace(line, quiet[i], i, (k+0.5)*long/n, long/n, near, heads); ok {
				heads = append(heads, h)
			}
		}
	}
	for _, h := range heads {
		p.flowHead(h)
	}
}

// headPlace finds room for a head on a line about a length from its beginning.
func (p *sectionPainter) headPlace(line []section.Point, quiet []bool, i int, at, share float64, near *flowCrowd, heads []flowHead) (h flowHead, ok bool) {
	for _, shift := range [7]float64{0, 0.12, -0.12, 0.24, -0.24, 0.36, -0.36} {
		piece := 0
		h, piece = along(line, at+shift*share)
		if quiet[piece] || !boxAround(h.at.X, h.at.Y, headLong*p.k).meets(p.frame) || near.within(h.at, headClear*p.k, i) {
			continue
		}
		ok = true
		for _, o := range heads {
			ok = ok && between(o.at, h.at) > headApart*p.k
		}
		if ok {
			return h, true
		}
	}
	return h, false
}

// along returns the place at a length from the beginning of a line, and the number of its piece.
func along(line []section.Point, length float64) (h flowHead, piece int) {
	for i := 1; i < len(line); i++ {
		a, b := line[i-1], line[i]
		l := between(a, b)
		if length > l && i < len(line)-1 || l == 0 {
			length -= l
			continue
		}
		u := length / l
		return flowHead{section.Point{X: a.X + u*(b.X-a.X), Y: a.Y + u*(b.Y-a.Y)}, section.Point{X: (b.X - a.X) / l, Y: (b.Y - a.Y) / l}}, i
	}
	return h, 0
}

func lengthOf(line []section.Point) (l float64) {
	for i := 1; i < len(line); i++ {
		l += between(line[i-1], line[i])
	}
	return l
}

// flowHead draws one.
func (p *sectionPainter) flowHead(h flowHead) {
	seam, fill := flowColors()
	x, y, dx, dy := h.at.X, h.at.Y, h.along.X, h.along.Y
	f, w := headLong*p.k/2, headWide*p.k
	path := func() {
		p.c.MoveTo(x+f*dx, y+f*dy)
		p.c.LineTo(x-f*dx-w*dy, y-f*dy+w*dx)
		p.c.LineTo(x-f*dx+w*dy, y-f*dy-w*dx)
		p.c.Close()
	}
	path()
	p.c.Stroke(Pen{Width: 1.4 * p.k, Color: seam})
	path()
	p.c.Fill(fill)
}

// flowCrowd finds lines near a point: the numbers of the lines that pass each square of a raster.
type flowCrowd struct {
	size  float64
	lines [][]section.Point
	at    map[[2]int][]crowdPiece
}

type crowdPiece struct{ line, piece int }

func newFlowCrowd(lines [][]section.Point, size float64) *flowCrowd {
	c := &flowCrowd{size: size, lines: lines, at: map[[2]int][]crowdPiece{}}
	for i, line := range lines {
		for k := 1; k < len(line); k++ {
			a, b := line[k-1], line[k]
			var last [2]int
			n := math.Ceil(2*between(a, b)/size) + 1
			if n > 10000 { // magnified beyond reason
				continue
			}
			for s := range int(n) + 1 {
				u := float64(s) / n
				sq := c.square(section.Point{X: a.X + u*(b.X-a.X), Y: a.Y + u*(b.Y-a.Y)})
				if s == 0 || sq != last {
					c.at[sq] = append(c.at[sq], crowdPiece{i, k})
				}
				last = sq
			}
		}
	}
	return c
}

func (c *flowCrowd) square(q section.Point) [2]int {
	return [2]int{int(math.Floor(q.X / c.size)), int(math.Floor(q.Y / c.size))}
}

// within tells whether another line than this one passes within a distance, at most the size of a square.
func (c *flowCrowd) within(q section.Point, d float64, but int) bool {
	sq := c.square(q)
	for i := -1; i <= 1; i++ {
		for j := -1; j <= 1; j++ {
			for _, e := range c.at[[2]int{sq[0] + i, sq[1] + j}] {
				if e.line != but && segmentDistance(q, c.lines[e.line][e.piece-1], c.lines[e.line][e.piece]) < d {
					return true
				}
			}
		}
	}
	return false
}
