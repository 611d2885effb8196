package render

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"packrise/solver/section"
)

// onFloor is a round jacket, a part of whose outline rests on a floor.
func onFloor() []section.Shape {
	var line []section.Point
	for k := range 41 {
		s, c := math.Sincos(-3*math.Pi/4 + math.Pi/2*float64(k)/40)
		line = append(line, section.Point{X: 5 * c, Y: 5 * s})
	}
	return []section.Shape{{Kind: section.Jacket, Rings: []section.Ring{{R1: 4}, {R0: 4, R1: 5}}, Against: line}}
}

// TestAgainstIsDrawnOutside: the band lies outside the outline, close to it, all along what rests against something, and nowhere without.
func TestAgainstIsDrawnOutside(t *testing.T) {
	shapes := onFloor()
	v := View{PxPerMM: 30, W: 500, H: 500}
	rec := NewRecorder(500, 500)
	p := newSectionPainter(rec, Scene{Shapes: shapes}, v, Scale{Low: 0, High: 100}, Style{})
	p.against()
	lines := beside(evenly(p.pixels(shapes[0].Against), bandStep), bandAway)
	for _, q := range lines {
		if r := math.Hypot(q.at.X-250, q.at.Y-250); math.Abs(r-150-bandAway) > 0.2 {
			t.Errorf("%.2f px from the centre", r)
		}
		if in := q.out.X*(q.at.X-250) + q.out.Y*(q.at.Y-250); in < 0 {
			t.Error("points inwards")
		}
	}
	if want := math.Round(150 * math.Pi / 2 / bandStep); math.Abs(float64(len(lines))-want) > 2 {
		t.Errorf("%d ticks, want %.0f", len(lines), want)
	}
	if n := strings.Count(rec.String(), "stroke"); n != 2 || len(p.taken) != len(lines) {
		t.Errorf("%d strokes, %d places taken\n%s", n, len(p.taken), rec)
	}
	shapes[0].Against = nil
	rec = NewRecorder(500, 500)
	newSectionPainter(rec, Scene{Shapes: shapes}, v, Scale{Low: 0, High: 100}, Style{}).against()
	if s := strings.TrimSpace(rec.String()); s != "" {
		t.Error(fmt.Sprint("draws ", s))
	}
}
