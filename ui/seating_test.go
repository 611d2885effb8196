package ui

import (
	"math"
	"strings"
	"testing"

	"packrise/solver/section"
	"packrise/solver/study"
)

func TestSeatingIsAppliedAsOneStep(t *testing.T) {
	d := hotDesign()
	d.Parts[2].At = section.Some(section.Point{X: 0, Y: 0}) // three in a row: the strongest load belongs at an end
	d.Loads[2].CurrentA, d.Loads[0].CurrentA = d.Loads[0].CurrentA, d.Loads[2].CurrentA
	w, l := testWindow(t, d, usualSize)
	before := w.desk.Document()
	w.asks.showSeating()
	mustHave(t, dialogText(w), "change places until no exchange gives more margin", "[Cancel]")
	l.until(t, "a seating", func() bool { return strings.Contains(dialogText(w), "[Apply]") })
	mustHave(t, dialogText(w), "As it is: ", "Random seatings: ", "in the worst of 400", "The best that was found: ", "would move", "3 conductors could change places, 1 could not")
	answerDialog(t, w, "Apply")
	if w.desk.UndoName() != "best seating" || section.Equal(w.desk.Document(), before) || w.dialog != nil {
		t.Errorf("Apply is the step %q", w.desk.UndoName())
	}
	w.undo()
	if !section.Equal(w.desk.Document(), before) || w.desk.UndoName() != "" {
		t.Error("one undo does not take it back")
	}
}

func TestSeatingEndsWithItsDialogAndItsDesign(t *testing.T) {
	w, l := testWindow(t, hotDesign(), usualSize)
	w.asks.showSeating()
	answerDialog(t, w, "Cancel")
	if w.asks.asker.now != nil || w.dialog != nil {
		t.Error("Cancel leaves the search running")
	}
	w.asks.showSeating()
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	mustHave(t, dialogText(w), "The design has changed", "[Ask again]")
	answerDialog(t, w, "Ask again")
	l.until(t, "a seating", func() bool { return strings.Contains(dialogText(w), "Random seatings") })
	w.hide()
}

func TestSeatingWords(t *testing.T) {
	if s := seatingWords(&study.Seating{Why: "there is nothing to swap"}); len(s) != 1 || s[0] != "There is nothing to swap." {
		t.Errorf("%q", s)
	}
	s := &study.Seating{Present: study.Seat{MarginK: -2.4, Governs: "L1", TempC: 92.4, Factor: 0.969}, MeanK: -1.2, WorstK: -7, Random: 400, Movable: 3, Fixed: 2, Searched: 1, Solved: 5}
	mustHave(t, strings.Join(seatingWords(s), "\n"), "−2 K of margin, L1 governs at 92 °C", "could be 96 %", "−1 K of margin on average, −7 K in the worst of 400", "leave it as it is", "1 seating estimated")
	if k := wholeKelvins(math.Inf(1)); k != "nothing" {
		t.Errorf("%q", k)
	}
}

func TestFitSaysWhatStopsFirst(t *testing.T) {
	d := hotDesign()
	w, l := testWindow(t, d, usualSize)
	w.asks.showFit()
	mustHave(t, dialogText(w), "Select one part first")
	w.desk.Select("L2")
	w.asks.showFit()
	l.until(t, "the answer", func() bool { return strings.Contains(dialogText(w), "By temperature: ") })
	mustHave(t, dialogText(w), "more like L2 fit. ", "stops first.", "By room: ")
	w.hide()
	f := &study.Fit{ID: "L2", N: 2, Stops: study.StopsRoom, Rule: study.HowMany{Text: "no rule here limits the fill"}, NextName: "EMT 1-1/4"}
	if s := strings.Join(fitText(f), " "); s != "2 more like L2 fit. Room stops first. By rule: no rule here limits the fill. Next size: EMT 1-1/4." {
		t.Errorf("it says %q", s)
	}
	f = &study.Fit{ID: "L2", Stops: study.StopsHeat}
	if s := fitText(f)[0]; s != "No more like L2 fit. Temperature stops first." {
		t.Errorf("it says %q", s)
	}
}
