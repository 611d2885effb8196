package ui

import (
	"testing"

	"packrise/solver/study"
)

// The heaters of the one selected conductor are in the scene; of none, of several, and within a drag nothing is.
func TestSceneShadesTheHeatersOfOnePart(t *testing.T) {
	k, l := testDeskWith(t, testDesign(), Rooms{Rate: rateOnce})
	var painted []string
	k.picture = func(Changed) bool {
		painted = append(painted, k.Scene().Heated)
		return false
	}
	k.Select("L1")
	l.until(t, "ratings", func() bool { return k.Ratings() != nil && !k.Rating() })
	if len(painted) == 0 || painted[len(painted)-1] != "L1" {
		t.Errorf("the picture is not told when the shares come: %q", painted)
	}
	h, ok := k.Ratings().Heaters.Of("L1")
	s := k.Scene()
	if !ok || s.Heated != "L1" || len(s.Heaters) == 0 {
		t.Fatalf("no shades: %q %v", s.Heated, s.Heaters)
	}
	for _, share := range h.Shares {
		want := share.Percent
		if share.From == "L1" || share.From == study.Around {
			want = 0
		}
		if s.Heaters[share.From] != want {
			t.Errorf("%s is shaded for %d %%, want %d", share.From, s.Heaters[share.From], want)
		}
	}
	none := func(when string) {
		t.Helper()
		if s := k.Scene(); s.Heated != "" || len(s.Heaters) > 0 {
			t.Errorf("shades %s", when)
		}
	}
	k.Select("L1", "L2")
	none("with two selected")
	k.Select()
	none("with nothing selected")
	k.Select("L1")
	k.Drag(moveTo("L1", -4.5, 0, k.NewGesture()))
	none("within a drag")
	l.until(t, "a frame", func() bool { return !k.Solving() })
	none("at a frame of a drag")
}
