package ui

import (
	"slices"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"
)

// rungOf returns the middle of the rung on which a part stands.
func rungOf(t *testing.T, l *Ladder, id string) fyne.Position {
	t.Helper()
	for _, r := range l.rungs {
		if slices.Contains(r.IDs, id) {
			return fyne.NewPos(100, float32(r.Y0+r.Y1)/2/l.scale)
		}
	}
	t.Fatalf("%s stands on no rung of %v", id, l.rungs)
	return fyne.Position{}
}

func TestLadderPointsAndSelects(t *testing.T) {
	b := newSolvingBench(t, benchDesign)
	l := NewLadder(b.Desk)
	c := b.show(l, 200, 480)
	for _, scale := range []float32{1, 2} {
		c.SetScale(scale)
		l.Refresh()
		c.Capture()
		if l.scale != scale {
			t.Errorf("painted at scale %v, want %v", l.scale, scale)
		}
		at := rungOf(t, l, "L2")
		l.MouseMoved(&desktop.MouseEvent{PointEvent: fyne.PointEvent{Position: at}})
		if b.Pointed() != "L2" || l.Cursor() != desktop.PointerCursor {
			t.Errorf("pointing at L2's rung lights up %q", b.Pointed())
		}
		c.Capture()
		test.TapAt(l, rungOf(t, l, "L10"))
		if got := b.Selection(); !slices.Equal(got, []string{"L10"}) {
			t.Errorf("a click on L10's rung selects %v", got)
		}
		l.MouseOut()
		if b.Pointed() != "" {
			t.Errorf("%q stays lit up", b.Pointed())
		}
	}
	top, bottom := rungOf(t, l, "L1").Y, rungOf(t, l, "N1").Y
	if top >= bottom {
		t.Errorf("the hotter L1 stands at %v, below N1 at %v", top, bottom)
	}
}

func TestLadderRepaintsOnlyWhatChanged(t *testing.T) {
	b := newSolvingBench(t, benchDesign)
	l := NewLadder(b.Desk)
	b.show(l, 200, 480).Capture()
	was := l.image
	if got := l.draw(200, 480); got != was {
		t.Error("the same ladder is painted twice")
	}
	if err := enter(b, inputOf(b, "current", "L1"), "20"); err != nil {
		t.Fatal(err)
	}
	b.wait()
	if got := l.draw(200, 480); got == was {
		t.Error("a new answer does not reach the ladder")
	}
	was = l.image
	fyne.CurrentApp().Settings().SetTheme(NewTheme(LookDark))
	t.Cleanup(func() { fyne.CurrentApp().Settings().SetTheme(NewTheme(LookLight)) })
	if got := l.draw(200, 480); got == was {
		t.Error("a dark theme does not reach the ladder")
	}
}

// Folded rungs select all that stand on them.
func TestLadderSelectsFoldedParts(t *testing.T) {
	b := newSolvingBench(t, manyWires(40))
	l := NewLadder(b.Desk)
	b.show(l, 200, 300).Capture()
	for _, r := range l.rungs {
		if len(r.IDs) > 5 {
			test.TapAt(l, fyne.NewPos(100, float32(r.Y0+r.Y1)/2/l.scale))
			if got := len(b.Selection()); got < 5 {
				t.Errorf("%d of %d are selected", got, len(r.IDs))
			}
			return
		}
	}
	t.Error("40 equal wires are not folded")
}

func BenchmarkLadder200(b *testing.B) {
	k := newSolvingBench(b, manyWires(200))
	l := NewLadder(k.Desk)
	k.show(l, 200, 480)
	for b.Loop() {
		l.image = nil
		l.draw(200, 480)
	}
}
