package ui

import (
	"testing"
)

func TestPictureIsSharpAndCached(t *testing.T) {
	_, v := testView(t)
	w, h := v.pixels()
	img := v.draw(w, h)
	if img != v.draw(w, h) {
		t.Error("the picture is painted again for nothing")
	}
	if b := img.Bounds(); b.Dx() != w || b.Dy() != h {
		t.Errorf("%v, want %d × %d", b, w, h)
	}
	v.camera = v.camera.panned(50, 0)
	moved := v.draw(w, h)
	if moved == img || moved.Bounds() != img.Bounds() {
		t.Error("an old picture must be shown as the camera sees it")
	}
	if got, want := moved.At(350, 250), img.At(300, 250); got != want {
		t.Errorf("shifted by 50: %v, want %v", got, want)
	}
}

func TestRasterDensity(t *testing.T) {
	if testing.Short() {
		t.Skip("long under the race detector")
	}
	h, v := testView(t)
	v.draw(1400, 1000) // a screen of twice the density asks
	h.l.until(t, "a dense picture", func() bool { return v.pic.view.W == 1400 })
	if v.density != 2 {
		t.Errorf("density %g", v.density)
	}
}
