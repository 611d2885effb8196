package heat

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"
)

// shinySection is a round section with a filled cable, a cable with gas in it, a core and a rod.
func shinySection() Problem {
	core := func(in int, x, y, a float64) Part {
		return Part{In: in, X: x * 1e-3, Y: y * 1e-3, Core: Metal, Radius: 0.7 * a * 1e-3, Rings: []Ring{{K: 0.2, Thickness: 0.3 * a * 1e-3}}, Heat: 2, Emissivity: 0.9}
	}
	p := Problem{
		MediumK: 0.027, Filling: Gas, ZeroK: 273.15,
		Wall: Wall{R: 12e-3, Rings: []Ring{{K: 0.2, Thickness: 2e-3}}, Film: 10, Ambient: 30, Emissivity: 0.8},
	}
	for k, f := range []Filling{Solid, Gas} {
		in := len(p.Parts)
		p.Parts = append(p.Parts, Part{
			In: -1, X: float64(2*k-1) * 5e-3, Y: -5e-3, Core: Inside, Radius: 4e-3, K: []float64{0.2, 0.027}[k], Filling: f,
			Rings: []Ring{{K: 0.25, Thickness: 0.9e-3}}, Emissivity: 0.9, InsideEmissivity: 0.7,
		})
		p.Parts = append(p.Parts, core(in, -1.9, 0, 1.9), core(in, 1.9, 0.2, 1.8))
	}
	rod := Part{In: -1, X: -3e-3, Y: 5e-3, Core: Body, Radius: 2e-3, K: 0.3, Emissivity: 0.5}
	p.Parts = append(p.Parts, core(-1, 2, 4, 2.5), rod)
	return p
}

// Reciprocity: with everything else eliminated, what 1 W/m from one patch to another does to the difference of two others is what 1 W/m from those
// does to the first two, whether they lie in the holder or in a cable.
func TestPatchesAreReciprocal(t *testing.T) {
	m := New(shinySection(), Settings{Accuracy: Fine, Threads: 1})
	if r := m.Solve(context.Background(), nil); r.Status != Converged {
		t.Fatal(r.Status)
	}
	c := m.glow
	type pair struct {
		k    *knot
		a, b int
	}
	var pairs []pair
	r := rand.New(rand.NewPCG(1, 1))
	c.top.each(func(k *knot) {
		for range 6 {
			if k.rad != nil {
				pairs = append(pairs, pair{k, r.IntN(len(k.unit)), r.IntN(len(k.unit))})
			}
		}
	})
	h := make([][]float64, len(pairs))
	most := 0.0
	for i, s := range pairs {
		z := make([]float64, len(c.z))
		z[s.k.e0+s.a] += 1 / s.k.unit[s.a]
		z[s.k.e0+s.b] -= 1 / s.k.unit[s.b]
		respond(c, z)
		for _, o := range pairs {
			h[i] = append(h[i], o.k.t[o.a]-o.k.t[o.b])
			most = math.Max(most, math.Abs(h[i][len(h[i])-1]))
		}
	}
	for i := range h {
		for j := range i {
			if d := math.Abs(h[i][j] - h[j][i]); d > 1e-6*most { // sparse blocks are cut at 1e-7
				t.Errorf("pairs %d and %d: %.6g and %.6g K", i, j, h[i][j], h[j][i])
			}
		}
	}
}

// respond finds the amplitudes that belong to the emissions in z, and passes.
func respond(c *coupled, z []float64) {
	n := c.emit
	f, w, v := make([]float64, len(z)), make([]float64, len(z)), make([]float64, len(z))
	c.pass(z, nil, false)
	c.miss(f, z, false, nil)
	scale(f, -1)
	x := make([]float64, n)
	gmres(func(y, x []float64) {
		copy(v, x)
		c.pass(v, nil, false)
		c.miss(w, v, false, nil)
		copy(y, w[:n])
	}, x, f[:n], 1e-12, func() bool { return false })
	copy(z, x)
	c.pass(z, nil, false)
}

// What lies evenly between old cuts is shared out between new ones.
func TestSpread(t *testing.T) {
	got := spread([]float64{0, 1, 3, 4}, []float64{2, 4, 1}, []float64{0, 0.5, 2, 4})
	for i, want := range []float64{1, 3, 3} {
		if math.Abs(got[i]-want) > 1e-12 {
			t.Errorf("share %d is %g, want %g", i, got[i], want)
		}
	}
}
