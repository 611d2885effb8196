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
