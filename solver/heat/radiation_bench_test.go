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
	for _, c := range timed {
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

// BenchmarkRadiationDrag moves the topmost part by 0.1 mm a frame, up and down again, in a draft.
func BenchmarkRadiationDrag(b *testing.B) {
	for _, c := range timed {
		l := glowing(b, c.name)
		top := 0
		for i := range l.Parts {
			if l.Parts[i].Y > l.Parts[top].Y {
				top = i
			}
		}
		m := heat.New(l.Problem, one(heat.Draft))
		m.Solve(context.Background(), nil)
		b.Run(fmt.Sprint(c.parts), func(b *testing.B) {
			b.ReportAllocs()
			frozen, n := 0, 0
			for ; b.Loop(); n++ {
				up := float64(min(n%24, 24-n%24)) * 0.1 * mm
				m.Move(top, l.Parts[top].X, l.Parts[top].Y-up)
				if m.Solve(context.Background(), nil).Frozen {
					frozen++
				}
			}
			b.ReportMetric(float64(frozen)/float64(n), "frozen/op")
		})
	}
}

// BenchmarkRadiationTangent is the influence matrix about a solution, of round holders, a wireway and open bundles.
func BenchmarkRadiationTangent(b *testing.B) {
	for _, c := range timed {
		benchTangent(b, fmt.Sprint(c.parts), glowing(b, c.name).Problem)
	}
	for _, n := range []int{7, 37, 91, 200} {
		benchTangent(b, fmt.Sprint("bundle ", n), lit(laidUp(n)))
	}
}

func benchTangent(b *testing.B, name string, p heat.Problem) {
	heats := make([]float64, len(p.Parts))
	b.Run(name, func(b *testing.B) {
		m := heat.New(p, one(heat.Standard))
		b.ReportAllocs()
		for n := 0; b.Loop(); n++ {
			b.StopTimer()
			for i := range heats {
				heats[i] = p.Parts[i].Heat * (1 + 0.01*float64(n%7))
			}
			m.Solve(context.Background(), heats)
			b.StartTimer()
			m.Tangent(context.Background())
		}
	})
}
