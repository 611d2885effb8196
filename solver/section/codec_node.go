package section

import (
	"fmt"

	"gopkg.in/yaml.v3"
)

func isNull(n *yaml.Node) bool { return n.Kind == yaml.ScalarNode && n.ShortTag() == "!!null" }

func kindName(n *yaml.Node) string {
	switch n.Kind {
	case yaml.MappingNode:
		return "a mapping"
	case yaml.SequenceNode:
		return "a list"
	case yaml.ScalarNode:
		if isNull(n) {
			return "nothing"
		}
		return "the single value " + show(n.Value)
	}
	return "something else"
}

// isKind reports a node of another kind than wanted.
func isKind(r *report, n *yaml.Node, at path, want yaml.Kind, do string) bool {
	if n.Kind == want {
		return true
	}
	what := "¤ holds " + kindName(n)
	if at == "" {
		what = "the file holds " + kindName(n)
	}
	r.addLine(at, n.Line, "wrong-type", what, do)
	return false
}

// pairs calls f for each pair of a mapping, and reports keys that are no words or that stand twice.
func pairs(r *report, n *yaml.Node, at path, f func(key, value *yaml.Node)) {
	lines := map[string]int{}
	for i := 0; i+1 < len(n.Content) && !r.full(); i += 2 {
		key := n.Content[i]
		if key.Kind != yaml.ScalarNode || isNull(key) {
			r.addLine(at, key.Line, "wrong-type", "a key is not a word", "write keys as plain words")
			continue
		}
		if line, ok := lines[key.Value]; ok {
			r.addLine(at.key(key.Value), key.Line, "duplicate-key", fmt.Sprintf("key ¤ stands twice, first on line %d", line), "take one of them out")
			continue
		}
		lines[key.Value] = key.Line
		f(key, n.Content[i+1])
	}
}
