package render

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/section"
)

func TestViewInverse(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for range 500 {
		v := View{CX: 100 * rng.NormFloat64(), CY: 100 * rng.NormFloat64(), PxPerMM: math.Exp(3 * rng.NormFloat64()), W: 1 + rng.IntN(3000), H: 1 + rng.IntN(3000)}
		p := section.Point{X: 100 * rng.NormFloat64(), Y: 100 * rng.NormFloat64()}
		x, y := v.ToPx(p)
		q := v.ToMM(x, y)
		if math.Hypot(q.X-p.X, q.Y-p.Y) > 1e-9*(1+math.Hypot(p.X, p.Y)+math.Hypot(v.CX, v.CY)) {
			t.Fatalf("%+v: %v came back as %v", v, p, q)
		}
		if _, up := v.ToPx(section.Point{X: p.X, Y: p.Y + 1}); up >= y {
			t.Fatalf("%+v: up in mm is not up in pixels", v)
		}
		x2, y2 := 3000*rng.Float64(), 3000*rng.Float64()
		under := v.ToMM(x2, y2)
		z := v.ZoomAt(x2, y2, 0.2+4*rng.Float64())
		if zx, zy := z.ToPx(under); math.Hypot(zx-x2, zy-y2) > 1e-6*(1+v.PxPerMM) {
			t.Fatalf("zooming moved the point under the pointer by %g", math.Hypot(zx-x2, zy-y2))
		}
		if px, py := v.Pan(3, -7).ToPx(p); math.Abs(px-x-3) > 1e-6 || math.Abs(py-y+7) > 1e-6 {
			t.Fatalf("panned by %g, %g", px-x, py-y)
		}
	}
}

func TestFitView(t *testing.T) {
	unset := nestedScene()
	spare := core("S1", section.Point{X: 22, Y: 4}, 1, 1.6)
	spare.Unset = true
	unset.Shapes = append(unset.Shapes, spare)
	for name, s := range map[string]Scene{"hex": hexScene(37), "wireway": wirewayScene(9), "one": oneScene(), "bundle": bundleScene(5), "unset": unset} {
		for _, size := range [][2]int{{900, 700}, {346, 160}, {200, 900}, {2000, 300}, {60, 40}, {1, 1}} {
			for _, k := range []float64{0, 1, 2} {
				v := FitView(s.Shapes, size[0], size[1], Style{Scale: k})
				if v.W != size[0] || v.H != size[1] || !(v.PxPerMM > 0) {
					t.Fatalf("%s %v: %+v", name, size, v)
				}
				b := boxOf(s.Shapes)
				x0, y0 := v.ToPx(section.Point{X: b.x0, Y: b.y1})
				x1, y1 := v.ToPx(section.Point{X: b.x1, Y: b.y0})
				if x0 < -1e-9 || y0 < -1e-9 || x1 > float64(size[0])+1e-9 || y1 > float64(size[1])+1e-9 {
					t.Errorf("%s %v × %g: shapes reach from %g, %g to %g, %g", name, size, k, x0, y0, x1, y1)
				}
				if used := max((x1-x0)/float64(size[0]), (y1-y0)/float64(size[1])); used < 0.5 {
					t.Errorf("%s %v × %g: only %.0f %% of the picture is used", name, size, k, 100*used)
				}
			}
		}
	}
	for _, shapes := range [][]section.Shape{nil, {{Kind: section.NoHolder}}, {{Kind: section.OpenBundle}}} {
		if v := FitView(shapes, 300, 200, Style{}); v.PxPerMM != emptyPxPerMM || v.CX != 0 || v.CY != 0 {
			t.Errorf("nothing to show: %+v", v)
		}
	}
	if v := FitView(nil, 0, -5, Style{}); v.W != 1 || v.H != 1 {
		t.Errorf("no room: %+v", v)
	}
}

func TestHit(t *testing.T) {
	s := nestedScene()
	for _, c := range []struct {
		x, y float64
		want string
	}{
		{0, 0, ""},                 // between the parts
		{0, 100, ""},               // outside
		{12.9, 0, ""},              // in the jacket
		{0, 5.5, "H1"},             // in a hose's bore
		{3.5, 5.5, "H1"},           // in its wall
		{5.5, 6, "F1"},             // a filler
		{-5.5, -3, "C1"},           // the middle of a cable
		{-5.5, -3 + 5.1, "C1"},     // its jacket
		{-5.5 + 2.21, -2, "C1/L1"}, // a core in it
		{5.5, -3, "C2"},
	} {
		if got := Hit(s.Shapes, section.Point{X: c.x, Y: c.y}); got != c.want {
			t.Errorf("at %g, %g: %q, want %q", c.x, c.y, got, c.want)
		}
	}
	over := []section.Shape{core("A", section.Point{}, 1, 2), core("B", section.Point{X: 3}, 1, 2)}
	if got := Hit(over, section.Point{X: 1.4}); got != "A" {
		t.Errorf("of two that overlap, %q", got)
	}
	if got := Hit(over, section.Point{X: 1.6}); got != "B" {
		t.Errorf("of two that overlap, %q", got)
	}
	if got := Hit(nil, section.Point{}); got != "" {
		t.Errorf("nothing there: %q", got)
	}
}

func TestEnclose(t *testing.T) {
	// seven equal circles in a hexagon: three times the radius (exact by symmetry)
	var d []disc
	for _, p := range hexPlaces(7, 2) {
		d = append(d, disc{p.X + 7, p.Y - 4, 2})
	}
	if c := enclose(d); math.Abs(c.r-6) > 0.01 || math.Hypot(c.x-7, c.y+4) > 0.02 {
		t.Errorf("circle round a hexagon: %v", c)
	}
	// two unequal circles: the sum of the diameters and the gap
	if c := enclose([]disc{{0, 0, 1}, {6, 0, 2}}); math.Abs(c.r-4.5) > 0.01 || math.Abs(c.x-3.5) > 0.02 {
		t.Errorf("circle round two: %v", c)
	}
	if c := enclose([]disc{{1, 1, 3}}); c != (disc{1, 1, 3}) {
		t.Errorf("circle round one: %v", c)
	}
}

func TestOutlineLeave(t *testing.T) {
	round := outline{round: &disc{0, 0, 5}}
	if got := round.leave(3, 0, 1, 0); math.Abs(got-2) > 1e-12 {
		t.Errorf("out of a circle: %g", got)
	}
	rect := outline{rect: &box{0, 0, 10, 4}}
	if got := rect.leave(2, 1, 0, 1); math.Abs(got-3) > 1e-12 {
		t.Errorf("out of a rectangle: %g", got)
	}
	if got := rect.leave(20, 1, 0, 1); got != 0 {
		t.Errorf("past a rectangle: %g", got)
	}
	parts := outline{parts: []disc{{0, 0, 1}, {4, 0, 1}}}
	if got := parts.leave(0, 0, 1, 0); math.Abs(got-5) > 1e-12 {
		t.Errorf("out of two parts in a row: %g", got)
	}
}
