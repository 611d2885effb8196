package ui

import (
	"context"
	"errors"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"

	"packrise/solver/section"
	"packrise/solver/study"
)

// hotDesign is testDesign with a load for each core, no two alike.
func hotDesign() *section.Document {
	d := testDesign()
	d.Loads = []section.Load{
		{ID: "a", Conductors: []string{"L1"}, CurrentA: section.Some(24.0)},
		{ID: "b", Conductors: []string{"L2"}, CurrentA: section.Some(18.0), Protection: section.Protection{Kind: section.Breaker, RatingA: 20}},
		{ID: "c", Conductors: []string{"L3"}, CurrentA: section.Some(8.0)},
	}
	return d
}

// demoDesign is one of the program's demos.
func demoDesign(t *testing.T, file string) *section.Document {
	t.Helper()
	for _, d := range demoDesigns(demoFiles()) {
		if strings.HasSuffix(d.file, file) {
			return d.doc
		}
	}
	t.Fatalf("no demo %s", file)
	return nil
}

// ratedWindow is testWindow with the program's own ratings, in.
func ratedWindow(t *testing.T, d *section.Document, size fyne.Size) (*Window, *loop) {
	t.Helper()
	l := newLoop()
	w := NewWindow(test.NewTempApp(t), Options{Catalog: testCatalog(), Document: d, Version: "test", Rooms: l.rooms(Rooms{Rate: study.New(testCatalog()).Rate})})
	w.win.Resize(size)
	t.Cleanup(w.Close)
	l.solved(t, w.desk)
	l.until(t, "ratings", func() bool { return !w.desk.Rating() })
	return w, l
}

// paneText is what the pane at the side says.
func paneText(w *Window) string {
	var s strings.Builder
	s.WriteString(w.asks.pane.title.String() + "\n")
	for _, o := range w.asks.pane.column.Objects {
		switch o := o.(type) {
		case *prose:
			s.WriteString(o.String() + "\n")
		case *askRow:
			s.WriteString(o.head.String() + " | " + o.gain.String() + " | " + o.tail.String() + "\n")
		}
	}
	return strings.ReplaceAll(s.String(), noBreak, " ")
}

func TestAdvicePreviewsAndApplies(t *testing.T) {
	w, l := testWindow(t, hotDesign(), usualSize)
	w.cmds.advice.OnTapped()
	if !w.asks.pane.wait.Visible() || !w.asks.pane.Visible() {
		t.Fatal("nothing tells that it is being worked out")
	}
	l.until(t, "advice", func() bool { return w.asks.advice != nil })
	if len(w.asks.rows) == 0 || w.asks.pane.wait.Visible() {
		t.Fatalf("the pane says %q", paneText(w))
	}
	best, before := w.asks.advice.Changes[0], w.desk.Document()
	if s := paneText(w); !strings.Contains(s, "F1 governs") || !strings.Contains(s, best.Text+" | +") || !strings.Contains(s, "each is one change by itself") {
		t.Errorf("the pane says %q", s)
	}
	r := w.asks.rows[0]
	r.MouseIn(&desktop.MouseEvent{})
	if len(w.view.ghost.marks) == 0 || !w.view.ghost.raster.Visible() || w.desk.Document() != before {
		t.Error("pointing at a change does not preview it, or changes the design")
	}
	r.MouseOut()
	if len(w.view.ghost.marks) != 0 || w.view.ghost.raster.Visible() {
		t.Error("the preview stays")
	}
	w.asks.focusRow(0)
	r.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	if w.desk.UndoName() != stepName(best.Text) || !section.Equal(w.desk.Document(), best.Doc) {
		t.Errorf("Enter makes the step %q", w.desk.UndoName())
	}
	if s := paneText(w); len(w.asks.rows) != 0 || !strings.Contains(s, "Undo takes it back.") || len(w.view.ghost.marks) != 0 {
		t.Errorf("afterwards the pane says %q", s)
	}
	w.undo()
	if !section.Equal(w.desk.Document(), before) || w.desk.UndoName() != "" {
		t.Error("one undo does not take it back")
	}
}

func TestArrowsWalkThroughTheChanges(t *testing.T) {
	w, l := testWindow(t, hotDesign(), usualSize)
	w.asks.showAdvice()
	l.until(t, "advice", func() bool { return w.asks.advice != nil })
	w.asks.focusRow(0)
	w.asks.rows[0].TypedKey(&fyne.KeyEvent{Name: fyne.KeyDown})
	if w.win.Canvas().Focused() != fyne.Focusable(w.asks.rows[1]) || w.asks.rows[0].lit || !w.asks.rows[1].lit {
		t.Error("the arrow does not go to the next change")
	}
	w.asks.rows[1].TypedKey(&fyne.KeyEvent{Name: fyne.KeyUp})
	if w.win.Canvas().Focused() != fyne.Focusable(w.asks.rows[0]) {
		t.Error("the arrow does not go back")
	}
	w.asks.rows[0].TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	if w.win.Canvas().Focused() != nil || len(w.view.ghost.marks) != 0 {
		t.Error("Escape leaves the preview")
	}
}

func TestAdviceIsDroppedWhenTheDesignChanges(t *testing.T) {
	w, l := testWindow(t, hotDesign(), usualSize)
	w.asks.showAdvice()
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	if w.asks.asker.now != nil || !strings.Contains(paneText(w), "Ask again") || !w.asks.pane.again.Visible() {
		t.Errorf("a change of the design leaves the question: %q", paneText(w))
	}
	l.solved(t, w.desk)
	if w.asks.advice != nil || len(w.asks.rows) != 0 {
		t.Error("an answer about the design before was taken")
	}
	w.asks.pane.again.OnTapped()
	l.until(t, "advice", func() bool { return w.asks.advice != nil })
	w.desk.Apply(moveTo("L1", -4.5, 0, 0), false)
	if w.asks.advice != nil || len(w.asks.rows) != 0 || !strings.Contains(paneText(w), "has changed since") {
		t.Errorf("the list outlives its design: %q", paneText(w))
	}
	w.asks.askAdvice()
	w.asks.pane.stop.OnTapped()
	if w.asks.asker.now != nil || !strings.Contains(paneText(w), "stopped") {
		t.Errorf("Cancel leaves it running: %q", paneText(w))
	}
	w.asks.pane.shut.OnTapped()
	if w.asks.pane.Visible() || !w.asks.side.details.Visible() {
		t.Error("Close does not bring the details back")
	}
}

func TestNewestQuestionIsAnswered(t *testing.T) {
	w, l := testWindow(t, testDesign(), usualSize)
	a := w.asks.asker
	started, dropped := make(chan struct{}), false
	a.ask(question{
		work: func(ctx context.Context, _ *study.Study, _ *section.Document, _ study.Options) (any, error) {
			close(started)
			<-ctx.Done()
			return nil, ctx.Err()
		},
		then: func(any, error) { t.Error("a question that was replaced is answered") },
		drop: func() { dropped = true },
	})
	<-started
	got, share := any(nil), 0.0
	a.ask(question{
		work: func(_ context.Context, s *study.Study, d *section.Document, o study.Options) (any, error) {
			o.Progress(1, 2)
			o.Progress(1, 4) // a later part of the work begins anew
			return d, errors.New("study: no")
		},
		told: forward(func(f float64) { share = f }),
		then: func(answer any, err error) { got = answer },
	})
	l.until(t, "an answer", func() bool { return got != nil })
	if !dropped || got != any(w.desk.Document()) || share != 0.5 || a.now != nil {
		t.Errorf("dropped %v, answer %v, share %g", dropped, got, share)
	}
	if s := askWords(&study.Refusal{Problems: []section.Problem{{What: "it is not known", Do: "enter it"}}}); s != "It is not known; enter it." {
		t.Errorf("a refusal says %q", s)
	}
}

func TestPaneAndDetailsShareTheSide(t *testing.T) {
	w, _ := testWindow(t, hotDesign(), fyne.NewSize(1400, 875))
	w.asks.showRemarks()
	if !w.asks.pane.Visible() || !w.asks.side.details.Visible() || w.asks.pane.Position().Y < 100 {
		t.Error("in a large window details and pane do not stand one above the other")
	}
	w.win.Resize(fyne.NewSize(1024, 640))
	if !w.asks.pane.Visible() || w.asks.side.details.Visible() || w.asks.pane.Size().Height < 150 {
		t.Error("in a small window the pane does not take the place of the details")
	}
	w.focusDetails()
	if w.asks.pane.Visible() || !w.asks.side.details.Visible() {
		t.Error("to edit in the details does not bring them back")
	}
	w.win.Resize(fyne.NewSize(760, 480))
	w.desk.Apply(section.Edit{Name: "a step with a rather long name", Do: func(d *section.Document) *section.Document {
		return section.Move(d, "L1", section.Point{X: -5})
	}}, false)
	w.relayout()
	w.content.Refresh()
	for _, b := range []fyne.CanvasObject{w.cmds.in, w.cmds.advice} {
		if b.Visible() && b.Position().X+b.Size().Width > w.cmds.details.Position().X {
			t.Error("the buttons of the command row overlap in the narrowest window")
		}
	}
}

func TestClosingADialogLeavesOtherQuestions(t *testing.T) {
	w, l := testWindow(t, hotDesign(), usualSize)
	w.desk.Select("L1")
	w.asks.showSeating()
	w.asks.showFit() // takes the place of the dialog, and of its question
	mustHave(t, dialogText(w), "How many more like L1 fit", "[Cancel]")
	w.asks.showAdvice()
	mustHave(t, dialogText(w), "something else was asked meanwhile")
	w.hide()
	if w.asks.asker.now == nil {
		t.Fatal("closing the dialog ends what the pane asks")
	}
	l.until(t, "advice", func() bool { return w.asks.advice != nil })
}
