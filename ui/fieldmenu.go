package ui

import (
	"image/color"
	"slices"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// fieldMenu is the list of what the catalogue has for an entry: a few rows high, open at what stands there now, for pointer, arrows and typing.
type fieldMenu struct {
	widget.BaseWidget

	choices []string
	now     int // the choice that stands, −1 for none
	over    int // the row marked
	typed   string
	chosen  func(string)
	popup   *widget.PopUp
	scroll  *container.Scroll
}

var (
	_ fyne.Tappable     = (*fieldMenu)(nil)
	_ fyne.Focusable    = (*fieldMenu)(nil)
	_ desktop.Hoverable = (*fieldMenu)(nil)
)

// Sizes of a menu.
const (
	menuRows    = 11 // most in sight
	menuPad     = 10
	menuRowTall = 8 // beyond the text
)

// openFieldMenu shows the choices below an object, or above it where there is more room.
func openFieldMenu(below fyne.CanvasObject, choices []string, now string, chosen func(string)) *fieldMenu {
	c := fyne.CurrentApp().Driver().CanvasForObject(below)
	if c == nil || len(choices) == 0 {
		return nil
	}
	m := &fieldMenu{choices: choices, chosen: chosen, now: slices.Index(choices, now)}
	m.over = max(0, m.now)
	m.ExtendBaseWidget(m)
	m.scroll = container.NewVScroll(m)
	m.popup = widget.NewPopUp(m.scroll, c)
	at := fyne.CurrentApp().Driver().AbsolutePositionForObject(below)
	pad := 2 * theme.Padding()
	room := c.Size().Height - at.Y - below.Size().Height
	up := room < 5*m.rowHeight() && at.Y > room
	if up {
		room = at.Y
	}
	rows := min(len(choices), menuRows, max(1, int((room-pad)/m.rowHeight())))
	size := fyne.NewSize(max(below.Size().Width, m.MinSize().Width+pad), float32(rows)*m.rowHeight()+pad)
	if up {
		at.Y -= size.Height
	} else {
		at.Y += below.Size().Height
	}
	m.popup.Resize(size)
	m.popup.ShowAtPosition(at)
	m.popup.Resize(size)
	m.mark(m.over)
	if m.now > rows/2 { // in the middle of what is in sight
		m.scroll.ScrollToOffset(fyne.NewPos(0, float32(m.now-rows/2)*m.rowHeight()))
	}
	c.Focus(m)
	return m
}

func (m *fieldMenu) rowHeight() float32 {
	return textExtent("Mg", theme.TextSize(), fyne.TextStyle{}).Height + menuRowTall
}

// MinSize has room for the widest choice and all rows.
func (m *fieldMenu) MinSize() fyne.Size {
	wide := float32(0)
	for _, c := range m.choices {
		wide = max(wide, textExtent(c, theme.TextSize(), fyne.TextStyle{Bold: true}).Width)
	}
	return fyne.NewSize(wide+2*menuPad, m.rowHeight()*float32(len(m.choices)))
}

// close takes the menu away.
func (m *fieldMenu) close() {
	m.popup.Hide()
}

func (m *fieldMenu) take(i int) {
	m.close()
	if i >= 0 && i < len(m.choices) {
		m.chosen(m.choices[i])
	}
}

// mark marks a row and brings it into sight.
func (m *fieldMenu) mark(i int) {
	m.over = min(max(0, i), len(m.choices)-1)
	h := m.rowHeight()
	top, at, seen := float32(m.over)*h, m.scroll.Offset, m.scroll.Size().Height
	if top < at.Y {
		at.Y = top
	} else if top+h > at.Y+seen {
		at.Y = top + h - seen
	}
	m.scroll.ScrollToOffset(at)
	m.Refresh()
}

// Tapped chooses.
func (m *fieldMenu) Tapped(e *fyne.PointEvent) { m.take(int(e.Position.Y / m.rowHeight())) }

// MouseIn follows the pointer.
func (m *fieldMenu) MouseIn(e *desktop.MouseEvent) { m.MouseMoved(e) }

// MouseMoved marks the row under the pointer.
func (m *fieldMenu) MouseMoved(e *desktop.MouseEvent) {
	if i := int(e.Position.Y / m.rowHeight()); i != m.over && i >= 0 && i < len(m.choices) {
		m.over = i
		m.Refresh()
	}
}

// MouseOut is for the toolkit.
func (m *fieldMenu) MouseOut() {}

// FocusGained is for the toolkit.
func (m *fieldMenu) FocusGained() {}

// FocusLost is for the toolkit.
func (m *fieldMenu) FocusLost() {}

// TypedRune marks the first choice that begins as typed.
func (m *fieldMenu) TypedRune(r rune) {
	m.typed += strings.ToLower(string(r))
	for _, typed := range []string{m.typed, strings.ToLower(string(r))} {
		if i := slices.IndexFunc(m.choices, func(c string) bool { return strings.HasPrefix(strings.ToLower(c), typed) }); i >= 0 {
			m.typed = typed
			m.mark(i)
			return
		}
	}
	m.typed = ""
}

// TypedKey moves the mark, chooses and closes.
func (m *fieldMenu) TypedKey(k *fyne.KeyEvent) {
	m.typed = ""
	switch k.Name {
	case fyne.KeyUp:
		m.mark(m.over - 1)
	case fyne.KeyDown:
		m.mark(m.over + 1)
	case fyne.KeyPageUp:
		m.mark(m.over - menuRows)
	case fyne.KeyPageDown:
		m.mark(m.over + menuRows)
	case fyne.KeyHome:
		m.mark(0)
	case fyne.KeyEnd:
		m.mark(len(m.choices))
	case fyne.KeyReturn, fyne.KeyEnter, fyne.KeySpace:
		m.take(m.over)
	case fyne.KeyEscape:
		m.close()
	}
}

// CreateRenderer is for the toolkit.
func (m *fieldMenu) CreateRenderer() fyne.WidgetRenderer {
	r := &fieldMenuRenderer{menu: m, back: canvas.NewRectangle(color.Transparent)}
	r.objects = append(r.objects, r.back)
	for _, c := range m.choices {
		t := canvas.NewText(c, color.Transparent)
		r.texts = append(r.texts, t)
		r.objects = append(r.objects, t)
	}
	return r
}

type fieldMenuRenderer struct {
	menu    *fieldMenu
	back    *canvas.Rectangle
	texts   []*canvas.Text
	objects []fyne.CanvasObject
}

func (r *fieldMenuRenderer) Destroy()                     {}
func (r *fieldMenuRenderer) MinSize() fyne.Size           { return r.menu.MinSize() }
func (r *fieldMenuRenderer) Objects() []fyne.CanvasObject { return r.objects }
func (r *fieldMenuRenderer) Layout(fyne.Size)             { r.Refresh() }

func (r *fieldMenuRenderer) Refresh() {
	m, h := r.menu, r.menu.rowHeight()
	r.back.FillColor, r.back.CornerRadius = themeColor(theme.ColorNameSelection), 3
	r.back.Move(fyne.NewPos(0, float32(m.over)*h))
	r.back.Resize(fyne.NewSize(m.Size().Width, h))
	for i, t := range r.texts {
		t.TextSize, t.Color = theme.TextSize(), themeColor(theme.ColorNameForeground)
		t.TextStyle.Bold = i == m.now
		t.Move(fyne.NewPos(menuPad, float32(i)*h+menuRowTall/2))
		t.Resize(t.MinSize())
	}
	canvas.Refresh(m)
}
