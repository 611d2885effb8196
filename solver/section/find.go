package section

import (
	"reflect"
	"slices"
	"strings"
)

// Find returns the part with the id ("L1", "C1/L1"), nil if none.
func Find(d *Document, id string) *Part {
	l, ok := listOf(d, id)
	if !ok {
		return nil
	}
	return &l.parts(d)[l.i]
}

// listPlace says where a part stands: in the parts of the top level (build −1) or of a build.
type listPlace struct{ build, i int }

func (l listPlace) parts(d *Document) []Part {
	if l.build < 0 {
		return d.Parts
	}
	return d.Builds[l.build].Parts
}

// listOf walks an id through the cables.
func listOf(d *Document, id string) (l listPlace, ok bool) {
	l.build = -1
	for depth := 0; depth <= MaxNesting; depth++ {
		name, rest, nested := strings.Cut(id, "/")
		parts := l.parts(d)
		l.i = slices.IndexFunc(parts, func(p Part) bool { return p.ID == name })
		if l.i < 0 || !nested {
			return l, l.i >= 0
		}
		p := parts[l.i]
		l.build = slices.IndexFunc(d.Builds, func(b Build) bool { return p.Kind == Cable && b.Name == p.Build })
		if l.build < 0 {
			return l, false
		}
		id = rest
	}
	return l, false
}

// editList returns the document with f's list in place of the one that the part with the id stands in. f must not write into the
// list that it is given.
func editList(d *Document, id string, f func(parts []Part, i int) []Part) *Document {
	l, ok := listOf(d, id)
	if !ok {
		return d
	}
	parts := f(l.parts(d), l.i)
	return d.With(func(d *Document) {
		if l.build < 0 {
			d.Parts = parts
			return
		}
		d.Builds = slices.Clone(d.Builds)
		d.Builds[l.build].Parts = parts
	})
}

// change returns the document with f applied to a copy of the part, d itself if that changes nothing.
func change(d *Document, id string, f func(*Part)) *Document {
	old := Find(d, id)
	if old == nil {
		return d
	}
	p := *old
	f(&p)
	if reflect.DeepEqual(p, *old) {
		return d
	}
	return editList(d, id, func(parts []Part, i int) []Part {
		parts = slices.Clone(parts)
		parts[i] = p
		return parts
	})
}
