package film_test

import (
	"math"
	"testing"

	"packrise/solver/film"
)

// near fails unless got is within tol (relative) of want.
func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got/want-1) <= tol) {
		t.Errorf("%s: %.6g, want %.6g within %g %%, is %+.3f %% off", what, got, want, 100*tol, 100*(got/want-1))
	}
}

// TestPublishedNusselt holds worked numbers of the published correlations and handbook examples.
func TestPublishedNusselt(t *testing.T) {
	nu, in := film.ChurchillChu(2.63e9*0.69, 0.69)
	near(t, "Churchill–Chu, Pr 0.69, Gr 2.63e9 (check 6)", nu, 139.135, 1e-4)
	if !in {
		t.Error("out of range")
	}
	nu, _ = film.ChurchillChu(1e5*0.7, 0.7)
	near(t, "Churchill–Chu, Pr 0.7, Gr 1e5 (check D 3)", nu, 7.077, 1e-3)
	nu, in = film.ChurchillBernstein(6071, 0.70)
	near(t, "Churchill–Bernstein, Re 6071, Pr 0.70 (check 6)", nu, 40.637, 1e-4)
	if !in {
		t.Error("out of range")
	}
	// Incropera, example 9.2 (glass door of a fireplace, 5th edition, from memory): Ra 1.813e9, Pr 0.690 gives 147
	nu, _ = film.VerticalPlate(1.813e9, 0.690)
	near(t, "Churchill–Chu vertical plate", nu, 147, 0.01)
	// Incropera, example 9.3 (heating duct 0.75 × 0.3 m, from memory): sides Ra 1.07e8, Nu 63.6 by the laminar form, which is 2 % off the
	// general one; top L 0.375 m, Ra 2.07e8: 0.15 Ra^⅓ = 88.8; bottom 0.27 Ra^¼ = 32.4
	nu, _ = film.PlateUp(2.07e8)
	near(t, "top of a duct", nu, 88.8, 0.002)
	nu, _ = film.PlateDown(2.07e8)
	near(t, "bottom of a duct", nu, 32.4, 0.002)
	nu, _ = film.VerticalPlate(1.07e8, 0.71)
	near(t, "side of a duct", nu, 63.6, 0.04)
}

// TestMorgan compares with Morgan's own pieces (Morgan 1975, from memory) and looks for steps.
func TestMorgan(t *testing.T) {
	for _, c := range []struct{ low, high, c, n float64 }{
		{1e-10, 1e-2, 0.675, 0.058}, {1e-2, 1e2, 1.02, 0.148}, {1e2, 1e4, 0.850, 0.188}, {1e4, 1e7, 0.480, 0.250}, {1e7, 1e12, 0.125, 0.333},
	} {
		for x := c.low; x <= c.high*1.0001; x *= math.Pow(10, 0.05) {
			nu, in := film.Morgan(x)
			near(t, "Morgan", nu, c.c*math.Pow(x, c.n), 0.009)
			if !in && x < 1e12 {
				t.Errorf("Ra %g counts as out of range", x)
			}
		}
	}
	if _, in := film.Morgan(1e13); in {
		t.Error("Ra 1e13 counts as in range")
	}
}

// TestNusseltSmooth: every natural law is continuous and rises.
func TestNusseltSmooth(t *testing.T) {
	laws := map[string]func(float64) float64{
		"Morgan":         func(ra float64) float64 { nu, _ := film.Morgan(ra); return nu },
		"Churchill–Chu":  func(ra float64) float64 { nu, _ := film.ChurchillChu(ra, 0.71); return nu },
		"vertical plate": func(ra float64) float64 { nu, _ := film.VerticalPlate(ra, 0.71); return nu },
		"plate up":       func(ra float64) float64 { nu, _ := film.PlateUp(ra); return nu },
		"plate down":     func(ra float64) float64 { nu, _ := film.PlateDown(ra); return nu },
	}
	const step = 1.001
	for name, f := range laws {
		last := f(1e-12)
		for ra := 1e-12 * step; ra < 1e14; ra *= step {
			nu := f(ra)
			if nu <= last || nu > last*math.Pow(step, 0.34) {
				t.Fatalf("%s: from %.6g to %.6g at Ra %g", name, last, nu, ra)
			}
			last = nu
		}
	}
}

// TestPlateRanges: the laws of plates tell where they end.
func TestPlateRanges(t *testing.T) {
	for _, c := range []struct {
		ra       float64
		up, down bool
	}{{0.5, false, false}, {100, true, false}, {1e5, true, true}, {1e9, true, true}, {5e10, true, false}, {1e12, false, false}} {
		if _, in := film.PlateUp(c.ra); in != c.up {
			t.Errorf("plate up at %g: in range %v", c.ra, in)
		}
		if _, in := film.PlateDown(c.ra); in != c.down {
			t.Errorf("plate down at %g: in range %v", c.ra, in)
		}
	}
	if _, in := film.VerticalPlate(1e13, 0.7); in {
		t.Error("vertical plate at 1e13 in range")
	}
	if _, in := film.ChurchillBernstein(0.1, 0.7); in {
		t.Error("cross flow at Re 0.1 in range")
	}
	if _, in := film.ChurchillBernstein(2e7, 0.7); in {
		t.Error("cross flow at Re 2e7 in range")
	}
}
