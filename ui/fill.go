package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/widget"
)

// fill is a rectangle in a colour of the theme, which follows the theme.
type fill struct {
	widget.BaseWidget
	name fyne.ThemeColorName
	rect *canvas.Rectangle
}

func newFill(n fyne.ThemeColorName) *fill {
	f := &fill{name: n, rect: canvas.NewRectangle(themeColor(n))}
	f.ExtendBaseWidget(f)
	return f
}

// tint changes the colour.
func (f *fill) tint(n fyne.ThemeColorName) {
	f.name = n
	f.Refresh()
}

// MinSize is nothing.
func (f *fill) MinSize() fyne.Size { return fyne.NewSize(1, 1) }

// CreateRenderer is for the toolkit.
func (f *fill) CreateRenderer() fyne.WidgetRenderer { return &fillRenderer{f} }

type fillRenderer struct{ f *fill }

func (r *fillRenderer) Destroy()                     {}
func (r *fillRenderer) MinSize() fyne.Size           { return r.f.MinSize() }
func (r *fillRenderer) Objects() []fyne.CanvasObject { return []fyne.CanvasObject{r.f.rect} }
func (r *fillRenderer) Layout(s fyne.Size)           { r.f.rect.Resize(s) }

func (r *fillRenderer) Refresh() {
	r.f.rect.FillColor = themeColor(r.f.name)
	r.f.rect.Refresh()
}
