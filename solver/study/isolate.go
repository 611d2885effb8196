package study

import (
	"slices"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// isolate returns the design with one conductor left: every other part is taken out, of the cables that it lies in the jackets stay. Holder
// and surroundings are as they were. id may be nested (C1/L1).
func isolate(d *section.Document, id string, amperes float64, hertz section.Opt[float64]) *section.Document {
	path := strings.Split(id, "/")
	return d.With(func(d *section.Document) {
		d.Parts = only(d.Parts, path[0])
		if len(path) > 1 {
			d.Builds = slices.Clone(d.Builds)
			d.Parts = slices.Clone(d.Parts)
			thin(d, d.Parts, path)
		}
		d.Loads = []section.Load{{ID: "alone", Conductors: []string{id}, CurrentA: section.Some(amperes), FrequencyHz: hertz}}
		d.Cases, d.Measurements = nil, nil
	})
}

// thin gives the cable path[0] among parts a construction of its own that holds path[1] alone, and so on inwards.
func thin(d *section.Document, parts []section.Part, path []string) {
	if len(path) < 2 || len(parts) != 1 {
		return
	}
	for i := range d.Builds {
		if d.Builds[i].Name != parts[0].Build {
			continue
		}
		own := d.Builds[i]
		own.Name = freeName(d, own.Name)
		own.Parts = slices.Clone(only(own.Parts, path[1]))
		parts[0].Build = own.Name
		thin(d, own.Parts, path[1:])
		d.Builds = append(d.Builds, own)
		return
	}
}

func freeName(d *section.Document, name string) string {
	for {
		name += "-alone"
		if !slices.ContainsFunc(d.Builds, func(b section.Build) bool { return b.Name == name }) {
			return name
		}
	}
}

func only(parts []section.Part, id string) []section.Part {
	for i := range parts {
		if parts[i].ID == id {
			return parts[i : i+1 : i+1]
		}
	}
	return nil
}

// rest lets what lies loose come to rest on the floor of its conduit or wireway. Elsewhere parts stay where they are drawn.
func rest(d *section.Document, cat *catalog.Catalog) *section.Document {
	if h := d.Holder.Kind; h != section.Conduit && h != section.Wireway {
		return d
	}
	parts := slices.Clone(d.Parts)
	for i := range parts {
		parts[i].At = section.Opt[section.Point]{}
	}
	loose := d.With(func(d *section.Document) { d.Parts = parts })
	at, err := rating.Settle(loose, cat)
	if err != nil {
		return d
	}
	placed := slices.Clone(parts)
	for i := range placed {
		p, ok := at[placed[i].ID]
		if !ok {
			return d
		}
		placed[i].At = section.Some(p)
	}
	return d.With(func(d *section.Document) { d.Parts = placed })
}

// thrice puts the one part of an isolated design into the holder three times, all loaded alike. False where three do not fit, or where nothing
// would tell how three of them lie.
func thrice(d *section.Document, cat *catalog.Catalog) (*section.Document, bool) {
	h := d.Holder.Kind
	if len(d.Parts) != 1 || len(d.Loads) != 1 || h == section.NoHolder || h == section.Apart {
		return nil, false
	}
	p := d.Parts[0]
	id := d.Loads[0].Conductors[0]
	parts := make([]section.Part, 3)
	var ids []string
	for i := range parts {
		parts[i] = p
		parts[i].At = section.Opt[section.Point]{}
		if i > 0 {
			parts[i].ID += strings.Repeat("'", i)
		}
		ids = append(ids, parts[i].ID+strings.TrimPrefix(id, p.ID))
	}
	three := d.With(func(d *section.Document) {
		d.Parts = parts
		l := d.Loads[0]
		l.Conductors = ids
		d.Loads = []section.Load{l}
	})
	put := rating.Settle
	if h == section.Jacket || h == section.OpenBundle {
		put = rating.LayUp
	}
	at, err := put(three, cat)
	if err != nil {
		return nil, false
	}
	placed := slices.Clone(parts)
	for i := range placed {
		q, ok := at[placed[i].ID]
		if !ok {
			return nil, false
		}
		placed[i].At = section.Some(q)
	}
	return three.With(func(d *section.Document) { d.Parts = placed }), true
}
