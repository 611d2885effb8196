package ui

import (
	"errors"
	"fmt"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

// put puts in what was understood.
func (l *PutLine) put(p catalog.Parsed) error {
	if p.Holder != "" {
		return l.putHolder(p)
	}
	part, err := partOf(l.desk.Catalog(), p)
	if err != nil {
		return err
	}
	stem := "L"
	if part.Kind == section.Rod {
		stem = "F"
		if part.BoreMM.OK {
			stem = "H"
		}
	}
	if n := len(section.UnfoldAll(l.desk.Document())) + p.Count; n > section.MaxParts {
		return fmt.Errorf("that would make %d parts and a section has at most %d; take some out before you put more in", n, section.MaxParts)
	}
	l.done("")
	l.place(part, stem, max(p.Count, 1))
	return nil
}

// place looks for places beside the window's goroutine and puts the parts in there, as one step.
func (l *PutLine) place(part section.Part, stem string, n int) {
	k := l.desk
	d, rev, rooms, cat := k.Document(), k.Revision(), k.rooms, k.Catalog()
	outline := func(d *section.Document) []section.Shape {
		shapes, _ := rooms.Outline(d, cat)
		return shapes
	}
	rooms.Beside(func() {
		places := freePlaces(outline, d, part, n)
		rooms.Hop(func() {
			if k.Revision() != rev {
				l.place(part, stem, n) // the section has changed meanwhile
				return
			}
			l.add(part, stem, places, n)
		})
	})
}

// add puts n parts into the document, the last of them without a place where there are too few, and selects them.
func (l *PutLine) add(part section.Part, stem string, places []section.Point, n int) {
	d := l.desk.Document()
	next, ids := d, []string(nil)
	for i := range n {
		part.ID = section.FreshID(next, stem)
		part.At = section.Opt[section.Point]{}
		if i < len(places) {
			part.At = section.Some(places[i])
		}
		next = section.Add(next, part)
		ids = append(ids, part.ID)
	}
	added := next.Parts[len(d.Parts):]
	l.desk.Apply(section.Edit{Name: "put in " + idRange(ids), Object: ids[0], Do: func(d *section.Document) *section.Document {
		for _, p := range added {
			d = section.Add(d, p)
		}
		return d
	}}, false)
	l.desk.Select(ids...)
	if said := putSaid(ids, n-len(places)); said != "" {
		l.say(said, false)
	}
}

// putSaid tells what can't be seen: parts for which there was no room.
func putSaid(ids []string, unplaced int) string {
	switch {
	case unplaced == 0:
		return ""
	case unplaced == 1 && len(ids) == 1:
		return ids[0] + " has no free place and waits beside the section: settle all parts, or take a larger holder."
	case unplaced == len(ids):
		return idRange(ids) + " have no free place and wait beside the section: settle all parts, or take a larger holder."
	}
	return fmt.Sprintf("%d of %d have no free place and wait beside the section: settle all parts, or take a larger holder.", unplaced, len(ids))
}

// idRange names new parts: "L4", "L4 to L6".
func idRange(ids []string) string {
	if len(ids) == 1 {
		return ids[0]
	}
	return ids[0] + " to " + ids[len(ids)-1]
}

// partOf makes the part that was understood, without id and place.
func partOf(cat *catalog.Catalog, p catalog.Parsed) (section.Part, error) {
	switch {
	case p.Wire != "":
		return section.Part{Kind: section.Core, Stock: p.Wire}, nil
	case p.RodMM > 0:
		part := section.Part{Kind: section.Rod, Diameter: section.Some(p.RodMM), Material: p.Material}
		if p.Hose && p.BoreMM > 0 {
			part.BoreMM = section.Some(p.BoreMM)
		}
		return part, nil
	case p.Size == "":
		return section.Part{}, errors.New("nothing here can be put in; write such as 12 thhn, M25, filler 4")
	}
	part := section.Part{Kind: section.Core, Type: p.Type, Conductor: &section.Conductor{Size: p.Size, Metal: p.Metal, Class: p.Class}}
	t, ok := cat.WireType(p.Type)
	if !ok {
		return part, nil
	}
	thick, _, ok := cat.TypicalWire(p.Size, p.Type)
	if !ok {
		return section.Part{}, fmt.Errorf("no usual insulation is known for %s in %s; put in a wire that the catalogue lists, then change its size and insulation", t.Name, prettySize(p.Size))
	}
	part.Layers = []section.Layer{{Material: t.Insulation, ThicknessMM: micrometres(thick * 1e3)}}
	return part, nil
}

// putHolder puts the parts into another holder.
func (l *PutLine) putHolder(p catalog.Parsed) error {
	cat := l.desk.Catalog()
	row, ok := cat.Holder(p.Holder)
	if !ok {
		return fmt.Errorf("there is no conduit or wireway %q", p.Holder)
	}
	l.desk.Apply(section.Edit{Name: "put into " + row.Name, Object: "section", Do: func(d *section.Document) *section.Document {
		return withHolder(cat, d, row)
	}}, false)
	said := ""
	for _, problem := range l.desk.Problems() {
		if problem.Severity == section.Refused {
			said = "The parts do not lie free in " + row.Name + " yet: settle them, or undo."
			break
		}
	}
	l.done(said)
	return nil
}
