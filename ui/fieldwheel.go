package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/widget"
)

// fieldWheel lies over a scroll and takes the wheel for it, and nothing else: without it every entry under the pointer would take the wheel to scroll
// its own text.
type fieldWheel struct {
	widget.BaseWidget
	scroll *container.Scroll
}

var _ fyne.Scrollable = (*fieldWheel)(nil)

func newFieldWheel(s *container.Scroll) *fieldWheel {
	w := &fieldWheel{scroll: s}
	w.ExtendBaseWidget(w)
	return w
}

// Scrolled passes the wheel on.
func (w *fieldWheel) Scrolled(e *fyne.ScrollEvent) { w.scroll.Scrolled(e) }

// MinSize is nothing.
func (w *fieldWheel) MinSize() fyne.Size { return fyne.NewSize(1, 1) }

// CreateRenderer draws nothing.
func (w *fieldWheel) CreateRenderer() fyne.WidgetRenderer {
	return widget.NewSimpleRenderer(canvas.NewRectangle(nil))
}
