package pack

import (
	"math"
	"slices"
	"testing"
)

// Lay-up factors (diameter over the cores by the diameter of one): closed forms for 2–7, 10, 12 and 19 and the trade's table for laid-up cores.
// The trade's figures are rounded to three decimals at most.
func TestLayUpFactors(t *testing.T) {
	for _, c := range []struct {
		n      int
		factor float64
		tol    float64
		source string
	}{
		{1, 1, 1e-12, "itself"},
		{2, 2, 1e-12, "closed form"},
		{3, 1 + 2/math.Sqrt(3), 1e-12, "closed form"},
		{4, 1 + math.Sqrt2, 1e-12, "closed form"},
		{5, 1 + 1/math.Sin(math.Pi/5), 1e-12, "closed form"},
		{6, 3, 1e-12, "1+5 round one"},
		{7, 3, 1e-12, "1+6"},
		{10, 4, 1e-12, "2+8, trade's table of lay-up factors, from memory"},
		{12, 4.155, 5e-4, "3+9, trade's table of lay-up factors, from memory"},
		{14, 4.41, 5e-3, "4+10, IEC 60502-1 annex A, assembly coefficients, from memory"},
		{16, 4.70, 5e-3, "5+11, IEC 60502-1 annex A, from memory"},
		{19, 5, 1e-12, "1+6+12, the usual concentric lay"},
		{24, 6, 1e-12, "2+8+14, IEC 60502-1 annex A, from memory"},
		{27, 6.15, 6e-3, "3+9+15, IEC 60502-1 annex A, from memory"},
		{30, 6.41, 5e-3, "4+10+16, IEC 60502-1 annex A, from memory"},
		{37, 7, 1e-12, "1+6+12+18"},
		{61, 9, 1e-12, "1+6+12+18+24"},
	} {
		d, r := LayUp(equals(c.n, 0.7))
		if math.Abs(r/0.7-c.factor) > c.tol {
			t.Errorf("%d cores: factor %.6f, want %.6f (%s)", c.n, r/0.7, c.factor, c.source)
		}
		if i, j, depth := Overlap(d, Box{R: r}); depth > 1e-12*r {
			t.Errorf("%d cores: %d and %d overlap by %g", c.n, i, j, depth)
		}
	}
}

// TestLayUpLayers counts the cores at each distance from the middle: the trade's layers, common practice.
func TestLayUpLayers(t *testing.T) {
	for _, want := range [][]int{{1, 6, 12, 18}, {2, 8, 14}, {3, 9, 15}, {4, 10, 16}, {5, 11, 17}, {1, 7}, {1, 8}, {5}} {
		n := 0
		for _, k := range want {
			n += k
		}
		d, _ := LayUp(equals(n, 1))
		var got []int
		last := -1.0
		for _, p := range d { // in the order given, from the centre outwards
			h := math.Hypot(p.X, p.Y)
			if math.Abs(h-last) > 1e-9 {
				got, last = append(got, 0), h
			}
			got[len(got)-1]++
		}
		if !slices.Equal(got, want) {
			t.Errorf("%d cores: layers %v, want %v", n, got, want)
		}
	}
}

func radiiOf(discs []Disc) (out []float64) {
	for _, d := range discs {
		out = append(out, d.R)
	}
	return out
}

// TestLayUpMixed: all radii in their order, no overlap, the circle the smallest round the cores and about the origin, every core touching another (within rounding), and the
// whole no worse than 15 % beyond what a search finds.
func TestLayUpMixed(t *testing.T) {
	for seed := range uint64(fewer(40)) {
		radii := radiiOf(mixed(2+int(seed), 1+float64(seed%7), seed))
		d, r := LayUp(radii)
		if !slices.Equal(radiiOf(d), radii) {
			t.Errorf("seed %d: radii %v became %v", seed, radii, d)
		}
		if i, j, depth := Overlap(d, Box{R: r}); depth > 1e-12*r {
			t.Errorf("seed %d: %d and %d overlap by %g", seed, i, j, depth)
		}
		if x, y, er := Enclose(d); math.Abs(er-r) > 1e-9*r || math.Hypot(x, y) > 1e-6*r {
			t.Errorf("seed %d: circle %g, smallest %g about %g %g", seed, r, er, x, y)
		}
		if seed%8 == 0 {
			if _, least := SmallestHolder(radii, 1); r > 1.15*least || r < least*(1-1e-9) {
				t.Errorf("seed %d: lay %g, search %g", seed, r, least)
			}
		}
	}
}

// TestLayUpValleys: small cores behind four large ones lie in the outer valleys, and the circle stays that of the large ones, 1+√2, as long as they are no
// larger than √2 − 1 (Descartes' circle theorem for two touching discs and the circle).
func TestLayUpValleys(t *testing.T) {
	d, r := LayUp([]float64{1, 1, 1, 1, 0.41, 0.41, 0.41, 0.41})
	if math.Abs(r-1-math.Sqrt2) > 1e-12 {
		t.Errorf("radius %g of %v", r, d)
	}
}

func TestLayUpEdges(t *testing.T) {
	if d, r := LayUp(nil); d != nil || r != 0 {
		t.Errorf("nothing: %v %g", d, r)
	}
	defer func() {
		if recover() == nil {
			t.Error("no panic for a radius of zero")
		}
	}()
	LayUp([]float64{1, 0})
}
