package section

import (
	"regexp"
	"strings"

	"gopkg.in/yaml.v3"
)

// patch returns the text of the origin with only those spans changed in which the tree of the new document differs. Blank lines,
// comments, quotes and the order of keys stay. It returns nil where the text is written in a way that it can't follow; where it would
// lose a comment it does so only if lossy.
func (o *origin) patch(tree *yaml.Node, lossy bool) []byte {
	if o == nil {
		return nil
	}
	if same(o.root, tree) {
		return o.text
	}
	p := &patcher{newSource(string(o.text)), lossy}
	if o.root.Style&yaml.FlowStyle != 0 {
		from, to, text, ok := p.inline(o.root, tree)
		if !ok {
			return nil
		}
		return []byte(p.text[:from] + text + p.text[to:])
	}
	end := len(p.text)
	if m := documentEnd.FindStringIndex(p.text); m != nil {
		end = m[0]
	}
	from, text, ok := p.block(o.root, tree, 0, end)
	if !ok {
		return nil
	}
	return []byte(p.text[:from] + text + p.text[end:])
}

// documentEnd is the line that ends a YAML document, which most files do not have.
var documentEnd = regexp.MustCompile(`(?m)^\.\.\.\s`)

type patcher struct {
	*source
	lossy bool
}

// entry is an item of a sequence or a pair of a mapping: old in the source, or fresh.
type entry struct {
	key, val *yaml.Node // key is nil for an item
	from, to int        // the chunk of lines in the source, with the comments above
	start    int        // where the key or dash stands
	index    int        // among the old entries, −1 for a fresh one
}

// entries returns the entries of a block collection; to is where the collection ends, low what its comments must not go above.
func (p *patcher) entries(n *yaml.Node, low, to int) (out []entry, ok bool) {
	step := 1
	if n.Kind == yaml.MappingNode {
		step = 2
	}
	for i := 0; i+step <= len(n.Content); i += step {
		e := entry{val: n.Content[i+step-1], index: i / step}
		first := n.Content[i]
		if step == 2 {
			e.key = first
		}
		if e.start, ok = p.offset(first); !ok {
			return nil, false
		}
		if step == 1 {
			if e.start, ok = p.dash(first, n.Column, low); !ok {
				return nil, false
			}
		}
		e.from = e.start
		if p.ownLine(e.start) {
			e.from = p.heads(e.start, low)
		} else if i > 0 {
			return nil, false
		}
		if len(out) > 0 {
			out[len(out)-1].to = e.from
		}
		low = e.start
		out = append(out, e)
	}
	if len(out) == 0 {
		return nil, false
	}
	out[len(out)-1].to = to
	return out, true
}

// dash returns where the dash of an item stands: on the item's line or above it, with nothing but comments between.
func (p *patcher) dash(item *yaml.Node, column, low int) (int, bool) {
	for line := item.Line; line > 0 && p.lines[line-1]+column > low; line-- {
		at, ok := p.offset(&yaml.Node{Line: line, Column: column})
		if ok && at < len(p.text) && p.text[at] == '-' && (p.ownLine(at) || line == item.Line) {
			return at, true
		}
		if line == item.Line {
			continue
		}
		if text := strings.TrimSpace(p.text[p.lines[line-1]:p.lines[line]]); text != "" && text[0] != '#' {
			break
		}
	}
	return 0, false
}

// ownLine tells whether only spaces stand before an offset on its line.
func (p *patcher) ownLine(at int) bool {
	return strings.Trim(p.text[p.lineStart(at):at], " ") == ""
}

// block returns the new text of a block collection and where its old text begins; the old text ends at to.
func (p *patcher) block(old, fresh *yaml.Node, low, to int) (from int, text string, ok bool) {
	if old.Kind != fresh.Kind || old.Style&yaml.FlowStyle != 0 {
		return 0, "", false
	}
	entries, ok := p.entries(old, low, to)
	if !ok {
		return 0, "", false
	}
	from = entries[0].from
	order := arrange(old, fresh, entries)
	if len(order) == 0 || !p.ownLine(entries[0].start) && order[0].index != 0 {
		return 0, "", false
	}
	a := assembly{p: p, entries: entries, kept: map[int]bool{}, root: low == 0, col: p.indent(entries[0].start)}
	for _, e := range order {
		a.kept[e.index] = true
	}
	for i, e := range order {
		if !a.add(e, i+1 < len(order)) {
			return 0, "", false
		}
	}
	return from, a.finish(), true
}

// entryText returns an old entry's chunk with the value, and the name, of e.
func (p *patcher) entryText(old, e entry) (string, bool) {
	var b strings.Builder
	at := old.from
	if old.key != nil && old.key.Value != e.key.Value {
		from, to, ok := p.span(old.key)
		if !ok {
			return "", false
		}
		b.WriteString(p.text[at:from] + inlineText(e.key))
		at = to
	}
	if same(old.val, e.val) {
		return b.String() + p.text[at:old.to], true
	}
	if from, to, ok := p.span(old.val); ok && e.key != nil && len(old.val.Content) == 0 && isBlock(e.val) && p.ownLine(old.start) {
		return b.String() + p.opened(old, e, at, from, to), true
	}
	if from, to, text, ok := p.inline(old.val, e.val); ok && !strings.Contains(e.val.Value, "\n") {
		return b.String() + p.text[at:from] + text + p.text[to:old.to], true
	}
	if from, text, ok := p.block(old.val, e.val, p.nextLine(old), old.to); ok {
		return b.String() + p.text[at:from] + text, true
	}
	col := p.indent(old.start) // written anew, under its old comments
	loses := old.val.Kind != yaml.ScalarNode && strings.Contains(p.text[old.start:p.tail(old.from, old.to, col)], "#")
	if !p.ownLine(old.start) || loses && !p.lossy {
		return "", false
	}
	return p.text[old.from:p.lineStart(old.start)] + freshEntry(e, col) + p.text[p.tail(old.from, old.to, col):old.to], true
}

func isBlock(n *yaml.Node) bool { return n.Kind != yaml.ScalarNode && n.Style&yaml.FlowStyle == 0 }

// opened returns a pair whose one-line value, from to to, becomes a block: what stands behind the old value stays on the key's line.
func (p *patcher) opened(old, e entry, at, from, to int) string {
	line := to + len(p.text[to:old.to])
	if i := strings.IndexByte(p.text[to:old.to], '\n'); i >= 0 {
		line = to + i + 1
	}
	_, block, _ := strings.Cut(freshEntry(e, p.indent(old.start)), "\n")
	head := strings.TrimRight(p.text[at:from], " ") + strings.TrimRight(p.text[to:line], "\r\n")
	return head + "\n" + block + p.text[line:old.to]
}

// nextLine is what comments of a value's entries must not go above: the line after its key, or its dash.
func (p *patcher) nextLine(e entry) int {
	if i := strings.IndexByte(p.text[e.start:], '\n'); i >= 0 && e.key != nil {
		return e.start + i + 1
	}
	return e.start
}
