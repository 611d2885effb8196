package heat_test

import (
	"context"
	"fmt"
	"testing"

	"packrise/solver/heat"
)

var timed = []struct {
	parts int
	name  string
}{{7, "c04_hex7_touch_wall_air"}, {37, "t37_settled_air"}, {91, "t91_settled_air"}, {200, "t200_settled_air"}, {24, "r03_wireway24_steel"}}

func one(acc heat.Accuracy) heat.Settings { return heat.Settings{Accuracy: acc, Threads: 1} }

func BenchmarkOneLoad(b *testing.B) {
	for _, c := range timed {
		l := load(b, c.name)
		b.Run(fmt.Sprint(c.parts), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				heat.New(l.Problem, one(heat.Standard)).Solve(context.Background(), nil)
			}
		})
	}
}

func BenchmarkSecondLoad(b *testing.B) {
	for _, c := range timed {
		l := load(b, c.name)
		m := heat.New(l.Problem, one(heat.Standard))
		heats := make([]float64, len(l.Parts))
		b.Run(fmt.Sprint(c.parts), func(b *testing.B) {
			b.ReportAllocs()
			for n := 0; b.Loop(); n++ {
				for i := range heats {
					heats[i] = l.Parts[i].Heat * float64(1+(n+i)%3)
				}
				m.Solve(context.Background(), heats)
			}
		})
	}
}

func BenchmarkInfluence(b *testing.B) {
	for _, c := range timed {
		l := load(b, c.name)
		b.Run(fmt.Sprint(c.parts), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				heat.New(l.Problem, one(heat.Standard)).Influence(context.Background())
			}
		})
	}
}

// BenchmarkRectInfluence is a wireway whose air only conducts.
func BenchmarkRectInfluence(b *testing.B) {
	p := load(b, "r03_wireway24_steel").Problem
	p.Filling = heat.Solid
	b.ReportAllocs()
	for b.Loop() {
		heat.New(p, one(heat.Standard)).Influence(context.Background())
	}
}

func BenchmarkField(b *testing.B) {
	for _, name := range []string{"t37_settled_air", "t200_settled_air", "c09_rect7_floor_air"} {
		l := load(b, name)
		m := heat.New(l.Problem, one(heat.Standard))
		half := l.Wall.R
		x, y := 0.0, 0.0
		if half == 0 {
			half = l.Wall.W / 2
			x, y = half, half
		}
		half *= 1.15
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			const px = 512
			row := make([]float64, px)
			for b.Loop() {
				b.StopTimer()
				f := m.Solve(context.Background(), nil).Field
				b.StartTimer()
				for i := range px {
					f.Row(row, y-half+2*half*float64(i)/px, x-half, 2*half/px)
				}
			}
		})
	}
}

// BenchmarkDragFrame moves the topmost part by 0.2 mm a frame, up and down again, and solves.
func BenchmarkDragFrame(b *testing.B) {
	for _, c := range timed {
		l := load(b, c.name)
		top := 0
		for i := range l.Parts {
			if l.Parts[i].Y > l.Parts[top].Y {
				top = i
			}
		}
		m := heat.New(l.Problem, one(heat.Standard))
		m.Solve(context.Background(), nil)
		b.Run(fmt.Sprint(c.parts), func(b *testing.B) {
			b.ReportAllocs()
			steps := 0
			n := 0
			for ; b.Loop(); n++ {
				up := float64(min(n%10, 10-n%10)) * 0.2 * mm
				m.Move(top, l.Parts[top].X, l.Parts[top].Y-up)
				steps += m.Solve(context.Background(), nil).Steps
			}
			b.ReportMetric(float64(steps)/float64(n), "steps/op")
		})
	}
}

// BenchmarkNested solves seven cables of seven cores each, and the same again with other heats.
func BenchmarkNested(b *testing.B) {
	p := heat.Problem{MediumK: 0.026, Wall: heat.Wall{R: 30 * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 2 * mm}}, Film: 10}}
	for _, c := range append([]complex128{0}, ringOf(6, 19*mm)...) {
		p.Parts = append(p.Parts, heat.Part{In: -1, X: real(c), Y: imag(c), Core: heat.Inside, Radius: 8 * mm, K: 0.026, Rings: []heat.Ring{{K: 0.2, Thickness: 1.5 * mm}}})
		in := len(p.Parts) - 1
		for _, d := range append([]complex128{0}, ringOf(6, 5*mm)...) {
			w := wire(3*mm, 1*mm, 0.2, 1)
			w.In, w.X, w.Y = in, real(d), imag(d)
			p.Parts = append(p.Parts, w)
		}
	}
	b.Run("new", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			heat.New(p, one(heat.Standard)).Solve(context.Background(), nil)
		}
	})
	m := heat.New(p, one(heat.Standard))
	b.Run("drag", func(b *testing.B) {
		b.ReportAllocs()
		for n := 0; b.Loop(); n++ {
			m.Move(0, float64(n%5)*0.02*mm, 0)
			m.Solve(context.Background(), nil)
		}
	})
}
