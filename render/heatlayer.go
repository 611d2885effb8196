package render

import (
	"encoding/binary"
	"image"
	"math"
	"runtime"
	"sync"
	"sync/atomic"

	"packrise/solver/section"
)

// Steps of sampling in pixels. The field has no detail under two pixels that outlines would not cover; small pictures are cheap
// enough to ask for every pixel.
const (
	coarseStep  = 4
	fineStep    = 2
	smallPixels = 250_000
)

// HeatLayer paints the heat map alone (transparent outside the section) into a picture of the view's size; coarse samples every
// few pixels and interpolates, for dragging. The edge is cut by the outline of the shapes and not by the field, so it is
// smooth at any step. Without a field each part is filled with the colour of its own reading.
func HeatLayer(s Scene, v View, sc Scale, coarse bool) *image.RGBA {
	img := image.NewRGBA(image.Rect(0, 0, max(v.W, 0), max(v.H, 0)))
	if s.Field == nil {
		fillReadings(img, s, v, sc)
		return img
	}
	o := outlineOf(s.Shapes)
	if !o.known() {
		x0, y0, x1, y1 := s.Field.Bounds()
		o.rect = &box{x0, y0, x1, y1}
	}
	p := o.toPx(v)
	area := pixelsOf(p.box(), img.Rect)
	if area.Empty() {
		return img
	}
	step := fineStep
	switch {
	case coarse:
		step = coarseStep
	case area.Dx()*area.Dy() <= smallPixels:
		step = 1
	}
	g := sampleGrid(s.Field, v, area, step, sc)
	g.fillGaps()
	g.paint(img, p)
	return img
}

// pixelsOf returns the pixels of the frame that the box touches.
func pixelsOf(b box, frame image.Rectangle) image.Rectangle {
	fl := func(x float64) int { return int(math.Floor(max(-1e6, min(1e6, x)))) }
	return image.Rect(fl(b.x0)-1, fl(b.y0)-1, fl(b.x1)+2, fl(b.y1)+2).Intersect(frame)
}

// grid holds positions in the colour table (0 … 255, NaN unknown) at every step-th pixel's centre of area.
type grid struct {
	area   image.Rectangle
	step   int
	nx, ny int
	v      []float32
}

func (g *grid) row(j int) []float32 { return g.v[j*g.nx : (j+1)*g.nx] }

// sampleGrid asks the field, a row at a time, on all cores.
func sampleGrid(f Field, v View, area image.Rectangle, step int, sc Scale) *grid {
	g := &grid{area: area, step: step, nx: (area.Dx()-1)/step + 2, ny: (area.Dy()-1)/step + 2}
	g.v = make([]float32, g.nx*g.ny)
	k := 255 / (sc.High - sc.Low)
	dx := float64(step) / v.PxPerMM
	parallelRows(g.ny, func(rows func() (int, bool)) {
		buf := make([]float64, g.nx)
		for j, ok := rows(); ok; j, ok = rows() {
			p := v.ToMM(float64(area.Min.X)+0.5, float64(area.Min.Y+j*step)+0.5)
			f.Row(buf, p.Y, p.X, dx)
			out := g.row(j)
			for i, t := range buf {
				out[i] = float32(max(0, min(255, (t-sc.Low)*k)))
			}
		}
	})
	return g
}

// parallelRows lets as many workers as there are cores take rows 0 … n−1 one after the other.
func parallelRows(n int, work func(next func() (int, bool))) {
	var taken atomic.Int64
	next := func() (int, bool) {
		j := int(taken.Add(1)) - 1
		return j, j < n
	}
	var wg sync.WaitGroup
	for range min(n, runtime.GOMAXPROCS(0)) {
		wg.Go(func() { work(next) })
	}
	wg.Wait()
}

// fillGaps continues the known nodes into the unknown ones beside them, twice, so that the colours reach a little past the edge
// and interpolation needs no cases there.
func (g *grid) fillGaps() {
	for range 2 {
		next := append([]float32(nil), g.v...)
		for j := range g.ny {
			for i := range g.nx {
				if k := j*g.nx + i; g.v[k] != g.v[k] {
					next[k] = g.around(i, j)
				}
			}
		}
		g.v = next
	}
}

// around continues the field to a node in a straight line from each side where two nodes are known and returns the mean, the
// mean of the known neighbours where none is, NaN where nothing is known.
func (g *grid) around(i, j int) float32 {
	var line, near float32
	var lines, nears float32
	for dy := -1; dy <= 1; dy++ {
		for dx := -1; dx <= 1; dx++ {
			a := g.at(i+dx, j+dy)
			if a != a {
				continue
			}
			near += a
			nears++
			if b := g.at(i+2*dx, j+2*dy); b == b {
				line += 2*a - b
				lines++
			}
		}
	}
	switch {
	case lines > 0:
		return max(0, min(255, line/lines))
	case nears > 0:
		return near / nears
	}
	return float32(math.NaN())
}

// at returns a node, NaN beyond the grid.
func (g *grid) at(i, j int) float32 {
	if i < 0 || j < 0 || i >= g.nx || j >= g.ny {
		return float32(math.NaN())
	}
	return g.v[j*g.nx+i]
}

// paint fills the pixels inside the outline (in pixels) from the grid, interpolating between its nodes.
func (g *grid) paint(img *image.RGBA, o outline) {
	w := g.area.Dx()
	parallelRows(g.area.Dy(), func(rows func() (int, bool)) {
		cover := make([]uint8, w)
		nodes := make([]float32, g.nx)
		for r, ok := rows(); ok; r, ok = rows() {
			y := g.area.Min.Y + r
			o.coverRow(cover, g.area.Min.X, y)
			g.between(nodes, r)
			at := img.PixOffset(g.area.Min.X, y)
			paintRow(img.Pix[at:at+4*w], cover, nodes, g.step)
		}
	})
}

// between interpolates the grid's columns at pixel row r of the area.
func (g *grid) between(nodes []float32, r int) {
	j := r / g.step
	f := float32(r%g.step) / float32(g.step)
	a := g.row(j)
	if f == 0 {
		copy(nodes, a)
		return
	}
	b := g.row(j + 1)
	for i := range nodes {
		p, q := a[i], b[i]
		switch {
		case p != p:
			nodes[i] = q
		case q != q:
			nodes[i] = p
		default:
			nodes[i] = p + f*(q-p)
		}
	}
}

// paintRow colours one row of pixels; nodes stand at every step-th of them.
func paintRow(pix, cover []uint8, nodes []float32, step int) {
	inv := 1 / float32(step)
	for i, x := 0, 0; x < len(cover); i++ {
		a, b := nodes[i], nodes[i+1]
		if a != a {
			a = b
		}
		if b != b {
			b = a
		}
		end := min(x+step, len(cover))
		if a != a {
			x = end
			continue
		}
		t, d := a+0.5, (b-a)*inv
		for ; x < end; x++ {
			if c := cover[x]; c != 0 {
				word := mapWords[uint8(t)]
				if c != 255 {
					word = fade(word, uint32(c))
				}
				binary.LittleEndian.PutUint32(pix[4*x:], word)
			}
			t += d
		}
	}
}

// fillReadings paints every placed part in the colour of its reading.
func fillReadings(img *image.RGBA, s Scene, v View, sc Scale) {
	if len(s.Readings) == 0 {
		return
	}
	c := NewRaster(img)
	byID := readingsByID(s.Readings)
	for _, sh := range s.Shapes {
		r, ok := byID[sh.ID]
		if !ok || sh.Unset || sh.ID == "" {
			continue
		}
		x, y := v.ToPx(sh.At)
		if n := len(sh.Loops); n > 0 {
			(&sectionPainter{c: c, v: v}).loopPath(sh.Loops[n-1])
		} else {
			c.Circle(x, y, sh.OuterR()*v.PxPerMM)
		}
		c.Fill(sc.Color(r.TempC))
	}
}

func readingsByID(rs []section.Reading) map[string]section.Reading {
	m := make(map[string]section.Reading, len(rs))
	for _, r := range rs {
		m[r.ID] = r
	}
	return m
}
