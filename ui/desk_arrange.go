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
	k.long()
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
	k.long()
	d, rev := k.Document(), k.rev
	k.rooms.Beside(func() {
		at, ok := k.rooms.MakeRoom(d, k.cat, held)
		k.rooms.Hop(func() {
			if k.closed || k.rev != rev {
				return
			}
			if ok {
				k.Apply(placing("make room for "+held, at), false)
			}
			done(ok)
		})
	})
}
