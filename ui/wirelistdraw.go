package ui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"

	"packrise/render"
)

// wireLine is what is drawn for one row in sight.
type wireLine struct {
	back  *canvas.Rectangle
	cells [wireColumns]*canvas.Text
}

// wireBodyRenderer draws the rows in sight with objects that it keeps.
type wireBodyRenderer struct {
	body    *wireBody
	lines   []*wireLine
	bars    *wireBars
	raster  *canvas.Raster
	cursor  *canvas.Rectangle // round the active cell
	tip     *wireTip
	objects []fyne.CanvasObject
}

func (r *wireBodyRenderer) Destroy()                     {}
func (r *wireBodyRenderer) MinSize() fyne.Size           { return r.body.MinSize() }
func (r *wireBodyRenderer) Objects() []fyne.CanvasObject { return r.objects }
func (r *wireBodyRenderer) Layout(fyne.Size)             { r.Refresh() }

// inSight returns the rows in sight, last not included.
func (l *WireList) inSight() (first, last int) {
	h := l.layout.rowHeight
	if h <= 0 {
		return 0, 0
	}
	first = max(0, int(l.scroll.Offset.Y/h))
	last = min(len(l.rows), int((l.scroll.Offset.Y+l.scroll.Size().Height)/h)+1)
	return min(first, last), last
}

func (r *wireBodyRenderer) Refresh() {
	l := r.body.list
	first, last := l.inSight()
	r.objects = r.objects[:0]
	for i := first; i < last; i++ {
		r.row(i, i-first)
	}
	r.bars.first, r.bars.last = first, last
	r.raster.Move(fyne.NewPos(l.layout.bar, float32(first)*l.layout.rowHeight))
	r.raster.Resize(fyne.NewSize(l.layout.barWide, float32(last-first)*l.layout.rowHeight))
	if last > first {
		r.raster.Refresh()
		r.objects = append(r.objects, r.raster)
	}
	r.active(first, last)
	r.overlay()
	canvas.Refresh(r.body)
}

// row draws one row with the objects of line n.
func (r *wireBodyRenderer) row(i, n int) {
	for len(r.lines) <= n {
		line := &wireLine{back: canvas.NewRectangle(nil)}
		for c := range line.cells {
			line.cells[c] = &canvas.Text{}
		}
		r.lines = append(r.lines, line)
	}
	line, l := r.lines[n], r.body.list
	row, m := &l.rows[i], l.layout
	y := float32(i) * m.rowHeight
	line.back.FillColor = r.background(row)
	line.back.Move(fyne.NewPos(0, y))
	line.back.Resize(fyne.NewSize(max(m.width, l.scroll.Size().Width), m.rowHeight))
	if line.back.FillColor != color.Transparent {
		r.objects = append(r.objects, line.back)
	}
	for c := range wireColumns {
		if !m.shown[c] {
			continue
		}
		t := line.cells[c]
		t.Text, t.TextSize = c.text(row), m.textSize
		if t.Text == "" {
			continue
		}
		r.dress(t, row, c)
		size := textExtent(t.Text, t.TextSize, t.TextStyle)
		x, room := m.at[c], m.wide[c]
		if c.number() {
			x = m.numberEdge(c) - size.Width
		} else if size.Width > room {
			t.Text = elidedText(t, room)
			size.Width = room
		}
		t.Move(fyne.NewPos(x, y+(m.rowHeight-size.Height)/2))
		t.Resize(size)
		r.objects = append(r.objects, t)
	}
}

func elidedText(t *canvas.Text, room float32) string {
	return render.Elide(t.Text, float64(room), func(s string) float64 {
		return float64(textExtent(s, t.TextSize, t.TextStyle).Width)
	})
}

func (r *wireBodyRenderer) background(row *wireRow) color.Color {
	l := r.body.list
	switch {
	case l.desk.Selected(row.id):
		return themeColor(theme.ColorNameSelection)
	case l.desk.Pointed() == row.id && row.part():
		return themeColor(theme.ColorNameHover)
	}
	return color.Transparent
}

// dress gives a cell its ink: what is over in the colour of that, layers and the old quieter.
func (r *wireBodyRenderer) dress(t *canvas.Text, row *wireRow, c wireColumn) {
	l := r.body.list
	t.TextStyle = fyne.TextStyle{}
	t.Color = themeColor(theme.ColorNameForeground)
	switch {
	case l.aged && (c.answered() || c == wireRemark), l.agedRatings && c.rated():
		t.Color = themeColor(theme.ColorNameDisabled)
	case row.bad && c == wireRemark, row.over() && (c == wireMargin || c == wireTemp || c == wireRemark):
		t.Color = themeColor(theme.ColorNameError)
	case row.close() && (c == wireBand || c == wireRemark):
		t.Color = themeColor(ColorNameClose)
	case c == wireCurrent && row.unknown, c == wireRemark && row.unknown:
		t.Color = themeColor(theme.ColorNameWarning)
	case !row.part() || c == wireRemark || c == wireCircuit:
		t.Color = themeColor(ColorNameQuiet)
	}
	t.TextStyle.Bold = c == wireID && row.over()
}

// active draws the frame of the active cell while the list has the keyboard.
func (r *wireBodyRenderer) active(first, last int) {
	b, l := r.body, r.body.list
	i := l.row(l.active.id)
	if !b.focused || b.entry != nil || i < first || i >= last || l.active.col < 0 || !l.layout.shown[l.active.col] {
		return
	}
	at, size := l.cellBox(i, l.active.col)
	r.cursor.FillColor, r.cursor.StrokeColor, r.cursor.StrokeWidth = color.Transparent, themeColor(theme.ColorNamePrimary), 1.5
	r.cursor.CornerRadius = 3
	r.cursor.Move(at)
	r.cursor.Resize(size)
	r.objects = append(r.objects, r.cursor)
}

// cellBox is the frame of a cell.
func (l *WireList) cellBox(i int, c wireColumn) (fyne.Position, fyne.Size) {
	m := l.layout
	left, right := m.at[c]-6, m.at[c]+m.wide[c]+6
	if c == wireMargin {
		right = m.numberEdge(c) + 6
	}
	return fyne.NewPos(left, float32(i)*m.rowHeight+1), fyne.NewSize(right-left, m.rowHeight-2)
}

// overlay draws the entry being edited, and the tip: how its text is understood, why one was not taken, or the whole of an elided cell under
// the pointer.
func (r *wireBodyRenderer) overlay() {
	b, l := r.body, r.body.list
	i, c, text, wrong := b.hovered, b.column, r.elidedUnderPointer(), false
	if b.entry != nil || b.message != "" {
		i, c, text, wrong = l.row(b.cell.id), b.cell.col, b.message, b.wrong
	}
	if i < 0 {
		return
	}
	at, size := l.cellBox(i, max(0, c))
	if b.entry != nil {
		size.Width = max(size.Width, 90)
		at.X = min(at.X, max(0, max(l.layout.width, l.scroll.Size().Width)-size.Width))
		b.frame.Move(at)
		b.frame.Resize(size)
		r.objects = append(r.objects, b.frame)
	}
	if text != "" {
		r.objects = append(r.objects, r.tip.show(text, wrong, at, size, l.window())...)
	}
}

// window is what can be seen of the rows.
func (l *WireList) window() wireWindow {
	s := l.scroll
	return wireWindow{s.Offset.Y, s.Offset.Y + s.Size().Height, s.Offset.X + s.Size().Width}
}

// elidedUnderPointer returns the whole text of the cell under the pointer where it is elided, and why the lowest current is what it is.
func (r *wireBodyRenderer) elidedUnderPointer() string {
	b, l := r.body, r.body.list
	if b.hovered < 0 || b.hovered >= len(l.rows) || b.column < 0 {
		return ""
	}
	if b.column == wireLowest {
		return l.rows[b.hovered].because
	}
	if b.column.number() {
		return ""
	}
	text := b.column.text(&l.rows[b.hovered])
	if textExtent(text, l.layout.textSize, fyne.TextStyle{}).Width <= l.layout.wide[b.column] {
		return ""
	}
	return text
}
