package render

import (
	"math"
	"testing"

	"packrise/solver/section"
)

func TestScaleOf(t *testing.T) {
	one := func(temp, limit float64, governs bool) section.Reading {
		r := section.Reading{ID: "L1", Kind: section.Core, TempC: temp, Governs: governs}
		if limit > 0 {
			r.LimitC = section.Some(limit)
		}
		return r
	}
	for _, c := range []struct {
		name    string
		ambient float64
		rs      []section.Reading
		want    Scale
	}{
		{"hot", 30, []section.Reading{one(92, 90, true)}, Scale{30, 100}},
		{"limit near", 30, []section.Reading{one(78, 90, true)}, Scale{30, 90}},
		{"limit far", 30, []section.Reading{one(41, 90, true)}, Scale{30, 41}},
		{"nothing solved", 30, nil, Scale{30, 40}},
		{"tenths of a kelvin", 30, []section.Reading{one(30.4, 0, false)}, Scale{30, 40}},
		{"below ambient", 30, []section.Reading{one(12, 0, false), one(55, 0, false)}, Scale{10, 55}},
		{"frost", -40, []section.Reading{one(-5, 0, false)}, Scale{-40, -5}},
		{"no number", math.NaN(), nil, Scale{0, 100}},
	} {
		s := Scene{AmbientC: c.ambient, Readings: c.rs}
		if got := ScaleOf(s); math.Abs(got.Low-c.want.Low) > 1e-9 || math.Abs(got.High-c.want.High) > 1e-9 {
			t.Errorf("%s: %v, want %v", c.name, got, c.want)
		}
	}
}

func TestRoundNumbers(t *testing.T) {
	for _, c := range [][2]float64{{0.9, 1}, {1, 1}, {1.01, 2}, {3, 5}, {7, 10}, {0.03, 0.05}, {-1, 1}, {math.NaN(), 1}} {
		if got := roundStep(c[0]); math.Abs(got-c[1]) > 1e-12 {
			t.Errorf("step %g: %g, want %g", c[0], got, c[1])
		}
	}
	for _, c := range [][2]float64{{0.9, 0.5}, {1, 1}, {4.9, 2}, {5, 5}, {99, 50}, {0, 0}, {math.Inf(1), 0}, {math.NaN(), 0}} {
		if got := roundLength(c[0]); math.Abs(got-c[1]) > 1e-12 {
			t.Errorf("length %g: %g, want %g", c[0], got, c[1])
		}
	}
	if got := lengthText(0.5); got != "0.5 mm" {
		t.Error(got)
	}
	if got := len(levels(0, 1e9, 1)); got > 1000 {
		t.Errorf("%d levels", got)
	}
	if got := levels(-10, 10, 5); len(got) != 5 || got[0] != -10 || got[4] != 10 {
		t.Error(got)
	}
	for temp, want := range map[float64]string{-5: "−5", 0: "0", -0.2: "0", 89.6: "90"} {
		if got := wholeC(temp); got != want {
			t.Errorf("%g: %q", temp, got)
		}
	}
	if got := degrees(-7.5); got != "−7.5°" {
		t.Error(got)
	}
}

// A side that is held below the ambient is on the scale.
func TestScaleReachesToACoolSide(t *testing.T) {
	s := Scene{Field: &slab{60, 40, 12, 60}, AmbientC: 30, Shapes: []section.Shape{{Kind: section.Wireway, Width: 60, Height: 40}}}
	s.Readings = []section.Reading{{ID: "outside", Kind: "surface", TempC: 60}}
	if sc := ScaleOf(s); sc.Low > 12 || sc.Low < 5 || sc.High < 60 {
		t.Errorf("%+v for 12 to 60 °C", sc)
	}
	s.Field = nil
	if sc := ScaleOf(s); sc.Low < 25 {
		t.Errorf("%+v for 30 to 60 °C", sc)
	}
}
