package render

import (
	"image/color"
	"math"
	"testing"

	"packrise/solver/section"
)

// slope is a field that rises evenly to the right, inside an outline.
type slope struct {
	edge outline
	hole float64 // NaN inside this radius
}

func (f slope) Bounds() (x0, y0, x1, y1 float64) {
	b := f.edge.box()
	return b.x0, b.y0, b.x1, b.y1
}

func (f slope) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		x := x0 + float64(i)*dx
		dst[i] = 50 + 2*x
		if !insideOutline(f.edge, section.Point{X: x, Y: y}) || math.Hypot(x, y) < f.hole {
			dst[i] = math.NaN()
		}
	}
}

func slopeScene(rect bool) Scene {
	s := Scene{AmbientC: 30, Shapes: []section.Shape{{Kind: section.Jacket, Rings: []section.Ring{{R1: 9}, {R0: 9, R1: 10}}}}}
	if rect {
		s.Shapes[0] = section.Shape{Kind: section.Wireway, At: section.Point{X: -8, Y: -5}, Width: 16, Height: 10, Rings: []section.Ring{{R1: 2}}}
	}
	s.Field = slope{edge: outlineOf(s.Shapes)}
	return s
}

func TestHeatLayerShowsTheField(t *testing.T) {
	for _, rect := range []bool{false, true} {
		for _, coarse := range []bool{false, true} {
			s := slopeScene(rect)
			v := View{CX: 0.3, CY: -0.2, PxPerMM: 13, W: 301, H: 307}
			sc := Scale{30, 70}
			img := HeatLayer(s, v, sc, coarse)
			if img.Rect.Dx() != v.W || img.Rect.Dy() != v.H {
				t.Fatalf("size %v", img.Rect)
			}
			edge := outlineOf(s.Shapes).toPx(v)
			for y := range v.H {
				for x := range v.W {
					c := img.RGBAAt(x, y)
					p := v.ToMM(float64(x)+0.5, float64(y)+0.5)
					far := distanceInside(edge, float64(x)+0.5, float64(y)+0.5)
					switch {
					case far < -1 && c.A != 0:
						t.Fatalf("rect %v coarse %v: colour %v outside at %d, %d", rect, coarse, c, x, y)
					case far > 1:
						want := sc.Color(50 + 2*p.X)
						if c.A != 255 || apart(c, want) > 3 {
							t.Fatalf("rect %v coarse %v: %v at %d, %d, want %v", rect, coarse, c, x, y, want)
						}
					}
				}
			}
		}
	}
}

// distanceInside returns how deep a point lies inside a circle or rectangle, negative outside.
func distanceInside(o outline, x, y float64) float64 {
	if o.rect != nil {
		return min(x-o.rect.x0, o.rect.x1-x, y-o.rect.y0, o.rect.y1-y)
	}
	return o.round.r - math.Hypot(x-o.round.x, y-o.round.y)
}

func apart(a color.RGBA, b color.NRGBA) int {
	d := func(p, q uint8) int { return max(int(p)-int(q), int(q)-int(p)) }
	return max(d(a.R, b.R), d(a.G, b.G), d(a.B, b.B))
}

// The edge is smooth: the summed coverage is the outline's area, at any step.
func TestHeatLayerEdge(t *testing.T) {
	for _, coarse := range []bool{false, true} {
		v := View{CX: 0.13, CY: 0.07, PxPerMM: 12.3, W: 300, H: 300}
		img := HeatLayer(slopeScene(false), v, Scale{30, 70}, coarse)
		sum, partly := 0.0, 0
		for i := 3; i < len(img.Pix); i += 4 {
			sum += float64(img.Pix[i]) / 255
			if a := img.Pix[i]; a > 0 && a < 255 {
				partly++
			}
			if img.Pix[i-3] > img.Pix[i] || img.Pix[i-2] > img.Pix[i] || img.Pix[i-1] > img.Pix[i] {
				t.Fatal("a colour is brighter than its own coverage: not premultiplied")
			}
		}
		if want := math.Pi * math.Pow(10*v.PxPerMM, 2); math.Abs(sum-want) > 2e-4*want {
			t.Errorf("coarse %v: area %.1f px, want %.1f", coarse, sum, want)
		}
		if partly < 400 {
			t.Errorf("coarse %v: only %d pixels are partly covered", coarse, partly)
		}
	}
}

func TestHeatLayerUnknownInside(t *testing.T) {
	s := slopeScene(false)
	f := s.Field.(slope)
	f.hole = 4
	s.Field = f
	v := View{PxPerMM: 10, W: 240, H: 240}
	img := HeatLayer(s, v, Scale{30, 70}, false)
	if a := img.RGBAAt(120, 120).A; a != 0 {
		t.Errorf("the middle of a hole has coverage %d", a)
	}
	if a := img.RGBAAt(120+60, 120).A; a != 255 {
		t.Errorf("beside the hole: coverage %d", a)
	}
}

func TestHeatLayerWithoutField(t *testing.T) {
	s := looseScene(5, 2)
	s.Field = nil
	v := FitView(s.Shapes, 300, 300, Style{})
	sc := Scale{30, 90}
	img := HeatLayer(s, v, sc, false)
	for _, r := range s.Readings {
		for _, sh := range s.Shapes {
			if sh.ID != r.ID || sh.ID == "" {
				continue
			}
			x, y := v.ToPx(sh.At)
			if c := img.RGBAAt(int(x), int(y)); apart(c, sc.Color(r.TempC)) > 1 {
				t.Errorf("%s is %v, want %v", r.ID, c, sc.Color(r.TempC))
			}
		}
	}
	s.Readings = nil
	for _, b := range HeatLayer(s, v, sc, false).Pix {
		if b != 0 {
			t.Fatal("a scene that is not solved has heat")
		}
	}
}

func TestHeatLayerOddViews(t *testing.T) {
	s := slopeScene(false)
	for _, v := range []View{{PxPerMM: 10, W: 0, H: 0}, {PxPerMM: 10, W: 1, H: 1}, {PxPerMM: 1e6, W: 40, H: 40}, {CX: 500, PxPerMM: 10, W: 50, H: 50}, {PxPerMM: 1e-6, W: 50, H: 50}} {
		for _, coarse := range []bool{false, true} {
			if img := HeatLayer(s, v, Scale{30, 70}, coarse); img.Rect.Dx() != v.W {
				t.Errorf("%+v: %v", v, img.Rect)
			}
		}
	}
}

// fastField costs next to nothing, so that the benchmark times the painting.
type fastField struct{ Field }

func (fastField) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		dst[i] = 60 + x0 + float64(i)*dx - y
	}
}

func BenchmarkHeatLayer(b *testing.B) {
	s := hexScene(7)
	s.Field = fastField{s.Field}
	v := FitView(s.Shapes, 900, 900, Style{})
	for _, m := range []struct {
		name   string
		coarse bool
	}{{"coarse", true}, {"fine", false}} {
		b.Run(m.name, func(b *testing.B) {
			for b.Loop() {
				HeatLayer(s, v, Scale{30, 90}, m.coarse)
			}
		})
	}
}
