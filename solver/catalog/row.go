package catalog

import "fmt"

// Row returns a row as one YAML mapping, for stock_used. Groups: "material", "type", "wire", "holder", "metal", "conductor"
// (id "12 AWG/copper/stranded").
func (c *Catalog) Row(group, id string) (yaml string, ok bool) {
	switch group {
	case "metal":
		return c.metals.yaml(id)
	case "material":
		return c.materials.yaml(id)
	case "type":
		return c.types.yaml(id)
	case "conductor":
		return c.conductors.yaml(id)
	case "wire":
		return c.wires.yaml(id)
	case "holder":
		return c.holders.yaml(id)
	}
	return "", false
}

// With returns a catalogue in which the given row stands in place of the catalogue's own; changed tells whether they differ in more than name and
// source. Rows that others refer to go first, in the order of Groups. The error is one sentence.
func (c *Catalog) With(group, id, yaml string) (cat *Catalog, changed bool, err error) {
	out := *c
	switch group {
	case "metal":
		changed, err = out.metals.with(c, id, yaml, func(v *Metal) { v.Name, v.Source = "", Source{} })
	case "material":
		changed, err = out.materials.with(c, id, yaml, func(v *Material) { v.Name, v.Source = "", Source{} })
	case "type":
		changed, err = out.types.with(c, id, yaml, func(v *WireType) { v.Name, v.Source = "", Source{} })
	case "conductor":
		changed, err = out.conductors.with(c, id, yaml, func(v *Conductor) { v.Source = Source{} })
		if len(out.conductors.order) > len(c.conductors.order) {
			out.listSizes()
		}
	case "wire":
		changed, err = out.wires.with(c, id, yaml, func(v *Wire) { v.Name, v.Source, v.Own.Source = "", Source{}, Source{} })
	case "holder":
		changed, err = out.holders.with(c, id, yaml, func(v *Holder) { v.Name, v.Source = "", Source{} })
	default:
		err = fmt.Errorf("%q is not a group of the catalogue; write %s", group, orList(Groups))
	}
	if err != nil {
		return c, false, err
	}
	return &out, changed, nil
}
