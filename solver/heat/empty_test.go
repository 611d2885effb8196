package heat_test

import (
	"math"
	"testing"

	"packrise/solver/heat"
)

// Sections without parts, or without anything that makes heat, are at ambient everywhere.
func TestNothingMakesHeat(t *testing.T) {
	rod := heat.Part{In: -1, X: 6 * mm, Y: 6 * mm, Core: heat.Body, Radius: 2 * mm, K: 0.3}
	idle := wire(2*mm, 0.5*mm, 0.2, 0)
	idle.X, idle.Y = 6*mm, 6*mm
	for _, shape := range []heat.Shape{heat.Round, heat.Rect, heat.BarePart} {
		for name, parts := range map[string][]heat.Part{"no parts": nil, "a rod": {rod}, "an idle wire": {idle}} {
			if shape == heat.BarePart && parts == nil {
				continue
			}
			p := heat.Problem{MediumK: 0.03, Parts: parts, Wall: heat.Wall{Shape: shape, R: 12 * mm, W: 20 * mm, H: 15 * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 1 * mm}}, Film: 10, Ambient: 25}}
			m := heat.New(p, heat.Settings{})
			r := m.Solve(bg, nil)
			if r.Status != heat.Converged || math.Abs(r.Released) > 1e-9 || r.Generated != 0 || math.Abs(r.WallMean-25) > 1e-9 {
				t.Errorf("shape %d, %s: %v, released %g, outside %g", shape, name, r.Status, r.Released, r.WallMean)
			}
			for i := range parts {
				if math.Abs(r.Core[i]-25) > 1e-9 {
					t.Errorf("shape %d, %s: %g", shape, name, r.Core[i])
				}
			}
			if v := r.Field.At(6*mm, 6*mm); math.Abs(v-25) > 1e-9 {
				t.Errorf("shape %d, %s: field %g", shape, name, v)
			}
			if _, s := m.Influence(bg); s != heat.Converged {
				t.Errorf("shape %d, %s: influence %v", shape, name, s)
			}
			if math.IsNaN(r.ErrorK) {
				t.Errorf("shape %d, %s: no estimate", shape, name)
			}
		}
	}
}
