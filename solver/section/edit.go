package section

// An Edit is one named step from a document to the next. Do must not touch the document that it is given.
type Edit struct {
	Name    string // as it stands behind Undo: "move L3"
	Object  string // what it acts on, for merging
	Gesture int    // edits with equal kind of Name, Object and non-zero Gesture are one step
	Do      func(*Document) *Document
}

// Move places a part. Nested parts (C1/L1) move inside their build, in the build's own coordinates.
func Move(d *Document, id string, to Point) *Document { panic("section: Move is not built") }

// PlaceAll places many parts of the top level at once (settle, lay up).
func PlaceAll(d *Document, at map[string]Point) *Document { panic("section: PlaceAll is not built") }

// Add appends a part. Its id must be new: see FreshID.
func Add(d *Document, p Part) *Document { panic("section: Add is not built") }

// FreshID returns an id that the document does not use, made from stem: "L" gives "L1", "L2" …
func FreshID(d *Document, stem string) string { panic("section: FreshID is not built") }

// Delete takes parts out, and out of the loads, and drops loads that end up empty.
func Delete(d *Document, ids ...string) *Document { panic("section: Delete is not built") }

// Replace swaps the part that has p's id for p, in place.
func Replace(d *Document, p Part) *Document { panic("section: Replace is not built") }

// SetCurrent sets the current of the load that has the conductor (all of that load's conductors follow); a conductor in no load gets a new
// one of its own. amperes not OK means unknown.
func SetCurrent(d *Document, conductor string, amperes Opt[float64]) *Document {
	panic("section: SetCurrent is not built")
}

// LoadOf returns the load that has the conductor, nil if none.
func LoadOf(d *Document, conductor string) *Load { panic("section: LoadOf is not built") }

// Find returns the part with the id ("L1", "C1/L1"), nil if none.
func Find(d *Document, id string) *Part { panic("section: Find is not built") }

// With returns a copy with f applied to it: for edits of the title, surroundings, holder and materials. f must replace slices
// and not write into them.
func (d *Document) With(f func(*Document)) *Document {
	c := *d
	f(&c)
	return &c
}
