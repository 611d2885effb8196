package render

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"sync/atomic"
	"testing"

	"packrise/solver/section"
)

// sources is the exact field of line sources in a disc of radius r with an isothermal rim, by images (any textbook of heat
// conduction, as Carslaw & Jaeger 1959): each source of strength q at distance d from the middle has its negative at r²/d. Where
// the metal would be it is hotter still, so that lines may end there only where heat flows in.
type sources struct {
	r, rim float64
	at     []section.Point
	q      []float64 // rise is q·ln(distance ratio)
}

func (s *sources) Bounds() (x0, y0, x1, y1 float64) { return -s.r, -s.r, s.r, s.r }

func (s *sources) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		dst[i] = s.At(x0+float64(i)*dx, y)
	}
}

func (s *sources) At(x, y float64) float64 {
	if math.Hypot(x, y) > s.r {
		return math.NaN()
	}
	t := s.rim
	for i, p := range s.at {
		d2 := p.X*p.X + p.Y*p.Y
		near := math.Hypot(x-p.X, y-p.Y)
		if d2 == 0 {
			t += s.q[i] * math.Log(s.r/near)
			continue
		}
		k := s.r * s.r / d2
		far := math.Hypot(x-k*p.X, y-k*p.Y)
		t += s.q[i] * math.Log(far*math.Sqrt(d2)/(s.r*near))
	}
	return t
}

// sourceScene has small metals about the sources and heats in their proportion.
func sourceScene(f *sources, metal float64) Scene {
	s := Scene{Field: f, AmbientC: f.rim, Flow: true}
	s.Shapes = append(s.Shapes, section.Shape{Kind: section.Jacket, Rings: []section.Ring{{Material: "pvc", R0: 0.95 * f.r, R1: f.r}}})
	for i, p := range f.at {
		id := fmt.Sprintf("L%d", i+1)
		s.Shapes = append(s.Shapes, core(id, p, metal, 1.8*metal))
		s.Readings = append(s.Readings, section.Reading{ID: id, Kind: section.Core, TempC: f.At(p.X+metal, p.Y), HeatWM: f.q[i], LoadKnown: true})
	}
	return s
}

// manySources is n sources of unlike strength that keep clear of each other.
func manySources(n int, seed uint64) *sources {
	rng := rand.New(rand.NewPCG(seed, 3))
	f := &sources{r: 10, rim: 30}
	for len(f.at) < n {
		sin, cos := math.Sincos(2 * math.Pi * rng.Float64())
		d := 8.5 * math.Sqrt(rng.Float64())
		p := section.Point{X: d * cos, Y: d * sin}
		clear := true
		for _, o := range f.at {
			clear = clear && between(o, p) > 1.6
		}
		if clear {
			f.at, f.q = append(f.at, p), append(f.q, 1+4*rng.Float64())
		}
	}
	return f
}

func TestConcentricFlowIsRadial(t *testing.T) {
	f := &sources{r: 10, rim: 30, at: []section.Point{{}}, q: []float64{8}}
	s := sourceScene(f, 2)
	fl := flowOf(s)
	if want := 16; fl.each != 0.5 || len(fl.lines) != want { // 8 W/m in lines of a round amount, at most 32
		t.Fatalf("%d lines of %g W/m", len(fl.lines), fl.each)
	}
	for i, l := range fl.lines {
		a, b := l.points[0], l.points[len(l.points)-1]
		if l.end != flowOut || math.Abs(math.Hypot(b.X, b.Y)-10) > 1e-3 || math.Abs(math.Hypot(a.X, a.Y)-2) > 1e-2 {
			t.Errorf("line %d runs from %.4f to %.4f mm and ends %v", i, math.Hypot(a.X, a.Y), math.Hypot(b.X, b.Y), l.end)
		}
		turn := math.Atan2(a.Y, a.X)
		for _, q := range l.points {
			if off := math.Hypot(q.X, q.Y) * math.Abs(math.Sin(math.Atan2(q.Y, q.X)-turn)); off > 0.02 { // half a cell of the grid
				t.Errorf("line %d is %.3f mm off its ray at %v", i, off, q)
			}
		}
		next := fl.lines[(i+1)%len(fl.lines)].points[0]
		if d := between(a, next); math.Abs(d-2*2*math.Sin(math.Pi/16)) > 0.02 { // a chord of 22.5°
			t.Errorf("lines %d and %d begin %.3f mm apart", i, i+1, d)
		}
	}
}

func TestFlowAmongSources(t *testing.T) {
	seeds := uint64(6)
	if testing.Short() {
		seeds = 2
	}
	for seed := range seeds {
		for _, n := range []int{2, 5, 9, 20} {
			s := sourceScene(manySources(n, seed), 0.4)
			fl := flowOf(s)
			checkFlow(t, fmt.Sprintf("seed %d, %d sources", seed, n), s, fl)
		}
	}
}

// checkFlow holds lines to what heat does: it falls, keeps its ways, leaves in the right amount and never stays inside.
func checkFlow(t *testing.T, name string, s Scene, fl *flow) {
	t.Helper()
	metals := metalsOf(s)
	left, want := 0, 0
	for _, m := range metals {
		want += int(math.Round(m.heat / fl.each))
	}
	for i, l := range fl.lines {
		if l.end == flowOut {
			left++
		}
		hot := math.Inf(1)
		for _, q := range l.points {
			at := fieldAt(s.Field, q)
			if !(at < hot) && finite(at) {
				t.Errorf("%s: line %d rises from %.4f to %.4f °C at %v", name, i, hot, at, q)
				break
			}
			hot = at
		}
		for _, m := range metals {
			for _, q := range l.points[1:] {
				if (l.from < 0 || m.id != metals[l.from].id) && math.Hypot(q.X-m.at.X, q.Y-m.at.Y) < m.r-1e-6 {
					t.Errorf("%s: line %d runs into %s", name, i, m.id)
					break
				}
			}
		}
	}
	if left != want || want == 0 {
		t.Errorf("%s: %d lines leave, the heat is %d", name, left, want)
	}
	for i := range fl.lines {
		for j := range i {
			if q, met := crossing(fl.lines[i].points, fl.lines[j].points); met {
				t.Errorf("%s: lines %d and %d cross at %v", name, j, i, q)
			}
		}
	}
}

// crossing finds a place where two lines properly cross.
func crossing(a, b []section.Point) (q section.Point, ok bool) {
	side := func(p, q, r section.Point) float64 { return (q.X-p.X)*(r.Y-p.Y) - (q.Y-p.Y)*(r.X-p.X) }
	for i := 1; i < len(a); i++ {
		for j := 1; j < len(b); j++ {
			if side(a[i-1], a[i], b[j-1])*side(a[i-1], a[i], b[j]) < 0 && side(b[j-1], b[j], a[i-1])*side(b[j-1], b[j], a[i]) < 0 {
				return a[i], true
			}
		}
	}
	return q, false
}

// Heat goes on from idle metal: as many lines leave it as reach it, and what makes none itself begins none.
func TestFlowGoesOnFromIdleMetal(t *testing.T) {
	f := &sources{r: 10, rim: 30, at: []section.Point{{X: -4}}, q: []float64{8}}
	s := sourceScene(f, 1)
	s.Shapes = append(s.Shapes, core("spare", section.Point{X: -1}, 1, 1.2), core("far", section.Point{X: 9.2}, 0.01, 0.02))
	s.Readings = append(s.Readings, section.Reading{ID: "spare", TempC: f.At(-1, 0), Unloaded: true}, section.Reading{ID: "far", TempC: f.At(9.2, 0), Unloaded: true})
	fl := flowOf(s)
	metals := metalsOf(s)
	came, went := map[string]int{}, map[string]int{}
	for _, l := range fl.lines {
		went[metals[l.from].id]++
		if l.to >= 0 {
			came[metals[l.to].id]++
		}
	}
	if came["spare"] == 0 || came["spare"] != went["spare"] || went["far"] != came["far"] || went["L1"] != 16 {
		t.Errorf("reached %v, left %v", came, went)
	}
}

// A bar's lines begin on its outline, and more of them where more heat leaves.
func TestFlowOfABar(t *testing.T) {
	f := &sources{r: 10, rim: 30, at: []section.Point{{}}, q: []float64{8}}
	s := sourceScene(f, 2)
	loop := []section.Point{{X: -2, Y: 0.5}, {X: 2, Y: 0.5}, {X: 2, Y: -0.5}, {X: -2, Y: -0.5}} // clockwise, as some are given
	bar := &s.Shapes[1]
	bar.Rings, bar.Loops = []section.Ring{{Material: "copper", Metal: true, R1: math.Hypot(2, 0.5)}}, [][]section.Point{loop}
	fl := flowOf(s)
	if len(fl.lines) != 16 {
		t.Fatalf("%d lines", len(fl.lines))
	}
	for i, l := range fl.lines {
		off := math.Inf(1)
		for k, a := range loop {
			off = min(off, segmentDistance(l.points[0], a, loop[(k+1)%4]))
		}
		if off > 1e-9 || l.end != flowOut || math.Abs(l.points[1].X) < 2 && math.Abs(l.points[1].Y) < 0.5 {
			t.Errorf("line %d begins %.4g mm off the bar, ends %v", i, off, l.end)
		}
	}
}

// Lines end on a wireway's sheet metal, whose own slopes are too small to follow, and go through plastic to the outside.
func TestFlowEndsOnSheetMetal(t *testing.T) {
	for _, metal := range []bool{true, false} {
		s := sourceScene(&sources{r: 10, rim: 30, at: []section.Point{{X: -3, Y: -2}, {X: 3, Y: 1}}, q: []float64{6, 4}}, 0.4)
		s.Shapes[0] = section.Shape{
			Kind: section.Wireway, At: section.Point{X: -6, Y: -6}, Width: 12, Height: 12, // its corners lie in the disc
			Rings: []section.Ring{{Material: "pvc", R0: 0, R1: 0.5}, {Material: "steel", Metal: metal, R0: 0.5, R1: 2}},
		}
		for i, l := range flowOf(s).lines {
			q := l.points[len(l.points)-1]
			on := math.Abs(max(math.Abs(q.X), math.Abs(q.Y))-6.5) < 1e-3
			if l.end != flowMet && (on != metal || (l.end == flowWall) != metal) {
				t.Errorf("metal %v: line %d ends %v at %v", metal, i, l.end, q)
			}
		}
	}
}

func TestFlowIsDrawnOnlyWhereItBelongs(t *testing.T) {
	draw := func(s Scene) string {
		r := NewRecorder(700, 600)
		SectionLayer(r, s, FitView(s.Shapes, 700, 600, Style{}), ScaleOf(s), Style{})
		return r.String()
	}
	const key = "one line = "
	s := sourceScene(manySources(5, 1), 0.4)
	if !strings.Contains(draw(s), key) {
		t.Error("no key of the lines")
	}
	for name, change := range map[string]func(*Scene){
		"not wanted": func(s *Scene) { s.Flow = false },
		"stale":      func(s *Scene) { s.Stale = true },
		"draft":      func(s *Scene) { s.Draft = true },
		"no field":   func(s *Scene) { s.Field = nil },
		"no heat": func(s *Scene) {
			s.Readings = append([]section.Reading(nil), s.Readings...)
			for i := range s.Readings {
				s.Readings[i].HeatWM = 0
			}
			s.Field = countedField{s.Field, new(atomic.Int64)} // another field, so that its lines are looked for
		},
	} {
		c := s
		change(&c)
		if strings.Contains(draw(c), key) {
			t.Errorf("%s: the lines are drawn", name)
		}
	}
	plain := s
	plain.Plain = true
	if got := draw(plain); !strings.Contains(got, key) || len(got) >= len(draw(s)) {
		t.Error("without isotherms the heat-flow lines should stay and the isotherms go")
	}
}

func TestFlowIsKept(t *testing.T) {
	s := sourceScene(manySources(5, 2), 0.4)
	f := countedField{s.Field, new(atomic.Int64)}
	s.Field = f
	first := lastFlow.of(s)
	asked := f.rows.Load()
	if second := lastFlow.of(s); second != first || f.rows.Load() != asked || asked == 0 {
		t.Errorf("asked %d rows, then %d", asked, f.rows.Load()-asked)
	}
	s.Field = countedField{manySources(5, 3), new(atomic.Int64)}
	if lastFlow.of(s) == first {
		t.Error("another field shows the old lines")
	}
}

func TestFlowGolden(t *testing.T) {
	f := &sources{r: 10, rim: 30, at: []section.Point{{X: -3}, {X: 3}}, q: []float64{6, 6}}
	s := sourceScene(f, 1)
	r := NewRecorder(500, 400)
	SectionLayer(r, s, FitView(s.Shapes, 500, 400, Style{}), ScaleOf(s), Style{})
	goldenText(t, "section-flow", counted(r.String()))
}

// counted writes runs of like strokes and fills of heat-flow lines as their number: the steps of a line differ between processors.
func counted(drawn string) string {
	var out []string
	last, n := "", 0
	for _, l := range strings.SplitAfter(drawn, "\n") {
		f := strings.Fields(l)
		kind := ""
		switch {
		case strings.HasPrefix(l, "stroke 1.4 #0c12206e"), strings.HasPrefix(l, "fill #ffffffeb"):
			kind = "heads: fills and seams"
		case strings.Contains(l, "#0c12206e"), strings.Contains(l, "#ffffffeb"):
			kind = strings.Join(f[:3], " ")
		}
		if kind == "" || kind != last {
			if last != "" {
				out = append(out, fmt.Sprintf("%s × %d\n", last, n))
			}
			n = 0
		}
		if last, n = kind, n+1; kind == "" {
			out = append(out, l)
		}
	}
	return strings.Join(out, "")
}

func BenchmarkFlow(b *testing.B) {
	for _, n := range []int{9, 37} {
		f := manySources(n, 5)
		s := sourceScene(f, 0.3)
		b.Run(fmt.Sprintf("find%d", n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				flowOf(s)
			}
		})
		b.Run(fmt.Sprintf("draw%d", n), func(b *testing.B) {
			b.ReportAllocs()
			v := FitView(s.Shapes, 900, 700, Style{})
			for b.Loop() {
				p := newSectionPainter(NewRecorder(900, 700), s, v, ScaleOf(s), Style{})
				p.flowLines()
			}
		})
	}
}

// slab is heat that goes straight down between two held sides: q = k·ΔT/Δy.
type slab struct{ w, h, low, high float64 }

func (s *slab) Bounds() (x0, y0, x1, y1 float64) { return 0, 0, s.w, s.h }
func (s *slab) LayerK() []float64                { return []float64{0.3} }

func (s *slab) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		dst[i] = math.NaN()
		if x := x0 + float64(i)*dx; x >= 0 && x <= s.w && y >= 0 && y <= s.h {
			dst[i] = s.low + (s.high-s.low)*y/s.h
		}
	}
}

// Heat that comes in through a hot side begins lines there: 0.3 W/mK · 40 K · 60 mm / 40 mm = 18 W/m.
func TestFlowComesInThroughAHotSide(t *testing.T) {
	s := Scene{Field: &slab{60, 40, 20, 60}, Flow: true, Shapes: []section.Shape{{Kind: section.Wireway, Width: 60, Height: 40}}}
	f := flowOf(s)
	if f.each != 0.5 || len(f.lines) != 36 {
		t.Fatalf("%d lines of %g W/m", len(f.lines), f.each)
	}
	for i, l := range f.lines {
		a, b := l.points[0], l.points[len(l.points)-1]
		if l.from != -1 || l.end != flowOut || a.Y != 40 || b.Y > 1e-3 || math.Abs(a.X-b.X) > 1e-3 {
			t.Errorf("line %d from metal %d goes from %v to %v", i, l.from, a, b)
		}
	}
}

func TestFlowGuard(t *testing.T) {
	g := newFlowGuard(0.5)
	g.add(flowLine{to: 3, end: flowMet, points: []section.Point{{X: 0}, {X: 1}, {X: 2, Y: 1}, {X: 3, Y: 1}}})
	if !g.free([]section.Point{{X: 0, Y: 0.1}, {X: 3, Y: 2}}) || g.free([]section.Point{{X: 1.5, Y: 0.2}, {X: 1.5, Y: 0.6}}) {
		t.Error("the guard takes the wrong lines for free")
	}
	for _, y := range []float64{0.4, -0.4} { // from above and from below
		a, b := section.Point{X: 0.5, Y: y}, section.Point{X: 0.7, Y: -y}
		w, met := g.meets(a, b)
		l := flowLine{to: -1, points: []section.Point{a}}
		if !met || !g.beside(&l, w, 0.01) || l.to != 3 || l.end != flowMet {
			t.Fatalf("met %v, line %v", met, l)
		}
		last := l.points[len(l.points)-1]
		if off := (last.Y - 1) * y; math.Abs(last.X-3) > 1e-9 || off <= 0 || math.Abs(last.Y-1) > 0.011 {
			t.Errorf("the line beside ends at %v", last)
		}
		g.add(l) // the next one has to go between
		l = flowLine{to: -1, points: []section.Point{{X: 0.9, Y: y / 200}}}
		if w, met := g.meets(l.points[0], section.Point{X: 1.1, Y: -y}); !met || !g.beside(&l, w, 0.01) {
			t.Error("no room between two lines")
		}
		for i, a := range g.lines {
			if q, met := crossing(a.points, l.points); met {
				t.Errorf("lines %d and the one between cross at %v", i, q)
			}
		}
	}
}
