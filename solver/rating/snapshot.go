package rating

import (
	"slices"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

// Snapshot returns the document with stock_used set to the rows of cat that it uses (rows already saved with it win over the
// catalogue's, and rows stand behind those that they name): call it before Save, so that the design opens the same when the catalogue has moved on.
func Snapshot(d *section.Document, cat *catalog.Catalog) *section.Document {
	s, _ := open(d, cat)
	t := taker{cat: s.cat, own: s.own, seen: map[[2]string]bool{}}
	t.holder(&d.Holder)
	t.parts(d.Parts)
	if w := d.Surroundings.Wrap; w != nil {
		t.material(w.Material)
	}
	for i := range d.Builds {
		t.holder(&d.Builds[i].Holder)
		t.parts(d.Builds[i].Parts)
	}
	slices.SortStableFunc(t.rows, func(a, b section.StockRow) int {
		return slices.Index(catalog.Groups, a.Group) - slices.Index(catalog.Groups, b.Group)
	})
	return d.With(func(d *section.Document) { d.StockUsed = t.rows })
}

// taker gathers rows, each once, in the order of first use.
type taker struct {
	cat  *catalog.Catalog
	own  map[string]section.Material
	seen map[[2]string]bool
	rows []section.StockRow
}

func (t *taker) take(group, id string) {
	key := [2]string{group, id}
	if id == "" || t.seen[key] {
		return
	}
	t.seen[key] = true
	if y, ok := t.cat.Row(group, id); ok {
		t.rows = append(t.rows, section.StockRow{Group: group, ID: id, YAML: y})
	}
}

func (t *taker) material(id string) {
	if _, own := t.own[id]; !own {
		t.take("material", id)
	}
}

func (t *taker) layers(list []section.Layer) {
	for _, l := range list {
		t.material(l.Material)
	}
}

func (t *taker) holder(h *section.Holder) {
	if h.Fill == "" {
		t.material("air")
	} else {
		t.material(h.Fill)
	}
	t.layers(h.Layers)
	if row, ok := t.cat.Holder(h.Stock); ok {
		t.take("holder", h.Stock)
		t.material(row.Wall)
	}
}

func (t *taker) parts(list []section.Part) {
	for i := range list {
		p := &list[i]
		t.layers(p.Layers)
		t.take("type", p.Type)
		t.material(p.Material)
		t.material(p.Bore.Material)
		if w, ok := t.cat.Wire(p.Stock); ok {
			t.take("wire", p.Stock)
			t.take("type", w.Type)
			t.material(w.Insulation)
			t.conductor(w.Size, w.Metal, w.Class)
		}
		if c := p.Conductor; c != nil {
			metal, class := c.Metal, c.Class
			if metal == "" {
				metal = section.Copper
			}
			if class == "" {
				class = section.Stranded
			}
			t.take("metal", metal)
			t.conductor(c.Size, metal, class)
		}
	}
}

func (t *taker) conductor(size, metal, class string) {
	if size == "" {
		return
	}
	c, err := t.cat.Conductor(size, metal, class)
	if err != nil {
		return
	}
	t.take("metal", metal)
	t.take("conductor", c.Size+"/"+metal+"/"+class)
}
