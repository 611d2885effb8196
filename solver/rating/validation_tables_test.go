package rating_test

import (
	"encoding/csv"
	"os"
	"path/filepath"
	"strconv"
	"testing"
)

const references = "../../testdata/reference"

// sheet is a reference table with named columns.
type sheet struct {
	t       testing.TB
	file    string
	columns map[string]int
	rows    [][]string
}

func open(t testing.TB, file string) *sheet {
	t.Helper()
	f, err := os.Open(filepath.Join(references, file))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	r := csv.NewReader(f)
	r.FieldsPerRecord = -1 // some sources hold a comma
	rows, err := r.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	s := &sheet{t: t, file: file, columns: map[string]int{}, rows: rows[1:]}
	for i, name := range rows[0] {
		s.columns[name] = i
	}
	return s
}

// number finds the value in a column of the row whose leading cells are as given.
func (s *sheet) number(column string, cells ...string) float64 {
	s.t.Helper()
	c, ok := s.columns[column]
	if !ok {
		s.t.Fatalf("%s has no column %s", s.file, column)
	}
next:
	for _, row := range s.rows {
		for i, cell := range cells {
			if row[i] != cell {
				continue next
			}
		}
		v, err := strconv.ParseFloat(row[c], 64)
		if err != nil {
			s.t.Fatalf("%s, %s of %v: %v", s.file, column, cells, err)
		}
		return v
	}
	s.t.Fatalf("%s has no row %v", s.file, cells)
	return 0
}
