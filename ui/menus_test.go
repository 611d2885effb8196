package ui

import (
	"strings"
	"testing"
)

func TestMenusTellSteps(t *testing.T) {
	w, _ := testWindow(t, testDesign(), usualSize)
	if s := w.menu.String(); !strings.Contains(s, "Undo (off)\nRedo (off)\n") || !strings.Contains(s, "Jacket …\n") || !strings.Contains(s, "Delete (off)\n") {
		t.Errorf("menus %q", s)
	}
	w.desk.Select("L1")
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	if s := w.menu.String(); !strings.Contains(s, "Undo move L1\n") || !strings.Contains(s, "Delete\n") {
		t.Errorf("menus %q", s)
	}
	w.undo()
	if s := w.menu.String(); !strings.Contains(s, "Redo move L1\n") {
		t.Errorf("menus %q", s)
	}
	if w.cmds.undo.Text != "Undo" || !w.cmds.undo.Disabled() {
		t.Errorf("the button says %q", w.cmds.undo.Text)
	}
}

func TestKeyboardSheetNamesEveryShortcut(t *testing.T) {
	w, _ := testWindow(t, testDesign(), usualSize)
	w.showKeyboard()
	s := dialogText(w)
	for _, want := range []string{"Ctrl+S", "Ctrl+Shift+S", "Ctrl+Z", "Shift+arrows", "F1"} {
		if !strings.Contains(s, want) {
			t.Errorf("the sheet lacks %s", want)
		}
	}
	seen := map[string]string{}
	for _, top := range w.menu.main.Items {
		for _, i := range top.Items {
			if key := shortcutText(i.Shortcut); key != "" {
				if seen[key] != "" {
					t.Errorf("%s is on %q and %q", key, seen[key], i.Label)
				}
				seen[key] = i.Label
			}
		}
	}
}

func TestHeatFlowLinesAreRemembered(t *testing.T) {
	w, _ := testWindow(t, testDesign(), usualSize)
	if w.menu.flow.Checked || w.view.Flow() {
		t.Error("the lines are shown before anybody asks")
	}
	w.menu.flow.Action()
	if !w.menu.flow.Checked || !w.view.Flow() || !w.app.Preferences().Bool(prefFlow) {
		t.Error("the item does not show the lines, or not for good")
	}
	again := NewWindow(w.app, Options{Catalog: testCatalog(), Document: testDesign(), Rooms: newLoop().rooms(Rooms{})})
	t.Cleanup(again.Close)
	if !again.view.Flow() || !again.menu.flow.Checked {
		t.Error("the next window forgets them")
	}
	w.menu.flow.Action()
	if w.menu.flow.Checked || w.view.Flow() || w.app.Preferences().Bool(prefFlow) {
		t.Error("the item does not hide the lines again")
	}
}
