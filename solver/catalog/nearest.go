package catalog

import (
	"cmp"
	"slices"
	"strings"
	"unicode/utf8"

	"packrise/solver/quantity"
)

// Nearest returns up to n ids of the group ("material", "type", "wire", "holder", "metal", "conductor") that are spelt most like id.
func (c *Catalog) Nearest(group, id string, n int) []string {
	return nearest(c.order(group), id, n)
}

// order lists the ids of a group.
func (c *Catalog) order(group string) []string {
	switch group {
	case "metal":
		return c.metals.order
	case "material":
		return c.materials.order
	case "type":
		return c.types.order
	case "conductor":
		return c.conductors.order
	case "wire":
		return c.wires.order
	case "holder":
		return c.holders.order
	}
	return nil
}

// nearest returns up to n words that are spelt most like word, the most like first. Words of which more than half differs are left out,
// unless one is part of the other.
func nearest(words []string, word string, n int) []string {
	type scored struct {
		word string
		d    int
	}
	word = plainWord(word)
	var all []scored
	for _, w := range words {
		p := plainWord(w)
		d, longer := quantity.SpellingDistance(word, p), max(utf8.RuneCountInString(word), len(p))
		if len(word) > 2 && strings.Contains(p, word) || len(p) > 2 && strings.Contains(word, p) {
			d = min(d, 1+d/4)
		}
		if d <= longer/2 {
			all = append(all, scored{w, d})
		}
	}
	slices.SortStableFunc(all, func(a, b scored) int { return cmp.Compare(a.d, b.d) })
	var out []string
	for _, s := range all[:min(max(n, 0), len(all))] {
		out = append(out, s.word)
	}
	return out
}

// plainWord is a word as it is compared: small letters, hyphens for spaces and underscores.
func plainWord(s string) string {
	return strings.NewReplacer(" ", "-", "_", "-").Replace(strings.ToLower(strings.TrimSpace(s)))
}
