package ui

import (
	"image"
	"image/draw"
	"slices"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"

	"packrise/render"
	"packrise/solver/section"
)

// Ladder is the axis of the section: colour scale, list of temperatures and limits in one. Pointing at a rung lights up its part, a click selects
// all that stand on it.
type Ladder struct {
	widget.BaseWidget

	desk   *Desk
	raster *canvas.Raster
	scene  render.Scene // as told of last: what is drawn later still belongs to the picture in sight
	image  *image.RGBA  // as painted last; nil: paint anew
	dark   bool
	rungs  []render.Rung // in device pixels
	scale  float32       // device pixels a unit
	over   *render.Rung
}

var (
	_ fyne.Tappable      = (*Ladder)(nil)
	_ desktop.Hoverable  = (*Ladder)(nil)
	_ desktop.Cursorable = (*Ladder)(nil)
)

// NewLadder shows the desk's temperatures.
func NewLadder(k *Desk) *Ladder {
	l := &Ladder{desk: k, scale: 1}
	l.raster = canvas.NewRaster(l.draw)
	l.ExtendBaseWidget(l)
	l.follow()
	k.Listen(func(Changed) {
		l.follow()
		l.Refresh()
	})
	return l
}

// follow takes over what the desk shows; of an answer whose picture is still being painted only what is selected and pointed at.
func (l *Ladder) follow() {
	if l.desk.answer.unsaid == 0 {
		l.scene = l.desk.Scene()
		return
	}
	l.scene.Selected, l.scene.Pointed = l.desk.selection, l.desk.pointed
}

// MinSize leaves room for scale, numbers and names.
func (l *Ladder) MinSize() fyne.Size {
	l.ExtendBaseWidget(l)
	return fyne.NewSize(150, 160)
}

// Refresh paints anew what has changed.
func (l *Ladder) Refresh() {
	l.image = nil
	l.BaseWidget.Refresh()
}

// draw is the raster's generator, in device pixels.
func (l *Ladder) draw(w, h int) image.Image {
	dark := themeDark()
	if l.image != nil && l.image.Rect.Dx() == w && l.image.Rect.Dy() == h && l.dark == dark {
		return l.image
	}
	img := image.NewRGBA(image.Rect(0, 0, w, h))
	draw.Draw(img, img.Rect, image.NewUniform(themeColor(theme.ColorNameBackground)), image.Point{}, draw.Src)
	if width := l.Size().Width; width > 0 {
		l.scale = float32(w) / width
	}
	l.rungs = render.Ladder(render.NewRaster(img), l.scene, render.ScaleOf(l.scene), render.Style{Dark: dark, Scale: float64(l.scale)})
	l.image, l.dark, l.over = img, dark, nil
	return img
}

// rungAt returns the rung at a place, nil if none.
func (l *Ladder) rungAt(at fyne.Position) *render.Rung {
	y := float64(at.Y * l.scale)
	for i := range l.rungs {
		if r := &l.rungs[i]; y >= r.Y0 && y < r.Y1 {
			return r
		}
	}
	return nil
}

// partsOf returns the ids of a rung that are parts and not layers.
func (l *Ladder) partsOf(r *render.Rung) []string {
	if r == nil {
		return nil
	}
	return slices.DeleteFunc(slices.Clone(r.IDs), func(id string) bool { return section.Find(l.desk.Document(), id) == nil })
}

// MouseIn follows the pointer.
func (l *Ladder) MouseIn(e *desktop.MouseEvent) { l.MouseMoved(e) }

// MouseMoved lights up the first part of the rung under the pointer.
func (l *Ladder) MouseMoved(e *desktop.MouseEvent) {
	r := l.rungAt(e.Position)
	if r == l.over {
		return
	}
	l.over = r
	id := ""
	if parts := l.partsOf(r); len(parts) > 0 {
		id = parts[0]
	}
	l.desk.Point(id)
}

// MouseOut lights up nothing.
func (l *Ladder) MouseOut() {
	l.over = nil
	l.desk.Point("")
}

// Tapped selects what stands on the rung.
func (l *Ladder) Tapped(e *fyne.PointEvent) {
	if parts := l.partsOf(l.rungAt(e.Position)); len(parts) > 0 {
		l.desk.Select(parts...)
	}
}

// Cursor is a hand over a rung of parts.
func (l *Ladder) Cursor() desktop.Cursor {
	if len(l.partsOf(l.over)) > 0 {
		return desktop.PointerCursor
	}
	return desktop.DefaultCursor
}

// CreateRenderer is for the toolkit.
func (l *Ladder) CreateRenderer() fyne.WidgetRenderer { return widget.NewSimpleRenderer(l.raster) }
