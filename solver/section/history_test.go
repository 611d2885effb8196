package section

import (
	"fmt"
	"testing"

	"pgregory.net/rapid"
)

func title(s string) func(*Document) *Document {
	return func(d *Document) *Document { return d.With(func(d *Document) { d.Title = s }) }
}

func TestHistory(t *testing.T) {
	h := NewHistory(&Document{Title: "0"})
	is := func(now, undo, redo string, dirty bool) {
		t.Helper()
		if h.Now().Title != now || h.UndoName() != undo || h.RedoName() != redo || h.Dirty() != dirty {
			t.Fatalf("now %q, undo %q, redo %q, dirty %v; want %q, %q, %q, %v", h.Now().Title, h.UndoName(), h.RedoName(), h.Dirty(), now, undo, redo, dirty)
		}
	}
	is("0", "", "", false)
	if h.Undo() || h.Redo() {
		t.Fatal("there is a step in a new history")
	}
	h.Apply(Edit{Name: "one", Do: title("1")})
	h.Apply(Edit{Name: "two", Do: title("2")})
	is("2", "two", "", true)
	if h.Apply(Edit{Name: "idle", Do: title("2")}) || h.Apply(Edit{Name: "nil", Do: func(*Document) *Document { return nil }}) {
		t.Fatal("an idle edit is a step")
	}
	h.MarkSaved()
	is("2", "two", "", false)
	h.Undo()
	is("1", "one", "two", true)
	h.Redo()
	is("2", "two", "", false)
	h.Undo()
	h.Undo()
	is("0", "", "one", true)
	h.Apply(Edit{Name: "other", Do: title("x")})
	is("x", "other", "", true)
	h.Apply(Edit{Name: "again", Do: title("2")}) // says what the file says, whatever way it came about
	is("2", "again", "", false)
}

// A drag is one step, two drags are two, a save lies between steps, and a drag back to where it began is none.
func TestGesturesMerge(t *testing.T) {
	h := NewHistory(&Document{Title: "0"})
	edit := func(name, object string, gesture int, to string) {
		h.Apply(Edit{Name: name, Object: object, Gesture: gesture, Do: title(to)})
	}
	steps := func(want int) {
		t.Helper()
		if len(h.steps) != want || h.at != want || len(h.docs) != want+1 {
			t.Fatalf("%d steps at %d; want %d", len(h.steps), h.at, want)
		}
	}
	edit("move L1", "L1", 1, "a")
	edit("move L1", "L1", 1, "b")
	edit("move L1", "L1", 1, "c")
	steps(1)
	edit("move L1", "L1", 2, "d")
	steps(2)
	edit("move L2", "L2", 2, "e") // another object
	steps(3)
	edit("turn L2", "L2", 2, "f") // another kind
	steps(4)
	edit("turn L2", "L2", 0, "g") // no gesture
	edit("turn L2", "L2", 0, "h")
	steps(6)
	edit("set L2 to 1 A", "L2", 3, "i")
	edit("set L2 to 16 A", "L2", 3, "j")
	steps(7)
	if h.UndoName() != "set L2 to 16 A" {
		t.Errorf("the merged step is called %q", h.UndoName())
	}
	h.MarkSaved()
	edit("set L2 to 17 A", "L2", 3, "k")
	steps(8)
	h.Undo()
	if h.Dirty() || h.Now().Title != "j" {
		t.Error("undoing what came after the save does not lead back to it")
	}
	edit("set L2 to 18 A", "L2", 3, "l") // after an undo nothing merges
	steps(8)
	edit("set L2 to 17 A", "L2", 3, "j")
	steps(7)
	if h.Dirty() {
		t.Error("back at the saved document it counts as changed")
	}
	edit("set L2 to 19 A", "L2", 3, "m")
	steps(8)
}

func TestHistoryForgetsTheOldest(t *testing.T) {
	h := NewHistory(&Document{Title: "start"})
	for i := range MaxSteps + 20 {
		h.Apply(Edit{Name: fmt.Sprint(i), Do: title(fmt.Sprint(i))})
	}
	n := 0
	for h.Undo() {
		n++
	}
	if n != MaxSteps || h.Now().Title != "19" || !h.Dirty() {
		t.Errorf("%d steps back to %q; want %d to 19", n, h.Now().Title, MaxSteps)
	}
}

// Against a plain model: undo and redo walk over the same documents, and Dirty is whether they differ from the saved one.
func TestHistoryWalks(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		h := NewHistory(&Document{})
		model, at, saved := []string{""}, 0, ""
		for i := range rapid.IntRange(1, 40).Draw(rt, "n") {
			switch rapid.IntRange(0, 4).Draw(rt, "do") {
			case 0, 1:
				to := rapid.SampledFrom([]string{"", "a", "b", fmt.Sprint(i)}).Draw(rt, "to")
				if changed := h.Apply(Edit{Name: "x", Do: title(to)}); changed != (to != model[at]) {
					rt.Fatalf("changed: %v", changed)
				}
				if to != model[at] {
					model, at = append(model[:at+1:at+1], to), at+1
				}
			case 2:
				if h.Undo() {
					at--
				} else if at != 0 {
					rt.Fatal("no undo")
				}
			case 3:
				if h.Redo() {
					at++
				} else if at != len(model)-1 {
					rt.Fatal("no redo")
				}
			case 4:
				h.MarkSaved()
				saved = model[at]
			}
			if h.Now().Title != model[at] || h.Dirty() != (model[at] != saved) {
				rt.Fatalf("at %q, dirty %v; want %q, saved %q", h.Now().Title, h.Dirty(), model[at], saved)
			}
		}
	})
}
