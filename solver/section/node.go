package section

import (
	"bytes"
	"regexp"
	"strings"

	"gopkg.in/yaml.v3"

	"packrise/solver/quantity"
)

// Words that YAML 1.1 readers in other people's scripts take for true, false or a number in base 60.
var oldYAML = regexp.MustCompile(`(?i)^(yes|no|on|off|[+-]?\d[\d_]*(:[0-5]?\d)+(\.[\d_]*)?)$`)

// textNode returns a string as a scalar that every YAML reader takes for a string.
func textNode(s string) *yaml.Node {
	n := &yaml.Node{Kind: yaml.ScalarNode, Tag: "!!str", Value: s}
	switch {
	case oldYAML.MatchString(s):
		n.Style = yaml.DoubleQuotedStyle
	case isPlainLines(s):
		n.Style = yaml.LiteralStyle
	case strings.ContainsFunc(s, func(r rune) bool {
		return r < ' ' || r >= 0x7f && r < 0xa0 || r == 0x2028 || r == 0x2029 || r == 0xfeff
	}):
		n.Style = yaml.DoubleQuotedStyle
	}
	return n
}

// isPlainLines tells whether a text of several lines can stand as a block of lines and mean the same.
func isPlainLines(s string) bool {
	if !strings.Contains(s, "\n") || strings.HasPrefix(s, "\n") || strings.HasSuffix(s, "\n\n") {
		return false
	}
	for _, line := range strings.Split(s, "\n") {
		if strings.TrimSpace(line) != line || strings.ContainsFunc(line, func(r rune) bool {
			return r < ' ' || r >= 0x7f && r < 0xa0 || r == 0x2028 || r == 0x2029 || r == 0xfeff
		}) {
			return false
		}
	}
	return true
}

func numberNode(v float64) *yaml.Node {
	s := quantity.Plain(v)
	tag := "!!float"
	if !strings.ContainsAny(s, ".e") {
		tag = "!!int"
	}
	return &yaml.Node{Kind: yaml.ScalarNode, Tag: tag, Value: s}
}

// encode writes one tree as YAML.
func encode(n *yaml.Node) string {
	var b bytes.Buffer
	e := yaml.NewEncoder(&b)
	e.SetIndent(2)
	if err := e.Encode(n); err != nil {
		panic("section: a tree of our own can't be written: " + err.Error())
	}
	_ = e.Close()
	return b.String()
}
