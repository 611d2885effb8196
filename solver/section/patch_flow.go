package section

import (
	"strings"

	"gopkg.in/yaml.v3"
)

// inline returns the new text of a scalar or flow collection and the span of its old text.
func (p *patcher) inline(old, fresh *yaml.Node) (from, to int, text string, ok bool) {
	if from, to, ok = p.span(old); !ok {
		return 0, 0, "", false
	}
	switch {
	case same(old, fresh):
		return from, to, p.text[from:to], true
	case old.Kind != fresh.Kind:
		return from, to, inlineText(fresh), true
	case old.Kind == yaml.ScalarNode:
		return from, to, scalarText(old, fresh), true
	}
	text, ok = p.flow(old, fresh, from, to)
	return from, to, text, ok
}

// flow puts a flow collection together, with the old text between entries that were neighbours.
func (p *patcher) flow(old, fresh *yaml.Node, from, to int) (string, bool) {
	entries, ok := p.flowEntries(old)
	if !ok {
		return "", false
	}
	order := arrange(old, fresh, entries)
	if len(order) == 0 || len(entries) == 0 {
		return inlineText(fresh), true
	}
	between := ", "
	for i := 1; i < len(entries); i++ {
		if s := p.text[entries[i-1].to:entries[i].from]; !strings.Contains(s, "#") {
			between = s
			break
		}
	}
	var b strings.Builder
	b.WriteString(p.text[from:entries[0].from])
	for i, e := range order {
		switch {
		case i == 0:
		case e.index > 0 && order[i-1].index == e.index-1:
			b.WriteString(p.text[entries[e.index-1].to:entries[e.index].from])
		default:
			b.WriteString(between)
		}
		text, ok := p.flowEntry(entries, e)
		if !ok {
			return "", false
		}
		b.WriteString(text)
	}
	b.WriteString(p.text[entries[len(entries)-1].to:to])
	return b.String(), true
}

func (p *patcher) flowEntries(n *yaml.Node) (out []entry, ok bool) {
	step := 1
	if n.Kind == yaml.MappingNode {
		step = 2
	}
	for i := 0; i+step <= len(n.Content); i += step {
		e := entry{val: n.Content[i+step-1], index: i / step}
		if step == 2 {
			e.key = n.Content[i]
		}
		var ok1, ok2 bool
		e.from, _, ok1 = p.span(n.Content[i])
		_, e.to, ok2 = p.span(e.val)
		if !ok1 || !ok2 {
			return nil, false
		}
		e.start = e.from
		out = append(out, e)
	}
	return out, true
}

func (p *patcher) flowEntry(entries []entry, e entry) (string, bool) {
	if e.index < 0 {
		if e.key == nil {
			return inlineText(e.val), true
		}
		return inlineText(e.key) + ": " + inlineText(e.val), true
	}
	old := entries[e.index]
	from, to, text, ok := p.inline(old.val, e.val)
	if !ok {
		return "", false
	}
	if e.key != nil && old.key.Value != e.key.Value {
		_, keyEnd, ok := p.span(old.key)
		return inlineText(e.key) + p.text[keyEnd:from] + text + p.text[to:old.to], ok
	}
	return p.text[old.from:from] + text + p.text[to:old.to], true
}
