package rules

import "packrise/solver/quantity"

// terminals holds what terminals permit: rated currents by size, and the table whose column counts for a terminal by its temperature rating.
type terminals struct {
	name, columnName string
	memory           bool
	sizes            []quantity.Size
	amperes          []float64
	column           *currents
}

type terminalsRow struct {
	Name       string     `yaml:"name"`
	Source     sourceRow  `yaml:"source"`
	Sizes      []string   `yaml:"sizes"`
	Amperes    []*float64 `yaml:"amperes"`
	Column     string     `yaml:"column"`
	ColumnName string     `yaml:"column_name"`
}

func (row terminalsRow) build(r *reader, b *Book) *terminals {
	row.Source.check(r)
	t := &terminals{name: row.Name, columnName: row.ColumnName, memory: row.Source.FromMemory, sizes: r.sizes(row.Sizes), column: refer(r, "column", row.Column, b.currents)}
	r.text("column", row.Column)
	t.amperes = r.numbers("amperes", row.Amperes, len(t.sizes), 1e-3, largestA)
	return t
}

// devices holds the standard ratings of devices and those that cap the device of a small conductor.
type devices struct {
	name      string
	memory    bool
	standardA []float64
	small     []smallConductor
}

type smallConductor struct {
	metal  string
	size   quantity.Size
	ampere float64
}

type devicesRow struct {
	Name      string     `yaml:"name"`
	Source    sourceRow  `yaml:"source"`
	StandardA []*float64 `yaml:"standard_a"`
	Small     []struct {
		Metal   string  `yaml:"metal"`
		Size    string  `yaml:"size"`
		Amperes float64 `yaml:"amperes"`
	} `yaml:"small"`
}

func (row devicesRow) build(r *reader) *devices {
	row.Source.check(r)
	d := &devices{name: row.Name, memory: row.Source.FromMemory, standardA: r.numbers("standard_a", row.StandardA, max(1, len(row.StandardA)), 1e-3, largestA)}
	r.rising("standard_a", d.standardA, false)
	for _, s := range row.Small {
		if size := r.sizes([]string{s.Size}); len(size) == 1 {
			d.small = append(d.small, smallConductor{s.Metal, size[0], s.Amperes})
		}
	}
	return d
}

// next returns the standard rating above a, 0 when a is itself one or nothing is above it.
func (d devices) next(a float64) float64 {
	for _, s := range d.standardA {
		switch {
		case s > a+1e-9:
			return s
		case s >= a-1e-9:
			return 0
		}
	}
	return 0
}
