package outline

import (
	"encoding/csv"
	"math"
	"os"
	"testing"
)

// sides is bottom, right, top, left.
func held(t float64) Side { return Side{Kind: Held, Temp: t} }

var insulated = Side{Kind: Insulated}

func film(h, t float64) Side { return Side{Kind: Open, Film: h, Temp: t} }

// point is a source that reflects nothing.
func point(c complex128) Disc { return Disc{C: c, A: 1e-5, M: 1} }

func (s *System) bare(q ...float64) Sources { return Sources{Q: q, D: make([][]complex128, len(q))} }

// near tells whether got is want to a relative tolerance.
func near(got, want, tol float64) bool { return math.Abs(got-want) <= tol*math.Abs(want) }

// strip is the potential of a unit source (k = 1) at (x0, y0) in 0 < y < h with both faces at 0, at (x0+dx, y): the image series in closed form
// (Morse and Feshbach, Methods of Theoretical Physics, section 10.1; from memory).
func strip(dx, y, y0, h float64) float64 {
	c := math.Cosh(math.Pi * dx / h)
	return -math.Log((c-math.Cos(math.Pi*(y-y0)/h))/(c-math.Cos(math.Pi*(y+y0)/h))) / (4 * math.Pi)
}

// TestImages: a line source in a rectangle with held floor and ceiling, the other two sides held (images of alternating sign) or
// insulated (of one sign).
func TestImages(t *testing.T) {
	const w, h, k = 0.05, 0.03, 0.3
	c := complex(0.011, 0.008)
	for _, sign := range []float64{-1, 1} {
		r := Rect{W: w, H: h, MediumK: k, Sides: [4]Side{held(0), insulated, held(0), insulated}}
		if sign < 0 {
			r.Sides[1], r.Sides[3] = held(0), held(0)
		}
		s := New(r, []Disc{point(c)}, 1)
		src := s.bare(2)
		y := s.Respond(src, true)
		for _, z := range []complex128{0.02 + 0.02i, 0.04 + 0.005i, 0.001 + 0.001i, 0.049 + 0.029i, 0.0115 + 0.0002i} {
			want := 0.0
			for n := -6; n <= 6; n++ {
				shift := 2 * w * float64(n)
				want += strip(real(z)-real(c)-shift, imag(z), imag(c), h)
				want += sign * strip(real(z)+real(c)-shift, imag(z), imag(c), h)
			}
			want *= 2 / k
			got := s.InWall(y, src, z)
			if !(math.Abs(got-want) < 5e-4) { // of a few K
				t.Errorf("sign %g at %v: %.6f K, want %.6f", sign, z, got, want)
			}
		}
		if _, _, out := s.Faces(y, src); !near(out[0]+out[1]+out[2]+out[3], 2, 1e-9) {
			t.Errorf("out %v", out)
		}
	}
}

// TestPlaneWall: two sides held or with a film and two insulated make a linear field, layers of the same material included.
func TestPlaneWall(t *testing.T) {
	for _, c := range []struct {
		name        string
		left, right Side
		layers      []Layer
		h1, h2      float64
	}{
		{"held", held(10), held(70), nil, math.Inf(1), math.Inf(1)},
		{"films", film(9, 10), film(25, 70), nil, 9, 25},
		{"infinite film", film(math.Inf(1), 10), held(70), nil, math.Inf(1), math.Inf(1)},
		{"huge film", film(1e12, 10), held(70), nil, math.Inf(1), math.Inf(1)},
		{"layers", film(9, 10), held(70), []Layer{{0.3, 0.002}, {0.3, 0.0005}}, 9, math.Inf(1)},
	} {
		r := Rect{W: 0.04, H: 0.03, MediumK: 0.3, Layers: c.layers, Sides: [4]Side{insulated, c.right, insulated, c.left}}
		t1 := 0.0
		for _, l := range c.layers {
			t1 += l.Thickness
		}
		s := New(r, nil, 1)
		y := s.Respond(Sources{}, true)
		flux := 60 / ((0.04+2*t1)/0.3 + 1/c.h1 + 1/c.h2)
		for _, z := range []complex128{0.0101 + 0.0013i, 0.0002 + 0.0298i, 0.039 + 0.011i, complex(-0.9*t1, 0.02)} {
			want := 10 + flux*(1/c.h1+(real(z)+t1)/0.3)
			if got := s.InWall(y, Sources{}, z); !(math.Abs(got-want) < 5e-3) {
				t.Errorf("%s at %v: %.6f, want %.6f", c.name, z, got, want)
			}
		}
		hottest, mean, out := s.Faces(y, Sources{})
		height := 0.03 + 2*t1
		if !near(out[3], flux*height, 1e-4) || !near(out[1], -flux*height, 1e-4) || !(math.Abs(out[0])+math.Abs(out[2]) < 1e-6) {
			t.Errorf("%s: out %v, want ±%.4f through the right and left sides", c.name, out, flux*height)
		}
		if want := 10 + flux*(1/c.h1+(0.04+2*t1)/0.6); !near(mean, want, 1e-5) {
			t.Errorf("%s: mean of the outside %.5f, want %.5f", c.name, mean, want)
		}
		if want := 70 - flux/c.h2; !(math.Abs(hottest[len(c.layers)]-want) < 0.03) {
			t.Errorf("%s: hottest outside %.5f, want %.5f", c.name, hottest, want)
		}
	}
}

// TestShapeFactors: conduction shape factors of Incropera and others, Fundamentals of Heat and Mass Transfer, table 4.1 (from memory).
func TestShapeFactors(t *testing.T) {
	rods := func(c complex128, d float64) []rod {
		return []rod{{c: c, core: d / 2, radius: d / 2, heat: 1, order: 8}}
	}
	// A cylinder of diameter D in the middle of a square of side w: S = 2π/ln(1.08 w/D).
	all := [4]Side{held(0), held(0), held(0), held(0)}
	for _, d := range []float64{0.001, 0.004, 0.01} {
		w := solveWhole(Rect{W: 0.02, H: 0.02, MediumK: 1, Sides: all}, rods(0.01+0.01i, d), 1, false)
		if want := math.Log(1.08*0.02/d) / (2 * math.Pi); !near(w.core[0], want, 0.003) {
			t.Errorf("square, D %g: %.5f K, want %.5f", d, w.core[0], want)
		}
	}
	// Midway between planes 2z apart (the other sides far away): S = 2π/ln(8z/(πD)).
	for _, side := range []Side{held(0), insulated} {
		w := solveWhole(Rect{W: 0.2, H: 0.02, MediumK: 1, Sides: [4]Side{held(0), side, held(0), side}}, rods(0.1+0.01i, 0.001), 1, false)
		if want := math.Log(8*0.01/(math.Pi*0.001)) / (2 * math.Pi); !near(w.core[0], want, 0.001) {
			t.Errorf("planes: %.5f K, want %.5f", w.core[0], want)
		}
	}
	// Buried at depth z under a plane: 2π/arcosh(2z/D); the rest of a large box insulated is far, the plane its floor: the wall is the image.
	w := solveWhole(Rect{W: 0.4, H: 0.2, MediumK: 1, Sides: [4]Side{held(0), held(0), held(0), held(0)}}, rods(0.2+0.002i, 0.003), 1, false)
	if want := math.Acosh(2*2/3.0) / (2 * math.Pi); !near(w.core[0], want, 0.002) {
		t.Errorf("buried: %.5f K, want %.5f", w.core[0], want)
	}
}

// TestCornerOfWall: from an inside at one temperature through a wall of thickness t to a cold outside, each corner counts 0.559 (the classical
// square corner of Langmuir, Adams and Meikle 1913; Incropera table 4.1 rounds to 0.54) besides the area over the thickness.
func TestCornerOfWall(t *testing.T) {
	for _, layers := range [][]Layer{{{0.2, 0.003}}, {{0.2, 0.002}, {0.2, 0.001}}, {{50, 0.003}}} {
		all := [4]Side{held(0), held(0), held(0), held(0)}
		k := layers[0].K
		s := New(Rect{W: 0.03, H: 0.02, MediumK: 1e6 * k, Layers: layers, Sides: all}, []Disc{point(0.015 + 0.01i)}, 1)
		src := s.bare(1)
		y := s.Respond(src, false)
		got := 1 / (k * s.InWall(y, src, 0.004+0.004i))
		if want := 2*(0.03+0.02)/0.003 + 4*0.5587; !near(got, want, 1e-4) {
			t.Errorf("%v: shape factor %.4f, want %.4f", layers, got, want)
		}
	}
}

// TestFin: a thin metal wall around almost nothing, held on the left, is a fin whose end is the middle of the right side: T = cosh m(L−x)/cosh mL,
// m² = h/kt (Incropera table 3.4, insulated end, cooled on one face).
func TestFin(t *testing.T) {
	const thick, h, k = 2e-4, 30.0, 50.0
	r := Rect{W: 0.06, H: 0.03, MediumK: 1e-4, Layers: []Layer{{k, thick}}}
	r.Sides = [4]Side{film(h, 0), film(h, 0), film(h, 0), held(1)}
	s := New(r, nil, 1)
	y := s.Respond(Sources{}, true)
	m, l := math.Sqrt(h/(k*thick)), 0.06+0.015+1.5*thick
	for x, z := range map[float64]complex128{0.01: complex(0.01, -thick/2), 0.05: complex(0.05, 0.03+thick/2), 0.075: complex(0.06+thick/2, 0.015)} {
		want := math.Cosh(m*(l-x-thick)) / math.Cosh(m*l)
		if got := s.InWall(y, Sources{}, z); !near(got, want, 0.01) { // a fin has no thickness
			t.Errorf("%g m along: %.5f, want %.5f", x, got, want)
		}
	}
}

// TestSquareArray: one cell of a square array of cylinders between held floor and ceiling and insulated sides conducts like the array
// (testdata/reference/array_conductivity.csv; Perrins, McKenzie and McPhedran, Proceedings of the Royal Society A 369, 1979).
func TestSquareArray(t *testing.T) {
	for _, c := range []struct {
		contrast, fraction string
		k, f, within       float64
		order              int
	}{
		{"inf", "0.50", 0, 0.5, 1e-4, 16},
		{"inf", "0.70", 0, 0.7, 1e-3, 40},
		{"10", "0.60", 10, 0.6, 1e-4, 16},
		{"0.1", "0.50", 0.1, 0.5, 1e-4, 16},
	} {
		want := arrayRow(t, c.contrast, c.fraction)
		a := 0.01 * math.Sqrt(c.f/math.Pi)
		one := []rod{{c: 0.005 + 0.005i, core: a, kCore: c.k, radius: a, order: c.order}}
		w := solveWhole(Rect{W: 0.01, H: 0.01, MediumK: 1, Sides: [4]Side{held(1), insulated, held(0), insulated}}, one, 1, true)
		_, _, out := w.wall.Faces(w.y, w.src)
		if !near(out[2], want, c.within) || !near(out[0], -want, c.within) {
			t.Errorf("contrast %s, fraction %s: %.5f, want %.5f", c.contrast, c.fraction, out[2], want)
		}
	}
}

func arrayRow(t *testing.T, contrast, fraction string) float64 {
	t.Helper()
	f, err := os.Open("../../testdata/reference/array_conductivity.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	for _, row := range rows {
		if row[0] == "square" && row[1] == contrast && row[2] == fraction {
			return number(t, row[3])
		}
	}
	t.Fatalf("no square array of contrast %s, fraction %s", contrast, fraction)
	return 0
}
