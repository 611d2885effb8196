package film_test

import (
	"encoding/csv"
	"os"
	"strconv"
	"strings"
	"testing"

	"packrise/solver/film"
)

// TestGroupTable finds every row of the table (testdata/reference/iec60287_constants.csv) and computes the film from its printed constants.
func TestGroupTable(t *testing.T) {
	f, err := os.Open("../../testdata/reference/iec60287_constants.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	seen := 0
	for _, row := range rows[1:] {
		if !strings.HasPrefix(row[0], "T4 ") {
			continue
		}
		z, _ := strconv.ParseFloat(row[3], 64)
		e, _ := strconv.ParseFloat(row[5], 64)
		g, _ := strconv.ParseFloat(row[7], 64)
		n := map[string]int{"single": 1, "two": 2, "three": 3}[strings.Fields(row[1])[0]]
		a, gap := film.SideBySide, 0.0
		switch {
		case strings.Contains(row[1], "vertical"):
			a = film.OneAboveAnother
		case strings.Contains(row[1], "trefoil"):
			a = film.Trefoil
		}
		if strings.Contains(row[1], "spaced") {
			gap = 1
		}
		got, ok := film.GroupOf(n, a, gap, strings.Contains(row[0], "wall"))
		if !ok {
			t.Errorf("no constants for %v", row[:2])
			continue
		}
		seen++
		if got.Name != row[1] {
			t.Errorf("%v gives %q", row[:2], got.Name)
		}
		h, in := got.Film(0.03, 16)
		near(t, row[1], h, (z/pow(0.03, g)+e)*2, 1e-9)
		if _, wide := got.Film(0.2, 16); !in || wide {
			t.Errorf("%s: range of diameters", row[1])
		}
	}
	if seen != 10 {
		t.Errorf("%d rows seen", seen)
	}
}

// TestGroupSpacing: cables far enough apart count as single ones; a neighbour costs; what the table lacks is told.
func TestGroupSpacing(t *testing.T) {
	alone, _ := film.GroupOf(1, film.SideBySide, 0, false)
	for _, c := range []struct {
		n   int
		a   film.Arrangement
		gap float64
	}{{2, film.SideBySide, 0.5}, {3, film.SideBySide, 0.75}, {2, film.OneAboveAnother, 2}, {3, film.OneAboveAnother, 4}} {
		g, ok := film.GroupOf(c.n, c.a, c.gap, false)
		if !ok || g != alone {
			t.Errorf("%+v: %+v", c, g)
		}
		close, ok := film.GroupOf(c.n, c.a, 0, false)
		h, _ := close.Film(0.03, 30)
		free, _ := alone.Film(0.03, 30)
		if !ok || h >= free {
			t.Errorf("%+v touching: %g W/m²K, alone %g", c, h, free)
		}
	}
	if _, ok := film.GroupOf(4, film.SideBySide, 0, false); ok {
		t.Error("four cables are not in the table")
	}
	if _, ok := film.GroupOf(2, film.SideBySide, 0, true); ok {
		t.Error("two on a wall are not in the table")
	}
}
