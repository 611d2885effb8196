package study

import (
	"context"
	"encoding/csv"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// Published permitted currents beside what a document comes to: what is computed, what can be relied on, what the rule set says of the same
// document and which is lowest. No input is chosen case by case: the same catalogue and defaults as everywhere. A table cell is a rounded,
// careful figure, so where there is a band it is that of a check for mistakes.

// validating tells whether everything is computed and the table written: `make validate`.
var validating = os.Getenv("PACKRISE_VALIDATE") == "1"

// soaking tells whether long runs are wanted: `make soak`.
var soaking = os.Getenv("PACKRISE_SOAK") == "1"

// published is one published current.
type published struct {
	name   string
	figure float64 // A in each conductor; NaN: nothing is published, the rule set's own answer stands alone
	exact  float64 // tolerance of the rule set's answer about the figure, a share; 0: to rounding
	rule   string  // rule set that must say it of the document; "" none
	of     string  // conductor
	doc    func(t testing.TB) *section.Document
	// low, high: band of computed over published where the row has its own; both 0: the family's.
	low, high float64
	quick     bool // also in the ordinary tests
}

// publishing is a family of published currents.
type publishing struct {
	name, source, conditions, drawn string
	factor                          bool    // figures are factors on a conductor alone in the same surroundings
	low, high                       float64 // band of computed over published; both 0: reported only
	rows                            []published
}

// held is a published current with what stands beside it.
type held struct {
	family                       *publishing
	row                          *published
	nominal, rely, table, lowest float64 // NaN: none
	because, governs             string
	ratings                      *Ratings
}

// publishings lists all families, in the order of the table.
func publishings(t testing.TB) []publishing {
	out := append(tubes(t), singlesInAir(t))
	out = append(out, cablesInAir(t), multicores(t), tied(t), harnesses())
	return append(out, scenarios()...)
}

// rated answers the stages of Rate that decide permitted currents; whole with the bands and the cases. Wires that nobody loads are idle.
func rated(t testing.TB, d *section.Document, whole bool) *Ratings {
	t.Helper()
	r := &rater{s: New(cat), ctx: context.Background(), o: Options{AssumeIdle: true}, out: Ratings{Doc: d}}
	stages := []func() error{func() error { return r.start(nil) }, r.all, r.codes}
	if whole {
		stages = []func() error{func() error { return r.start(nil) }, r.all, r.bands, r.cases, r.codes}
	}
	for _, do := range stages {
		if err := do(); err != nil {
			t.Fatal(err)
		}
	}
	return &r.out
}

// hold computes one row.
func (f *publishing) hold(t testing.TB, p *published, whole bool) held {
	d := p.doc(t)
	r := rated(t, d, whole)
	h := held{family: f, row: p, nominal: math.NaN(), rely: math.NaN(), table: math.NaN(), lowest: math.NaN(), governs: r.All.Nominal.Governs, ratings: r}
	for i := range r.Lowest {
		l := &r.Lowest[i]
		if l.ID != p.of {
			continue
		}
		h.nominal, h.rely, h.lowest, h.because = l.Nominal, l.Computed, l.A, l.Because
		if a, ok := l.Rules[p.rule]; ok {
			h.table = a
		}
		if f.factor {
			h.asFactor(t, r, i)
		}
	}
	return h
}

// asFactor divides by what the conductor carries alone.
func (h *held) asFactor(t testing.TB, r *Ratings, i int) {
	s := New(cat)
	a, err := s.alone(context.Background(), s.engines[0], r.Doc, r.Base.Conductors[i], Options{})
	if err != nil {
		t.Fatal(err)
	}
	h.nominal /= a.One.NominalA
	h.rely /= a.One.RelyA
	for k := range r.Codes.Outcomes {
		if o := &r.Codes.Outcomes[k]; o.Rule == h.row.rule && len(o.Conductors[i].Steps) > 0 {
			h.table /= o.Conductors[i].Steps[0].To
		}
	}
	h.lowest, h.because = math.NaN(), ""
}

// check holds a row to what is published.
func (h *held) check(t *testing.T) {
	p, f := h.row, h.family
	low, high := f.low, f.high
	if p.high > 0 {
		low, high = p.low, p.high
	}
	if ratio := h.nominal / p.figure; high > 0 && !(ratio >= low && ratio <= high) {
		t.Errorf("%s: computed %.3f, published %g: ratio %.3f outside %.2f to %.2f", p.name, h.nominal, p.figure, ratio, low, high)
	}
	if p.rule != "" && !math.IsNaN(p.figure) {
		if tol := math.Max(p.exact, 1e-9); !(math.Abs(h.table/p.figure-1) <= tol) {
			t.Errorf("%s: the document's %s says %.4f, published %g", p.name, p.rule, h.table, p.figure)
		}
	}
	if !(h.rely <= h.nominal) {
		t.Errorf("%s: %.3f A to rely on, %.3f A nominal", p.name, h.rely, h.nominal)
	}
}

// TestPublished computes what was published: a quick choice, held to testdata/validation/ratings.md as well, or with PACKRISE_VALIDATE=1 all of
// it, which writes that table.
func TestPublished(t *testing.T) {
	all := publishings(t)
	var rows []held
	for i := range all {
		f := &all[i]
		for j := range f.rows {
			p := &f.rows[j]
			if !validating && (!p.quick || testing.Short()) {
				continue
			}
			h := f.hold(t, p, validating)
			h.check(t)
			t.Logf("%-40s %-34s published %7.2f, computed %7.2f, to rely on %7.2f, rule %7.2f, lowest %7.2f (%s), %s governs", f.name, p.name, p.figure, h.nominal, h.rely, h.table, h.lowest, h.because, h.governs)
			rows = append(rows, h)
		}
	}
	if validating {
		if err := os.WriteFile(ratingsTable, []byte(writePublished(all, rows)), 0o644); err != nil {
			t.Fatal(err)
		}
		return
	}
	compareWritten(t, rows)
}

// compareWritten holds the table in the tree to what this build computes, to 1 %.
func compareWritten(t *testing.T, rows []held) {
	data, err := os.ReadFile(ratingsTable)
	if err != nil {
		t.Fatal(err)
	}
	written, family := map[string]string{}, ""
	for _, line := range strings.Split(string(data), "\n") {
		if name, ok := strings.CutPrefix(line, "## "); ok {
			family = name
		}
		if cells := strings.Split(line, "|"); len(cells) > 4 {
			written[family+"/"+strings.TrimSpace(cells[1])] = strings.TrimSpace(cells[3])
		}
	}
	for _, h := range rows {
		name := h.family.name + "/" + h.row.name
		if v, err := strconv.ParseFloat(written[name], 64); err != nil || math.Abs(h.nominal/v-1) > 0.01 {
			t.Errorf("%s: computed %.4g, and testdata/validation/ratings.md has %q: run make validate", name, h.nominal, written[name])
		}
	}
}

// reference is a table of testdata/reference.
type reference struct {
	t    testing.TB
	file string
	rows [][]string
}

func openReference(t testing.TB, file string) *reference {
	t.Helper()
	f, err := os.Open(filepath.Join("../../testdata/reference", file))
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
	return &reference{t, file, rows}
}

// number finds the value in a column of the row with these leading cells.
func (r *reference) number(column string, cells ...string) float64 {
	r.t.Helper()
	for c, name := range r.rows[0] {
		if name != column {
			continue
		}
	next:
		for _, row := range r.rows[1:] {
			for i, cell := range cells {
				if row[i] != cell {
					continue next
				}
			}
			v, err := strconv.ParseFloat(row[c], 64)
			if err != nil {
				r.t.Fatalf("%s, %s of %v: %v", r.file, column, cells, err)
			}
			return v
		}
	}
	r.t.Fatalf("%s has no %s of %v", r.file, column, cells)
	return 0
}

// alike is a document of n equal conductors W1 … Wn that all carry the same. part is a flow map without id and place.
type alike struct {
	n                          int
	surroundings, holder, part string
	amperes, hz                float64
	more                       string // further lines of the document
	lay                        bool   // laid up in layers; else settled on the floor of a conduit or wireway
	idle                       int    // so many of them carry nothing
	kinds                      []kind // instead of part and n: several kinds, in this order
	loads                      string // instead of amperes and idle
}

// kind is so many equal parts, ids with this letter.
type kind struct {
	letter string
	n      int
	part   string
}

func (a alike) doc(t testing.TB) *section.Document {
	t.Helper()
	if a.kinds == nil {
		a.kinds = []kind{{"W", a.n, a.part}}
	}
	var b strings.Builder
	fmt.Fprintf(&b, "packrise: 1\nsurroundings: %s\nholder: %s\n", a.surroundings, a.holder)
	b.WriteString("parts:\n")
	for _, k := range a.kinds {
		for i := range k.n {
			fmt.Fprintf(&b, "  - {id: %s%d, kind: core, %s}\n", k.letter, i+1, k.part)
		}
	}
	if a.loads == "" {
		a.loads = fmt.Sprintf("  - {id: all, conductors: [%s], current_a: %g, frequency_hz: %g}\n", numbered("W", 1, a.n-a.idle), a.amperes, a.hz)
		if a.idle > 0 {
			a.loads += fmt.Sprintf("  - {id: idle, conductors: [%s], current_a: 0}\n", numbered("W", a.n-a.idle+1, a.n))
		}
	}
	fmt.Fprintf(&b, "loads:\n%s%s", a.loads, a.more)
	d := read(t, b.String())
	if !a.lay {
		return rest(d, cat)
	}
	at, err := rating.LayUp(d, cat)
	if err != nil {
		t.Fatal(err)
	}
	return moved(d, at)
}

// numbered lists W1, W2, ….
func numbered(letter string, from, to int) string {
	var out []string
	for i := from; i <= to; i++ {
		out = append(out, letter+strconv.Itoa(i))
	}
	return strings.Join(out, ", ")
}
