package rating_test

import (
	"math"
	"os"
	"testing"

	"packrise/solver/section"
)

// The comparisons with published ratings. A table cell is a rounded, careful, partly historical figure: each family of
// figures has a band for computed over published (testdata/validation/README.md says where the bands come from), and no input is
// chosen case by case to meet it.

// validating tells whether all comparisons run and the tables are written: `make validate`.
var validating = os.Getenv("PACKRISE_VALIDATE") == "1"

// families lists all comparisons, in the order of the tables.
func families(t testing.TB) []family {
	var out []family
	out = append(out, aircraftFamilies(t)...)
	out = append(out, freeAirFamily(t))
	out = append(out, tubeFamilies(t)...)
	out = append(out, installFamilies(t)...)
	out = append(out, controlFamilies(t)...)
	return append(out, arrayFamily(t))
}

// TestValidation computes what was published and holds every ratio to its family's band: a quick choice of them, or all of them with
// PACKRISE_VALIDATE=1, which also writes the table and the chart.
func TestValidation(t *testing.T) {
	all := families(t)
	var rows []outcome
	for i := range all {
		f := &all[i]
		t.Run(f.name, func(t *testing.T) {
			first := len(rows)
			for j := range f.rows {
				if c := &f.rows[j]; validating || c.quick {
					rows = append(rows, compare(t, f, c))
				}
			}
			holdMean(t, f, rows[first:])
		})
	}
	if validating {
		publish(t, all, rows)
		return
	}
	compareWithTable(t, rows)
}

// holdMean holds the mean of a family to its band where single figures are not held to it.
func holdMean(t *testing.T, f *family, rows []outcome) {
	if !f.ofMean || len(rows) == 0 {
		return
	}
	if s := spreadOf(pick(rows, outcome.ratio, func(outcome) bool { return true })); !(s.mean >= f.low && s.mean <= f.high) {
		t.Errorf("mean ratio %.3f outside %.2f to %.2f", s.mean, f.low, f.high)
	}
}

// compare computes one figure with the rule for the clearance and, where validating, with 0.2 mm everywhere.
func compare(t *testing.T, f *family, c *comparison) outcome {
	out := outcome{family: f, row: c, byRule: math.NaN(), everywhere: math.NaN()}
	r := newRig()
	v, err := c.compute(r)
	if err != nil {
		t.Errorf("%s: %v", c.name, err)
		return out
	}
	out.byRule, out.everywhere, out.loose = v, v, r.loose
	if r.loose && validating {
		r.clearance = section.Some(0.2)
		if out.everywhere, err = c.compute(r); err != nil {
			out.everywhere = math.NaN()
			t.Errorf("%s with 0.2 mm: %v", c.name, err)
		}
	}
	ratio := out.ratio()
	t.Logf("%-34s published %8.4g %s, computed %8.4g, ratio %.3f", c.name, c.published, f.unit, v, ratio)
	if f.banded() && !f.ofMean && !(ratio >= f.low && ratio <= f.high) {
		t.Errorf("%s: computed %.4g, published %.4g %s, ratio %.3f outside %.2f to %.2f", c.name, v, c.published, f.unit, ratio, f.low, f.high)
	}
	return out
}
