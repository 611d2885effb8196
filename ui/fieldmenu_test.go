package ui

import (
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"

	"packrise/solver/section"
)

// menuOf returns the menu that is open on the canvas.
func menuOf(t *testing.T, c fyne.Canvas) *fieldMenu {
	t.Helper()
	m, ok := c.Focused().(*fieldMenu)
	if !ok {
		t.Fatalf("the keyboard is in %T", c.Focused())
	}
	return m
}

func TestMenuChoosesFromTheCatalogue(t *testing.T) {
	b := newBench(t, benchDesign)
	d := NewDetails(b.Desk)
	c := b.show(d, 420, 700)
	b.Select("L1")
	e := d.known["size"].entry
	c.Focus(e)
	test.Tap(e.ActionItem.(fyne.Tappable))
	m := menuOf(t, c)
	if m.choices[m.over] != "8 AWG" {
		t.Errorf("the menu opens at %q", m.choices[m.over])
	}
	if at := float32(m.over)*m.rowHeight() - m.scroll.Offset.Y; at < 0 || at > m.scroll.Size().Height-m.rowHeight() {
		t.Errorf("what stands there is out of sight, at %v of %v", at, m.scroll.Size().Height)
	}
	m.TypedRune('1')
	m.TypedRune('2')
	if m.choices[m.over] != "12 AWG" {
		t.Errorf("typing 12 marks %q", m.choices[m.over])
	}
	m.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	b.wait()
	if p := section.Find(b.Document(), "L1"); p.Stock != "thhn-12" {
		t.Errorf("chosen: %q", p.Stock)
	}
	if len(c.Overlays().List()) != 0 {
		t.Error("the menu stays open")
	}
	c.Focus(e)
	e.TypedKey(&fyne.KeyEvent{Name: fyne.KeyDown})
	m = menuOf(t, c)
	was := b.Document()
	m.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	if b.Document() != was || len(c.Overlays().List()) != 0 {
		t.Error("Escape closes the menu and chooses nothing")
	}
	e.TypedKey(&fyne.KeyEvent{Name: fyne.KeyDown})
	m = menuOf(t, c)
	test.TapAt(m, fyne.NewPos(5, 2.5*m.rowHeight()))
	if got := sizeText(b.Catalog(), *section.Find(b.Document(), "L1")); got != m.choices[2] {
		t.Errorf("a click on the third row chooses %q", got)
	}
}

// A menu never reaches beyond the window.
func TestMenuStaysInTheWindow(t *testing.T) {
	b := newBench(t, benchDesign)
	d := NewDetails(b.Desk)
	c := b.show(d, 420, 420)
	b.Select("L1")
	for _, key := range []string{"circuit", "size", "type", "material0", "role"} {
		e := d.known[key].entry
		c.Focus(e)
		e.drop()
		m := menuOf(t, c)
		if top, low := m.popup.Content.Position().Y, m.popup.Content.Position().Y+m.popup.Content.Size().Height; top < 0 || low > 420 {
			t.Errorf("the menu of %s reaches from %v to %v of 420", key, top, low)
		}
		m.close()
	}
}
