package ui

import (
	"slices"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"

	"packrise/solver/section"
)

// listIDs returns the rows' ids in the order shown.
func listIDs(l *WireList) string {
	var ids []string
	for _, r := range l.rows {
		ids = append(ids, r.id)
	}
	return strings.Join(ids, " ")
}

// cellAt returns the middle of a cell in the list's body.
func cellAt(l *WireList, id string, c wireColumn) fyne.Position {
	at, size := l.cellBox(l.row(id), c)
	return at.AddXY(size.Width/2, size.Height/2)
}

func clickCell(l *WireList, id string, c wireColumn, held fyne.KeyModifier) {
	at := cellAt(l, id, c)
	l.body.MouseDown(&desktop.MouseEvent{PointEvent: fyne.PointEvent{Position: at}, Modifier: held})
	l.body.MouseUp(&desktop.MouseEvent{PointEvent: fyne.PointEvent{Position: at}, Modifier: held})
	l.body.Tapped(&fyne.PointEvent{Position: at})
}

func TestWireListOrdersConductorsFirst(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewWireList(b.Desk)
	b.show(l, 1000, 300)
	if got, want := listIDs(l), "L1 L2 L10 N1 F1 conduit outside"; got != want {
		t.Errorf("rows %s, want %s", got, want)
	}
}

func TestWireListJudgesUnrounded(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewWireList(b.Desk)
	b.answer(map[string]float64{"L1": 90.04, "L2": 89.96, "L10": 86.4}, nil)
	row := func(id string) *wireRow { return &l.rows[l.row(id)] }
	for _, c := range []struct {
		id, temp, limit, margin string
		over                    bool
	}{
		{"L1", "90.1", "90", "−0.1", true},
		{"L2", "89.9", "90", "0.1", false},
		{"L10", "86", "90", "4", false},
	} {
		r := row(c.id)
		if r.temperature() != c.temp || r.limitText() != c.limit || r.marginText() != c.margin || r.over() != c.over {
			t.Errorf("%s reads %q, limit %q, margin %q, over %v; want %+v", c.id, r.temperature(), r.limitText(), r.marginText(), r.over(), c)
		}
	}
	if got := row("L1").remark; got != "over, governs, hottest" {
		t.Errorf("remark of L1 %q", got)
	}
	if got := row("N1").remark; got != "unassigned" {
		t.Errorf("remark of N1 %q", got)
	}
	if r := row("N1"); r.current != "unknown" || r.circuit != "" {
		t.Errorf("N1 in no load reads %q in circuit %q; unknown is never a number", r.current, r.circuit)
	}
}

func TestWireListSorts(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewWireList(b.Desk)
	b.show(l, 1000, 300)
	b.answer(map[string]float64{"L1": 70, "L2": 85, "L10": 70, "N1": 40, "F1": 60}, nil)
	head := func(c wireColumn) {
		x := l.layout.at[c] + 3
		test.TapAt(l.head, fyne.NewPos(x, 5))
	}
	head(wireTemp)
	if got := listIDs(l); got != "N1 outside conduit F1 L1 L10 L2" {
		t.Errorf("by temperature: %s (equal ones keep their order)", got)
	}
	head(wireTemp)
	if got := listIDs(l); got != "L2 L1 L10 F1 conduit outside N1" {
		t.Errorf("by temperature downwards: %s", got)
	}
	head(wireTemp)
	if got := listIDs(l); got != "L1 L2 L10 N1 F1 conduit outside" {
		t.Errorf("a third click gives the document's order back: %s", got)
	}
	head(wireCurrent)
	if got := listIDs(l); !strings.HasPrefix(got, "L10 L1 L2 ") {
		t.Errorf("by current: %s; rows without one come last", got)
	}
	head(wireCurrent)
	if got := listIDs(l); !strings.HasPrefix(got, "L1 L2 L10 ") {
		t.Errorf("by current downwards: %s; rows without one come last", got)
	}
	head(wireID)
	if got := listIDs(l); got != "F1 L1 L2 L10 N1 conduit outside" {
		t.Errorf("by id: %s; numbers within count by value", got)
	}
}

func TestWireListSelectsWithTheDesk(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewWireList(b.Desk)
	b.show(l, 1000, 300)
	clickCell(l, "L2", wireID, 0)
	if got := b.Selection(); !slices.Equal(got, []string{"L2"}) {
		t.Errorf("a click selects %v", got)
	}
	clickCell(l, "F1", wireID, fyne.KeyModifierShift)
	if got := b.Selection(); !slices.Equal(got, []string{"L2", "L10", "N1", "F1"}) {
		t.Errorf("shift-click selects %v", got)
	}
	clickCell(l, "L10", wireID, fyne.KeyModifierShortcutDefault)
	if got := b.Selection(); !slices.Equal(got, []string{"L2", "N1", "F1"}) {
		t.Errorf("control-click takes out: %v", got)
	}
	b.Select("N1")
	if l.active.id != "L10" && l.active.id != "N1" {
		t.Errorf("active row %s", l.active.id)
	}
	b.Select("L1")
	if l.active.id != "L1" {
		t.Errorf("a selection made elsewhere moves the active row to %s", l.active.id)
	}
	l.body.TypedKey(&fyne.KeyEvent{Name: fyne.KeyDown})
	if got := b.Selection(); !slices.Equal(got, []string{"L2"}) {
		t.Errorf("arrow down selects %v", got)
	}
	test.MoveMouse(fyne.CurrentApp().Driver().CanvasForObject(l), cellAt(l, "L10", wireSizeType).AddXY(0, l.scroll.Position().Y))
	if b.Pointed() != "L10" {
		t.Errorf("the row under the pointer lights up %q", b.Pointed())
	}
}

func TestWireListEditsCurrentOnce(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewWireList(b.Desk)
	c := b.show(l, 1000, 300)
	clickCell(l, "L1", wireCurrent, 0)
	clickCell(l, "L1", wireCurrent, 0) // again: edit
	if l.body.entry == nil || c.Focused() != fyne.Focusable(l.body.entry) {
		t.Fatal("a click on the active cell does not edit it")
	}
	was := b.Document()
	test.Type(l.body.entry, "500 mA")
	if l.body.message == "" || !strings.Contains(strings.ReplaceAll(l.body.message, noBreak, " "), "0.5 A in each of L1, L2") {
		t.Errorf("understood as %q", l.body.message)
	}
	l.body.entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	b.wait()
	if b.current("L1") != "0.5" || b.current("L2") != "0.5" {
		t.Errorf("the circuit carries %s and %s", b.current("L1"), b.current("L2"))
	}
	if l.body.entry != nil || c.Focused() != fyne.Focusable(l.body) {
		t.Error("after Enter the list has the keyboard")
	}
	if got := b.UndoName(); got != "current of motor-1" {
		t.Errorf("the step is called %q", got)
	}
	b.Undo()
	if b.Document() != was {
		t.Error("one undo gives the document back")
	}
}

func TestWireListTypingBeginsAndEscapeLeaves(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewWireList(b.Desk)
	c := b.show(l, 1000, 300)
	clickCell(l, "L10", wireCurrent, 0)
	was := b.Document()
	c.Focused().TypedRune('9')
	if l.body.entry == nil || l.body.entry.Text != "9" {
		t.Fatalf("typing replaces the cell")
	}
	l.body.entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	if b.Document() != was || l.body.entry != nil {
		t.Error("Escape leaves the document alone")
	}
	c.Focused().TypedKey(&fyne.KeyEvent{Name: fyne.KeyF2})
	test.Type(l.body.entry, "nonsense")
	if !l.body.wrong || !strings.HasSuffix(l.body.message, ".") {
		t.Errorf("nonsense reads %q", l.body.message)
	}
	l.body.entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	if b.Document() != was || l.body.entry == nil {
		t.Error("nonsense leaves the document alone and keeps the entry open")
	}
	l.body.entry.SetText("20")
	l.body.entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyDown})
	if b.current("L10") != "20" || l.active.id != "N1" {
		t.Errorf("arrow down commits (%s) and moves to %s", b.current("L10"), l.active.id)
	}
	c.Focused().TypedRune('4')
	c.Unfocus()
	if b.current("N1") != "4" {
		t.Errorf("leaving the cell commits: N1 carries %q", b.current("N1"))
	}
}

func TestWireListGreysOldNumbers(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewWireList(b.Desk)
	b.show(l, 1000, 300)
	if l.aged {
		t.Fatal("fresh numbers are grey")
	}
	b.Apply(section.Edit{Name: "move", Do: func(d *section.Document) *section.Document { return section.Move(d, "L1", section.Point{}) }}, false)
	if l.aged {
		t.Error("numbers are grey at once")
	}
	b.elapse()
	if !b.Stale() {
		t.Skip("the answer arrived first")
	}
	if !l.aged {
		t.Error("numbers of an older section are not greyed")
	}
	b.wait()
	if l.aged {
		t.Error("new numbers are grey")
	}
}

func TestWireListCountsRowsOutOfSight(t *testing.T) {
	b := newBench(t, manyWires(200))
	l := NewWireList(b.Desk)
	b.show(l, 1000, 230)
	above, below := l.outOfSight()
	if above != 0 || below < 190 || l.unseen.Text == "" {
		t.Errorf("%d above, %d below, says %q", above, below, l.unseen.Text)
	}
	if n := len(test.WidgetRenderer(l.body).Objects()); n > 120 {
		t.Errorf("%d objects are drawn for the few rows in sight", n)
	}
	b.Select("L150")
	if first, last := l.inSight(); l.row("L150") < first || l.row("L150") >= last {
		t.Errorf("rows %d to %d are in sight, L150 is not", first, last)
	}
	if above, below = l.outOfSight(); above < 100 || !strings.Contains(l.unseen.Text, "above") {
		t.Errorf("%d above, %d below, says %q", above, below, l.unseen.Text)
	}
	if l.head.Position().Y != 0 {
		t.Error("the header scrolled away")
	}
}

func BenchmarkWireList200(b *testing.B) {
	k := newBench(b, manyWires(200))
	l := NewWireList(k.Desk)
	k.show(l, 1000, 400)
	for b.Loop() {
		l.changed(ChangedResult)
	}
}

// Nonsense left behind is not taken, and the list says why until something else is done.
func TestWireListSaysWhyNothingWasTaken(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewWireList(b.Desk)
	c := b.show(l, 1000, 300)
	clickCell(l, "L10", wireLimit, 0)
	was := b.Document()
	c.Focused().TypedRune('x')
	c.Unfocus()
	if b.Document() != was || l.body.entry != nil || !l.body.wrong || l.body.message == "" {
		t.Errorf("left behind: entry %v, says %q", l.body.entry != nil, l.body.message)
	}
	clickCell(l, "L1", wireID, 0)
	if l.body.message != "" {
		t.Errorf("still says %q", l.body.message)
	}
}

// A conductor whose current nobody has said has no margin, and its temperature is a lower bound.
func TestWireListDoesNotReadUnknownAsZero(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewWireList(b.Desk)
	b.answer(map[string]float64{"N1": 60}, nil)
	r := l.rows[l.row("N1")]
	if r.temperature() != "≥ 60" || r.marginText() != "" {
		t.Errorf("N1 reads %q, margin %q", r.temperature(), r.marginText())
	}
	b.answer(map[string]float64{"N1": 95}, nil)
	if r = l.rows[l.row("N1")]; !r.over() || r.marginText() != "−5" {
		t.Errorf("N1 is over even without its own heat, and reads %q", r.marginText())
	}
}

// The row one works on stays in sight when a new answer sorts others past it.
func TestWireListKeepsTheActiveRowInSight(t *testing.T) {
	b := newBench(t, manyWires(60))
	l := NewWireList(b.Desk)
	b.show(l, 1000, 230)
	l.SortBy(wireTemp)
	l.SortBy(wireTemp)
	clickCell(l, l.rows[1].id, wireCurrent, 0)
	id := l.active.id
	b.answer(map[string]float64{id: 20}, nil)
	if first, last := l.inSight(); l.row(id) != len(l.rows)-1 || l.row(id) < first || l.row(id) >= last {
		t.Errorf("%s is row %d, rows %d to %d are in sight", id, l.row(id), first, last)
	}
}

// Whatever the width, no cell and no header runs into its neighbour, and nothing is set smaller than 12.
func TestWireListNeverOverlaps(t *testing.T) {
	b := newBench(t, strings.ReplaceAll(benchDesign, "motor-1", "a circuit with a name that is longer than anybody would like"))
	l := NewWireList(b.Desk)
	b.answer(map[string]float64{"L1": 190.04, "L2": 89.96, "L10": 186.4}, nil)
	for _, width := range []float32{240, 500, 760, 1024, 1400, 2000} {
		b.show(l, width, 300)
		l.SortBy(wireMargin)
		for _, w := range []fyne.Widget{l.head, l.body} {
			lines := map[int][]*canvas.Text{}
			for _, o := range test.WidgetRenderer(w).Objects() {
				if text, ok := o.(*canvas.Text); ok && text.Visible() && text.Text != "" {
					lines[int(text.Position().Y+text.MinSize().Height/2+0.5)/8] = append(lines[int(text.Position().Y+text.MinSize().Height/2+0.5)/8], text)
					if text.TextSize < 12 {
						t.Errorf("%q is set in %v", text.Text, text.TextSize)
					}
				}
			}
			for _, line := range lines {
				slices.SortFunc(line, func(a, b *canvas.Text) int { return int(a.Position().X - b.Position().X) })
				for i, text := range line {
					end := text.Position().X + text.MinSize().Width
					if i+1 < len(line) && end > line[i+1].Position().X || end > max(width, l.layout.width)+0.5 || text.Position().X < 0 {
						t.Errorf("width %v: %q runs from %v to %v", width, text.Text, text.Position().X, end)
					}
				}
			}
		}
	}
}
