package ui

import (
	"strings"

	"fyne.io/fyne/v2"
)

// TypedRune begins to edit the cell with what is typed.
func (b *wireBody) TypedRune(r rune) {
	if r == ' ' {
		return
	}
	if b.editActive() {
		b.entry.TypedRune(r)
	}
}

// editActive edits the active cell, or the current of its row where the cell takes nothing.
func (b *wireBody) editActive() bool {
	cell := b.list.active
	if !b.editable(cell) {
		cell.col = wireCurrent
	}
	if !b.editable(cell) {
		return false
	}
	b.list.active = cell
	b.edit(cell)
	return true
}

// TypedKey moves the active cell and edits it.
func (b *wireBody) TypedKey(key *fyne.KeyEvent) {
	b.stop()
	l := b.list
	page := max(1, int(l.scroll.Size().Height/max(1, l.layout.rowHeight))-1)
	switch key.Name {
	case fyne.KeyUp:
		b.walk(-1)
	case fyne.KeyDown:
		b.walk(1)
	case fyne.KeyPageUp:
		b.walk(-page)
	case fyne.KeyPageDown:
		b.walk(page)
	case fyne.KeyHome:
		b.walk(-len(l.rows))
	case fyne.KeyEnd:
		b.walk(len(l.rows))
	case fyne.KeyLeft:
		b.sidle(-1)
	case fyne.KeyRight:
		b.sidle(1)
	case fyne.KeyF2, fyne.KeyReturn, fyne.KeyEnter:
		b.editActive()
	case fyne.KeyEscape:
		l.desk.Select()
	case fyne.KeyDelete, fyne.KeyBackspace:
		l.desk.DeleteSelection()
	}
}

// walk moves the active cell by rows; Shift extends the selection.
func (b *wireBody) walk(by int) {
	l := b.list
	if len(l.rows) == 0 {
		return
	}
	i := l.row(l.active.id)
	if i < 0 {
		i = 0
	} else {
		i = min(max(0, i+by), len(l.rows)-1)
	}
	l.choose(i, false, keysHeld()&fyne.KeyModifierShift != 0)
	l.reveal(i)
}

// sidle moves the active cell by columns.
func (b *wireBody) sidle(by wireColumn) {
	l := b.list
	for c := l.active.col + by; c >= 0 && c < wireColumns; c += by {
		if l.layout.shown[c] {
			l.active.col = c
			break
		}
	}
	b.Refresh()
}

// isTop tells whether an id is one of the top level.
func isTop(id string) bool { return !strings.Contains(id, "/") }
