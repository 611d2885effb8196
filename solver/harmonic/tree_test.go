package harmonic

import (
	"math"
	"math/rand/v2"
	"testing"
)

// The tree must give the cloud's own field in the medium and name the disc elsewhere.
func TestTreeIsTheCloud(t *testing.T) {
	r := rand.New(rand.NewPCG(6, 6))
	c := randomCloud(r, -0.7, []float64{0.3, -0.2, 0.1, 0.05})
	tree := NewTree(c, c.A, 0, 10)
	worst := 0.0
	for range 4000 {
		z := complex(20*r.Float64()-10, 20*r.Float64()-10)
		if size(z) > 10 {
			continue
		}
		in := -1
		for j := range c.C {
			if size(z-c.C[j]) <= c.A[j] {
				in = j
			}
		}
		got, disc := tree.At(z)
		if disc != in {
			t.Fatalf("%v lies in disc %d, not %d", z, in, disc)
		}
		if in < 0 {
			worst = math.Max(worst, math.Abs(got-c.At(z)))
		}
	}
	t.Logf("%d cells, worst %g", len(tree.cells), worst)
	if worst > 2e-3 { // amplitudes are of order one per harmonic
		t.Errorf("off by %g", worst)
	}
}
