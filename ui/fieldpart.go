package ui

import (
	"slices"

	"packrise/solver/section"
)

// withPart returns d with f applied to a copy of the part; its id stays. A part of a cable changes in its construction, so in every cable that
// uses it. f must replace slices and not write into them.
func withPart(d *section.Document, id string, f func(*section.Part)) *section.Document {
	p := section.Find(d, id)
	if p == nil {
		return d
	}
	q := *p
	f(&q)
	q.ID = id
	return section.Replace(d, q)
}

// inLoad returns d with the conductor in the load of that id and in no other; a new load's current is unknown. "" takes it out of its load.
func inLoad(d *section.Document, conductor, load string) *section.Document {
	if l := section.LoadOf(d, conductor); l != nil && l.ID == load {
		return d
	}
	d = section.Unassign(d, conductor)
	if load == "" {
		return d
	}
	return d.With(func(d *section.Document) {
		d.Loads = slices.Clone(d.Loads)
		for i := range d.Loads {
			if l := &d.Loads[i]; l.ID == load {
				l.Conductors = append(slices.Clone(l.Conductors), conductor)
				return
			}
		}
		d.Loads = append(d.Loads, section.Load{ID: load, Conductors: []string{conductor}, Unknown: true})
	})
}
