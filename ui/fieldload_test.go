package ui

import (
	"reflect"
	"strings"
	"testing"

	"packrise/solver/section"
)

// mustEnter enters a text and undoes it again: each input is one undo step.
func mustEnter(t *testing.T, b *bench, in *input, text string, want func(*section.Document) any, value any) {
	t.Helper()
	if in == nil {
		t.Fatal("no such input")
	}
	key, before := in.key, b.Document()
	if err := enter(b, in, text); err != nil {
		t.Errorf("%s %q: %v", key, text, err)
		return
	}
	if got := want(b.Document()); !reflect.DeepEqual(got, value) {
		t.Errorf("%s %q: %v, want %v", key, text, got, value)
	}
	b.Undo()
	if b.Document() != before {
		t.Errorf("%s %q is not one undo step", key, text)
	}
}

func TestLoadInputs(t *testing.T) {
	b := newBench(t, benchDesign)
	load := func(of func(*section.Load) any) func(*section.Document) any {
		return func(d *section.Document) any { return of(section.LoadNamed(d, "motor-1")) }
	}
	device := load(func(l *section.Load) any { return l.Protection })
	terminals := load(func(l *section.Load) any { return l.Terminals })
	for _, c := range []struct {
		key, text string
		of        func(*section.Document) any
		want      any
	}{
		{"device", "breaker 40", device, section.Protection{Kind: section.Breaker, RatingA: 40}},
		{"device", "63 A fuse", device, section.Protection{Kind: section.Fuse, RatingA: 63}},
		{"device", "Motor-breaker 9A", device, section.Protection{Kind: section.MotorBreaker, RatingA: 9}},
		{"continuous", "yes", load(func(l *section.Load) any { return l.Continuous }), true},
		{"motor", "yes", load(func(l *section.Load) any { return l.Motor }), true},
		{"system", "three-phase", load(func(l *section.Load) any { return l.System }), section.ThreePhase},
		{"system", "dc", load(func(l *section.Load) any { return l.System }), section.DC},
		{"neutral", "N1", load(func(l *section.Load) any { return l.Neutral }), "N1"},
		{"terminal", "167F", terminals, section.Terminals{RatingC: section.Some(75.0)}}, // 75 °C = 167 °F
		{"terminal-current", "41 A", terminals, section.Terminals{RatedA: section.Some(41.0)}},
		{"not-with", "heater", load(func(l *section.Load) any { return l.NotWith }), []string{"heater"}},
		{"role", "signal", func(d *section.Document) any { return section.Find(d, "L1").Role }, section.RoleSignal},
		{"pinned", "stays", func(d *section.Document) any { return section.Find(d, "L1").Pinned }, true},
		{"group", "left", func(d *section.Document) any { return section.Find(d, "L1").Group }, "left"},
	} {
		mustEnter(t, b, inputOf(b, c.key, "L1"), c.text, c.of, c.want)
	}
}

func TestLoadInputsRefuse(t *testing.T) {
	b := newBench(t, benchDesign)
	for _, c := range [][3]string{
		{"device", "breaker", "how many amperes"},
		{"device", "relay 5", "is no kind of device"},
		{"neutral", "F1", "there is no conductor"},
		{"not-with", "motor-1", "there is no other circuit"},
		{"terminal-current", "0", "more than nothing"},
		{"system", "two phase", "isn't one of the words"},
	} {
		was := b.Document()
		if err := enter(b, inputOf(b, c[0], "L1"), c[1]); err == nil || !strings.Contains(err.Error(), c[2]) || b.Document() != was {
			t.Errorf("%s %q: %v", c[0], c[1], err)
		}
	}
	if inputOf(b, "device", "N1") != nil {
		t.Error("a conductor in no load has a device")
	}
	if inputOf(b, "trips", "L1") != nil {
		t.Error("an unknown device trips at something")
	}
}

// A device keeps its tripping current while its rating changes, and loses it with its kind.
func TestDeviceKeepsWhenItTrips(t *testing.T) {
	b := newBench(t, ratedDesign)
	of := func() section.Protection { return section.LoadNamed(b.Document(), "lamp").Protection }
	for _, step := range []struct {
		key, text string
		want      section.Protection
	}{
		{"trips", "130 %", section.Protection{Kind: section.Breaker, RatingA: 10, TripsAt: section.Some(1.3)}},
		{"device", "breaker 16", section.Protection{Kind: section.Breaker, RatingA: 16, TripsAt: section.Some(1.3)}},
		{"device", "fuse 16", section.Protection{Kind: section.Fuse, RatingA: 16}},
		{"device", "unknown", section.Protection{}},
	} {
		if err := enter(b, inputOf(b, step.key, "N1"), step.text); err != nil || of() != step.want {
			t.Errorf("%s %q: %+v, %v", step.key, step.text, of(), err)
		}
		b.wait()
	}
}

// A limit above the catalogue's asks for its reason in the sentence, and is rated once it is there.
func TestRaisedLimitAsksForItsReason(t *testing.T) {
	b := newRatedBench(t, strings.Replace(ratedDesign, "{id: L1, kind: core, stock: thhn-8,", "{id: L1, kind: core, stock: thhn-8, limit_c: 105,", 1))
	d := NewDetails(b.Desk)
	b.show(d, 420, 600)
	b.Select("L1")
	if b.Ratings() != nil || len(b.RatingRefusal()) == 0 {
		t.Fatal("a limit raised for no reason is rated")
	}
	mustTell(t, d, "Its limit is above the catalogue's because no reason given.", "No permitted currents: ", "write the reason with each, or lower it")
	if err := enter(b, inputOf(b, "limit-reason", "L1"), "tested by the maker"); err != nil {
		t.Fatal(err)
	}
	b.rated()
	mustTell(t, d, "Its limit is above the catalogue's because tested by the maker.")
	if b.Ratings() == nil || b.Document().LimitReason("L1") != "tested by the maker" {
		t.Errorf("not rated: %v", b.RatingRefusal())
	}
	if inputOf(b, "limit-reason", "L2") != nil {
		t.Error("a limit of the catalogue asks for a reason")
	}
}
