package outline

import (
	"math"
	"math/rand/v2"
	"testing"
)

// TestField compares the prepared field with the sum over all panels, everywhere and close to the outlines.
func TestField(t *testing.T) {
	r, rods := readCase(t, "c13_sides_steel8")
	orders(r, rods, 1)
	w := solveWhole(r, rods, 1, true)
	f := w.wall.Field(w.y)
	rng := rand.New(rand.NewPCG(1, 2))
	grow := r.Layers[0].Thickness
	for i := range 3000 {
		z := complex(rng.Float64()*(r.W+2*grow)-grow, rng.Float64()*(r.H+2*grow)-grow)
		switch i % 4 {
		case 0: // on the inside outline and a hair off
			z = complex(real(z), 1e-7*rng.NormFloat64())
		case 1:
			z = complex(-grow+1e-8*rng.Float64(), imag(z))
		}
		if d := f.At(z) - w.wall.At(w.y, z); !(math.Abs(d) < 1e-5) {
			t.Fatalf("at %v off by %g K", z, d)
		}
	}
	if !math.IsNaN(f.At(complex(-1.01*grow, 0.01))) || !math.IsNaN(f.At(complex(0.01, r.H+1.01*grow))) {
		t.Error("a temperature outside the outer face")
	}
}

func BenchmarkField(b *testing.B) {
	r, rods := readCase(b, "c13_sides_steel8")
	orders(r, rods, 1)
	w := solveWhole(r, rods, 1, true)
	b.Run("prepare", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			w.wall.Field(w.y)
		}
	})
	f := w.wall.Field(w.y)
	b.Run("512x512", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			for i := range 512 * 512 {
				f.At(complex((float64(i%512)+0.5)*r.W/512, (float64(i/512)+0.5)*r.H/512))
			}
		}
	})
	b.Run("wall", func(b *testing.B) {
		for b.Loop() {
			for i := range 1000 {
				f.At(complex(float64(i)*r.W/1000, -0.0005))
			}
		}
	})
}
