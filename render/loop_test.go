package render

import (
	"image"
	"image/color"
	"math"
	"testing"

	"packrise/solver/section"
)

// stadium is 8 × 4 mm with half-circle ends about (x, y).
func stadium(x, y, grow float64) (l []section.Point) {
	for i := range 200 {
		a := (float64(i) + 0.5) / 200 * 2 * math.Pi
		sin, cos := math.Sincos(a)
		l = append(l, section.Point{X: x + math.Copysign(2, cos) + (2+grow)*cos, Y: y + (2+grow)*sin})
	}
	return l
}

func flatScene() []section.Shape {
	return []section.Shape{
		{
			Kind: section.Jacket, Rings: []section.Ring{{Material: "air", R1: 4}, {Material: "pvc", R0: 4, R1: 5}},
			Loops: [][]section.Point{stadium(0, 0, 0), stadium(0, 0, 1)},
		},
		{
			ID: "B", Kind: section.Core, Rings: []section.Ring{{Material: "copper", Metal: true, R1: math.Hypot(2, 1)}},
			Loops: [][]section.Point{{{X: -2, Y: -1}, {X: 2, Y: -1}, {X: 2, Y: 1}, {X: -2, Y: 1}}},
		},
	}
}

// A part that is not round is hit within its outline alone.
func TestHitLoop(t *testing.T) {
	for _, c := range []struct {
		x, y float64
		want string
	}{{0, 0, "B"}, {1.9, 0.9, "B"}, {0, 1.1, ""}, {2.1, 0, ""}, {-1.99, -0.99, "B"}} {
		if got := Hit(flatScene(), section.Point{X: c.x, Y: c.y}); got != c.want {
			t.Errorf("(%g, %g) hits %q, want %q", c.x, c.y, got, c.want)
		}
	}
}

// Coverage adds up to the outline's area: 40 + 9π for a stadium of 10 × 6 mm, in pixels of 0.1 mm.
func TestCoverLoop(t *testing.T) {
	v := View{PxPerMM: 10, W: 140, H: 100}
	o := outlineOf(flatScene()).toPx(v)
	sum, row := 0.0, make([]uint8, v.W)
	for y := range v.H {
		o.coverRow(row, 0, y)
		for _, c := range row {
			sum += float64(c) / 255
		}
	}
	if want := (4*6 + 9*math.Pi) * 100; math.Abs(sum-want) > 0.002*want {
		t.Errorf("%.1f pixels covered, want %.1f", sum, want)
	}
}

// The jacket's wall, its inside and the bar are filled by their outlines.
func TestFillLoops(t *testing.T) {
	img := image.NewRGBA(image.Rect(0, 0, 140, 100))
	v := View{PxPerMM: 10, W: 140, H: 100}
	s := Scene{Shapes: flatScene()}
	st := Style{}
	p := newSectionPainter(NewRaster(img), s, v, Scale{}, st)
	p.fills()
	pal := st.Colors()
	for _, c := range []struct {
		x, y float64
		want color.NRGBA
	}{{0, 2.5, pal.Wall}, {4.5, 0, pal.Wall}, {0, 1.5, pal.Fill}, {3, 0, pal.Fill}, {1.5, 0.8, pal.Metal}} {
		x, y := v.ToPx(section.Point{X: c.x, Y: c.y})
		r, g, b, _ := img.At(int(x), int(y)).RGBA()
		if uint8(r>>8) != c.want.R || uint8(g>>8) != c.want.G || uint8(b>>8) != c.want.B {
			t.Errorf("(%g, %g) is %v, want %v", c.x, c.y, img.At(int(x), int(y)), c.want)
		}
	}
}
