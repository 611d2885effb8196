package outline

import (
	"math"
	"testing"
)

// wire is a metal rod of radius a with one layer of conductivity ki to radius b, at z.
func wire(a, b, ki, medium float64, z complex128) []Contour {
	return []Contour{
		{Loop: Circle(a).Placed(0, z), In: math.Inf(1), Out: ki},
		{Loop: Circle(b).Placed(0, z), In: ki, Out: medium},
	}
}

// ring is a wall without layers about the origin.
func ring(r, k, film, temp float64) Contour {
	return Contour{Loop: Circle(r), In: k, Sides: []Side{{Film: film, Temp: temp}}}
}

func closeTo(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s: %.12g, want %.12g", what, got, want)
	}
}

func never() bool { return false }

func heatOf(n, i int, q float64) []float64 {
	h := make([]float64, n)
	h[i] = q
	return h
}

// Concentric: Σ ln(r'/r)/(2πk) + 1/(2πrh).
func TestShapedConcentric(t *testing.T) {
	c := append(wire(0.002, 0.003, 0.2, 0.03, 0), ring(0.008, 0.03, 9, 30))
	s := NewShaped(c, 1, never)
	y := s.Respond(heatOf(3, 0, 5), true)
	want := 30 + 5/(2*math.Pi)*(math.Log(1.5)/0.2+math.Log(8.0/3)/0.03+1/(0.008*9))
	closeTo(t, "metal", s.Metal(y, 0), want, 1e-4)
	closeTo(t, "heat", s.Leaves(y, 0), 5, 1e-6)
	hot, mean, out := s.Faces(y, Sources{})
	closeTo(t, "outside", mean, 30+5/(2*math.Pi*0.008*9), 1e-5)
	closeTo(t, "hottest outside", hot[2], mean, 1e-4)
	closeTo(t, "released", out[0]+out[1]+out[2]+out[3], 5, 1e-5)
	t.Logf("%d unknowns, loose %.1e", s.Len(), s.Loose())
}

// Eccentric: a metal of radius a at e off the axis of a circle of radius b at a fixed temperature has the resistance
// acosh((a²+b²−e²)/2ab)/2πk (conformal map of two circles; Incropera and DeWitt, table of shape factors).
func TestShapedEccentric(t *testing.T) {
	for _, gap := range []float64{1e-3, 1e-5, 1e-6} {
		a, b := 0.003, 0.008
		e := b - a - gap
		c := []Contour{
			{Loop: Circle(a).Placed(0.3, complex(0, e)), In: math.Inf(1), Out: 0.03},
			ring(b, 0.03, math.Inf(1), 0),
		}
		s := NewShaped(c, 1, never)
		y := s.Respond(heatOf(2, 0, 1), true)
		want := math.Acosh((a*a+b*b-e*e)/(2*a*b)) / (2 * math.Pi * 0.03)
		closeTo(t, "resistance", s.Metal(y, 0), want, 3e-4*want)
		t.Logf("gap %g: %d unknowns, error %.1e of %g, loose %.1e", gap, s.Len(), s.Metal(y, 0)-want, want, s.Loose())
	}
}

// The field is that of the closed form in the insulation and the gas, the metal's temperature in it, and NaN outside.
func TestShapedField(t *testing.T) {
	z := complex(0.001, -0.0005)
	c := append(wire(0.002, 0.003, 0.2, 0.03, 0), ring(0.008, 0.03, math.Inf(1), 20))
	for i := range c {
		c[i].Loop = c[i].Loop.Placed(0.2, z)
	}
	s := NewShaped(c, 1, never)
	f := s.Field(s.Respond(heatOf(3, 0, 5), true))
	at := func(r float64) float64 {
		r2 := math.Max(r, 0.003)
		t := 20 + 5/(2*math.Pi*0.03)*math.Log(0.008/r2)
		if r < 0.003 {
			t += 5 / (2 * math.Pi * 0.2) * math.Log(0.003/math.Max(r, 0.002))
		}
		return t
	}
	for i := range 400 {
		r, a := 0.00001+0.00798*float64(i)/399, 2.4*float64(i)
		sin, cos := math.Sincos(a)
		closeTo(t, "field", f.At(z+complex(r*cos, r*sin)), at(r), 2e-4)
	}
	if v := f.At(z + 0.0081); !math.IsNaN(v) {
		t.Errorf("outside: %g, want NaN", v)
	}
}

// A section under another film answers as one that is made anew with it, with each side of its own.
func TestShapedOutside(t *testing.T) {
	section := func(sides []Side) []Contour {
		c := wire(0.002, 0.003, 0.2, 0.03, 0.008+0.0031i)
		return append(c, Contour{Loop: Box(0.02, 0.01, 0), In: 0.03, Out: 0.2}, Contour{Loop: Box(0.02, 0.01, 0.001), In: 0.2, Sides: sides})
	}
	a := []Side{{Film: 9, Temp: 20}}
	b := []Side{{Film: 4, Temp: 20}, {Kind: Held, Temp: 60}, {Film: 7, Temp: 10}, {Kind: Insulated}}
	s := NewShaped(section(a), 1.5, never).Outside([][]Side{nil, nil, nil, b})
	fresh := NewShaped(section(b), 1.5, never)
	heats := heatOf(4, 0, 3)
	y, z := s.Respond(heats, true), fresh.Respond(heats, true)
	closeTo(t, "metal", s.Metal(y, 0), fresh.Metal(z, 0), 5e-3)
	_, mean, out := s.Faces(y, Sources{})
	_, want, fine := fresh.Faces(z, Sources{})
	closeTo(t, "mean", mean, want, 5e-3)
	sum := 0.0
	for i := range out {
		closeTo(t, "side", out[i], fine[i], 5e-3)
		sum += out[i]
	}
	closeTo(t, "released", sum, 3, 1e-4)
	closeTo(t, "insulated", out[3], 0, 1e-4)
}
