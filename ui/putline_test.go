package ui

import (
	"slices"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"

	"packrise/solver/section"
)

func typeAndEnter(b *bench, l *PutLine, text string) {
	test.Type(l.entry, text)
	l.entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	b.wait()
}

func TestPutLineAddsAndUndoTakesAway(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewPutLine(b.Desk)
	b.show(l, 380, 120)
	was := b.Document()
	test.Type(l.entry, "3x 12 thhn")
	if !strings.Contains(l.hint.text, "12 AWG") || l.hint.wrong {
		t.Errorf("understood as %q", l.hint.text)
	}
	l.entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	b.wait()
	if got := b.Selection(); !slices.Equal(got, []string{"L3", "L4", "L5"}) {
		t.Errorf("selected %v; the new ones are the next free ids", got)
	}
	for _, id := range b.Selection() {
		p := section.Find(b.Document(), id)
		if p.Stock != "thhn-12" || !p.At.OK || section.LoadOf(b.Document(), id) != nil {
			t.Errorf("%s: stock %q, placed %v; a new wire is in no load", id, p.Stock, p.At.OK)
		}
	}
	checkFree(t, b)
	if l.entry.Text != "" || l.hint.text != "" {
		t.Errorf("the line still says %q, %q", l.entry.Text, l.hint.text)
	}
	if got := b.UndoName(); got != "put in L3 to L5" {
		t.Errorf("the step is called %q", got)
	}
	b.Undo()
	if b.Document() != was {
		t.Error("one undo takes all away")
	}
}

// checkFree checks that what is placed at the top level neither overlaps nor lies outside a round holder, up to the 1 µm that counts as touching
// (rule of the document format).
func checkFree(t *testing.T, b *bench) {
	t.Helper()
	shapes, _ := benchOutline(b.Document(), nil)
	in := roomOf(shapes)
	_, discs := apart(shapes, nil)
	for i, d := range discs {
		if !free(d, discs[:i], in) {
			t.Errorf("part %d at %v overlaps or lies outside", i, d.at)
		}
	}
}

func TestPutLineFillsUntilThereIsNoRoom(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewPutLine(b.Desk)
	b.show(l, 380, 120)
	typeAndEnter(b, l, "40x 8 thhn")
	checkFree(t, b)
	waiting := 0
	for _, p := range b.Document().Parts {
		if !p.At.OK {
			waiting++
		}
	}
	if waiting == 0 || waiting == 40 || !strings.Contains(l.hint.text, "no free place") {
		t.Errorf("%d of 40 wait, says %q", waiting, l.hint.text)
	}
}

func TestPutLineTakesRodsAndHolders(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewPutLine(b.Desk)
	b.show(l, 380, 120)
	typeAndEnter(b, l, "filler 4")
	p := section.Find(b.Document(), "F2")
	if p == nil || p.Kind != section.Rod || p.Diameter.V != 4 || p.Material == "" {
		t.Fatalf("filler 4 became %+v", p)
	}
	typeAndEnter(b, l, "emt 1-1/4")
	if h := b.Document().Holder; !strings.HasPrefix(h.Stock, "emt-") || h.InsideMM.OK || h.Kind != section.Conduit {
		t.Errorf("the holder is %+v", h)
	}
	if !strings.HasPrefix(b.UndoName(), "put into EMT") {
		t.Errorf("the step is called %q", b.UndoName())
	}
	b.Undo()
	if b.Document().Holder.InsideMM.V != 26.6 {
		t.Error("undo gives the holder back")
	}
}

func TestPutLineSaysWhatIsWrong(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewPutLine(b.Desk)
	b.show(l, 380, 120)
	was := b.Document()
	for _, text := range []string{"nonsense", "4G1.5", "-3 thhn", "12 thhn 7", "999x 12 thhn"} {
		l.entry.SetText("")
		typeAndEnter(b, l, text)
		if !l.hint.wrong || !strings.HasSuffix(l.hint.text, ".") || strings.Contains(l.hint.text, "\n") {
			t.Errorf("%q: says %q", text, l.hint.text)
		}
		if l.entry.Text != text || b.Document() != was {
			t.Errorf("%q: the text stays for mending and the document as it was", text)
		}
	}
	l.entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	if l.entry.Text != "" || l.hint.text != "" {
		t.Error("Escape empties the line")
	}
}

// A wire of a type that the catalogue doesn't list finished gets the usual insulation. H07V-K 2.5 mm²: 0.8 mm (EN 50525-2-31, table 1; from memory).
func TestPutLineSpellsOutUnlistedWires(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewPutLine(b.Desk)
	b.show(l, 380, 120)
	typeAndEnter(b, l, "2.5 h07v-k")
	ids := b.Selection()
	if len(ids) != 1 {
		t.Fatalf("selected %v, says %q", ids, l.hint.text)
	}
	p := spelled(b.Catalog(), *section.Find(b.Document(), ids[0]))
	if p.Conductor.Size != "2.5 mm2" || p.Conductor.Class != section.Flexible || len(p.Layers) != 1 || p.Layers[0].ThicknessMM < 0.75 || p.Layers[0].ThicknessMM > 0.85 {
		t.Errorf("it became %+v with %+v", p.Conductor, p.Layers)
	}
}

func BenchmarkFreePlaces(b *testing.B) {
	k := newBench(b, manyWires(200))
	outline := func(d *section.Document) []section.Shape {
		shapes, _ := benchOutline(d, nil)
		return shapes
	}
	for b.Loop() {
		freePlaces(outline, k.Document(), section.Part{Kind: section.Core, Stock: "thhn-12"}, 10)
	}
}
