package ui

import (
	"context"
	"fmt"
	"strings"
	"sync"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"

	"packrise/solver/catalog"
	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
)

var benchCatalog = sync.OnceValue(catalog.Load)

// benchDesign is a conduit with three circuits' worth of wires, a filler and one wire in no load. Invented.
const benchDesign = `packrise: 1
title: Crane feed
surroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 9}
holder: {kind: conduit, inside_mm: 26.6, layers: [{material: steel, thickness_mm: 1.4}], fill: air}
parts:
  - {id: L1, kind: core, stock: thhn-8, at_mm: [-6, -6]}
  - {id: L2, kind: core, stock: thhn-8, at_mm: [0, -9]}
  - {id: L10, kind: core, stock: thhn-8, at_mm: [6, -6]}
  - {id: N1, kind: core, conductor: {size: 2.5 mm2}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [0, 2]}
  - {id: F1, kind: rod, diameter_mm: 4, material: polypropylene, at_mm: [0, 8]}
loads:
  - {id: motor-1, conductors: [L1, L2], current_a: 36}
  - {id: heater, conductors: [L10], current_a: 12.5}
`

// bench is a desk whose answers a test gives.
type bench struct {
	*Desk
	t     testing.TB
	hops  chan func()
	after []func() // what waits for time to pass
	temps map[string]float64
	limit map[string]float64
}

// newBench opens a desk on a design; answers come from temps and limits, 50 °C and 90 °C where they say nothing.
func newBench(t testing.TB, design string) *bench {
	t.Helper()

	d, problems := section.Read([]byte(design))
	if d == nil {
		t.Fatalf("the test's design is refused: %v", problems)
	}
	b := &bench{t: t, hops: make(chan func(), 1000), temps: map[string]float64{}, limit: map[string]float64{}}
	var mu sync.Mutex
	answers := func() (map[string]float64, map[string]float64) {
		mu.Lock()
		defer mu.Unlock()
		return b.temps, b.limit
	}
	b.open(d, Rooms{
		Solve: func(_ context.Context, d *section.Document, _ rating.Options) (*rating.Result, []section.Problem, error) {
			temps, limits := answers()
			return benchAnswer(d, temps, limits), nil, nil
		},
		Outline: benchOutline,
	})
	return b
}

// newSolvingBench opens a desk on a design with the program's own answers.
func newSolvingBench(t testing.TB, design string) *bench {
	t.Helper()
	d, problems := section.Read([]byte(design))
	if d == nil {
		t.Fatalf("the test's design is refused: %v", problems)
	}
	b := &bench{t: t, hops: make(chan func(), 1000)}
	b.open(d, Rooms{})
	return b
}

// open opens the desk with the test's goroutine for the window's.
func (b *bench) open(d *section.Document, r Rooms) {
	if fyne.CurrentApp().Settings().Theme() != fyne.Theme(NewTheme(LookLight)) { // another test had its own
		fyne.CurrentApp().Settings().SetTheme(NewTheme(LookLight))
	}
	if r.Rate == nil {
		r.Rate = noRatings
	}
	r.Hop = func(f func()) { b.hops <- f }
	r.Beside = func(f func()) { f() }
	r.After = func(_ time.Duration, f func()) func() {
		b.after = append(b.after, f)
		return func() {}
	}
	b.Desk = NewDeskWith(benchCatalog(), d, r)
	b.t.Cleanup(b.Close)
	b.wait()
}

// wait brings what is under way to the window, the answer at last.
func (b *bench) wait() {
	for b.Solving() || len(b.hops) > 0 {
		(<-b.hops)()
	}
}

// elapse lets the time pass after which old answers are greyed. The answer under way does not arrive.
func (b *bench) elapse() {
	for _, f := range b.after {
		f()
	}
	b.after = nil
	for len(b.hops) > 0 {
		f := <-b.hops
		f()
		if b.Stale() {
			return
		}
	}
}

// answer gives temperatures and has the desk answer anew.
func (b *bench) answer(temps, limits map[string]float64) {
	b.temps, b.limit = temps, limits
	b.Apply(section.Edit{Name: "touch", Do: func(d *section.Document) *section.Document {
		return d.With(func(d *section.Document) { d.Notes += "." })
	}}, false)
	b.wait()
}

// current returns what a conductor carries, as the file says it.
func (b *bench) current(id string) string { return loadText(section.LoadOf(b.Document(), id)) }

func benchAnswer(d *section.Document, temps, limits map[string]float64) *rating.Result {
	r := &rating.Result{AmbientC: d.Surroundings.AmbientC.V, Generated: 21.6, Released: 21.6, SurfaceC: 48.2, Notes: []string{"air at rest between the parts: too hot"}}
	r.Shapes, _ = benchOutline(d, nil)
	for _, p := range section.UnfoldAll(d) {
		temp, limit := 50.0, section.Some(90.0)
		if v, ok := temps[p.ID]; ok {
			temp = v
		}
		if v, ok := limits[p.ID]; ok {
			limit = section.Some(v)
		}
		if p.Part.LimitC.OK {
			limit = p.Part.LimitC
		}
		if p.Part.Kind == section.Core {
			c := rating.Conductor{ID: p.ID, TempC: temp, LimitC: limit, LimitBy: "THHN, dry", HeatWM: 2.9}
			if l := section.LoadOf(d, p.ID); l != nil {
				c.CurrentA, c.Load = l.CurrentA, l.ID
			} else {
				r.Unassigned = append(r.Unassigned, p.ID)
			}
			r.Conductors = append(r.Conductors, c)
			if r.Hottest == "" || temp > temps[r.Hottest] {
				r.Hottest = p.ID
			}
		} else {
			r.Others = append(r.Others, rating.Other{ID: p.ID, Kind: p.Part.Kind, TempC: temp})
		}
		if m := limit.V - temp; p.Part.Kind == section.Core && (r.Governing == nil || m < r.Governing.MarginK) {
			r.Governing = &rating.Governs{Part: p.ID, TempC: temp, LimitC: limit.V, MarginK: m, SetBy: "THHN, dry"}
		}
	}
	r.Others = append(r.Others, rating.Other{ID: d.Holder.Kind, Kind: "layer", TempC: 49}, rating.Other{ID: "outside", Kind: "surface", TempC: 48.2})
	return r
}

// benchOutline draws parts with the catalogue's diameters and the holder by its inside.
func benchOutline(d *section.Document, _ *catalog.Catalog) ([]section.Shape, []section.Problem) {
	cat := benchCatalog()
	h := spelledHolder(cat, d.Holder)
	holder := section.Shape{Kind: h.Kind, Width: h.WidthMM.V, Height: h.HeightMM.V, Rings: []section.Ring{{Material: "steel", R0: h.InsideMM.V / 2, R1: h.InsideMM.V/2 + 1.4}}}
	out := []section.Shape{holder}
	for _, p := range section.UnfoldAll(d) {
		s := section.Shape{ID: p.ID, Kind: p.Part.Kind, At: p.At.V, Unset: !p.At.OK, Depth: p.Depth}
		whole := spelled(cat, *p.Part)
		r := whole.Diameter.V / 2
		if c, err := conductorOf(cat, whole.Conductor); err == nil {
			r = c.DiameterM * 500
			s.Rings = append(s.Rings, section.Ring{Material: c.Metal, Metal: true, R1: r})
		}
		if len(s.Rings) == 0 {
			s.Rings = append(s.Rings, section.Ring{R1: r})
		}
		for _, l := range whole.Layers {
			s.Rings = append(s.Rings, section.Ring{Material: l.Material, R0: r, R1: r + l.ThicknessMM})
			r += l.ThicknessMM
		}
		out = append(out, s)
	}
	return out, nil
}

// show puts a widget into a window of a size and returns its canvas.
func (b *bench) show(o fyne.CanvasObject, width, height float32) test.WindowlessCanvas {
	w := test.NewTempWindow(b.t, o)
	w.SetPadded(false)
	w.Resize(fyne.NewSize(width, height))
	return w.Canvas().(test.WindowlessCanvas)
}

// manyWires is a design of n wires in a wireway, no two touching.
func manyWires(n int) string {
	var s strings.Builder
	s.WriteString("packrise: 1\nsurroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 9}\nholder: {kind: wireway, width_mm: 200, height_mm: 200}\nparts:\n")
	for i := range n {
		fmt.Fprintf(&s, "  - {id: L%d, kind: core, stock: thhn-12, at_mm: [%s, %s]}\n", i+1, quantity.Plain(5+8*float64(i%20)), quantity.Plain(5+8*float64(i/20)))
	}
	s.WriteString("loads:\n")
	for i := range n {
		fmt.Fprintf(&s, "  - {id: c%d, conductors: [L%d], current_a: %d}\n", i+1, i+1, 5+i%20)
	}
	return s.String()
}
