package heat_test

import (
	"context"
	"fmt"
	"testing"

	"packrise/solver/heat"
)

// glowing is a timing section whose parts and wall radiate.
func glowing(t testing.TB, name string) loaded {
	l := load(t, name)
	l.Filling, l.ZeroK, l.Wall.Emissivity = heat.Gas, 273.15, 0.9
	for i := range l.Parts {
		l.Parts[i].Emissivity = 0.9
	}
	return l
}

func BenchmarkRadiation(b *testing.B) {
	for _, c := range append(timed, struct {
		parts int
		name  string
	}{24, "r03_wireway24_steel"}) {
		l := glowing(b, c.name)
		b.Run(fmt.Sprint(c.parts), func(b *testing.B) {
			b.ReportAllocs()
			steps := 0
			for b.Loop() {
				steps = heat.New(l.Problem, one(heat.Standard)).Solve(context.Background(), nil).Steps
			}
			b.ReportMetric(float64(steps), "steps")
		})
	}
}
