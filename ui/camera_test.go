package ui

import (
	"math"
	"testing"

	"fyne.io/fyne/v2"

	"packrise/solver/section"
)

func TestCameraThereAndBack(t *testing.T) {
	c := camera{cx: 3, cy: -2, scale: 20}
	size := fyne.NewSize(700, 400)
	p := section.Point{X: 5.5, Y: 1.25}
	near(t, "there and back", c.toMM(c.toUnits(p, size), size), p, 1e-5)
	if at := c.toUnits(section.Point{X: 3, Y: -2}, size); at != fyne.NewPos(350, 200) {
		t.Errorf("the middle is at %v", at)
	}
	if up := c.toUnits(section.Point{X: 3, Y: 0}, size); up.Y >= 200 {
		t.Error("y must go up")
	}
}

func TestZoomKeepsThePlaceUnderThePointer(t *testing.T) {
	size := fyne.NewSize(713, 461)
	about := fyne.NewPos(123, 77)
	c := camera{cx: 1, cy: 2, scale: 9}
	was := c.toMM(about, size)
	for _, f := range []float64{1.2, 1.2, 3, 0.1, 1e9, 1e-12} {
		c = c.zoomed(f, about, size)
		near(t, "under the pointer", c.toMM(about, size), was, 1e-6)
		if c.scale < leastScale || c.scale > mostScale {
			t.Errorf("scale %g is out of bounds", c.scale)
		}
	}
}

func TestPanMovesWithThePointer(t *testing.T) {
	size := fyne.NewSize(700, 400)
	c := camera{scale: 10}
	under := c.toMM(fyne.NewPos(100, 100), size)
	c = c.panned(30, -12)
	near(t, "moved along", c.toMM(fyne.NewPos(130, 88), size), under, 1e-9)
}

func TestCameraSeesWhatTheViewSees(t *testing.T) {
	c := camera{cx: 4, cy: 5, scale: 12}
	if got := cameraOf(c.view(1400, 800, 2), 2); math.Abs(got.scale-c.scale) > 1e-12 || got.cx != c.cx || got.cy != c.cy {
		t.Errorf("%+v, want %+v", got, c)
	}
}
