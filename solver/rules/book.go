package rules

import (
	"fmt"
	"io/fs"
	"maps"
	"slices"
	"strings"
	"sync"

	"gopkg.in/yaml.v3"

	"packrise/assets"
	"packrise/solver/catalog"
)

// Book holds rule sets and their tables. It is immutable.
type Book struct {
	currents  map[string]*currents
	ambients  map[string]*ambients
	groupings map[string]*groupings
	freeAir   map[string]*freeAir
	bundles   map[string]*bundle
	altitudes map[string]*altitude
	terminals *terminals
	devices   *devices
	rules     []rule
}

// Info describes a rule set.
type Info struct {
	ID, Title, Edition string
	Source             catalog.Source
	Informative        bool // shown beside, never the lowest
	FillOnly           bool // it limits the fill and gives no current
}

// Shipped reads the embedded rule sets, once: every call returns the same book. It panics on a bad file, which a test keeps from shipping.
func Shipped() *Book { return shipped() }

var shipped = sync.OnceValue(func() *Book {
	b, problems := readAll(assets.Catalog, "catalog/rules")
	if len(problems) > 0 {
		panic("rules: " + problems[0].String())
	}
	return b
})

// files is the order in which embedded files are read, which is the order of their rule sets; later ones may use tables of earlier ones.
var files = []string{"nec", "iec-60364", "iec-60204", "vde-0298-4", "ac-43-13", "terminals-devices"}

func readAll(dir fs.FS, path string) (*Book, []Problem) {
	b := &Book{
		currents: map[string]*currents{}, ambients: map[string]*ambients{}, groupings: map[string]*groupings{}, freeAir: map[string]*freeAir{},
		bundles: map[string]*bundle{}, altitudes: map[string]*altitude{},
	}
	for _, name := range files {
		text, err := fs.ReadFile(dir, path+"/"+name+".yaml")
		if err != nil {
			return nil, []Problem{{File: name, Text: err.Error()}}
		}
		var problems []Problem
		if b, problems = b.Add(name+".yaml", text); len(problems) > 0 {
			return nil, problems
		}
	}
	return b, nil
}

// Add returns the book with the tables and rule sets of one more file, of the same form as the program's own. With problems, all of them with their
// lines, the book is returned as it was.
func (b *Book) Add(file string, text []byte) (*Book, []Problem) {
	out := b.clone()
	r := &reader{file: file}
	sheets := r.sheets(text)
	if len(sheets) == 0 && len(r.problems) == 0 {
		r.line = 0
		r.fail("nothing is in this file; write a rule set that starts with group: rule")
	}
	for _, late := range []bool{false, true} { // rules and terminals name tables, which may stand below them
		for _, n := range sheets {
			if g := group(n); (g == "rule" || g == "terminals") == late {
				r.line = n.Line
				out.take(r, g, n)
			}
		}
	}
	if len(r.problems) > 0 {
		slices.SortStableFunc(r.problems, func(a, b Problem) int { return a.Line - b.Line })
		return b, r.problems
	}
	return out, nil
}

func (b *Book) clone() *Book {
	out := *b
	out.currents, out.ambients, out.groupings = maps.Clone(b.currents), maps.Clone(b.ambients), maps.Clone(b.groupings)
	out.freeAir, out.bundles, out.altitudes = maps.Clone(b.freeAir), maps.Clone(b.bundles), maps.Clone(b.altitudes)
	out.rules = slices.Clone(b.rules)
	return &out
}

var groups = []string{"rule", "currents", "ambient", "grouping", "free-air", "bundle", "altitude", "terminals", "devices"}

func group(n *yaml.Node) string {
	for i := 0; i+1 < len(n.Content); i += 2 {
		if n.Content[i].Value == "group" {
			return n.Content[i+1].Value
		}
	}
	return ""
}

// take adds one sheet.
func (b *Book) take(r *reader, g string, n *yaml.Node) {
	switch g {
	case "currents":
		put(r, n, b.currents, currentsRow.build, func(t currents) string { return t.id })
	case "ambient":
		put(r, n, b.ambients, ambientsRow.build, func(t ambients) string { return t.id })
	case "grouping":
		put(r, n, b.groupings, groupingsRow.build, func(t groupings) string { return t.id })
	case "free-air":
		put(r, n, b.freeAir, freeAirRow.build, func(t freeAir) string { return t.id })
	case "bundle":
		put(r, n, b.bundles, bundleRow.build, func(t bundle) string { return t.id })
	case "altitude":
		put(r, n, b.altitudes, altitudeRow.build, func(t altitude) string { return t.id })
	case "devices":
		if row := (devicesRow{}); r.decode(n, &row) {
			b.devices = row.build(r)
		}
	case "terminals":
		if row := (terminalsRow{}); r.decode(n, &row) {
			b.terminals = row.build(r, b)
		}
	case "rule":
		if row := (ruleRow{}); r.decode(n, &row) {
			b.addRule(r, row.build(r, b))
		}
	default:
		r.fail("group is %q; write %s", g, orList(groups))
	}
}

func (b *Book) addRule(r *reader, u rule) {
	if b.find(u.id) != nil {
		r.fail("rule %q is there already; give yours another id", u.id)
		return
	}
	b.rules = append(b.rules, u)
}

// put decodes one table into its map.
func put[Row, T any](r *reader, n *yaml.Node, into map[string]*T, build func(Row, *reader) T, id func(T) string) {
	var row Row
	if !r.decode(n, &row) {
		return
	}
	t := build(row, r)
	if _, taken := into[id(t)]; taken {
		r.fail("table %q is there already; give yours another id", id(t))
		return
	}
	into[id(t)] = &t
}

func (b *Book) find(id string) *rule {
	for i := range b.rules {
		if b.rules[i].id == id {
			return &b.rules[i]
		}
	}
	return nil
}

// IDs lists the rule sets, the program's own first.
func (b *Book) IDs() []string {
	var out []string
	for _, u := range b.rules {
		out = append(out, u.id)
	}
	return out
}

// Info describes a rule set; ok is false for an unknown id.
func (b *Book) Info(id string) (info Info, ok bool) {
	u := b.find(id)
	if u == nil {
		return Info{}, false
	}
	return Info{u.id, u.title, u.edition, u.source, u.informative, u.currents == nil}, true
}

// unknown is the problem of a rule set that isn't there.
func (b *Book) unknown(id string) Problem {
	return Problem{Text: fmt.Sprintf("there is no rule set %q; the nearest is %s; there are %s", id, nearest(b.IDs(), id), strings.Join(b.IDs(), ", "))}
}
