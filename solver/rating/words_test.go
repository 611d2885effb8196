package rating

import "testing"

// TestDegrees: rounding never carries a temperature onto or across its limit.
func TestDegrees(t *testing.T) {
	for _, c := range []struct {
		t, limit float64
		has      bool
		want     string
	}{
		{71.4, 90, true, "71"},
		{71.6, 90, true, "72"},
		{90.04, 90, true, "90.1"},
		{89.96, 90, true, "89.9"},
		{90, 90, true, "90"},
		{90.6, 90, true, "91"},
		{-3.2, 0, false, minus + "3"},
	} {
		if got := degrees(c.t, c.limit, c.has); got != c.want {
			t.Errorf("%g at a limit of %g: %s, want %s", c.t, c.limit, got, c.want)
		}
	}
}

// TestMargin: a margin agrees with the temperature shown beside it.
func TestMargin(t *testing.T) {
	for _, c := range []struct {
		t, limit float64
		want     string
	}{{73.4, 90, "17"}, {71.2, 70, minus + "1"}, {71.6, 70, minus + "2"}, {69.83, 70, "0.2"}, {70.01, 70, minus + "0.1"}, {70, 70, "0"}} {
		if got := margin(c.t, c.limit); got != c.want {
			t.Errorf("%g of %g: %s, want %s", c.t, c.limit, got, c.want)
		}
	}
}
