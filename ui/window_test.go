package ui

import (
	"runtime"
	"strings"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/test"
	"fyne.io/fyne/v2/widget"

	"packrise/solver/section"
)

// testWindow is the program's window on a design, solved, at a size.
func testWindow(t *testing.T, d *section.Document, size fyne.Size) (*Window, *loop) {
	t.Helper()
	l := newLoop()
	w := NewWindow(test.NewTempApp(t), Options{Catalog: testCatalog(), Document: d, Version: "test", Rooms: l.rooms(Rooms{})})
	w.win.Resize(size)
	t.Cleanup(w.Close)
	l.solved(t, w.desk)
	return w, l
}

var usualSize = fyne.NewSize(1200, 800)

// texts collects what a tree of objects says.
func texts(o fyne.CanvasObject) string {
	var s strings.Builder
	for _, x := range test.LaidOutObjects(o) {
		switch x := x.(type) {
		case *widget.Label:
			s.WriteString(x.Text + "\n")
		case *widget.Button:
			s.WriteString("[" + x.Text + "]\n")
		}
	}
	return s.String()
}

// dialogText is what the open dialog says, "" for none.
func dialogText(w *Window) string {
	if o := w.win.Canvas().Overlays().Top(); o != nil {
		return texts(o)
	}
	return ""
}

// answer presses a button of the open dialog.
func answerDialog(t *testing.T, w *Window, label string) {
	t.Helper()
	for _, o := range test.LaidOutObjects(w.win.Canvas().Overlays().Top()) {
		if b, ok := o.(*widget.Button); ok && b.Text == label {
			test.Tap(b)
			return
		}
	}
	t.Fatalf("no button %q in %q", label, dialogText(w))
}

func TestUndoOfATextFieldIsItsOwn(t *testing.T) {
	w, _ := testWindow(t, testDesign(), usualSize)
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	e := &pathEntry{escaped: func() {}}
	e.ExtendBaseWidget(e)
	w.win.SetContent(container.NewStack(e))
	w.win.Canvas().Focus(e)
	test.Type(e, "word")
	w.undo()
	if e.Text != "" || w.desk.UndoName() != "move L1" {
		t.Errorf("the field says %q, undo %q", e.Text, w.desk.UndoName())
	}
}

func TestNewDesignIsSound(t *testing.T) {
	w, l := testWindow(t, testDesign(), usualSize)
	w.newDesign()
	if len(w.desk.Document().Parts) != 0 || w.desk.Dirty() {
		t.Error("a new design is empty and unchanged")
	}
	for _, p := range w.desk.Problems() {
		if p.Rule != "empty" {
			t.Errorf("a new design has a problem: %v", p)
		}
	}
	data, err := section.Write(w.desk.Document())
	if err != nil {
		t.Fatal(err)
	}
	if d, problems := section.Read(data); d == nil {
		t.Errorf("a new design can't be read back: %v", problems)
	}
	l.until(t, "an answer", func() bool { return !w.desk.Solving() })
	if s, _, _ := w.desk.Sentence(); s != "Nothing in the section yet." {
		t.Errorf("it says %q", s)
	}
}

func TestWindowLeavesNoGoroutines(t *testing.T) {
	app := test.NewTempApp(t)
	before := runtime.NumGoroutine()
	l := newLoop()
	w := NewWindow(app, Options{Catalog: testCatalog(), Document: testDesign(), Rooms: l.rooms(Rooms{})})
	w.win.Resize(usualSize)
	l.solved(t, w.desk)
	w.quit()
	w.Close()
	l.pass(time.Hour) // what still comes falls on deaf ears
	for range 200 {
		if runtime.NumGoroutine() <= before {
			return
		}
		time.Sleep(10 * time.Millisecond)
	}
	stacks := make([]byte, 1<<16)
	t.Errorf("%d goroutines, %d before:\n%s", runtime.NumGoroutine(), before, stacks[:runtime.Stack(stacks, true)])
}
