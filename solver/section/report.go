package section

import (
	"fmt"
	"sort"
	"strings"

	"gopkg.in/yaml.v3"
)

// maxProblems bounds the list, so that a file that is no design at all does not fill the memory with complaints.
const maxProblems = 1000

// report collects what is wrong with a document. Findings of reading silence findings of checking that only follow from them.
type report struct {
	doc      *Document
	root     *yaml.Node // nil when the document did not come from a file
	found    []finding
	checking bool
	spoilt   map[path]bool // where reading found something
	above    map[path]bool // what lies above such places
	places   []Place       // unfolded, made on demand
	unfolded bool
}

type finding struct {
	at   path
	line int
	p    Problem
}

func newReport(root *yaml.Node) *report {
	return &report{root: root, spoilt: map[path]bool{}, above: map[path]bool{}}
}

// add reports a problem at a place. In what and do, ¤ stands for the name of the place's key; words of
// the document go through show, which keeps that sign out. A problem of checking is dropped
// if reading already found something at the place or above it.
func (r *report) add(at path, rule, what, do string, ids ...string) {
	if r.checking {
		known := false
		at.parents(func(p path) bool { known = r.spoilt[p] && p != ""; return !known })
		if known {
			return
		}
	}
	r.put(at, 0, rule, what, do, ids)
	if !r.checking {
		r.spoil(at)
	}
}

// addWhole is add for a rule about several keys beneath at: it is also dropped if reading found something beneath.
func (r *report) addWhole(at path, rule, what, do string, ids ...string) {
	if !r.above[at] {
		r.add(at, rule, what, do, ids...)
	}
}

// addLine is add for a place whose line is known better than by the key.
func (r *report) addLine(at path, line int, rule, what, do string) {
	r.put(at, line, rule, what, do, nil)
	r.spoil(at)
}

func (r *report) put(at path, line int, rule, what, do string, ids []string) {
	if !r.full() {
		r.found = append(r.found, finding{at, line, Problem{Rule: rule, IDs: ids, What: what, Do: do}})
	}
}

// full tells whether more problems would not be heard: reading and checking may stop.
func (r *report) full() bool { return len(r.found) >= maxProblems }

func (r *report) spoil(at path) {
	r.spoilt[at] = true
	at.parents(func(p path) bool { r.above[p] = true; return true })
}

// problems returns what was found in the order of the file, each with its owner's name, ids, key and line.
func (r *report) problems() []Problem {
	var out []Problem
	for _, f := range r.found {
		owner, ids, key := r.owner(f.at)
		p := f.p
		p.Key = key
		if p.IDs == nil {
			p.IDs = ids
		}
		if p.Line = f.line; p.Line == 0 {
			p.Line = locate(r.root, f.at)
		}
		shown := "`" + show(key) + "`"
		if key == "" {
			shown = "it"
		}
		p.What = strings.ReplaceAll(p.What, "¤", shown)
		p.Do = strings.ReplaceAll(p.Do, "¤", shown)
		if owner != "" {
			p.What = owner + ": " + p.What
		}
		out = append(out, p)
	}
	sort.SliceStable(out, func(i, j int) bool { return out[i].Line < out[j].Line })
	return out
}

// owner names the part, build, load or material that a place belongs to, gives its ids, and the key as seen from it.
func (r *report) owner(at path) (name string, ids []string, key string) {
	st := at.steps()
	switch {
	case len(st) >= 2 && st[0].key == "parts" && st[1].i >= 0:
		id, ok := r.partID(r.doc.Parts, st[1].i)
		return "part " + id, known(id, ok), showSteps(st[2:])
	case len(st) >= 4 && st[0].key == "builds" && st[2].key == "parts" && st[3].i >= 0:
		b := buildOf(r.doc, st[1].key)
		if b == nil {
			break
		}
		id, _ := r.partID(b.Parts, st[3].i)
		return fmt.Sprintf("part %s of build %s", id, show(b.Name)), r.placed(b, st[3].i), showSteps(st[4:])
	case len(st) >= 2 && st[0].key == "builds":
		return "build " + show(st[1].key), []string{st[1].key}, showSteps(st[2:])
	case len(st) >= 2 && st[1].i >= 0 && listed[st[0].key] != nil:
		l := listed[st[0].key](r.doc)
		if i := st[1].i; i < len(l.ids) && l.ids[i] != "" {
			if l.what == "load" {
				ids = []string{l.ids[i]}
			}
			return l.what + " " + show(l.ids[i]), ids, showSteps(st[2:])
		}
		return fmt.Sprintf("%s number %d", l.what, st[1].i+1), nil, showSteps(st[2:])
	case len(st) >= 2 && st[0].key == "materials":
		return "material " + show(st[1].key), nil, showSteps(st[2:])
	}
	return "", nil, showSteps(st)
}

// listed are the lists whose items own what lies in them.
var listed = map[string]func(*Document) items{
	"loads": func(d *Document) items { return itemsOf("load", d.Loads, func(l *Load) string { return l.ID }) },
	"cases": func(d *Document) items { return itemsOf("case", d.Cases, func(c *Case) string { return c.ID }) },
	"measurements": func(d *Document) items {
		return itemsOf("measurement", d.Measurements, func(m *Measurement) string { return m.ID })
	},
}

type items struct {
	what string
	ids  []string
}

func itemsOf[E any](what string, list []E, id func(*E) string) items {
	out := items{what: what}
	for i := range list {
		out.ids = append(out.ids, id(&list[i]))
	}
	return out
}

func known(id string, ok bool) []string {
	if !ok {
		return nil
	}
	return []string{id}
}

func (r *report) partID(parts []Part, i int) (id string, ok bool) {
	if i < len(parts) && parts[i].ID != "" {
		return show(parts[i].ID), true
	}
	return fmt.Sprintf("number %d", i+1), false
}

// placed returns the full ids under which the i-th part of a build stands in the section, the build's name if there are none.
func (r *report) placed(b *Build, i int) []string {
	if !r.unfolded {
		r.places, r.unfolded = UnfoldAll(r.doc), true
	}
	var ids []string
	for _, p := range r.places {
		if i < len(b.Parts) && p.Part == &b.Parts[i] {
			ids = append(ids, p.ID)
		}
	}
	if ids == nil {
		return []string{b.Name}
	}
	return ids
}

// show makes a word of the document fit for a sentence: on one line, and not endless.
func show(s string) string {
	s = clean(s)
	if rs := []rune(s); len(rs) > 60 {
		s = string(rs[:57]) + "…"
	}
	return s
}

// clean takes out what would break a sentence.
func clean(s string) string {
	return strings.Map(func(c rune) rune {
		if c < ' ' || c == 0x7f || c == '¤' {
			return '·'
		}
		return c
	}, s)
}
