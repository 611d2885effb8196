package ui

import (
	"reflect"
	"testing"
	"time"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

func TestDragIsOneStep(t *testing.T) {
	k, _, _ := slowDesk(t)
	g := k.NewGesture()
	for i := range 5 {
		k.Apply(moveTo("L1", -4-0.1*float64(i+1), 0, g), true)
		if !k.Drafting() || k.UndoName() != "" {
			t.Fatal("a draft entered the history")
		}
	}
	k.Apply(moveTo("L1", -4.5, 0, g), false)
	if k.UndoName() != "move L1" || k.Drafting() {
		t.Fatalf("undo is called %q", k.UndoName())
	}
	k.Undo()
	if got := at(t, k, "L1"); got.X != -4 || k.UndoName() != "" {
		t.Errorf("one undo leaves L1 at %v and %q to undo", got, k.UndoName())
	}
}

func TestTwoDragsAreTwoSteps(t *testing.T) {
	k, _, _ := slowDesk(t)
	for i := range 2 {
		g := k.NewGesture()
		k.Apply(moveTo("L1", -5-float64(i), 0, g), true)
		k.Apply(moveTo("L1", -5-float64(i), 0, g), false)
	}
	k.Undo()
	if got := at(t, k, "L1"); got.X != -5 {
		t.Errorf("after one undo of two drags L1 at %v, want −5", got)
	}
}

func TestCancelledDraftLeavesNoTrace(t *testing.T) {
	k, _, _ := slowDesk(t)
	k.Apply(moveTo("L2", 5, 0, k.NewGesture()), false)
	k.Undo()
	k.Apply(moveTo("L1", -6, 0, k.NewGesture()), true)
	if !k.Dirty() {
		t.Error("a drag under way isn't dirty")
	}
	k.CancelDraft()
	if got := at(t, k, "L1"); got.X != -4 || k.Dirty() {
		t.Errorf("L1 at %v, dirty %v", got, k.Dirty())
	}
	if k.RedoName() != "move L2" {
		t.Errorf("a cancelled drag took the redo away: %q", k.RedoName())
	}
}

func TestUndoWithinADragCancelsIt(t *testing.T) {
	k, _, _ := slowDesk(t)
	k.Apply(moveTo("L2", 5, 0, k.NewGesture()), false)
	k.Apply(moveTo("L1", -6, 0, k.NewGesture()), true)
	k.Undo()
	if at(t, k, "L1").X != -4 || at(t, k, "L2").X != 5 {
		t.Error("undo within a drag must cancel the drag and nothing else")
	}
}

func TestAnotherEditEndsADraft(t *testing.T) {
	k, _, _ := slowDesk(t)
	k.Apply(moveTo("L1", -6, 0, k.NewGesture()), true)
	k.Apply(moveTo("L2", 6, 0, 0), false)
	k.Undo()
	if at(t, k, "L1").X != -6 || at(t, k, "L2").X != 4 || k.UndoName() != "move L1" {
		t.Errorf("L1 %v, L2 %v, undo %q", at(t, k, "L1"), at(t, k, "L2"), k.UndoName())
	}
}

func TestDragShowsFramesThatFinish(t *testing.T) {
	k, l, f := slowDesk(t)
	<-f.started
	answerOne(t, k, l, f)
	g := k.NewGesture()
	k.Apply(moveTo("L1", -4.1, 0, g), true)
	<-f.started
	k.Apply(moveTo("L1", -4.2, 0, g), true) // waits: the running draft finishes
	k.Apply(moveTo("L1", -4.3, 0, g), true)
	answerOne(t, k, l, f)
	r, fresh := k.Result()
	if !fresh || !k.Draft() || r.Shapes[1].At.X != -4.1 {
		t.Fatalf("the frame that finished isn't shown with its own section: fresh %v, %v", fresh, r.Shapes[1].At)
	}
	if d := <-f.started; section.Find(d, "L1").At.V.X != -4.3 {
		t.Error("a frame in between was solved")
	}
	k.Apply(moveTo("L1", -4.4, 0, g), false) // release interrupts and solves in full
	<-f.started
	if _, fresh := k.Result(); fresh {
		t.Error("a draft counts as fresh after the release")
	}
	answerOne(t, k, l, f)
	if k.Draft() {
		t.Error("the last answer is a draft")
	}
	want := []rating.Options{{}, {Accuracy: heat.Draft}, {Accuracy: heat.Draft}, {}}
	if !reflect.DeepEqual(f.seen, want) {
		t.Errorf("asked for %v, want %v", f.seen, want)
	}
}

func TestFramesBringTheirDocument(t *testing.T) {
	k, l, f := slowDesk(t)
	<-f.started
	answerOne(t, k, l, f)
	g, h := k.NewGesture(), listenTo(k)
	k.Drag(moveTo("L1", -5, 0, g))
	if at(t, k, "L1").X != -4 || !k.Drafting() || !k.Dirty() || h.told()&ChangedDocument != 0 {
		t.Error("the document must wait for the frame")
	}
	<-f.started
	k.Drag(moveTo("L1", -5.5, 0, g))
	k.Drag(moveTo("L1", -6, 0, g))
	answerOne(t, k, l, f)
	r, fresh := k.Result()
	if !fresh || at(t, k, "L1").X != -5 || r.Shapes[1].At.X != -5 || h.told()&ChangedDocument == 0 {
		t.Errorf("fresh %v, L1 at %v, shown at %v", fresh, at(t, k, "L1"), r.Shapes[1].At)
	}
	<-f.started // the newest; the one in between was dropped
	k.Drop(moveTo("L1", -6, 0, g))
	l.until(t, "the drop", func() bool { return !k.Drafting() })
	<-f.started
	answerOne(t, k, l, f)
	if at(t, k, "L1").X != -6 || k.UndoName() != "move L1" || k.Draft() {
		t.Errorf("L1 at %v, undo %q, draft %v", at(t, k, "L1"), k.UndoName(), k.Draft())
	}
	k.Undo()
	if at(t, k, "L1").X != -4 || k.UndoName() != "" {
		t.Error("a drag must be one step")
	}
}

func TestDragCancelledBeforeItsFrame(t *testing.T) {
	k, l, f := slowDesk(t)
	<-f.started
	answerOne(t, k, l, f)
	k.Drag(moveTo("L1", -5, 0, k.NewGesture()))
	<-f.started
	k.CancelDraft()
	<-f.started
	l.run()
	if at(t, k, "L1").X != -4 || k.Dirty() {
		t.Error("a frame came after the drag was cancelled")
	}
	answerOne(t, k, l, f)
	k.Drag(moveTo("L1", -5, 0, k.NewGesture()))
	k.Drop(moveTo("L1", -5, 0, k.gesture))
	k.Apply(moveTo("L2", 5, 0, 0), false) // before the drop has come
	l.pass(time.Second)
	if at(t, k, "L2").X != 5 || k.UndoName() != "move L2" {
		t.Errorf("undo %q", k.UndoName())
	}
}

func TestReleaseWithoutAMoveStillSolvesInFull(t *testing.T) {
	k, l, f := slowDesk(t)
	<-f.started
	answerOne(t, k, l, f)
	g := k.NewGesture()
	k.Apply(moveTo("L1", -5, 0, g), true)
	<-f.started
	answerOne(t, k, l, f)
	k.Apply(moveTo("L1", -4, 0, g), false) // back where it was
	<-f.started
	answerOne(t, k, l, f)
	if _, fresh := k.Result(); !fresh || k.Draft() || k.UndoName() != "" || k.Dirty() {
		t.Errorf("fresh %v, draft %v, undo %q", fresh, k.Draft(), k.UndoName())
	}
}
