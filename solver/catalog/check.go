package catalog

import (
	"fmt"
	"math"
	"regexp"
	"slices"
	"strings"

	"packrise/solver/quantity"
)

// check collects the first thing that is wrong with a row.
type check struct{ err error }

func (c *check) fail(format string, args ...any) {
	if c.err == nil {
		c.err = fmt.Errorf(format, args...)
	}
}

// within wants a finite number between two bounds, which are bounds of the plausible.
func (c *check) within(key string, v, low, high float64) {
	if math.IsNaN(v) || v < low || v > high {
		c.fail("%s is %g, which is not between %g and %g", key, v, low, high)
	}
}

// span wants a range in order, all of it between two bounds.
func (c *check) span(key string, r spanRow, low, high float64) {
	c.within(key, r.Low, low, high)
	c.within(key, r.V, low, high)
	c.within(key, r.High, low, high)
	if r.Low > r.V || r.V > r.High {
		c.fail("%s has low %g, v %g, high %g, which are not in order", key, r.Low, r.V, r.High)
	}
}

func (c *check) word(key, v string, words ...string) {
	if !slices.Contains(words, v) {
		c.fail("%s is %q; write %s", key, v, orList(words))
	}
}

var idForm = regexp.MustCompile(`^[a-z][a-z0-9]*([-./][a-z0-9]+)*$`)

func (c *check) id(v string) {
	if !idForm.MatchString(v) {
		c.fail("%q is not an id; write small letters, digits and hyphens", v)
	}
}

func (c *check) name(v string) {
	if strings.TrimSpace(v) == "" {
		c.fail("name is missing")
	}
}

// sources wants a standard with edition and clause, or a standard that is marked as recalled.
func (c *check) sources(s sourceRow) {
	switch {
	case s.Standard == "":
		c.fail("source.standard is missing; write where the numbers come from")
	case !s.FromMemory && (s.Edition == "" || s.Clause == ""):
		c.fail("source needs edition and clause, or from_memory: true")
	}
}

// size wants a conductor size in canonical form.
func (c *check) size(v string) quantity.Size {
	s, err := quantity.ParseSize(v)
	switch {
	case err != nil:
		c.fail("size: %w", err)
	case s.String() != v:
		c.fail("size is %q; write %q", v, s.String())
	}
	return s
}

// orList joins words as in "a, b or c", andList as in "a, b and c".
func orList(words []string) string { return list(words, " or ") }

func andList(words []string) string { return list(words, " and ") }

// nearestAre is "the nearest is a" or "the nearest are a and b".
func nearestAre(words []string) string {
	if len(words) == 1 {
		return "the nearest is " + words[0]
	}
	return "the nearest are " + andList(words)
}

func list(words []string, last string) string {
	if len(words) < 2 {
		return strings.Join(words, "")
	}
	return strings.Join(words[:len(words)-1], ", ") + last + words[len(words)-1]
}
