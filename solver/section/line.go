package section

import (
	"regexp"
	"slices"
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"
)

// rootKeys are the first words of keys that are counted from the top of a document rather than from a part.
var rootKeys = []string{
	"surroundings", "holder", "parts", "builds", "loads", "materials", "stock_used",
	"cases", "ranges", "measurements", "rules", "design_margin_k", "reasons",
}

var keyStep = regexp.MustCompile(`[^.\[\]]+|\[\d+\]`)

// Locate fills in the lines of problems that were found in a document after it was read, from their Key and first id, as near
// as the file has them. Problems of a document that came from no file keep line 0.
func (d *Document) Locate(problems []Problem) []Problem {
	if d.origin == nil || d.origin.root == nil {
		return problems
	}
	out := slices.Clone(problems)
	for i := range out {
		if out[i].Line == 0 {
			out[i].Line = d.line(out[i])
		}
	}
	return out
}

func (d *Document) line(p Problem) int {
	n := d.origin.root
	if n.Kind == yaml.DocumentNode {
		n = n.Content[0]
	}
	line := n.Line
	steps := keyStep.FindAllString(p.Key, -1)
	if len(steps) > 0 && !slices.Contains(rootKeys, steps[0]) && len(p.IDs) > 0 {
		part := partNode(n, d, p.IDs[0])
		if part == nil {
			return 0
		}
		n, line = part, part.Line
	}
	for _, s := range steps {
		next, at := descend(n, s)
		if next == nil {
			break
		}
		n, line = next, at
	}
	return line
}

// descend steps into a mapping by key or a sequence by [i]; at is the line of the key or item.
func descend(n *yaml.Node, s string) (value *yaml.Node, at int) {
	switch n.Kind {
	case yaml.MappingNode:
		for i := 0; i+1 < len(n.Content); i += 2 {
			if n.Content[i].Value == s {
				return n.Content[i+1], n.Content[i].Line
			}
		}
	case yaml.SequenceNode:
		if i, err := strconv.Atoi(strings.Trim(s, "[]")); err == nil && i < len(n.Content) {
			return n.Content[i], n.Content[i].Line
		}
	}
	return nil, 0
}

// partNode finds the node of a part by its id, in builds for nested ones.
func partNode(root *yaml.Node, d *Document, id string) *yaml.Node {
	first, rest, nested := strings.Cut(id, "/")
	parts, _ := descend(root, "parts")
	list := d.Parts
	for {
		if parts == nil {
			return nil
		}
		i := slices.IndexFunc(parts.Content, func(n *yaml.Node) bool { v, _ := descend(n, "id"); return v != nil && v.Value == first })
		j := slices.IndexFunc(list, func(p Part) bool { return p.ID == first })
		if i < 0 || j < 0 {
			return nil
		}
		if !nested {
			return parts.Content[i]
		}
		b := slices.IndexFunc(d.Builds, func(b Build) bool { return b.Name == list[j].Build })
		if b < 0 {
			return nil
		}
		builds, _ := descend(root, "builds")
		if builds == nil {
			return nil
		}
		build, _ := descend(builds, d.Builds[b].Name)
		if build == nil {
			return nil
		}
		parts, _ = descend(build, "parts")
		list = d.Builds[b].Parts
		first, rest, nested = strings.Cut(rest, "/")
	}
}
