package catalog

import (
	"fmt"
	"reflect"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"
)

// strict decodes a mapping into a struct and refuses keys that the struct doesn't have.
func strict(n *yaml.Node, out any) error {
	if err := knownKeys(n, reflect.TypeOf(out).Elem()); err != nil {
		return err
	}
	if err := n.Decode(out); err != nil {
		return fmt.Errorf("line %d: %s", n.Line, strings.ReplaceAll(strings.TrimPrefix(err.Error(), "yaml: "), "\n", " "))
	}
	return nil
}

var unmarshaler = reflect.TypeFor[yaml.Unmarshaler]()

func knownKeys(n *yaml.Node, t reflect.Type) error {
	if t.Kind() == reflect.Pointer {
		t = t.Elem()
	}
	if t.Kind() == reflect.Slice && n.Kind == yaml.SequenceNode {
		for _, item := range n.Content {
			if err := knownKeys(item, t.Elem()); err != nil {
				return err
			}
		}
		return nil
	}
	if t == reflect.TypeFor[yaml.Node]() || t.Kind() != reflect.Struct || reflect.PointerTo(t).Implements(unmarshaler) {
		return nil // the type checks itself
	}
	if n.Kind != yaml.MappingNode {
		return fmt.Errorf("line %d: a mapping of key: value is needed here", n.Line)
	}
	fields := map[string]reflect.Type{}
	var names []string
	for i := range t.NumField() {
		name, _, _ := strings.Cut(t.Field(i).Tag.Get("yaml"), ",")
		fields[name] = t.Field(i).Type
		names = append(names, name)
	}
	for i := 0; i+1 < len(n.Content); i += 2 {
		key := n.Content[i]
		ft, ok := fields[key.Value]
		if !ok {
			return fmt.Errorf("line %d: unknown key %q, the nearest is %s", key.Line, key.Value, strings.Join(nearest(names, key.Value, 1), ""))
		}
		if err := knownKeys(n.Content[i+1], ft); err != nil {
			return err
		}
	}
	return nil
}

// value returns the value of a key in a mapping, nil if it isn't there.
func value(n *yaml.Node, key string) *yaml.Node {
	for i := 0; i+1 < len(n.Content); i += 2 {
		if n.Content[i].Value == key {
			return n.Content[i+1]
		}
	}
	return nil
}

// under returns the mapping with the pairs of base that it lacks.
func under(n, base *yaml.Node) *yaml.Node {
	if base == nil || base.Kind != yaml.MappingNode || n.Kind != yaml.MappingNode {
		return n
	}
	out := *n
	out.Content = slices.Clone(n.Content)
	for i := 0; i+1 < len(base.Content); i += 2 {
		if value(n, base.Content[i].Value) == nil {
			out.Content = append(out.Content, base.Content[i], base.Content[i+1])
		}
	}
	return &out
}
