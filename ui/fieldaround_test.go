package ui

import (
	"math"
	"slices"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"packrise/solver/section"
)

// enterWhole puts a text into an input of the section or of its surroundings; it returns how the text is understood.
func enterWhole(t *testing.T, k *Desk, key, text string) (meant string, err error) {
	t.Helper()
	all := append(wholeInputs(k), surroundingsInputs(k)...)
	in := inputNamed(all, key)
	if in == nil {
		t.Fatalf("no input %q for %s in %s", key, k.Document().Holder.Kind, k.Document().Surroundings.Kind)
	}
	meant, err = in.understood(text)
	e, ok, editErr := in.edit(text)
	if (editErr != nil) != (err != nil) {
		t.Errorf("%s %q: understood with %v, edited with %v", key, text, err, editErr)
	}
	if ok {
		k.Apply(e, false)
	}
	return strings.ReplaceAll(meant, noBreak, " "), err
}

// entered is one entry: what it is taken for, and what the document says afterwards.
type entered struct {
	key, text string
	meant     string // "": no more than was entered, or refused
	refused   string // a piece of the reason
	now       string // of the entry after it
}

func enterAll(t *testing.T, k *Desk, all []entered) {
	t.Helper()
	for _, c := range all {
		undo := k.UndoName()
		meant, err := enterWhole(t, k, c.key, c.text)
		if c.refused != "" && (err == nil || !strings.Contains(err.Error(), c.refused)) || c.refused == "" && err != nil {
			t.Errorf("%s %q: %v", c.key, c.text, err)
		}
		if meant != c.meant {
			t.Errorf("%s %q is understood as %q, want %q", c.key, c.text, meant, c.meant)
		}
		if c.refused != "" && k.UndoName() != undo {
			t.Errorf("%s %q was refused and made the step %q", c.key, c.text, k.UndoName())
		}
		in := inputNamed(append(wholeInputs(k), surroundingsInputs(k)...), c.key)
		if got := strings.ReplaceAll(in.text, noBreak, " "); got != c.now {
			t.Errorf("%s %q: the entry has %q, want %q", c.key, c.text, got, c.now)
		}
		if data, err := section.Write(k.Document()); err != nil {
			t.Error(err)
		} else if d, problems := section.Read(data); d == nil {
			t.Errorf("%s %q leaves a document that can't be read: %v", c.key, c.text, problems)
		}
	}
}

func inWireway() *section.Document {
	d := testDesign()
	return d.With(func(d *section.Document) {
		*d = *withHolderKind(testCatalog(), d, section.Wireway)
		d.Holder.Fill = ""
	})
}

func TestSidesOfAWireway(t *testing.T) {
	k, l := testDesk(t, inWireway())
	enterAll(t, k, []entered{
		{"side-left", "113 °F", "held at 45 °C", "", "45 °C"},
		{"side-left", "warm", "", "open, insulated, or the temperature", "45 °C"},
		{"side-left", "-300", "", "open, insulated, or the temperature", "45 °C"},
		{"side-left", "held at 40", "held at 40 °C", "", "40 °C"},
		{"side-right", "insulated", "", "", "insulated"},
		{"side-top", "Insulated", "", "", "insulated"},
		{"side-bottom", "insulated", "", "", "insulated"},
		{"side-left", "insulated", "", "no heat could leave", "40 °C"},
		{"side-top", "", "open", "", "open"},
	})
	if k.UndoName() != "top side" {
		t.Errorf("the last step is called %q", k.UndoName())
	}
	l.solved(t, k)
	if r, _ := k.Result(); r == nil || math.Abs(r.Sides["bottom"]) > 1e-9 || r.Sides["left"] < 1 {
		t.Errorf("solved as %+v", r)
	}
	told := toldOf(k)
	for _, want := range []string{"Its left side is held at 40 °C", "its right side is insulated; its bottom is insulated."} {
		if !strings.Contains(told, want) {
			t.Errorf("the details don't say %q:\n%s", want, told)
		}
	}
}

// toldOf is what the details say of the section.
func toldOf(k *Desk) string {
	var out []string
	for _, p := range tell(k) {
		line := ""
		for _, r := range p {
			line += r.text
		}
		out = append(out, strings.ReplaceAll(line, noBreak, " "))
	}
	return strings.Join(out, "\n")
}

func TestClearanceAndTouchLimit(t *testing.T) {
	k, l := testDesk(t, inWireway())
	enterAll(t, k, []entered{
		{"clearance", "0.01 in", "0.254 mm", "", "0.254"},
		{"clearance", "-1", "", "not below zero", "0.254"},
		{"clearance", "0", "0 mm", "", "0"},
		{"clearance", "", "0.2, at most 6 % of the thinnest part", "", ""},
		{"clearance", "wide", "", "wide", ""},
		{"clearance", "0,3 mm", "0.3 mm", "", "0.3"},
		{"touch", "140F", "60 °C", "", "60"},
		{"touch", "-400", "", "absolute zero", "60"},
	})
	l.solved(t, k)
	r, _ := k.Result()
	if i := slices.IndexFunc(r.Readings(), func(r section.Reading) bool { return r.ID == "outside" && r.LimitC == section.Some(60.0) }); i < 0 {
		t.Errorf("no limit outside: %+v", r.Readings())
	}
	told := toldOf(k)
	for _, want := range []string{"stand 0.3 mm apart on average", "Its outside may reach 60 °C where people can touch it."} {
		if !strings.Contains(told, want) {
			t.Errorf("the details don't say %q:\n%s", want, told)
		}
	}
}

func TestStringsOfABundle(t *testing.T) {
	k, _ := testDesk(t, testDesign())
	if inputNamed(wholeInputs(k), "clearance") != nil || inputNamed(wholeInputs(k), "string-emissivity") != nil {
		t.Error("a jacket that is filled has inputs of loose parts")
	}
	k.Apply(section.Edit{Name: "bundle", Do: func(d *section.Document) *section.Document {
		d = withHolderKind(k.Catalog(), d, section.OpenBundle)
		return d.With(func(d *section.Document) { d.Holder.Fill = "" })
	}}, false)
	enterAll(t, k, []entered{
		{"string-emissivity", "8 %", "0.08", "", "0.08"},
		{"string-emissivity", "1.2", "", "at most 1", "0.08"},
		{"string-emissivity", "0", "", "above 0", "0.08"},
		{"string-emissivity", "bright", "", " ", "0.08"},
	})
	if k.UndoName() != "string emissivity" || !strings.Contains(toldOf(k), "emissivity of 0.08") {
		t.Errorf("step %q:\n%s", k.UndoName(), toldOf(k))
	}
}

// What a kind of holder can't have goes with the kind, what it can have stays.
func TestKindOfHolderKeepsWhatItCan(t *testing.T) {
	k, _ := testDesk(t, inWireway())
	for _, c := range [][2]string{{"touch", "60"}, {"clearance", "0.3"}, {"side-left", "insulated"}} {
		if _, err := enterWhole(t, k, c[0], c[1]); err != nil {
			t.Fatal(err)
		}
	}
	for _, kind := range []string{section.OpenBundle, section.Apart, section.NoHolder, section.Jacket, section.Wireway, section.Conduit} {
		d := withHolderKind(k.Catalog(), k.Document(), kind)
		if d.Holder.TouchLimitC != section.Some(60.0) || d.Holder.ClearanceMM.OK != (kind != section.NoHolder) || (d.Holder.Sides.Left.Kind != "") != (kind == section.Wireway) {
			t.Errorf("%s: %+v", kind, d.Holder)
		}
		if kind == section.NoHolder {
			d = d.With(func(d *section.Document) { d.Parts, d.Loads = d.Parts[:1], nil })
		}
		data, err := section.Write(d)
		if err != nil {
			t.Fatal(err)
		}
		if got, problems := section.Read(data); got == nil {
			t.Errorf("%s: %v", kind, problems)
		}
	}
}

// Each line of help has its room below a dialog's fields.
func TestHelpOfDialogsFits(t *testing.T) {
	for _, kind := range []string{section.Wireway, section.OpenBundle, section.Conduit} {
		d := testDesign()
		d = withHolderKind(testCatalog(), d, kind)
		d.Holder.Fill = ""
		if kind != section.Wireway {
			d.Surroundings.Against = &section.Against{AtDeg: -90, Share: 0.25, Is: section.Side{Kind: section.SideInsulated}}
		}
		k, _ := testDesk(t, d)
		for _, surroundings := range surroundingsKinds {
			k.Apply(section.Edit{Name: "s", Do: func(d *section.Document) *section.Document {
				return section.Surround(d, surroundings.kind, completeSurroundings)
			}}, false)
			for _, in := range append(wholeInputs(k), surroundingsInputs(k)...) {
				p := newProse(k)
				p.size = smallText(p)
				p.say(run{text: in.about})
				p.Resize(fyne.NewSize(400, 40))
				if h := p.heightFor(400); h > helpLeast-6 {
					t.Errorf("%s: the help is %g high: %q", in.key, h, in.about)
				}
			}
		}
	}
}

func TestBodiesApart(t *testing.T) {
	k, l := testDesk(t, testDesign())
	enter := func(key, text string) error {
		t.Helper()
		in := inputNamed(append([]*input{holderKindInput(k)}, surroundingsInputs(k)...), key)
		e, ok, err := in.edit(text)
		if ok {
			k.Apply(e, false)
		}
		return err
	}
	if err := enter("surroundings", "surface held"); err != nil {
		t.Fatal(err)
	}
	if err := enter("kind", "bodies apart"); err == nil {
		t.Error("bodies apart share a surface that is held")
	}
	k.Undo()
	if err := enter("kind", "bodies apart"); err != nil || k.Document().Holder.Kind != section.Apart || k.UndoName() != "kind of holder" {
		t.Fatalf("%v, step %q", err, k.UndoName())
	}
	if err := enter("surroundings", "thermal insulation in air"); err == nil {
		t.Error("bodies apart are wrapped together")
	}
	if err := enter("surroundings", "still air"); err != nil {
		t.Fatal(err)
	}
	l.solved(t, k)
	if r, fresh := k.Result(); !fresh || !r.Solved() || len(refusedOf(k.Problems())) > 0 {
		t.Errorf("bodies apart have no answer: %v", k.Problems())
	}
}
