package ui

import (
	"fmt"
	"io"
	"strings"

	"fyne.io/fyne/v2"
)

// tracer prints one line for each thing that a script may wait for, so that the real window can be tested without guessing at times.
type tracer struct {
	w      *Window
	out    io.Writer
	placed string
}

func newTracer(w *Window, out io.Writer) *tracer {
	t := &tracer{w: w, out: out}
	if out != nil {
		w.view.OnPainted = t.places
	}
	return t
}

// changed prints the title and the steps to undo and redo, the selection, and the answer to the document as it is.
func (t *tracer) changed(c Changed) {
	if t.out == nil {
		return
	}
	k := t.w.desk
	if c&(ChangedDocument|ChangedFile) != 0 {
		t.line("title %s", t.w.title())
		t.line("document rev %d, undo %q, redo %q", k.Revision(), k.UndoName(), k.RedoName())
	}
	if c&ChangedSelection != 0 {
		t.line("selected %q", k.Selection())
	}
	if c&ChangedResult != 0 && !k.Solving() && !k.Draft() {
		answer, _, _ := k.Sentence()
		t.line("solved rev %d: %s", k.Revision(), answer)
	}
	if c&ChangedRatings != 0 {
		t.rated()
	}
}

// rated prints the stage that the ratings of the document as it is have reached.
func (t *tracer) rated() {
	k := t.w.desk
	switch r := k.Ratings(); {
	case r != nil && !k.Rating():
		_, amperes := r.Sentence()
		t.line("rated rev %d: %s", k.Revision(), amperes)
	case len(k.RatingRefusal()) > 0:
		t.line("not rated rev %d: %s", k.Revision(), refusalWords(k.RatingRefusal()))
	}
}

func (t *tracer) line(format string, args ...any) {
	if t.out != nil {
		fmt.Fprintf(t.out, format+"\n", args...)
	}
}

// places prints where each part is, in device pixels of the window, if any has another place.
func (t *tracer) places() {
	v := t.w.view
	if v.camera.scale == 0 {
		return
	}
	origin := fyne.CurrentApp().Driver().AbsolutePositionForObject(v)
	scale := t.w.win.Canvas().Scale()
	var s strings.Builder
	for _, sh := range t.w.desk.shownShapes() {
		if sh.ID != "" {
			p := v.camera.toUnits(sh.At, v.Size())
			fmt.Fprintf(&s, "part %s at %.0f,%.0f px\n", sh.ID, (origin.X+p.X)*scale, (origin.Y+p.Y)*scale)
		}
	}
	if s.String() == t.placed {
		return
	}
	t.placed = s.String()
	fmt.Fprint(t.out, t.placed)
	t.line("placed %d parts", strings.Count(t.placed, "\n"))
}
