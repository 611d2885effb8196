package section

import (
	"fmt"
	"strings"

	"gopkg.in/yaml.v3"

	"packrise/solver/quantity"
)

// inline is a table's codec that is written on one line.
type inline[T any] struct{ *table[T] }

func (c inline[T]) node(v T) *yaml.Node {
	n := c.table.node(v)
	n.Style = yaml.FlowStyle
	return n
}

const unknownWord = "unknown"

// currentField is the key current_a of a load, which takes a number or the word unknown.
func currentField() field[Load] {
	number := optNumber{notNegative}
	return field[Load]{
		key: "current_a",
		read: func(r *report, n *yaml.Node, at path, l *Load) {
			switch {
			case n.Kind == yaml.ScalarNode && n.Value == unknownWord:
				l.Unknown = true
			case n.Kind == yaml.ScalarNode && n.ShortTag() == "!!str" && nearest(n.Value, []string{unknownWord}) != "":
				r.add(at, "wrong-type", "¤ holds "+show(n.Value)+" where a number belongs", "write a number, or the word unknown")
			default:
				l.CurrentA = number.read(r, n, at)
			}
		},
		node: func(l *Load) *yaml.Node {
			if l.Unknown {
				return textNode(unknownWord)
			}
			return number.node(l.CurrentA)
		},
		check: func(r *report, l *Load, at path) { number.check(r, l.CurrentA, at) },
	}
}

// sizeCodec is the codec of a conductor size, kept as the person wrote it.
type sizeCodec struct{ text }

func (c sizeCodec) check(r *report, v string, at path) {
	if v == "" {
		return
	}
	if _, err := quantity.ParseSize(v); err != nil {
		what, do, _ := strings.Cut(clean(err.Error()), "; ")
		r.add(at, "bad-size", "¤: "+what, do)
	}
}

// stockCodec is the codec of stock_used: group → id → row.
type stockCodec struct{}

func (stockCodec) read(r *report, n *yaml.Node, at path) []StockRow {
	if isNull(n) || !isKind(r, n, at, yaml.MappingNode, "take it out: it is written anew on the next save") {
		return nil
	}
	var out []StockRow
	pairs(r, n, at, func(group, rows *yaml.Node) {
		at := at.key(group.Value)
		if !isKind(r, rows, at, yaml.MappingNode, "take it out: it is written anew on the next save") {
			return
		}
		pairs(r, rows, at, func(id, row *yaml.Node) {
			if isKind(r, row, at.key(id.Value), yaml.MappingNode, "take it out: it is written anew on the next save") {
				checkKeys(r, row, at.key(id.Value))
				out = append(out, StockRow{group.Value, id.Value, rowText(row)})
			}
		})
	})
	return out
}

// checkKeys reports keys that stand twice at any depth of a row, whose own keys are the catalogue's business.
func checkKeys(r *report, n *yaml.Node, at path) {
	if n.Kind == yaml.MappingNode {
		pairs(r, n, at, func(*yaml.Node, *yaml.Node) {})
	}
	for _, c := range n.Content {
		checkKeys(r, c, at)
	}
}

func (stockCodec) node(rows []StockRow) *yaml.Node {
	if len(rows) == 0 {
		return nil
	}
	root := &yaml.Node{Kind: yaml.MappingNode, Tag: "!!map", Column: ordered}
	groups := map[string]*yaml.Node{}
	for _, row := range rows {
		g := groups[row.Group]
		if g == nil {
			g = &yaml.Node{Kind: yaml.MappingNode, Tag: "!!map", Column: ordered}
			groups[row.Group] = g
			root.Content = append(root.Content, textNode(row.Group), g)
		}
		n := rowNode(row.YAML)
		if n == nil {
			n = &yaml.Node{Kind: yaml.MappingNode, Tag: "!!map", Style: yaml.FlowStyle}
		}
		g.Content = append(g.Content, textNode(row.ID), n)
	}
	return root
}

func (stockCodec) check(r *report, rows []StockRow, at path) {
	if len(rows) > MaxNamed {
		r.add(at, "too-many", fmt.Sprintf("¤ has %d rows, and at most %d are read", len(rows), MaxNamed), "take it out: it is written anew on the next save")
		return
	}
	seen := map[StockRow]bool{}
	for _, row := range rows {
		at := at.key(row.Group).key(row.ID)
		checkName(r, row.Group, at, "the group of a row in stock_used")
		checkName(r, row.ID, at, "the id of a row in stock_used")
		key := StockRow{Group: row.Group, ID: row.ID}
		if seen[key] {
			r.add(at, "duplicate-name", fmt.Sprintf("stock_used has %s %s twice", show(row.Group), show(row.ID)), "take one of them out")
		}
		seen[key] = true
		if rowNode(row.YAML) == nil {
			r.add(at, "bad-row", fmt.Sprintf("the row %s %s of stock_used is no YAML mapping", show(row.Group), show(row.ID)), "take it out")
		}
	}
}

// rowNode parses a row and makes it one line without comments; nil if it is no mapping.
func rowNode(text string) *yaml.Node {
	root, bad := parse([]byte(text))
	if bad != nil || root.Kind != yaml.MappingNode {
		return nil
	}
	return oneLine(root)
}

func rowText(n *yaml.Node) string { return strings.TrimSuffix(encode(oneLine(n)), "\n") }

func oneLine(n *yaml.Node) *yaml.Node {
	c := &yaml.Node{Kind: n.Kind, Tag: n.ShortTag(), Value: n.Value}
	switch n.Kind {
	case yaml.MappingNode, yaml.SequenceNode:
		c.Style, c.Column = yaml.FlowStyle, ordered
	case yaml.ScalarNode:
		if n.ShortTag() == "!!str" {
			if c = textNode(n.Value); c.Style == yaml.LiteralStyle {
				c.Style = yaml.DoubleQuotedStyle
			}
			return c
		}
		if isNull(n) {
			c.Value = "null"
		}
	}
	for _, k := range n.Content {
		c.Content = append(c.Content, oneLine(k))
	}
	return c
}
