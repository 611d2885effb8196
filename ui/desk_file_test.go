package ui

import (
	"testing"
)

func TestLoadStartsAnew(t *testing.T) {
	k, l, f := slowDesk(t)
	<-f.started
	k.Apply(moveTo("L1", -5, 0, 0), false)
	<-f.started
	k.Select("L1")
	h := listenTo(k)
	d := testDesign()
	k.Load(d, "/somewhere/a b.yaml", nil)
	<-f.started
	if k.Document() != d || k.Dirty() || k.UndoName() != "" || len(k.Selection()) != 0 || k.Name() != "a b.yaml" {
		t.Errorf("dirty %v, undo %q, selected %v, name %q", k.Dirty(), k.UndoName(), k.Selection(), k.Name())
	}
	if told := h.told(); told&ChangedFile == 0 || told&ChangedDocument == 0 {
		t.Error("nobody was told")
	}
	answerOne(t, k, l, f)
	if _, fresh := k.Result(); !fresh {
		t.Error("no answer for the new design")
	}
}

func TestSavedMark(t *testing.T) {
	k, _, _ := slowDesk(t)
	if k.Name() != "Three and a filler" {
		t.Errorf("a design without a file is called %q", k.Name())
	}
	k.Apply(moveTo("L1", -5, 0, 0), false)
	saved := k.Document()
	k.Apply(moveTo("L1", -6, 0, 0), false) // while the file was written
	k.Saved(saved, "/x/y.yaml")
	if !k.Dirty() || k.Name() != "y.yaml" {
		t.Error("what was changed during the save counts as saved")
	}
	k.Saved(k.Document(), "/x/y.yaml")
	if k.Dirty() {
		t.Error("dirty after the save")
	}
	k.Undo()
	if !k.Dirty() {
		t.Error("an undo behind the saved state is a change")
	}
}
