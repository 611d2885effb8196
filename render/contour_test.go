package render

import (
	"math"
	"sync/atomic"
	"testing"
)

// cone fills a grid with the distance from (cx, cy).
func cone(n int, step, cx, cy float64) *tempGrid {
	g := &tempGrid{step: step, nx: n, ny: n, v: make([]float64, n*n)}
	for j := range n {
		for i := range n {
			g.v[j*n+i] = math.Hypot(float64(i)*step-cx, float64(j)*step-cy)
		}
	}
	return g
}

func TestContourOfACone(t *testing.T) {
	g := cone(41, 5, 101.3, 98.7)
	for i, lines := range g.contours([]float64{30, 60, 90}) {
		r := 30 * float64(i+1)
		if len(lines) != 1 {
			t.Fatalf("radius %g: %d lines", r, len(lines))
		}
		l := lines[0]
		if l[0] != l[len(l)-1] {
			t.Errorf("radius %g: the ring is open", r)
		}
		length := 0.0
		for k, p := range l {
			if d := math.Hypot(p.X-101.3, p.Y-98.7); math.Abs(d-r) > 0.25 { // linear interpolation in a cell of 5
				t.Errorf("radius %g: a point at %.3f", r, d)
			}
			if k > 0 {
				length += between(l[k-1], p)
			}
		}
		if math.Abs(length-2*math.Pi*r) > 0.02*2*math.Pi*r {
			t.Errorf("radius %g: length %.1f, want %.1f", r, length, 2*math.Pi*r)
		}
	}
}

func TestContourAtTheEdgeOfTheKnown(t *testing.T) {
	g := cone(21, 5, 50, 50)
	for k := range g.v {
		if k%g.nx > 10 {
			g.v[k] = math.NaN()
		}
	}
	lines := g.contours([]float64{30})[0]
	if len(lines) != 1 || lines[0][0] == lines[0][len(lines[0])-1] {
		t.Fatalf("%d lines; half a ring should be one open line", len(lines))
	}
	for _, p := range lines[0] {
		if p.X > 50+1e-9 {
			t.Errorf("a line at x = %g where nothing is known", p.X)
		}
	}
	if got := g.contours([]float64{500}); len(got[0]) != 0 {
		t.Errorf("a temperature that is not there: %v", got)
	}
}

// A saddle x·y: two branches that never meet, on either side of the level 0.
func TestContourOfASaddle(t *testing.T) {
	g := &tempGrid{x0: -50, y0: -50, step: 10, nx: 11, ny: 11, v: make([]float64, 121)}
	for j := range 11 {
		for i := range 11 {
			g.v[j*11+i] = float64(i*10-50+3) * float64(j*10-50-2)
		}
	}
	for _, level := range []float64{40, -40} {
		lines := g.contours([]float64{level})[0]
		if len(lines) != 2 {
			t.Fatalf("level %g: %d branches", level, len(lines))
		}
		for _, l := range lines {
			side := math.Copysign(1, l[0].X+3)
			for _, p := range l {
				if math.Copysign(1, p.X+3) != side {
					t.Errorf("level %g: a branch crosses the saddle", level)
				}
			}
		}
	}
}

func TestIsothermsAreRoundAndLabelledOnce(t *testing.T) {
	s := overScene()
	r := NewRecorder(900, 700)
	p := newSectionPainter(r, s, FitView(s.Shapes, 900, 700, Style{}), ScaleOf(s), Style{})
	all := p.isotherms()
	limits := 0
	for _, l := range all {
		if l.limit {
			limits++
			continue
		}
		if math.Abs(l.temp/5-math.Round(l.temp/5)) > 1e-9 {
			t.Errorf("a line at %g °C", l.temp)
		}
		for _, poly := range l.lines {
			for _, q := range poly {
				if !insideOutline(p.edge, q) && distanceInside(p.edge, q.X, q.Y) < -6 {
					t.Errorf("a line of %g °C outside the section at %v", l.temp, q)
				}
			}
		}
	}
	if limits == 0 {
		t.Error("no line at the limit")
	}
	s.Draft = true
	p = newSectionPainter(NewRecorder(900, 700), s, FitView(s.Shapes, 900, 700, Style{}), ScaleOf(s), Style{})
	if coarse := p.isotherms(); points(coarse) >= points(all) || points(coarse) == 0 {
		t.Errorf("a draft has %d points, a whole picture %d", points(coarse), points(all))
	}
}

func points(all []isoline) int {
	n := 0
	for _, l := range all {
		for _, p := range l.lines {
			n += len(p)
		}
	}
	return n
}

// countedField counts the rows that are asked of it.
type countedField struct {
	Field
	rows *atomic.Int64
}

func (f countedField) Row(dst []float64, y, x0, dx float64) {
	f.rows.Add(1)
	f.Field.Row(dst, y, x0, dx)
}

func TestContoursAreKept(t *testing.T) {
	s := overScene()
	f := countedField{s.Field, new(atomic.Int64)}
	s.Field = f
	v := FitView(s.Shapes, 500, 400, Style{})
	draw := func() string {
		r := NewRecorder(500, 400)
		SectionLayer(r, s, v, ScaleOf(s), Style{})
		return r.String()
	}
	first := draw()
	asked := f.rows.Load()
	if second := draw(); second != first || asked == 0 || f.rows.Load() != asked {
		t.Errorf("asked %d rows, then %d; same picture: %v", asked, f.rows.Load()-asked, second == first)
	}
	v = v.Pan(3, 0)
	draw()
	if f.rows.Load() == asked {
		t.Error("another view shows the old lines")
	}
	asked = f.rows.Load()
	s.Field = countedField{overScene().Field, f.rows}
	if draw(); f.rows.Load() == asked {
		t.Error("another field shows the old lines")
	}
}
