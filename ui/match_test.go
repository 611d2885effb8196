package ui

import (
	"strings"
	"testing"

	"packrise/solver/section"
	"packrise/solver/study"
)

// enterMatch puts a text into an input of a measurement.
func enterMatch(t *testing.T, k *Desk, m *measured, key, text string) error {
	t.Helper()
	for _, in := range matchInputs(k, m, func() {}) {
		if in.key == key {
			e, ok, err := in.edit(text)
			if ok {
				k.Apply(e, false)
				in.then()
			}
			return err
		}
	}
	t.Fatalf("no input %s", key)
	return nil
}

func TestMeasurementIsADraftUntilItIsMatched(t *testing.T) {
	k, _ := testDesk(t, hotDesign())
	m, before := &measured{}, k.Document()
	if in := matchInputs(k, m, func() {})[0]; in.key != "along" {
		t.Errorf("the first question is %s", in.key)
	}
	for _, e := range [][2]string{
		{"along", "even"},
		{"place", "L1"},
		{"reading", "140F"},
		{"instrument", "0,95"},
		{"surface", "0.9"},
		{"reflected", "77 °F"},
		{"ambient-then", "25"},
		{"loaded-for", "2 h"},
		{"cover", "closed"},
		{"then-all", "50"},
		{"then/c", "off"},
		{"reason", "taped and read twice"},
	} {
		if err := enterMatch(t, k, m, e[0], e[1]); err != nil {
			t.Errorf("%s %q: %v", e[0], e[1], err)
		}
	}
	if k.Document() != before || k.UndoName() != "" {
		t.Error("entering a measurement changes the design")
	}
	want := section.Measurement{
		At: "L1", ReadingC: 60, InstrumentEmissivity: section.Some(0.95), SurfaceEmissivity: section.Some(0.9), ReflectedC: section.Some(25.0),
		AmbientC: section.Some(25.0), LoadedForMin: section.Some(120.0), Along: section.Even, Cover: section.Closed,
	}
	got := m.Measurement
	got.Loads = nil
	if got.ReadingC < 59.999 || got.ReadingC > 60.001 || got.At != want.At || got.InstrumentEmissivity != want.InstrumentEmissivity || got.SurfaceEmissivity != want.SurfaceEmissivity ||
		got.ReflectedC != want.ReflectedC || got.AmbientC != want.AmbientC || got.LoadedForMin != want.LoadedForMin || got.Along != want.Along || got.Cover != want.Cover {
		t.Errorf("it is %+v", got)
	}
	if l := m.Loads; len(l) != 3 || l[0] != (section.CaseLoad{Load: "a", CurrentA: 12}) || l[1].CurrentA != 9 || !l[2].Off {
		t.Errorf("loads %+v", l)
	}
	if err := enterMatch(t, k, m, "instrument", ""); err != nil || m.SurfaceEmissivity.OK || m.ReflectedC.OK {
		t.Error("a contact thermometer keeps emissivities")
	}
	for _, e := range [][2]string{{"instrument", "1.2"}, {"place", "L9"}, {"along", "perhaps"}, {"loaded-for", "-3"}, {"reading", "warm"}} {
		if err := enterMatch(t, k, m, e[0], e[1]); err == nil {
			t.Errorf("%s takes %q", e[0], e[1])
		}
	}
}

func TestMatchAnswersInSentences(t *testing.T) {
	w, l := testWindow(t, hotDesign(), usualSize)
	w.desk.Select("L1")
	w.asks.showMatch()
	mustHave(t, dialogText(w), "Isolate, prove dead", "covers off", "reads a surface")
	answerDialog(t, w, "Match")
	mustHave(t, dialogText(w), "Enter the reading.")
	if w.desk.UndoName() != "" {
		t.Errorf("a measurement without a reading is the step %q", w.desk.UndoName())
	}
	s := matchSheetOf(w)
	r, _ := w.desk.Result()
	s.m.ReadingC, s.m.read = r.Conductors[0].TempC, true
	answerDialog(t, w, "Match")
	if w.desk.UndoName() != "measurement M1" || len(w.desk.Document().Measurements) != 1 {
		t.Errorf("matching is the step %q", w.desk.UndoName())
	}
	l.until(t, "the match", func() bool { return strings.Contains(dialogText(w), "explains the reading") })
	mustHave(t, dialogText(w), "The surface at L1 was at", "Is the heat even along the wire", "How long had it been loaded", "At the design's loads F1 governs", "To rely on after this measurement: 10")
	s.m.Along, s.m.read = section.FallsOff, false
	s.match()
	mustHave(t, dialogText(w), "as it does from a joint")
	w.hide()
	w.desk.Undo()
	if len(w.desk.Document().Measurements) != 0 {
		t.Error("undo keeps the measurement")
	}
}

// matchSheetOf is the sheet of the open dialog.
func matchSheetOf(w *Window) *matchSheet { return w.asks.matching }

func TestMatchBlocksTellAFit(t *testing.T) {
	m := &study.Match{
		At: "L1", Found: study.Fitted, SurfaceC: 61.4, ComputedC: 55, LowC: 50.2, HighC: 60.1, What: "mean clearance", Value: 0.313, Low: 0, High: 0.5, Wide: true,
		Governs: "L2", FullC: 79, FullFittedC: 86.2, Questions: []string{"How long?"}, Remarks: []string{"A remark."}, Reason: "read twice",
	}
	m.Before.Rely.Factor, m.After.Rely.Factor = 0.969, 0.91
	mustHave(t, ruleText(matchBlocks(m)), "The surface at L1 was at 61 °C. Computed for that time: 55 °C (50–61).", "0.31 mm of mean clearance (plausible: 0 to 0.5 mm)",
		"At so light a load", "L2 governs: 79 °C as computed, 86 °C with the fit.", "91 % of every current as it is written (96 % before)", "read twice.", "How long?", "A remark.")
	m.What, m.Value, m.Low, m.High = "film outside", 1.2, 0.6, 1.6
	mustHave(t, ruleText(matchBlocks(m)), "1.2 times the formulas' film outside (plausible: 0.6 to 1.6)")
}
