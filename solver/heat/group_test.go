package heat_test

import (
	"context"
	"math"
	"testing"

	"packrise/solver/heat"
)

// trio is a bare wire, a bundle of two wires and a hose of held bore beside a wire, as a group: parts in mixed order.
func trio() ([]*heat.Member, []float64) {
	wire := func(x float64) heat.Part {
		return heat.Part{In: -1, X: x, Radius: 1e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 0.8e-3}}}
	}
	hose := wire(0)
	hose.Core, hose.Fixed = heat.FixedBore, 15
	model := func(shape heat.Shape, film, toward float64, parts ...heat.Part) *heat.Model {
		return heat.New(heat.Problem{Parts: parts, MediumK: 0.026, Wall: heat.Wall{Shape: shape, Taut: taut, Film: film, Ambient: toward}}, heat.Settings{})
	}
	around := 2 * math.Pi * 1.8e-3
	pair := around + 4*1.8e-3
	b, two := [4]float64{-1.8e-3, -1.8e-3, 1.8e-3, 1.8e-3}, [4]float64{-1.8e-3, -1.8e-3, 5.4e-3, 1.8e-3}
	return []*heat.Member{
		{Model: model(heat.BarePart, 12, 30, wire(0)), Parts: []int{2}, Box: b, Around: around},
		{Model: model(heat.Hull, 11, 31, wire(0), wire(3.6e-3)), Parts: []int{0, 4}, X: 0.01, Y: 0.002, Box: two, Around: pair},
		{Model: model(heat.Hull, 10, 32, hose, wire(3.6e-3)), Parts: []int{1, 3}, X: 0.03, Box: two, Around: pair},
	}, []float64{3, 0, 4, 2, 1}
}

func TestGroupAnswersAsItsMembers(t *testing.T) {
	members, q := trio()
	g := heat.NewGroup(5, members)
	r := g.Solve(context.Background(), q)
	fresh, _ := trio()
	sum := 0.0
	for b, m := range fresh {
		own := make([]float64, len(m.Parts))
		for k, i := range m.Parts {
			own[k] = q[i]
		}
		one := m.Model.Solve(context.Background(), own)
		sum += one.Released
		for k, i := range m.Parts {
			if r.Core[i] != one.Core[k] {
				t.Errorf("part %d: %g, alone %g", i, r.Core[i], one.Core[k])
			}
			p := m.Parts[k]
			x := m.X + 3.6e-3*float64(k)
			if got := r.Field.At(x, m.Y); math.Abs(got-r.Core[p]) > 0.1 && p != 1 {
				t.Errorf("field at part %d: %g, core %g", p, got, r.Core[p])
			}
		}
		if r.Bodies[b].WallMean != one.WallMean {
			t.Errorf("body %d: outside at %g, alone %g", b, r.Bodies[b].WallMean, one.WallMean)
		}
	}
	absorbed := 0.0
	for _, w := range r.Absorbed {
		absorbed += w
	}
	if math.Abs(r.Generated-10) > 1e-12 || math.Abs(r.Released-sum) > 1e-12 || math.Abs(r.Released+absorbed-10) > 1e-2 {
		t.Errorf("generated %g, released %g, absorbed %g", r.Generated, r.Released, absorbed)
	}
	row := make([]float64, 300)
	r.Field.Row(row, 0.0012, -0.005, 0.045/299)
	for i, v := range row {
		if at := r.Field.At(-0.005+0.045/299*float64(i), 0.0012); !(math.Abs(v-at) < 1e-9) && !(math.IsNaN(v) && math.IsNaN(at)) {
			t.Errorf("row[%d] %g, at %g", i, v, at)
		}
	}
	if again := g.Solve(context.Background(), q); again.Bodies[0] != r.Bodies[0] {
		t.Error("what did not change was solved again")
	}
}

func TestGroupStops(t *testing.T) {
	members, q := trio()
	ctx, stop := context.WithCancel(context.Background())
	stop()
	r := heat.NewGroup(5, members).Solve(ctx, q)
	if r.Status != heat.Cancelled || !math.IsNaN(r.Core[3]) {
		t.Errorf("%v, %v", r.Status, r.Core)
	}
	if _, _, s := heat.NewGroup(5, members).Tangent(ctx); s != heat.Cancelled {
		t.Errorf("tangent: %v", s)
	}
}

// TestGroupCoupled compares the tangent with films that follow with solving, the films' ends being settled by repetition.
func TestGroupCoupled(t *testing.T) {
	follow := [][]float64{{-0.1, 0.2, 0.05}, {0.1, -0.05, 0.15}, {0.02, 0.3, 0.1}}
	settled := func(q []float64) ([]float64, *heat.Group) {
		members, _ := trio()
		g := heat.NewGroup(5, members)
		start := []float64{30, 31, 32}
		outside := []float64{50, 60, 40}
		var r *heat.Result
		for range 60 {
			for b, m := range members {
				w := heat.Wall{Shape: heat.Hull, Film: []float64{12, 11, 10}[b], Ambient: start[b]}
				if b == 0 {
					w.Shape = heat.BarePart
				}
				for j, o := range outside {
					w.Ambient += follow[b][j] * (o - 45)
				}
				m.Model.Outside(w)
				m.Changed()
			}
			r = g.Solve(context.Background(), q)
			for j := range outside {
				outside[j] = r.Bodies[j].WallMean
			}
		}
		return r.Core, g
	}
	_, q := trio()
	base, g := settled(q)
	k, status := g.Coupled(context.Background(), follow)
	if status != heat.Converged {
		t.Fatal(status)
	}
	for j := range q {
		if k[j] == nil {
			continue
		}
		more := append([]float64{}, q...)
		more[j] += 0.5
		up, _ := settled(more)
		for i := range q {
			if k[i] != nil && math.Abs((up[i]-base[i])/0.5-k[i][j]) > 2e-3*math.Abs(k[j][j]) {
				t.Errorf("K[%d][%d] = %g, by solving %g", i, j, k[i][j], (up[i]-base[i])/0.5)
			}
		}
	}
}

func TestGroupMisuse(t *testing.T) {
	members, _ := trio()
	for name, f := range map[string]func(){
		"part twice":   func() { members[0].Parts = []int{0}; heat.NewGroup(5, members) },
		"too few":      func() { members[0].Parts = []int{2}; heat.NewGroup(6, members) },
		"wrong length": func() { members[0].Parts = []int{2, 5}; heat.NewGroup(6, members) },
		"heats":        func() { members[0].Parts = []int{2}; heat.NewGroup(5, members).Solve(context.Background(), nil) },
	} {
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%s: no panic", name)
				}
			}()
			f()
		}()
	}
}
