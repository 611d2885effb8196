package outline

import (
	"math"
	"testing"
)

// TestExtremes: whatever can be drawn gets an answer that conserves heat, reaches no more than its bounds and hardly changes with finer panels.
func TestExtremes(t *testing.T) {
	if testing.Short() {
		t.Skip("dense solutions of many unknowns")
	}
	plastic := func(c complex128, a, q float64, order int) rod {
		return rod{c: c, core: 0.6 * a, k: []float64{0.2}, t: []float64{0.4 * a}, radius: a, heat: q, order: order}
	}
	open := film(9, 20)
	four := [4]Side{open, open, open, open}
	for _, c := range []struct {
		name   string
		r      Rect
		rods   []rod
		within float64 // K, fineness 1 against 2
	}{
		{"one thin wire on the floor of a large box", Rect{W: 0.3, H: 0.2, MediumK: 0.026, Layers: []Layer{{0.2, 0.002}}, Sides: four}, []rod{plastic(0.1+0.00025i, 0.00025, 0.5, 16)}, 0.01},
		{"thin beside thick", Rect{W: 0.06, H: 0.06, MediumK: 0.026, Layers: []Layer{{50, 0.0015}}, Sides: four}, []rod{plastic(0.025+0.025i, 0.025, 20, 32), plastic(0.0505+0.0005i, 0.0005, 0.5, 16)}, 0.02},
		{"filling a slot", Rect{W: 0.1, H: 0.01, MediumK: 0.026, Layers: []Layer{{0.2, 0.002}}, Sides: four}, []rod{plastic(0.05+0.005i, 0.005, 3, 24)}, 0.01},
		{"long and flat", Rect{W: 0.5, H: 0.01, MediumK: 0.3, Layers: nil, Sides: four}, []rod{plastic(0.1+0.004i, 0.003, 3, 8)}, 0.01},
		{"walls of a hand's width", Rect{W: 0.02, H: 0.02, MediumK: 0.3, Layers: []Layer{{0.04, 0.1}}, Sides: four}, []rod{plastic(0.01+0.01i, 0.003, 1, 6)}, 0.05},
		{"five layers", Rect{W: 0.04, H: 0.02, MediumK: 0.026, Layers: []Layer{{0.2, 0.0005}, {50, 0.001}, {110, 0.00002}, {0.2, 0.0001}, {0.04, 0.01}}, Sides: four}, []rod{plastic(0.01+0.003i, 0.003, 2, 24)}, 0.05},
		{"a medium better than the wall", Rect{W: 0.04, H: 0.02, MediumK: 5, Layers: []Layer{{0.2, 0.002}}, Sides: four}, []rod{plastic(0.01+0.006i, 0.003, 2, 12)}, 0.01},
		{"one side cools", Rect{W: 0.04, H: 0.02, MediumK: 0.3, Layers: []Layer{{0.2, 0.002}}, Sides: [4]Side{insulated, insulated, film(9, 20), insulated}}, []rod{plastic(0.01+0.006i, 0.003, 2, 12)}, 0.05},
		{"neighbours held apart", Rect{W: 0.04, H: 0.02, MediumK: 0.3, Layers: nil, Sides: [4]Side{held(20), held(60), open, open}}, []rod{plastic(0.01+0.006i, 0.003, 2, 12)}, 0.02},
	} {
		t.Run(c.name, func(t *testing.T) {
			a, b := solveWhole(c.r, c.rods, 1, true), solveWhole(c.r, c.rods, 2, true)
			total := 0.0
			for i, p := range c.rods {
				total += p.heat
				if !(a.core[i] > 19.9 && a.core[i] < 2000) {
					t.Errorf("part %d: %g °C", i, a.core[i])
				}
				if d := a.core[i] - b.core[i]; !(math.Abs(d) < c.within) {
					t.Errorf("part %d: %.5f, twice as fine %.5f", i, a.core[i], b.core[i])
				}
			}
			hottest, mean, out := a.wall.Faces(a.y, a.src)
			if sum := out[0] + out[1] + out[2] + out[3]; !near(sum, total, 1e-6) {
				t.Errorf("out %g of %g W/m", sum, total)
			}
			for i := range hottest {
				if !(hottest[i] >= mean-1e-6) {
					t.Errorf("hottest at face %d %.4f, mean of the outside %.4f", i, hottest[i], mean)
				}
			}
		})
	}
}

// TestPointOnWall: a disc of no size on the wall is nonsense, but must not hang.
func TestPointOnWall(t *testing.T) {
	r := Rect{W: 0.02, H: 0.02, MediumK: 0.3, Sides: [4]Side{held(0), held(0), held(0), held(0)}}
	if s := New(r, []Disc{{C: 0.01, M: 8}}, 1); s.Len() > 1000 {
		t.Errorf("%d unknowns", s.Len())
	}
}
