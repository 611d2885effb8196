package rules

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"packrise/solver/quantity"
)

// share is one factor for lying together.
type share struct {
	kind          string
	f             float64
	label, clause string
	memory        bool
}

// together returns the factors for what lies together with a conductor; why tells why the rule has none.
func (u rule) together(r Run, c Conductor, method string, count Count) (out []share, why string) {
	n, noun := count.N, countNoun[u.counting.of]
	if u.counting.diversityFrom > 0 {
		n = count.Total
	}
	first, why := u.factorFor(r, c, method, n, noun)
	if why != "" {
		return nil, why
	}
	out = append(out, first)
	if from := u.counting.diversityFrom; from > 0 && n >= from {
		f := math.Min(1, math.Sqrt(0.5*float64(n)/float64(max(count.N, 1))))
		out = append(out, share{StepVariant, f, fmt.Sprintf("√(0.5 × %d/%d), at most 1, %d of %d loaded at once", n, count.N, count.N, n), u.name, true})
	}
	if g := u.counting.cablesTogether; g != nil && r.Holder.Kind == OpenBundle {
		f, label, why := g.pick(r.cables(), "cable")
		if why != "" {
			return nil, why
		}
		out = append(out, share{StepCount, f, label + " bunched", g.name, g.memory})
	}
	return out, ""
}

// cables is the number of cables that hold conductors of the run.
func (r Run) cables() int {
	var ids []string
	for _, c := range r.Conductors {
		if c.Cable != "" && !slices.Contains(ids, c.Cable) {
			ids = append(ids, c.Cable)
		}
	}
	return len(ids)
}

// factorFor is the factor for n of what the rule counts.
func (u rule) factorFor(r Run, c Conductor, method string, n int, noun string) (s share, why string) {
	k := u.counting
	switch {
	case k.nipplesFree != "" && r.Holder.nipple():
		return share{StepCount, 1, "a nipple of 24 in (600 mm) at most, " + numbered(n, noun) + " without a factor", k.nipplesFree, false}, ""
	case k.apartFree != "" && (r.Holder.Kind == Apart || r.Holder.Kind == Single):
		return share{StepCount, 1, "lying apart, without a factor", k.apartFree, false}, ""
	case k.freeUpTo > 0 && n <= k.freeUpTo:
		return share{StepCount, 1, fmt.Sprintf("%s, no factor up to %d", numbered(n, noun), k.freeUpTo), k.freeClause, false}, ""
	case k.mixedSizes != "" && n > 1 && u.mixed(r):
		return share{StepCount, 1 / math.Sqrt(float64(n)), fmt.Sprintf("1/√%d, %s of mixed sizes", n, numbered(n, noun)), k.mixedSizes, true}, ""
	}
	g := u.grouping(r, method)
	if g == nil {
		return s, fmt.Sprintf("%s has no factors for method %s", u.name, method)
	}
	if g.largest != (quantity.Size{}) && c.Size.Compare(g.largest) > 0 {
		return s, fmt.Sprintf("%s is for conductors up to %s; nothing is extrapolated", g.name, g.largest.Pretty())
	}
	f, label, why := g.pick(n, noun)
	if why != "" {
		return s, why
	}
	clause := g.name
	if k.freeClause != "" {
		clause = k.freeClause + " and " + strings.TrimPrefix(g.name, "NEC ")
	}
	return share{StepCount, f, label, clause, g.memory}, ""
}

// grouping is the table for an arrangement and method.
func (u rule) grouping(r Run, method string) *groupings {
	arrangement := wordOr(r.Arrangement, bunched)
	for _, g := range u.counting.tables {
		if (g.arrangement == "" || g.arrangement == arrangement) && (len(g.methods) == 0 || slices.Contains(g.methods, method)) {
			return g
		}
	}
	return nil
}

// mixed tells whether the loaded conductors in one conduit or trunking span more than three neighbouring standard sizes.
func (u rule) mixed(r Run) bool {
	if r.Holder.Kind != Conduit && r.Holder.Kind != Wireway {
		return false
	}
	return u.span(r) > 3
}

// span is the number of neighbouring standard sizes from the thinnest to the thickest conductor that can carry current.
func (u rule) span(r Run) int {
	low, high := math.MaxInt, -1
	for _, c := range r.Conductors {
		if c.Role == Earth || c.Role == Signal {
			continue
		}
		i := slices.IndexFunc(standardMM2, func(mm2 float64) bool { return mm2 >= c.areaMM2()-1e-6 })
		if i < 0 {
			i = len(standardMM2)
		}
		low, high = min(low, i), max(high, i)
	}
	return max(0, high-low+1)
}

// standardMM2 are the sizes of IEC 60228.
var standardMM2 = []float64{0.5, 0.75, 1, 1.5, 2.5, 4, 6, 10, 16, 25, 35, 50, 70, 95, 120, 150, 185, 240, 300, 400, 500, 630, 800, 1000}

func (c Conductor) areaMM2() float64 {
	if c.Size == (quantity.Size{}) {
		return c.AreaMM2
	}
	return c.Size.AreaMM2()
}

func (c Conductor) american() bool {
	return c.Size.Kind() == quantity.AWG || c.Size.Kind() == quantity.Kcmil
}
