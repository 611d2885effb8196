package catalog

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"
)

// sheet is one YAML document of a catalogue file:
//
//	group: holder                     # what the rows are
//	source: {standard: …, …}          # of every row, unless the row says otherwise
//	defaults: {kind: conduit, …}      # of every row
//	rows:
//	  - {id: …, …}
//
// A row's own source adds to the sheet's, key by key; one that names another standard stands alone.
type sheet struct {
	file  string
	group string
	table string // conductors come in tables as they are printed
	body  *yaml.Node
}

// groupOrder is the order in which sheets are read: what rows refer to comes first.
var groupOrder = []string{"metal", "material", "formula", "type", "conductor", "wire", "holder", "thickness"}

// sheets reads every *.yaml of dir.
func sheets(files fs.FS, dir string) ([]sheet, error) {
	names, err := fs.Glob(files, dir+"/*.yaml")
	if err != nil {
		return nil, err
	}
	var out []sheet
	for _, name := range names {
		text, err := fs.ReadFile(files, name)
		if err != nil {
			return nil, err
		}
		dec := yaml.NewDecoder(bytes.NewReader(text))
		for {
			var doc yaml.Node
			err := dec.Decode(&doc)
			if errors.Is(err, io.EOF) {
				break
			}
			if err != nil {
				return nil, fmt.Errorf("%s: %w", name, err)
			}
			s, err := newSheet(name, doc.Content[0])
			if err != nil {
				return nil, fmt.Errorf("%s: %w", name, err)
			}
			out = append(out, s)
		}
	}
	slices.SortStableFunc(out, func(a, b sheet) int {
		return slices.Index(groupOrder, a.group) - slices.Index(groupOrder, b.group)
	})
	return out, nil
}

func newSheet(file string, n *yaml.Node) (sheet, error) {
	if n.Kind != yaml.MappingNode {
		return sheet{}, fmt.Errorf("line %d: a sheet starts with group: …", n.Line)
	}
	s := sheet{file: file}
	if g := value(n, "group"); g != nil {
		s.group = g.Value
	}
	if t := value(n, "table"); t != nil {
		s.table = t.Value
	}
	if !slices.Contains(groupOrder, s.group) {
		return sheet{}, fmt.Errorf("line %d: group is %q; write %s", n.Line, s.group, orList(groupOrder))
	}
	s.body = n
	drop := []string{"group"}
	if rows := value(n, "rows"); rows != nil {
		drop = append(drop, "table", "source", "defaults")
		for i, row := range rows.Content {
			row = under(row, value(n, "defaults"))
			rows.Content[i] = withSource(row, value(n, "source"))
		}
	}
	s.body.Content = without(n.Content, drop)
	return s, nil
}

// withSource lays a row's source over the sheet's.
func withSource(row, base *yaml.Node) *yaml.Node {
	if base == nil || row.Kind != yaml.MappingNode {
		return row
	}
	own := value(row, "source")
	out := *row
	out.Content = without(row.Content, []string{"source"})
	switch {
	case own == nil:
		own = base
	case own.Kind == yaml.MappingNode && value(own, "standard") == nil:
		own = under(own, base)
	}
	out.Content = append(out.Content, &yaml.Node{Kind: yaml.ScalarNode, Tag: "!!str", Value: "source", Line: row.Line}, own)
	return &out
}

// without returns the pairs of a mapping except those of the given keys.
func without(pairs []*yaml.Node, keys []string) []*yaml.Node {
	var out []*yaml.Node
	for i := 0; i+1 < len(pairs); i += 2 {
		if !slices.Contains(keys, pairs[i].Value) {
			out = append(out, pairs[i], pairs[i+1])
		}
	}
	return out
}

// rowsOf decodes the rows of a sheet.
func rowsOf[R any](s sheet) ([]R, error) {
	var f struct {
		Rows []yaml.Node `yaml:"rows"`
	}
	if err := strict(s.body, &f); err != nil {
		return nil, err
	}
	out := make([]R, len(f.Rows))
	for i := range f.Rows {
		if err := strict(&f.Rows[i], &out[i]); err != nil {
			return nil, err
		}
	}
	return out, nil
}

// place names a sheet in an error.
func (s sheet) place(err error) error {
	return fmt.Errorf("%s: %w", strings.TrimPrefix(s.file, "catalog/"), err)
}
