package rating_test

import (
	"encoding/csv"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

const validation = "../../testdata/validation"

// publish writes the table in two forms and the chart.
func publish(t *testing.T, all []family, rows []outcome) {
	t.Helper()
	if err := os.MkdirAll(validation, 0o755); err != nil {
		t.Fatal(err)
	}
	write := func(name string, data []byte) {
		if err := os.WriteFile(filepath.Join(validation, name), data, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	write("table.csv", asCSV(rows))
	write("table.md", []byte(asText(all, rows)))
	write("chart.png", chart(t, all, rows))
	for _, line := range strings.Split(strings.TrimSpace(summary(all, rows)), "\n") {
		t.Log(line)
	}
}

var tableHead = []string{
	"family", "case", "unit", "published", "computed", "ratio", "ratio_with_0.2_mm_clearance", "band_low", "band_high", "source", "conditions", "drawn", "missing",
}

func asCSV(rows []outcome) []byte {
	var b strings.Builder
	w := csv.NewWriter(&b)
	must(w.Write(tableHead))
	for _, o := range rows {
		f := o.family
		must(w.Write([]string{
			f.name, o.row.name, f.unit, short(o.row.published), short(o.byRule), ratio(o.ratio()), ratio(o.ratioEverywhere()),
			bandEnd(f, f.low), bandEnd(f, f.high), f.source, f.conditions, f.drawn, o.missing,
		}))
	}
	w.Flush()
	must(w.Error())
	return []byte(b.String())
}

func must(err error) {
	if err != nil {
		panic(err)
	}
}

// short writes four significant digits, and nothing for what was not computed.
func short(v float64) string {
	if math.IsNaN(v) {
		return ""
	}
	return strconv.FormatFloat(v, 'g', 4, 64)
}

func ratio(v float64) string {
	if math.IsNaN(v) {
		return ""
	}
	return strconv.FormatFloat(v, 'f', 3, 64)
}

func bandEnd(f *family, v float64) string {
	if !f.banded() {
		return ""
	}
	return strconv.FormatFloat(v, 'f', 2, 64)
}

// spread is the statistics of some ratios.
type spread struct {
	n                   int
	mean, sd, low, high float64
}

func spreadOf(ratios []float64) spread {
	s := spread{n: len(ratios), low: math.Inf(1), high: math.Inf(-1)}
	for _, v := range ratios {
		s.mean += v / float64(s.n)
		s.low, s.high = min(s.low, v), max(s.high, v)
	}
	for _, v := range ratios {
		s.sd += (v - s.mean) * (v - s.mean)
	}
	if s.n > 1 {
		s.sd = math.Sqrt(s.sd / float64(s.n-1))
	}
	return s
}

// cells writes a spread as cells of a table.
func (s spread) cells() string {
	if s.n == 0 {
		return " | | | |"
	}
	return fmt.Sprintf(" %.3f | %.3f | %.3f | %.3f |", s.mean, s.sd, s.low, s.high)
}

// pick gathers the ratios of the outcomes that were computed and are wanted.
func pick(rows []outcome, value func(outcome) float64, want func(outcome) bool) []float64 {
	var out []float64
	for _, o := range rows {
		if v := value(o); !math.IsNaN(v) && want(o) {
			out = append(out, v)
		}
	}
	return out
}

// rated tells the published ratings from the conduction check and from what has no band.
func rated(o outcome) bool { return o.family.banded() && o.family.unit != arrayUnit }

func summary(all []family, rows []outcome) string {
	var b strings.Builder
	line := func(name, band string, want func(outcome) bool) {
		byRule := spreadOf(pick(rows, outcome.ratio, want))
		var everywhere spread
		if len(pick(rows, outcome.ratio, func(o outcome) bool { return o.loose && want(o) })) > 0 {
			everywhere = spreadOf(pick(rows, outcome.ratioEverywhere, want))
		}
		fmt.Fprintf(&b, "| %s | %d |%s%s %s |\n", name, byRule.n, byRule.cells(), everywhere.cells(), band)
	}
	b.WriteString("| family | n | mean | s.d. | least | most | 0.2 mm: mean | s.d. | least | most | band |\n|---|---|---|---|---|---|---|---|---|---|---|\n")
	for i := range all {
		f := &all[i]
		band := "reported only"
		if f.banded() {
			band = fmt.Sprintf("%.2f–%.2f", f.low, f.high)
			if f.ofMean {
				band += " (mean)"
			}
		}
		line(f.name, band, func(o outcome) bool { return o.family == f })
	}
	line("**all ratings with a band**", "", rated)
	line("**of these, loose in a gas**", "", func(o outcome) bool { return rated(o) && o.loose })
	return b.String()
}

// asText writes the table for people.
func asText(all []family, rows []outcome) string {
	var b strings.Builder
	b.WriteString("# Published and computed ratings\n\nWritten by `make validate`; what it means stands in [README.md](README.md).\n\n![ratios](chart.png)\n\n")
	b.WriteString("Computed over published; the second four columns with a clearance of 0.2 mm everywhere in place of the defaults' rule, for parts loose in a gas.\n\n")
	b.WriteString(summary(all, rows))
	for i := range all {
		f := &all[i]
		fmt.Fprintf(&b, "\n## %s\n\nPublished: %s.\nConditions: %s.\nDrawn: %s.\n\n", f.name, f.source, f.conditions, f.drawn)
		fmt.Fprintf(&b, "| case | published, %s | computed | ratio | ratio with 0.2 mm |\n|---|---|---|---|---|\n", f.unit)
		for _, o := range rows {
			if o.family != f {
				continue
			}
			if o.missing != "" {
				fmt.Fprintf(&b, "| %s | %s | %s | | |\n", o.row.name, short(o.row.published), errNotDrawn)
				continue
			}
			other := ""
			if o.loose {
				other = ratio(o.ratioEverywhere())
			}
			fmt.Fprintf(&b, "| %s | %s | %s | %s | %s |\n", o.row.name, short(o.row.published), short(o.byRule), ratio(o.ratio()), other)
		}
	}
	return b.String()
}

// compareWithTable holds the table in the tree to what this build computes.
func compareWithTable(t *testing.T, rows []outcome) {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(validation, "table.csv"))
	if err != nil {
		t.Fatal(err)
	}
	table, err := csv.NewReader(strings.NewReader(string(data))).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	written := map[string]string{}
	for _, row := range table[1:] {
		written[row[0]+"/"+row[1]] = row[4]
	}
	for _, o := range rows {
		if math.IsNaN(o.byRule) {
			continue // failed already
		}
		name := o.family.name + "/" + o.row.name
		if v, err := strconv.ParseFloat(written[name], 64); err != nil || math.Abs(o.byRule/v-1) > 0.01 {
			t.Errorf("%s: computed %.4g, and testdata/validation/table.csv has %q: run make validate", name, o.byRule, written[name])
		}
	}
}
