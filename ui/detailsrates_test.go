package ui

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"

	"packrise/solver/quantity"
	"packrise/solver/study"
)

func TestDetailsTellWhatAConductorMayCarry(t *testing.T) {
	b := newRatedBench(t, ratedDesign)
	d := NewDetails(b.Desk)
	b.show(d, 420, 900)
	b.Select("L1")
	r := b.Ratings()
	i := indexIn(r.Base, "L1")
	a := r.Alone[i]
	factor := 36 * r.All.Rely.Factor / a.Three.RelyA
	mustTell(t, d, "What it may carry (not a device rating)",
		"With all loads scaled together: rely on "+study.Amps(36*r.All.Rely.Factor)+", nominal "+study.Amps(36*r.All.Nominal.Factor),
		"Its load alone changed, the others as they are: rely on ", "Alone here: rely on "+study.Amps(a.One.RelyA),
		"Three of it loaded here: rely on "+study.Amps(a.Three.RelyA),
		"Grouping factor "+quantity.Fixed(quantity.RoundDown(factor, 2), 2)+" against three loaded here",
		"The lowest: "+study.Amps(r.Lowest[i].A), "It is protected by unknown.", "it makes itself")
	if factor <= 0 || factor >= 1 {
		t.Errorf("a grouping factor of %g", factor)
	}
	b.Select("N1")
	mustTell(t, d, "What it may carry\n", "It is protected by breaker 10 A, which trips at 1.45 × that, usual of its kind.", "10 A is the rating of its device",
		"Should lamp draw 14.5 A, its conventional tripping current (assumed for its kind), with the rest at load", "made for 24 A")
	b.Select("F1")
	low, high, _ := r.Band(indexIn(r.Base, "F1"))
	mustTell(t, d, "°C ("+bandWords(low, high)+")")
	b.Select()
	mustTell(t, d, "Of the currents as written, all together, "+study.Percent(r.All.Rely.Factor)+" may be relied on, "+study.Percent(r.All.Nominal.Factor)+" nominal")
}

// What is being typed stays where it is while ratings come above it.
func TestDetailsHoldStillWhileTyping(t *testing.T) {
	f := newFakeRater()
	k, l := testDeskWith(t, testDesign(), Rooms{Rate: f.rate})
	l.solved(t, k)
	d := NewDetails(k)
	w := test.NewTempWindow(t, d)
	w.Resize(fyne.NewSize(420, 400))
	k.Select("L1")
	e := d.known["y"].entry
	w.Canvas().Focus(e)
	where := func() float32 { return d.known["y"].Position().Y - d.scroll.Offset.Y }
	was, before := where(), told(d)
	f.next <- study.StageBands
	l.until(t, "ratings", func() bool { return k.Ratings() != nil })
	if told(d) == before || !strings.Contains(told(d), "rely on") {
		t.Fatalf("nothing came:\n%s", told(d))
	}
	if got := where(); got != was {
		t.Errorf("the field went from %v to %v", was, got)
	}
}
