package section

import (
	"testing"

	"pgregory.net/rapid"
)

// TestSurround: from any kind to any other no key is left that does not belong, and what belongs to both stays.
func TestSurround(t *testing.T) {
	kinds := []string{StillAir, MovingAir, FixedFilm, FixedWall, Buried, Water, Vacuum, Insulation}
	rapid.Check(t, func(t *rapid.T) {
		d := maker{t}.document()
		d.Parts, d.Loads, d.Builds = nil, nil, nil
		d = tidy(d)
		kind := rapid.SampledFrom(kinds).Draw(t, "kind")
		got := Surround(d, kind, func(s *Surroundings) {
			s.FilmWM2K, s.AirSpeedMS, s.DepthM, s.SoilWMK = Opt[float64]{}, Opt[float64]{}, Opt[float64]{}, Opt[float64]{}
			switch kind {
			case FixedFilm:
				s.FilmWM2K = Some(9.0)
			case MovingAir:
				s.AirSpeedMS = Some(1.0)
			case Buried:
				s.DepthM, s.SoilWMK = Some(0.7), Some(1.0)
			case Insulation:
				s.Wrap = &Layer{Material: "mineral-wool", ThicknessMM: 20}
			}
		})
		if p := Check(got); len(p) > 0 {
			t.Fatal(p)
		}
		was, is := d.Surroundings, got.Surroundings
		if is.Kind != kind || is.AmbientC != was.AmbientC {
			t.Fatalf("%+v", is)
		}
		for _, k := range []string{StillAir, MovingAir, Insulation} {
			if kind == k && was.AltitudeM.OK && is.AltitudeM != was.AltitudeM {
				t.Fatalf("the altitude is gone: %+v", is)
			}
		}
		if same := Surround(got, kind, nil); same.Surroundings != is {
			t.Fatal("the same kind changes something")
		}
	})
}
