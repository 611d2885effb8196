package ui

import (
	"errors"
	"strings"
	"testing"

	"packrise/solver/section"
)

// The expected strings follow from the rule written at the functions, worked by hand.
func TestDegreesNeverRoundPastTheLimit(t *testing.T) {
	limit := section.Some(90.0)
	for _, c := range []struct {
		t     float64
		limit section.Opt[float64]
		want  string
	}{
		{86.4, limit, "86"},
		{89.4, limit, "89"},
		{89.6, limit, "89.6"},
		{89.96, limit, "89.9"}, // not "90": it is below
		{90, limit, "90"},
		{90.04, limit, "90.1"}, // not "90": it is over
		{90.4, limit, "90.4"},
		{90.6, limit, "91"},
		{62.6, section.Some(62.7), "62.6"}, // 63 would read as over
		{-39.6, section.Opt[float64]{}, "−40"},
		{-0.2, section.Opt[float64]{}, "0"},
		{123.5, section.Opt[float64]{}, "124"},
	} {
		if got := degrees(c.t, c.limit); got != c.want {
			t.Errorf("degrees(%v, %v) = %q, want %q", c.t, c.limit, got, c.want)
		}
	}
}

func TestMarginsAgreeWithTemperatures(t *testing.T) {
	for _, c := range []struct {
		t, limit float64
		want     string
	}{
		{86.4, 90, "4"}, {87, 90, "3"}, {89.4, 90, "1"}, {89.96, 90, "0.1"}, {90, 90, "0"}, {90.04, 90, "−0.1"}, {90.6, 90, "−1"}, {92.3, 90, "−2"}, {62.6, 62.7, "0.1"},
	} {
		if got := marginWords(c.t, c.limit); got != c.want {
			t.Errorf("marginWords(%v, %v) = %q, want %q", c.t, c.limit, got, c.want)
		}
		if got := overWords(c.t, c.limit); strings.TrimPrefix(got, "−") != strings.TrimPrefix(c.want, "−") {
			t.Errorf("overWords(%v, %v) = %q", c.t, c.limit, got)
		}
	}
}

func TestWords(t *testing.T) {
	for _, c := range []struct{ got, want string }{
		{written(16), "16"},
		{written(16.25), "16.25"},
		{written(100.0 / 3), "33.333"},
		{written(-4.2), "−4.2"},
		{withUnit("36", "A"), "36\u00a0A"},
		{someIDs([]string{"a", "b", "c"}, 2), "a, b, c"},
		{someIDs([]string{"a", "b", "c", "d"}, 2), "a, b and 2 more"},
		{plainMinus("−4.2"), "-4.2"},
		{sentence(errors.New("quantity: 5 furlong isn't a length")), "5 furlong isn't a length."},
		{sentence(errors.New("no such size: try 12 AWG")), "No such size: try 12 AWG."},
		{sentence(nil), ""},
	} {
		if c.got != c.want {
			t.Errorf("got %q, want %q", c.got, c.want)
		}
	}
}

func TestUnbrokenKeepsUnitsWithNumbers(t *testing.T) {
	for in, want := range map[string]string{
		"may carry 8.06 A to rely on":      "may carry 8.06" + noBreak + "A to rely on",
		"79 °C (72–89), margin 11 K.":      "79" + noBreak + "°C (72–89), margin 11" + noBreak + "K.",
		"14 % it makes itself":             "14" + noBreak + "% it makes itself",
		"L1 Also, 3 Kelvin and 5 markings": "L1 Also, 3 Kelvin and 5 markings", // words that begin like units
	} {
		if got := unbroken(in); got != want {
			t.Errorf("%q: %q, want %q", in, got, want)
		}
	}
}
