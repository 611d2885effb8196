package render

import (
	"bytes"
	"image/png"
	"math"
	"strings"
	"testing"

	"packrise/solver/section"
)

func TestGoldenPictures(t *testing.T) {
	marked := overScene()
	marked.Selected = []string{"L5"}
	for _, c := range []struct {
		name string
		s    Scene
		w, h int
		st   Style
	}{
		{"picture-over", marked, 760, 520, Style{}},
		{"picture-hex19-dark", hexScene(19), 640, 440, Style{Dark: true}},
		{"picture-wireway", wirewayScene(24), 700, 480, Style{}},
		{"picture-unsolved", unsolved(nestedScene()), 480, 360, Style{}},
	} {
		t.Run(c.name, func(t *testing.T) { goldenPNG(t, c.name, drawn(c.s, c.w, c.h, c.st)) })
	}
}

func TestWritePNGSizes(t *testing.T) {
	for _, c := range []struct {
		w, h int
		ok   bool
	}{{480, 360, true}, {LeastWidth, LeastHeight, true}, {1600, 300, true}, {330, 1400, true}, {319, 360, false}, {480, 100, false}, {-1, -1, false}, {20000, 400, false}, {16000, 16000, false}} {
		var b bytes.Buffer
		err := WritePNG(&b, looseScene(9, 1), c.w, c.h, Style{Scale: 1})
		if c.ok != (err == nil) {
			t.Errorf("%d × %d: %v", c.w, c.h, err)
			continue
		}
		if err != nil {
			continue
		}
		m, err := png.Decode(&b)
		if err != nil || m.Bounds().Dx() != c.w || m.Bounds().Dy() != c.h {
			t.Errorf("%d × %d came back as %v, %v", c.w, c.h, m.Bounds(), err)
		}
	}
}

type brokenWriter struct{}

func (brokenWriter) Write([]byte) (int, error) { return 0, bytes.ErrTooLarge }

func TestWritePNGReportsTheWriter(t *testing.T) {
	err := WritePNG(brokenWriter{}, oneScene(), 400, 300, Style{})
	if err == nil || !strings.Contains(err.Error(), "render: write picture") {
		t.Errorf("error %v", err)
	}
}

// No text may leave the page or run into another one, at any size; nothing is under 12 px at device scale 1.
func TestTextsStayApart(t *testing.T) {
	scenes := map[string]Scene{
		"hex7": hexScene(7), "hex37": hexScene(37), "hex200": hexScene(200), "loose": looseScene(20, 3), "over": overScene(),
		"wireway": wirewayScene(24), "nested": nestedScene(), "bundle": bundleScene(19), "one": oneScene(),
		"unsolved": unsolved(nestedScene()), "empty": {AmbientC: 30},
	}
	sizes := [][2]int{{480, 360}, {640, 480}, {1000, 700}, {1800, 500}, {600, 1200}, {1400, 900}}
	if testing.Short() {
		sizes = sizes[:2]
	}
	for name, s := range scenes {
		if s.Field != nil {
			s.Field = fastField{s.Field} // the words are looked at, not the map
		}
		for _, size := range sizes {
			w := &textWatch{Recorder: NewRecorder(float64(size[0]), float64(size[1]))}
			Draw(w, s, Style{Scale: 1})
			page := box{0, 0, float64(size[0]), float64(size[1])}
			for i, a := range w.texts {
				if a.size < 12 {
					t.Errorf("%s %v: %q is %g px", name, size, a.text, a.size)
				}
				if !a.box.within(page) || w.insets > 0 && a.clip.x1 > 0 && !a.box.within(a.clip.grown(0.5)) {
					t.Errorf("%s %v: %q leaves its pane: %v in %v", name, size, a.text, a.box, a.clip)
				}
				for _, b := range w.texts[:i] {
					if a.box.grown(-0.6).meets(b.box.grown(-0.6)) {
						t.Errorf("%s %v: %q %v lies on %q %v", name, size, a.text, a.box, b.text, b.box)
					}
				}
			}
			if len(w.texts) < 3 {
				t.Errorf("%s %v: only %d texts", name, size, len(w.texts))
			}
		}
	}
}

// textWatch remembers where texts stand.
type textWatch struct {
	*Recorder
	texts  []watched
	clips  []box
	insets int
}

type watched struct {
	text      string
	size      float64
	box, clip box
}

func (w *textWatch) Clip(x, y, wd, h float64) {
	w.insets++
	w.clips = append(w.clips, box{x, y, x + wd, y + h})
}

func (w *textWatch) Pop() {
	w.clips = w.clips[:len(w.clips)-1]
	w.Recorder.Pop()
}

func (w *textWatch) Text(s string, x, y float64, f Font) {
	if strings.TrimSpace(s) == "" {
		return
	}
	v := watched{text: s, size: f.Size, box: textBox(x, y, w.MeasureText(s, f), f)}
	if len(w.clips) > 0 {
		v.clip = w.clips[len(w.clips)-1]
	}
	w.texts = append(w.texts, v)
}

func TestStateOf(t *testing.T) {
	reading := func(temp, limit float64) section.Reading {
		return section.Reading{ID: "L1", Kind: section.Core, TempC: temp, LimitC: section.Some(limit)}
	}
	for _, c := range []struct {
		answer string
		rs     []section.Reading
		want   State
	}{
		{"", nil, Unknown},
		{"Within. L1 governs.", []section.Reading{reading(60, 90)}, Within},
		{"Close. L1 governs.", []section.Reading{reading(85, 90)}, Near},
		{"Over. No steady temperature exists.", nil, Over},
		{"Undecided. L1 governs.", []section.Reading{reading(60, 90)}, Unknown},
		{"Within. L1 governs.", []section.Reading{reading(90.04, 90)}, Over},
		{"Overall fine.", []section.Reading{reading(60, 90)}, Unknown},
		{"", []section.Reading{reading(60, 90)}, Within},
	} {
		if got := StateOf(Scene{Answer: c.answer, Readings: c.rs}); got != c.want {
			t.Errorf("%q: state %d, want %d", c.answer, got, c.want)
		}
	}
}

// Contrast of text against what it stands on: at least 4.5 : 1, W3C WCAG 2.1, success criterion 1.4.3.
func TestContrast(t *testing.T) {
	for _, dark := range []bool{false, true} {
		p := Style{Dark: dark}.Colors()
		for name, c := range map[string][2]float64{
			"ink on paper":    {luminance(p.Ink), luminance(p.Paper)},
			"quiet on paper":  {luminance(p.Quiet), luminance(p.Paper)},
			"quiet on sheet":  {luminance(p.Quiet), luminance(p.Sheet)},
			"quiet on panel":  {luminance(p.Quiet), luminance(p.Panel)},
			"accent on paper": {luminance(p.Accent), luminance(p.Paper)},
			"over on paper":   {luminance(p.Over), luminance(p.Paper)},
			"over on sheet":   {luminance(p.Over), luminance(p.Sheet)},
			"close on paper":  {luminance(p.Close), luminance(p.Paper)},
			"within on paper": {luminance(p.Within), luminance(p.Paper)},
			"ink on wash":     {luminance(p.Ink), luminance(p.Wash)},
			"line on halo":    {luminance(p.Line), luminance(p.Halo)},
		} {
			ratio := (math.Max(c[0], c[1]) + 0.05) / (math.Min(c[0], c[1]) + 0.05)
			if ratio < 4.5 {
				t.Errorf("dark %v: %s has contrast %.2f", dark, name, ratio)
			}
		}
	}
}
