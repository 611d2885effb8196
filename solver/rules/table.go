package rules

import (
	"math"
	"slices"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/quantity"
)

// Plausible bounds of a person's tables.
const (
	largestA      = 20000
	largestFactor = 2
	largestC      = 500
)

// currents is a table of currents by size; a column is chosen by metal, temperature rating, reference method and loaded conductors.
type currents struct {
	id, name, conditions string
	source               catalog.Source
	sizes                []quantity.Size
	columns              []currentColumn
}

type currentColumn struct {
	metal   string // copper | aluminium
	ratingC float64
	method  string // "" any
	loaded  int    // 0 any
	memory  bool
	clause  string    // what a step cites
	amperes []float64 // by size; NaN none
}

type currentsRow struct {
	Table      string    `yaml:"table"`
	Name       string    `yaml:"name"`
	Conditions string    `yaml:"conditions"`
	Source     sourceRow `yaml:"source"`
	Sizes      []string  `yaml:"sizes"`
	Columns    []struct {
		Metal      string     `yaml:"metal"`
		RatingC    float64    `yaml:"rating_c"`
		Method     string     `yaml:"method"`
		Loaded     int        `yaml:"loaded"`
		FromMemory bool       `yaml:"from_memory"`
		Clause     string     `yaml:"clause"`
		Amperes    []*float64 `yaml:"amperes"`
	} `yaml:"columns"`
}

func (row currentsRow) build(r *reader) currents {
	r.id("table", row.Table)
	r.text("name", row.Name)
	row.Source.check(r)
	t := currents{id: row.Table, name: row.Name, conditions: row.Conditions, source: row.Source.source(), sizes: r.sizes(row.Sizes)}
	if len(row.Columns) == 0 {
		r.fail("columns are missing")
	}
	for _, c := range row.Columns {
		if c.Metal == "" {
			c.Metal = copper
		}
		if c.Metal != copper && c.Metal != aluminium {
			r.fail("metal is %q; write copper or aluminium", c.Metal)
		}
		if !(c.RatingC > 0 && c.RatingC <= largestC) {
			r.fail("rating_c is %g; write the conductor temperature of the column in °C", c.RatingC)
		}
		if c.Loaded < 0 || c.Loaded > 3 {
			r.fail("loaded is %d; write 1, 2 or 3", c.Loaded)
		}
		a := r.numbers("amperes", c.Amperes, len(t.sizes), 1e-3, largestA)
		r.growing(a, t.sizes)
		t.columns = append(t.columns, currentColumn{c.Metal, c.RatingC, c.Method, c.Loaded, c.FromMemory || row.Source.FromMemory, strings.TrimSpace(row.Name + " " + c.Clause), a})
	}
	return t
}

// sizes wants conductor sizes in canonical form, thin first.
func (r *reader) sizes(words []string) (out []quantity.Size) {
	for _, w := range words {
		s, err := quantity.ParseSize(w)
		if err != nil {
			r.fail("sizes: %v", err)
			continue
		}
		if len(out) > 0 && out[len(out)-1].Compare(s) >= 0 {
			r.fail("sizes are not from thin to thick at %s", s)
		}
		out = append(out, s)
	}
	if len(words) == 0 {
		r.fail("sizes are missing")
	}
	return out
}

// growing wants currents that grow with the size.
func (r *reader) growing(a []float64, sizes []quantity.Size) {
	last := 0.0
	for i, v := range a {
		if v <= last && i < len(sizes) {
			r.fail("amperes fall to %g at %s, below those of a thinner size", v, sizes[i])
		}
		if !math.IsNaN(v) {
			last = v
		}
	}
}

// Metals as tables name them.
const (
	copper    = "copper"
	aluminium = "aluminium"
)

// metalOf is the table's word for one of the catalogue's metals, "" for another metal.
func metalOf(metal string) string {
	switch {
	case metal == "" || strings.Contains(metal, copper):
		return copper
	case strings.Contains(metal, aluminium):
		return aluminium
	}
	return ""
}

// ambients is a table of factors by ambient temperature: the row of the next warmer temperature counts.
type ambients struct {
	id, name string
	bands    bool // the table prints bands, "41–45 °C"
	memory   bool
	upToC    []float64
	columns  []ambientColumn
}

type ambientColumn struct {
	ratingC float64
	factors []float64 // NaN none
}

type ambientsRow struct {
	Table   string     `yaml:"table"`
	Name    string     `yaml:"name"`
	Bands   bool       `yaml:"bands"`
	Source  sourceRow  `yaml:"source"`
	UpToC   []*float64 `yaml:"up_to_c"`
	Columns []struct {
		RatingC float64    `yaml:"rating_c"`
		Factors []*float64 `yaml:"factors"`
	} `yaml:"columns"`
}

func (row ambientsRow) build(r *reader) ambients {
	r.id("table", row.Table)
	r.text("name", row.Name)
	row.Source.check(r)
	t := ambients{id: row.Table, name: row.Name, bands: row.Bands, memory: row.Source.FromMemory, upToC: r.numbers("up_to_c", row.UpToC, max(1, len(row.UpToC)), -100, largestC)}
	r.rising("up_to_c", t.upToC, false)
	if len(row.Columns) == 0 {
		r.fail("columns are missing")
	}
	for _, c := range row.Columns {
		if !(c.RatingC > 0 && c.RatingC <= largestC) {
			r.fail("rating_c is %g; write the conductor temperature of the column in °C", c.RatingC)
		}
		t.columns = append(t.columns, ambientColumn{c.RatingC, r.numbers("factors", c.Factors, len(t.upToC), 1e-3, largestFactor)})
	}
	slices.SortStableFunc(t.columns, func(a, b ambientColumn) int { return int(a.ratingC - b.ratingC) })
	return t
}

// groupings is a table of factors by how many conductors, circuits or cores lie together: the next larger number counts.
type groupings struct {
	id, name    string
	arrangement string   // "" or "bunched", "layer-wall" …
	methods     []string // reference methods that it is for, nil for all
	memory      bool
	largest     quantity.Size // thickest conductor that it is for; the zero Size is any
	upTo        []float64     // the last may be +Inf
	factors     []float64
}

type groupingsRow struct {
	Table       string     `yaml:"table"`
	Name        string     `yaml:"name"`
	Arrangement string     `yaml:"arrangement"`
	Methods     []string   `yaml:"methods"`
	Largest     string     `yaml:"largest"`
	Source      sourceRow  `yaml:"source"`
	UpTo        []*float64 `yaml:"up_to"`
	Factors     []*float64 `yaml:"factors"`
}

func (row groupingsRow) build(r *reader) groupings {
	r.id("table", row.Table)
	r.text("name", row.Name)
	row.Source.check(r)
	g := groupings{id: row.Table, name: row.Name, arrangement: row.Arrangement, methods: row.Methods, memory: row.Source.FromMemory}
	if row.Largest != "" {
		if s := r.sizes([]string{row.Largest}); len(s) == 1 {
			g.largest = s[0]
		}
	}
	g.upTo = r.numbers("up_to", row.UpTo, max(1, len(row.UpTo)), 1, 10000)
	r.rising("up_to", g.upTo, true)
	g.factors = r.numbers("factors", row.Factors, len(g.upTo), 1e-3, 1)
	for i, f := range g.factors {
		if math.IsNaN(f) || i > 0 && f > g.factors[i-1] {
			r.fail("factors are not falling at value %d", i+1)
		}
	}
	if n := len(g.upTo); n > 0 && math.IsNaN(g.upTo[n-1]) {
		g.upTo[n-1] = math.Inf(1)
	}
	return g
}
