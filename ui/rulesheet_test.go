package ui

import (
	"math"
	"strings"
	"testing"

	"packrise/solver/rating"
	"packrise/solver/rules"
	"packrise/solver/section"
	"packrise/solver/study"
)

func mustHave(t *testing.T, s string, wants ...string) {
	t.Helper()
	s = strings.ReplaceAll(s, noBreak, " ")
	for _, want := range wants {
		if !strings.Contains(s, want) {
			t.Errorf("it does not say %q but\n%s", want, s)
		}
	}
}

func TestRulesAreWrittenOutStepByStep(t *testing.T) {
	c := study.New(testCatalog()).Codes(demoDesign(t, "nine-in-emt.yaml"), "")
	// 8 AWG copper at 90 °C 55 A, 7–9 conductors 0.70: NEC table 310.16 and 310.15(C)(1), from memory
	mustHave(t, ruleText(ruleBlocks(c, nil)), "Counted: 9 current-carrying conductors.", "counts: A1, A2, A3 (line of pump-a)",
		"A1, A2, A3, B1, B2, B3, C1, C2, C3:\n", "55 A × 0.70 (7–9 current-carrying conductors, NEC 310.15(C)(1)) = 38.5 A", "permitted 38.5 A",
		"Inside a listed panel the panel's own standard rules", "Terminals\n", "NEC chapter 9")
	d := demoDesign(t, "nine-in-emt.yaml").With(func(d *section.Document) { d.Rules.Inside = section.InPanel })
	mustHave(t, ruleText(ruleBlocks(study.New(testCatalog()).Codes(d, ""), nil)), "This lies inside a listed panel", "Does not apply: ")
}

// invented: two conductors, one far from what is computed
func TestRulesAreComparedInAmperes(t *testing.T) {
	o := rules.Outcome{Rule: "r", Title: "A rule", Applies: true, Conductors: []rules.Rated{{ID: "L1", A: 38.5}, {ID: "L2", A: 20}}}
	r := &study.Ratings{Lowest: []study.Lowest{
		{ID: "L1", A: 30.09, Because: study.Computed, Text: "computed, to rely on", Computed: 30.09, Rules: map[string]float64{"r": 38.5}},
		{ID: "L2", A: 20, Because: "r", Text: "A rule", Computed: 21, Rules: map[string]float64{"r": 20}},
		{ID: "L3", A: math.NaN(), Computed: math.NaN()},
	}, Codes: &study.Codes{Outcomes: []rules.Outcome{o}}, Doc: testDesign(), Permits: study.Permits{Base: &rating.Result{}}}
	r.Faults = []study.SoftFault{{Load: "motor", A: 29, Governs: "L1", TempC: 95, LimitC: 90}}
	r.Protected = []rules.Protected{{Load: "motor", Checks: []rules.Check{
		{Text: "first", Known: true, Within: true}, {Text: "second", Known: true}, {Text: "third"}, {Text: "fourth", Known: true, NextSizeUp: true},
	}}, {Load: "other", Unknown: true}}
	mustHave(t, ruleText(ruleBlocks(r.Codes, r)),
		"Difference for L1: 38.5 A by this rule, 30 A computed, to rely on: the rule permits 8.5 A more, more than 20 % apart.",
		"Difference for L2: 20 A by this rule, 21 A computed, to rely on: the rule permits 1 A less.",
		"L1: 30 A (computed, to rely on).", "L2: 20 A (A rule).", "L3: nothing is known that limits it.",
		"motor: within: first.", "motor: over: second.", "motor: not known: third.", "motor: over, which the next standard size up lets stand: fourth.",
		"other: protection unknown; its permitted currents are not a device rating.", "motor: over: Should motor draw 29 A")
	var said string
	for _, m := range ratedRemarks(r) {
		said += m.text + "|" + m.label + "\n"
	}
	mustHave(t, said, "L1: 38.5 A by A rule against 30 A computed, to rely on: more than 20 % apart.|Show the rules", "second.|Show the rules", "Should motor draw 29 A")
	if strings.Contains(said, "L2:") || strings.Contains(said, "fourth") {
		t.Errorf("what stands is remarked on:\n%s", said)
	}
}

func TestRulesDialogNeedsNoRatings(t *testing.T) {
	w, l := testWindow(t, demoDesign(t, "nine-in-emt.yaml"), usualSize)
	w.asks.showRules()
	l.until(t, "the rules", func() bool { return strings.Contains(dialogText(w), "38.5 A") })
	answerDialog(t, w, "Copy as text")
	mustHave(t, w.app.Clipboard().Content(), "NEC table 310.16", "permitted 38.5 A", rating.Caution)
	w.desk.Apply(section.Edit{Name: "warm", Do: func(d *section.Document) *section.Document {
		return d.With(func(d *section.Document) { d.Surroundings.AmbientC = section.Some(45.0) })
	}}, false)
	// 41–45 °C, 90 °C column: 0.87, NEC table 310.15(B)(1)(1), from memory
	l.until(t, "the rules at 45 °C", func() bool { return strings.Contains(dialogText(w), "× 0.87") })
	w.hide()
}
