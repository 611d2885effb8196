package render

import (
	"math"
	"strings"
	"testing"

	"packrise/solver/section"
)

// bodies are a touching pair, a lone wire and a bar, apart.
func bodies() []section.Shape {
	wire := func(id string, x, y float64) section.Shape {
		return section.Shape{ID: id, Kind: section.Core, At: section.Point{X: x, Y: y}, Rings: []section.Ring{{Material: "copper", Metal: true, R1: 1}, {Material: "pvc", R0: 1, R1: 2}}}
	}
	bar := section.Shape{
		ID: "B", Kind: section.Core, At: section.Point{X: 10, Y: 10}, Rings: []section.Ring{{Material: "copper", Metal: true, R1: math.Hypot(3, 1)}},
		Loops: [][]section.Point{{{X: 7, Y: 9}, {X: 13, Y: 9}, {X: 13, Y: 11}, {X: 7, Y: 11}}},
	}
	var hull []section.Point
	for k := range 60 {
		sin, cos := math.Sincos(2*math.Pi*float64(k)/60 - math.Pi/2)
		x := 2.0
		if k >= 30 {
			x = -2
		}
		hull = append(hull, section.Point{X: x + 2*cos, Y: 2 * sin})
	}
	return []section.Shape{{Kind: section.Apart, Loops: [][]section.Point{hull}}, wire("L1", -2, 0), wire("L2", 2, 0), wire("L3", 12, 0), bar}
}

// TestBodiesOutline: the pair's string, the lone wire and the bar are the section's edge, the string's pocket is inside, what lies between bodies is
// not.
func TestBodiesOutline(t *testing.T) {
	o := outlineOf(bodies())
	if len(o.parts) != 1 || len(o.loops) != 2 || !o.known() {
		t.Fatalf("%d discs, %d loops", len(o.parts), len(o.loops))
	}
	b := o.box()
	for i, want := range []float64{-4, -2, 14, 11} {
		if got := []float64{b.x0, b.y0, b.x1, b.y1}[i]; math.Abs(got-want) > 0.02 {
			t.Errorf("box %v", b)
		}
	}
	for _, c := range []struct {
		x, y float64
		in   bool
	}{{0, 1.8, true}, {7, 0, false}, {12, 0, true}, {10, 10, true}, {10, 12, false}} {
		if got := o.meetsBox(boxAround(c.x, c.y, 0.05)); got != c.in {
			t.Errorf("(%g, %g) inside: %v", c.x, c.y, got)
		}
	}
	if far := o.leave(0, 0, 1, 0); math.Abs(far-14) > 1e-9 {
		t.Errorf("left for good at %g", far)
	}
}

// TestBodiesAreCovered: the heat map fills each body and nothing between.
func TestBodiesAreCovered(t *testing.T) {
	s := Scene{Shapes: bodies(), Field: flatField{}, AmbientC: 30}
	v := View{CX: 5, CY: 4, PxPerMM: 10, W: 240, H: 200}
	img := HeatLayer(s, v, Scale{Low: 0, High: 100}, false)
	for _, c := range []struct {
		x, y float64
		full bool
	}{{0, 1.8, true}, {-2, 0, true}, {7, 0, false}, {12, 0, true}, {12.5, 10.5, true}, {10, 8.5, false}} {
		x, y := v.ToPx(section.Point{X: c.x, Y: c.y})
		if a := img.RGBAAt(int(x), int(y)).A; (a == 255) != c.full || !c.full && a != 0 {
			t.Errorf("(%g, %g): alpha %d", c.x, c.y, a)
		}
	}
}

// flatField is 50 °C everywhere.
type flatField struct{}

func (flatField) Bounds() (x0, y0, x1, y1 float64) { return -4, -2, 14, 11 }
func (flatField) Row(dst []float64, _, _, _ float64) {
	for i := range dst {
		dst[i] = 50
	}
}

// TestBodiesOnTheLadder: outsides share one label, but for one over its limit, whose callout starts on its body.
func TestBodiesOnTheLadder(t *testing.T) {
	surface := func(id string, temp float64) section.Reading {
		return section.Reading{ID: id, Kind: "surface", TempC: temp, LimitC: section.Some(60.0)}
	}
	s := Scene{Shapes: bodies(), AmbientC: 30, Readings: []section.Reading{
		{ID: "L1", Kind: section.Core, TempC: 59, Hottest: true}, surface("outside", 58), surface("outside of L3", 50), surface("outside of B", 61),
	}}
	rec := NewRecorder(900, 700)
	Draw(rec, s, Style{})
	all := rec.String()
	for _, want := range []string{"outsides", "outside of B"} {
		if !strings.Contains(all, want) {
			t.Errorf("no %q", want)
		}
	}
	if strings.Contains(all, "outside of L3") {
		t.Error("every outside has a label of its own")
	}
	p := newSectionPainter(NewRecorder(240, 200), s, View{CX: 5, CY: 4, PxPerMM: 10, W: 240, H: 200}, Scale{Low: 0, High: 100}, Style{})
	for id, at := range map[string]section.Point{"outside": {X: -2, Y: 0}, "outside of L3": {X: 12, Y: 0}, "outside of L2, L1": {X: 2, Y: 0}} {
		x, y := p.v.ToPx(at)
		if d, ok := p.bodyOf(id); !ok || math.Hypot(d.x-x, d.y-y) > 1e-9 {
			t.Errorf("%s is pointed at (%g, %g)", id, d.x, d.y)
		}
	}
}
