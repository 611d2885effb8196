package ui

import (
	"strings"
	"testing"

	"packrise/solver/section"
)

// enter makes the edit that a text in an input stands for and returns its error.
func enter(b *bench, in *input, text string) error {
	b.t.Helper()
	if in == nil {
		b.t.Fatal("there is no such input")
	}
	e, ok, err := in.edit(text)
	if err == nil && ok {
		b.Apply(e, false)
	}
	return err
}

func inputOf(b *bench, key string, ids ...string) *input {
	if len(ids) == 0 {
		return inputNamed(wholeInputs(b.Desk), key)
	}
	return inputNamed(inputsOf(b.Desk, ids), key)
}

func TestInputsUnderstandUnits(t *testing.T) {
	b := newBench(t, benchDesign)
	for _, c := range []struct {
		key, id, text, meant string
		check                func(*section.Document) bool
	}{
		{"ambient", "", "104F", "40 °C", func(d *section.Document) bool { return d.Surroundings.AmbientC == section.Some(40.0) }}, // (104 − 32)/1.8
		{"film", "", "9,5", "9.5 W/m²K", func(d *section.Document) bool { return d.Surroundings.FilmWM2K == section.Some(9.5) }},
		{"inside", "", "1 in", "25.4 mm", func(d *section.Document) bool { return d.Holder.InsideMM == section.Some(25.4) }},
		{"x", "L1", "1/4 in", "6.35 mm", func(d *section.Document) bool { return section.Find(d, "L1").At.V.X == 6.35 }},
		{"y", "L1", "−4,5", "", func(d *section.Document) bool { return section.Find(d, "L1").At.V.Y == -4.5 }},
		{"limit", "L1", "167 °F", "75 °C", func(d *section.Document) bool { return section.Find(d, "L1").LimitC == section.Some(75.0) }},
		{"limit", "L1", "", "from type and material", func(d *section.Document) bool { return !section.Find(d, "L1").LimitC.OK }},
		{"diameter", "F1", "5 mm", "", func(d *section.Document) bool { return section.Find(d, "F1").Diameter == section.Some(5.0) }},
		{"role", "L1", "neu", "neutral", func(d *section.Document) bool { return section.Find(d, "L1").Role == section.RoleNeutral }},
		{"size", "N1", "4 mm²", "", func(d *section.Document) bool { return section.Find(d, "N1").Conductor.Size == "4 mm2" }},
		{"size", "N1", "6", "", func(d *section.Document) bool { return section.Find(d, "N1").Conductor.Size == "6 mm2" }},
		{"size", "N1", "14 AWG", "", func(d *section.Document) bool { return section.Find(d, "N1").Conductor.Size == "14 AWG" }},
		{"thickness0", "N1", "31 mil", "0.787 mm", func(d *section.Document) bool { return nearly(section.Find(d, "N1").Layers[0].ThicknessMM, 0.7874) }},
		{"material0", "N1", "pvc 0.5 + pe 0.2", "", func(d *section.Document) bool { return len(section.Find(d, "N1").Layers) == 2 }},
		{"circuit", "N1", "heater", "joins L10: 12.5 A", func(d *section.Document) bool { return section.LoadOf(d, "N1").ID == "heater" }},
		{"current", "N1", "1,5 A", "", func(d *section.Document) bool { return section.LoadOf(d, "L10").CurrentA == section.Some(1.5) }},
		{"current", "L1", "5 W/m", "a fixed heat of 5 W/m in each of L1, L2", func(d *section.Document) bool { return section.LoadOf(d, "L2").HeatWM == section.Some(5.0) }},
		{"current", "L1", "", "current unknown in each of L1, L2", func(d *section.Document) bool { return section.LoadOf(d, "L1").Unknown }},
		{"title", "", "Other", "", func(d *section.Document) bool { return d.Title == "Other" }},
	} {
		var ids []string
		if c.id != "" {
			ids = []string{c.id}
		}
		in := inputOf(b, c.key, ids...)
		if in == nil {
			t.Errorf("%s of %q: no such input", c.key, c.id)
			continue
		}
		meant, err := in.understood(c.text)
		if err != nil {
			t.Errorf("%s %q: %v", c.key, c.text, err)
			continue
		}
		if c.meant != "" && strings.ReplaceAll(meant, noBreak, " ") != c.meant {
			t.Errorf("%s %q is understood as %q, want %q", c.key, c.text, meant, c.meant)
		}
		if err := enter(b, in, c.text); err != nil || !c.check(b.Document()) {
			t.Errorf("%s %q: the document does not have it (%v)", c.key, c.text, err)
		}
	}
}

func nearly(a, b float64) bool { return a-b < 1e-9 && b-a < 1e-9 }

func TestInputsRefuseNonsense(t *testing.T) {
	b := newBench(t, benchDesign)
	was := b.Document()
	for _, c := range []struct{ key, id, text string }{
		{"ambient", "", "warm"},
		{"ambient", "", ""},
		{"ambient", "", "-300"},
		{"film", "", "0"},
		{"film", "", "x"},
		{"inside", "", "-3"},
		{"inside", "", ""},
		{"fill", "", "marmalade"},
		{"holder", "", "emt 99"},
		{"material0", "", "marmalade"},
		{"thickness0", "", "0"},
		{"current", "L1", "-5"},
		{"current", "L1", "36 V"},
		{"current", "L1", "-1 W/m"},
		{"size", "L1", "8"},
		{"size", "L1", "99 AWG"},
		{"size", "L1", "big"},
		{"size", "N1", "⌀ 0"},
		{"metal", "L1", "gold"},
		{"type", "L1", "thnn"},
		{"limit", "L1", "hot"},
		{"role", "L1", "boss"},
		{"x", "L1", "here"},
		{"material0", "L1", "pvc 0"},
		{"material0", "L1", "pvc 0.4 + "},
		{"thickness0", "L1", "-1"},
		{"id", "L1", ""},
		{"id", "L1", "L2"},
		{"id", "L1", "a/b"},
		{"circuit", "L1", "a/b"},
		{"diameter", "F1", "0"},
		{"bore", "F1", "-1"},
		{"rodmaterial", "F1", "marmalade"},
	} {
		var ids []string
		if c.id != "" {
			ids = []string{c.id}
		}
		if c.key == "size" && c.text == "8" {
			continue // a bare number is in the part's own system: that is right
		}
		err := enter(b, inputOf(b, c.key, ids...), c.text)
		if err == nil {
			t.Errorf("%s %q of %q is taken", c.key, c.text, c.id)
			continue
		}
		if s := sentence(err); strings.Contains(s, "\n") || !strings.HasSuffix(s, ".") || len(s) < 15 {
			t.Errorf("%s %q: %q is no sentence", c.key, c.text, s)
		}
		if b.Document() != was {
			t.Fatalf("%s %q changed the document", c.key, c.text)
		}
	}
}

// Outside diameters of THHN: 14 AWG 2.82 mm, 12 AWG 3.30 mm (NFPA 70 chapter 9 table 5, 0.111 and 0.130 in).
func TestSizeOfStockWirePicksStock(t *testing.T) {
	b := newBench(t, benchDesign)
	if err := enter(b, inputOf(b, "size", "L1"), "14"); err != nil {
		t.Fatal(err)
	}
	if p := section.Find(b.Document(), "L1"); p.Stock != "thhn-14" || p.Conductor != nil || p.Layers != nil {
		t.Errorf("8 AWG from stock in 14 became %+v", p)
	}
	if got := b.UndoName(); got != "size of L1" {
		t.Errorf("the step is called %q", got)
	}
	if err := enter(b, inputOf(b, "size", "L1"), "2.5 mm²"); err != nil {
		t.Fatal(err)
	}
	p := section.Find(b.Document(), "L1")
	if p.Stock != "" || p.Conductor == nil || p.Conductor.Size != "2.5 mm2" || p.Type != "thhn" || len(p.Layers) != 1 {
		t.Errorf("a size that no THHN is listed in became %+v", p)
	}
	if err := enter(b, inputOf(b, "type", "L2"), "XHHW-2"); err != nil {
		t.Fatal(err)
	}
	if q := spelled(b.Catalog(), *section.Find(b.Document(), "L2")); q.Type != "xhhw-2" || q.Conductor.Size != "8 AWG" || len(q.Layers) != 1 || q.Layers[0].Material == "pvc" {
		t.Errorf("another type became %+v", q)
	}
}

func TestInputsOfSeveralEditAll(t *testing.T) {
	b := newBench(t, benchDesign)
	in := inputOf(b, "current", "L1", "L10")
	if !in.mixed || in.text != "" {
		t.Errorf("different currents stand as %q, mixed %v", in.text, in.mixed)
	}
	if err := enter(b, in, "7"); err != nil {
		t.Fatal(err)
	}
	if b.current("L1") != "7" || b.current("L2") != "7" || b.current("L10") != "7" {
		t.Errorf("they carry %s, %s, %s", b.current("L1"), b.current("L2"), b.current("L10"))
	}
	if got := b.UndoName(); got != "current of motor-1, heater" {
		t.Errorf("the step is called %q", got)
	}
	if err := enter(b, inputOf(b, "size", "L1", "N1"), "10 AWG"); err != nil {
		t.Fatal(err)
	}
	if p, q := section.Find(b.Document(), "L1"), section.Find(b.Document(), "N1"); p.Stock != "thhn-10" || q.Conductor.Size != "10 AWG" {
		t.Errorf("sizes of both: %+v, %+v", p, q)
	}
	if inputNamed(inputsOf(b.Desk, []string{"L1", "F1"}), "size") != nil {
		t.Error("a wire and a rod have no size in common")
	}
}

func TestRenameKeepsLoadAndSelection(t *testing.T) {
	b := newBench(t, benchDesign)
	b.Select("L1")
	in := inputOf(b, "id", "L1")
	e := newFieldEntry(b.Desk, in)
	e.SetText("U")
	e.finish(fieldEntered)
	if l := section.LoadOf(b.Document(), "U"); l == nil || l.ID != "motor-1" {
		t.Error("the load does not follow the new id")
	}
	if !b.Selected("U") {
		t.Errorf("selected %v", b.Selection())
	}
}

// A part of a construction changes in every cable of it.
func TestNestedPartsEditTheirConstruction(t *testing.T) {
	b := newBench(t, `packrise: 1
surroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 9}
holder: {kind: jacket, inside_mm: 30}
builds:
  pair:
    holder: {kind: jacket, inside_mm: 8, layers: [{material: pvc, thickness_mm: 1}]}
    parts:
      - {id: A, kind: core, stock: thhn-12, at_mm: [-2, 0]}
      - {id: B, kind: core, stock: thhn-12, at_mm: [2, 0]}
parts:
  - {id: C1, kind: cable, build: pair, at_mm: [-6, 0]}
  - {id: C2, kind: cable, build: pair, at_mm: [6, 0]}
`)
	if err := enter(b, inputOf(b, "size", "C1/A"), "14"); err != nil {
		t.Fatal(err)
	}
	if got := section.Find(b.Document(), "C2/A").Stock; got != "thhn-14" {
		t.Errorf("the other cable's part is %q", got)
	}
	if err := enter(b, inputOf(b, "current", "C1/A"), "3"); err != nil {
		t.Fatal(err)
	}
	if b.current("C1/A") != "3" || b.current("C2/A") != "" {
		t.Errorf("currents %q and %q: they belong to the one cable", b.current("C1/A"), b.current("C2/A"))
	}
	if inputOf(b, "id", "C1/A") != nil {
		t.Error("a nested part's id is offered for renaming")
	}
}
