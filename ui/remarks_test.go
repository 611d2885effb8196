package ui

import (
	"slices"
	"strings"
	"testing"

	"packrise/solver/section"
)

// remarked joins what is remarked on, with the parts that it selects.
func remarked(k *Desk) string {
	var s strings.Builder
	for _, r := range remarksOf(k) {
		s.WriteString(r.text + " [" + strings.Join(r.ids, " ") + "] " + r.label + "\n")
	}
	return s.String()
}

func TestRemarksSelectAndMend(t *testing.T) {
	d := hotDesign()
	d.Loads[2].CurrentA, d.Loads[2].Unknown = section.Opt[float64]{}, true
	d.DesignMarginK, d.Reasons = section.Some(0.0), []section.Reason{{For: section.ReasonMargin, Text: "measured on site"}}
	w, l := testWindow(t, d, usualSize)
	mustHave(t, remarked(w.desk), "1 conductor of unknown current left out, so that everything reads too cool: L3. [L3]",
		"Protection is unknown for a, c: permitted currents are not a device rating. [L1 L3]", "The design margin is 0 K: measured on site.")
	w.asks.showRemarks()
	mustHave(t, paneText(w), "Remarks", "Select L3", "Assumed or left out")
	tapWord(t, w, "Select L3")
	if !slices.Equal(w.desk.Selection(), []string{"L3"}) {
		t.Errorf("selected %v", w.desk.Selection())
	}
	w.desk.Apply(section.Edit{Name: "lift", Do: func(d *section.Document) *section.Document {
		return d.With(func(d *section.Document) {
			d.Parts = slices.Clone(d.Parts)
			d.Parts[0].At = section.Opt[section.Point]{}
		})
	}}, false)
	l.until(t, "the problem", func() bool { return strings.Contains(paneText(w), "Settle") })
	tapWord(t, w, "Settle")
	l.until(t, "settling", func() bool { return section.Find(w.desk.Document(), "L1").At.OK })
}

// tapWord taps a word of the pane.
func tapWord(t *testing.T, w *Window, text string) {
	t.Helper()
	for _, o := range w.asks.pane.column.Objects {
		if p, ok := o.(*prose); ok {
			for _, r := range p.runs {
				if r.text == text && r.tap != nil {
					r.tap()
					return
				}
			}
		}
	}
	t.Fatalf("no word %q in\n%s", text, paneText(w))
}

func TestRemarksOfRatings(t *testing.T) {
	w, _ := ratedWindow(t, hotDesign(), usualSize)
	mustHave(t, remarked(w.desk), "F1 governs and makes no heat of its own", "a heats and F1 suffers", "The breaker of b, 20 A, exceeds")
}

func TestNothingToRemark(t *testing.T) {
	d := testDesign()
	d.Loads[0].Protection = section.Protection{Kind: section.Breaker, RatingA: 16}
	d.Parts = d.Parts[:3]
	for i := range d.Parts {
		d.Parts[i].LimitC = section.Some(50.0) // below the jacket's, so that what carries a current governs
	}
	w, l := testWindow(t, d, usualSize)
	l.solved(t, w.desk)
	if s := remarked(w.desk); s != "" {
		t.Errorf("it remarks %q", s)
	}
}
