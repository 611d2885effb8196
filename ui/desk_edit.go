package ui

import (
	"fmt"
	"strings"

	"packrise/solver/section"
)

// DeleteSelection takes the selected parts out, as one step.
func (k *Desk) DeleteSelection() {
	ids := k.selection
	if len(ids) == 0 {
		return
	}
	k.Apply(section.Edit{
		Name: "delete " + someOf(ids), Object: strings.Join(ids, " "),
		Do: func(d *section.Document) *section.Document { return section.Delete(d, ids...) },
	}, false)
}

// someOf names ids as they stand behind Undo.
func someOf(ids []string) string {
	if len(ids) == 1 {
		return ids[0]
	}
	return fmt.Sprintf("%d parts", len(ids))
}

// SelectAll selects every part of the top level.
func (k *Desk) SelectAll() {
	var ids []string
	for _, p := range k.Document().Parts {
		ids = append(ids, p.ID)
	}
	k.Select(ids...)
}

// DuplicateSelection puts a copy of each selected part of the top level beside it, with a load of its own of the same current, and selects the copies.
func (k *Desk) DuplicateSelection() {
	tops := topsOf(k.selection)
	if len(tops) == 0 {
		return
	}
	shapes, _ := k.Shapes()
	in := roomOf(shapes)
	_, taken := apart(shapes, nil)
	var made []string
	k.Apply(section.Edit{
		Name: "duplicate " + someOf(tops), Object: strings.Join(tops, " "),
		Do: func(d *section.Document) *section.Document {
			made = made[:0]
			for _, id := range tops {
				if c, next, ok := copyOf(d, id); ok {
					if at, r := placeOf(shapes, id); r > 0 {
						c.At = section.Opt[section.Point]{}
						if p, ok := nearestFree(disc{at, r}, taken, in); ok {
							c.At = section.Some(section.Point{X: tidy(p.X), Y: tidy(p.Y)})
							taken = append(taken, disc{p, r})
						}
					}
					d = section.Add(next, c)
					d = withLoadOf(d, id, c.ID)
					made = append(made, c.ID)
				}
			}
			return d
		},
	}, false)
	k.Select(made...)
}

// copyOf returns a copy of a part of the top level under an id of its own.
func copyOf(d *section.Document, id string) (section.Part, *section.Document, bool) {
	p := section.Find(d, id)
	if p == nil {
		return section.Part{}, d, false
	}
	c := *p
	c.ID = section.FreshID(d, strings.TrimRight(id, "0123456789"))
	return c, d, true
}

// placeOf returns where a part stands and its outside radius; unplaced parts have none.
func placeOf(shapes []section.Shape, id string) (section.Point, float64) {
	for _, s := range shapes {
		if s.ID == id && !s.Unset {
			return s.At, s.OuterR()
		}
	}
	return section.Point{}, 0
}

// withLoadOf gives a conductor the current of another, in a load of its own.
func withLoadOf(d *section.Document, from, to string) *section.Document {
	if l := section.LoadOf(d, from); l != nil && !l.HeatWM.OK {
		return section.SetCurrent(d, to, l.CurrentA)
	}
	return d
}
