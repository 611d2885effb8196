package render

import "testing"

func BenchmarkHeatLayer(b *testing.B) {
	s := hexScene(7)
	f := s.Field
	s.Field = fastField{f}
	v := FitView(s.Shapes, 900, 900, Style{})
	v.PxPerMM *= 1.4
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

// fastField costs next to nothing, so that the benchmark times the painting.
type fastField struct{ Field }

func (fastField) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		dst[i] = 60 + x0 + float64(i)*dx - y
	}
}
