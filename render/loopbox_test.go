package render

import (
	"math"
	"testing"

	"packrise/solver/section"
)

// ribbon is the hull of five discs of radius 1 in a row, and the shapes that it is drawn from.
func ribbon() (shapes []section.Shape, hull []section.Point) {
	for k := range 64 {
		s, c := math.Sincos(math.Pi/2 + math.Pi*float64(k)/63)
		hull = append(hull, section.Point{X: c - 4, Y: s})
	}
	for k := range 64 {
		s, c := math.Sincos(-math.Pi/2 + math.Pi*float64(k)/63)
		hull = append(hull, section.Point{X: c + 4, Y: s})
	}
	shapes = append(shapes, section.Shape{Kind: section.OpenBundle, Rings: []section.Ring{{R1: 5}}, Loops: [][]section.Point{hull}})
	for i := range 5 {
		shapes = append(shapes, section.Shape{ID: string(rune('a' + i)), Kind: section.Core, At: section.Point{X: float64(2*i - 4)}, Rings: []section.Ring{{R1: 1}}})
	}
	return shapes, hull
}

// The outline of a bundle in a row is its string: its box, where rays leave it, what it meets.
func TestHullOutline(t *testing.T) {
	shapes, hull := ribbon()
	o := outlineOf(shapes)
	if b := o.box(); math.Abs(b.x0+5) > 1e-3 || math.Abs(b.x1-5) > 1e-3 || math.Abs(b.y0+1) > 1e-3 || math.Abs(b.y1-1) > 1e-3 {
		t.Errorf("box %+v", b)
	}
	for _, c := range []struct{ x, y, dx, dy, want float64 }{{0, 0, 0, 1, 1}, {0, 0, 1, 0, 5}, {2, 0.5, 0, -1, 1.5}, {0, 3, 1, 0, 0}, {0, 3, 0, -1, 4}} {
		if got := o.leave(c.x, c.y, c.dx, c.dy); math.Abs(got-c.want) > 1e-3 {
			t.Errorf("from (%g, %g) along (%g, %g) left after %.4f, want %g", c.x, c.y, c.dx, c.dy, got, c.want)
		}
	}
	v := View{PxPerMM: 20, W: 400, H: 400}
	for _, c := range []struct {
		b    box
		want bool
	}{
		{box{-1, -1, 1, 1}, true},
		{box{-1, 1.01, 1, 2}, false},
		{box{4.8, 0.8, 6, 2}, false}, // beyond the round end, within its box
		{box{4.5, 0.5, 6, 2}, true},
		{box{-9, -9, 9, 9}, true},
	} {
		if got := o.meetsBox(c.b); got != c.want {
			t.Errorf("meets %+v: %v", c.b, got)
		}
		x0, y0 := v.ToPx(section.Point{X: c.b.x0, Y: c.b.y1})
		x1, y1 := v.ToPx(section.Point{X: c.b.x1, Y: c.b.y0})
		if got := o.toPx(v).meetsBox(box{x0, y0, x1, y1}); got != c.want {
			t.Errorf("meets %+v in pixels: %v", c.b, got)
		}
	}
	if loopMeetsBox(append(hull, hull[0]), box{-1, 1.01, 1, 2}) {
		t.Error("a point named twice confuses")
	}
}

// A bundle in a row fills the picture that its string leaves, not its circle.
func TestFitViewToAHull(t *testing.T) {
	shapes, _ := ribbon()
	v := FitView(shapes, 1200, 300, Style{})
	if v.PxPerMM < 60 {
		t.Errorf("%.1f pixels per mm: fitted to the circle", v.PxPerMM)
	}
	x, y := v.ToPx(section.Point{X: 5})
	if x > 1200 || y < 0 || y > 300 {
		t.Errorf("its end at (%.0f, %.0f)", x, y)
	}
	if id := Hit(shapes, section.Point{X: 2.5, Y: 0.3}); id != "d" {
		t.Errorf("hit %q", id)
	}
	if id := Hit(shapes, section.Point{X: 3, Y: 0.9}); id != "" {
		t.Errorf("a pocket hits %q", id)
	}
}

// The heat map of a bundle ends at its string.
func TestHeatLayerEndsAtTheHull(t *testing.T) {
	shapes, _ := ribbon()
	for _, coarse := range []bool{false, true} {
		v := View{PxPerMM: 40, W: 440, H: 440}
		img := HeatLayer(Scene{Shapes: shapes, Field: slope{edge: outlineOf(shapes)}}, v, Scale{0, 100}, coarse)
		for _, c := range []struct {
			at section.Point
			in bool
		}{{section.Point{}, true}, {section.Point{X: 1, Y: 0.95}, true}, {section.Point{X: 1, Y: 1.05}, false}, {section.Point{Y: 3}, false}, {section.Point{X: 4.95}, true}, {section.Point{X: 4.9, Y: 0.9}, false}} {
			x, y := v.ToPx(c.at)
			if got := img.RGBAAt(int(x), int(y)).A > 128; got != c.in {
				t.Errorf("coarse %v: painted at %v: %v", coarse, c.at, got)
			}
		}
	}
}
