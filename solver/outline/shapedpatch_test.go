package outline

import (
	"math"
	"testing"
)

// Heat that goes into patches leaves through the film, and an even flux into a round tube's inside warms it as the closed form says.
func TestShapedPatches(t *testing.T) {
	const k, kw, a, b, c, h = 0.03, 0.2, 2e-3, 10e-3, 12e-3, 8.0
	s := NewShaped([]Contour{
		{Loop: Circle(a), In: math.Inf(1), Out: k},
		{Loop: Circle(b), In: k, Out: kw},
		{Loop: Circle(c), In: kw, Sides: []Side{{Film: h, Temp: 20}}},
	}, 1, func() bool { return false })
	p := s.Patches(func(contour int) bool { return contour < 2 }, func(complex128) float64 { return 1e-3 })
	if p.Measure(func() bool { return true }) || !p.Measure(func() bool { return false }) {
		t.Error("measuring does not end when it should")
	}
	w := make([]float64, len(p.A))
	around := map[int]float64{}
	for i, l := range p.Length {
		around[p.Contour[i]] += l
	}
	within(t, "metal", around[0], 2*math.Pi*a, 1e-9)
	within(t, "tube", around[1], 2*math.Pi*b, 1e-9)
	const q, shine = 3.0, 1.2 // W/m made in the metal, and of it what it radiates to the tube
	for i, l := range p.Length {
		w[i] = shine * l / around[1]
		if p.Contour[i] == 0 {
			w[i] = -shine * l / around[0]
		}
	}
	y := p.Respond([]float64{q, 0, 0}, true, w)
	means := make([]float64, len(w))
	p.Means(means, y, Sources{})
	tube := 20 + q/(2*math.Pi)*(math.Log(c/b)/kw+1/(h*c))
	metal := tube + (q-shine)/(2*math.Pi*k)*math.Log(b/a)
	for i, v := range means {
		want := tube
		if p.Contour[i] == 0 {
			want = metal
		}
		within(t, "patch", v, want, 1e-6)
	}
	_, _, out := s.Faces(y, Sources{})
	sum := 0.0
	for _, v := range out {
		sum += v
	}
	within(t, "released", sum, q, 1e-6)
	within(t, "conducted", s.Leaves(y, 0), q-shine, 1e-6)
}
