package section

import (
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"
)

// path is the place of a value in a document: steps of keys and positions. Keys may hold any character, so steps are led by
// control characters that no key has.
type path string

const (
	keyMark   = "\x00"
	indexMark = "\x01"
)

func (p path) key(k string) path { return p + path(keyMark+k) }
func (p path) at(i int) path     { return p + path(indexMark+strconv.Itoa(i)) }

// step is one step of a path: a key, or a position if i ≥ 0.
type step struct {
	key string
	i   int
}

func (p path) steps() []step {
	var out []step
	for s := string(p); s != ""; {
		end := strings.IndexAny(s[1:], keyMark+indexMark) + 1
		if end == 0 {
			end = len(s)
		}
		st := step{key: s[1:end], i: -1}
		if s[:1] == indexMark {
			st.i, _ = strconv.Atoi(st.key)
		}
		out = append(out, st)
		s = s[end:]
	}
	return out
}

// parents calls f for p and all paths above it, the root last.
func (p path) parents(f func(path) bool) {
	for {
		if !f(p) || p == "" {
			return
		}
		p = p[:strings.LastIndexAny(string(p), keyMark+indexMark)]
	}
}

func showSteps(steps []step) string {
	var b strings.Builder
	for i, s := range steps {
		switch {
		case s.i >= 0:
			b.WriteString("[" + strconv.Itoa(s.i) + "]")
		case i > 0:
			b.WriteString("." + s.key)
		default:
			b.WriteString(s.key)
		}
	}
	return b.String()
}

// locate returns the line of what p names in the tree, or of the nearest thing above it.
func locate(root *yaml.Node, p path) int {
	if root == nil {
		return 0
	}
	n, line := root, root.Line
	for _, s := range p.steps() {
		var next *yaml.Node
		switch {
		case s.i >= 0 && n.Kind == yaml.SequenceNode && s.i < len(n.Content):
			next = n.Content[s.i]
			line = next.Line
		case s.i < 0 && n.Kind == yaml.MappingNode:
			for i := 0; i+1 < len(n.Content); i += 2 {
				if n.Content[i].Value == s.key {
					next, line = n.Content[i+1], n.Content[i].Line
					break
				}
			}
		}
		if next == nil {
			break
		}
		n = next
	}
	return line
}
