package film_test

import (
	"math"
	"testing"

	"packrise/solver/film"
)

// TestSurfaceBounds: flows beyond anything end at the bounds instead of never.
func TestSurfaceBounds(t *testing.T) {
	for flux, want := range map[float64]float64{1e30: 1e5, -1e30: 1} {
		if k, a := still(20).Surface(pipe(0.02), flux); k != want || math.IsNaN(a.Coefficient()) {
			t.Errorf("%g W/m²: %g K, want %g", flux, k, want)
		}
	}
	if k, _ := still(20).Surface(pipe(0.02), 0); math.Abs(k-293.15) > 1e-9 {
		t.Errorf("no flow: %g K", k)
	}
}

func BenchmarkSurface(b *testing.B) {
	o := still(30)
	o.Kind, o.SpeedMS = film.MovingAir, 1
	b.ReportAllocs()
	for b.Loop() {
		o.Surface(pipe(0.02), 300)
	}
}
