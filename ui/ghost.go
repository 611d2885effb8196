package ui

import (
	"image"
	"image/color"
	"math"
	"slices"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"

	"packrise/render"
	"packrise/solver/section"
)

// ghostMark is one thing that a change would do, drawn dashed over the section: an outline as it would be, with where it comes from, or as it is
// with a cross where it would be gone.
type ghostMark struct {
	shape section.Shape
	from  *section.Point
	gone  bool
}

const sameGhostMM = 0.005 // what moves or grows by less is drawn as it is

// ghostOf compares two sections: what would move, grow, come or vanish. Parts that a change touches in another way are marked where they are.
func ghostOf(now, then []section.Shape, touched []string) (marks []ghostMark) {
	find := func(in []section.Shape, id string) *section.Shape {
		i := slices.IndexFunc(in, func(s section.Shape) bool { return s.ID == id && !s.Unset })
		if i < 0 {
			return nil
		}
		return &in[i]
	}
	for i := range then {
		s := &then[i]
		if s.Unset || s.Depth > 0 {
			continue
		}
		was := find(now, s.ID)
		switch {
		case was == nil:
			marks = append(marks, ghostMark{shape: *s})
		case s.ID != "" && math.Hypot(s.At.X-was.At.X, s.At.Y-was.At.Y) > sameGhostMM:
			from := was.At
			marks = append(marks, ghostMark{shape: *s, from: &from})
		case math.Abs(s.OuterR()-was.OuterR()) > sameGhostMM || math.Abs(s.Width-was.Width) > sameGhostMM || math.Abs(s.Height-was.Height) > sameGhostMM:
			marks = append(marks, ghostMark{shape: *s})
		case slices.Contains(touched, s.ID):
			marks = append(marks, ghostMark{shape: *s})
		}
	}
	for i := range now {
		if s := &now[i]; s.Depth == 0 && !s.Unset && find(then, s.ID) == nil {
			marks = append(marks, ghostMark{shape: *s, gone: true})
		}
	}
	return marks
}

// ghost lies over the section's picture and takes no events.
type ghost struct {
	v      *SectionView
	marks  []ghostMark
	raster *canvas.Raster
}

func newGhost(v *SectionView) *ghost {
	g := &ghost{v: v}
	g.raster = canvas.NewRaster(g.draw)
	g.raster.Hide()
	return g
}

// SetGhost shows what a change would do; nil shows nothing.
func (v *SectionView) SetGhost(marks []ghostMark) {
	g := v.ghost
	if len(marks) == 0 && len(g.marks) == 0 {
		return
	}
	g.marks = marks
	g.follow()
}

// follow draws the ghost anew, for another camera or size.
func (g *ghost) follow() {
	if len(g.marks) == 0 {
		g.raster.Hide()
		return
	}
	g.raster.Resize(g.v.Size())
	g.raster.Show()
	g.raster.Refresh()
}

func (g *ghost) draw(w, h int) image.Image {
	img := image.NewRGBA(image.Rect(0, 0, w, h))
	if view := g.v.camera.view(w, h, float64(w)/math.Max(1, float64(g.v.Size().Width))); view.PxPerMM > 0 {
		k := float64(w) / math.Max(1, float64(g.v.Size().Width))
		drawGhost(render.NewRaster(img), view, g.marks, k, opaqueColor(theme.ColorNamePrimary), opaqueColor(theme.ColorNameBackground))
	}
	return img
}

func opaqueColor(n fyne.ThemeColorName) color.NRGBA {
	c := color.NRGBAModel.Convert(themeColor(n)).(color.NRGBA)
	c.A = 255
	return c
}

// drawGhost strokes the marks dashed on a halo, so that they stand out on the heat map; all halos lie under all lines. k is pixels a unit.
func drawGhost(c render.Canvas, view render.View, marks []ghostMark, k float64, accent, paper color.NRGBA) {
	for _, over := range []bool{false, true} {
		for i := range marks {
			m := &marks[i]
			f := k * fineness(max(m.shape.OuterR(), m.shape.Width/2)*view.PxPerMM/k)
			pen := render.Pen{Width: 4.5 * f, Color: paper}
			if over {
				pen = render.Pen{Width: 2.2 * f, Color: accent, Dash: []float64{6 * f, 4 * f}}
			}
			m.stroke(c, view, pen)
			if over && m.from != nil {
				x, y := view.ToPx(*m.from)
				c.Circle(x, y, 3*f)
				c.Fill(accent)
			}
		}
	}
}

// fineness makes lines about small shapes thinner. r is in units.
func fineness(r float64) float64 { return math.Min(1, math.Max(0.45, r/12)) }

// stroke draws a mark's outline, the cross over what would be gone, and the way of what would move.
func (m *ghostMark) stroke(c render.Canvas, view render.View, pen render.Pen) {
	ghostPath(c, view, &m.shape)
	c.Stroke(pen)
	x, y := view.ToPx(m.shape.At)
	if m.gone {
		r := 0.7 * m.shape.InnerR() * view.PxPerMM
		c.MoveTo(x-r, y-r)
		c.LineTo(x+r, y+r)
		c.MoveTo(x-r, y+r)
		c.LineTo(x+r, y-r)
		c.Stroke(pen)
	}
	if m.from != nil {
		fx, fy := view.ToPx(*m.from)
		c.MoveTo(fx, fy)
		c.LineTo(x, y)
		c.Stroke(pen)
	}
}

// ghostPath is the outside of a shape.
func ghostPath(c render.Canvas, view render.View, s *section.Shape) {
	r := s.OuterR()
	switch {
	case len(s.Loops) > 0:
		for i, p := range s.Loops[len(s.Loops)-1] {
			x, y := view.ToPx(p)
			if i == 0 {
				c.MoveTo(x, y)
			} else {
				c.LineTo(x, y)
			}
		}
		c.Close()
	case s.Width > 0:
		x0, y0 := view.ToPx(section.Point{X: s.At.X - r, Y: s.At.Y - r})
		x1, y1 := view.ToPx(section.Point{X: s.At.X + s.Width + r, Y: s.At.Y + s.Height + r})
		c.MoveTo(x0, y0)
		c.LineTo(x1, y0)
		c.LineTo(x1, y1)
		c.LineTo(x0, y1)
		c.Close()
	default:
		x, y := view.ToPx(s.At)
		c.Circle(x, y, r*view.PxPerMM)
	}
}
