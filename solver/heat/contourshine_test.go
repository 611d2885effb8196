package heat_test

import (
	"context"
	"math"
	"testing"

	"packrise/solver/heat"
)

// lightedConduit is the conduit of besides with a gas in it and surfaces that radiate.
func lightedConduit(wires int, filling heat.Filling) heat.Problem {
	p := besides()[0].p
	p.Parts = append([]heat.Part(nil), p.Parts[:1+wires]...)
	p.Filling, p.ZeroK, p.Wall.Emissivity = filling, 273.15, 0.9
	for i := range p.Parts {
		p.Parts[i].Emissivity = 0.9
	}
	return p
}

// Round parts that stay pieces beside a bar radiate as they do as contours, in conduits and wireways, with metals bare or not and where they are moved or the film
// changes; the tangent is the change of the solutions.
func TestContoursRadiate(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	for name, change := range map[string]func(*heat.Problem){
		"conduit": func(*heat.Problem) {},
		"bare bar in a wireway": func(p *heat.Problem) {
			p.Parts[0].Rings, p.Parts[0].Emissivity = nil, 0.3
			p.Wall = heat.Wall{Shape: heat.Rect, W: 40 * mm, H: 30 * mm, Film: 8, Ambient: 30, Emissivity: 0.25, Rings: []heat.Ring{{K: 50, Thickness: 1 * mm}}}
			for i := range p.Parts {
				p.Parts[i].X += 20 * mm
				p.Parts[i].Y += 19 * mm
			}
		},
	} {
		p := lightedConduit(5, heat.Gas)
		change(&p)
		q := p
		q.Parts = append([]heat.Part(nil), p.Parts...)
		for i := range q.Parts[1:] { // a flat of equal sides is a circle
			d := &q.Parts[i+1]
			d.Form = heat.Form{Kind: heat.Flat, W: 2 * d.Radius, H: 2 * d.Radius}
		}
		m := heat.New(p, heat.Settings{})
		r, want := m.Solve(context.Background(), nil), solve(t, q, heat.Standard)
		worst := 0.0
		for i := range r.Core {
			worst = math.Max(worst, math.Abs(r.Core[i]-want.Core[i]))
		}
		t.Logf("%s: %.4f K of %.1f K, wall %.4f K, estimated %.4f, %d unknowns, %d as contours", name, worst, heatRise(want, p), r.WallMean-want.WallMean, r.ErrorK, r.Unknowns, want.Unknowns)
		if !r.Radiates || !(worst < 0.03) || math.Abs(r.WallMean-want.WallMean) > 0.01 || math.Abs(r.Released-r.Generated) > 1e-3*r.Generated {
			t.Errorf("%s: %.4f K, wall %.4f K, released %g of %g W/m", name, worst, r.WallMean-want.WallMean, r.Released, r.Generated)
		}
		k, ground, status := m.Tangent(context.Background())
		heats := make([]float64, len(p.Parts))
		for i := range heats {
			heats[i] = p.Parts[i].Heat
		}
		heats[0] += 0.1
		heats[2] += 0.05
		more := m.Solve(context.Background(), heats)
		for i := range r.Core {
			sum := ground[i]
			for j, h := range heats {
				sum += k[i][j] * h
			}
			if status != heat.Converged || math.Abs(sum-more.Core[i]) > 0.02 {
				t.Errorf("%s: part %d at %.4f by the tangent, %.4f solved", name, i, sum, more.Core[i])
			}
		}
		w := p.Wall
		w.Film *= 1.3
		m.Outside(w)
		m.Move(3, p.Parts[3].X, p.Parts[3].Y+0.3*mm)
		moved := m.Solve(context.Background(), nil)
		p.Wall = w
		p.Parts = append([]heat.Part(nil), p.Parts...)
		p.Parts[3].Y += 0.3 * mm
		fresh := solve(t, p, heat.Standard)
		for i := range fresh.Core {
			if math.Abs(fresh.Core[i]-moved.Core[i]) > 0.02 {
				t.Errorf("%s: part %d: new %.4f, moved %.4f", name, i, fresh.Core[i], moved.Core[i])
			}
		}
	}
}
