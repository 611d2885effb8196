package render

import "math"

// coverRow writes how much of each pixel (x0+i, y) of a row lies inside the outline, 0 … 255; the outline is in pixels.
func (o outline) coverRow(dst []uint8, x0, y int) {
	clear(dst)
	switch {
	case o.poly != nil:
		coverLoop(dst, x0, y, o.poly)
	case o.rect != nil:
		coverRect(dst, x0, y, *o.rect)
	case o.round != nil:
		coverDisc(dst, x0, y, *o.round)
	default:
		for _, d := range o.parts {
			coverDisc(dst, x0, y, d)
		}
		for _, l := range o.loops {
			coverLoop(dst, x0, y, l)
		}
	}
}

func coverRect(dst []uint8, x0, y int, b box) {
	cy := overlap(float64(y), b.y0, b.y1)
	if cy <= 0 {
		return
	}
	for i := range dst {
		dst[i] = uint8(255*cy*overlap(float64(x0+i), b.x0, b.x1) + 0.5)
	}
}

// overlap returns the length that [p, p+1] has in common with [lo, hi].
func overlap(p, lo, hi float64) float64 { return max(0, min(p+1, hi)-max(p, lo)) }

// coverDisc raises dst to the disc's own coverage: the distance of the pixel's centre from the edge, clamped, which is the area
// for edges that are straight on the scale of a pixel.
func coverDisc(dst []uint8, x0, y int, d disc) {
	py := float64(y) + 0.5 - d.y
	outer := d.r + 0.5
	if py < -outer || py > outer {
		return
	}
	half := math.Sqrt(outer*outer - py*py)
	full := -1.0
	if inner := d.r - 0.5; inner > 0 && inner*inner > py*py {
		full = math.Sqrt(inner*inner - py*py)
	}
	from := max(0, int(math.Floor(d.x-half-0.5))-x0)
	to := min(len(dst)-1, int(math.Ceil(d.x+half-0.5))-x0)
	for i := from; i <= to; i++ {
		px := float64(x0+i) + 0.5 - d.x
		if px >= -full && px <= full {
			dst[i] = 255
			continue
		}
		c := outer - math.Sqrt(px*px+py*py)
		if c > 0 {
			dst[i] = max(dst[i], uint8(255*min(1, c)+0.5))
		}
	}
}
