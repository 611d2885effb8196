package catalog

import (
	"cmp"
	"fmt"
	"io/fs"
	"slices"
	"strings"
	"sync"

	"packrise/assets"
	"packrise/solver/quantity"
)

// Groups of rows that Row and With know, in the order in which saved rows go over a catalogue: what a row refers to comes
// before it.
var Groups = []string{"metal", "material", "type", "conductor", "wire", "holder"}

// Catalog is the whole look-up. It is immutable.
type Catalog struct {
	metals     table[Metal, metalRow]
	materials  table[Material, materialRow]
	types      table[WireType, typeRow]
	conductors table[Conductor, conductorRow]
	wires      table[Wire, wireRow]
	holders    table[Holder, holderRow]
	sizes      [2][]quantity.Size // of the conductors, thin first: mm², then AWG and kcmil
	formula    formula
	thickness  map[string]steps  // by wire type
	aliases    map[string]string // other names of wire types
}

// Load reads and checks every file of the embedded catalogue, once: every call returns the same one. It panics on a bad file: the
// loader test keeps that from shipping.
func Load() *Catalog { return load() }

var load = sync.OnceValue(func() *Catalog {
	c, err := read(assets.Catalog, "catalog")
	if err != nil {
		panic("catalog: " + err.Error())
	}
	return c
})

// read reads and checks a catalogue.
func read(files fs.FS, dir string) (*Catalog, error) {
	list, err := sheets(files, dir)
	if err != nil {
		return nil, err
	}
	c := &Catalog{thickness: map[string]steps{}, aliases: map[string]string{}}
	for _, s := range list {
		if err := c.take(s); err != nil {
			return nil, s.place(err)
		}
	}
	c.sortWires()
	return c, nil
}

// take adds the rows of a sheet.
func (c *Catalog) take(s sheet) error {
	switch s.group {
	case "metal":
		return add(c, &c.metals, s)
	case "material":
		return add(c, &c.materials, s)
	case "holder":
		return add(c, &c.holders, s)
	case "type":
		if err := add(c, &c.types, s); err != nil {
			return err
		}
		return c.readAliases()
	case "formula":
		if err := strict(s.body, &c.formula); err != nil {
			return err
		}
		return c.formula.check()
	case "conductor":
		return c.takeConductors(s)
	case "wire":
		return c.takeWires(s)
	}
	return c.takeThickness(s)
}

func add[V comparable, R rowOf[V]](c *Catalog, t *table[V, R], s sheet) error {
	rows, err := rowsOf[R](s)
	if err != nil {
		return err
	}
	return t.addAll(c, rows)
}

func (c *Catalog) takeConductors(s sheet) error {
	var f interface {
		rows(*Catalog) ([]conductorRow, error)
	}
	switch s.table {
	case "iec":
		f = &iecFile{}
	case "awg":
		f = &awgFile{}
	default:
		return fmt.Errorf("table is %q; write iec or awg", s.table)
	}
	if err := strict(s.body, f); err != nil {
		return err
	}
	rows, err := f.rows(c)
	if err != nil {
		return err
	}
	if err := c.conductors.addAll(c, rows); err != nil {
		return err
	}
	c.listSizes()
	return nil
}

func (c *Catalog) takeWires(s sheet) error {
	sizes, err := rowsOf[wireSheetRow](s)
	if err != nil {
		return err
	}
	for _, r := range sizes {
		rows, err := r.rows(c)
		if err != nil {
			return fmt.Errorf("%s: %w", r.Size, err)
		}
		if err := c.wires.addAll(c, rows); err != nil {
			return err
		}
	}
	return nil
}

func (c *Catalog) takeThickness(s sheet) error {
	rows, err := rowsOf[thicknessRow](s)
	if err != nil {
		return err
	}
	for _, r := range rows {
		st, err := r.steps()
		if err != nil {
			return fmt.Errorf("%s: %w", strings.Join(r.Types, ", "), err)
		}
		for _, id := range r.Types {
			var k check
			c.refers(&k, "types", "type", id)
			if _, twice := c.thickness[id]; twice {
				k.fail("%s has its thickness twice", id)
			}
			if k.err != nil {
				return k.err
			}
			c.thickness[id] = st
		}
	}
	return nil
}

func (c *Catalog) readAliases() error {
	for _, id := range c.types.order {
		for _, a := range c.types.at[id].row.Aliases {
			if other, taken := c.aliases[a]; taken && other != id {
				return fmt.Errorf("%s and %s are both called %s", id, other, a)
			}
			c.aliases[a] = id
		}
	}
	return nil
}

// sortWires puts the wires in the order of their types, and each type's from thin to thick.
func (c *Catalog) sortWires() {
	type place struct {
		typ  int
		area float64
	}
	at := make(map[string]place, len(c.wires.order))
	for _, id := range c.wires.order {
		w, _ := c.wires.get(id)
		at[id] = place{slices.Index(c.types.order, w.Type), parsed(w.Size).AreaMM2()}
	}
	slices.SortStableFunc(c.wires.order, func(a, b string) int {
		return cmp.Or(cmp.Compare(at[a].typ, at[b].typ), cmp.Compare(at[a].area, at[b].area))
	})
}

// parsed reads a size of the catalogue, which is known to be good.
func parsed(size string) quantity.Size {
	s, err := quantity.ParseSize(size)
	if err != nil {
		panic("catalog: a checked size can't be read")
	}
	return s
}

// refers wants id in a group.
func (c *Catalog) refers(k *check, key, group, id string) {
	if k.err != nil || slices.Contains(c.order(group), id) {
		return
	}
	near := c.Nearest(group, id, 2)
	if len(near) == 0 {
		near = c.order(group)
	}
	k.fail("%s is %q, which the catalogue doesn't have; write %s", key, id, orList(near))
}
