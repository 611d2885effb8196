package ui

import (
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/test"

	"packrise/solver/section"
)

func TestHolderDialogEdits(t *testing.T) {
	w, l := testWindow(t, testDesign(), usualSize)
	enter := func(key, text string) {
		t.Helper()
		for _, o := range test.LaidOutObjects(w.win.Canvas().Overlays().Top()) {
			if f, ok := o.(*fieldEntry); ok && f.in.key == key {
				f.SetText(text)
				f.OnSubmitted(text)
				return
			}
		}
		t.Fatalf("no field %q", key)
	}
	w.showHolder()
	enter("inside", "1 in")
	if got := w.desk.Document().Holder.InsideMM; got != section.Some(25.4) {
		t.Errorf("inside %v", got)
	}
	enter("kind", "wireway")
	h := w.desk.Document().Holder
	if h.Kind != section.Wireway || h.WidthMM != section.Some(25.4) || at(t, w.desk, "L1").X != -4+12.7 {
		t.Errorf("%+v, L1 at %v", h, at(t, w.desk, "L1"))
	}
	enter("kind", "nonsense")
	if w.desk.Document().Holder.Kind != section.Wireway {
		t.Error("nonsense changed the holder")
	}
	enter("kind", "jacket")
	l.solved(t, w.desk)
	w.hide()
	w.desk.Undo()
	w.desk.Undo()
	w.desk.Undo()
	if w.desk.Dirty() {
		t.Error("three undos must bring the design back")
	}
	w.showSurroundings()
	enter("ambient", "104F")
	if got := w.desk.Document().Surroundings.AmbientC.V; got < 39.99 || got > 40.01 {
		t.Errorf("ambient %g °C", got)
	}
	enter("surroundings", "surface held")
	if s := w.desk.Document().Surroundings; s.Kind != section.FixedWall || s.FilmWM2K.OK {
		t.Errorf("%+v", s)
	}
	l.solved(t, w.desk)
}

// TestDialogKeepsTheEntryInSight: in a small window the entry with the focus, and what it says, can be seen, and it tells what it takes.
func TestDialogKeepsTheEntryInSight(t *testing.T) {
	w, _ := testWindow(t, inWireway(), fyne.NewSize(1024, 640))
	w.showHolder()
	objects := test.LaidOutObjects(w.win.Canvas().Overlays().Top())
	var scroll *container.Scroll
	var entries []*fieldEntry
	for _, o := range objects {
		switch o := o.(type) {
		case *container.Scroll:
			if _, ok := o.Content.(*fyne.Container); ok {
				scroll = o
			}
		case *fieldEntry:
			entries = append(entries, o)
		}
	}
	if scroll == nil || len(entries) < 12 {
		t.Fatalf("%d entries", len(entries))
	}
	driver := fyne.CurrentApp().Driver()
	for _, e := range entries {
		w.win.Canvas().Focus(e)
		e.SetText("nonsense that nothing takes")
		e.OnSubmitted(e.Text)
		top := driver.AbsolutePositionForObject(e).Y
		from := driver.AbsolutePositionForObject(scroll).Y
		if low := top + e.Size().Height; top < from || low > from+scroll.Size().Height {
			t.Errorf("%s lies from %g to %g, in sight is %g to %g", e.in.key, top, low, from, from+scroll.Size().Height)
		}
	}
}
