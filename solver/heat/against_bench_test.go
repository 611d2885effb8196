package heat_test

import (
	"context"
	"testing"

	"packrise/solver/heat"
)

// floors are what a section of 37 wires rests against: nothing, to compare with, and a quarter of its outside.
var floors = []struct {
	name string
	a    heat.Against
}{
	{"free", heat.Against{}}, {"insulated", heat.Against{Share: 0.25, At: -1.57}}, {"held", heat.Against{Share: 0.25, At: -1.57, Held: true, Temp: 50}},
}

// BenchmarkAgainst is everything that a round wall does with 37 parts, beside the same wall in the open.
func BenchmarkAgainst(b *testing.B) {
	for _, floor := range floors {
		l := load(b, "t37_settled_air")
		l.Wall.Film, l.Wall.Against = 9, floor.a
		run := func(name string, acc heat.Accuracy, p heat.Problem, f func(m *heat.Model, n int)) {
			b.Run(name+"/"+floor.name, func(b *testing.B) {
				b.ReportAllocs()
				m := heat.New(p, one(acc))
				m.Solve(context.Background(), nil)
				for n := 0; b.Loop(); n++ {
					f(m, n)
				}
			})
		}
		x, y := l.Parts[0].X, l.Parts[0].Y
		drag := func(m *heat.Model, n int) {
			m.Move(0, x+1e-4*float64(n%5), y)
			m.Solve(context.Background(), nil)
		}
		shines := l.Problem
		shines.Filling, shines.ZeroK, shines.Wall.Emissivity = heat.Gas, 273.15, 0.9
		shines.Parts = append([]heat.Part(nil), shines.Parts...)
		for i := range shines.Parts {
			shines.Parts[i].Emissivity = 0.9
		}
		cold := l.Problem
		cold.Filling = heat.Solid
		run("one", heat.Standard, cold, func(*heat.Model, int) { heat.New(cold, one(heat.Standard)).Solve(context.Background(), nil) })
		run("drag", heat.Draft, cold, drag)
		run("influence", heat.Standard, cold, func(*heat.Model, int) { heat.New(cold, one(heat.Standard)).Influence(context.Background()) })
		run("film", heat.Standard, cold, func(m *heat.Model, n int) {
			w := cold.Wall
			w.Film = 9 + float64(n%5)
			m.Outside(w)
			m.Solve(context.Background(), nil)
		})
		run("radiates", heat.Standard, shines, func(*heat.Model, int) { heat.New(shines, one(heat.Standard)).Solve(context.Background(), nil) })
		run("radiates-drag", heat.Draft, shines, drag)
	}
}
