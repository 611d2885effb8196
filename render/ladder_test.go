package render

import (
	"math"
	"strings"
	"testing"

	"packrise/solver/section"
)

func rungsOf(s Scene, w, h float64, st Style) ([]Rung, string) {
	r := NewRecorder(w, h)
	return Ladder(r, s, ScaleOf(s), st), r.String()
}

func TestLadderRungs(t *testing.T) {
	for name, s := range map[string]Scene{"hex7": hexScene(7), "hex200": hexScene(200), "over": overScene(), "nested": nestedScene(), "one": oneScene()} {
		for _, size := range [][2]float64{{210, 480}, {132, 150}, {150, 900}} {
			for _, k := range []float64{1, 2} {
				rungs, _ := rungsOf(s, size[0]*k, size[1]*k, Style{Scale: k})
				seen := map[string]int{}
				for i, r := range rungs {
					for _, id := range r.IDs {
						seen[id]++
					}
					if r.Y1-r.Y0 < 12*k || r.Y0 < 0 || r.Y1 > size[1]*k+8*k {
						t.Errorf("%s %v: rung %v", name, size, r)
					}
					if i > 0 && r.Y0 < rungs[i-1].Y1-1e-9 && size[1] > 200 {
						t.Errorf("%s %v: rungs %v and %v overlap", name, size, rungs[i-1], r)
					}
				}
				for _, r := range s.Readings {
					if seen[r.ID] != 1 {
						t.Errorf("%s %v: %s stands on %d rungs", name, size, r.ID, seen[r.ID])
					}
				}
			}
		}
	}
}

func TestLadderFoldsEqualParts(t *testing.T) {
	s := hexScene(9)
	for i := range s.Readings {
		r := &s.Readings[i]
		if r.Kind == section.Core {
			r.TempC = 88.2
			if r.Governs || r.Hottest {
				r.TempC, r.Governs, r.Hottest = 92, true, true
			}
		}
	}
	rungs, text := rungsOf(s, 210, 480, Style{})
	if !strings.Contains(text, `"8 others"`) {
		t.Errorf("eight equal parts beside the governing one are not folded:\n%s", text)
	}
	for _, r := range rungs {
		if len(r.IDs) == 8 {
			return
		}
	}
	t.Error("no rung stands for the eight")
}

func TestLadderLimits(t *testing.T) {
	s := overScene()
	_, text := rungsOf(s, 210, 480, Style{})
	for _, want := range []string{`"limit 65 · 9 parts"`, `"limit 80 · conduit"`, `"ambient"`, `"°C"`, `"outside"`, `"conduit"`} {
		if !strings.Contains(text, want) {
			t.Errorf("%s is missing", want)
		}
	}
	one := oneScene()
	for i := range one.Readings {
		one.Readings[i].LimitC = section.Some(200.0)
	}
	if _, text := rungsOf(one, 210, 480, Style{}); !strings.Contains(text, `"limit 200 ↑"`) {
		t.Error("the governing limit beyond the scale is not named")
	}
}

func TestLadderStale(t *testing.T) {
	s := overScene()
	s.Stale = true
	_, text := rungsOf(s, 210, 480, Style{})
	if strings.Contains(text, `"71"`) || strings.Contains(text, hex(lightPalette.Over)) {
		t.Error("a stale ladder still has numbers or the warning colour")
	}
}

func TestLadderUnsolved(t *testing.T) {
	rungs, text := rungsOf(unsolved(hexScene(7)), 210, 480, Style{})
	if len(rungs) != 0 || !strings.Contains(text, `"ambient"`) || strings.Contains(text, `"40"`) {
		t.Errorf("an unsolved ladder: %v\n%s", rungs, text)
	}
	if rungs, _ := rungsOf(Scene{AmbientC: math.NaN()}, 100, 50, Style{}); len(rungs) != 0 {
		t.Errorf("nothing known: %v", rungs)
	}
}

func TestLayerOf(t *testing.T) {
	s := nestedScene()
	for _, c := range []struct {
		id    string
		owner string
		index int
	}{{"jacket", "", 0}, {"jacket/2", "", 1}, {"C1/jacket", "C1", 0}, {"C2/jacket/3", "C2", 2}, {"jacket/x", "", 0}} {
		owner, i := layerOf(c.id, s.Shapes)
		if owner == nil || owner.ID != c.owner || i != c.index {
			t.Errorf("%s: %+v, layer %d", c.id, owner, i)
		}
	}
	if owner, _ := layerOf("jacket", nil); owner != nil {
		t.Errorf("a layer of nothing: %+v", owner)
	}
	s.Readings = append(s.Readings, section.Reading{ID: "C1/jacket", Kind: "layer", TempC: 61}, section.Reading{ID: "jacket/2", Kind: "layer", TempC: 40})
	for i, want := range map[int]string{len(s.Readings) - 2: "C1 jacket", len(s.Readings) - 1: "jacket 2"} {
		if got := readingName(s.Readings[i], s); got != want {
			t.Errorf("%s is called %q, want %q", s.Readings[i].ID, got, want)
		}
	}
}

func TestJoinNames(t *testing.T) {
	for _, c := range [][3]string{
		{"jacket 1", "jacket 2", "jacket 1–2"},
		{"jacket 1–2", "jacket 3", "jacket 1–3"},
		{"jacket 1", "jacket 3", "jacket 1, jacket 3"},
		{"jacket", "outside", "jacket, outside"},
		{"jacket 1–3", "outside", "jacket 1–3, outside"},
		{"conduit 1", "jacket 2", "conduit 1, jacket 2"},
	} {
		if got := joinNames(c[0], c[1]); got != c[2] {
			t.Errorf("%s and %s: %q, want %q", c[0], c[1], got, c[2])
		}
	}
}
