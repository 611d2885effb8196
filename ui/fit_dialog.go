package ui

import (
	"context"
	"strings"

	"fyne.io/fyne/v2"

	"packrise/solver/section"
	"packrise/solver/study"
)

// showFit asks how many more of the selected part fit.
func (a *asks) showFit() {
	id := a.fitOf()
	if id == "" {
		a.w.showMessage("How many more fit", "Select one part first: the question is how many more like it go in.")
		return
	}
	a.askIn("How many more like "+id+" fit", fyne.NewSize(560, 340), &askSheet{
		before: "More and more like " + id + " are put in, each loaded like it, until a rule, the room or a temperature stops them …",
		work: func(ctx context.Context, s *study.Study, d *section.Document, o study.Options) (any, error) {
			return s.Fit(ctx, d, nil, id, o)
		},
		answered: func(answer any) ([]string, []fyne.CanvasObject) {
			f := answer.(*study.Fit)
			text := fitText(f)
			if f.N <= 0 || f.Doc == nil {
				return text, nil
			}
			return text, []fyne.CanvasObject{a.applyButton("Put in "+written(float64(f.N)), "put in "+written(float64(f.N))+" more like "+id, f.Doc)}
		},
	})
}

// fitOf is the part of the top level that is selected, "" where it is not one.
func (a *asks) fitOf() string {
	if s := topsOf(a.w.desk.Selection()); len(s) == 1 {
		return s[0]
	}
	return ""
}

// fitText says how many more fit and what stops them first, a sentence each.
func fitText(f *study.Fit) []string {
	by := map[string]string{study.StopsRule: "The rule's fill stops first.", study.StopsRoom: "Room stops first.", study.StopsHeat: "Temperature stops first."}
	n := "No"
	if f.N > 0 {
		n = written(float64(f.N))
	}
	out := []string{strings.TrimSpace(n + " more like " + f.ID + " fit. " + by[f.Stops])}
	for _, m := range []struct {
		name string
		of   study.HowMany
	}{{"By rule", f.Rule}, {"By room", f.Room}, {"By temperature", f.Heat}} {
		if m.of.Text != "" {
			out = append(out, m.name+": "+fullStop(m.of.Text))
		}
	}
	if f.NextName != "" {
		out = append(out, "Next size: "+f.NextName+".")
	}
	return out
}
