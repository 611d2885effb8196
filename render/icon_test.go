package render

import (
	"image/png"
	"os"
	"path/filepath"
	"testing"
)

// The committed icon is what the code draws. -update writes it.
func TestIconIsDrawnByCode(t *testing.T) {
	path := filepath.Join("..", "assets", "icon.png")
	got := Icon(IconSize)
	if *update {
		keep(t, path, encode(t, got))
		return
	}
	f, err := os.Open(path)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	want, err := png.Decode(f)
	if err != nil {
		t.Fatal(err)
	}
	if share, where := differs(got, toRGBA(want)); share > offShare {
		t.Errorf("%s differs in %.2f %% of its bytes, within %v; go test ./render -run Icon -update draws it anew", path, 100*share, where)
	}
}

func TestIconAtAnySize(t *testing.T) {
	for _, n := range []int{16, 48, 256} {
		img := Icon(n)
		if img.Rect.Dx() != n || img.RGBAAt(0, 0).A != 0 || img.RGBAAt(n/2, n/2).A != 255 {
			t.Errorf("size %d: %v, corner %v, middle %v", n, img.Rect, img.RGBAAt(0, 0), img.RGBAAt(n/2, n/2))
		}
	}
}
