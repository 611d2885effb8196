package render

import (
	"bytes"
	"flag"
	"image"
	"image/draw"
	"image/png"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "rewrite the golden files in testdata")

// goldenText compares a recording with testdata/name.txt.
func goldenText(t *testing.T, name, got string) {
	t.Helper()
	path := filepath.Join("testdata", name+".txt")
	if *update {
		keep(t, path, []byte(got))
		return
	}
	want, err := os.ReadFile(path)
	if err != nil {
		keep(t, filepath.Join("testdata", "failed", name+".txt"), []byte(got))
		t.Fatalf("no golden text: %v (the new one is in testdata/failed; -update accepts it)", err)
	}
	if got == string(want) {
		return
	}
	keep(t, filepath.Join("testdata", "failed", name+".txt"), []byte(got))
	g, w := strings.Split(got, "\n"), strings.Split(string(want), "\n")
	for i := range max(len(g), len(w)) {
		a, b := lineOf(g, i), lineOf(w, i)
		if a != b {
			t.Fatalf("%s line %d:\n got %s\nwant %s", path, i+1, a, b)
		}
	}
}

func lineOf(lines []string, i int) string {
	if i < len(lines) {
		return lines[i]
	}
	return "(nothing)"
}

// Pictures may differ by offBy in a channel on this share of their bytes, since floating point differs between processors.
const (
	offBy    = 4
	offShare = 0.01
)

// goldenPNG compares a picture with testdata/name.png.
func goldenPNG(t *testing.T, name string, got *image.RGBA) {
	t.Helper()
	path := filepath.Join("testdata", name+".png")
	if *update {
		keep(t, path, encode(t, got))
		return
	}
	data, err := os.ReadFile(path)
	if err == nil {
		want, err := png.Decode(bytes.NewReader(data))
		if err != nil {
			t.Fatal(err)
		}
		share, where := differs(got, toRGBA(want))
		if share < offShare {
			return
		}
		t.Errorf("%s: %.2f %% of the bytes differ by more than %d, within %v", path, 100*share, offBy, where)
	} else {
		t.Errorf("no golden picture: %v", err)
	}
	keep(t, filepath.Join("testdata", "failed", name+".png"), encode(t, got))
	t.Log("the new picture is in testdata/failed; -update accepts it")
}

// differs returns the share of bytes that differ by more than offBy and the rectangle in which they lie.
func differs(a, b *image.RGBA) (share float64, where image.Rectangle) {
	if a.Rect != b.Rect {
		return 1, a.Rect.Union(b.Rect)
	}
	n := 0
	for i := range a.Pix {
		if d := int(a.Pix[i]) - int(b.Pix[i]); d > offBy || d < -offBy {
			n++
			p := image.Pt(i%a.Stride/4, i/a.Stride)
			where = where.Union(image.Rectangle{p, p.Add(image.Pt(1, 1))})
		}
	}
	return float64(n) / float64(len(a.Pix)), where
}

func toRGBA(m image.Image) *image.RGBA {
	out := image.NewRGBA(image.Rect(0, 0, m.Bounds().Dx(), m.Bounds().Dy()))
	draw.Draw(out, out.Rect, m, m.Bounds().Min, draw.Src)
	return out
}

func encode(t *testing.T, m image.Image) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := png.Encode(&b, m); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func keep(t *testing.T, path string, data []byte) {
	t.Helper()
	if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(path, data, 0o644); err != nil {
		t.Fatal(err)
	}
}

// drawn returns the whole picture of a scene.
func drawn(s Scene, w, h int, st Style) *image.RGBA {
	img := image.NewRGBA(image.Rect(0, 0, w, h))
	Draw(NewRaster(img), s, st)
	return img
}

func TestGoldenCatchesADifference(t *testing.T) {
	a := drawn(oneScene(), 400, 300, Style{})
	b := drawn(oneScene(), 400, 300, Style{})
	if share, _ := differs(a, b); share != 0 {
		t.Fatalf("the same scene drawn twice differs in %.3g of the bytes", share)
	}
	dark := drawn(oneScene(), 400, 300, Style{Dark: true})
	if share, where := differs(a, dark); share < 0.3 || where.Empty() {
		t.Fatalf("light and dark differ in %.3g only", share)
	}
}
