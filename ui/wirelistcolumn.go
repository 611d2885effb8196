package ui

import (
	"cmp"
	"math"
	"slices"
	"strings"
)

// wireColumn is a column of the list.
type wireColumn int

const (
	wireID wireColumn = iota
	wireCircuit
	wireSizeType
	wireCurrent
	wireTemp
	wireBand
	wireLimit
	wireMargin
	wireRely
	wireNominal
	wireLowest
	wireRemark
	wireColumns // how many there are
)

// wireHeads are the headers and the units behind them.
var wireHeads = [wireColumns]struct{ name, unit string }{
	{"Id", ""},
	{"Circuit", ""},
	{"Size", ""},
	{"Current", "A"},
	{"Temperature", "°C"},
	{"Band", "°C"},
	{"Limit", "°C"},
	{"Margin", "K"},
	{"Rely on", "A"},
	{"Nominal", "A"},
	{"Lowest", "A"},
	{"Remark", ""},
}

// wireShort are headers for where there is little room.
var wireShort = [wireColumns]string{wireTemp: "Temp."}

// number tells whether the column's cells are numbers, which stand at its right edge.
func (c wireColumn) number() bool { return c >= wireCurrent && c <= wireLowest }

// rated tells whether the column's cells come from the ratings.
func (c wireColumn) rated() bool {
	return c == wireBand || c >= wireRely && c <= wireLowest
}

// answered tells whether the column's cells come from the answer.
func (c wireColumn) answered() bool { return c == wireTemp || c == wireMargin }

// input returns the key of the input behind a cell, "" if the column is none.
func (c wireColumn) input() string {
	switch c {
	case wireID:
		return "id"
	case wireCircuit:
		return "circuit"
	case wireSizeType:
		return "size"
	case wireCurrent:
		return "current"
	case wireLimit:
		return "limit"
	}
	return ""
}

// text returns a row's cell in the column.
func (c wireColumn) text(r *wireRow) string {
	switch c {
	case wireID:
		return r.id
	case wireCircuit:
		return r.circuit
	case wireSizeType:
		return r.size
	case wireCurrent:
		return r.current
	case wireTemp:
		return r.temperature()
	case wireLimit:
		return r.limitText()
	case wireMargin:
		return r.marginText()
	case wireBand:
		return r.band
	case wireRely:
		return ampereCell(r.rely)
	case wireNominal:
		return ampereCell(r.nominal)
	case wireLowest:
		return ampereCell(r.lowest)
	}
	return r.remark
}

// value returns what numbers sort by; NaN sorts last.
func (c wireColumn) value(r *wireRow) float64 {
	switch c {
	case wireSizeType:
		return r.area
	case wireCurrent:
		return r.amperes
	case wireTemp:
		if r.solved {
			return r.temp
		}
	case wireLimit:
		if r.limit.OK {
			return r.limit.V
		}
	case wireMargin:
		if k, ok := r.margin(); ok {
			return k
		}
	case wireBand:
		return r.upper
	case wireRely:
		return r.rely
	case wireNominal:
		return r.nominal
	case wireLowest:
		return r.lowest
	}
	return math.NaN()
}

// sortWires sorts rows that stand in the document's order. Equal rows keep that order, and rows without a value come last either way.
func sortWires(rows []wireRow, by wireColumn, down bool) {
	slices.SortStableFunc(rows, func(a, b wireRow) int {
		if by == wireSizeType || by.number() {
			return compareValues(by.value(&a), by.value(&b), down)
		}
		x, y := by.text(&a), by.text(&b)
		switch {
		case x == y:
			return 0
		case x == "":
			return 1
		case y == "":
			return -1
		case down:
			return compareNatural(y, x)
		}
		return compareNatural(x, y)
	})
}

func compareValues(a, b float64, down bool) int {
	switch {
	case math.IsNaN(a) && math.IsNaN(b):
		return 0
	case math.IsNaN(a):
		return 1
	case math.IsNaN(b):
		return -1
	case down:
		return cmp.Compare(b, a)
	}
	return cmp.Compare(a, b)
}

// compareNatural compares texts with the numbers in them by value: L2 before L10.
func compareNatural(a, b string) int {
	for a != "" && b != "" {
		if da, db := digitsOf(a), digitsOf(b); da != "" && db != "" {
			x, y := strings.TrimLeft(da, "0"), strings.TrimLeft(db, "0")
			if c := cmp.Or(cmp.Compare(len(x), len(y)), cmp.Compare(x, y)); c != 0 {
				return c
			}
			a, b = a[len(da):], b[len(db):]
			continue
		}
		if a[0] != b[0] {
			return cmp.Compare(a[0], b[0])
		}
		a, b = a[1:], b[1:]
	}
	return cmp.Compare(len(a), len(b))
}

func digitsOf(s string) string {
	n := 0
	for n < len(s) && s[n] >= '0' && s[n] <= '9' {
		n++
	}
	return s[:n]
}
