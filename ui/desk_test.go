package ui

import (
	"context"
	"errors"
	"runtime"
	"slices"
	"testing"
	"time"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
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

func TestStaleAnswersAreDropped(t *testing.T) {
	k, l, f := slowDesk(t)
	first := <-f.started
	k.Apply(moveTo("L1", -5, 0, 0), false) // interrupts the first
	second := <-f.started
	if first == second {
		t.Fatal("the same document was solved twice")
	}
	l.run()
	if r, _ := k.Result(); r != nil {
		t.Fatalf("an answer for the older document arrived: %v", r.Status)
	}
	answerOne(t, k, l, f)
	r, fresh := k.Result()
	if r == nil || !fresh || k.Solving() {
		t.Fatalf("no fresh answer: %v %v", r, fresh)
	}
}

func TestAnswerIsStaleAfterAWhile(t *testing.T) {
	k, l, f := slowDesk(t)
	<-f.started
	answerOne(t, k, l, f)
	k.Apply(moveTo("L1", -5, 0, 0), false)
	<-f.started
	if _, fresh := k.Result(); fresh {
		t.Error("the old answer is called fresh")
	}
	if k.Stale() {
		t.Error("grey at once: the picture would flicker")
	}
	h := listenTo(k)
	l.pass(staleAfter / 2)
	if k.Stale() {
		t.Error("grey too early")
	}
	l.pass(staleAfter)
	if !k.Stale() || h.told()&ChangedResult == 0 {
		t.Error("not grey, or nobody was told")
	}
	answerOne(t, k, l, f)
	if _, fresh := k.Result(); !fresh || k.Stale() {
		t.Error("still grey after the answer")
	}
	l.pass(time.Hour)
	if k.Stale() {
		t.Error("grey again without a change")
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
	if !slices.Equal(f.seen, want) {
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

func TestRefusalAndFailure(t *testing.T) {
	problem := section.Problem{Rule: "overlap", IDs: []string{"L1", "L2"}, What: "L1 and L2 overlap by 0.3 mm", Do: "move one of them"}
	var fail error
	solve := func(context.Context, *section.Document, rating.Options) (*rating.Result, []section.Problem, error) {
		return nil, []section.Problem{problem}, fail
	}
	outline := func(d *section.Document, _ *catalog.Catalog) ([]section.Shape, []section.Problem) {
		return fakeShapes(d), []section.Problem{problem}
	}
	k, l := testDeskWith(t, testDesign(), Rooms{Solve: solve, Outline: outline})
	l.until(t, "the refusal", func() bool { return !k.Solving() })
	answer, more, state := k.Sentence()
	if answer != "Not solved: L1 and L2 overlap by 0.3 mm." || more != "Move one of them." || state != Refusal {
		t.Errorf("%q, %q, %v", answer, more, state)
	}
	if s := k.Scene(); !slices.Equal(s.Bad, []string{"L1", "L2"}) || len(s.Readings) != 0 || s.Field != nil {
		t.Errorf("the scene of a refused section: %v, %d readings", s.Bad, len(s.Readings))
	}
	fail = errors.New("it broke")
	k.Apply(moveTo("L1", -5, 0, 0), false)
	l.until(t, "the failure", func() bool { return !k.Solving() })
	if k.Failure() == nil {
		t.Error("the failure is lost")
	}
	if answer, _, state := k.Sentence(); state != Refusal || answer != "The calculation failed: it broke." {
		t.Errorf("%q, %v", answer, state)
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

func TestDuplicate(t *testing.T) {
	k, _, _ := slowDesk(t)
	k.Select("L1", "F1")
	k.DuplicateSelection()
	d := k.Document()
	if len(d.Parts) != 6 || k.UndoName() != "duplicate 2 parts" {
		t.Fatalf("%d parts, undo %q", len(d.Parts), k.UndoName())
	}
	if !slices.Equal(k.Selection(), []string{"L4", "F2"}) {
		t.Errorf("selected %v", k.Selection())
	}
	shapes, _ := k.Shapes()
	for _, id := range k.Selection() {
		_, others := apart(shapes, []string{id})
		p, r := placeOf(shapes, id)
		if r == 0 || !free(disc{p, r}, others, roomOf(shapes)) {
			t.Errorf("%s at %v overlaps", id, p)
		}
	}
	if l := section.LoadOf(d, "L4"); l == nil || l.CurrentA != section.Some(16.0) {
		t.Errorf("the copy carries %+v", l)
	}
	k.Undo()
	if len(k.Document().Parts) != 4 {
		t.Error("undo must take both copies back")
	}
}

func TestLoadStartsAnew(t *testing.T) {
	k, l, f := slowDesk(t)
	<-f.started
	k.Apply(moveTo("L1", -5, 0, 0), false)
	<-f.started
	k.Select("L1")
	h := listenTo(k)
	d := testDesign()
	k.Load(d, "/somewhere/a b.yaml", nil)
	<-f.started
	if k.Document() != d || k.Dirty() || k.UndoName() != "" || len(k.Selection()) != 0 || k.Name() != "a b.yaml" {
		t.Errorf("dirty %v, undo %q, selected %v, name %q", k.Dirty(), k.UndoName(), k.Selection(), k.Name())
	}
	if told := h.told(); told&ChangedFile == 0 || told&ChangedDocument == 0 {
		t.Error("nobody was told")
	}
	answerOne(t, k, l, f)
	if _, fresh := k.Result(); !fresh {
		t.Error("no answer for the new design")
	}
}

func TestSavedMark(t *testing.T) {
	k, _, _ := slowDesk(t)
	if k.Name() != "Three and a filler" {
		t.Errorf("a design without a file is called %q", k.Name())
	}
	k.Apply(moveTo("L1", -5, 0, 0), false)
	saved := k.Document()
	k.Apply(moveTo("L1", -6, 0, 0), false) // while the file was written
	k.Saved(saved, "/x/y.yaml")
	if !k.Dirty() || k.Name() != "y.yaml" {
		t.Error("what was changed during the save counts as saved")
	}
	k.Saved(k.Document(), "/x/y.yaml")
	if k.Dirty() {
		t.Error("dirty after the save")
	}
	k.Undo()
	if !k.Dirty() {
		t.Error("an undo behind the saved state is a change")
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

func TestArranging(t *testing.T) {
	asked := make(chan func(), 10)
	moved := map[string]section.Point{"L1": {X: 1, Y: 1}}
	var refuse error
	place := func(*section.Document, *catalog.Catalog) (map[string]section.Point, error) { return moved, refuse }
	f := newFakeSolver()
	k, l := testDeskWith(t, testDesign(), Rooms{Solve: f.solve, Outline: fakeOutline, Settle: place, LayUp: place, Beside: func(f func()) { asked <- f }})
	var said []error
	done := func(err error) { said = append(said, err) }

	k.Settle(done)
	(<-asked)()
	l.run()
	if k.UndoName() != "settle" || at(t, k, "L1").X != 1 {
		t.Errorf("undo %q, L1 at %v", k.UndoName(), at(t, k, "L1"))
	}
	k.Undo()
	k.LayUp(done)
	k.Apply(moveTo("L2", 5, 0, 0), false) // meanwhile
	(<-asked)()
	l.run()
	if at(t, k, "L1").X != -4 {
		t.Error("a stale arrangement was applied")
	}
	refuse = errors.New("they do not fit")
	k.LayUp(done)
	(<-asked)()
	l.run()
	if len(said) != 3 || said[2] == nil || k.UndoName() != "move L2" {
		t.Errorf("said %v, undo %q", said, k.UndoName())
	}
}
