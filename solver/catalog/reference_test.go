package catalog

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

// csvRow is a row of testdata/reference by the names of its columns; each row names its own source there.
type csvRow map[string]string

func reference(t testing.TB, name string) (rows []csvRow) {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "..", "testdata", "reference", name))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	all, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	for _, line := range all[1:] {
		row := csvRow{}
		for i, key := range all[0] {
			row[key] = line[i]
		}
		rows = append(rows, row)
	}
	if len(rows) < 5 {
		t.Fatalf("%s has only %d rows", name, len(rows))
	}
	return rows
}

// number reads a cell; "-" and "" are no number.
func (r csvRow) number(t testing.TB, key string) (v float64, ok bool) {
	t.Helper()
	text, known := r[key]
	if !known {
		t.Fatalf("no column %s", key)
	}
	if text == "" || text == "-" {
		return 0, false
	}
	v, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Fatalf("%s: %v", key, err)
	}
	return v, true
}

func (r csvRow) must(t testing.TB, key string) float64 {
	t.Helper()
	v, ok := r.number(t, key)
	if !ok {
		t.Fatalf("%s is empty", key)
	}
	return v
}

// americanSize writes "12" as "12 AWG" and "250" as "250 kcmil".
func americanSize(s string) string {
	if n, err := strconv.Atoi(s); err == nil && n >= 250 {
		return s + " kcmil"
	}
	return s + " AWG"
}

// near wants got within a share of want.
func near(t testing.TB, what string, got, want, share float64) {
	t.Helper()
	if !(math.Abs(got-want) <= share*math.Abs(want)) {
		t.Errorf("%s is %.6g, want %.6g ± %.2g %%", what, got, want, 100*share)
	}
}

// metalWord is the metal of a column.
func metalWord(column string) string {
	switch {
	case strings.Contains(column, "al"):
		return "aluminium"
	case strings.Contains(column, "_coated"):
		return "tinned-copper"
	}
	return "copper"
}
