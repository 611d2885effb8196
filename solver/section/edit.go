package section

import (
	"slices"
	"strconv"
	"strings"
)

// An Edit is one named step from a document to the next. Do must not touch the document that it is given.
type Edit struct {
	Name    string // as it stands behind Undo: "move L3"
	Object  string // what it acts on, for merging
	Gesture int    // edits with equal kind of Name, Object and non-zero Gesture are one step
	Do      func(*Document) *Document
}

// All edits below return the given document itself where they change nothing, such as for an id that does not exist. An id with a
// cable's name before it ("C1/L1") means the part in that cable's build, so that all cables of the build change with it.

// Move places a part. Nested parts (C1/L1) move inside their build, in the build's own coordinates.
func Move(d *Document, id string, to Point) *Document {
	return change(d, id, func(p *Part) { p.At = Some(to) })
}

// Unplace takes away a part's place: it is listed and drawn beside the section, and waits to be settled.
func Unplace(d *Document, id string) *Document {
	return change(d, id, func(p *Part) { p.At = Opt[Point]{} })
}

// PlaceAll places many parts at once (settle, lay up).
func PlaceAll(d *Document, at map[string]Point) *Document {
	parts := slices.Clone(d.Parts)
	changed := false
	nested := d
	for i := range parts {
		if to, ok := at[parts[i].ID]; ok && parts[i].At != Some(to) {
			parts[i].At, changed = Some(to), true
		}
	}
	if changed {
		nested = d.With(func(d *Document) { d.Parts = parts })
	}
	for _, p := range Unfold(nested) { // in the document's order, so that the outcome does not depend on the map's
		if to, ok := at[p.ID]; ok && p.Depth > 0 {
			nested = Move(nested, p.ID, to)
		}
	}
	return nested
}

// Add appends a part. Its id must be new: see FreshID.
func Add(d *Document, p Part) *Document {
	return d.With(func(d *Document) { d.Parts = append(slices.Clip(d.Parts), p) })
}

// FreshID returns an id that the document does not use, made from stem: "L" gives "L1", "L2" …
func FreshID(d *Document, stem string) string {
	used := map[string]bool{}
	for _, p := range d.Parts {
		used[p.ID] = true
	}
	return fresh(used, stem)
}

func fresh(used map[string]bool, stem string) string {
	stem = strings.TrimSpace(strings.ReplaceAll(stem, "/", "-"))
	if stem == "" {
		stem = "P"
	}
	for i := 1; ; i++ {
		if id := stem + strconv.Itoa(i); !used[id] {
			return id
		}
	}
}

// Delete takes parts out, and out of the loads, and drops loads that end up empty.
func Delete(d *Document, ids ...string) *Document {
	out := d
	for _, id := range ids {
		out = editList(out, id, func(parts []Part, i int) []Part { return slices.Delete(slices.Clone(parts), i, i+1) })
	}
	if out == d {
		return d
	}
	return prune(out)
}

// Replace swaps the part that has p's id for p, in place. p.ID may be a full id (C1/L1); the part in the build keeps its own.
func Replace(d *Document, p Part) *Document {
	id := p.ID
	p.ID = id[strings.LastIndex(id, "/")+1:]
	out := change(d, id, func(old *Part) { *old = p })
	if out == d {
		return d
	}
	return prune(out)
}

// RenamePart gives a part another id; loads, measurements and reasons follow. It changes nothing where to is empty, holds a "/" or is taken.
func RenamePart(d *Document, id, to string) *Document {
	if !goodID(to) || Find(d, id[:strings.LastIndex(id, "/")+1]+to) != nil {
		return d
	}
	out := change(d, id, func(p *Part) { p.ID = to })
	if out == d {
		return d
	}
	before, after := UnfoldAll(d), UnfoldAll(out)
	names := map[string]string{}
	for i := range before {
		names[before[i].ID] = after[i].ID
	}
	return follow(out, names, nil)
}

// SetLimit sets the temperature limit of a part, or, not OK, leaves it to its wire type and layers.
func SetLimit(d *Document, id string, limitC Opt[float64]) *Document {
	return change(d, id, func(p *Part) { p.LimitC = limitC })
}

// Duplicate adds an unplaced copy of a part of the top level and returns its id. What the copy's conductors carry is in loads of
// their own; the reason of its limit goes along.
func Duplicate(d *Document, id string) (out *Document, copyID string) {
	p := Find(d, id)
	if p == nil || strings.Contains(id, "/") {
		return d, ""
	}
	c := *p
	c.ID, c.At, c.Pinned = FreshID(d, strings.TrimRight(id, "0123456789")), Opt[Point]{}, false
	out = SetReason(Add(d, c), ReasonLimit+c.ID, d.Reason(ReasonLimit+id))
	for _, l := range d.Loads {
		var own []string
		for _, name := range l.Conductors {
			if name == id || strings.HasPrefix(name, id+"/") {
				own = append(own, c.ID+strings.TrimPrefix(name, id))
			}
		}
		if own != nil {
			if rest, ok := strings.CutPrefix(l.Neutral, id+"/"); ok {
				l.Neutral = c.ID + "/" + rest
			} else if l.Neutral == id {
				l.Neutral = c.ID
			}
			from := l.ID
			l.ID, l.Conductors = freshLoadID(out, c.ID), own
			out = twin(out.With(func(d *Document) { d.Loads = append(slices.Clip(d.Loads), l) }), from, l.ID)
		}
	}
	return out, c.ID
}

// With returns a copy with f applied to it: for edits of the title, surroundings, holder and materials. f must replace slices
// and not write into them.
func (d *Document) With(f func(*Document)) *Document {
	c := *d
	f(&c)
	return &c
}

// SetSurroundings returns the document with other surroundings.
func SetSurroundings(d *Document, s Surroundings) *Document {
	return d.With(func(d *Document) { d.Surroundings = s })
}

// SetHolder returns the document with another holder. What the outside rests against goes with a holder that can't have it.
func SetHolder(d *Document, h Holder) *Document {
	return d.With(func(d *Document) {
		if d.Holder = h; h.Kind == Wireway || h.Kind == Apart {
			d.Surroundings.Against = nil
		}
	})
}
