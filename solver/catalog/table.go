package catalog

import (
	"fmt"
	"maps"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"
)

// rowOf is a row as YAML has it: it knows its key and makes the checked value that the rest of the program sees.
type rowOf[V any] interface {
	key() string
	build(c *Catalog) (V, error)
}

type entry[V, R any] struct {
	value V
	row   R
}

// table holds the rows of one group in the order of the files.
type table[V comparable, R rowOf[V]] struct {
	order []string
	at    map[string]*entry[V, R] // an entry never changes
}

func (t *table[V, R]) add(c *Catalog, row R) error {
	id := row.key()
	if _, twice := t.at[id]; twice {
		return fmt.Errorf("%s stands twice in the catalogue", id)
	}
	v, err := row.build(c)
	if err != nil {
		return fmt.Errorf("%s: %w", id, err)
	}
	if t.at == nil {
		t.at = map[string]*entry[V, R]{}
	}
	t.at[id] = &entry[V, R]{v, row}
	t.order = append(t.order, id)
	return nil
}

func (t *table[V, R]) addAll(c *Catalog, rows []R) error {
	for _, row := range rows {
		if err := t.add(c, row); err != nil {
			return err
		}
	}
	return nil
}

func (t *table[V, R]) get(id string) (V, bool) {
	e, ok := t.at[id]
	if !ok {
		var none V
		return none, false
	}
	return e.value, true
}

func (t *table[V, R]) list() []V {
	out := make([]V, len(t.order))
	for i, id := range t.order {
		out[i] = t.at[id].value
	}
	return out
}

func (t *table[V, R]) yaml(id string) (string, bool) {
	e, ok := t.at[id]
	if !ok {
		return "", false
	}
	text, err := yaml.Marshal(e.row)
	if err != nil {
		panic("catalog: a row can't be written")
	}
	return string(text), true
}

// with puts the row in text in the place of id; words takes out of a value what doesn't count as a change. The table shares nothing that
// changes with the one it came from.
func (t *table[V, R]) with(c *Catalog, id, text string, words func(*V)) (changed bool, err error) {
	var doc yaml.Node
	if err := yaml.Unmarshal([]byte(text), &doc); err != nil {
		return false, fmt.Errorf("%s is not YAML: %s", id, strings.TrimPrefix(err.Error(), "yaml: "))
	}
	if doc.Kind != yaml.DocumentNode {
		return false, fmt.Errorf("%s is empty", id)
	}
	var row R
	if err := strict(doc.Content[0], &row); err != nil {
		return false, fmt.Errorf("%s: %w", id, err)
	}
	if row.key() != id {
		return false, fmt.Errorf("%s: the row in its place calls itself %q", id, row.key())
	}
	v, err := row.build(c)
	if err != nil {
		return false, fmt.Errorf("%s: %w", id, err)
	}
	old, known := t.get(id)
	t.at = maps.Clone(t.at)
	if !known {
		t.order = append(slices.Clone(t.order), id)
	}
	t.at[id] = &entry[V, R]{v, row}
	words(&v)
	words(&old)
	return !known || v != old, nil
}
