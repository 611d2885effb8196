package section

import (
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"
)

// source is a YAML text in which nodes of its tree can be found again.
type source struct {
	text  string
	lines []int // where each line starts
}

// newSource counts lines as the YAML reader does.
func newSource(text string) *source {
	s := &source{text: text, lines: []int{0}}
	for i, r := range text {
		switch r {
		case '\n', '\u0085', '\u2028', '\u2029':
			s.lines = append(s.lines, i+utf8.RuneLen(r))
		case '\r':
			if !strings.HasPrefix(text[i+1:], "\n") {
				s.lines = append(s.lines, i+1)
			}
		}
	}
	return s
}

// offset returns where a node begins; ok is false for a place outside the text.
func (s *source) offset(n *yaml.Node) (at int, ok bool) {
	if n.Line < 1 || n.Line > len(s.lines) || n.Column < 1 {
		return 0, false
	}
	at = s.lines[n.Line-1]
	for range n.Column - 1 {
		if at >= len(s.text) {
			return 0, false
		}
		_, size := utf8.DecodeRuneInString(s.text[at:])
		at += size
	}
	return at, true
}

// lineStart returns where the line of an offset starts.
func (s *source) lineStart(at int) int { return strings.LastIndexByte(s.text[:at], '\n') + 1 }

// indent returns the column of an offset, from 0.
func (s *source) indent(at int) int { return utf8.RuneCountInString(s.text[s.lineStart(at):at]) }

// span returns where a scalar on one line or a flow collection begins and ends. ok is false for blocks and for what is not
// written as the tree has it.
func (s *source) span(n *yaml.Node) (from, to int, ok bool) {
	from, ok = s.offset(n)
	if !ok || from >= len(s.text) {
		return 0, 0, false
	}
	switch {
	case n.Kind == yaml.ScalarNode:
		to, ok = s.scalarEnd(n, from)
	case n.Style&yaml.FlowStyle != 0:
		to, ok = s.flowEnd(n, from)
	default:
		ok = false
	}
	return from, to, ok
}

func (s *source) scalarEnd(n *yaml.Node, from int) (int, bool) {
	rest := s.text[from:]
	switch {
	case n.Style&yaml.DoubleQuotedStyle != 0 && rest[0] == '"':
		for i := 1; i < len(rest); i++ {
			switch rest[i] {
			case '\\':
				i++
			case '"':
				return from + i + 1, true
			}
		}
	case n.Style&yaml.SingleQuotedStyle != 0 && rest[0] == '\'':
		for i := 1; i < len(rest); i++ {
			if rest[i] != '\'' {
				continue
			}
			if i++; i >= len(rest) || rest[i] != '\'' {
				return from + i, true
			}
		}
	case n.Style == 0 && n.Value != "" && strings.HasPrefix(rest, n.Value):
		end := from + len(n.Value)
		if end == len(s.text) || strings.IndexByte(" \t\r\n,:]}", s.text[end]) >= 0 {
			return end, true
		}
	}
	return 0, false
}

func (s *source) flowEnd(n *yaml.Node, from int) (int, bool) {
	open, end := byte('{'), byte('}')
	if n.Kind == yaml.SequenceNode {
		open, end = '[', ']'
	}
	if s.text[from] != open {
		return 0, false
	}
	at := from + 1
	for _, c := range n.Content {
		_, to, ok := s.span(c)
		if !ok || to < at {
			return 0, false
		}
		at = to
	}
	for at < len(s.text) {
		switch s.text[at] {
		case end:
			return at + 1, true
		case '#':
			if i := strings.IndexByte(s.text[at:], '\n'); i >= 0 {
				at += i
				continue
			}
			return 0, false
		case ' ', '\t', '\r', '\n', ',':
			at++
		default:
			return 0, false
		}
	}
	return 0, false
}

// heads returns where the comment lines directly above an entry at an offset begin, not going above low. Comments that stand
// further to the right belong to what is above them.
func (s *source) heads(at, low int) int {
	col := s.indent(at)
	start := s.lineStart(at)
	for start > low {
		above := s.lineStart(start - 1)
		line := s.text[above:start]
		body := strings.TrimLeft(line, " ")
		if above < low || !strings.HasPrefix(body, "#") || len(line)-len(body) > col {
			break
		}
		start = above
	}
	return start
}

// tail returns where the blank lines and the comments no further right than col at the end of a chunk begin.
func (s *source) tail(from, to, col int) int {
	end := to
	for end > from {
		start := max(s.lineStart(end-1), from)
		line := s.text[start:end]
		body := strings.TrimLeft(line, " ")
		blank := strings.TrimSpace(line) == ""
		if start == from || !blank && (!strings.HasPrefix(body, "#") || len(line)-len(body) > col) {
			break
		}
		end = start
	}
	return end
}
