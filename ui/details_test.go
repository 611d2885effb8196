package ui

import (
	"fmt"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/test"

	"packrise/solver/section"
)

// told is what the details say, a line a sentence, with plain spaces.
func told(d *Details) string {
	var lines []string
	for _, p := range d.sentences {
		lines = append(lines, strings.ReplaceAll(p.String(), noBreak, " "))
	}
	return strings.Join(lines, "\n")
}

func mustTell(t *testing.T, d *Details, wants ...string) {
	t.Helper()
	for _, want := range wants {
		if got := told(d); !strings.Contains(got, want) {
			t.Errorf("the details do not say %q but\n%s", want, got)
		}
	}
}

func TestDetailsTellOfConductors(t *testing.T) {
	b := newBench(t, benchDesign)
	d := NewDetails(b.Desk)
	b.show(d, 420, 600)
	b.answer(map[string]float64{"L1": 92.3, "L2": 86.4}, nil)
	b.Select("L1")
	// 8 AWG: 3.71 mm over the strands, THHN 5.49 mm outside (NFPA 70 chapter 9 tables 8 and 5: 0.146 and 0.216 in)
	mustTell(t, d, "L1 · 8 AWG copper, stranded, ⌀ 3.71 mm · THHN, dry 90 °C · ⌀ 5.49 mm", "It carries 36 A (motor-1, with L2) and makes 2.9 W/m.",
		"It runs at 92 °C, over its limit of 90 °C (THHN, dry) by 2 K.", "It governs")
	b.Select("L2")
	mustTell(t, d, "It runs at 86 °C; its limit is 90 °C (THHN, dry), margin 4 K.", "It lies at x 0 mm, y −9 mm.")
	b.Select("N1")
	mustTell(t, d, "It is in no load: its current is unknown; its role: line.")
	b.Select("L1", "L10")
	mustTell(t, d, "2 conductors · L1, L10", "They carry different currents", "L1 is over its limit by 2 K.")
}

func TestDetailsTellOfRodsCablesAndTheWhole(t *testing.T) {
	b := newBench(t, benchDesign)
	d := NewDetails(b.Desk)
	b.show(d, 420, 600)
	mustTell(t, d, "Crane feed", "It has 4 conductors and 1 rod in a conduit of 26.6 mm inside, with air between the parts.", "Its surroundings are at 30 °C and take heat up by 9 W/m²K.",
		"the outside is at 48 °C", "Unknown currents are left out of it: N1.", "– Air at rest between the parts: too hot.")
	b.Select("F1")
	mustTell(t, d, "F1 · rod ⌀ 4 mm · polypropylene", "It runs at 50 °C; no limit is known: set one.")
}

func TestDetailsAskForAPlace(t *testing.T) {
	b := newBench(t, strings.Replace(benchDesign, ", at_mm: [0, 2]}", "}", 1))
	d := NewDetails(b.Desk)
	b.show(d, 420, 600)
	b.Select("N1")
	mustTell(t, d, "It is not placed yet: drag it in, settle all parts, or give its place: x …, y ….")
	if err := enter(b, inputOf(b, "x", "N1"), "1"); err != nil {
		t.Fatal(err)
	}
	b.wait()
	mustTell(t, d, "It lies at x 1 mm, y 0 mm.")
	if err := enter(b, inputOf(b, "x", "N1"), ""); err != nil {
		t.Fatal(err)
	}
	mustTell(t, d, "It is not placed yet")
}

func TestDetailsEditInTheSentence(t *testing.T) {
	b := newBench(t, benchDesign)
	d := NewDetails(b.Desk)
	c := b.show(d, 420, 600)
	b.Select("L1")
	was := b.Document()
	if !d.EditCurrent() {
		t.Fatal("there is no current to edit")
	}
	p := d.sentences[1]
	e := p.entry
	if c.Focused() != fyne.Focusable(e) {
		t.Fatal("the word is not being edited")
	}
	test.Type(e, "40 x")
	if p.message == "" || !p.wrong {
		t.Errorf("nonsense says %q", p.message)
	}
	e.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	if b.Document() != was || p.entry == nil {
		t.Error("nonsense leaves the document alone and the entry open")
	}
	e.SetText("40")
	e.TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	b.wait()
	if b.current("L2") != "40" || p.entry != nil {
		t.Errorf("the circuit carries %s", b.current("L2"))
	}
	mustTell(t, d, "It carries 40 A")
	b.Undo()
	mustTell(t, d, "It carries 36 A")
	if b.Document() != was {
		t.Error("one undo gives the document back")
	}
}

func TestDetailsFieldsCommitOnceAndKeepWhatIsTyped(t *testing.T) {
	b := newBench(t, benchDesign)
	d := NewDetails(b.Desk)
	c := b.show(d, 420, 600)
	b.Select("L10")
	f := d.known["current"]
	c.Focus(f.entry)
	test.Type(f.entry, "1,2 k")
	b.answer(map[string]float64{"L10": 70}, nil) // an answer arrives meanwhile
	if f.entry.Text != "1,2 k" {
		t.Errorf("what was being typed became %q", f.entry.Text)
	}
	test.Type(f.entry, "A") // FocusGained again selects all, as a click would
	f.entry.SetText("1,2 kA")
	if got := strings.ReplaceAll(f.message.String(), noBreak, " "); got != "1200 A" {
		t.Errorf("understood as %q", got)
	}
	was := b.Document()
	c.Unfocus()
	if b.current("L10") != "1200" {
		t.Errorf("leaving the field commits: %q", b.current("L10"))
	}
	b.Undo()
	if b.Document() != was {
		t.Error("leaving the field is one step")
	}
	f.entry.SetText("furlong")
	f.entry.finish(fieldLeft)
	if b.Document() != was || !strings.HasSuffix(f.message.String(), ".") {
		t.Errorf("nonsense left behind says %q", f.message.String())
	}
	f.entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	if f.entry.Text != "12.5" || f.message.String() != "" {
		t.Errorf("Escape gives %q back", f.entry.Text)
	}
}

func TestDetailsKeepTheirEntriesWhileTheAnswerChanges(t *testing.T) {
	b := newBench(t, benchDesign)
	d := NewDetails(b.Desk)
	b.show(d, 420, 600)
	b.Select("L1")
	entry := d.known["size"].entry
	b.answer(map[string]float64{"L1": 91}, nil)
	if d.known["size"].entry != entry {
		t.Error("an answer replaced the entries")
	}
	d.Fold(true)
	if len(d.fields) != 0 {
		t.Error("folded, the fields are gone")
	}
}

// No text may stand outside the pane, at any width, nor be smaller than 12.
func TestDetailsNeverClip(t *testing.T) {
	b := newBench(t, strings.Replace(benchDesign, "title: Crane feed", "title: A title that is rather long, because somebody wrote everything he knew into it", 1))
	d := NewDetails(b.Desk)
	for _, width := range []float32{200, 260, 300, 430, 700} {
		b.show(d, width, 300)
		for _, ids := range [][]string{nil, {"L1"}, {"N1"}, {"F1"}, {"L1", "L10", "N1"}} {
			b.Select(ids...)
			for _, p := range d.sentences {
				checkProse(t, p, fmt.Sprintf("width %v, %v", width, ids))
			}
			for _, f := range d.fields {
				checkProse(t, f.label, fmt.Sprintf("width %v, label", width))
			}
		}
	}
}

func checkProse(t *testing.T, p *prose, where string) {
	t.Helper()
	for _, o := range test.WidgetRenderer(p).Objects() {
		text, ok := o.(*canvas.Text)
		if !ok {
			continue
		}
		if right := text.Position().X + text.MinSize().Width; right > p.Size().Width+0.6 {
			t.Errorf("%s: %q ends at %v of %v", where, text.Text, right, p.Size().Width)
		}
		if low := text.Position().Y + text.MinSize().Height; low > p.Size().Height+0.6 {
			t.Errorf("%s: %q reaches down to %v of %v", where, text.Text, low, p.Size().Height)
		}
		if text.TextSize < 12 {
			t.Errorf("%s: %q is set in %v", where, text.Text, text.TextSize)
		}
	}
}

func TestDetailsTellProblems(t *testing.T) {
	b := newBench(t, benchDesign)
	d := NewDetails(b.Desk)
	b.show(d, 420, 600)
	b.opened = []section.Problem{{Rule: "overlap", IDs: []string{"L1", "L2"}, What: "L1 and L2 overlap by 0.3 mm", Do: "move one of them or settle all parts"}}
	b.Select("L1")
	mustTell(t, d, "L1 and L2 overlap by 0.3 mm; move one of them or settle all parts.")
	b.Select("L10")
	if strings.Contains(told(d), "overlap") {
		t.Error("L10 is told of a problem that isn't its own")
	}
}

func BenchmarkDetails200(b *testing.B) {
	k := newBench(b, manyWires(200))
	d := NewDetails(k.Desk)
	k.show(d, 420, 600)
	k.Select("L100")
	for b.Loop() {
		d.changed(ChangedResult | ChangedDocument)
	}
}

// The wheel scrolls the pane, also over an entry, and the keyboard brings its field into sight.
func TestDetailsScroll(t *testing.T) {
	b := newBench(t, benchDesign)
	d := NewDetails(b.Desk)
	c := b.show(d, 420, 520)
	b.Select("L1")
	f := d.known["circuit"]
	at := fyne.CurrentApp().Driver().AbsolutePositionForObject(f.entry).AddXY(20, 10)
	if at.Y > d.scroll.Size().Height {
		t.Fatalf("the first fields are out of sight, at %v", at.Y)
	}
	test.Scroll(c, at, 0, -60)
	if d.scroll.Offset.Y != 60 {
		t.Errorf("the wheel scrolls the pane to %v", d.scroll.Offset.Y)
	}
	c.Focus(d.known["y"].entry)
	f = d.known["y"]
	if bottom := f.Position().Y + f.Size().Height - d.scroll.Offset.Y; bottom > d.scroll.Size().Height {
		t.Errorf("the field with the keyboard ends at %v of %v", bottom, d.scroll.Size().Height)
	}
	b.Select("L2")
	if d.scroll.Offset.Y != 0 {
		t.Error("another part begins at the top")
	}
}

func BenchmarkDetailsOfAll200(b *testing.B) {
	k := newBench(b, manyWires(200))
	d := NewDetails(k.Desk)
	k.show(d, 420, 600)
	k.SelectAll()
	for b.Loop() {
		d.changed(ChangedResult | ChangedDocument)
	}
}
