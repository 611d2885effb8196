package ui

import (
	"slices"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"packrise/solver/section"
)

func TestNudge(t *testing.T) {
	h, v := testView(t)
	now := time.Unix(1000, 0)
	v.keys.clock = func() time.Time { return now }
	h.k.Select("L1")
	h.key(fyne.KeyRight)
	h.key(fyne.KeyUp)
	v.KeyDown(&fyne.KeyEvent{Name: desktop.KeyShiftLeft})
	h.key(fyne.KeyLeft)
	v.KeyUp(&fyne.KeyEvent{Name: desktop.KeyShiftLeft})
	h.key(fyne.KeyDown)
	near(t, "after the run", at(t, h.k, "L1"), section.Point{X: -4.9, Y: 0}, 1e-9)
	now = now.Add(2 * nudgeRun)
	h.key(fyne.KeyRight)
	h.k.Undo()
	near(t, "after one undo", at(t, h.k, "L1"), section.Point{X: -4.9, Y: 0}, 1e-9)
	h.k.Undo()
	if at(t, h.k, "L1").X != -4 || h.k.UndoName() != "" {
		t.Error("a run of nudges must be one step")
	}
}

func TestNudgeStopsAtTheWall(t *testing.T) {
	h, _ := testView(t)
	h.k.Select("F1") // radius 1.5 at (0, −5) in a jacket of 10 mm inside radius
	for range 60 {
		h.key(fyne.KeyDown)
	}
	if p := at(t, h.k, "F1"); p.Y < -8.5 || p.Y > -8.5+nudgeStep {
		t.Errorf("F1 stopped at %v, the wall is at −8.5", p)
	}
}

func TestDeleteAndTab(t *testing.T) {
	h, v := testView(t)
	for _, want := range []string{"L1", "L2", "L3"} {
		h.key(fyne.KeyTab)
		if !slices.Equal(h.k.Selection(), []string{want}) {
			t.Fatalf("Tab selected %v, want %s", h.k.Selection(), want)
		}
	}
	v.KeyDown(&fyne.KeyEvent{Name: desktop.KeyShiftRight})
	h.key(fyne.KeyTab)
	v.KeyUp(&fyne.KeyEvent{Name: desktop.KeyShiftRight})
	if !slices.Equal(h.k.Selection(), []string{"L2"}) {
		t.Errorf("Shift+Tab selected %v", h.k.Selection())
	}
	h.key(fyne.KeyDelete)
	if section.Find(h.k.Document(), "L2") != nil || h.k.UndoName() != "delete L2" {
		t.Errorf("undo %q", h.k.UndoName())
	}
	h.l.solved(t, h.k)
}
