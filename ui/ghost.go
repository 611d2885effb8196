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

// drawGhost strokes the marks dashed on a halo, so that they stand out on the heat map. k is pixels a unit.
func drawGhost(c render.Canvas, view render.View, marks []ghostMark, k float64, accent, paper color.NRGBA) {
	halo := render.Pen{Width: 4.5 * k, Color: paper}
	pen := render.Pen{Width: 2.2 * k, Color: accent, Dash: []float64{6 * k, 4 * k}}
	both := func(path func()) {
		path()
		c.Stroke(halo)
		path()
		c.Stroke(pen)
	}
	for i := range marks {
		m := &marks[i]
		both(func() { ghostPath(c, view, &m.shape) })
		x, y := view.ToPx(m.shape.At)
		if m.gone {
			r := 0.7 * m.shape.InnerR() * view.PxPerMM
			both(func() {
				c.MoveTo(x-r, y-r)
				c.LineTo(x+r, y+r)
				c.MoveTo(x-r, y+r)
				c.LineTo(x+r, y-r)
			})
		}
		if m.from != nil {
			fx, fy := view.ToPx(*m.from)
			both(func() {
				c.MoveTo(fx, fy)
				c.LineTo(x, y)
			})
			c.Circle(fx, fy, 3*k)
			c.Fill(accent)
		}
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
