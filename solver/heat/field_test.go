package heat_test

import (
	"math"
	"math/rand/v2"
	"sync"
	"testing"

	"packrise/solver/heat"
)

// crossing walks over every interface of a part (in the holder's coordinates) and returns the largest jump of the temperature.
func crossing(f heat.Field, x, y float64, radii []float64) float64 {
	worst := 0.0
	for _, r := range radii {
		for k := range 24 {
			s, c := math.Sincos(2 * math.Pi * (float64(k) + 0.3) / 24)
			const h = 1e-7
			a, b := f.At(x+(r-h)*c, y+(r-h)*s), f.At(x+(r+h)*c, y+(r+h)*s)
			if !math.IsNaN(a) && !math.IsNaN(b) {
				worst = math.Max(worst, math.Abs(a-b))
			}
		}
	}
	return worst
}

func radiiOf(q *heat.Part) []float64 {
	r := []float64{q.Radius}
	for _, g := range q.Rings {
		r = append(r, r[len(r)-1]+g.Thickness)
	}
	return r
}

// The field is continuous over every face: of parts, of cables and what is in them, of walls.
func TestFieldIsContinuous(t *testing.T) {
	for _, name := range []string{"c02_hex7_spaced_air", "c04_hex7_touch_wall_air", "c05_hex7_touch_filler", "c06_mixed19_settled_air", "c12_nested_cable_air", "m01_screen7", "m02_hose_air", "h02b_ratio12", "c11_rect6_spaced_filler", "c09_rect7_floor_air"} {
		p := load(t, name).Problem
		r := solve(t, p, heat.Fine)
		rise := r.Core[1] - p.Wall.Ambient
		for i := range p.Parts {
			q := &p.Parts[i]
			x, y := q.X, q.Y
			for in := q.In; in >= 0; in = p.Parts[in].In {
				x, y = x+p.Parts[in].X, y+p.Parts[in].Y
			}
			if jump := crossing(r.Field, x, y, radiiOf(q)); jump > 0.006*rise {
				t.Errorf("%s: jump of %.4f K at part %d, rise %.1f K", name, jump, i, rise)
			}
		}
		if p.Wall.Shape == heat.Round {
			wall := heat.Part{Radius: p.Wall.R, Rings: p.Wall.Rings}
			if jump := crossing(r.Field, 0, 0, radiiOf(&wall)); jump > 0.004*rise {
				t.Errorf("%s: jump of %.4f K at the wall, rise %.1f K", name, jump, rise)
			}
		}
	}
}

// flow integrates −k ∂T/∂n over a circle in a medium of conductivity k.
func flow(f heat.Field, x, y, r, k float64) float64 {
	const points = 720
	h := 1e-5
	sum := 0.0
	for i := range points {
		s, c := math.Sincos(2 * math.Pi * float64(i) / points)
		sum += f.At(x+(r-h)*c, y+(r-h)*s) - f.At(x+(r+h)*c, y+(r+h)*s)
	}
	return k * sum / (2 * h) / points * 2 * math.Pi * r
}

// What flows through a line round each part in the medium is what is made in it: the heat balance by the field alone.
func TestFieldCarriesTheHeat(t *testing.T) {
	p := load(t, "c02_hex7_spaced_air").Problem // gaps of 0.5 mm
	r := solve(t, p, heat.Fine)
	total := 0.0
	for _, q := range p.Parts {
		total += q.Heat
		closed(t, "through a line round part", flow(r.Field, q.X, q.Y, 2.6*mm+0.25*mm, p.MediumK), q.Heat, 0.005)
	}
	closed(t, "through the gap at the wall", flow(r.Field, 0, 0, 10*mm, p.MediumK), total, 0.005)
	closed(t, "through the wall", flow(r.Field, 0, 0, 12.7*mm, 0.2), total, 0.005)
	// The film, integrated over the outside.
	sum := 0.0
	const points = 720
	for i := range points {
		s, c := math.Sincos(2 * math.Pi * float64(i) / points)
		sum += r.Field.At(13.5*mm*c, 13.5*mm*s) - p.Wall.Ambient
	}
	closed(t, "through the film", sum/points*2*math.Pi*13.5*mm*p.Wall.Film, total, 1e-6)
}

// Core, Surfaces, WallMax and the field agree: the hottest place of a face is the hottest sample of the field on it.
func TestFieldGivesTheFaces(t *testing.T) {
	hottest := func(f heat.Field, x, y, r float64) float64 {
		hot := math.Inf(-1)
		for i := range 2000 {
			s, c := math.Sincos(2 * math.Pi * float64(i) / 2000)
			if v := f.At(x+r*c, y+r*s); !math.IsNaN(v) {
				hot = math.Max(hot, v)
			}
		}
		return hot
	}
	for _, name := range []string{"c06_mixed19_settled_air", "c05_hex7_touch_filler", "m02_hose_air", "c12_nested_cable_air"} {
		p := load(t, name).Problem
		r := solve(t, p, heat.Fine)
		for i := range p.Parts {
			q := &p.Parts[i]
			if q.In >= 0 {
				continue
			}
			for k, radius := range radiiOf(q) {
				if got := hottest(r.Field, q.X, q.Y, radius*(1-1e-9)); math.Abs(got-r.Surfaces[i][k]) > 0.05 {
					t.Errorf("%s: part %d face %d: field %.4f, face %.4f", name, i, k, got, r.Surfaces[i][k])
				}
			}
		}
		for k, radius := range radiiOf(&heat.Part{Radius: p.Wall.R, Rings: p.Wall.Rings}) {
			if got := hottest(r.Field, 0, 0, radius*(1-1e-9)); math.Abs(got-r.WallMax[k]) > 0.1 {
				t.Errorf("%s: wall face %d: field %.4f, face %.4f", name, k, got, r.WallMax[k])
			}
		}
	}
}

// A row is its points, also for many readers at once and while the model goes on; nothing lies outside.
func TestRow(t *testing.T) {
	l := load(t, "c12_nested_cable_air")
	m := heat.New(l.Problem, heat.Settings{})
	f := m.Solve(bg, nil).Field
	row := make([]float64, 101)
	f.Row(row, 0.003, -0.02, 0.0004)
	var all sync.WaitGroup
	for range 4 {
		all.Go(func() {
			for i, v := range row {
				if w := f.At(-0.02+0.0004*float64(i), 0.003); w != v && !(math.IsNaN(v) && math.IsNaN(w)) {
					t.Errorf("point %d: %g in the row, %g alone", i, v, w)
				}
			}
		})
	}
	m.Move(4, 0.009, 0)
	m.Solve(bg, nil)
	all.Wait()
	if !math.IsNaN(row[0]) || !math.IsNaN(row[100]) || math.IsNaN(row[50]) {
		t.Errorf("ends %g and %g, middle %g", row[0], row[100], row[50])
	}
	box := heat.New(load(t, "c09_rect7_floor_air").Problem, heat.Settings{}).Solve(bg, nil).Field
	for _, z := range [][3]float64{{-0.0016, 0.02, 1}, {-0.0014, 0.02, 0}, {0.0516, 0.02, 1}, {0.02, 0.0516, 1}, {0.02, 0.0514, 0}} {
		if math.IsNaN(box.At(z[0], z[1])) != (z[2] == 1) {
			t.Errorf("the box at %g, %g: %g", z[0], z[1], box.At(z[0], z[1]))
		}
	}
}

// In the medium the field is harmonic: the mean over a small circle is the value at its middle.
func TestFieldIsHarmonic(t *testing.T) {
	r := rand.New(rand.NewPCG(12, 12))
	for _, name := range []string{"c02_hex7_spaced_air", "c06_mixed19_settled_air", "c09_rect7_floor_air"} {
		p := load(t, name).Problem
		f := solve(t, p, heat.Standard).Field
		for range 400 {
			x, y := somewhere(r, p.Wall)
			h := math.Min(clearance(p, x, y), 0.5*mm)
			if h < 0.1*mm {
				continue
			}
			mean := 0.0
			for i := range 60 {
				s, c := math.Sincos(2 * math.Pi * float64(i) / 60)
				mean += f.At(x+0.9*h*c, y+0.9*h*s) / 60
			}
			if e := mean - f.At(x, y); math.Abs(e) > 2e-3 {
				t.Errorf("%s at %g, %g mm: mean of the circle off by %g K", name, x/mm, y/mm, e)
			}
		}
	}
}

// clearance is the distance from the nearest face, negative outside the medium.
func clearance(p heat.Problem, x, y float64) float64 {
	d := p.Wall.R - math.Hypot(x, y)
	if p.Wall.Shape == heat.Rect {
		d = math.Min(math.Min(x, p.Wall.W-x), math.Min(y, p.Wall.H-y))
	}
	for i := range p.Parts {
		d = math.Min(d, math.Hypot(x-p.Parts[i].X, y-p.Parts[i].Y)-outer(&p.Parts[i]))
	}
	return d
}

// Along the floor of a steel wireway, under its parts, the temperature has no bumps at any depth: second differences over half a
// millimetre, of which some mK are true where a part touches.
func TestFieldIsSmoothInSheetMetal(t *testing.T) {
	p := load(t, "r09b_sides10_steel").Problem
	r := solve(t, p, heat.Standard)
	const h = 0.5e-3
	for _, y := range []float64{-0.05e-3, -0.3e-3, -0.7e-3, -1.2e-3} {
		worst, at := 0.0, 0.0
		for x := 2e-3; x < p.Wall.W-2e-3; x += 0.2e-3 {
			if d := math.Abs(r.Field.At(x-h, y) - 2*r.Field.At(x, y) + r.Field.At(x+h, y)); d > worst {
				worst, at = d, x
			}
		}
		t.Logf("%.2f mm deep: %.2f mK at %.1f mm", -1e3*y, 1e3*worst, 1e3*at)
		if worst > 6e-3 {
			t.Errorf("%.2f mm deep: a bump of %.2f mK at %.1f mm", -1e3*y, 1e3*worst, 1e3*at)
		}
	}
}
