package catalog

import (
	"fmt"
	"math"
	"regexp"
	"slices"
	"strings"

	"packrise/solver/quantity"
)

// Words that begin a rod and what it is of unless a material is named.
var rodWords = map[string]string{"filler": "filler", "rod": "polypropylene", "hose": "pur"}

var hoseSizes = regexp.MustCompile(`^([\d.]+) ?[x/] ?([\d.]+)$`)

// rodWord returns the place of the word that makes it a rod, -1 if none does.
func rodWord(words []string) int {
	return slices.IndexFunc(words, func(w string) bool { return rodWords[w] != "" })
}

// parseRod reads "filler 4", "rod 1/4 in polypropylene", "hose 8", "hose 8/5".
func (c *Catalog) parseRod(words []string) (Parsed, error) {
	i := rodWord(words)
	what := words[i]
	p := Parsed{Material: rodWords[what], Hose: what == "hose"}
	var size []string
	for k, w := range words {
		if _, ok := c.Material(w); ok && k != i {
			p.Material = w
		} else if k != i {
			size = append(size, w)
		}
	}
	m, _ := c.Material(p.Material)
	if m.Gas {
		return Parsed{}, fmt.Errorf("a %s can't be of %s, which is a gas; write for example %q", what, m.Name, what+" 4 polypropylene")
	}
	assumed, err := p.rodSize(what, strings.Join(size, " "))
	if err != nil {
		return Parsed{}, err
	}
	p.Meant = rodMeant(what, m, p, assumed)
	return p, nil
}

// rodSize reads the diameter, and a hose's bore; assumed says so where the bore is the usual one.
func (p *Parsed) rodSize(what, text string) (assumed string, err error) {
	if text == "" {
		return "", fmt.Errorf("the diameter is missing; write for example %q", what+" 4")
	}
	both := hoseSizes.FindStringSubmatch(text)
	if p.Hose && both != nil {
		if p.BoreMM, err = quantity.ParseNumber(both[2]); err != nil {
			return "", err
		}
		text = both[1]
	}
	d, err := quantity.ParseLength(text, quantity.Millimetre)
	if err != nil {
		return "", fmt.Errorf("%q is no diameter; write for example %q", text, what+" 4")
	}
	if d < 0.1 || d > 500 {
		return "", fmt.Errorf("a %s of %s mm is outside what a section holds, 0.1 to 500 mm; write for example %q", what, quantity.Trimmed(d, 3), what+" 4")
	}
	if p.Hose && both == nil {
		p.BoreMM, assumed = usualBore(d), " (assumed)"
	}
	if p.Hose && (p.BoreMM <= 0 || p.BoreMM >= d) {
		return "", fmt.Errorf("a bore of %s mm does not fit into a hose of %s mm; write outside then bore, for example \"hose 8/5\"", quantity.Trimmed(p.BoreMM, 3), quantity.Trimmed(d, 3))
	}
	p.RodMM = d
	return assumed, nil
}

func rodMeant(what string, m Material, p Parsed, assumed string) string {
	switch {
	case p.Hose:
		return fmt.Sprintf("hose of %s, ⌀ %s mm, bore %s mm%s", m.Name, quantity.Trimmed(p.RodMM, 2), quantity.Trimmed(p.BoreMM, 2), assumed)
	case what == "filler" && m.ID != "filler":
		return fmt.Sprintf("filler of %s, ⌀ %s mm", m.Name, quantity.Trimmed(p.RodMM, 2))
	case what == "filler":
		return fmt.Sprintf("filler, ⌀ %s mm", quantity.Trimmed(p.RodMM, 2))
	}
	return fmt.Sprintf("rod of %s, ⌀ %s mm", m.Name, quantity.Trimmed(p.RodMM, 2))
}

// usualBore is about 0.65 of the outside in half millimetres, as in hoses 4/2.5, 6/4, 8/5, 10/6.5 and 12/8 (common practice, no
// source).
func usualBore(d float64) float64 {
	if b := math.Round(1.3*d) / 2; b > 0 && b < d {
		return b
	}
	return 0.65 * d
}
