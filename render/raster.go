package render

import (
	"image"
	"image/color"
	"image/draw"
	"math"

	"github.com/fogleman/gg"
)

// NewRaster returns a canvas that paints into img, anti-aliased. Paths go through gg; circles and text, of which a section has
// hundreds, are painted directly.
func NewRaster(img *image.RGBA) Canvas {
	return &raster{img: img, port: newPort(img, img.Rect)}
}

type raster struct {
	img   *image.RGBA
	port  *port
	stack []*port
	path  []piece
}

// port is a clip: the part of the picture that may change, and a gg context on just that part.
type port struct {
	img *image.RGBA // shares the pixels, keeps the coordinates
	dc  *gg.Context // made when first needed
}

func newPort(img *image.RGBA, r image.Rectangle) *port {
	return &port{img: img.SubImage(r).(*image.RGBA)}
}

// context returns gg's context on the port's pixels, moved so that coordinates are those of the whole picture.
func (p *port) context() *gg.Context {
	if p.dc == nil {
		r := p.img.Rect
		own := &image.RGBA{Pix: p.img.Pix, Stride: p.img.Stride, Rect: image.Rect(0, 0, r.Dx(), r.Dy())}
		p.dc = gg.NewContextForRGBA(own)
		p.dc.Translate(-float64(r.Min.X), -float64(r.Min.Y))
		p.dc.SetFillRuleEvenOdd()
	}
	return p.dc
}

// piece is one step of a path.
type piece struct {
	verb       verb
	x, y, r    float64
	from, upTo float64
}

type verb uint8

const (
	moveTo verb = iota
	lineTo
	arcTo
	circle
	closeIt
)

func (c *raster) Size() (w, h float64) {
	return float64(c.img.Rect.Dx()), float64(c.img.Rect.Dy())
}

func (c *raster) Push() { c.stack = append(c.stack, c.port) }

func (c *raster) Pop() {
	if len(c.stack) == 0 {
		panic("render: Pop without Push")
	}
	c.port = c.stack[len(c.stack)-1]
	c.stack = c.stack[:len(c.stack)-1]
}

func (c *raster) Clip(x, y, w, h float64) {
	rd := func(v float64) int { return int(math.Round(v)) }
	c.port = newPort(c.port.img, image.Rect(rd(x), rd(y), rd(x+w), rd(y+h)))
}

func (c *raster) MoveTo(x, y float64) { c.path = append(c.path, piece{verb: moveTo, x: x, y: y}) }
func (c *raster) LineTo(x, y float64) { c.path = append(c.path, piece{verb: lineTo, x: x, y: y}) }
func (c *raster) Close()              { c.path = append(c.path, piece{verb: closeIt}) }

func (c *raster) Arc(x, y, r, from, to float64) {
	c.path = append(c.path, piece{arcTo, x, y, r, from, to})
}

func (c *raster) Circle(x, y, r float64) {
	c.path = append(c.path, piece{verb: circle, x: x, y: y, r: r})
}

// circles tells whether the path is nothing but circles.
func (c *raster) circles() bool {
	for _, p := range c.path {
		if p.verb != circle {
			return false
		}
	}
	return true
}

func (c *raster) Fill(col color.NRGBA) {
	defer func() { c.path = c.path[:0] }()
	if c.port.img.Rect.Empty() || col.A == 0 {
		return
	}
	switch p := c.path; {
	case len(p) == 1 && p[0].verb == circle:
		paintDisc(c.port.img, p[0].x, p[0].y, p[0].r, col)
	case len(p) == 2 && c.circles() && p[0].x == p[1].x && p[0].y == p[1].y:
		paintRing(c.port.img, p[0].x, p[0].y, (p[0].r+p[1].r)/2, math.Abs(p[0].r-p[1].r), col)
	default:
		dc := c.replay()
		dc.SetColor(col)
		dc.Fill()
	}
}

func (c *raster) Stroke(p Pen) {
	defer func() { c.path = c.path[:0] }()
	if c.port.img.Rect.Empty() || p.Color.A == 0 || p.Width <= 0 {
		return
	}
	if len(p.Dash) == 0 && c.circles() {
		for _, q := range c.path {
			paintRing(c.port.img, q.x, q.y, q.r, p.Width, p.Color)
		}
		return
	}
	dc := c.replay()
	dc.SetColor(p.Color)
	dc.SetLineWidth(p.Width)
	dc.SetDash(p.Dash...)
	dc.SetLineCap(gg.LineCapButt)
	dc.SetLineJoin(gg.LineJoinBevel)
	if p.Round {
		dc.SetLineCap(gg.LineCapRound)
		dc.SetLineJoin(gg.LineJoinRound)
	}
	dc.Stroke()
}

// replay hands the path to gg.
func (c *raster) replay() *gg.Context {
	dc := c.port.context()
	dc.ClearPath()
	for _, p := range c.path {
		switch p.verb {
		case moveTo:
			dc.MoveTo(p.x, p.y)
		case lineTo:
			dc.LineTo(p.x, p.y)
		case arcTo:
			dc.DrawArc(p.x, p.y, p.r, p.from, p.upTo)
		case circle:
			dc.NewSubPath()
			dc.DrawArc(p.x, p.y, p.r, 0, 2*pi)
			dc.ClosePath()
		case closeIt:
			dc.ClosePath()
		}
	}
	return dc
}

func (c *raster) MeasureText(s string, f Font) float64 { return letters.measure(s, f) }

func (c *raster) Text(s string, x, y float64, f Font) {
	if c.port.img.Rect.Empty() {
		return
	}
	x -= f.AX * letters.measure(s, f)
	y += f.AY * capHeight * f.Size
	if f.Halo.A > 0 && f.HaloWidth > 0 {
		letters.each(s, x, y, f, f.HaloWidth, func(m *image.Alpha, mx, my int) { paintMask(c.port.img, m, mx, my, f.Halo) })
	}
	letters.each(s, x, y, f, 0, func(m *image.Alpha, mx, my int) { paintMask(c.port.img, m, mx, my, f.Color) })
}

func (c *raster) Image(img *image.RGBA, x, y float64) {
	at := image.Pt(int(math.Round(x)), int(math.Round(y)))
	draw.Draw(c.port.img, img.Rect.Sub(img.Rect.Min).Add(at), img, img.Rect.Min, draw.Over)
}
