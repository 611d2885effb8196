package heat_test

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"
	"time"

	"packrise/solver/heat"
)

func at(w heat.Part, xMM, yMM float64) heat.Part {
	w.X, w.Y = xMM*mm, yMM*mm
	return w
}

func plastic(rMM float64) heat.Wall {
	return heat.Wall{R: rMM * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 1.5 * mm}}, Film: 10, Ambient: 30}
}

func steel(rMM float64) heat.Wall {
	return heat.Wall{R: rMM * mm, Rings: []heat.Ring{{K: 50, Thickness: 1.5 * mm}}, Film: 10, Ambient: 30}
}

// hardSections are contacts, thin layers, bare metal, contrasts and sizes that strain the method.
func hardSections() map[string]heat.Problem {
	coated := func(k float64) heat.Part {
		p := wire(2*mm, 0.9*mm, 0.2, 5)
		p.Rings = append(p.Rings, heat.Ring{K: k, Thickness: 0.1 * mm})
		return p
	}
	rod := heat.Part{In: -1, Core: heat.Body, Radius: 1.9 * mm, K: 0.2, Rings: []heat.Ring{{K: 200, Thickness: 0.1 * mm}}}
	air := func(w heat.Wall, parts ...heat.Part) heat.Problem {
		return heat.Problem{MediumK: 0.026, Wall: w, Parts: parts}
	}
	filler := func(k float64, w heat.Wall, parts ...heat.Part) heat.Problem {
		return heat.Problem{MediumK: k, Wall: w, Parts: parts}
	}
	return map[string]heat.Problem{
		"bare beside bare":            air(plastic(8), at(wire(4*mm, 0, 0, 5), -2, -3), at(wire(4*mm, 0, 0, 1), 2, -3)),
		"bare beside insulated":       air(plastic(8), at(wire(4*mm, 0, 0, 5), -2, -3), at(wire(2.4*mm, 0.8*mm, 0.2, 1), 2, -3)),
		"bare on plastic":             air(plastic(8), at(wire(4*mm, 0, 0, 5), 0, -6)),
		"bare on steel":               air(steel(8), at(wire(4*mm, 0, 0, 5), 0, -6), at(wire(2.4*mm, 0.8*mm, 0.2, 1), 0, 6)),
		"enamelled":                   air(plastic(8), at(wire(3.96*mm, 0.02*mm, 0.2, 5), -2, -3), at(wire(3.96*mm, 0.02*mm, 0.2, 1), 2, -3)),
		"enamelled on steel":          air(steel(8), at(wire(3.96*mm, 0.02*mm, 0.2, 5), 0, -6)),
		"foil beside foil":            air(plastic(8), at(coated(200), -2, -3), at(rod, 2, -3)),
		"size ratio 50":               air(plastic(30), at(wire(46*mm, 2*mm, 0.2, 30), 0, -5), at(wire(0.6*mm, 0.2*mm, 0.2, 0.3), 0, 20.5), at(wire(0.6*mm, 0.2*mm, 0.2, 0.3), 0, 21.5)),
		"gap of 30 µm":                air(plastic(8), at(wire(2.4*mm, 0.8*mm, 0.2, 5), -2.015, 0), at(wire(2.4*mm, 0.8*mm, 0.2, 0.5), 2.015, 0)),
		"gap of 0.1 µm":               air(plastic(8), at(wire(2.4*mm, 0.8*mm, 0.2, 5), -2.00005, 0), at(wire(2.4*mm, 0.8*mm, 0.2, 0.5), 2.00005, 0)),
		"overlap of 0.5 µm":           air(plastic(8), at(wire(2.4*mm, 0.8*mm, 0.2, 5), -1.99975, 0), at(wire(2.4*mm, 0.8*mm, 0.2, 0.5), 1.99975, 0)),
		"sticking out by 0.5 µm":      air(plastic(8), at(wire(2.4*mm, 0.8*mm, 0.2, 5), 0, -6.0005)),
		"filling the holder":          air(plastic(8), at(wire(12*mm, 2*mm, 0.2, 9), 0, 0)),
		"almost filling the holder":   air(plastic(8), at(wire(11.8*mm, 2*mm, 0.2, 9), 0, -0.1)),
		"one in 300":                  air(plastic(300), at(wire(1.2*mm, 0.4*mm, 0.2, 1), 0, -299)),
		"gel between wires":           filler(2, plastic(8), at(wire(2.4*mm, 0.8*mm, 0.2, 5), -2, 0), at(wire(2.4*mm, 0.8*mm, 0.2, 1), 2, 0), at(wire(2.4*mm, 0.8*mm, 0.2, 1), 0, -3.4641)),
		"metal between wires":         filler(50, plastic(8), at(wire(2.4*mm, 0.8*mm, 0.2, 5), -2, 0), at(wire(2.4*mm, 0.8*mm, 0.2, 1), 2, 0)),
		"body like the medium":        filler(0.2, plastic(8), at(wire(2.4*mm, 0.8*mm, 0.2, 5), -2, 0), at(heat.Part{In: -1, Core: heat.Body, Radius: 2 * mm, K: 0.2}, 2, 0)),
		"no layers":                   air(heat.Wall{R: 8 * mm, Film: 10, Ambient: 30}, at(wire(2.4*mm, 0.8*mm, 0.2, 5), 0, -6)),
		"no layers, fixed wall":       air(heat.Wall{R: 8 * mm, Film: math.Inf(1), Ambient: 30}, at(wire(2.4*mm, 0.8*mm, 0.2, 5), 0, -6)),
		"no layers, bare, fixed wall": air(heat.Wall{R: 8 * mm, Film: math.Inf(1), Ambient: 30}, at(wire(4*mm, 0, 0, 5), 0, -6)),
	}
}

// No valid section fails, and the standard setting is within 0.05 K of the fine one whatever the contacts.
func TestHardSections(t *testing.T) {
	for name, p := range hardSections() {
		r, fine := solve(t, p, heat.Standard), solve(t, p, heat.Fine)
		rise := 0.0
		for i := range r.Core {
			rise = math.Max(rise, fine.Core[i]-30)
			if e := math.Abs(r.Core[i] - fine.Core[i]); !(e < 0.05) {
				t.Errorf("%s: part %d %.4f, fine %.4f", name, i, r.Core[i], fine.Core[i])
			}
		}
		if e := r.Released - r.Generated; math.Abs(e) > 1e-6*r.Generated {
			t.Errorf("%s: balance off by %g", name, e)
		}
		switch name {
		case "bare beside bare", "bare on steel", "foil beside foil", "no layers, bare, fixed wall":
			if r.MetalGap != 10e-6 {
				t.Errorf("%s: held %g m apart", name, r.MetalGap)
			}
		default:
			if r.MetalGap != 0 {
				t.Errorf("%s: held %g m apart", name, r.MetalGap)
			}
		}
		if !(rise > 0 && rise < 200) {
			t.Errorf("%s: rise %g K", name, rise)
		}
		if v := r.Field.At(p.Parts[0].X, p.Parts[0].Y); math.Abs(v-r.Core[0]) > 1e-9 {
			t.Errorf("%s: field in the metal %.6f, metal %.6f", name, v, r.Core[0])
		}
	}
}

// A gap, an overlap or nothing of up to 1 µm is a contact.
func TestMicrometre(t *testing.T) {
	touching := solve(t, heat.Problem{MediumK: 0.026, Wall: plastic(8), Parts: []heat.Part{at(wire(2.4*mm, 0.8*mm, 0.2, 5), -2, 0), at(wire(2.4*mm, 0.8*mm, 0.2, 0.5), 2, 0)}}, heat.Standard)
	for _, name := range []string{"gap of 0.1 µm", "overlap of 0.5 µm"} {
		r := solve(t, hardSections()[name], heat.Standard)
		for i := range r.Core {
			if e := r.Core[i] - touching.Core[i]; math.Abs(e) > 0.003 {
				t.Errorf("%s: %g K from touching", name, e)
			}
		}
	}
}

// Parts drawn over one another, by mistake or on the way of a drag, still give a finite answer.
func TestOverlapsStayFinite(t *testing.T) {
	p := heat.Problem{MediumK: 0.026, Wall: plastic(8)}
	r := rand.New(rand.NewPCG(11, 11))
	for range 12 {
		p.Parts = append(p.Parts, at(wire(2.4*mm, 0.8*mm, 0.2, 1), 14*(r.Float64()-0.5), 14*(r.Float64()-0.5)))
	}
	p.Parts = append(p.Parts, p.Parts[0])
	for _, shape := range []heat.Shape{heat.Round, heat.Rect} {
		p.Wall.Shape, p.Wall.W, p.Wall.H = shape, 12*mm, 9*mm
		res := heat.New(p, heat.Settings{}).Solve(bg, nil)
		for i, v := range res.Core {
			if !(math.Abs(v) < 1e4) {
				t.Errorf("shape %d: part %d at %g", shape, i, v)
			}
		}
	}
}

// Many parts: the timing sections solve at every setting, and standard stays near fine.
func TestManyParts(t *testing.T) {
	for _, c := range timed {
		if testing.Short() && c.parts > 40 {
			continue
		}
		p := load(t, c.name).Problem
		r, fine := solve(t, p, heat.Standard), solve(t, p, heat.Fine)
		worst := 0.0
		for i := range r.Core {
			worst = math.Max(worst, math.Abs(r.Core[i]-fine.Core[i]))
		}
		t.Logf("%d parts: standard is %.4f K from fine, estimated %.4f, %d unknowns, %d steps", c.parts, worst, r.ErrorK, r.Unknowns, r.Steps)
		if worst > 0.03 {
			t.Errorf("%d parts: standard is %.4f K from fine", c.parts, worst)
		}
	}
}

// A context that has ended stops the work at once and says so; what was begun goes on from there.
func TestCancel(t *testing.T) {
	p := load(t, "t37_settled_air").Problem
	m := heat.New(p, heat.Settings{})
	gone, cancel := context.WithCancel(bg)
	cancel()
	if r := m.Solve(gone, nil); r.Status != heat.Cancelled || !math.IsNaN(r.Core[0]) || !math.IsNaN(r.Field.At(0, 0)) || len(r.Surfaces[0]) != 2 || len(r.WallMax) != 2 {
		t.Errorf("cancelled before anything was known: %v, %v", r.Status, r.Core[0])
	}
	if _, s := m.Influence(gone); s != heat.Cancelled {
		t.Errorf("influence %v", s)
	}
	want := m.Solve(bg, nil)
	if want.Status != heat.Converged {
		t.Fatalf("then %v", want.Status)
	}
	for i := range p.Parts {
		p.Parts[i].Heat *= 2
	}
	heats := make([]float64, len(p.Parts))
	for i := range heats {
		heats[i] = p.Parts[i].Heat
	}
	if r := m.Solve(gone, heats); r.Status != heat.Cancelled || r.ErrorK < 1 {
		t.Errorf("cancelled in the middle: %v, estimate %g K", r.Status, r.ErrorK)
	}
	if r := m.Solve(bg, nil); math.Abs(r.Core[0]-want.Core[0]) > 1e-3 {
		t.Errorf("afterwards %.5f, before %.5f", r.Core[0], want.Core[0])
	}
	if testing.Short() {
		return
	}
	big := heat.New(load(t, "t200_settled_air").Problem, heat.Settings{Threads: 1})
	soon, cancel := context.WithTimeout(bg, 30*time.Millisecond)
	defer cancel()
	if _, s := big.Influence(soon); s != heat.Cancelled {
		t.Errorf("a long influence matrix: %v", s)
	}
}

// Misuse panics with a message of the package.
func TestMisuse(t *testing.T) {
	good := heat.Problem{MediumK: 0.026, Wall: plastic(8), Parts: []heat.Part{at(wire(2.4*mm, 0.8*mm, 0.2, 5), 0, 0)}}
	for name, spoil := range map[string]func(p *heat.Problem){
		"negative radius":     func(p *heat.Problem) { p.Parts[0].Radius = -1 },
		"no place":            func(p *heat.Problem) { p.Parts[0].X = math.NaN() },
		"thin ring":           func(p *heat.Problem) { p.Parts[0].Rings = []heat.Ring{{K: 0.2}} },
		"part before cable":   func(p *heat.Problem) { p.Parts[0].In = 0 },
		"part in a wire":      func(p *heat.Problem) { p.Parts = append(p.Parts, p.Parts[0]); p.Parts[1].In = 0 },
		"no medium":           func(p *heat.Problem) { p.MediumK = 0 },
		"two bare parts":      func(p *heat.Problem) { p.Wall.Shape = heat.BarePart; p.Parts = append(p.Parts, p.Parts[0]) },
		"no film":             func(p *heat.Problem) { p.Wall.Film = 0 },
		"body without K":      func(p *heat.Problem) { p.Parts[0].Core = heat.Body },
		"infinite heat":       func(p *heat.Problem) { p.Parts[0].Heat = math.Inf(1) },
		"no inside":           func(p *heat.Problem) { p.Wall.R = 0 },
		"all sides insulated": func(p *heat.Problem) { p.Wall = shut() },
	} {
		p := good
		p.Parts = append([]heat.Part(nil), good.Parts...)
		spoil(&p)
		mustPanic(t, name, func() { heat.New(p, heat.Settings{}) })
	}
	m := heat.New(good, heat.Settings{})
	mustPanic(t, "too many heats", func() { m.Solve(bg, []float64{1, 2}) })
	mustPanic(t, "no number", func() { m.Solve(bg, []float64{math.NaN()}) })
	mustPanic(t, "moving nothing", func() { m.Move(1, 0, 0) })
}

func shut() heat.Wall {
	w := heat.Wall{Shape: heat.Rect, W: 1, H: 1, Film: 10}
	for i := range w.Sides {
		w.Sides[i].Kind = heat.Insulated
	}
	return w
}

func mustPanic(t *testing.T, name string, f func()) {
	t.Helper()
	defer func() {
		s, ok := recover().(string)
		if !ok || len(s) < 6 || s[:6] != "heat: " {
			t.Errorf("%s: %v", name, s)
		}
	}()
	f()
}
