package ui

import (
	"context"
	"errors"
	"slices"
	"testing"
	"time"

	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

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
