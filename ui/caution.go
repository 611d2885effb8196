package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/widget"

	"packrise/solver/rating"
)

// cautionLine is the standing caution in the bottom line. It wraps and never clips.
type cautionLine struct {
	widget.BaseWidget
	back *fill
	text *prose
}

func newCaution() *cautionLine {
	c := &cautionLine{back: newFill(ColorNameStrip), text: newProse(nil, run{text: rating.Caution, tone: quiet})}
	c.text.size = smallText(c.text)
	c.ExtendBaseWidget(c)
	return c
}

const (
	barMargin  = 12 // at the left and right of strips
	cautionGap = 5
)

func (c *cautionLine) heightFor(width float32) float32 {
	return c.text.heightFor(max(80, width-2*barMargin)) + 2*cautionGap
}

// MinSize is the height at the width laid out last.
func (c *cautionLine) MinSize() fyne.Size {
	c.ExtendBaseWidget(c)
	return fyne.NewSize(200, c.heightFor(max(c.Size().Width, 200)))
}

// CreateRenderer is for the toolkit.
func (c *cautionLine) CreateRenderer() fyne.WidgetRenderer { return &cautionRenderer{c} }

type cautionRenderer struct{ c *cautionLine }

func (r *cautionRenderer) Destroy()           {}
func (r *cautionRenderer) MinSize() fyne.Size { return r.c.MinSize() }

func (r *cautionRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.c.back, r.c.text}
}

func (r *cautionRenderer) Layout(s fyne.Size) {
	r.c.back.Resize(s)
	put(r.c.text, barMargin, cautionGap, s.Width-2*barMargin, s.Height-2*cautionGap)
}

func (r *cautionRenderer) Refresh() {
	r.c.back.Refresh()
	r.c.text.Refresh()
}
