package render

import (
	"encoding/binary"
	"image"
	"image/color"
	"math"
)

// source is a colour made ready for blending: its premultiplied bytes in one word, red lowest, as image.RGBA has them.
type source uint32

func sourceOf(c color.NRGBA) source {
	w := uint32(c.R) | uint32(c.G)<<8 | uint32(c.B)<<16 | 255<<24
	return source(fade(w, uint32(c.A)))
}

// over lays the colour with coverage c (0 … 255) over four bytes.
func (s source) over(p []uint8, c uint32) {
	w := uint32(s)
	if c != 255 {
		w = fade(w, c)
	}
	if rest := 255 - w>>24; rest != 0 {
		w += fade(binary.LittleEndian.Uint32(p), rest)
	}
	binary.LittleEndian.PutUint32(p, w)
}

// fade multiplies the four bytes of a word by c/255.
func fade(word, c uint32) uint32 {
	rb := (word & 0xff00ff) * c
	ga := (word >> 8 & 0xff00ff) * c
	rb = (rb + 0x800080 + (rb >> 8 & 0xff00ff)) >> 8 & 0xff00ff
	ga = (ga + 0x800080 + (ga >> 8 & 0xff00ff)) >> 8 & 0xff00ff
	return rb | ga<<8
}

// paintDisc fills a circle.
func paintDisc(img *image.RGBA, x, y, r float64, col color.NRGBA) {
	if r <= 0 {
		return
	}
	s := sourceOf(col)
	rowsOf(img, y, r, func(row int, py float64) {
		half := math.Sqrt(max(0, (r+0.5)*(r+0.5)-py*py))
		spanOf(img, row, x-half, x+half, func(p []uint8, px float64) {
			d := r + 0.5 - math.Hypot(px-x, py)
			if d > 0 {
				s.over(p, uint32(255*min(1, d)))
			}
		})
	})
}

// paintRing strokes a circle with a line of the width. Coverage is the overlap of the pixel with the line, across it.
func paintRing(img *image.RGBA, x, y, r, width float64, col color.NRGBA) {
	if r <= 0 || width <= 0 {
		return
	}
	s := sourceOf(col)
	lo, hi := r-width/2, r+width/2
	if lo <= 0 {
		paintDisc(img, x, y, hi, col)
		return
	}
	ring := func(p []uint8, px, py float64) {
		d := math.Sqrt((px-x)*(px-x) + py*py)
		c := min(d+0.5, hi) - max(d-0.5, lo)
		if c > 0 {
			s.over(p, uint32(255*min(1, c)))
		}
	}
	outer, inner := hi+0.5, lo-0.5
	rowsOf(img, y, hi, func(row int, py float64) {
		out := math.Sqrt(max(0, outer*outer-py*py))
		if inner <= 0 || math.Abs(py) >= inner {
			spanOf(img, row, x-out, x+out, func(p []uint8, px float64) { ring(p, px, py) })
			return
		}
		in := math.Sqrt(inner*inner - py*py)
		if in < 1 { // both flanks would share pixels
			spanOf(img, row, x-out, x+out, func(p []uint8, px float64) { ring(p, px, py) })
			return
		}
		spanOf(img, row, x-out, x-in, func(p []uint8, px float64) { ring(p, px, py) })
		spanOf(img, row, x+in, x+out, func(p []uint8, px float64) { ring(p, px, py) })
	})
}

// rowsOf calls f for the rows of the picture that a circle of radius r about height y touches, with the height of the row's
// middle relative to y.
func rowsOf(img *image.RGBA, y, r float64, f func(row int, py float64)) {
	from := max(img.Rect.Min.Y, int(math.Floor(clampPx(y-r-1))))
	to := min(img.Rect.Max.Y-1, int(math.Ceil(clampPx(y+r+1))))
	for row := from; row <= to; row++ {
		f(row, float64(row)+0.5-y)
	}
}

// spanOf calls f with the bytes and the middle of every pixel of a row that [x0, x1] touches.
func spanOf(img *image.RGBA, row int, x0, x1 float64, f func(p []uint8, px float64)) {
	from := max(img.Rect.Min.X, int(math.Floor(clampPx(x0))))
	to := min(img.Rect.Max.X-1, int(math.Floor(clampPx(x1))))
	if from > to {
		return
	}
	o := img.PixOffset(from, row)
	for col := from; col <= to; col++ {
		f(img.Pix[o:o+4:o+4], float64(col)+0.5)
		o += 4
	}
}

// clampPx keeps far-away coordinates inside the range of integers.
func clampPx(x float64) float64 { return max(-1e7, min(1e7, x)) }

// paintMask lays a colour over the picture through a coverage mask whose origin is at (x, y).
func paintMask(img *image.RGBA, m *image.Alpha, x, y int, col color.NRGBA) {
	s := sourceOf(col)
	r := m.Rect.Add(image.Pt(x, y)).Intersect(img.Rect)
	for row := r.Min.Y; row < r.Max.Y; row++ {
		src := m.Pix[m.PixOffset(r.Min.X-x, row-y):]
		o := img.PixOffset(r.Min.X, row)
		for i := range r.Dx() {
			if c := src[i]; c != 0 {
				s.over(img.Pix[o:o+4:o+4], uint32(c))
			}
			o += 4
		}
	}
}
