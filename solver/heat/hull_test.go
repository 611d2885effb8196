package heat_test

import (
	"context"
	"math"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/pack"
)

func taut(x, y, r []float64) []heat.Arc {
	discs := make([]pack.Disc, len(x))
	for i := range discs {
		discs[i] = pack.Disc{X: x[i], Y: y[i], R: r[i]}
	}
	arcs, _, _ := pack.Hull(discs)
	out := make([]heat.Arc, len(arcs))
	for i, a := range arcs {
		out[i] = heat.Arc{Disc: a.Disc, From: a.From, To: a.To}
	}
	return out
}

func bundle(t testing.TB, name string) loaded {
	l := load(t, name)
	l.Wall.Shape, l.Wall.Taut = heat.Hull, taut
	return l
}

func TestHullCases(t *testing.T) {
	want := expected(t, "expected.csv", "temperature_c")
	for _, name := range []string{"b01_three_gas", "b02_hex7_solid", "b03_mixed12_gas", "b04b_hex19_4loaded_gas", "b05_big_small_gas"} {
		l := bundle(t, name)
		for _, acc := range []heat.Accuracy{heat.Draft, heat.Standard, heat.Fine} {
			r := heat.New(l.Problem, heat.Settings{Accuracy: acc}).Solve(context.Background(), nil)
			worst := 0.0
			for i, id := range l.ids {
				if e := r.Core[i] - want[name][id]; math.Abs(e) > math.Abs(worst) {
					worst = e
				}
			}
			t.Logf("%s %d: %.4f K, %d unknowns, %d steps, %v, released %.8f of %.8f, outside %.3f %.3f", name, acc, worst, r.Unknowns, r.Steps, r.Status, r.Released, r.Generated, r.WallMax[0], r.WallMean)
		}
	}
}
