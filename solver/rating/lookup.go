package rating

import (
	"fmt"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

// shelf is the catalogue as one document sees it: rows saved with the document come before the catalogue's own, and the document's
// materials before both.
type shelf struct {
	cat   *catalog.Catalog
	own   map[string]section.Material
	notes []string
	vary  Vary
}

// open lays the document's rows over the catalogue.
func open(d *section.Document, cat *catalog.Catalog) (shelf, []section.Problem) {
	s := shelf{cat: cat, own: make(map[string]section.Material, len(d.Materials))}
	for _, m := range d.Materials {
		s.own[m.Name] = m
	}
	var problems []section.Problem
	for _, row := range d.StockUsed {
		with, changed, err := s.cat.With(row.Group, row.ID, row.YAML)
		if err != nil {
			problems = append(problems, section.Problem{
				Rule: "stock-row", IDs: []string{row.ID}, Key: "stock_used." + row.Group + "." + row.ID,
				What: fmt.Sprintf("the saved row %s %s can't be used: %v", row.Group, row.ID, err),
				Do:   "mend it, or take it out to use the catalogue's own",
			})
			continue
		}
		s.cat = with
		if changed {
			s.notes = append(s.notes, fmt.Sprintf("the catalogue's row for %s has changed since this design was saved; the saved row is used", row.ID))
		}
	}
	return s, problems
}

// material finds a material by name; the problem names the nearest ones.
func (s shelf) material(name, id, key string) (material, *section.Problem) {
	if m, ok := s.own[name]; ok {
		return s.vary.material(name, ownMaterial(m)), nil
	}
	m, ok := s.cat.Material(name)
	if !ok {
		p := unknown("material", name, id, key, s.cat.Nearest("material", name, 3))
		p.Do += "; or describe it under `materials`"
		return material{}, &p
	}
	out := material{
		name: m.Name, k: m.K.V, gas: m.Gas, metal: m.Family == "metal" || m.K.V > 5, source: m.Source.Text,
		emissivity: m.Emissivity.V, absorptivity: m.Absorptivity,
	}
	if m.LimitC.Low > 0 {
		out.limitC, out.usualC = section.Some(m.LimitC.Low), section.Some(m.LimitC.V)
	}
	return s.vary.material(name, out), nil
}

// Defaults of a material that says nothing else: plastics and paint, bright metal.
const (
	usualEmissivity  = 0.9
	brightEmissivity = 0.08
	usualAbsorbed    = 0.9
)

func ownMaterial(m section.Material) material {
	out := material{name: m.Name, k: m.KWMK, gas: m.Gas, metal: !m.Gas && m.KWMK > 5, limitC: m.LimitC, usualC: m.LimitC, source: m.Source}
	usual := usualEmissivity
	if out.metal {
		usual = brightEmissivity
	}
	out.emissivity, out.assumed = m.Emissivity.Or(usual), !m.Emissivity.OK
	out.absorptivity = m.Absorptivity.Or(usualAbsorbed)
	return out
}

// unknown returns the problem of a name that the catalogue lacks.
func unknown(group, name, id, key string, near []string) section.Problem {
	p := section.Problem{
		Rule: "unknown-" + group, IDs: []string{id}, Key: key,
		What: fmt.Sprintf("%s: %s %q is not in the catalogue", subject(id), group, name),
		Do:   "choose one that is",
	}
	if len(near) > 0 {
		p.Do = "write " + strings.Join(near, " or ")
	}
	return p
}

// subject names a part in a sentence; the holder has no id.
func subject(id string) string {
	if id == "" {
		return "the holder"
	}
	return id
}

// medium finds what fills a space; "" is air.
func (s shelf) medium(name, id, key string) (medium, *section.Problem) {
	if name == "" || name == "air" {
		if _, own := s.own["air"]; !own {
			return medium{id: "air", air: true, gas: true}, nil
		}
		name = "air"
	}
	m, p := s.material(name, id, key)
	return medium{id: name, gas: m.gas, k: m.k}, p
}
