package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"
)

// wireBody is the rows. It takes the pointer and the keyboard for all of them.
type wireBody struct {
	widget.BaseWidget

	list    *WireList
	focused bool
	hovered int // row, −1 for none
	column  wireColumn
	held    fyne.KeyModifier // at the last press

	entry   *fieldEntry // in the cell being edited, nil for none
	frame   fyne.CanvasObject
	cell    wireCell
	message string
	wrong   bool
}

var (
	_ fyne.Tappable      = (*wireBody)(nil)
	_ fyne.Focusable     = (*wireBody)(nil)
	_ desktop.Hoverable  = (*wireBody)(nil)
	_ desktop.Mouseable  = (*wireBody)(nil)
	_ desktop.Cursorable = (*wireBody)(nil)
)

func newWireBody(l *WireList) *wireBody {
	b := &wireBody{list: l, hovered: -1}
	b.ExtendBaseWidget(b)
	return b
}

// MinSize is that of all rows.
func (b *wireBody) MinSize() fyne.Size {
	b.ExtendBaseWidget(b)
	m := b.list.layout
	return fyne.NewSize(m.width, m.rowHeight*float32(len(b.list.rows)))
}

// rowAt returns the row at a place, −1 for none.
func (b *wireBody) rowAt(at fyne.Position) int {
	h := b.list.layout.rowHeight
	if h <= 0 || at.Y < 0 {
		return -1
	}
	if i := int(at.Y / h); i < len(b.list.rows) {
		return i
	}
	return -1
}

// MouseDown remembers the keys held.
func (b *wireBody) MouseDown(e *desktop.MouseEvent) { b.held = e.Modifier }

// MouseUp is for the toolkit.
func (b *wireBody) MouseUp(*desktop.MouseEvent) {}

// Tapped selects the row; a second click on the same cell edits it.
func (b *wireBody) Tapped(e *fyne.PointEvent) {
	held := b.held | keysHeld()
	b.held = 0
	i := b.rowAt(e.Position)
	b.stop()
	b.takeFocus()
	if i < 0 {
		b.list.desk.Select()
		return
	}
	l := b.list
	cell := wireCell{l.rows[i].id, l.layout.column(e.Position.X)}
	again := cell == l.active && b.editable(cell) && held&(fyne.KeyModifierShortcutDefault|fyne.KeyModifierShift) == 0 && len(l.desk.Selection()) <= 1
	l.active = cell
	if again && l.desk.Selected(cell.id) {
		b.edit(cell)
		return
	}
	l.choose(i, held&fyne.KeyModifierShortcutDefault != 0, held&fyne.KeyModifierShift != 0)
}

func (b *wireBody) takeFocus() {
	if c := fyne.CurrentApp().Driver().CanvasForObject(b); c != nil && c.Focused() != fyne.Focusable(b) {
		c.Focus(b)
	}
}

// MouseIn follows the pointer.
func (b *wireBody) MouseIn(e *desktop.MouseEvent) { b.MouseMoved(e) }

// MouseMoved lights up the part of the row under the pointer.
func (b *wireBody) MouseMoved(e *desktop.MouseEvent) {
	i, c := b.rowAt(e.Position), b.list.layout.column(e.Position.X)
	if i == b.hovered && c == b.column {
		return
	}
	b.hovered, b.column = i, c
	b.point()
	b.Refresh()
}

// MouseOut lights up nothing.
func (b *wireBody) MouseOut() {
	b.hovered = -1
	b.point()
	b.Refresh()
}

// point lights up the part of the row hovered over; layers are no parts.
func (b *wireBody) point() {
	id := ""
	if b.hovered >= 0 && b.hovered < len(b.list.rows) {
		if r := b.list.rows[b.hovered]; r.part() {
			id = r.id
		}
	}
	b.list.desk.Point(id)
}

// Cursor tells where a click edits.
func (b *wireBody) Cursor() desktop.Cursor {
	l := b.list
	if b.hovered >= 0 && b.hovered < len(l.rows) {
		if cell := (wireCell{l.rows[b.hovered].id, b.column}); cell == l.active && b.editable(cell) && l.desk.Selected(cell.id) {
			return desktop.TextCursor
		}
	}
	return desktop.DefaultCursor
}

// FocusGained and FocusLost show where the keyboard is.
func (b *wireBody) FocusGained() {
	b.focused = true
	b.Refresh()
}

// FocusLost is for the toolkit.
func (b *wireBody) FocusLost() {
	b.focused = false
	b.Refresh()
}

// CreateRenderer is for the toolkit.
func (b *wireBody) CreateRenderer() fyne.WidgetRenderer {
	r := &wireBodyRenderer{body: b, cursor: canvas.NewRectangle(nil), bars: &wireBars{list: b.list}, tip: newWireTip()}
	r.raster = canvas.NewRaster(r.bars.draw)
	r.Refresh()
	return r
}

// part tells whether the row is a part and not a layer.
func (r wireRow) part() bool { return r.kind != "layer" && r.kind != "surface" }

// editable tells whether a cell can be entered.
func (b *wireBody) editable(cell wireCell) bool { return b.input(cell) != nil }

// input returns what is entered in a cell, nil where nothing is.
func (b *wireBody) input(cell wireCell) *input {
	l := b.list
	i := l.row(cell.id)
	if i < 0 || !l.rows[i].part() || cell.col < 0 || cell.col.input() == "" {
		return nil
	}
	ids := []string{cell.id}
	core := l.rows[i].kind == "core"
	switch cell.col {
	case wireCurrent:
		if core {
			return currentInput(l.desk, ids)
		}
	case wireCircuit:
		if core {
			return circuitInput(l.desk, ids)
		}
	case wireSizeType:
		if core {
			return sizeInput(l.desk, ids)
		}
	case wireLimit:
		return limitInput(l.desk, ids)
	case wireID:
		if isTop(cell.id) {
			return idInput(l.desk, cell.id)
		}
	}
	return nil
}

// edit puts an entry into the cell, with the keyboard in it.
func (b *wireBody) edit(cell wireCell) {
	in := b.input(cell)
	if in == nil {
		return
	}
	b.stop()
	e := newFieldEntry(b.list.desk, in)
	e.ActionItem, e.steps = nil, true // a cell has no room for the arrow
	e.say = func(understood string, err error) {
		b.message, b.wrong = understood, err != nil
		if err != nil {
			b.message = sentence(err)
		}
		b.Refresh()
	}
	e.after = func(how fieldEnd) { b.edited(how) }
	b.entry, b.cell, b.message = e, cell, ""
	b.frame = container.NewThemeOverride(e, denseTheme{rowPad})
	b.list.reveal(b.list.row(cell.id))
	b.Refresh()
	if c := fyne.CurrentApp().Driver().CanvasForObject(b); c != nil {
		c.Focus(e)
	}
}

// stop takes the entry out of its cell.
func (b *wireBody) stop() {
	b.entry, b.frame, b.message, b.wrong = nil, nil, "", false
	b.Refresh()
}

// edited ends editing and goes on to the neighbour where an arrow asked for it.
func (b *wireBody) edited(how fieldEnd) {
	cell := b.cell
	if how == fieldLeft {
		b.entry, b.frame = nil, nil
		if !b.wrong { // why it was not taken stays until the next press or key
			b.message = ""
		}
		b.Refresh()
		return
	}
	b.stop()
	b.takeFocus()
	if step := map[fieldEnd]int{fieldUp: -1, fieldDown: 1}[how]; step != 0 {
		l := b.list
		if i := l.row(cell.id) + step; i >= 0 && i < len(l.rows) {
			l.active.col = cell.col
			l.choose(i, false, false)
			l.reveal(i)
		}
	}
}
