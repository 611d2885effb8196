package section

import (
	"errors"
	"fmt"
	"reflect"
	"strings"

	"gopkg.in/yaml.v3"
)

// origin is the text that a document was read from, with its tree. It is never written to.
type origin struct {
	text []byte
	root *yaml.Node
}

// newOrigin parses a text of our own making.
func newOrigin(text []byte) *origin {
	root, bad := parse(text)
	if bad != nil {
		return nil
	}
	return &origin{text, root}
}

// tidied returns the origin as the YAML library would write it, which patch can always follow.
func (o *origin) tidied() *origin {
	if o == nil {
		return nil
	}
	return newOrigin([]byte(encode(o.root)))
}

// Equal tells whether two documents say the same, whatever files they came from.
func Equal(a, b *Document) bool {
	if a == b {
		return true
	}
	x, y := *a, *b
	x.origin, y.origin = nil, nil
	return reflect.DeepEqual(x, y)
}

// write tries the ways to write d from the kindest to the plainest, and takes the first whose text reads back as d.
func (f format) write(d *Document) ([]byte, error) {
	tree := f.tree(d)
	ways := []func() []byte{
		func() []byte { return d.origin.patch(tree, false) },
		func() []byte { return d.origin.tidied().patch(tree, false) },
		func() []byte { return d.origin.patch(tree, true) },
		func() []byte { return canonical(tree) },
	}
	var why string
	for _, way := range ways {
		text := way()
		if text == nil {
			continue
		}
		if len(text) > MaxBytes {
			return nil, fmt.Errorf("it would be larger than %d MB", MaxBytes>>20)
		}
		again, problems := f.read(text)
		switch {
		case len(problems) > 0:
			why = problems[0].Sentence()
		case !Equal(normal(d), normal(again)):
			why = "it would read back differently"
		default:
			return text, nil
		}
	}
	return nil, errors.New(why)
}

// tree returns d as fresh nodes.
func (f format) tree(d *Document) *yaml.Node {
	root := documentTable.node(*d)
	root.Content[1].Value = fmt.Sprint(f.version)
	return root
}

// canonical writes a tree in the form of a new file: blocks apart, each part and load on a line.
func canonical(root *yaml.Node) []byte {
	var b strings.Builder
	for i := 0; i+1 < len(root.Content); i += 2 {
		if i > 0 && root.Content[i+1].Kind != yaml.ScalarNode {
			b.WriteString("\n")
		}
		b.WriteString(encode(&yaml.Node{Kind: yaml.MappingNode, Tag: "!!map", Content: root.Content[i : i+2]}))
	}
	return []byte(b.String())
}

// normal returns d with what has two spellings in memory but one in a file brought to the file's: empty lists are nil, rows of
// the catalogue are one line.
func normal(d *Document) *Document {
	c := *d
	c.Holder.Layers = noEmpty(c.Holder.Layers)
	c.Parts = normalParts(c.Parts)
	c.Builds = mapped(c.Builds, func(b Build) Build {
		b.Holder.Layers = noEmpty(b.Holder.Layers)
		b.Parts = normalParts(b.Parts)
		return b
	})
	c.Loads = mapped(c.Loads, func(l Load) Load {
		l.NotWith = noEmpty(l.NotWith)
		return l
	})
	normalRatings(&c)
	c.Materials = noEmpty(c.Materials)
	c.StockUsed = normalRows(c.StockUsed)
	return &c
}

func normalParts(parts []Part) []Part {
	return mapped(parts, func(p Part) Part {
		p.Layers = noEmpty(p.Layers)
		return p
	})
}

// normalRows also brings rows of a group together, as they stand in a file.
func normalRows(rows []StockRow) []StockRow {
	var groups []string
	byGroup := map[string][]StockRow{}
	for _, row := range rows {
		if byGroup[row.Group] == nil {
			groups = append(groups, row.Group)
		}
		if n := rowNode(row.YAML); n != nil {
			row.YAML = rowText(n)
		}
		byGroup[row.Group] = append(byGroup[row.Group], row)
	}
	var out []StockRow
	for _, g := range groups {
		out = append(out, byGroup[g]...)
	}
	return out
}

func noEmpty[E any](s []E) []E {
	if len(s) == 0 {
		return nil
	}
	return s
}

func mapped[E any](s []E, f func(E) E) []E {
	var out []E
	for _, e := range s {
		out = append(out, f(e))
	}
	return out
}
