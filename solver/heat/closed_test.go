package heat_test

import (
	"math"
	"testing"

	"packrise/solver/heat"
)

// closed compares with a closed form; within is relative.
func closed(t *testing.T, what string, got, want, within float64) {
	t.Helper()
	if !(math.Abs(got-want) <= within*math.Abs(want)) {
		t.Errorf("%s: %.9g, want %.9g", what, got, want)
	}
}

func wire(d, insulation, k, heatWM float64) heat.Part {
	p := heat.Part{In: -1, Core: heat.Metal, Radius: d / 2, Heat: heatWM}
	if insulation > 0 {
		p.Rings = []heat.Ring{{K: k, Thickness: insulation}}
	}
	return p
}

func solve(t *testing.T, p heat.Problem, acc heat.Accuracy) *heat.Result {
	t.Helper()
	r := heat.New(p, heat.Settings{Accuracy: acc}).Solve(bg, nil)
	if r.Status != heat.Converged {
		t.Errorf("status %v", r.Status)
	}
	return r
}

// Insulated wire (Cengel, Heat Transfer, example on critical radius): d 3 mm, 2 mm of k 0.15 W/mK, 10 A × 8 V over 5 m, h 12 W/m²K, 30 °C: interface
// 105.0 °C.
func TestInsulatedWire(t *testing.T) {
	p := heat.Problem{Parts: []heat.Part{wire(3*mm, 2*mm, 0.15, 16)}, Wall: heat.Wall{Shape: heat.BarePart, Film: 12, Ambient: 30}}
	r := solve(t, p, heat.Standard)
	closed(t, "interface °C", r.Core[0], 105.0, 0.2/105)
	want := 30 + 16*(math.Log(3.5/1.5)/(2*math.Pi*0.15)+1/(2*math.Pi*3.5e-3*12))
	closed(t, "closed form", r.Core[0], want, 1e-12)
	closed(t, "outside", r.WallMean, 30+16/(2*math.Pi*3.5e-3*12), 1e-12)
	closed(t, "released", r.Released, 16, 1e-12)
	closed(t, "field in the insulation", r.Field.At(0, 2.5*mm), r.WallMean+16*math.Log(3.5/2.5)/(2*math.Pi*0.15), 1e-12)
	closed(t, "field in the metal", r.Field.At(1*mm, 0), r.Core[0], 1e-12)
	if !math.IsNaN(r.Field.At(0, 3.6*mm)) {
		t.Error("a temperature outside the wire")
	}
}

// Critical radius k/h = 12.5 mm for k 0.15 and h 12 (Cengel): the metal is coolest there.
func TestCriticalRadius(t *testing.T) {
	rise := func(r float64) float64 {
		p := heat.Problem{Parts: []heat.Part{wire(3*mm, r-1.5*mm, 0.15, 16)}, Wall: heat.Wall{Shape: heat.BarePart, Film: 12}}
		return solve(t, p, heat.Standard).Core[0]
	}
	best := rise(12.5 * mm)
	for _, r := range []float64{12.4 * mm, 12.6 * mm} {
		if rise(r) <= best {
			t.Errorf("cooler at %g than at 12.5 mm", r)
		}
	}
}

// A wire of many layers concentric in a wall of many layers, against the sum of ln(r'/r)/(2πk).
func TestConcentric(t *testing.T) {
	p := heat.Problem{MediumK: 0.03, Wall: heat.Wall{R: 12 * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 1.5 * mm}, {K: 50, Thickness: 1 * mm}}, Film: 9, Ambient: 25}}
	w := wire(4*mm, 1*mm, 0.2, 7)
	w.Rings = append(w.Rings, heat.Ring{K: 0.35, Thickness: 0.5 * mm})
	p.Parts = []heat.Part{w}
	r := solve(t, p, heat.Standard)
	ln := func(r1, r0, k float64) float64 { return 7 * math.Log(r1/r0) / (2 * math.Pi * k) }
	out := 25 + 7/(2*math.Pi*14.5e-3*9)
	closed(t, "outside", r.WallMean, out, 1e-12)
	steel := out + ln(14.5, 13.5, 50)
	inner := steel + ln(13.5, 12, 0.2)
	rim := inner + ln(12, 3.5, 0.03)
	skin := rim + ln(3.5, 3, 0.35)
	core := skin + ln(3, 2, 0.2)
	for i, v := range []float64{inner, steel, out} {
		closed(t, "wall", r.WallMax[i], v, 1e-12)
	}
	for i, v := range []float64{core, skin, rim} {
		closed(t, "face", r.Surfaces[0][i], v, 1e-12)
	}
	closed(t, "core", r.Core[0], core, 1e-12)
	closed(t, "field in the medium", r.Field.At(6*mm, 0), inner+ln(12, 6, 0.03), 1e-9)
	closed(t, "field in the wall", r.Field.At(0, -13*mm), steel+ln(13.5, 13, 0.2), 1e-9)
}

// Eccentric cylinder (Incropera, table 4.1): D 0.1 in 0.4, offset 0.05, L 10: S = 47.710.
func TestEccentric(t *testing.T) {
	rises := map[heat.Accuracy]float64{}
	for _, acc := range []heat.Accuracy{heat.Draft, heat.Standard, heat.Fine} {
		p := heat.Problem{MediumK: 1, Wall: heat.Wall{R: 0.2, Film: math.Inf(1)}, Parts: []heat.Part{wire(0.1, 0, 0, 1)}}
		p.Parts[0].X = 0.05
		r := solve(t, p, acc)
		rises[acc] = r.Core[0]
		closed(t, "shape factor", 10/r.Core[0], 47.710, 0.005)
		closed(t, "released", r.Released, 1, 1e-9)
	}
	want := math.Acosh((0.4*0.4+0.1*0.1-4*0.05*0.05)/(2*0.4*0.1)) / (2 * math.Pi)
	draft, fine := math.Abs(rises[heat.Draft]-want), math.Abs(rises[heat.Fine]-want)
	if fine > draft/2 && fine > 1e-7*want {
		t.Errorf("error %g at draft, %g at fine", draft, fine)
	}
	closed(t, "fine", rises[heat.Fine], want, 2e-6)
}

// packedDisc is conductors of diameter 1 in cores of 1.5 in a homogeneous disc (k 1) with isothermal rim.
func packedDisc(r float64, at ...complex128) heat.Problem {
	p := heat.Problem{MediumK: 1, Wall: heat.Wall{R: r, Film: math.Inf(1)}}
	for _, c := range at {
		w := wire(1, 0.25, 1, 1)
		w.X, w.Y = real(c), imag(c)
		p.Parts = append(p.Parts, w)
	}
	return p
}

func ringOf(n int, radius float64) (at []complex128) {
	for i := range n {
		s, c := math.Sincos(2 * math.Pi * float64(i) / float64(n))
		at = append(at, complex(radius*c, radius*s))
	}
	return at
}

// Check 4: conductors in a homogeneous disc (testdata/reference/benchmarks_conduction.csv, multipole collocation), T·k/q.
func TestPackedDiscs(t *testing.T) {
	three := packedDisc(0.75*(1+2/math.Sqrt(3)), ringOf(3, 1.5/math.Sqrt(3))...)
	closed(t, "three just enclosed", solve(t, three, heat.Standard).Core[0], 0.153098, 1e-4)
	three.Wall.R *= 1.2
	closed(t, "three, rim × 1.2", solve(t, three, heat.Standard).Core[0], 0.249741, 1e-4)
	two := packedDisc(1.5, 0.75, -0.75)
	closed(t, "two", solve(t, two, heat.Standard).Core[0], 0.135573, 2e-4)
	seven := packedDisc(2.25, append([]complex128{0}, ringOf(6, 1.5)...)...)
	r := solve(t, seven, heat.Standard)
	closed(t, "centre", r.Core[0], 0.338080, 1e-4)
	closed(t, "outer", r.Core[1], 0.215109, 1e-4)
	m := heat.New(seven, heat.Settings{})
	k, _ := m.Influence(bg)
	closed(t, "centre by centre", k[0][0], 0.154181, 1e-4)
	closed(t, "outer by centre", k[1][0], 0.030650, 3e-4)
	sum := 0.0
	for j := 1; j < 7; j++ {
		sum += k[0][j]
	}
	closed(t, "centre by the outer six", sum, 0.183899, 1e-4)
	closed(t, "reciprocity", sum, 6*k[1][0], 1e-3)
	single := packedDisc(3, 0.8)
	single.Parts[0].Radius, single.Parts[0].Rings = 1, nil
	closed(t, "eccentric", solve(t, single, heat.Standard).Core[0], 0.161424962, 1e-4)
}

// A hose held at a temperature, concentric: it takes what the difference drives through its wall, the medium and the film.
func TestHeldBore(t *testing.T) {
	hose := heat.Part{In: -1, Core: heat.FixedBore, Radius: 3 * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 1 * mm}}, Fixed: 10}
	way := math.Log(4.0/3)/(2*math.Pi*0.2) + math.Log(10.0/4)/(2*math.Pi*0.1) + 1/(2*math.Pi*10e-3*8)
	p := heat.Problem{MediumK: 0.1, Wall: heat.Wall{R: 10 * mm, Film: 8, Ambient: 35}, Parts: []heat.Part{hose}}
	r := solve(t, p, heat.Standard)
	closed(t, "absorbed", r.Absorbed[0], 25/way, 1e-9)
	closed(t, "released", r.Released, -25/way, 1e-9)
	closed(t, "bore", r.Core[0], 10, 1e-9)
	p.Wall = heat.Wall{Shape: heat.BarePart, Film: 8, Ambient: 35}
	r = solve(t, p, heat.Standard)
	closed(t, "bare hose", r.Absorbed[0], 25/(math.Log(4.0/3)/(2*math.Pi*0.2)+1/(2*math.Pi*4e-3*8)), 1e-9)
}

// A held bore beside conductors: the balance closes, its temperature is kept, and the influence matrix is what differences of loads give.
func TestHeldBoreAmongConductors(t *testing.T) {
	for _, shape := range []heat.Shape{heat.Round, heat.Rect} {
		p := heat.Problem{MediumK: 0.2, Wall: heat.Wall{Shape: shape, R: 10 * mm, W: 20 * mm, H: 20 * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 1 * mm}}, Film: 10, Ambient: 30}}
		o := 0.0
		if shape == heat.Rect {
			o = 10 * mm
		}
		hose := heat.Part{In: -1, X: o, Y: o, Core: heat.FixedBore, Radius: 2 * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 1 * mm}}, Fixed: 15}
		p.Parts = []heat.Part{hose}
		for _, c := range ringOf(5, 5*mm) {
			w := wire(2*mm, 1*mm, 0.2, 4)
			w.X, w.Y = o+real(c), o+imag(c)
			p.Parts = append(p.Parts, w)
		}
		m := heat.New(p, heat.Settings{})
		r := m.Solve(bg, nil)
		closed(t, "bore", r.Surfaces[0][0], 15, 1e-5)
		closed(t, "balance", r.Released+r.Absorbed[0], r.Generated, 1e-5)
		if r.Absorbed[0] <= 0 {
			t.Errorf("a cold bore gives %g W/m", -r.Absorbed[0])
		}
		ground, _ := m.Ground(bg)
		k, _ := m.Influence(bg)
		for i := 1; i < len(p.Parts); i++ {
			want := ground[i]
			for j := 1; j < len(p.Parts); j++ {
				want += k[i][j] * 4
			}
			closed(t, "superposition", r.Core[i], want, 1e-5)
		}
		if k[0] != nil || math.Abs(k[1][0]) > 1e-12 {
			t.Error("a bore has influence")
		}
	}
}

// A cable of the medium's own material is not there: its cores stand where they would stand without it.
func TestInvisibleCable(t *testing.T) {
	plain := heat.Problem{MediumK: 0.2, Wall: heat.Wall{R: 14 * mm, Rings: []heat.Ring{{K: 0.25, Thickness: 1 * mm}}, Film: 10, Ambient: 30}}
	nested := plain
	nested.Parts = []heat.Part{{In: -1, X: 4 * mm, Y: -2 * mm, Core: heat.Inside, Radius: 6 * mm, K: 0.2, Rings: []heat.Ring{{K: 0.2, Thickness: 1 * mm}}}}
	for i, c := range ringOf(3, 3.4*mm) {
		w := wire(3*mm, 0.8*mm, 0.3, float64(2+i))
		w.X, w.Y, w.In = real(c), imag(c), 0
		nested.Parts = append(nested.Parts, w)
		w.X, w.Y, w.In = w.X+4*mm, w.Y-2*mm, -1
		plain.Parts = append(plain.Parts, w)
	}
	other := wire(4*mm, 1*mm, 0.15, 5)
	other.X, other.Y = -7*mm, 3*mm
	nested.Parts, plain.Parts = append(nested.Parts, other), append(plain.Parts, other)
	a, b := solve(t, nested, heat.Fine), solve(t, plain, heat.Fine)
	for i := range plain.Parts {
		closed(t, "core", a.Core[i+1], b.Core[i], 1e-5)
	}
	for _, z := range []complex128{4 + 2i, 9 - 2i, 4 - 2i, -3 - 3i, 10.4 - 2i} {
		closed(t, "field", a.Field.At(real(z)*mm, imag(z)*mm), b.Field.At(real(z)*mm, imag(z)*mm), 1e-4)
	}
}

// A cable within a cable within a cable, all concentric round one core.
func TestNestedThrice(t *testing.T) {
	p := heat.Problem{MediumK: 0.03, Wall: heat.Wall{R: 12 * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 1 * mm}}, Film: 9, Ambient: 25}}
	want := 25 + 6*(1/(2*math.Pi*13e-3*9)+math.Log(13.0/12)/(2*math.Pi*0.2))
	outer := 12.0
	k := 0.03
	for i, r := range []float64{8, 6, 4} {
		p.Parts = append(p.Parts, heat.Part{In: i - 1, Core: heat.Inside, Radius: r * mm, K: 0.1 + 0.1*float64(i), Rings: []heat.Ring{{K: 0.25, Thickness: 0.5 * mm}}})
		want += 6 * (math.Log(outer/(r+0.5))/(2*math.Pi*k) + math.Log((r+0.5)/r)/(2*math.Pi*0.25))
		outer, k = r, 0.1+0.1*float64(i)
	}
	w := wire(2*mm, 0.5*mm, 0.2, 6)
	w.In = 2
	p.Parts = append(p.Parts, w)
	want += 6 * (math.Log(4/1.5)/(2*math.Pi*0.3) + math.Log(1.5)/(2*math.Pi*0.2))
	r := solve(t, p, heat.Standard)
	closed(t, "core", r.Core[3], want, 1e-9)
	closed(t, "field", r.Field.At(0.5*mm, 0), want, 1e-9)
	// The outermost cable bare: the film acts on its own jacket.
	p.Wall = heat.Wall{Shape: heat.BarePart, Film: 9, Ambient: 25}
	r = solve(t, p, heat.Standard)
	want += 6 * (1/(2*math.Pi*8.5e-3*9) - 1/(2*math.Pi*13e-3*9) - math.Log(13.0/12)/(2*math.Pi*0.2) - math.Log(12/8.5)/(2*math.Pi*0.03))
	closed(t, "bare cable", r.Core[3], want, 1e-9)
	closed(t, "its outside", r.Surfaces[0][1], r.WallMean, 1e-9)
	closed(t, "released", r.Released, 6, 1e-9)
}

// Clearance, concentric: the gap is wider by the whole clearance, the insulation's resistance stays.
func TestClearance(t *testing.T) {
	p := heat.Problem{MediumK: 0.026, Clearance: 0.2 * mm, Wall: heat.Wall{R: 5 * mm, Rings: []heat.Ring{{K: 0.2, Thickness: 1 * mm}}, Film: 10, Ambient: 30}, Parts: []heat.Part{wire(3*mm, 0.9*mm, 0.2, 4)}}
	r := solve(t, p, heat.Standard)
	want := 30 + 4*(1/(2*math.Pi*6e-3*10)+math.Log(6.0/5)/(2*math.Pi*0.2)+math.Log(5.1/2.3)/(2*math.Pi*0.026)+math.Log(2.4/1.5)/(2*math.Pi*0.2))
	closed(t, "core", r.Core[0], want, 1e-12)
	p.Clearance = 1 * mm // more than a third of the insulation
	want = 30 + 4*(1/(2*math.Pi*6e-3*10)+math.Log(6.0/5)/(2*math.Pi*0.2)+math.Log(5.5/2.1)/(2*math.Pi*0.026)+math.Log(2.4/1.5)/(2*math.Pi*0.2))
	closed(t, "bounded", solve(t, p, heat.Standard).Core[0], want, 1e-12)
	// In a rectangle both halves of the clearance count as well: same temperatures as a box that is larger by it, parts thinner by it.
	q := heat.Problem{MediumK: 0.026, Clearance: 0.3 * mm, Wall: heat.Wall{Shape: heat.Rect, W: 20 * mm, H: 12 * mm, Film: 10, Ambient: 30}, Parts: []heat.Part{wire(3*mm, 1.2*mm, 0.2, 4)}}
	q.Parts[0].X, q.Parts[0].Y = 6*mm, 2.7*mm
	a := solve(t, q, heat.Fine)
	q.Clearance = 0
	q.Wall.W, q.Wall.H = 20.3*mm, 12.3*mm
	q.Parts[0].X, q.Parts[0].Y = 6.15*mm, 2.85*mm
	loose := solve(t, q, heat.Fine)
	q.Wall.W, q.Wall.H = 20*mm, 12*mm
	q.Parts[0].X, q.Parts[0].Y = 6*mm, 2.7*mm
	tight := solve(t, q, heat.Fine)
	if !(a.Core[0] > loose.Core[0] && loose.Core[0] > tight.Core[0]) {
		t.Errorf("clearance %.3f, larger box %.3f, tight %.3f: not in this order", a.Core[0], loose.Core[0], tight.Core[0])
	}
}
