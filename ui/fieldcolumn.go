package ui

import "fyne.io/fyne/v2"

// tallBy is an object whose height depends on the width it is given.
type tallBy interface {
	fyne.CanvasObject
	heightFor(width float32) float32
}

// fieldColumn stacks objects over the whole width, each as tall as it needs to be there.
type fieldColumn struct {
	width  float32 // laid out last
	gap    float32
	margin float32
}

// MinSize is the height at the width laid out last.
func (c *fieldColumn) MinSize(objects []fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(2*c.margin+80, c.run(objects, max(c.width, 2*c.margin+80), nil))
}

// Layout stacks the objects.
func (c *fieldColumn) Layout(objects []fyne.CanvasObject, s fyne.Size) {
	c.width = s.Width
	c.run(objects, s.Width, func(o fyne.CanvasObject, y, w, h float32) {
		o.Move(fyne.NewPos(c.margin, y))
		o.Resize(fyne.NewSize(w, h))
	})
}

func (c *fieldColumn) run(objects []fyne.CanvasObject, width float32, place func(o fyne.CanvasObject, y, w, h float32)) float32 {
	w, y := width-2*c.margin, c.margin
	for _, o := range objects {
		if !o.Visible() {
			continue
		}
		h := o.MinSize().Height
		if t, ok := o.(tallBy); ok {
			h = t.heightFor(w)
		}
		if place != nil {
			place(o, y, w, h)
		}
		y += h + c.gap
	}
	return y - c.gap + c.margin
}
