package ui

import (
	"packrise/solver/catalog"
	"packrise/solver/section"
)

// Settle lets the parts of the top level fall, beside the window; done is called on the window's goroutine, with an error when they do not fit.
// Nothing is changed when the document has become another one meanwhile.
func (k *Desk) Settle(done func(error)) { k.arrange("settle", k.rooms.Settle, done) }

// LayUp lays the parts of the top level in concentric layers, as Settle does.
func (k *Desk) LayUp(done func(error)) { k.arrange("lay up", k.rooms.LayUp, done) }

func (k *Desk) arrange(name string, f func(*section.Document, *catalog.Catalog) (map[string]section.Point, error), done func(error)) {
	d, rev := k.Document(), k.rev
	k.rooms.Beside(func() {
		at, err := f(d, k.cat)
		k.rooms.Hop(func() {
			if k.closed {
				return
			}
			if err == nil && k.rev == rev {
				k.Apply(placing(name, at), false)
			}
			done(err)
		})
	})
}

func placing(name string, at map[string]section.Point) section.Edit {
	return section.Edit{Name: name, Do: func(d *section.Document) *section.Document { return section.PlaceAll(d, at) }}
}

// MakeRoom pushes the other parts off the one held, beside the window; done is told whether there is room.
func (k *Desk) MakeRoom(held string, done func(ok bool)) {
	k.makeRoom(k.Document(), held, section.Edit{Name: "make room for " + held}, nil, done)
}

// MakeRoomAt puts a part where it overlaps others and pushes those away, as one step with the drag that is under way. Where there is no room, the part
// stays where otherwise has it.
func (k *Desk) MakeRoomAt(id string, to section.Point, otherwise section.Edit) {
	d := section.Move(k.Document(), id, to)
	first := func(d *section.Document) *section.Document { return section.Move(d, id, to) }
	k.makeRoom(d, id, section.Edit{Name: otherwise.Name, Object: otherwise.Object, Gesture: otherwise.Gesture}, first, func(ok bool) {
		if !ok {
			k.Apply(otherwise, false)
		}
	})
}

func (k *Desk) makeRoom(d *section.Document, held string, e section.Edit, first func(*section.Document) *section.Document, done func(ok bool)) {
	rev := k.rev
	k.rooms.Beside(func() {
		at, ok := k.rooms.MakeRoom(d, k.cat, held)
		k.rooms.Hop(func() {
			if k.closed || k.rev != rev {
				return
			}
			if ok {
				e.Do = func(d *section.Document) *section.Document {
					if first != nil {
						d = first(d)
					}
					return section.PlaceAll(d, at)
				}
				k.Apply(e, false)
			}
			done(ok)
		})
	})
}
