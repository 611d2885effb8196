package outline

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"testing"
)

// Heat into the inner side of strings: it raises their own temperatures and leaves through the hull, none of it lost.
func TestHullPatches(t *testing.T) {
	r := rand.New(rand.NewPCG(13, 14))
	discs := four()
	for i := range discs {
		discs[i].M = 16 // what is sent back beyond the orders reaches only the hull beside a part
	}
	src := randomSources(r, discs)
	s := NewHull(heap(discs, still), discs, mirrorsOf(discs, -0.7), 1)
	for _, longest := range []float64{0, 1e-3, 1} {
		p := s.Patches(func(complex128) float64 { return longest })
		length := 0.0
		for k, l := range p.Length {
			length += l
			within(t, "length", cmplx.Abs(p.B[k]-p.A[k]), l, 1e-12)
		}
		strings := 0.0
		for i := range s.pieces {
			if s.pieces[i].disc < 0 {
				strings += s.pieces[i].length
			}
		}
		within(t, "all lengths", length, strings, 1e-12)
		w, cold, warm := make([]float64, len(p.A)), make([]float64, len(p.A)), make([]float64, len(p.A))
		for k := range w {
			w[k] = 0.2 * r.Float64()
		}
		y := make([]float64, s.Len())
		p.RespondTo(y, src, true, nil)
		p.Means(cold, y, src)
		_, _, before := s.Faces(s.Temperatures(y, src))
		p.RespondTo(y, src, true, w)
		p.Means(warm, y, src)
		_, _, after := s.Faces(s.Temperatures(y, src))
		sum := 0.0
		for k := range w {
			sum += w[k]
			if warm[k] <= cold[k] {
				t.Errorf("patch %d is no warmer for its heat", k)
			}
		}
		within(t, "heat", after-before, sum, 1e-6)
	}
}

// A film without end holds the hull at its temperature, and that is its limit.
func TestHullHeld(t *testing.T) {
	discs := four()
	src := randomSources(rand.New(rand.NewPCG(9, 10)), discs)
	s := NewHull(heap(discs, Outside{Film: math.Inf(1), Temp: 35}), discs, mirrorsOf(discs, -0.7), 1)
	cells := s.Temperatures(s.Respond(src, true), src)
	for i := range cells {
		within(t, "held cell", cells[i], 35, 1e-6)
	}
	_, _, out := s.Faces(cells)
	within(t, "released", out, src.Q[0]+src.Q[1]+src.Q[2]+src.Q[3], 1e-5)
}

func TestHullField(t *testing.T) {
	r := rand.New(rand.NewPCG(11, 12))
	discs := four()
	src := randomSources(r, discs)
	s := NewHull(heap(discs, still), discs, mirrorsOf(discs, -0.7), 1)
	y := s.Respond(src, true)
	f := s.Field(y)
	inside := 0
	for range 3000 {
		z := complex(-4e-3+12e-3*r.Float64(), -4e-3+11e-3*r.Float64())
		in := false
		for _, d := range discs {
			in = in || cmplx.Abs(z-d.C) < d.A
		}
		v := f.At(z)
		if in || math.IsNaN(v) {
			continue
		}
		inside++
		within(t, "field", v, s.At(y, z), 1e-4)
	}
	if inside < 100 {
		t.Errorf("only %d points in pockets", inside)
	}
	for _, z := range []complex128{-3.01e-3, 7.01e-3, 2.5e-3 + 6.04e-3i, 2.5e-3 - 3e-3i} {
		if v := f.At(z); !math.IsNaN(v) {
			t.Errorf("field at %v outside is %g", z, v)
		}
	}
	for _, z := range []complex128{-2.99e-3, 6.99e-3, 2.5e-3, 2.5e-3 + 6.02e-3i} {
		if v := f.At(z); math.IsNaN(v) {
			t.Errorf("no field at %v inside", z)
		}
	}
}

// Beside a large part and a small one, whose hull is little more than the large one's rim, nothing outside has a field.
func TestHullFieldEndsAtTheString(t *testing.T) {
	r := rand.New(rand.NewPCG(15, 16))
	two := []Disc{{C: 0, A: 6e-3, M: 12}, {C: 7e-3, A: 1e-3, M: 12}}
	s := NewHull(heap(two, still), two, mirrorsOf(two, -0.7), 1)
	g := s.Field(s.Respond(randomSources(r, two), true))
	for _, z := range []complex128{-6.1e-3, -20e-3, 8.1e-3, 6.5e-3 + 3e-3i, -1e-3 + 6.1e-3i} {
		if v := g.At(z); !math.IsNaN(v) {
			t.Errorf("beside a large part and a small one, field at %v is %g", z, v)
		}
	}
	for _, z := range []complex128{-5.9e-3, 7.9e-3, 6.3e-3 + 1e-3i} {
		if v := g.At(z); math.IsNaN(v) {
			t.Errorf("within a large part and a small one, no field at %v", z)
		}
	}
}
