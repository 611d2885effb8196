package ui

import (
	"slices"
	"strings"
	"testing"

	"packrise/solver/rules"
	"packrise/solver/section"
)

func designInput(b *bench, key string) *input { return inputNamed(designInputs(b.Desk), key) }

func TestRatesInputs(t *testing.T) {
	b := newBench(t, benchDesign)
	for _, c := range []struct {
		key, text string
		of        func(*section.Document) any
		want      any
	}{
		{"margin", "5 K", func(d *section.Document) any { return d.DesignMarginK }, section.Some(5.0)},
		{"margin", "0 because it was measured", func(d *section.Document) any { return d.Reason(section.ReasonMargin) }, "it was measured"},
		{"rules", "nec-310, nec-ch9", func(d *section.Document) any { return d.Rules.Use }, []string{"nec-310", "nec-ch9"}},
		{"method", "c", func(d *section.Document) any { return d.Rules.Method }, "C"},
		{"lies-in", "inside a panel", func(d *section.Document) any { return d.Rules.Inside }, section.InPanel},
		{"arrangement", "one layer on a ladder or cleats", func(d *section.Document) any { return d.Rules.Arrangement }, section.LayerLadder},
		{"range-ambient", "±3", func(d *section.Document) any { return d.Ranges.AmbientK }, section.Some(3.0)},
		{"range-load", "5 %", func(d *section.Document) any { return d.Ranges.LoadPercent }, section.Some(5.0)},
		{"range-film", "25", func(d *section.Document) any { return d.Ranges.FilmPercent }, section.Some(25.0)},
		{"range-emissivity", "0.05", func(d *section.Document) any { return d.Ranges.Emissivity }, section.Some(0.05)},
		{"range-position", "0.5", func(d *section.Document) any { return d.Ranges.PositionMM }, section.Some(0.5)},
		{"range-clearance", "0.1–0.4", func(d *section.Document) any { return d.Ranges.ClearanceMM }, section.Some(section.Span{Low: 0.1, High: 0.4})},
	} {
		mustEnter(t, b, designInput(b, c.key), c.text, c.of, c.want)
	}
	for _, c := range [][3]string{
		{"margin", "0", "needs a reason"},
		{"margin", "-1", "not below zero"},
		{"rules", "nec-999", "there is no rule set"},
		{"method", "D7", "no reference method"},
		{"range-film", "200", "between 0 and 95"},
		{"range-clearance", "0.4–0.1", "the least and the largest"},
	} {
		if err := enter(b, designInput(b, c[0]), c[1]); err == nil || !strings.Contains(err.Error(), c[2]) {
			t.Errorf("%s %q: %v", c[0], c[1], err)
		}
	}
}

// The list of rules adds and takes out one at a time, under titles that people read.
func TestRulesArePickedOneByOne(t *testing.T) {
	b := newBench(t, benchDesign)
	pick := func(mark, id string) {
		t.Helper()
		info, ok := rules.Shipped().Info(id)
		in := designInput(b, "rules")
		choice := mark + info.Title
		if !ok || !slices.Contains(in.choices, choice) {
			t.Fatalf("%q is not offered of %q", choice, in.choices)
		}
		if err := enter(b, in, choice); err != nil {
			t.Fatal(err)
		}
		b.wait()
	}
	pick(addRule, "nec-310")
	pick(addRule, "iec-52")
	if got := b.Document().Rules.Use; !slices.Equal(got, []string{"nec-310", "iec-52"}) {
		t.Errorf("picked %v", got)
	}
	pick(dropRule, "nec-310")
	if got := b.Document().Rules.Use; !slices.Equal(got, []string{"iec-52"}) {
		t.Errorf("left %v", got)
	}
	if err := enter(b, designInput(b, "rules"), usualSet); err != nil || len(b.Document().Rules.Use) != 0 {
		t.Errorf("%v, %v", b.Document().Rules.Use, err)
	}
}

// Every range and margin is told under the title of permitted currents, with what holds while nobody has said anything.
func TestDetailsTellOfMarginRulesAndRanges(t *testing.T) {
	b := newBench(t, benchDesign)
	d := NewDetails(b.Desk)
	b.show(d, 420, 600)
	mustTell(t, d, "Permitted currents", "Kept below every limit: 10 K.", "Rules beside it: the usual ones; building wiring; method from the holder; bunched.",
		"Bands take as off: ambient ± 0 K, currents ± 0 %, film ± 15 %")
}
