package heat_test

import (
	"context"
	"math"
	"testing"

	"packrise/solver/heat"
)

// outsides are sections of every kind of wall.
func outsides(t *testing.T) map[string]heat.Problem {
	bare := heat.Problem{Wall: heat.Wall{Shape: heat.BarePart, Film: 5}, Parts: []heat.Part{{In: -1, Radius: 1e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 1e-3}}, Heat: 4}}}
	cable := heat.Problem{Wall: heat.Wall{Shape: heat.BarePart, Film: 5}, MediumK: 0.1, Parts: []heat.Part{
		{In: -1, Core: heat.Inside, Radius: 4e-3, K: 0.03, Rings: []heat.Ring{{K: 0.2, Thickness: 1e-3}}},
		{In: 0, X: -2e-3, Radius: 1e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 0.7e-3}}, Heat: 4},
		{In: 0, X: 2e-3, Radius: 1e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 0.7e-3}}, Heat: 1},
	}}
	rect := load(t, "c09_rect7_floor_air").Problem
	rect.Wall.Sides[heat.Left] = heat.Side{Kind: heat.Insulated}
	return map[string]heat.Problem{
		"round": load(t, "c04_hex7_touch_wall_air").Problem, "no layers": thin(load(t, "c04_hex7_touch_wall_air").Problem), "hose": load(t, "m02_hose_air").Problem,
		"bare": bare, "bare cable": cable, "rectangle": rect,
	}
}

func thin(p heat.Problem) heat.Problem {
	p.Wall.Rings = nil
	return p
}

// TestOutside: new films on a model that is ready give the same answer as a model made with them.
func TestOutside(t *testing.T) {
	ctx := context.Background()
	for name, p := range outsides(t) {
		m := heat.New(p, heat.Settings{})
		before := m.Solve(ctx, nil)
		w := p.Wall
		w.Film, w.Ambient = 17, w.Ambient+11
		if w.Shape == heat.Rect {
			w.Sides[heat.Top].Film, w.Sides[heat.Top].Temp = 3, w.Ambient+20
		}
		m.Outside(w)
		p.Wall = w
		got, want := m.Solve(ctx, nil), heat.New(p, heat.Settings{}).Solve(ctx, nil)
		for i := range want.Core {
			if math.Abs(got.Core[i]-want.Core[i]) > 2e-4 {
				t.Errorf("%s: part %d is %.5f, made with it %.5f", name, i, got.Core[i], want.Core[i])
			}
		}
		if math.Abs(got.Released-want.Released) > 1e-4*math.Abs(want.Released) || math.Abs(got.WallMean-want.WallMean) > 2e-4 {
			t.Errorf("%s: released %g and outside %g, made with it %g and %g", name, got.Released, got.WallMean, want.Released, want.WallMean)
		}
		if math.Abs(before.WallMean-want.WallMean) < 1 {
			t.Errorf("%s: the film changes nothing", name)
		}
	}
}

// TestSideFilms: a metal box of one temperature with a film of its own on each side gives off h·(T − T∞) at each (closed form).
func TestSideFilms(t *testing.T) {
	p := heat.Problem{
		MediumK: 200, Wall: heat.Wall{Shape: heat.Rect, W: 0.02, H: 0.01, Film: 1, Rings: []heat.Ring{{K: 200, Thickness: 1e-3}}},
		Parts: []heat.Part{{In: -1, X: 0.01, Y: 0.005, Radius: 2e-3, Heat: 20}},
	}
	films := [4]float64{3, 5, 7, 9}
	toward := [4]float64{10, 20, 30, 40}
	wide := [4]float64{0.022, 0.012, 0.022, 0.012}
	up, down := 20.0, 0.0
	for i := range films {
		p.Wall.Sides[i] = heat.Side{Film: films[i], Temp: toward[i]}
		up += films[i] * wide[i] * toward[i]
		down += films[i] * wide[i]
	}
	r := heat.New(p, heat.Settings{}).Solve(context.Background(), nil)
	at := up / down
	for i := range films {
		want := films[i] * wide[i] * (at - toward[i])
		if math.Abs(r.SideOut[i]-want) > 0.01*math.Abs(want) {
			t.Errorf("side %d gives off %.4f W/m, closed form %.4f", i, r.SideOut[i], want)
		}
	}
	if math.Abs(r.Released-20) > 1e-6 {
		t.Errorf("released %g W/m of 20", r.Released)
	}
}

func BenchmarkOutside(b *testing.B) {
	l := load(b, "t37_settled_air")
	m := heat.New(l.Problem, heat.Settings{Threads: 1})
	w := l.Wall
	for n := 0; b.Loop(); n++ {
		w.Film = 9 + float64(n%2)
		m.Outside(w)
		m.Solve(context.Background(), nil)
	}
}
