package section

import (
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"
)

// ordered marks, as the Column of a fresh mapping, that the order of its keys says something: names that the document lists.
const ordered = -1

// same tells whether a node of the file says what a fresh node says. Keys that hold nothing may be left out.
func same(old, fresh *yaml.Node) bool {
	if old.Kind != fresh.Kind {
		return false
	}
	switch old.Kind {
	case yaml.ScalarNode:
		return sameScalar(old, fresh)
	case yaml.SequenceNode:
		if len(old.Content) != len(fresh.Content) {
			return false
		}
		for i := range old.Content {
			if !same(old.Content[i], fresh.Content[i]) {
				return false
			}
		}
		return true
	}
	j, left := 0, len(fresh.Content)/2
	for i := 0; i+1 < len(old.Content); i += 2 {
		key, val := old.Content[i], old.Content[i+1]
		c := child(fresh, key.Value)
		switch {
		case c == nil && holdsNothing(val):
			continue
		case c == nil || !same(val, c):
			return false
		case fresh.Column == ordered && fresh.Content[j].Value != key.Value:
			return false
		}
		j += 2
		left--
	}
	return left == 0
}

func sameScalar(old, fresh *yaml.Node) bool {
	a, b := old.ShortTag(), fresh.ShortTag()
	switch {
	case b == "!!null":
		return a == b
	case b == "!!str":
		return a != "!!null" && old.Value == fresh.Value
	case b == "!!int" || b == "!!float":
		x, errX := strconv.ParseFloat(old.Value, 64)
		y, errY := strconv.ParseFloat(fresh.Value, 64)
		return a != "!!str" && errX == nil && errY == nil && x == y || a == b && old.Value == fresh.Value
	case b == "!!bool":
		return a == b && strings.EqualFold(old.Value, fresh.Value)
	}
	return a == b && old.Value == fresh.Value
}

func holdsNothing(n *yaml.Node) bool {
	if n.Kind != yaml.ScalarNode {
		return len(n.Content) == 0
	}
	return isNull(n) || n.Value == "" || n.ShortTag() == "!!bool" && strings.EqualFold(n.Value, "false")
}

// arrange pairs the entries of a fresh collection with the old ones and returns them in the order in which they are to be written.
func arrange(old, fresh *yaml.Node, entries []entry) []entry {
	if fresh.Kind == yaml.SequenceNode {
		return arrangeItems(old, fresh)
	}
	var list []entry
	for i := 0; i+1 < len(fresh.Content); i += 2 {
		list = append(list, entry{key: fresh.Content[i], val: fresh.Content[i+1], index: -1})
	}
	byKey := map[string]int{}
	for i, e := range entries {
		byKey[e.key.Value] = i
	}
	for i := range list {
		if j, ok := byKey[list[i].key.Value]; ok {
			list[i].index = j
		}
	}
	if fresh.Column == ordered {
		pairRenamed(list, entries, func(e, old entry) bool { return same(old.val, e.val) })
		return list
	}
	return inOldOrder(list, entries)
}

// inOldOrder returns the entries of a mapping with fixed keys in the order of the file, each new key behind the one that it follows
// in a new file. Old keys that hold nothing stay.
func inOldOrder(list, entries []entry) []entry {
	kept := map[int]entry{}
	for _, e := range list {
		if e.index >= 0 {
			kept[e.index] = e
		}
	}
	var out []entry
	for i, old := range entries {
		if e, ok := kept[i]; ok {
			out = append(out, e)
		} else if holdsNothing(old.val) {
			out = append(out, old)
		}
	}
	for i, e := range list {
		if e.index >= 0 {
			continue
		}
		at := 0
		for j, o := range out {
			for _, before := range list[:i] {
				if o.key.Value == before.key.Value {
					at = j + 1
				}
			}
		}
		out = append(out[:at], append([]entry{e}, out[at:]...)...)
	}
	return out
}

// pairRenamed pairs fresh entries with old ones that nobody took where like says that only the name differs.
func pairRenamed(list, entries []entry, like func(e, old entry) bool) {
	taken := map[int]bool{}
	for _, e := range list {
		taken[e.index] = true
	}
	for i := range list {
		if list[i].index >= 0 {
			continue
		}
		for j, old := range entries {
			if !taken[j] && like(list[i], old) {
				list[i].index, taken[j] = j, true
				break
			}
		}
	}
}

// arrangeItems pairs the items of a sequence: by id, else all by position if their number is the same, else those that are equal.
func arrangeItems(old, fresh *yaml.Node) []entry {
	var list, entries []entry
	for i, n := range fresh.Content {
		list = append(list, entry{val: n, index: -1})
		if idOf(n) == "" && len(fresh.Content) == len(old.Content) {
			list[i].index = i
		}
	}
	byID := map[string]int{}
	for i, n := range old.Content {
		entries = append(entries, entry{val: n, index: i})
		byID[idOf(n)] = i
	}
	next := 0
	for i := range list {
		if id := idOf(list[i].val); id != "" {
			if j, ok := byID[id]; ok {
				list[i].index = j
			}
			continue
		}
		for j := next; j < len(entries) && list[i].index < 0; j++ {
			if same(entries[j].val, list[i].val) {
				list[i].index, next = j, j+1
			}
		}
	}
	pairRenamed(list, entries, func(e, old entry) bool {
		return idOf(e.val) != "" && idOf(old.val) != "" && sameButID(old.val, e.val)
	})
	return list
}

func idOf(n *yaml.Node) string {
	if n.Kind != yaml.MappingNode {
		return ""
	}
	if id := child(n, "id"); id != nil && id.Kind == yaml.ScalarNode {
		return id.Value
	}
	return ""
}

// sameButID compares two items without their ids.
func sameButID(old, fresh *yaml.Node) bool {
	c := *fresh
	c.Content = append([]*yaml.Node{}, fresh.Content...)
	for i := 0; i+1 < len(c.Content); i += 2 {
		if c.Content[i].Value == "id" {
			c.Content[i+1] = child(old, "id")
		}
	}
	return same(old, &c)
}

// freshEntry returns the lines of a fresh entry at a column.
func freshEntry(e entry, col int) string {
	n := &yaml.Node{Kind: yaml.SequenceNode, Tag: "!!seq", Content: []*yaml.Node{e.val}}
	if e.key != nil {
		n = &yaml.Node{Kind: yaml.MappingNode, Tag: "!!map", Content: []*yaml.Node{e.key, e.val}}
	}
	lines := strings.SplitAfter(encode(n), "\n")
	for i, line := range lines {
		if strings.TrimSpace(line) != "" {
			lines[i] = strings.Repeat(" ", col) + line
		}
	}
	return strings.Join(lines, "")
}

// inlineText returns a tree as text that can stand in any place of one line.
func inlineText(n *yaml.Node) string {
	text := encode(&yaml.Node{Kind: yaml.SequenceNode, Tag: "!!seq", Style: yaml.FlowStyle, Content: []*yaml.Node{oneLine(n)}})
	return strings.TrimSuffix(strings.TrimPrefix(strings.TrimSuffix(text, "\n"), "["), "]")
}

// scalarText returns a fresh scalar in the quotes of the old one.
func scalarText(old, fresh *yaml.Node) string {
	quotes := old.Style & (yaml.SingleQuotedStyle | yaml.DoubleQuotedStyle)
	if quotes == 0 || fresh.ShortTag() != "!!str" || strings.Contains(fresh.Value, "\n") {
		return inlineText(fresh)
	}
	c := textNode(fresh.Value)
	if c.Style == 0 {
		c.Style = quotes
	}
	text := encode(&yaml.Node{Kind: yaml.SequenceNode, Tag: "!!seq", Style: yaml.FlowStyle, Content: []*yaml.Node{c}})
	return strings.TrimSuffix(strings.TrimPrefix(strings.TrimSuffix(text, "\n"), "["), "]")
}
