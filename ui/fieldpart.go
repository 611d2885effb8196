package ui

import (
	"slices"
	"strings"

	"packrise/solver/section"
)

// placedPart is a part of the document with its whole id: "L1", "C1/L1".
type placedPart struct {
	id   string
	part *section.Part
}

// allParts lists the parts of the document and of its cables, each cable's parts behind it.
func allParts(d *section.Document) []placedPart {
	var out []placedPart
	var walk func(prefix string, parts []section.Part, depth int)
	walk = func(prefix string, parts []section.Part, depth int) {
		for i := range parts {
			p := &parts[i]
			out = append(out, placedPart{prefix + p.ID, p})
			if b := buildOf(d, p.Build); p.Kind == section.Cable && b != nil && depth < section.MaxNesting {
				walk(prefix+p.ID+"/", b.Parts, depth+1)
			}
		}
	}
	walk("", d.Parts, 0)
	return out
}

// buildOf returns the construction of that name, nil if there is none.
func buildOf(d *section.Document, name string) *section.Build {
	for i := range d.Builds {
		if d.Builds[i].Name == name {
			return &d.Builds[i]
		}
	}
	return nil
}

// withPart returns d with f applied to a copy of the part. f may change everything but the id. A part of a cable changes in its construction, so
// in every cable that uses it. f must replace slices and not write into them.
func withPart(d *section.Document, id string, f func(*section.Part)) *section.Document {
	cable, inner, nested := strings.Cut(id, "/")
	if !nested {
		return d.With(func(d *section.Document) { d.Parts = changedParts(d.Parts, id, f) })
	}
	c := section.Find(d, cable)
	if c == nil {
		return d
	}
	name := c.Build
	for {
		b := buildOf(d, name)
		if b == nil {
			return d
		}
		next, rest, deeper := strings.Cut(inner, "/")
		if !deeper {
			return withBuildPart(d, name, inner, f)
		}
		i := slices.IndexFunc(b.Parts, func(p section.Part) bool { return p.ID == next })
		if i < 0 {
			return d
		}
		name, inner = b.Parts[i].Build, rest
	}
}

func withBuildPart(d *section.Document, build, id string, f func(*section.Part)) *section.Document {
	return d.With(func(d *section.Document) {
		d.Builds = slices.Clone(d.Builds)
		for i := range d.Builds {
			if d.Builds[i].Name == build {
				d.Builds[i].Parts = changedParts(d.Builds[i].Parts, id, f)
			}
		}
	})
}

func changedParts(parts []section.Part, id string, f func(*section.Part)) []section.Part {
	out := slices.Clone(parts)
	for i := range out {
		if out[i].ID == id {
			f(&out[i])
		}
	}
	return out
}

// renamed returns d with a part of the top level under another id, in the loads too.
func renamed(d *section.Document, from, to string) *section.Document {
	return d.With(func(d *section.Document) {
		d.Parts = changedParts(d.Parts, from, func(p *section.Part) { p.ID = to })
		d.Loads = slices.Clone(d.Loads)
		for i := range d.Loads {
			ids := slices.Clone(d.Loads[i].Conductors)
			for j, id := range ids {
				if id == from {
					ids[j] = to
				} else if rest, ok := strings.CutPrefix(id, from+"/"); ok {
					ids[j] = to + "/" + rest
				}
			}
			d.Loads[i].Conductors = ids
		}
	})
}

// inLoad returns d with the conductor in the load of that id and in no other; a new load's current is unknown. "" takes it out of its load.
func inLoad(d *section.Document, conductor, load string) *section.Document {
	return d.With(func(d *section.Document) {
		var loads []section.Load
		found := false
		for _, l := range d.Loads {
			had := slices.Contains(l.Conductors, conductor)
			switch {
			case l.ID == load && !had:
				l.Conductors = append(slices.Clone(l.Conductors), conductor)
			case l.ID != load && had:
				l.Conductors = slices.DeleteFunc(slices.Clone(l.Conductors), func(id string) bool { return id == conductor })
			}
			found = found || l.ID == load
			if len(l.Conductors) > 0 {
				loads = append(loads, l)
			}
		}
		if load != "" && !found {
			loads = append(loads, section.Load{ID: load, Conductors: []string{conductor}, Unknown: true})
		}
		d.Loads = loads
	})
}
