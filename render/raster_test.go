package render

import (
	"image"
	"image/color"
	"math"
	"sync"
	"testing"
)

func blank(w, h int) (*image.RGBA, Canvas) {
	img := image.NewRGBA(image.Rect(0, 0, w, h))
	return img, NewRaster(img)
}

// coverage sums what is covered, in pixels.
func coverage(img *image.RGBA) float64 {
	sum := 0.0
	for i := 3; i < len(img.Pix); i += 4 {
		sum += float64(img.Pix[i]) / 255
	}
	return sum
}

// What is painted covers the area of the figure: closed forms of circle, ring, rectangle, arc.
func TestRasterAreas(t *testing.T) {
	black := color.NRGBA{A: 255}
	for _, c := range []struct {
		name string
		draw func(Canvas)
		want float64
		tol  float64
	}{
		{"disc", func(c Canvas) { c.Circle(50.3, 49.6, 30); c.Fill(black) }, math.Pi * 900, 2e-3},
		{"small disc", func(c Canvas) { c.Circle(50.3, 49.6, 3); c.Fill(black) }, math.Pi * 9, 0.02},
		{"circle", func(c Canvas) { c.Circle(50.3, 49.6, 30); c.Stroke(Pen{Width: 3, Color: black}) }, 2 * math.Pi * 30 * 3, 5e-3},
		{"hairline circle", func(c Canvas) { c.Circle(50, 50, 30); c.Stroke(Pen{Width: 0.6, Color: black}) }, 2 * math.Pi * 30 * 0.6, 0.02},
		{"ring", func(c Canvas) { c.Circle(50, 50, 30); c.Circle(50, 50, 20); c.Fill(black) }, math.Pi * 500, 5e-3},
		{"ring off centre", func(c Canvas) { c.Circle(50, 50, 30); c.Circle(52, 50, 20); c.Fill(black) }, math.Pi * 500, 5e-3},
		{"rectangle", func(c Canvas) { rectangle(c, 10.5, 20.25, 40, 30); c.Fill(black) }, 1200, 5e-3},
		{"rounded", func(c Canvas) { rounded(c, 10, 20, 40, 30, 8); c.Fill(black) }, 1200 - 64*(4-math.Pi), 5e-3},
		{"line", func(c Canvas) { line(c, 10, 20, 60, 70, Pen{Width: 2, Color: black}) }, 2 * 50 * math.Sqrt2, 0.01},
		{"dashes", func(c Canvas) { line(c, 10, 20, 70, 20, Pen{Width: 2, Color: black, Dash: []float64{6, 4}}) }, 2 * 36, 0.02},
		{"dot", func(c Canvas) { c.Circle(50, 50, 2); c.Stroke(Pen{Width: 5, Color: black}) }, math.Pi * 4.5 * 4.5, 0.02},
		{"half", func(c Canvas) { c.Arc(50, 50, 20, 0, pi); c.Close(); c.Fill(black) }, math.Pi * 200, 0.01},
	} {
		img, cv := blank(100, 100)
		c.draw(cv)
		if got := coverage(img); math.Abs(got-c.want) > c.tol*c.want {
			t.Errorf("%s covers %.1f pixels, want %.1f", c.name, got, c.want)
		}
	}
}

func TestRasterClip(t *testing.T) {
	img, c := blank(100, 100)
	in, done := Inset(c, 20, 30, 40, 20)
	if w, h := in.Size(); w != 40 || h != 20 {
		t.Errorf("size %g × %g", w, h)
	}
	nested, doneToo := Inset(in, 10, -10, 100, 100)
	red := color.NRGBA{R: 255, A: 255}
	nested.Circle(0, 0, 90)
	nested.Fill(red)
	nested.MoveTo(-100, 5)
	nested.LineTo(100, 5)
	nested.Stroke(Pen{Width: 4, Color: red})
	nested.Text("WWWWWWWWWWWWWW", -60, 20, Font{Size: 30, Color: red})
	doneToo()
	done()
	for y := range 100 {
		for x := range 100 {
			in := x >= 30 && x < 60 && y >= 30 && y < 50
			if a := img.RGBAAt(x, y).A; (a != 0) != in {
				t.Fatalf("at %d, %d: coverage %d", x, y, a)
			}
		}
	}
	c.Circle(5, 5, 3)
	c.Fill(red)
	if img.RGBAAt(5, 5).A != 255 {
		t.Error("the clip outlives its block")
	}
}

func TestRasterBlends(t *testing.T) {
	img, c := blank(20, 20)
	rectangle(c, 0, 0, 20, 20)
	c.Fill(color.NRGBA{R: 200, G: 100, A: 255})
	c.Circle(10, 10, 8)
	c.Fill(color.NRGBA{B: 255, A: 128})
	got := img.RGBAAt(10, 10)
	if apart(got, color.NRGBA{R: 100, G: 50, B: 128}) > 1 || got.A != 255 {
		t.Errorf("half blue over orange is %v", got)
	}
}

func TestRasterText(t *testing.T) {
	measure := func(anchor float64) (left, right, top, bottom int) {
		img, c := blank(200, 60)
		c.Text("HHH", 100, 30, Font{Size: 20, Color: color.NRGBA{A: 255}, AX: anchor, AY: 0.5})
		left, right, top, bottom = 999, -1, 999, -1
		for y := range 60 {
			for x := range 200 {
				if img.RGBAAt(x, y).A > 100 {
					left, right, top, bottom = min(left, x), max(right, x), min(top, y), max(bottom, y)
				}
			}
		}
		return left, right, top, bottom
	}
	if l, _, _, _ := measure(0); l < 100 || l > 104 {
		t.Errorf("left anchored text begins at %d", l)
	}
	if _, r, _, _ := measure(1); r < 95 || r > 100 {
		t.Errorf("right anchored text ends at %d", r)
	}
	l, r, top, bottom := measure(0.5)
	if math.Abs(float64(l+r)/2-99.5) > 1.5 {
		t.Errorf("centred text reaches from %d to %d", l, r)
	}
	if math.Abs(float64(top+bottom)/2-29.5) > 1.5 || bottom-top < 12 || bottom-top > 16 {
		t.Errorf("text reaches from %d down to %d about 30", top, bottom)
	}
	plain, haloed := 0.0, 0.0
	for i, f := range []Font{{Size: 20, Color: color.NRGBA{A: 255}}, {Size: 20, Color: color.NRGBA{A: 255}, Halo: color.NRGBA{255, 255, 255, 255}, HaloWidth: 2}} {
		img, c := blank(100, 60)
		c.Text("L12", 20, 40, f)
		if i == 0 {
			plain = coverage(img)
		} else {
			haloed = coverage(img)
		}
	}
	if haloed < 1.8*plain {
		t.Errorf("a halo covers %.0f, the text alone %.0f", haloed, plain)
	}
}

func TestMeasureText(t *testing.T) {
	_, c := blank(10, 10)
	f := Font{Size: 12}
	a, b := c.MeasureText("12 AWG", f), c.MeasureText("12 AWG 12 AWG", f)
	if !(a > 30 && a < 60 && b > 2*a && b < 2.2*a) {
		t.Errorf("widths %g, %g", a, b)
	}
	if d := c.MeasureText("12 AWG", Font{Size: 24}); math.Abs(d-2*a) > 0.5 {
		t.Errorf("twice the size is %g wide, once %g", d, a)
	}
}

// Pictures are drawn on several goroutines at once in the window; run with -race.
func TestRasterConcurrent(t *testing.T) {
	var wg sync.WaitGroup
	want := encode(t, drawn(looseScene(9, 1), 480, 360, Style{}))
	for range 4 {
		wg.Go(func() {
			if got := encode(t, drawn(looseScene(9, 1), 480, 360, Style{})); string(got) != string(want) {
				t.Error("two pictures of one scene differ")
			}
		})
	}
	wg.Wait()
}

func TestPopWithoutPush(t *testing.T) {
	_, c := blank(4, 4)
	for name, c := range map[string]Canvas{"raster": c, "recorder": NewRecorder(4, 4)} {
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%s: Pop without Push went through", name)
				}
			}()
			c.Pop()
		}()
	}
}
