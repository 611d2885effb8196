package section

import (
	"fmt"
	"regexp"
	"strings"

	"gopkg.in/yaml.v3"
)

// A codec reads, writes and checks one kind of value. read reports what is wrong with the form of the node; check reports what is
// wrong with the value, also of a document that was never a file. node returns nil for a value that is not written.
type codec[V any] interface {
	read(r *report, n *yaml.Node, at path) V
	node(v V) *yaml.Node
	check(r *report, v V, at path)
}

// field is one key of a mapping that is read into a T.
type field[T any] struct {
	key   string
	must  bool
	read  func(r *report, n *yaml.Node, at path, v *T)
	node  func(v *T) *yaml.Node
	check func(r *report, v *T, at path)
}

// on makes the field of T that get points at.
func on[T, V any](key string, get func(*T) *V, c codec[V]) field[T] {
	return field[T]{
		key:   key,
		read:  func(r *report, n *yaml.Node, at path, v *T) { *get(v) = c.read(r, n, at) },
		node:  func(v *T) *yaml.Node { return c.node(*get(v)) },
		check: func(r *report, v *T, at path) { c.check(r, *get(v), at) },
	}
}

// need makes a field required.
func need[T any](f field[T]) field[T] {
	f.must = true
	return f
}

// table is the codec of a mapping with fixed keys, in the order in which they are written.
type table[T any] struct {
	what   string // for sentences: "a layer"
	fields []field[T]
	later  map[string]string // keys that a later version reads, with the block they belong to
	block  bool              // written as a block instead of one line
	rules  func(r *report, v *T, at path)
}

func (t *table[T]) keys() []string {
	var out []string
	for _, f := range t.fields {
		out = append(out, f.key)
	}
	return out
}

func (t *table[T]) field(key string) *field[T] {
	for i := range t.fields {
		if t.fields[i].key == key {
			return &t.fields[i]
		}
	}
	return nil
}

func (t *table[T]) read(r *report, n *yaml.Node, at path) (v T) {
	if !isKind(r, n, at, yaml.MappingNode, t.what+" is a mapping like {"+strings.Join(t.keys()[:min(2, len(t.fields))], ": …, ")+": …}") {
		return v
	}
	seen := map[string]bool{}
	pairs(r, n, at, func(key, value *yaml.Node) {
		seen[key.Value] = true
		if f := t.field(key.Value); f != nil {
			f.read(r, value, at.key(f.key), &v)
			return
		}
		t.unknown(r, key, at)
	})
	for _, f := range t.fields {
		if r.full() {
			break
		}
		if f.must && !seen[f.key] && !r.spoilt[at.key(f.key)] {
			r.add(at.key(f.key), "missing-key", "¤ is missing", "write it: "+t.what+" needs it")
		}
	}
	return v
}

func (t *table[T]) unknown(r *report, key *yaml.Node, at path) {
	if block, ok := t.later[key.Value]; ok {
		r.addLine(at.key(key.Value), key.Line, "later-key",
			fmt.Sprintf("key ¤ belongs to %s that this version does not read yet", block), "take it out")
		return
	}
	if digitsOnly.MatchString(key.Value) {
		r.addLine(at.key(key.Value), key.Line, "unknown-key", "the number ¤ stands where a key belongs", "write a decimal point instead of a decimal comma")
		return
	}
	do := "take it out; the keys here are " + strings.Join(t.keys(), ", ")
	if near := nearest(key.Value, t.keys()); near != "" {
		do = "did you mean `" + near + "`?"
		r.spoil(at.key(near)) // that it is missing needs no sentence of its own
	}
	r.addLine(at.key(key.Value), key.Line, "unknown-key", "unknown key ¤", do)
}

var digitsOnly = regexp.MustCompile(`^\d+$`)

func (t *table[T]) node(v T) *yaml.Node {
	n := &yaml.Node{Kind: yaml.MappingNode, Tag: "!!map"}
	if !t.block {
		n.Style = yaml.FlowStyle
	}
	for _, f := range t.fields {
		if c := f.node(&v); c != nil {
			n.Content = append(n.Content, textNode(f.key), c)
		}
	}
	return n
}

func (t *table[T]) check(r *report, v T, at path) {
	for _, f := range t.fields {
		if f.must && f.node(&v) == nil {
			r.add(at.key(f.key), "missing-key", "¤ is missing or empty", "write it: "+t.what+" needs it")
			continue
		}
		f.check(r, &v, at.key(f.key))
	}
	if t.rules != nil {
		t.rules(r, &v, at)
	}
}

// optional is the codec of a table that is written only where it says something.
type optional[T comparable] struct{ *table[T] }

func (o optional[T]) node(v T) *yaml.Node {
	if n := o.table.node(v); len(n.Content) > 0 {
		return n
	}
	return nil
}

// pointer is the codec of a table behind a pointer, nil if it is not written.
type pointer[T any] struct{ t *table[T] }

func (p pointer[T]) read(r *report, n *yaml.Node, at path) *T {
	v := p.t.read(r, n, at)
	return &v
}

func (p pointer[T]) node(v *T) *yaml.Node {
	if v == nil {
		return nil
	}
	return p.t.node(*v)
}

func (p pointer[T]) check(r *report, v *T, at path) {
	if v != nil {
		p.t.check(r, *v, at)
	}
}

// list is the codec of a sequence. An empty one is not written.
type list[E any] struct {
	elem  codec[E]
	block bool // one line for each item
	most  int  // 0: as many as there are
}

func (l list[E]) read(r *report, n *yaml.Node, at path) []E {
	if isNull(n) || !isKind(r, n, at, yaml.SequenceNode, "it is a list: [ … ] or lines that begin with -") {
		return nil
	}
	var out []E
	for i, c := range n.Content {
		if r.full() {
			break
		}
		out = append(out, l.elem.read(r, c, at.at(i)))
	}
	return out
}

func (l list[E]) node(v []E) *yaml.Node {
	if len(v) == 0 {
		return nil
	}
	n := &yaml.Node{Kind: yaml.SequenceNode, Tag: "!!seq"}
	if !l.block {
		n.Style = yaml.FlowStyle
	}
	for _, e := range v {
		n.Content = append(n.Content, l.elem.node(e))
	}
	return n
}

func (l list[E]) check(r *report, v []E, at path) {
	if l.most > 0 && len(v) > l.most {
		r.add(at, "too-many", fmt.Sprintf("¤ has %d entries, and at most %d are read", len(v), l.most), "join some of them")
		return
	}
	for i, e := range v {
		l.elem.check(r, e, at.at(i))
	}
}

// oneLiner is a dict that is written on one line.
type oneLiner[E any] struct{ dict[E] }

func (c oneLiner[E]) node(v []E) *yaml.Node {
	n := c.dict.node(v)
	if n != nil {
		n.Style = yaml.FlowStyle
	}
	return n
}

// dict is the codec of a mapping whose keys are names, kept in the order of the file. An empty one is not written.
type dict[E any] struct {
	what  string // for sentences: "a material"
	elem  codec[E]
	name  func(*E) *string
	rules func(r *report, name string, at path)
}

func (d dict[E]) read(r *report, n *yaml.Node, at path) []E {
	if isNull(n) || !isKind(r, n, at, yaml.MappingNode, "each key is the name of "+d.what) {
		return nil
	}
	var out []E
	pairs(r, n, at, func(key, value *yaml.Node) {
		e := d.elem.read(r, value, at.key(key.Value))
		*d.name(&e) = key.Value
		out = append(out, e)
	})
	return out
}

func (d dict[E]) node(v []E) *yaml.Node {
	if len(v) == 0 {
		return nil
	}
	n := &yaml.Node{Kind: yaml.MappingNode, Tag: "!!map", Column: ordered}
	for i := range v {
		n.Content = append(n.Content, textNode(*d.name(&v[i])), d.elem.node(v[i]))
	}
	return n
}

func (d dict[E]) check(r *report, v []E, at path) {
	seen := map[string]bool{}
	if len(v) > MaxNamed {
		r.add(at, "too-many", fmt.Sprintf("¤ has %d entries, and at most %d are read", len(v), MaxNamed), "take out those that nothing uses")
		return
	}
	for i := range v {
		name := *d.name(&v[i])
		if seen[name] {
			r.add(at.key(name), "duplicate-name", "the name "+show(name)+" is given twice", "give one of them another name")
		}
		seen[name] = true
		checkName(r, name, at.key(name), "the name of "+d.what)
		if d.rules != nil {
			d.rules(r, name, at.key(name))
		}
		d.elem.check(r, v[i], at.key(name))
	}
}
