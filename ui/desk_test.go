package ui

import (
	"runtime"
	"slices"
	"testing"
	"time"
)

// slowDesk is a desk whose solver waits for the test.
func slowDesk(t *testing.T) (*Desk, *loop, *fakeSolver) {
	t.Helper()
	f := newFakeSolver()
	k, l := testDeskWith(t, testDesign(), Rooms{Solve: f.solve, Outline: fakeOutline})
	return k, l, f
}

// answerOne lets the running job finish and waits until it has come to the desk.
func answerOne(t *testing.T, k *Desk, l *loop, f *fakeSolver) {
	t.Helper()
	before := k.answer.rev
	f.finish <- struct{}{}
	l.until(t, "an answer", func() bool { return k.answer.rev != before })
}

func TestApplyAndUndo(t *testing.T) {
	k, _, _ := slowDesk(t)
	h := listenTo(k)
	k.Apply(moveTo("L1", -5, 0, 0), false)
	if got := at(t, k, "L1"); got.X != -5 {
		t.Errorf("L1 at %v", got)
	}
	if told := h.told(); told&ChangedDocument == 0 {
		t.Error("nobody was told of another document")
	}
	if k.UndoName() != "move L1" || !k.Dirty() {
		t.Errorf("undo is called %q, dirty %v", k.UndoName(), k.Dirty())
	}
	k.Undo()
	if got := at(t, k, "L1"); got.X != -4 || k.Dirty() || k.RedoName() != "move L1" {
		t.Errorf("after undo L1 at %v, dirty %v, redo %q", got, k.Dirty(), k.RedoName())
	}
	k.Redo()
	if got := at(t, k, "L1"); got.X != -5 {
		t.Errorf("after redo L1 at %v", got)
	}
	k.Redo() // at the end: nothing
	k.Undo()
	k.Undo() // at the beginning: nothing
	if got := at(t, k, "L1"); got.X != -4 {
		t.Errorf("L1 at %v", got)
	}
}

func TestNothingChangedIsNoStep(t *testing.T) {
	k, _, _ := slowDesk(t)
	h := listenTo(k)
	k.Apply(moveTo("L1", -4, 0, 0), false)
	if k.UndoName() != "" || h.told() != 0 {
		t.Error("an edit that changes nothing made a step")
	}
}

func TestSelectionFollowsTheDocument(t *testing.T) {
	k, _, _ := slowDesk(t)
	k.Select("L1", "nobody", "L2", "L1")
	if !slices.Equal(k.Selection(), []string{"L1", "L2"}) {
		t.Errorf("selected %v", k.Selection())
	}
	k.Point("L1")
	h := listenTo(k)
	k.Select("L1", "L2")
	k.Point("L1")
	if h.told() != 0 {
		t.Error("told of the same selection")
	}
	k.Select("L1")
	k.DeleteSelection()
	if len(k.Selection()) != 0 || k.Pointed() != "" || h.told()&ChangedSelection == 0 {
		t.Errorf("selected %v, pointed at %q after the part is gone", k.Selection(), k.Pointed())
	}
	if k.UndoName() != "delete L1" {
		t.Errorf("undo is called %q", k.UndoName())
	}
}

func TestClosedDeskIsSilent(t *testing.T) {
	before := runtime.NumGoroutine()
	f := newFakeSolver()
	l := newLoop()
	k := NewDeskWith(testCatalog(), testDesign(), l.rooms(Rooms{Solve: f.solve, Outline: fakeOutline}))
	h := listenTo(k)
	<-f.started
	k.Close()
	k.Close()
	l.pass(time.Hour)
	if h.told() != 0 {
		t.Error("a closed desk tells")
	}
	if after := runtime.NumGoroutine(); after > before {
		t.Errorf("%d goroutines, %d before", after, before)
	}
}
