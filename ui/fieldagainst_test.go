package ui

import (
	"strings"
	"testing"

	"packrise/solver/section"
)

func TestRestsAgainst(t *testing.T) {
	k, _ := testDesk(t, testDesign())
	enterAll(t, k, []entered{
		{"against", "floor", "", "nothing, insulated, or the temperature", "nothing"},
		{"against", "insulated", "", "", "insulated"},
		{"against-share", "100 %", "", "no heat could leave", "25 %"},
		{"against-share", "1/8", "12.5 % of the way round", "", "12.5 %"},
		{"against-share", "0.3", "30 % of the way round", "", "30 %"},
		{"against-share", "120 %", "", "at most 1", "30 %"},
		{"against-share", "0", "", "above 0", "30 %"},
		{"against-at", "left", "180°", "", "to the left"},
		{"against-at", "−45°", "", "", "−45°"},
		{"against-at", "1000", "", "between −360°", "−45°"},
		{"against-at", "up", "", "below, above", "−45°"},
		{"against", "149 F", "held at 65 °C", "", "65 °C"},
	})
	want := section.Against{AtDeg: -45, Share: 0.3, Is: section.Side{Kind: section.SideFixed, FixedC: 65}}
	if a := k.Document().Surroundings.Against; a == nil || a.AtDeg != want.AtDeg || a.Share != want.Share || a.Is.Kind != want.Is.Kind || a.Is.FixedC-65 > 1e-9 {
		t.Errorf("%+v", a)
	}
	if k.UndoName() != "rests against" || !strings.Contains(toldOf(k), "30 % of its outside rests against something held at 65 °C, at −45°.") {
		t.Errorf("step %q:\n%s", k.UndoName(), toldOf(k))
	}
	if _, err := enterWhole(t, k, "against", "nothing"); err != nil || k.Document().Surroundings.Against != nil {
		t.Errorf("%v, %+v", err, k.Document().Surroundings.Against)
	}
}

// A wireway has sides instead, and changing to one lets go of what the outside rests against.
func TestAWirewayRestsAgainstNothing(t *testing.T) {
	k, _ := testDesk(t, testDesign())
	if _, err := enterWhole(t, k, "against", "40"); err != nil {
		t.Fatal(err)
	}
	if d := withHolderKind(k.Catalog(), k.Document(), section.Wireway); d.Surroundings.Against != nil {
		t.Error("a wireway rests against something")
	}
	for _, h := range k.Catalog().Holders() {
		if d := withHolder(k.Catalog(), k.Document(), h); (d.Surroundings.Against != nil) == (h.Kind == section.Wireway) {
			t.Fatalf("%s: %+v", h.ID, d.Surroundings.Against)
		}
	}
}
