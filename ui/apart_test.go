package ui

import (
	"math"
	"slices"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// spread is the demo of bodies apart.
func spread(t *testing.T) *section.Document {
	t.Helper()
	for _, d := range demoDesigns(demoFiles()) {
		if d.doc.Holder.Kind == section.Apart {
			return d.doc
		}
	}
	t.Fatal("no demo of bodies apart")
	return nil
}

// surfaces counts the outsides of an answer.
func surfaces(k *Desk) (n int) {
	r, _ := k.Result()
	for _, o := range r.Others {
		if o.Kind == "surface" {
			n++
		}
	}
	return n
}

// TestBodiesInTheWindow opens spread strings, drags one against its neighbour, which makes one body of two, and takes it back.
func TestBodiesInTheWindow(t *testing.T) {
	w, l := testWindow(t, spread(t), usualSize)
	if surfaces(w.desk) != 12 || len(w.desk.Problems()) > 0 {
		t.Fatalf("%d outsides, %v", surfaces(w.desk), w.desk.Problems())
	}
	h := &hand{v: w.view, k: w.desk, l: l}
	from := h.on(t, "S6n")
	h.drag(t, from, h.on(t, "S6p").Add(fyne.NewPos(2, 0)))
	l.solved(t, w.desk)
	a, b := at(t, w.desk, "S6n"), at(t, w.desk, "S6p")
	if gap := math.Hypot(a.X-b.X, a.Y-b.Y) - 6.557; math.Abs(gap) > 1e-3 {
		t.Errorf("held %g mm from its neighbour", gap)
	}
	if n := surfaces(w.desk); n != 11 {
		t.Errorf("%d outsides after two strings touch", n)
	}
	w.desk.Select("S5n") // a third against the two: they lie as written, not as far apart as they are drawn
	h.drag(t, h.on(t, "S5n"), h.over(section.Point{X: b.X - 6.54, Y: 0.02}))
	l.solved(t, w.desk)
	if n := surfaces(w.desk); n != 10 || len(w.desk.Problems()) > 0 {
		t.Errorf("%d outsides after a third touches, %v", n, w.desk.Problems())
	}
	w.undo()
	w.undo()
	l.solved(t, w.desk)
	if n := surfaces(w.desk); n != 12 {
		t.Errorf("%d outsides after undo", n)
	}
}

// TestSettleBodies: parts without a place are put in a row, and the window says so; those that have one stay.
func TestSettleBodies(t *testing.T) {
	d := spread(t).With(func(d *section.Document) {
		d.Parts = slices.Clone(d.Parts)
		d.Parts[11].At = section.Opt[section.Point]{}
	})
	l := newLoop()
	w := NewWindow(test.NewTempApp(t), Options{Catalog: testCatalog(), Document: d, Rooms: l.rooms(Rooms{})})
	w.win.Resize(usualSize)
	t.Cleanup(w.Close)
	l.until(t, "problems", func() bool { return len(w.desk.Problems()) > 0 })
	w.settle()
	l.until(t, "a place", func() bool { return w.desk.UndoName() == "settle" })
	l.solved(t, w.desk)
	if got, last := at(t, w.desk, "S6n"), at(t, w.desk, "S6p"); got.Y != 0 || math.Abs(got.X-last.X-2*6.557) > 0.01 {
		t.Errorf("S6n at %v, its neighbour at %v", got, last)
	}
	for _, word := range []string{"in a row", "stay where they are drawn"} {
		if s := inRowWords(map[bool]*section.Document{true: d, false: w.desk.Document()}[word == "in a row"]); !strings.Contains(s, word) {
			t.Errorf("it says %q", s)
		}
	}
}

// TestPutBesideBodies: what is put into bodies apart becomes a body of its own.
func TestPutBesideBodies(t *testing.T) {
	d := spread(t)
	outline := func(d *section.Document) []section.Shape {
		s, _ := rating.Outline(d, testCatalog())
		return s
	}
	places := freePlaces(outline, d, section.Part{Kind: section.Core, Stock: "thhn-12"}, 2)
	if len(places) != 2 || places[0].X < 72+6.5/2+3 || places[1].X-places[0].X < 6 || places[0].Y != 0 {
		t.Errorf("put at %v", places)
	}
}
