package catalog

import (
	"fmt"
	"regexp"
	"slices"
	"strings"

	"packrise/solver/quantity"
)

var (
	metalWords = map[string]string{
		"copper": "copper", "cu": "copper", "tinned": "tinned-copper", "tinned-copper": "tinned-copper",
		"aluminium": "aluminium", "aluminum": "aluminium", "al": "aluminium", "alu": "aluminium",
	}
	classWords = map[string]string{Solid: Solid, Stranded: Stranded, Flexible: Flexible, "fine": Flexible, "flex": Flexible}

	glued      = regexp.MustCompile(`^(#?\d[\d./]*)([a-z].*)$`)
	sizeUnit   = regexp.MustCompile(`^(awg|kcmil|mcm|mm2|mm|sqmm|qmm|sq|ga|gauge|#)$`)
	sizeNumber = regexp.MustCompile(`^#?\d[\d./]*$`)
)

// parseWire reads size and type in either order, with class and metal anywhere.
func (c *Catalog) parseWire(words []string) (Parsed, error) {
	if w, ok := c.Wire(strings.Join(words, "-")); ok {
		return c.finished(w), nil
	}
	p := Parsed{}
	var rest []string
	for _, w := range words {
		switch {
		case metalWords[w] != "":
			p.Metal = metalWords[w]
		case classWords[w] != "":
			p.Class = classWords[w]
		default:
			rest = append(rest, w)
		}
	}
	t, size, ok := c.takeType(rest)
	if !ok {
		return Parsed{}, c.noType(words, rest)
	}
	if len(size) == 0 {
		return Parsed{}, fmt.Errorf(`the size is missing in %q; write it as well, for example %q`, strings.Join(words, " "), sizeExample(t)+" "+t.ID)
	}
	s, err := sizeFor(t, strings.Join(size, " "))
	if err != nil {
		return Parsed{}, err
	}
	p.Type, p.Size = t.ID, s.String()
	if p.Metal == "" {
		p.Metal = t.Metal
	}
	if p.Class == "" {
		p.Class = t.Class
	}
	return c.wireMeant(p, t, s)
}

// takeType finds the words that name a wire type, the longest run first, and returns the others.
func (c *Catalog) takeType(words []string) (t WireType, rest []string, ok bool) {
	if t, rest, ok = c.takeTypeOf(words); ok {
		return t, rest, ok
	}
	var apart []string
	for _, w := range words {
		if m := glued.FindStringSubmatch(w); m != nil {
			apart = append(apart, m[1], m[2])
		} else {
			apart = append(apart, w)
		}
	}
	return c.takeTypeOf(apart)
}

// takeTypeOf prefers the longest run of words that leaves something for the size: "thw 2" is 2 AWG THW.
func (c *Catalog) takeTypeOf(words []string) (t WireType, rest []string, ok bool) {
	for n := len(words); n > 0; n-- {
		for i := 0; i+n <= len(words); i++ {
			found, known := c.typeNamed(strings.Join(words[i:i+n], ""))
			if !known {
				continue
			}
			if n < len(words) {
				return found, slices.Concat(words[:i], words[i+n:]), true
			}
			t, ok = found, true
		}
	}
	return t, nil, ok
}

// typeNamed returns a wire type by its id or other name, hyphens and spaces left out.
func (c *Catalog) typeNamed(word string) (WireType, bool) {
	word = squash(word)
	for _, id := range c.types.order {
		if squash(id) == word {
			return c.WireType(id)
		}
	}
	for alias, id := range c.aliases {
		if squash(alias) == word {
			return c.WireType(id)
		}
	}
	return WireType{}, false
}

// noType says that a wire type is missing or not known.
func (c *Catalog) noType(words, rest []string) error {
	text := strings.Join(words, " ")
	for _, w := range rest {
		if m := glued.FindStringSubmatch(w); m != nil {
			w = m[2]
		}
		if sizeUnit.MatchString(w) || sizeNumber.MatchString(w) {
			continue
		}
		near := c.Nearest("type", w, 3)
		if len(near) == 0 {
			return fmt.Errorf("%q is not understood; %s", text, examples)
		}
		return fmt.Errorf(`%q is no wire type; %s, as in %q`, w, nearestAre(near), "3x 12 "+near[0])
	}
	return fmt.Errorf("%q names no wire type; write it as well, for example %q", text, strings.Join(rest, " ")+" thhn")
}

func sizeExample(t WireType) string {
	if t.American {
		return "12"
	}
	return "2.5"
}

var wholeNumber = regexp.MustCompile(`^\d+$`)

// sizeFor reads a size in which the unit may be missing: the type's trade tells what a bare number means.
func sizeFor(t WireType, text string) (quantity.Size, error) {
	s, err := quantity.ParseSize(text)
	if err == nil {
		return s, nil
	}
	if _, bad := quantity.ParseNumber(text); bad != nil {
		return s, err
	}
	unit := " mm2"
	if t.American && wholeNumber.MatchString(text) {
		unit = " AWG"
		if n, bad := quantity.ParseNumber(text); bad == nil && n >= 250 {
			unit = " kcmil"
		}
	}
	return quantity.ParseSize(text + unit)
}

// finished is a listed wire by its id.
func (c *Catalog) finished(w Wire) Parsed {
	t, _ := c.WireType(w.Type)
	return Parsed{
		Wire: w.ID, Size: w.Size, Metal: w.Metal, Class: w.Class, Type: w.Type,
		Meant: fmt.Sprintf("%s %s, ⌀ %s mm", parsed(w.Size).Pretty(), t.Name, quantity.Fixed(w.DiameterM*1e3, 2)),
	}
}

// wireMeant completes a wire: the listed one, or its conductor with the usual thickness of insulation.
func (c *Catalog) wireMeant(p Parsed, t WireType, s quantity.Size) (Parsed, error) {
	if w, ok := c.wireOf(s, t.ID); ok && w.Metal == p.Metal && w.Class == p.Class {
		return c.finished(w), nil
	}
	metal, ok := c.conductors.get(conductorID(p.Size, p.Metal, p.Class))
	if !ok {
		near := c.nearestSizes(s, p.Metal, p.Class)
		if len(near) == 0 {
			return Parsed{}, fmt.Errorf("no table here has %s %s conductors in %s sizes; leave out %q or %q", p.Class, p.Metal, system(s), p.Class, p.Metal)
		}
		return Parsed{}, noSize(s, p.Metal, p.Class, near, fmt.Sprintf("write for example %q", near[0]+" "+t.ID))
	}
	m, _ := c.Metal(p.Metal)
	p.Meant = fmt.Sprintf("%s %s %s %s", s.Pretty(), p.Class, m.Name, t.Name)
	if th, _, ok := c.TypicalWire(p.Size, t.ID); ok {
		p.Meant += fmt.Sprintf(", ⌀ %s mm by the usual insulation", quantity.Fixed((metal.DiameterM+2*th)*1e3, 2))
	} else {
		p.Meant += ", thickness of insulation not known"
	}
	return p, nil
}
