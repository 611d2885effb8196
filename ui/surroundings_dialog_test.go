package ui

import (
	"slices"
	"testing"

	"packrise/solver/section"
)

// enterText puts a text into an input of the surroundings and reports whether it was taken.
func enterText(t *testing.T, k *Desk, key, text string) error {
	t.Helper()
	all := surroundingsInputs(k)
	i := slices.IndexFunc(all, func(in *input) bool { return in.key == key })
	if i < 0 {
		t.Fatalf("no input %q in %s", key, k.Document().Surroundings.Kind)
	}
	e, ok, err := all[i].edit(text)
	if ok {
		k.Apply(e, false)
	}
	return err
}

// TestEveryKindOfSurroundingsIsSound chooses each kind after each other: what is left must be a document that can be read back and solved.
func TestEveryKindOfSurroundingsIsSound(t *testing.T) {
	k, l := testDesk(t, testDesign())
	for _, from := range surroundingsKinds {
		for _, to := range surroundingsKinds {
			for _, kind := range []choice{from, to} {
				if err := enterText(t, k, "surroundings", kind.word); err != nil {
					t.Fatal(err)
				}
			}
			data, err := section.Write(k.Document())
			if err != nil {
				t.Fatal(err)
			}
			if d, problems := section.Read(data); d == nil || d.Surroundings.Kind != to.kind {
				t.Errorf("from %s to %s: %v", from.word, to.word, problems)
			}
		}
		if testing.Short() {
			continue
		}
		l.solved(t, k)
		if r, fresh := k.Result(); !fresh || len(refusedOf(k.Problems())) > 0 {
			t.Errorf("%s: no answer (%v), %v", k.Document().Surroundings.Kind, r, k.Problems())
		}
	}
}

func TestSurroundingsNumbers(t *testing.T) {
	k, _ := testDesk(t, testDesign())
	if err := enterText(t, k, "surroundings", "still air"); err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		key, text string
		want      section.Opt[float64]
		of        func(*section.Surroundings) *section.Opt[float64]
		refused   bool
	}{
		{"altitude", "12 km", section.Opt[float64]{}, func(s *section.Surroundings) *section.Opt[float64] { return &s.AltitudeM }, true},
		{"altitude", "40000 ft", section.Some(12192.0), func(s *section.Surroundings) *section.Opt[float64] { return &s.AltitudeM }, false},
		{"altitude", "99999", section.Some(12192.0), func(s *section.Surroundings) *section.Opt[float64] { return &s.AltitudeM }, true},
		{"altitude", "", section.Opt[float64]{}, func(s *section.Surroundings) *section.Opt[float64] { return &s.AltitudeM }, false},
		{"radiant", "104F", section.Some(40.0), func(s *section.Surroundings) *section.Opt[float64] { return &s.RadiantC }, false},
		{"sun", "1000 W/m²", section.Some(1000.0), func(s *section.Surroundings) *section.Opt[float64] { return &s.SunWM2 }, false},
		{"sun", "-5", section.Some(1000.0), func(s *section.Surroundings) *section.Opt[float64] { return &s.SunWM2 }, true},
		{"sun", "noon", section.Some(1000.0), func(s *section.Surroundings) *section.Opt[float64] { return &s.SunWM2 }, true},
	} {
		err := enterText(t, k, c.key, c.text)
		s := k.Document().Surroundings
		got := *c.of(&s)
		if (err != nil) != c.refused {
			t.Errorf("%s %q: %v", c.key, c.text, err)
		}
		if got.OK != c.want.OK || got.V-c.want.V > 1e-6 || c.want.V-got.V > 1e-6 {
			t.Errorf("%s %q: %v, want %v", c.key, c.text, got, c.want)
		}
	}
}

func TestVerticalRunHasAHeight(t *testing.T) {
	k, _ := testDesk(t, testDesign())
	for _, c := range [][2]string{{"surroundings", "still air"}, {"run", "vertical"}, {"height", "2 m"}, {"wet", "wet"}} {
		if err := enterText(t, k, c[0], c[1]); err != nil {
			t.Fatal(err)
		}
	}
	if s := k.Document().Surroundings; s.Run != section.Vertical || s.HeightM != section.Some(2.0) || !s.Wet {
		t.Errorf("%+v", s)
	}
	if err := enterText(t, k, "run", "horizontal"); err != nil {
		t.Fatal(err)
	}
	if s := k.Document().Surroundings; s.Run != "" || s.HeightM.OK {
		t.Errorf("%+v", s)
	}
}
