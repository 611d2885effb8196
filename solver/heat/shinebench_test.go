package heat_test

import (
	"context"
	"fmt"
	"testing"

	"packrise/solver/heat"
)

// barsInDuct are n bare bars on edge, side by side in a painted steel duct full of air.
func barsInDuct(n int) heat.Problem {
	p := heat.Problem{MediumK: 0.028, Filling: heat.Air, ZeroK: 273.15, Wall: heat.Wall{
		Shape: heat.Rect, W: float64(10+15*n) * mm, H: 60 * mm, Rings: []heat.Ring{{K: 50, Thickness: 1.5 * mm}}, Film: 9, Ambient: 35, Emissivity: 0.9,
	}}
	for i := range n {
		q := bar(5, 40, 0.5, 0, 0, 15)
		q.X, q.Y, q.Emissivity = float64(12+15*i)*mm, 30*mm, 0.08
		p.Parts = append(p.Parts, q)
	}
	return p
}

// One load of bars that radiate, from nothing, and another load of the same model.
func BenchmarkShine(b *testing.B) {
	for _, n := range []int{3, 12} {
		p := barsInDuct(n)
		b.Run(fmt.Sprintf("bars%d", n), func(b *testing.B) {
			b.ReportAllocs()
			for range b.N {
				heat.New(p, one(heat.Standard)).Solve(context.Background(), nil)
			}
		})
		b.Run(fmt.Sprintf("again%d", n), func(b *testing.B) {
			b.ReportAllocs()
			m := heat.New(p, one(heat.Standard))
			m.Solve(context.Background(), nil)
			heats := make([]float64, n)
			for k := range b.N {
				for i := range heats {
					heats[i] = 15 + float64((i+k)%3)
				}
				m.Solve(context.Background(), heats)
			}
		})
		b.Run(fmt.Sprintf("tangent%d", n), func(b *testing.B) {
			b.ReportAllocs()
			m := heat.New(p, one(heat.Standard))
			m.Solve(context.Background(), nil)
			for range b.N {
				m.Influence(context.Background())
			}
		})
	}
}
