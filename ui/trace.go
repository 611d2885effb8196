package ui

import (
	"fmt"
	"io"

	"fyne.io/fyne/v2"
)

// tracer prints one line for each thing that a script may wait for, so that the real window can be tested without guessing at times.
type tracer struct {
	w   *Window
	out io.Writer
}

func newTracer(w *Window, out io.Writer) *tracer { return &tracer{w: w, out: out} }

// changed prints what changed: the title, the revision that was solved, and where each part is on the screen of the window.
func (t *tracer) changed(c Changed) {
	if t.out == nil {
		return
	}
	k := t.w.desk
	if c&(ChangedDocument|ChangedFile) != 0 {
		fmt.Fprintf(t.out, "title %s\n", t.w.title())
		fmt.Fprintf(t.out, "document rev %d, undo %q, redo %q\n", k.Revision(), k.UndoName(), k.RedoName())
	}
	if c&ChangedSelection != 0 {
		fmt.Fprintf(t.out, "selected %q\n", k.Selection())
	}
	if c&ChangedResult == 0 || k.Solving() || k.Draft() {
		return
	}
	t.places()
	answer, _, _ := k.Sentence()
	fmt.Fprintf(t.out, "solved rev %d: %s\n", k.Revision(), answer)
}

// places prints the middle of each part in device pixels of the window.
func (t *tracer) places() {
	v := t.w.view
	origin := fyne.CurrentApp().Driver().AbsolutePositionForObject(v)
	scale := t.w.win.Canvas().Scale()
	for _, s := range t.w.desk.shownShapes() {
		if s.ID == "" || v.camera.scale == 0 {
			continue
		}
		p := v.camera.toUnits(s.At, v.Size())
		fmt.Fprintf(t.out, "part %s at %.0f,%.0f px, radius %.0f px\n", s.ID, (origin.X+p.X)*scale, (origin.Y+p.Y)*scale, s.OuterR()*v.camera.scale*float64(scale))
	}
}
