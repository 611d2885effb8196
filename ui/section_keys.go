package ui

import (
	"slices"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"packrise/solver/section"
)

// keyState is what the keyboard is doing, and when the last click was.
type keyState struct {
	space, shift bool
	clickedID    string
	clickedAt    time.Time

	nudge   int // gesture of the run of nudges under way
	nudged  time.Time
	nudgeOf string

	clock func() time.Time // nil: the real one
}

func (k *keyState) now() time.Time {
	if k.clock != nil {
		return k.clock()
	}
	return time.Now()
}

const (
	nudgeStep = 0.1 // mm
	nudgeWide = 1.0 // mm, with Shift
	nudgeRun  = time.Second
)

// takeFocus gives the keyboard to the canvas.
func (v *SectionView) takeFocus() {
	if c := fyne.CurrentApp().Driver().CanvasForObject(v); c != nil && !v.focused {
		c.Focus(v)
	}
}

// FocusGained is for the toolkit.
func (v *SectionView) FocusGained() { v.focused = true }

// FocusLost forgets keys whose release will not be seen.
func (v *SectionView) FocusLost() {
	v.focused = false
	v.keys.space, v.keys.shift = false, false
}

// TypedRune is for the toolkit.
func (v *SectionView) TypedRune(rune) {}

// AcceptsTab keeps Tab for going through the parts.
func (v *SectionView) AcceptsTab() bool { return true }

// KeyDown keeps the keys that change what the pointer does.
func (v *SectionView) KeyDown(e *fyne.KeyEvent) { v.key(e.Name, true) }

// KeyUp is the end of KeyDown.
func (v *SectionView) KeyUp(e *fyne.KeyEvent) { v.key(e.Name, false) }

func (v *SectionView) key(n fyne.KeyName, down bool) {
	switch n {
	case fyne.KeySpace:
		v.keys.space = down
	case desktop.KeyShiftLeft, desktop.KeyShiftRight:
		v.keys.shift = down
	}
}

// TypedKey is what the keyboard does to the section.
func (v *SectionView) TypedKey(e *fyne.KeyEvent) {
	switch e.Name {
	case fyne.KeyEscape:
		if !v.cancelDrag() {
			v.desk.Select()
		}
	case fyne.KeyDelete, fyne.KeyBackspace:
		v.desk.DeleteSelection()
	case fyne.KeyTab:
		v.cycle(v.shifted())
	case fyne.KeyLeft:
		v.nudge(-1, 0)
	case fyne.KeyRight:
		v.nudge(1, 0)
	case fyne.KeyUp:
		v.nudge(0, 1)
	case fyne.KeyDown:
		v.nudge(0, -1)
	case fyne.KeyReturn, fyne.KeyEnter, fyne.KeyF2:
		if s := v.desk.Selection(); len(s) > 0 && v.OnActivated != nil {
			v.OnActivated(s[len(s)-1])
		}
	case fyne.KeyPlus, fyne.KeyEqual:
		v.Zoom(zoomStep)
	case fyne.KeyMinus:
		v.Zoom(1 / zoomStep)
	case fyne.KeyHome:
		v.Fit()
	default:
		if v.OnKey != nil {
			v.OnKey(e)
		}
	}
}

const zoomStep = 1.25

// shifted tells whether Shift is down, from the keys seen or, after the focus came with Shift down, from the driver.
func (v *SectionView) shifted() bool {
	if d, ok := fyne.CurrentApp().Driver().(desktop.Driver); ok {
		return d.CurrentKeyModifiers()&fyne.KeyModifierShift != 0
	}
	return v.keys.shift
}

// cycle selects the next part; past the last one the keyboard goes on to the next pane.
func (v *SectionView) cycle(back bool) {
	var ids []string
	for _, s := range v.desk.shownShapes() {
		if s.ID != "" {
			ids = append(ids, s.ID)
		}
	}
	at := -1
	if chosen := v.desk.Selection(); len(chosen) > 0 {
		at = slices.Index(ids, chosen[len(chosen)-1])
	}
	next := at + 1
	if back {
		next = at - 1
		if at < 0 {
			next = len(ids) - 1
		}
	}
	if next >= 0 && next < len(ids) {
		v.desk.Select(ids[next])
		return
	}
	v.desk.Select()
	c := fyne.CurrentApp().Driver().CanvasForObject(v)
	switch {
	case c == nil:
	case back:
		c.FocusPrevious()
	default:
		c.FocusNext()
	}
}

// nudge shifts the selected parts by a step; a run of key presses is one step of the history. A single part slides along what it touches, several
// stop there.
func (v *SectionView) nudge(dx, dy float64) {
	if v.drag.mode == dragParts || len(v.desk.Selection()) == 0 {
		return
	}
	step := nudgeStep
	if v.shifted() {
		step = nudgeWide
	}
	shapes := v.desk.writtenShapes()
	parts, others := apart(shapes, topsOf(v.desk.Selection()))
	if len(parts) == 0 {
		return
	}
	in, by := roomOf(shapes), section.Point{X: dx * step, Y: dy * step}
	if len(parts) == 1 {
		p := parts[0]
		at, ok := nearestFree(disc{section.Point{X: p.At.X + by.X, Y: p.At.Y + by.Y}, p.InnerR()}, others, in)
		if !ok {
			return
		}
		by = section.Point{X: at.X - p.At.X, Y: at.Y - p.At.Y}
	} else {
		by = heldShift(discsOf(parts), others, in, section.Point{}, by)
	}
	if by.X*dx+by.Y*dy <= holdGap {
		return // against a neighbour or the wall
	}
	v.desk.Apply(moveBy(parts, by, v.nudgeGesture(objectOf(parts))), false)
}

// nudgeGesture is the same number for presses that follow each other closely.
func (v *SectionView) nudgeGesture(of string) int {
	now := v.keys.now()
	if v.keys.nudge == 0 || of != v.keys.nudgeOf || now.Sub(v.keys.nudged) > nudgeRun {
		v.keys.nudge, v.keys.nudgeOf = v.desk.NewGesture(), of
	}
	v.keys.nudged = now
	return v.keys.nudge
}

// apart splits the top level into the parts that move and the outlines of those that stay.
func apart(shapes []section.Shape, moving []string) (parts []section.Shape, others []disc) {
	for _, s := range shapes {
		switch {
		case s.ID == "" || s.Depth > 0:
		case slices.Contains(moving, s.ID):
			parts = append(parts, s)
		case !s.Unset:
			others = append(others, disc{s.At, s.InnerR()})
		}
	}
	return parts, others
}
