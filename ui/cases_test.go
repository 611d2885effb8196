package ui

import (
	"strings"
	"testing"

	"packrise/solver/section"
)

// enter puts a text into an input of a case, as one step.
func enterCase(t *testing.T, k *Desk, id, key, text string) error {
	t.Helper()
	for _, in := range caseInputs(k, id, func(string) {}) {
		if in.key == key {
			e, ok, err := in.edit(text)
			if ok {
				k.Apply(e, false)
			}
			return err
		}
	}
	t.Fatalf("no input %s", key)
	return nil
}

func TestCasesAreEditedStepByStep(t *testing.T) {
	w, l := testWindow(t, hotDesign(), usualSize)
	k := w.desk
	w.asks.showCases()
	mustHave(t, dialogText(w), "A case is one way in which the loads run together", "[Add]")
	answerDialog(t, w, "Add")
	id := k.Document().Cases[0].ID
	if k.UndoName() != "add case "+id {
		t.Errorf("adding is the step %q", k.UndoName())
	}
	for _, e := range [][2]string{{"case-ambient", "104F"}, {"case-load/a", "50 %"}, {"case-load/b", "off"}, {"case-load/c", "6 A"}} {
		before := k.Document()
		if err := enterCase(t, k, id, e[0], e[1]); err != nil {
			t.Errorf("%s %q: %v", e[0], e[1], err)
		}
		after := k.Document()
		k.Undo()
		if !section.Equal(k.Document(), before) {
			t.Errorf("%s is not one step", e[0])
		}
		k.Redo()
		if !section.Equal(k.Document(), after) {
			t.Errorf("%s does not come back", e[0])
		}
	}
	c := *section.CaseNamed(k.Document(), id)
	if c.AmbientC != section.Some(40.0) || len(c.Loads) != 3 || c.Loads[0] != (section.CaseLoad{Load: "a", CurrentA: 12}) || !c.Loads[1].Off || c.Loads[2].CurrentA != 6 {
		t.Errorf("the case is %+v", c)
	}
	if err := enterCase(t, k, id, "case-any/0", "1 of b, c"); err != nil {
		t.Error(err)
	}
	c = *section.CaseNamed(k.Document(), id)
	if len(c.Any) != 1 || c.Any[0].Count != 1 || len(c.Any[0].Of) != 2 || len(c.Loads) != 1 {
		t.Errorf("with a choice the case is %+v", c)
	}
	for _, p := range section.Check(k.Document()) {
		t.Errorf("the design has a problem: %v", p)
	}
	if err := enterCase(t, k, id, "case-name", "night"); err != nil || section.CaseNamed(k.Document(), "night") == nil {
		t.Errorf("renaming: %v, %+v", err, k.Document().Cases)
	}
	l.solved(t, k)
	answerDialog(t, w, "Remove")
	if len(k.Document().Cases) != 0 || k.UndoName() != "remove case night" {
		t.Errorf("removing leaves %+v, step %q", k.Document().Cases, k.UndoName())
	}
}

func TestCasesRefuseWhatCannotBe(t *testing.T) {
	d := hotDesign()
	d.Loads[2].CurrentA, d.Loads[2].Unknown = section.Opt[float64]{}, true
	d.Cases = []section.Case{{ID: "day", Any: []section.AnyOf{{Of: []string{"a", "b"}, Count: 1}}}, {ID: "night"}}
	k, _ := testDesk(t, d)
	for _, e := range [][3]string{
		{"case-any/1", "3 of c, c", "named twice"},
		{"case-any/1", "2 of c", "1 load"},
		{"case-any/1", "1 of a", "another choice"},
		{"case-any/1", "1 of pump", "no load pump"},
		{"case-any/1", "all of them", "write how many"},
		{"case-load/c", "50 %", "write amperes"},
		{"case-name", "night", "already"},
		{"case-name", "", "needs a name"},
	} {
		if err := enterCase(t, k, "day", e[0], e[1]); err == nil || !strings.Contains(err.Error(), e[2]) {
			t.Errorf("%s %q: %v", e[0], e[1], err)
		}
	}
	if err := enterCase(t, k, "day", "case-any/0", ""); err != nil || k.Document().Cases[0].Any != nil {
		t.Errorf("an empty choice leaves %+v, %v", k.Document().Cases[0], err)
	}
}

func TestCasesTellWhatTheyComeTo(t *testing.T) {
	d := hotDesign()
	d.Cases = []section.Case{{ID: "one", Any: []section.AnyOf{{Of: []string{"a", "b"}, Count: 1}}}, {ID: "warm", AmbientC: section.Some(45.0)}}
	w, _ := ratedWindow(t, d, usualSize)
	w.asks.showCases()
	mustHave(t, dialogText(w), "Case one (the worst of 2 choices, b off): F1 governs", "Case warm: F1 governs", "to rely on", "Case warm: L1 (", "F1 (")
	w.hide()
}
