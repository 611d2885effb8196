package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
)

// Sizes within the list.
const (
	wireEdge     = 14 // left and right of the columns
	wireGap      = 14 // least space between two columns
	wireGapMost  = 44 // most
	wireBarLeast = 48 // of the margin's bar
	wireBarMost  = 96
	wireBarSpace = 10  // between the margin's number and its bar
	wireWordMost = 240 // of a column of words; more is elided, with the whole on hover
	wireRowSpace = 8   // above and below a row's text together
)

// wireLayout is where the columns stand.
type wireLayout struct {
	rowHeight, headHeight float32
	textSize, small       float32
	at, wide              [wireColumns]float32
	bar, barWide          float32 // left edge and width of the margin's bar
	shown                 [wireColumns]bool
	width                 float32 // of all columns
}

// measureWires gives every column the room that its header and cells need and shares out what is left.
func measureWires(l *WireList) wireLayout {
	th := theme.CurrentForWidget(l)
	m := wireLayout{textSize: th.Size(theme.SizeNameText), small: smallText(l)()}
	m.rowHeight = textExtent("Mg", m.textSize, fyne.TextStyle{}).Height + wireRowSpace
	m.headHeight = m.rowHeight + 2
	sum, n := float32(2*wireEdge), 0
	for c := range wireColumns {
		m.shown[c] = l.shows(c)
		if !m.shown[c] {
			continue
		}
		m.wide[c] = l.columnWidth(c, m)
		sum += m.wide[c]
		n++
	}
	spare := l.Size().Width - sum - wireGap*float32(n-1)
	m.barWide = min(max(wireBarLeast+spare, wireBarLeast), wireBarMost)
	m.wide[wireMargin] += m.barWide - wireBarLeast
	gap := wireGap + (spare-m.barWide+wireBarLeast)/float32(max(n-1, 1))
	gap = min(max(gap, wireGap), wireGapMost)
	x := float32(wireEdge)
	for c := range wireColumns {
		if !m.shown[c] {
			continue
		}
		m.at[c] = x
		if c == wireRemark {
			m.wide[c] = max(m.wide[c], l.Size().Width-wireEdge-x)
		}
		x += m.wide[c] + gap
	}
	m.bar = m.at[wireMargin] + m.wide[wireMargin] - m.barWide
	m.width = x - gap + wireEdge
	if room := l.Size().Width; m.width < room+1 { // no scroll bar for a rounding
		m.width = min(m.width, room)
	}
	return m
}

// shows tells whether a column has anything to show: there are no empty columns.
func (l *WireList) shows(c wireColumn) bool {
	return c != wireCircuit || len(l.desk.Document().Loads) > 0
}

// columnWidth is the width of the widest cell. Numbers get room for three figures in any case, so that columns stand still while numbers change.
func (l *WireList) columnWidth(c wireColumn, m wireLayout) float32 {
	w := textExtent(wireHeads[c].name, m.textSize, fyne.TextStyle{Bold: true}).Width
	if u := wireHeads[c].unit; u != "" {
		w += textExtent(" "+u, m.textSize, fyne.TextStyle{}).Width
	}
	w += wireArrow
	if c.number() {
		w = max(w, textExtent("≥ 888.8", m.textSize, fyne.TextStyle{}).Width)
	}
	seen := map[string]bool{}
	for i := range l.rows {
		t := c.text(&l.rows[i])
		if c == wireTemp || c == wireMargin || seen[t] {
			continue
		}
		seen[t] = true
		w = max(w, textExtent(t, m.textSize, fyne.TextStyle{}).Width)
	}
	if !c.number() {
		w = min(w, wireWordMost)
	}
	if c == wireMargin {
		w += wireBarSpace + wireBarLeast
	}
	return w
}

// column returns the column at x, −1 if none.
func (m wireLayout) column(x float32) wireColumn {
	found := wireColumn(-1)
	for c := range wireColumns {
		if m.shown[c] && x >= m.at[c]-wireGap/2 {
			found = c
		}
	}
	return found
}

// numberEdge is the right edge of a column's numbers.
func (m wireLayout) numberEdge(c wireColumn) float32 {
	if c == wireMargin {
		return m.bar - wireBarSpace
	}
	return m.at[c] + m.wide[c]
}
