package render

import (
	"math"
	"testing"

	"packrise/solver/section"
)

// sheet is a wireway whose left wall is held at 45 °C but for some microkelvins, and whose lower and upper walls fall to the right.
type sheet struct{}

func (sheet) Bounds() (x0, y0, x1, y1 float64) { return -2, -2, 42, 32 }

func (sheet) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		x := x0 + float64(i)*dx
		switch {
		case x < -2 || x > 42 || y < -2 || y > 32:
			dst[i] = math.NaN()
		case x < 0:
			dst[i] = 45 + 1e-4*math.Sin(9*x)*math.Sin(7*y)
		default:
			dst[i] = 45 - 0.5*x + 20*math.Sin(math.Pi*x/40)*math.Exp(-0.01*(y-15)*(y-15))
		}
	}
}

func TestNoIsothermsOnAPlateau(t *testing.T) {
	s := Scene{Field: sheet{}, Shapes: []section.Shape{{Kind: section.Wireway, Width: 40, Height: 30, Rings: []section.Ring{{Material: "steel", Metal: true, R1: 2}}}}}
	s.Readings = []section.Reading{{ID: "outside", Kind: "surface", TempC: 45}}
	p := newSectionPainter(NewRecorder(900, 700), s, FitView(s.Shapes, 900, 700, Style{}), Scale{Low: 25, High: 60}, Style{})
	held, falling := 0, 0
	for _, lines := range p.contoursOf([]isoline{{temp: 35}, {temp: 45}}, 4) {
		for _, l := range lines {
			for _, q := range l {
				switch at := p.v.ToMM(q.X, q.Y); {
				case at.X < -0.5:
					held++
				case at.Y < -0.5:
					falling++
				}
			}
		}
	}
	if held > 0 || falling == 0 {
		t.Errorf("%d points of isotherms in the held side, %d in the one that falls", held, falling)
	}
}
