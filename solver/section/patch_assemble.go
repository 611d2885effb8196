package section

import (
	"strings"

	"gopkg.in/yaml.v3"
)

// assembly puts chunks together.
type assembly struct {
	p       *patcher
	entries []entry
	kept    map[int]bool // by index
	root    bool
	col     int
	b       strings.Builder
}

// add writes one entry. The blank lines and comments below the last old chunk wait for finish.
func (a *assembly) add(e entry, more bool) bool {
	if e.index < 0 {
		a.fresh(e, more)
		return true
	}
	old := a.entries[e.index]
	text, ok := a.p.entryText(old, e)
	if !ok {
		return false
	}
	if old.index == len(a.entries)-1 {
		text = strings.TrimSuffix(text, a.lastTail())
	}
	a.endLine()
	a.remarks(e.index)
	a.b.WriteString(text)
	return true
}

// remarks writes the comments that stand apart below entries that were just above the index-th and are gone.
func (a *assembly) remarks(index int) {
	first := index
	for first > 0 && !a.kept[first-1] {
		first--
	}
	for _, e := range a.entries[first:index] {
		text := a.p.text[a.p.tail(e.from, e.to, a.col):e.to]
		if !strings.Contains(text, "#") {
			continue
		}
		if strings.HasSuffix(a.b.String(), "\n\n") {
			text = strings.TrimPrefix(text, "\n")
		}
		a.b.WriteString(text)
	}
}

func (a *assembly) fresh(e entry, more bool) {
	airy := a.root && e.val.Kind != yaml.ScalarNode && a.airy()
	a.endLine()
	if airy && !strings.HasSuffix(a.b.String(), "\n\n") && a.b.Len() > 0 {
		a.b.WriteString("\n")
	}
	a.b.WriteString(freshEntry(e, a.col))
	if airy && more {
		a.b.WriteString("\n")
	}
}

// airy tells whether the file has blank lines between its blocks.
func (a *assembly) airy() bool {
	for _, e := range a.entries {
		if t := a.p.tail(e.from, e.to, a.col); strings.Contains("\n"+a.p.text[t:e.to], "\n\n") {
			return true
		}
	}
	return len(a.entries) < 3
}

func (a *assembly) endLine() {
	if s := a.b.String(); s != "" && !strings.HasSuffix(s, "\n") {
		a.b.WriteString("\n")
	}
}

func (a *assembly) lastTail() string {
	e := a.entries[len(a.entries)-1]
	return a.p.text[a.p.tail(e.from, e.to, a.col):e.to]
}

func (a *assembly) finish() string {
	if last := len(a.entries) - 1; !a.kept[last] {
		a.endLine()
		a.remarks(last)
	}
	if tail := a.lastTail(); tail != "" {
		a.endLine()
		a.b.WriteString(tail)
	}
	return a.b.String()
}
