package heat_test

import (
	"context"
	"testing"

	"packrise/solver/heat"
)

// besideBar is a busbar lying in a wireway with n wires in a row above it.
func besideBar(n int) heat.Problem {
	p := heat.Problem{MediumK: 0.027, Wall: heat.Wall{Shape: heat.Rect, W: 100 * mm, H: 50 * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 2 * mm}}, Film: 9, Ambient: 30}}
	b := bar(60, 6, 0.5, 1, 0.2, 20)
	b.X, b.Y = 50*mm, 4*mm
	p.Parts = append(p.Parts, b)
	for i := range n {
		w := wire(1.5*mm, 0.8*mm, 0.2, 1.5)
		w.In, w.X, w.Y = -1, (22+float64(i%12)*5)*mm, (8+2.3+float64(i/12)*5)*mm
		p.Parts = append(p.Parts, w)
	}
	return p
}

func BenchmarkShaped(b *testing.B) {
	for name, p := range map[string]heat.Problem{"sectors": load(b, "s01_sector4").Problem, "bar2": load(b, "s03_bar_two_wires").Problem, "bar12": besideBar(12), "bar24": besideBar(24)} {
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				r := heat.New(p, heat.Settings{}).Solve(context.Background(), nil)
				b.ReportMetric(float64(r.Unknowns), "unknowns")
			}
		})
	}
}

// The same with surfaces that radiate, and dragging a wire along the bar.
func BenchmarkContours(b *testing.B) {
	p := lit(besideBar(24))
	b.Run("radiate", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			heat.New(p, heat.Settings{}).Solve(context.Background(), nil)
		}
	})
	for name, q := range map[string]heat.Problem{"drag": besideBar(24), "drag radiating": p} {
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			m := heat.New(q, heat.Settings{Accuracy: heat.Draft})
			m.Solve(context.Background(), nil)
			x, y := q.Parts[24].X, q.Parts[24].Y
			for i := 0; b.Loop(); i++ {
				m.Move(24, x+float64(i%8)*0.05*mm, y+2*mm)
				m.Solve(context.Background(), nil)
			}
		})
	}
	b.Run("influence", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			heat.New(besideBar(24), heat.Settings{}).Influence(context.Background())
		}
	})
}

// A picture of 512 × 512 points: tables first, then every point.
func BenchmarkShapedField(b *testing.B) {
	m := heat.New(load(b, "s03_bar_two_wires").Problem, heat.Settings{})
	row := make([]float64, 512)
	for b.Loop() {
		f := m.Solve(context.Background(), nil).Field
		for i := range row {
			f.Row(row, (float64(i)-256)/256*22*mm, -22*mm, 44*mm/512)
		}
	}
}
