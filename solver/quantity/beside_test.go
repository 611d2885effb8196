package quantity

import (
	"math"
	"testing"
)

// TestBesideLimit: rounding never carries a temperature onto or across its limit.
func TestBesideLimit(t *testing.T) {
	for _, c := range []struct{ t, limit, want float64 }{
		{71.4, 90, 71},
		{71.6, 90, 72},
		{90.04, 90, 90.1},
		{89.96, 90, 89.9},
		{90, 90, 90},
		{90.6, 90, 91},
		{69.83, 70, 69.8},
		{-3.2, math.NaN(), -3},
	} {
		if got := BesideLimit(c.t, c.limit); got != c.want {
			t.Errorf("%g at a limit of %g: %g, want %g", c.t, c.limit, got, c.want)
		}
	}
}
