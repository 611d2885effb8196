package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// wireArrow is the room behind a header for the arrow of the sorting.
const wireArrow = 12

// wireHead is the row of headers, which stays in sight. A click sorts.
type wireHead struct {
	widget.BaseWidget
	list *WireList
	over wireColumn
}

var (
	_ fyne.Tappable      = (*wireHead)(nil)
	_ desktop.Hoverable  = (*wireHead)(nil)
	_ desktop.Cursorable = (*wireHead)(nil)
)

func newWireHead(l *WireList) *wireHead {
	h := &wireHead{list: l, over: -1}
	h.ExtendBaseWidget(h)
	return h
}

// Tapped sorts by the column.
func (h *wireHead) Tapped(e *fyne.PointEvent) {
	if c := h.list.layout.column(e.Position.X); c >= 0 {
		h.list.SortBy(c)
	}
}

// MouseIn follows the pointer.
func (h *wireHead) MouseIn(e *desktop.MouseEvent) { h.MouseMoved(e) }

// MouseMoved marks the header under the pointer.
func (h *wireHead) MouseMoved(e *desktop.MouseEvent) { h.hover(h.list.layout.column(e.Position.X)) }

// MouseOut marks none.
func (h *wireHead) MouseOut() { h.hover(-1) }

func (h *wireHead) hover(c wireColumn) {
	if c != h.over {
		h.over = c
		h.Refresh()
	}
}

// Cursor is a hand: headers sort.
func (h *wireHead) Cursor() desktop.Cursor { return desktop.PointerCursor }

// CreateRenderer is for the toolkit.
func (h *wireHead) CreateRenderer() fyne.WidgetRenderer {
	r := &wireHeadRenderer{head: h, back: canvas.NewRectangle(nil)}
	r.objects = append(r.objects, r.back)
	for c := range wireColumns {
		r.name[c], r.unit[c], r.arrow[c] = &canvas.Text{}, &canvas.Text{}, [2]*canvas.Line{{}, {}}
		r.objects = append(r.objects, r.name[c], r.unit[c], r.arrow[c][0], r.arrow[c][1])
	}
	return r
}

type wireHeadRenderer struct {
	head       *wireHead
	back       *canvas.Rectangle
	name, unit [wireColumns]*canvas.Text
	arrow      [wireColumns][2]*canvas.Line
	objects    []fyne.CanvasObject
}

func (r *wireHeadRenderer) Destroy()                     {}
func (r *wireHeadRenderer) Objects() []fyne.CanvasObject { return r.objects }
func (r *wireHeadRenderer) Layout(fyne.Size)             { r.Refresh() }

func (r *wireHeadRenderer) MinSize() fyne.Size {
	return fyne.NewSize(r.head.list.layout.width, r.head.list.layout.headHeight)
}

func (r *wireHeadRenderer) Refresh() {
	m := r.head.list.layout
	r.back.FillColor = themeColor(theme.ColorNameHeaderBackground)
	r.back.Resize(r.head.Size())
	for c := range wireColumns {
		r.column(c, m)
	}
	canvas.Refresh(r.head)
}

// column puts one header: name, quiet unit and, where the list is sorted by it, an arrow.
func (r *wireHeadRenderer) column(c wireColumn, m wireLayout) {
	name, unit, l := r.name[c], r.unit[c], r.head.list
	name.Hidden, unit.Hidden = !m.shown[c], !m.shown[c]
	sorted := m.shown[c] && l.sorted && l.by == c
	r.arrow[c][0].Hidden, r.arrow[c][1].Hidden = !sorted, !sorted
	if !m.shown[c] {
		return
	}
	name.Text, name.TextSize, name.TextStyle, name.Color = m.head(c), m.textSize, fyne.TextStyle{Bold: true}, themeColor(theme.ColorNameForeground)
	if r.head.over == c {
		name.Color = themeColor(theme.ColorNamePrimary)
	}
	unit.Text, unit.TextSize, unit.Color = wireHeads[c].unit, m.textSize, themeColor(ColorNameQuiet)
	n, u := name.MinSize(), unit.MinSize()
	space := float32(0)
	if unit.Text != "" {
		space = 4
	} else {
		u.Width = 0
	}
	y := (m.headHeight - n.Height) / 2
	x := m.at[c]
	if c.number() {
		x = m.numberEdge(c) - n.Width - space - u.Width
	}
	name.Move(fyne.NewPos(x, y))
	name.Resize(n)
	unit.Move(fyne.NewPos(x+n.Width+space, y))
	unit.Resize(u)
	if sorted {
		tip := x + n.Width + space + u.Width + 7
		if c.number() {
			tip = x - 8
		}
		r.drawArrow(c, tip, m.headHeight/2)
	}
}

// drawArrow points up where the values grow downwards from the top.
func (r *wireHeadRenderer) drawArrow(c wireColumn, x, y float32) {
	h := float32(2.5)
	if r.head.list.down {
		h = -h
	}
	for i, dx := range []float32{-4, 4} {
		line := r.arrow[c][i]
		line.StrokeColor, line.StrokeWidth = themeColor(theme.ColorNamePrimary), 2
		line.Position1, line.Position2 = fyne.NewPos(x, y-h), fyne.NewPos(x+dx, y+h)
	}
}
