package heat_test

import (
	"context"
	"fmt"
	"testing"

	"packrise/solver/heat"
)

func BenchmarkHull(b *testing.B) {
	for _, c := range timed {
		l := bundle(b, c.name)
		b.Run(fmt.Sprint(c.parts), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				heat.New(l.Problem, one(heat.Standard)).Solve(context.Background(), nil)
			}
		})
	}
}
