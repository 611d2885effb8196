package outline

import (
	"math"
	"testing"
)

func patchRect(layers []Layer) Rect {
	r := Rect{W: 0.06, H: 0.04, MediumK: 0.027, Layers: layers}
	for i := range r.Sides {
		r.Sides[i] = Side{Kind: Open, Film: 9, Temp: 30}
	}
	return r
}

// What patches take up leaves through the sides, whatever the wall; neighbours meet and cover the inside outline.
func TestPatchesConserve(t *testing.T) {
	for what, layers := range map[string][]Layer{
		"plastic": {{K: 0.2, Thickness: 2e-3}}, "steel": {{K: 50, Thickness: 1.5e-3}}, "none": nil, "two": {{K: 0.3, Thickness: 1e-3}, {K: 15, Thickness: 5e-4}},
	} {
		disc := Disc{C: complex(0.02, 0.01), A: 0.005, M: 8}
		s := New(patchRect(layers), []Disc{disc}, 1)
		p := s.Patches(func(complex128) float64 { return 4e-3 })
		around, sum := 0.0, 0.0
		w := make([]float64, len(p.A))
		for k := range w {
			w[k] = math.Sin(float64(3*k)) + 0.7
			sum += w[k]
			around += p.Length[k]
			if p.B[k] != p.A[(k+1)%len(w)] {
				t.Errorf("%s: patch %d does not meet the next", what, k)
			}
			if math.Abs(dist(p.A[k], p.B[k])-p.Length[k]) > 1e-12 || p.Length[k] > 8e-3 { // no shorter than a cell
				t.Errorf("%s: patch %d is %g m long", what, k, p.Length[k])
			}
		}
		if math.Abs(around-0.2) > 1e-12 {
			t.Errorf("%s: the patches are %g m long in all", what, around)
		}
		src := Sources{Q: []float64{5}, D: [][]complex128{{0.3, complex(0, 0.1)}}}
		y := make([]float64, s.Len())
		p.RespondTo(y, src, true, w)
		_, _, out := s.Faces(y, src)
		got := 0.0
		for i, v := range p.Direct(w) {
			got += out[i] + v
		}
		if math.Abs(got-5-sum) > 1e-8*sum {
			t.Errorf("%s: %g W/m leave, %g came", what, got, 5+sum)
		}
	}
}

// Means are those of the field along the patches, and what 1 W/m into one does to another it does back, within what panels
// make of a flux that jumps.
func TestPatchMeans(t *testing.T) {
	disc := Disc{C: complex(0.02, 0.01), A: 0.005, M: 8}
	s := New(patchRect([]Layer{{K: 0.2, Thickness: 2e-3}}), []Disc{disc}, 1.5)
	p := s.Patches(func(complex128) float64 { return 4e-3 })
	src := Sources{Q: []float64{5}, D: [][]complex128{{0.3, complex(0, 0.1)}}}
	y, w, mean := make([]float64, s.Len()), make([]float64, len(p.A)), make([]float64, len(p.A))
	w[3], w[20] = 2, -1
	p.RespondTo(y, src, true, w)
	p.Means(mean, y, src)
	for k, got := range mean {
		want := 0.0
		const n = 64
		for i := range n {
			z := p.A[k] + complex((float64(i)+0.5)/n, 0)*(p.B[k]-p.A[k])
			want += (s.At(y, z) + s.sourcesAt(src, z)) / n
		}
		if math.Abs(got-want) > 2e-4*math.Abs(want-30) {
			t.Errorf("patch %d: mean %.6f, along it %.6f", k, got, want)
		}
	}
	none := Sources{Q: []float64{0}, D: [][]complex128{{}}}
	at := func(i, j int) float64 {
		clear(w)
		w[i] = 1
		p.RespondTo(y, none, false, w)
		p.Means(mean, y, none)
		return mean[j]
	}
	for _, c := range [][2]int{{0, 7}, {3, 30}, {12, 13}} {
		if a, b := at(c[0], c[1]), at(c[1], c[0]); math.Abs(a-b) > 0.06*math.Abs(a) {
			t.Errorf("patches %v: %g and %g K", c, a, b)
		}
	}
}
