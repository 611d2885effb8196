package ui

import (
	"context"
	"slices"
	"strconv"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/widget"

	"packrise/solver/quantity"
	"packrise/solver/section"
	"packrise/solver/study"
)

// matchSheet is the dialog that matches one measurement.
type matchSheet struct {
	a     *asks
	m     measured
	sheet *inputSheet
	found *findings
	bar   *widget.ProgressBar
	asked *question
}

// showMatch asks about a measurement and fits the section to it.
func (a *asks) showMatch() {
	k := a.w.desk
	s := &matchSheet{a: a, found: newFindings(), bar: widget.NewProgressBar()}
	a.matching = s
	s.begin("")
	if list := k.Document().Measurements; len(list) > 0 {
		s.begin(list[0].ID)
	}
	sheet, fields := newInputSheet(k, func(k *Desk) []*input { return matchInputs(k, &s.m, func() { s.sheet.follow() }) })
	s.sheet = sheet
	sheet.follow()
	left := fyne.CanvasObject(fields)
	if list := k.Document().Measurements; len(list) > 0 {
		left = container.NewBorder(s.pick(list), nil, nil, nil, fields)
	}
	s.found.say(matchReminders())
	d := dialog.NewCustomWithoutButtons("Match a measurement", twoSides(left, s.found.scroll), a.w.win)
	match := widget.NewButton("Match", s.match)
	match.Importance = widget.HighImportance
	d.SetButtons([]fyne.CanvasObject{widget.NewButton("Close", a.w.hide), match})
	a.w.show(d, fyne.NewSize(940, 620))
	a.w.closing(d, func() { a.asker.withdraw(s.asked) })
}

const newMeasurement = "a new measurement"

// pick chooses among the design's measurements.
func (s *matchSheet) pick(list []section.Measurement) *widget.Select {
	names := []string{}
	for i := range list {
		names = append(names, list[i].ID)
	}
	p := widget.NewSelect(append(names, newMeasurement), nil)
	p.SetSelected(s.m.ID)
	p.OnChanged = func(id string) {
		if id == newMeasurement {
			id = ""
		}
		s.begin(id)
		s.sheet.follow()
		s.found.say(matchReminders())
	}
	return p
}

// begin takes up a measurement of the design, or a new one.
func (s *matchSheet) begin(id string) {
	d := s.a.w.desk.Document()
	s.m = measured{}
	if i := slices.IndexFunc(d.Measurements, func(m section.Measurement) bool { return m.ID == id }); i >= 0 && id != "" {
		s.m = measured{Measurement: d.Measurements[i], read: true, reason: d.Reason(section.ReasonMeasurement + id)}
		return
	}
	for n := 1; ; n++ {
		s.m.ID = "M" + strconv.Itoa(n)
		if !slices.ContainsFunc(d.Measurements, func(m section.Measurement) bool { return m.ID == s.m.ID }) {
			break
		}
	}
	if sel := s.a.w.desk.Selection(); len(sel) == 1 {
		s.m.At = sel[0]
	}
}

// match writes the measurement into the design, as one step, and asks what it says.
func (s *matchSheet) match() {
	s.a.w.win.Canvas().Unfocus() // what is being typed is entered
	if s.m.Along == section.FallsOff && s.m.missing() != "" {
		s.found.say([]ruleBlock{{"", []string{"The heat falls off along the wire, as it does from a joint: isolate, prove dead and inspect the joint. Grouping does not explain it, so nothing is fitted."}}})
		return
	}
	if why := s.m.missing(); why != "" {
		s.found.say(append([]ruleBlock{{"", []string{why}}}, matchReminders()...))
		return
	}
	k, m, reason := s.a.w.desk, s.m.Measurement, s.m.reason
	k.Apply(section.Edit{Name: "measurement " + m.ID, Object: m.ID, Do: func(d *section.Document) *section.Document {
		return section.SetReason(section.SetMeasurement(d, m), section.ReasonMeasurement+m.ID, reason)
	}}, false)
	s.bar.SetValue(0)
	stop := widget.NewButton("Cancel", func() { s.a.asker.withdraw(s.asked) })
	s.found.say([]ruleBlock{{"", []string{"The section is being solved as it was at the reading …"}}}, s.bar, container.NewHBox(stop))
	s.asked = s.a.asker.ask(question{
		work: func(ctx context.Context, st *study.Study, d *section.Document, o study.Options) (any, error) {
			return st.Match(ctx, d, m.ID, o)
		},
		told: forward(s.bar.SetValue),
		then: func(answer any, err error) {
			if err != nil {
				s.found.say(append([]ruleBlock{{"Not matched", []string{askWords(err)}}}, matchReminders()...))
				return
			}
			s.found.say(append(matchBlocks(answer.(*study.Match)), matchReminders()...))
		},
		drop: func() {
			s.found.say(append([]ruleBlock{{"", []string{"Stopped: the design has changed, or the question was cancelled. Press Match to ask again."}}}, matchReminders()...))
		},
	})
}

// matchReminders stand beside every measurement.
func matchReminders() []ruleBlock {
	return []ruleBlock{{"Before you touch anything", []string{
		"Isolate, prove dead and secure against switching on again before a cover is opened or a wire is touched.",
		"With covers off the picture is no longer that of the closed section: what lies behind them cools at once.",
		"A thermometer reads a surface. The core under it is hotter.",
	}}}
}

// matchBlocks say what a measurement means for the section.
func matchBlocks(m *study.Match) []ruleBlock {
	main := ruleBlock{title: "What the reading says"}
	if m.Found != study.Joint {
		main.add(
			"The surface at " + m.At + " was at " + wholeC(m.SurfaceC) + ". Computed for that time: " + wholeC(m.ComputedC) + " (" + bandWords(m.LowC, m.HighC) + ").")
		switch m.Found {
		case study.Explained:
			main.add("The section as it stands explains the reading.")
		case study.Fitted:
			main.add("The reading comes out with " + fitWords(m) + ".")
		}
		if m.Wide {
			main.add("At so light a load the fit says little.")
		}
		if m.Governs != "" {
			t := "At the design's loads " + m.Governs + " governs: " + wholeC(m.FullC) + " as computed"
			if m.Found == study.Fitted {
				t += ", " + wholeC(m.FullFittedC) + " with the fit"
			}
			main.add(t + ".")
		}
		main.add("To rely on after this measurement: " + study.Percent(m.Rely()) + " of every current as it is written (" + study.Percent(m.Before.Rely.Factor) + " before).")
		if m.Reason != "" {
			main.add("Reason for taking it: " + fullStop(m.Reason))
		}
	}
	main.add(m.Remarks...)
	blocks := []ruleBlock{main}
	if len(m.Questions) > 0 {
		blocks = append(blocks, ruleBlock{"Not said yet", m.Questions})
	}
	return blocks
}

// fitWords name what was fitted, its value and plausible range.
func fitWords(m *study.Match) string {
	unit, of := "", "times the formulas' "+m.What
	if m.What == "mean clearance" {
		unit, of = "mm", "of "+m.What
	}
	return withUnit(quantity.Trimmed(m.Value, 2), unit) + " " + of + " (plausible: " + quantity.Trimmed(m.Low, 2) + " to " + withUnit(quantity.Trimmed(m.High, 2), unit) + ")"
}

func wholeC(t float64) string { return withUnit(quantity.Trimmed(t, 0), "°C") }
