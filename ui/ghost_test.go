package ui

import (
	"image/color"
	"strings"
	"testing"

	"packrise/render"
	"packrise/solver/section"
)

func disc1(id string, x, y, r float64) section.Shape {
	return section.Shape{ID: id, Kind: section.Core, At: section.Point{X: x, Y: y}, Rings: []section.Ring{{R1: r}}}
}

func TestGhostMarksWhatWouldChange(t *testing.T) {
	holder := section.Shape{Kind: section.Conduit, Rings: []section.Ring{{R0: 10, R1: 12}}}
	larger := holder
	larger.Rings = []section.Ring{{R0: 12, R1: 14}}
	now := []section.Shape{holder, disc1("A", 0, 0, 2), disc1("B", 5, 0, 2), disc1("C", -5, 0, 2), disc1("D", 0, 5, 2), disc1("E", 0, -5, 2)}
	then := []section.Shape{larger, disc1("A", 1, 0, 2), disc1("B", 5, 0, 2.5), disc1("C", -5, 0, 2), disc1("D", 0, 5, 2), disc1("N", 0, 8, 1)}
	var got []string
	for _, m := range ghostOf(now, then, []string{"C"}) {
		s := m.shape.ID
		if m.from != nil {
			s += " moves"
		}
		if m.gone {
			s += " vanishes"
		}
		got = append(got, s)
	}
	if s := strings.Join(got, ","); s != ",A moves,B,C,N,E vanishes" {
		t.Errorf("marks %q", s)
	}
	if m := ghostOf(now, now, nil); len(m) != 0 {
		t.Errorf("a section that stays has %d marks", len(m))
	}
}

func TestGhostIsDashedInTheAccent(t *testing.T) {
	from := section.Point{X: -3}
	bar := section.Shape{ID: "B", Loops: [][]section.Point{{{X: 0}, {X: 2}, {X: 2, Y: 1}}}, Rings: []section.Ring{{R1: 2}}}
	duct := section.Shape{Kind: section.Wireway, Width: 8, Height: 6, Rings: []section.Ring{{R1: 1}}}
	c := render.NewRecorder(200, 200)
	accent := color.NRGBA{R: 1, G: 2, B: 3, A: 255}
	drawGhost(c, render.View{PxPerMM: 10, W: 200, H: 200}, []ghostMark{{shape: disc1("A", 3, 0, 2), from: &from}, {shape: bar, gone: true}, {shape: duct}}, 1, accent, color.NRGBA{A: 255})
	s := c.String()
	// five paths: outline and way of A, outline and cross of B, outline of the duct; each once for its halo and once dashed
	if n := strings.Count(s, "dash"); n != 5 {
		t.Errorf("%d dashed lines, want 5:\n%s", n, s)
	}
	if !strings.Contains(s, "010203") {
		t.Errorf("nothing is in the accent's colour:\n%s", s)
	}
}
