package ui

import (
	"errors"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

func TestArranging(t *testing.T) {
	asked := make(chan func(), 10)
	moved := map[string]section.Point{"L1": {X: 1, Y: 1}}
	var refuse error
	place := func(*section.Document, *catalog.Catalog) (map[string]section.Point, error) { return moved, refuse }
	f := newFakeSolver()
	k, l := testDeskWith(t, testDesign(), Rooms{Solve: f.solve, Outline: fakeOutline, Settle: place, LayUp: place, Beside: func(f func()) { asked <- f }})
	var said []error
	done := func(err error) { said = append(said, err) }

	k.Settle(done)
	(<-asked)()
	l.run()
	if k.UndoName() != "settle" || at(t, k, "L1").X != 1 {
		t.Errorf("undo %q, L1 at %v", k.UndoName(), at(t, k, "L1"))
	}
	k.Undo()
	k.LayUp(done)
	k.Apply(moveTo("L2", 5, 0, 0), false) // meanwhile
	(<-asked)()
	l.run()
	if at(t, k, "L1").X != -4 {
		t.Error("a stale arrangement was applied")
	}
	refuse = errors.New("they do not fit")
	k.LayUp(done)
	(<-asked)()
	l.run()
	if len(said) != 3 || said[2] == nil || k.UndoName() != "move L2" {
		t.Errorf("said %v, undo %q", said, k.UndoName())
	}
}
