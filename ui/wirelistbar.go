package ui

import (
	"image"
	"image/color"
	"image/draw"
	"math"
	"slices"

	"fyne.io/fyne/v2/theme"
)

// wireBars paints the margins of the rows in sight into one picture: bars from a common zero line, over to the left and hatched.
type wireBars struct {
	list        *WireList
	first, last int // rows, last not included
}

// reach is the margin in K at which a bar is as long as it gets, so that the closer half of the margins can be told apart; a round number, so
// that it stands still while margins change a little.
func (l *WireList) reach() float64 {
	var margins []float64
	for i := range l.rows {
		if k, ok := l.rows[i].margin(); ok {
			margins = append(margins, math.Abs(k))
		}
	}
	slices.Sort(margins)
	if len(margins) > 0 {
		middle := margins[len(margins)/2]
		for _, r := range []float64{5, 10, 20, 50} {
			if middle <= r {
				return r
			}
		}
	}
	return 100
}

// zero is where the zero line stands within the bar, as a share of its width: further right as soon as anything is over.
func (l *WireList) zero() float64 {
	for i := range l.rows {
		if l.rows[i].over() {
			return 0.4
		}
	}
	return 0.04
}

// draw is the raster's generator, in device pixels.
func (b *wireBars) draw(w, h int) image.Image {
	img := image.NewRGBA(image.Rect(0, 0, w, h))
	n := b.last - b.first
	if n <= 0 || w < 4 {
		return img
	}
	l := b.list
	zero, reach := l.zero()*float64(w), l.reach()
	within, over, line := themeColor(theme.ColorNamePrimary), themeColor(theme.ColorNameError), themeColor(ColorNameQuiet)
	if l.aged {
		within, over = themeColor(theme.ColorNameDisabled), themeColor(theme.ColorNameDisabled)
	}
	p := barPen{img: img, unit: float64(w) / float64(max(1, l.layout.barWide))}
	for i := range n {
		k, ok := l.rows[b.first+i].margin()
		if !ok {
			continue
		}
		top, bottom := float64(h)*float64(i)/float64(n), float64(h)*float64(i+1)/float64(n)
		inset := (bottom - top) * 0.28
		share := max(-1, min(1, k/reach))
		if k < 0 { // the least overrun can be seen
			p.fill(min(zero+share*(zero-p.unit), zero-3*p.unit), zero, top+inset, bottom-inset, over, true)
		} else {
			end := zero + share*(float64(w)-zero-p.unit)
			p.fill(zero, end, top+inset, bottom-inset, within, false)
			if k > reach { // longer than it can be drawn
				p.clear(end-6*p.unit, end-4*p.unit, top, bottom)
			}
		}
		p.fill(zero-p.unit/2, zero+p.unit/2, top+inset/2, bottom-inset/2, line, false)
	}
	return img
}

// barPen fills rectangles of whole pixels.
type barPen struct {
	img  *image.RGBA
	unit float64 // pixels
}

func (p barPen) rect(x0, x1, y0, y1 float64) image.Rectangle {
	r := image.Rect(int(math.Round(x0)), int(math.Round(y0)), int(math.Round(x1)), int(math.Round(y1)))
	if r.Dx() == 0 && x1 > x0 {
		r.Max.X++
	}
	return r.Intersect(p.img.Rect)
}

func (p barPen) clear(x0, x1, y0, y1 float64) {
	draw.Draw(p.img, p.rect(x0, x1, y0, y1), image.Transparent, image.Point{}, draw.Src)
}

// fill fills a rectangle; hatched, with stripes that read as "over" without colour.
func (p barPen) fill(x0, x1, y0, y1 float64, c color.Color, hatched bool) {
	r := p.rect(x0, x1, y0, y1)
	if !hatched {
		draw.Draw(p.img, r, image.NewUniform(c), image.Point{}, draw.Src)
		return
	}
	solid := color.RGBAModel.Convert(c).(color.RGBA)
	pale := color.RGBA{R: solid.R / 4, G: solid.G / 4, B: solid.B / 4, A: solid.A / 4}
	pitch := max(3, int(math.Round(5*p.unit)))
	for y := r.Min.Y; y < r.Max.Y; y++ {
		for x := r.Min.X; x < r.Max.X; x++ {
			edge := x == r.Min.X || x == r.Max.X-1 || y == r.Min.Y || y == r.Max.Y-1
			if edge || (x+y)%pitch < (pitch+1)/2 {
				p.img.SetRGBA(x, y, solid)
			} else {
				p.img.SetRGBA(x, y, pale)
			}
		}
	}
}
