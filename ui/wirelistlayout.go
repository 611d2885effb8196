package ui

import (
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
)

// Sizes within the list.
const (
	wireEdge     = 14 // left and right of the columns
	wireGap      = 14 // least space between two columns
	wireGapTight = 7  // where there is little room
	wireGapMost  = 44 // most

	wireRemarkOff = 8  // more before the remarks, whose words begin where numbers end
	wireBarLeast  = 48 // of the margin's bar
	wireBarMost   = 96
	wireBarSpace  = 10  // between the margin's number and its bar
	wireWordMost  = 240 // of a column of words; more is elided, with the whole on hover
	wireRowSpace  = 8   // above and below a row's text together
)

// wireLayout is where the columns stand.
type wireLayout struct {
	rowHeight, headHeight float32
	textSize, small       float32
	at, wide              [wireColumns]float32
	bar, barWide          float32 // left edge and width of the margin's bar
	shown                 [wireColumns]bool
	width                 float32 // of all columns
	tight                 bool    // little room: short headers, narrow gaps
}

// head is the header of a column.
func (m wireLayout) head(c wireColumn) string {
	if m.tight && wireShort[c] != "" {
		return wireShort[c]
	}
	return wireHeads[c].name
}

// gap is the least space between two columns.
func (m wireLayout) gap() float32 {
	if m.tight {
		return wireGapTight
	}
	return wireGap
}

// measureWires gives every column the room that its header and cells need and shares out what is left.
func measureWires(l *WireList) wireLayout {
	m := measureColumns(l, false)
	if m.width > l.Size().Width+1 {
		m = measureColumns(l, true)
	}
	return m
}

func measureColumns(l *WireList, tight bool) wireLayout {
	th := theme.CurrentForWidget(l)
	m := wireLayout{textSize: th.Size(theme.SizeNameText), small: smallText(l)(), tight: tight}
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
		if c == wireRemark {
			sum += wireRemarkOff
		}
		n++
	}
	if tight {
		sum -= m.squeeze(sum + m.gap()*float32(n-1) - l.Size().Width)
	}
	spare := l.Size().Width - sum - m.gap()*float32(n-1)
	m.barWide = min(max(wireBarLeast+spare, wireBarLeast), wireBarMost)
	m.wide[wireMargin] += m.barWide - wireBarLeast
	gap := m.gap() + (spare-m.barWide+wireBarLeast)/float32(max(n-1, 1))
	gap = min(max(gap, m.gap()), wireGapMost)
	x := float32(wireEdge)
	for c := range wireColumns {
		if !m.shown[c] {
			continue
		}
		if c == wireRemark {
			x += wireRemarkOff
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

// squeeze takes room from the columns of words where all together are too wide; what no longer fits is elided, with the whole on hover.
func (m *wireLayout) squeeze(excess float32) (taken float32) {
	for _, c := range []struct {
		column wireColumn
		least  float32
	}{{wireRemark, 90}, {wireSizeType, 96}, {wireCircuit, 64}} {
		if by := min(excess-taken, m.wide[c.column]-c.least); m.shown[c.column] && by > 0 {
			m.wide[c.column] -= by
			taken += by
		}
	}
	return taken
}

// shows tells whether a column has anything to show: there are no empty columns.
func (l *WireList) shows(c wireColumn) bool {
	switch c {
	case wireCircuit:
		return len(l.desk.Document().Loads) > 0
	case wireBand:
		return l.known(func(r *wireRow) bool { return r.band != "" })
	case wireRely, wireNominal:
		return l.known(func(r *wireRow) bool { return !math.IsNaN(r.rely) })
	case wireLowest:
		return l.known(func(r *wireRow) bool { return !math.IsNaN(r.lowest) })
	}
	return true
}

// known tells whether anything is known of a row.
func (l *WireList) known(of func(*wireRow) bool) bool {
	for i := range l.rows {
		if of(&l.rows[i]) {
			return true
		}
	}
	return false
}

// columnWidth is the width of the widest cell. Numbers get room for three figures in any case, so that columns stand still while numbers change.
func (l *WireList) columnWidth(c wireColumn, m wireLayout) float32 {
	w := textExtent(m.head(c), m.textSize, fyne.TextStyle{Bold: true}).Width
	if u := wireHeads[c].unit; u != "" {
		w += textExtent(" "+u, m.textSize, fyne.TextStyle{}).Width
	}
	w += wireArrow
	if c.number() {
		least := "≥ 888.8"
		switch {
		case m.tight && c != wireBand:
			least = "888.8"
		case c == wireBand:
			least = "888–888"
		case c.rated():
			least = "88.8"
		}
		w = max(w, textExtent(least, m.textSize, fyne.TextStyle{}).Width)
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
		if m.shown[c] && x >= m.at[c]-m.gap()/2 {
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
