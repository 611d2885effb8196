package render

import (
	"math"

	"packrise/solver/section"
)

// idRoom is the diameter in pixels at device scale 1 from which a part carries its id.
const idRoom = 18

// ids writes the id inside every part that has room for it.
func (p *sectionPainter) ids() {
	for i, s := range p.shapes {
		d := p.disc(s)
		if 2*d.r < idRoom*p.k || !p.inSight(d) {
			continue
		}
		f := Font{Size: max(12, min(14, 0.42*d.r/p.k)) * p.k, Bold: d.r > 14*p.k, AX: 0.5, AY: 0.5}
		text := shortID(s.ID)
		w := p.c.MeasureText(text, f)
		if f.Bold && w > 1.9*d.r {
			f.Bold = false
			w = p.c.MeasureText(text, f)
		}
		x, y, ok := p.idPlace(i, s, d, w, f.Size)
		if !ok {
			continue
		}
		if t, ok := p.insideTemp(s, d); ok && x == d.x && y == d.y {
			y -= 8 * p.k
			g := Font{Size: 12 * p.k, AX: 0.5, AY: 0.5}
			p.write(t, x, y+16*p.k, p.inkOn(s, g))
		}
		p.write(text, x, y, p.inkOn(s, f))
		p.taken = append(p.taken, textBox(x, y, w, f))
	}
}

// tempRoom is the diameter in pixels at device scale 1 from which a part that has no label outside also carries its temperature.
const tempRoom = 76

// insideTemp returns the temperature to write below a part's id.
func (p *sectionPainter) insideTemp(s section.Shape, d disc) (string, bool) {
	r, ok := p.read[s.ID]
	if !ok || p.s.Stale || s.Unset || p.outside[s.ID] || 2*d.r < tempRoom*p.k || !finite(r.TempC) {
		return "", false
	}
	return besideLimit(r) + " °C", true
}

// inkOn gives the font the colours for writing inside a part.
func (p *sectionPainter) inkOn(s section.Shape, f Font) Font {
	f.Color, f.Halo, f.HaloWidth = p.line(s), p.halo(s), 2*p.k
	f.Halo.A = 255
	return f
}

// idPlace finds where a text of width w fits inside part i: its middle, or for a cable a spot that its own parts leave free.
func (p *sectionPainter) idPlace(i int, s section.Shape, d disc, w, size float64) (x, y float64, ok bool) {
	h := capHeight * size
	if math.Hypot(w/2, h/2) > d.r-0.5*p.k {
		return 0, 0, false
	}
	inner := p.childrenOf(i)
	if len(inner) == 0 {
		return d.x, d.y, true
	}
	free := func(x, y float64) bool {
		b := box{x - w/2, y - h/2, x + w/2, y + h/2}.grown(1.5 * p.k)
		for _, c := range inner {
			if discMeetsBox(c, b) {
				return false
			}
		}
		far := math.Hypot(math.Abs(x-d.x)+w/2, math.Abs(y-d.y)+h/2)
		return far <= d.r-p.k
	}
	if free(d.x, d.y) {
		return d.x, d.y, true
	}
	for _, rho := range []float64{0.85, 0.75, 0.65, 0.5, 0.35} {
		for n := range 24 {
			a := -pi/2 + float64((n+1)/2)*pi/12*float64(1-2*(n%2)) // from the top to both sides
			x, y := d.x+rho*d.r*math.Cos(a), d.y+rho*d.r*math.Sin(a)
			if free(x, y) {
				return x, y, true
			}
		}
	}
	return 0, 0, false
}

// childrenOf returns the outlines of the parts directly inside part i.
func (p *sectionPainter) childrenOf(i int) []disc {
	var out []disc
	prefix := p.shapes[i].ID + "/"
	for _, s := range p.shapes[i+1:] {
		if s.Depth == p.shapes[i].Depth+1 && len(s.ID) > len(prefix) && s.ID[:len(prefix)] == prefix {
			out = append(out, p.disc(s))
		}
	}
	return out
}

// write puts a text on the canvas.
func (p *sectionPainter) write(text string, x, y float64, f Font) { p.c.Text(text, x, y, f) }

// textBox returns the box of capitals and descenders of a text of width w anchored at (x, y).
func textBox(x, y, w float64, f Font) box {
	base := y + f.AY*capHeight*f.Size
	return box{x - f.AX*w, base - 0.8*f.Size, x + (1-f.AX)*w, base + 0.22*f.Size}
}
