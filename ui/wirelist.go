package ui

import (
	"slices"
	"strconv"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// WireList is one row a part, like a spreadsheet: sorted by a click on a header, selected together with the section, edited in place. Only the
// rows in sight are drawn.
type WireList struct {
	widget.BaseWidget

	desk   *Desk
	head   *wireHead
	body   *wireBody
	clip   *container.Clip
	scroll *container.Scroll
	rule   *canvas.Rectangle
	unseen *canvas.Text // how many rows are out of sight

	rows []wireRow
	aged bool // the numbers belong to an older section

	agedRatings bool // the permitted currents do
	sorted      bool // else in the document's order
	by          wireColumn
	down        bool
	layout      wireLayout

	active wireCell // where the keyboard is
	anchor string   // where a range of rows begins
	own    bool     // the selection is being changed from here
}

// wireCell is a cell by the row's id, so that it survives sorting.
type wireCell struct {
	id  string
	col wireColumn
}

// NewWireList lists the desk's parts.
func NewWireList(k *Desk) *WireList {
	l := &WireList{desk: k, active: wireCell{col: wireCurrent}}
	l.head = newWireHead(l)
	l.body = newWireBody(l)
	l.clip = container.NewClip(l.head)
	l.scroll = container.NewScroll(l.body)
	l.scroll.OnScrolled = func(fyne.Position) { l.scrolled() }
	l.rule = canvas.NewRectangle(nil)
	l.unseen = canvas.NewText("", nil)
	l.unseen.Alignment = fyne.TextAlignTrailing
	l.ExtendBaseWidget(l)
	k.Listen(l.changed)
	l.reload()
	return l
}

func (l *WireList) changed(c Changed) {
	if c&(ChangedDocument|ChangedResult|ChangedRatings) != 0 {
		l.reload()
	}
	if c&ChangedSelection != 0 && !l.own {
		l.follow()
	}
	l.body.Refresh()
}

// reload reads the rows anew. While an answer is old its order is kept, with its numbers greyed.
func (l *WireList) reload() {
	_, fresh := l.desk.Result()
	l.aged = !fresh && l.desk.Stale()
	_, l.agedRatings = l.desk.shownRatings()
	was := l.row(l.active.id)
	first, last := l.inSight()
	l.rows = wireRows(l.desk)
	if l.sorted {
		sortWires(l.rows, l.by, l.down)
	}
	l.relayout()
	if now := l.row(l.active.id); now != was && was >= first && was < last {
		l.reveal(now) // the row one works on stays in sight when others pass it
	}
}

// SortBy sorts by a column as a click on its header does: up, down, then the document's order again.
func (l *WireList) SortBy(c wireColumn) {
	switch {
	case !l.sorted || l.by != c:
		l.sorted, l.by, l.down = true, c, false
	case !l.down:
		l.down = true
	default:
		l.sorted = false
	}
	l.reload()
	l.head.Refresh()
	l.body.Refresh()
}

// row returns the index of a row, −1 if there is none of that id.
func (l *WireList) row(id string) int {
	return slices.IndexFunc(l.rows, func(r wireRow) bool { return r.id == id })
}

// follow takes over a selection made elsewhere and brings its first row into sight.
func (l *WireList) follow() {
	ids := l.desk.Selection()
	if len(ids) == 0 || slices.Contains(ids, l.active.id) {
		return
	}
	l.active.id, l.anchor = ids[0], ids[0]
	l.reveal(l.row(ids[len(ids)-1]))
	l.reveal(l.row(ids[0]))
}

// reveal scrolls so that a row is in sight.
func (l *WireList) reveal(i int) {
	if i < 0 {
		return
	}
	h := l.layout.rowHeight
	top, at := float32(i)*h, l.scroll.Offset
	switch seen := l.scroll.Size().Height; {
	case top < at.Y:
		at.Y = top
	case top+h > at.Y+seen:
		at.Y = top + h - seen
	default:
		return
	}
	l.scroll.ScrollToOffset(at)
	l.scrolled()
}

// scrolled keeps header and rows together.
func (l *WireList) scrolled() {
	l.head.Move(fyne.NewPos(-l.scroll.Offset.X, 0))
	l.body.Refresh()
	l.count()
}

// count says how many rows are out of sight.
func (l *WireList) count() {
	above, below := l.outOfSight()
	text := ""
	switch {
	case above > 0 && below > 0:
		text = strconv.Itoa(above) + " above, " + strconv.Itoa(below) + " below"
	case above > 0:
		text = strconv.Itoa(above) + " above"
	case below > 0:
		text = strconv.Itoa(below) + " more"
	}
	if l.unseen.Text != text {
		l.unseen.Text = text
		l.unseen.Refresh()
	}
}

// outOfSight counts the rows above and below those in sight; a row half in sight counts as seen.
func (l *WireList) outOfSight() (above, below int) {
	h := l.layout.rowHeight
	if h <= 0 || len(l.rows) == 0 {
		return 0, 0
	}
	top, bottom := l.scroll.Offset.Y, l.scroll.Offset.Y+l.scroll.Size().Height
	above = int(top/h + 0.5)
	below = max(0, len(l.rows)-int(bottom/h+0.5))
	return above, below
}

// choose makes a row the selection, adds it or takes it out (toggle), or selects all between it and the last one chosen (extend).
func (l *WireList) choose(i int, toggle, extend bool) {
	id := l.rows[i].id
	ids := []string{id}
	switch from := l.row(l.anchor); {
	case extend && from >= 0:
		ids = nil
		for j := min(i, from); j <= max(i, from); j++ {
			ids = append(ids, l.rows[j].id)
		}
	case toggle:
		ids = slices.Clone(l.desk.Selection())
		if at := slices.Index(ids, id); at >= 0 {
			ids = slices.Delete(ids, at, at+1)
		} else {
			ids = append(ids, id)
		}
		l.anchor = id
	default:
		l.anchor = id
	}
	l.active.id = id
	l.own = true
	l.desk.Select(ids...)
	l.own = false
	l.body.Refresh()
}

// relayout measures the columns and lays the list out where that has changed.
func (l *WireList) relayout() {
	now := measureWires(l)
	if now == l.layout {
		l.count()
		return
	}
	l.layout = now
	l.scroll.Refresh()
	l.head.Refresh()
	l.Refresh()
}

// MinSize shows the header and two rows.
func (l *WireList) MinSize() fyne.Size {
	l.ExtendBaseWidget(l)
	return fyne.NewSize(240, l.layout.headHeight+2*l.layout.rowHeight)
}

// CreateRenderer stacks header, rows and the count.
func (l *WireList) CreateRenderer() fyne.WidgetRenderer {
	return &wireListRenderer{l, []fyne.CanvasObject{l.clip, l.rule, l.scroll, l.unseen}}
}

type wireListRenderer struct {
	l       *WireList
	objects []fyne.CanvasObject
}

func (r *wireListRenderer) Destroy()                     {}
func (r *wireListRenderer) MinSize() fyne.Size           { return r.l.MinSize() }
func (r *wireListRenderer) Objects() []fyne.CanvasObject { return r.objects }

func (r *wireListRenderer) Layout(s fyne.Size) {
	l := r.l
	l.layout = measureWires(l)
	y := l.layout.headHeight
	l.clip.Resize(fyne.NewSize(s.Width, y))
	l.head.Resize(fyne.NewSize(max(s.Width, l.layout.width), y))
	l.rule.Move(fyne.NewPos(0, y))
	l.rule.Resize(fyne.NewSize(s.Width, 1))
	foot := float32(0)
	if float32(len(l.rows))*l.layout.rowHeight > s.Height-y-1 {
		foot = l.unseen.MinSize().Height + 4
	}
	l.unseen.Hidden = foot == 0
	l.unseen.Move(fyne.NewPos(12, s.Height-foot+2))
	l.unseen.Resize(fyne.NewSize(max(0, s.Width-24), max(0, foot-4)))
	l.scroll.Move(fyne.NewPos(0, y+1))
	l.scroll.Resize(fyne.NewSize(s.Width, max(0, s.Height-y-1-foot)))
	l.scroll.Refresh()
	l.scrolled()
}

func (r *wireListRenderer) Refresh() {
	l := r.l
	l.rule.FillColor = themeColor(theme.ColorNameSeparator)
	l.unseen.Color, l.unseen.TextSize = themeColor(ColorNameQuiet), smallText(l)()
	r.Layout(l.Size())
	l.head.Refresh()
	canvas.Refresh(l)
}

// keysHeld returns the modifiers that are held, as far as the driver knows.
func keysHeld() fyne.KeyModifier {
	if d, ok := fyne.CurrentApp().Driver().(desktop.Driver); ok {
		return d.CurrentKeyModifiers()
	}
	return 0
}
