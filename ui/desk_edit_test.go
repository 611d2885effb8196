package ui

import (
	"slices"
	"testing"

	"packrise/solver/section"
)

func TestDuplicate(t *testing.T) {
	k, _, _ := slowDesk(t)
	k.Select("L1", "F1")
	k.DuplicateSelection()
	d := k.Document()
	if len(d.Parts) != 6 || k.UndoName() != "duplicate 2 parts" {
		t.Fatalf("%d parts, undo %q", len(d.Parts), k.UndoName())
	}
	if !slices.Equal(k.Selection(), []string{"L4", "F2"}) {
		t.Errorf("selected %v", k.Selection())
	}
	shapes, _ := k.Shapes()
	for _, id := range k.Selection() {
		_, others := apart(shapes, []string{id})
		p, r := placeOf(shapes, id)
		if r == 0 || !free(disc{p, r}, others, roomOf(shapes)) {
			t.Errorf("%s at %v overlaps", id, p)
		}
	}
	if l := section.LoadOf(d, "L4"); l == nil || l.CurrentA != section.Some(16.0) {
		t.Errorf("the copy carries %+v", l)
	}
	k.Undo()
	if len(k.Document().Parts) != 4 {
		t.Error("undo must take both copies back")
	}
}
