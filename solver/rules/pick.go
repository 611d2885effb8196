package rules

import (
	"fmt"
	"math"
	"slices"

	"packrise/solver/quantity"
)

// picked is a table's current and the column that it stands in.
type picked struct {
	a      float64
	column *currentColumn
	label  string // "8 AWG copper, 90 °C column"
}

// pick returns the current of a conductor from the column of the highest rating that its wire reaches; why tells why there is none.
func (t *currents) pick(c Conductor, method string, loaded int) (p picked, why string) {
	metal := metalOf(c.Metal)
	fits := func(col *currentColumn) bool {
		return col.metal == metal && (col.method == "" || col.method == method) && (col.loaded == 0 || col.loaded == loaded)
	}
	best, lowest, anyMethod := -1, math.Inf(1), false
	for i := range t.columns {
		col := &t.columns[i]
		anyMethod = anyMethod || col.metal == metal && (col.method == "" || col.method == method)
		if !fits(col) {
			continue
		}
		lowest = math.Min(lowest, col.ratingC)
		if col.ratingC <= c.RatingC && (best < 0 || col.ratingC > t.columns[best].ratingC) {
			best = i
		}
	}
	switch {
	case !(c.RatingC > 0):
		return p, "its temperature rating is unknown; write its type or limit_c"
	case !slices.ContainsFunc(t.columns, func(col currentColumn) bool { return col.metal == metal }):
		return p, fmt.Sprintf("%s has no %s", t.name, wordOr(metal, c.Metal))
	case !anyMethod:
		return p, fmt.Sprintf("%s has no method %q; it has %s", t.name, method, orList(t.methods()))
	case math.IsInf(lowest, 1):
		return p, fmt.Sprintf("%s has no %d loaded conductors by method %s", t.name, loaded, method)
	case c.Size == (quantity.Size{}):
		return p, fmt.Sprintf("it has no standard size (%s mm²), and %s lists standard sizes alone", trim(c.AreaMM2), t.name)
	case best < 0:
		return p, fmt.Sprintf("the wire is rated %s °C and %s starts at %s °C", trim(c.RatingC), t.name, trim(lowest))
	}
	i := slices.Index(t.sizes, c.Size)
	if i < 0 {
		return p, fmt.Sprintf("%s runs from %s to %s and has no %s; nothing is extrapolated", t.name, t.sizes[0].Pretty(), t.sizes[len(t.sizes)-1].Pretty(), c.sizeWord())
	}
	col := &t.columns[best]
	p = picked{col.amperes[i], col, t.label(c, col, method, loaded)}
	if math.IsNaN(p.a) {
		return p, fmt.Sprintf("%s gives no current for %s; it starts at %s", t.name, p.label, t.first(col))
	}
	return p, ""
}

// label is "8 AWG copper, 90 °C column" or "2.5 mm² copper, method B1, three loaded, 70 °C column".
func (t *currents) label(c Conductor, col *currentColumn, method string, loaded int) string {
	s := c.sizeWord() + " " + col.metal
	if col.method != "" {
		s += ", method " + method
	}
	if col.loaded != 0 {
		s += ", " + []string{"", "one", "two", "three"}[loaded] + " loaded"
	}
	return s + ", " + trim(col.ratingC) + " °C column"
}

// first is the thinnest size that a column has.
func (t *currents) first(col *currentColumn) string {
	for i, a := range col.amperes {
		if !math.IsNaN(a) {
			return t.sizes[i].Pretty()
		}
	}
	return "no size"
}

func (t *currents) methods() (out []string) {
	for _, col := range t.columns {
		if col.method != "" && !slices.Contains(out, col.method) {
			out = append(out, col.method)
		}
	}
	slices.Sort(out)
	return out
}

func (c Conductor) sizeWord() string {
	if c.Size == (quantity.Size{}) {
		return trim(c.AreaMM2) + " mm²"
	}
	return c.Size.Pretty()
}

// pick returns the factor of an ambient for a column of currents; the row of the next warmer temperature counts.
func (t *ambients) pick(ambientC, ratingC float64) (f float64, label, why string) {
	best := -1
	for i, col := range t.columns {
		if col.ratingC <= ratingC {
			best = i
		}
	}
	if best < 0 {
		return 0, "", fmt.Sprintf("%s has no column for wire of %s °C", t.name, trim(ratingC))
	}
	col := t.columns[best]
	i := nextRow(t.upToC, ambientC)
	if i == len(t.upToC) || math.IsNaN(col.factors[i]) {
		last := len(t.upToC) - 1
		for last > 0 && math.IsNaN(col.factors[last]) {
			last--
		}
		return 0, "", fmt.Sprintf("an ambient of %s °C is above %s, which for wire of %s °C ends at %s °C; nothing is extrapolated", trim(ambientC), t.name, trim(col.ratingC), trim(t.upToC[last]))
	}
	return col.factors[i], t.row(i, ambientC), ""
}

// row names a row for an ambient: "ambient 41–45 °C", "ambient 33 °C, row of 35 °C".
func (t *ambients) row(i int, ambientC float64) string {
	switch {
	case t.bands && i == 0:
		return "ambient " + trim(t.upToC[0]) + " °C or less"
	case t.bands:
		return "ambient " + trim(t.upToC[i-1]+1) + "–" + trim(t.upToC[i]) + " °C"
	case math.Abs(t.upToC[i]-ambientC) > 1e-9:
		return "ambient " + trim(ambientC) + " °C, row of " + trim(t.upToC[i]) + " °C"
	}
	return "ambient " + trim(ambientC) + " °C"
}

// pick returns the factor for n together; the row of the next larger number counts.
func (g *groupings) pick(n int, noun string) (f float64, label, why string) {
	i := nextRow(g.upTo, float64(max(n, 1)))
	if i == len(g.upTo) {
		return 0, "", fmt.Sprintf("%s are more than %s has, which ends at %s; nothing is extrapolated", numbered(n, noun), g.name, trim(g.upTo[i-1]))
	}
	return g.factors[i], g.row(i, n, noun), ""
}

// row names a row: "7–9 current-carrying conductors" in the bands of the NEC, "13 loaded cores, row of 14" elsewhere.
func (g *groupings) row(i, n int, noun string) string {
	bands := noun == countNoun[ofConductors]
	switch {
	case math.IsInf(g.upTo[i], 1) && i > 0 && bands:
		return trim(g.upTo[i-1]+1) + " and more " + noun + "s"
	case bands && i > 0 && g.upTo[i-1]+1 < g.upTo[i]:
		return trim(g.upTo[i-1]+1) + "–" + trim(g.upTo[i]) + " " + noun + "s"
	case bands, i == 0, math.IsInf(g.upTo[i], 1), int(g.upTo[i]) == n:
		return numbered(n, noun)
	}
	return numbered(n, noun) + ", row of " + trim(g.upTo[i])
}
