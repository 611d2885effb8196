package rules

import (
	"math"
	"slices"

	"packrise/solver/quantity"
)

// harnessRule rates wires of an aircraft harness: free air from the temperature difference, then bundle, then altitude; where the curve isn't held, the
// table for the harshest conditions.
type harnessRule struct {
	freeAir    *freeAir
	bundle     *bundle
	altitude   *altitude
	tableC     float64 // ambient of the rule's table of currents
	tableShare float64 // share of the harness's capacity in use that it allows
	tableFt    float64
	thick      quantity.Size // from this size on the table is for so many wires at most
	thickWires int
}

type harnessRow struct {
	FreeAir    string  `yaml:"free_air"`
	Bundle     string  `yaml:"bundle"`
	Altitude   string  `yaml:"altitude"`
	TableC     float64 `yaml:"currents_ambient_c"`
	TableShare float64 `yaml:"currents_share"`
	TableFt    float64 `yaml:"currents_altitude_ft"`
	Thick      string  `yaml:"thick"`
	ThickWires int     `yaml:"thick_wires"`
}

func (row harnessRow) build(r *reader, b *Book) *harnessRule {
	h := &harnessRule{
		freeAir: refer(r, "harness.free_air", row.FreeAir, b.freeAir), bundle: refer(r, "harness.bundle", row.Bundle, b.bundles),
		altitude: refer(r, "harness.altitude", row.Altitude, b.altitudes),
		tableC:   row.TableC, tableShare: row.TableShare, tableFt: row.TableFt, thickWires: row.ThickWires,
	}
	if row.FreeAir == "" || row.Bundle == "" || row.Altitude == "" {
		r.fail("harness needs free_air, bundle and altitude, each the id of a table")
	}
	if s := r.sizes([]string{row.Thick}); len(s) == 1 {
		h.thick = s[0]
	}
	return h
}

// freeAir holds points of a curve: current of a wire alone by the difference between its rating and the ambient.
type freeAir struct {
	id, name string
	memory   bool
	points   []freeAirPoint
}

type freeAirPoint struct {
	size      quantity.Size
	k, ampere float64
}

type freeAirRow struct {
	Table  string    `yaml:"table"`
	Name   string    `yaml:"name"`
	Source sourceRow `yaml:"source"`
	Rows   []struct {
		Size        string  `yaml:"size"`
		DifferenceK float64 `yaml:"difference_k"`
		Amperes     float64 `yaml:"amperes"`
	} `yaml:"rows"`
}

func (row freeAirRow) build(r *reader) freeAir {
	r.id("table", row.Table)
	r.text("name", row.Name)
	row.Source.check(r)
	f := freeAir{id: row.Table, name: row.Name, memory: row.Source.FromMemory}
	for _, p := range row.Rows {
		s := r.sizes([]string{p.Size})
		if !(p.DifferenceK > 0 && p.DifferenceK <= largestC && p.Amperes > 0 && p.Amperes <= largestA) || len(s) != 1 {
			r.fail("a row needs size, difference_k and amperes above zero")
			continue
		}
		f.points = append(f.points, freeAirPoint{s[0], p.DifferenceK, p.Amperes})
	}
	if len(row.Rows) == 0 {
		r.fail("rows are missing")
	}
	return f
}

// at returns the point of a size with the largest difference that is not above k; ok is false where none is held.
func (f freeAir) at(size quantity.Size, k float64) (p freeAirPoint, ok bool) {
	for _, q := range f.points {
		if q.size == size && q.k <= k+1e-9 && q.k > p.k {
			p, ok = q, true
		}
	}
	return p, ok
}

// held returns the differences at which a size is held.
func (f freeAir) held(size quantity.Size) (k []float64) {
	for _, q := range f.points {
		if q.size == size {
			k = append(k, q.k)
		}
	}
	slices.Sort(k)
	return k
}

// bundle holds factors by number of wires and by the share of the harness's capacity in use.
type bundle struct {
	id, name string
	memory   bool
	loaded   []float64
	upTo     []float64 // the last row holds for more wires too
	factors  [][]float64
}

type bundleRow struct {
	Table   string       `yaml:"table"`
	Name    string       `yaml:"name"`
	Source  sourceRow    `yaml:"source"`
	Loaded  []*float64   `yaml:"loaded"`
	UpTo    []*float64   `yaml:"up_to"`
	Factors [][]*float64 `yaml:"factors"`
}

func (row bundleRow) build(r *reader) bundle {
	r.id("table", row.Table)
	r.text("name", row.Name)
	row.Source.check(r)
	b := bundle{id: row.Table, name: row.Name, memory: row.Source.FromMemory, loaded: r.numbers("loaded", row.Loaded, max(1, len(row.Loaded)), 1e-3, 1), upTo: r.numbers("up_to", row.UpTo, max(1, len(row.UpTo)), 1, 10000)}
	r.rising("loaded", b.loaded, false)
	r.rising("up_to", b.upTo, false)
	if len(row.Factors) != len(b.upTo) {
		r.fail("factors has %d rows, and up_to has %d", len(row.Factors), len(b.upTo))
	}
	for _, f := range row.Factors {
		b.factors = append(b.factors, r.numbers("factors", f, len(b.loaded), 1e-3, 1))
	}
	return b
}

// altitude holds factors by altitude; the next higher one counts.
type altitude struct {
	id, name string
	memory   bool
	upToFt   []float64
	factors  []float64
}

type altitudeRow struct {
	Table   string     `yaml:"table"`
	Name    string     `yaml:"name"`
	Source  sourceRow  `yaml:"source"`
	UpToFt  []*float64 `yaml:"up_to_ft"`
	Factors []*float64 `yaml:"factors"`
}

func (row altitudeRow) build(r *reader) altitude {
	r.id("table", row.Table)
	r.text("name", row.Name)
	row.Source.check(r)
	a := altitude{id: row.Table, name: row.Name, memory: row.Source.FromMemory, upToFt: r.numbers("up_to_ft", row.UpToFt, max(1, len(row.UpToFt)), 0, 3e5)}
	r.rising("up_to_ft", a.upToFt, false)
	a.factors = r.numbers("factors", row.Factors, len(a.upToFt), 1e-3, 1)
	return a
}

// nextRow returns the index of the first value that is not below x, with what rounding may leave; len(v) when all are.
func nextRow(v []float64, x float64) int {
	return slices.IndexFunc(append(slices.Clone(v), math.Inf(1)), func(t float64) bool { return t >= x-1e-9*math.Max(1, math.Abs(x)) })
}
