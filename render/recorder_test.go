package render

import (
	"strings"
	"testing"

	"packrise/solver/section"
)

func TestGoldenTexts(t *testing.T) {
	marked := overScene()
	marked.Selected, marked.Pointed, marked.Bad = []string{"L5"}, "L6", []string{"L7"}
	stale := overScene()
	stale.Stale = true
	loose := unsolved(nestedScene())
	spare := core("L9", section.Point{X: 18, Y: 4}, 1, 1.6)
	spare.Unset = true
	loose.Shapes = append(loose.Shapes, spare)

	layer := func(s Scene, w, h int, st Style) string {
		r := NewRecorder(float64(w), float64(h))
		SectionLayer(r, s, FitView(s.Shapes, w, h, st), ScaleOf(s), st)
		return r.String()
	}
	ladder := func(s Scene, w, h float64, st Style) string {
		r := NewRecorder(w, h)
		Ladder(r, s, ScaleOf(s), st)
		return r.String()
	}
	whole := func(s Scene, w, h float64, st Style) string {
		r := NewRecorder(w, h)
		Draw(r, s, st)
		return r.String()
	}
	for name, got := range map[string]string{
		"section-hex7":     layer(hexScene(7), 480, 360, Style{}),
		"section-marked":   layer(marked, 520, 400, Style{}),
		"section-stale":    layer(stale, 480, 360, Style{Dark: true}),
		"section-unsolved": layer(loose, 480, 360, Style{}),
		"section-wireway":  layer(wirewayScene(12), 520, 400, Style{Scale: 1.5}),
		"section-bundle":   layer(bundleScene(7), 480, 360, Style{}),
		"ladder-marked":    ladder(marked, 210, 400, Style{}),
		"ladder-many":      ladder(hexScene(91), 210, 400, Style{}),
		"ladder-unsolved":  ladder(unsolved(oneScene()), 160, 300, Style{}),
		"picture-one":      whole(oneScene(), 640, 480, Style{}),
	} {
		t.Run(name, func(t *testing.T) { goldenText(t, name, got) })
	}
}

func TestRecorderWritesDown(t *testing.T) {
	r := NewRecorder(100, 50)
	in, done := Inset(r, 10, 5, 50, 40)
	in.Circle(1, 2, 3)
	in.Fill(rgb(0x102030))
	in.Text("12 Ω", 0, 20, Font{Size: 12, Color: rgb(0)})
	done()
	for range longPath + 1 {
		r.LineTo(3, 4)
	}
	r.Stroke(Pen{Width: 1, Dash: []float64{4, 2}})
	want := `push
  clip 10 5 50 40
  fill #102030 circle 11 7 3
  text "12 Ω" 10 25 size 12 #000000 anchor 0 0
pop
stroke 1 #00000000 dash 4 2 some 20 pieces within 5 5 5 5
`
	if got := r.String(); got != want {
		t.Errorf("recorded\n%s\nwant\n%s", got, want)
	}
}

// Every glyph that the program's own sentences use must be in the font: a missing one draws a box.
func TestFontHasTheGlyphs(t *testing.T) {
	draw := func(s string) string {
		var b strings.Builder
		letters.mu.Lock()
		defer letters.mu.Unlock()
		f := letters.face(Font{Size: 12})
		for _, r := range lacking.Replace(s) {
			if _, ok := f.face.GlyphAdvance(r); !ok {
				b.WriteRune(r)
			}
		}
		return b.String()
	}
	if missing := draw("°²³·−×ΩØ⌀µ≥≤√Δθλρ→↑↓∞–—…äöüßéñ±½¼ θ\u202f\u2009"); missing != "" {
		t.Errorf("no glyph for %q", missing)
	}
	if missing := draw("\U0001F600"); missing == "" {
		t.Error("a face is said to be in the font: the check sees nothing")
	}
}
