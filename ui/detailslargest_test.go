package ui

import (
	"strings"
	"testing"

	"packrise/solver/study"
)

func TestDetailsTellTheLargestSum(t *testing.T) {
	b := newRatedBench(t, ratedDesign)
	d := NewDetails(b.Desk)
	b.show(d, 420, 900)
	b.Select()
	l := b.Ratings().Largest
	if l == nil || len(l.Rely.Loads) < 2 || len(l.Rely.Governs) == 0 {
		t.Fatalf("the design has no largest sum: %+v", l)
	}
	for _, a := range l.Rely.Loads {
		mustTell(t, d, a.ID+" "+study.Amps(a.A))
	}
	mustTell(t, d, "The loads together could carry most with ", ": "+study.Amps(l.Rely.Sum)+" in all, to rely on; then "+l.Rely.Governs[0],
		"Nominal, "+study.Amps(l.Nominal.Sum)+" in all.")
	b.Select("L1")
	if strings.Contains(told(d), "could carry most") {
		t.Error("the sum is told of a part")
	}
}

func TestDetailsRoundTheLargestSumDown(t *testing.T) {
	r := &study.Ratings{Largest: &study.Largest{Rely: study.Optimum{Sum: 24.29, Loads: []study.LoadAmperes{{ID: "motor", A: 18.09}, {ID: "heater", A: 6.209}}, Governs: []string{"L1"}}}}
	tell := func() string {
		s := &telling{ratings: r}
		s.largest()
		var text strings.Builder
		for _, p := range s.out {
			for _, u := range p {
				text.WriteString(strings.ReplaceAll(u.text, noBreak, " "))
			}
		}
		return text.String()
	}
	if got := tell(); !strings.Contains(got, "motor 18 A, heater 6.2 A: 24.2 A in all, to rely on; then L1 stands at its limit") {
		t.Errorf("it says %q", got)
	}
	r.Largest.Rely = study.Optimum{Hopeless: true}
	if got := tell(); got != strings.ReplaceAll(r.Largest.Rely.Sentence(), noBreak, " ") {
		t.Errorf("without hope it says %q", got)
	}
	r.Largest = nil
	if got := tell(); got != "" {
		t.Errorf("without a sum it says %q", got)
	}
}
