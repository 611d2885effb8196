package outline

import (
	"math"
	"math/cmplx"
	"slices"
	"sync"
	"testing"
)

// steel is a wireway with paint outside, different sides and three parts, one of them on the floor.
func steel() (Rect, []rod) {
	r := Rect{W: 0.05, H: 0.03, MediumK: 0.03, Layers: []Layer{{50, 0.001}, {0.2, 0.0001}}}
	r.Sides = [4]Side{insulated, film(8, 20), film(6, 25), held(35)}
	return r, []rod{
		{c: 0.01 + 0.003i, core: 0.002, k: []float64{0.2}, t: []float64{0.001}, radius: 0.003, heat: 2, order: 16},
		{c: 0.02 + 0.012i, core: 0.003, k: []float64{0.2}, t: []float64{0.001}, radius: 0.004, heat: 3, order: 8},
		{c: 0.04 + 0.02i, core: 0.002, k: []float64{0.3}, t: []float64{0.001}, radius: 0.003, heat: 1, order: 8},
	}
}

// TestOuterCondition takes derivatives of the field at the outer face: −k ∂T/∂n = h(T − outside), no flux where insulated.
func TestOuterCondition(t *testing.T) {
	r, rods := steel()
	w := solveWhole(r, rods, 2, true)
	at := func(z complex128) float64 { return w.wall.InWall(w.y, w.src, z) }
	const e = 1e-5
	x := 0.0011
	flux := func(z, n complex128) float64 { // second order, one-sided
		return -0.2 * (3*at(z) - 4*at(z-n*e) + at(z-2*n*e)) / (2 * e)
	}
	right := complex(0.05+x-1e-12, 0.013)
	if got, want := flux(right, 1), 8*(at(right)-20); !near(got, want, 0.01) {
		t.Errorf("right: flux %.4f, film %.4f W/m²", got, want)
	}
	top := complex(0.021, 0.03+x-1e-12)
	if got, want := flux(top, 1i), 6*(at(top)-25); !near(got, want, 0.01) {
		t.Errorf("top: flux %.4f, film %.4f W/m²", got, want)
	}
	if got := flux(complex(0.03, -x+1e-12), -1i); !(math.Abs(got) < 1) { // of some 100 W/m² elsewhere
		t.Errorf("insulated floor: flux %.4f W/m²", got)
	}
	if got := at(complex(-x+1e-12, 0.02)); !(math.Abs(got-35) < 1e-3) {
		t.Errorf("held side at %.5f", got)
	}
}

// TestInterface checks that temperature and heat flow are continuous where medium and layers meet.
func TestInterface(t *testing.T) {
	if testing.Short() {
		t.Skip("dense solutions of many unknowns")
	}
	r, rods := steel()
	r.Layers[0].K = 0.4 // gradients in good metal are too small to difference
	w := solveWhole(r, rods, 3, true)
	at := func(z complex128) float64 { return w.wall.InWall(w.y, w.src, z) }
	for _, c := range []struct {
		z, n    complex128
		in, out float64
	}{{complex(0.0213, 0), -1i, 0.03, 0.4}, {complex(0.05, 0.017), 1, 0.03, 0.4}, {complex(0.0213, 0.031), 1i, 0.4, 0.2}} {
		const e = 1e-5
		in := c.in * (4*at(c.z-e*c.n) - 3*at(c.z) - at(c.z-2*e*c.n)) / (2 * e)
		out := c.out * (3*at(c.z) - 4*at(c.z+e*c.n) + at(c.z+2*e*c.n)) / (2 * e)
		if !near(in, out, 0.05) {
			t.Errorf("at %v: heat flow %.3f and %.3f W/m²", c.z, in, out)
		}
	}
}

// TestIncoming compares the expansion about a part with the field itself on the part's rim.
func TestIncoming(t *testing.T) {
	r, rods := steel()
	w := solveWhole(r, rods, 1, true)
	for i, p := range rods {
		b := make([]complex128, 41)
		d := w.wall.discs[i]
		d.M = 40
		w.wall.link(&d)
		w.wall.discs[i] = d
		w.wall.IncomingAt(i, w.y, b)
		for j := range 12 {
			if i == 0 && j == 9 {
				continue // where it touches the wall
			}
			u := 0.9 * cmplx.Exp(complex(0, 2*math.Pi*float64(j)/12))
			sum, v := complex128(0), complex(1, 0)
			for _, bn := range b {
				sum += bn * v
				v *= u
			}
			want := w.wall.At(w.y, p.c+complex(p.radius, 0)*u)
			tol := 1e-6
			if i == 0 {
				tol = 0.02 // 0.9^41
			}
			if !(math.Abs(real(sum)-want) < tol) {
				t.Errorf("part %d, %d/12 around: %.8f, want %.8f", i, j, real(sum), want)
			}
		}
	}
}

// TestReciprocity: what a source here does there, a source there does here, through any wall.
func TestReciprocity(t *testing.T) {
	r, _ := steel()
	s := New(r, []Disc{point(0.012 + 0.004i), point(0.041 + 0.026i)}, 1)
	a := s.Respond(s.bare(1, 0), false)
	b := s.Respond(s.bare(0, 1), false)
	there, here := s.At(a, 0.041+0.026i), s.At(b, 0.012+0.004i) // the direct part is the same anyhow
	if !near(there, here, 2e-5) {
		t.Errorf("%.7f there, %.7f here", there, here)
	}
}

// TestMirror reflects a section left to right.
func TestMirror(t *testing.T) {
	r, rods := steel()
	w := solveWhole(r, rods, 1, true)
	r.Sides[1], r.Sides[3] = r.Sides[3], r.Sides[1]
	mirrored := slices.Clone(rods)
	for i := range mirrored {
		mirrored[i].c = complex(r.W-real(rods[i].c), imag(rods[i].c))
	}
	m := solveWhole(r, mirrored, 1, true)
	for i := range rods {
		if d := w.core[i] - m.core[i]; !(math.Abs(d) < 1e-6) {
			t.Errorf("part %d: %.6f and %.6f", i, w.core[i], m.core[i])
		}
	}
}

// TestRefinement: errors against three times finer panels fall.
func TestRefinement(t *testing.T) {
	if testing.Short() {
		t.Skip("dense solutions of many unknowns")
	}
	r, rods := steel()
	best := solveWhole(r, rods, 3, true)
	before := math.Inf(1)
	for _, f := range []float64{0.5, 1, 2} {
		w := solveWhole(r, rods, f, true)
		worst := 0.0
		for i := range rods {
			worst = math.Max(worst, math.Abs(w.core[i]-best.core[i]))
		}
		if !(worst < before/1.5) {
			t.Errorf("fineness %g: off by %.5f K, %.5f before", f, worst, before)
		}
		before = worst
	}
	if !(before < 1e-3) {
		t.Errorf("off by %.5f K at fineness 2", before)
	}
}

// TestFoil: a metal foil on plastic is as good at fineness 1 as a wall of one layer, although its lateral conduction is carried by densities
// a tenth of a millimetre apart.
func TestFoil(t *testing.T) {
	if testing.Short() {
		t.Skip("dense solutions of many unknowns")
	}
	r, rods := steel()
	for _, layers := range [][]Layer{{{200, 0.0001}, {0.2, 0.002}}, {{0.2, 0.002}, {200, 0.00005}}, {{0.2, 0.001}, {50, 0.001}, {0.2, 0.001}}} {
		r.Layers = layers
		a, b := solveWhole(r, rods, 1, true), solveWhole(r, rods, 2, true)
		for i := range rods {
			if d := a.core[i] - b.core[i]; !(math.Abs(d) < 0.05) { // of 40–60 K
				t.Errorf("%v part %d: %.4f, twice as fine %.4f", layers, i, a.core[i], b.core[i])
			}
		}
	}
}

// TestLinear: sources and ground superpose, and doubling doubles.
func TestLinear(t *testing.T) {
	r, rods := steel()
	w := solveWhole(r, rods, 1, true)
	s := w.wall
	zero := s.bare(0, 0, 0)
	double := Sources{Q: slices.Clone(w.src.Q)}
	for i := range double.Q {
		double.Q[i] *= 2
		d := slices.Clone(w.src.D[i])
		for m := range d {
			d[m] *= 2
		}
		double.D = append(double.D, d)
	}
	a, b, g := s.Respond(double, true), s.Respond(w.src, false), s.Respond(zero, true)
	for i := range a {
		if d := a[i] - 2*b[i] - g[i]; !(math.Abs(d) <= 1e-7*(1+math.Abs(a[i])+math.Abs(g[i]))) {
			t.Fatalf("unknown %d: %g, %g and %g", i, a[i], b[i], g[i])
		}
	}
}

// TestMove: a disc moved is a disc put there, on the same panels.
func TestMove(t *testing.T) {
	r, rods := steel()
	w := solveWhole(r, rods, 1, true)
	s := w.wall
	from, to := rods[1].c, complex(0.0215, 0.0125)
	rods[1].c = to
	if !s.Move(1, to) {
		t.Error("the panels don't do half a millimetre away from the wall")
	}
	fresh := solveWhole(r, rods, 1, true)
	y := s.Respond(fresh.src, true)
	b := [][]complex128{make([]complex128, 17), make([]complex128, 9), make([]complex128, 9)}
	s.Incoming(y, b)
	got := real(b[1][0])
	want := make([]complex128, 9)
	fresh.wall.IncomingAt(1, fresh.y, want)
	if !(math.Abs(got-real(want[0])) < 2e-3) {
		t.Errorf("b_0 %.6f after Move, %.6f fresh", got, real(want[0]))
	}
	if s.Move(0, complex(0.03, rods[0].radius)) {
		t.Error("coarse panels are said to resolve a part on the floor")
	}
	s.Move(0, rods[0].c)
	s.Move(1, from)
	if y = s.Respond(w.src, true); !slices.Equal(y, w.y) {
		t.Error("moving back is not the start again")
	}
}

// TestSlack: a disc with slack may be moved along the floor by that much.
func TestSlack(t *testing.T) {
	r, rods := steel()
	for _, slack := range []float64{0, 0.003} {
		s := New(r, []Disc{{C: rods[0].c, A: rods[0].radius, M: 24, Slack: slack}}, 1)
		ok := s.Move(0, rods[0].c+0.003) && s.Move(0, rods[0].c-0.003+0.001i)
		if ok != (slack > 0) {
			t.Errorf("slack %g: resolved %t", slack, ok)
		}
	}
}

// TestSealed: with no way for heat to leave there is no answer, and no number pretends to be one.
func TestSealed(t *testing.T) {
	r := Rect{W: 0.02, H: 0.02, MediumK: 0.3, Sides: [4]Side{insulated, film(0, 20), insulated, insulated}}
	s := New(r, []Disc{point(0.01 + 0.01i)}, 1)
	y := s.Respond(s.bare(1), true)
	if got := s.InWall(y, s.bare(1), 0.004+0.004i); !math.IsNaN(got) {
		t.Errorf("%g", got)
	}
}

func TestMisuse(t *testing.T) {
	good := Rect{W: 0.02, H: 0.02, MediumK: 0.3, Layers: []Layer{{0.2, 0.001}}}
	for name, change := range map[string]func(*Rect){
		"width":     func(r *Rect) { r.W = 0 },
		"height":    func(r *Rect) { r.H = math.NaN() },
		"medium":    func(r *Rect) { r.MediumK = -1 },
		"thickness": func(r *Rect) { r.Layers = []Layer{{0.2, 0}} },
		"layer":     func(r *Rect) { r.Layers = []Layer{{math.Inf(1), 0.001}} },
		"film":      func(r *Rect) { r.Sides[2].Film = -1 },
	} {
		t.Run(name, func(t *testing.T) {
			r := good
			change(&r)
			defer func() {
				if recover() == nil {
					t.Error("no panic")
				}
			}()
			New(r, nil, 1)
		})
	}
}

// TestConcurrent uses one System from several goroutines (of use under the race detector).
func TestConcurrent(t *testing.T) {
	r, rods := steel()
	w := solveWhole(r, rods, 0.7, true)
	want := w.wall.At(w.y, 0.03+0.02i)
	var wg sync.WaitGroup
	for range 4 {
		wg.Go(func() {
			y := w.wall.Respond(w.src, true)
			w.wall.Faces(y, w.src)
			if got := w.wall.Field(y).At(0.03 + 0.02i); !(math.Abs(got-want) < 1e-5) {
				t.Errorf("%g, want %g", got, want)
			}
		})
	}
	wg.Wait()
}

// TestNoAllocation: the loop of an iteration must not feed the collector.
func TestNoAllocation(t *testing.T) {
	r, rods := steel()
	w := solveWhole(r, rods, 1, true)
	y := make([]float64, w.wall.Len())
	b := [][]complex128{make([]complex128, 17), make([]complex128, 9), make([]complex128, 9)}
	if n := testing.AllocsPerRun(10, func() {
		w.wall.RespondTo(y, w.src, true)
		w.wall.Incoming(y, b)
	}); n > 0 {
		t.Errorf("%g allocations", n)
	}
}

// New stops when it is asked to, and one worker builds what many do.
func TestNewStops(t *testing.T) {
	r := patchRect([]Layer{{K: 0.2, Thickness: 2e-3}})
	discs := []Disc{{C: complex(0.02, 0.01), A: 0.005, M: 8}}
	src := Sources{Q: []float64{3}, D: [][]complex128{{0.2}}}
	want := New(r, discs, 1).Respond(src, true)
	r.Workers = 1
	for i, v := range New(r, discs, 1).Respond(src, true) {
		if v != want[i] {
			t.Fatalf("unknown %d is %g with one worker, %g with many", i, v, want[i])
		}
	}
	for asked := range 5 {
		n := 0
		r.Stop = func() bool { n++; return n > asked }
		if New(r, discs, 1) != nil {
			t.Errorf("went on after %d questions", asked)
		}
	}
}
