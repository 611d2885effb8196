package ui

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"fyne.io/fyne/v2/test"

	"packrise/solver/section"
)

func TestChooserOpensAndSaves(t *testing.T) {
	path := saved(t, "c.yaml", testDesign())
	folder := filepath.Dir(path)
	if err := os.WriteFile(filepath.Join(folder, "notes.txt"), nil, 0o644); err != nil {
		t.Fatal(err)
	}
	w, l := testWindow(t, testDesign(), usualSize)
	w.app.Preferences().SetString(prefFolder, folder)
	w.chooseOpen()
	l.run()
	l.until(t, "the folder", func() bool { return strings.Contains(dialogText(w), "c.yaml") })
	if strings.Contains(dialogText(w), "notes.txt") {
		t.Error("files that aren't designs are listed")
	}
	focused := w.win.Canvas().Focused().(*pathEntry)
	test.Type(focused, "nothing here.yaml")
	focused.OnSubmitted("")
	l.until(t, "the refusal", func() bool { return strings.Contains(dialogText(w), "can't be opened") })
	focused.SetText("c.yaml")
	focused.OnSubmitted("")
	l.until(t, "the file", func() bool { return w.desk.Path() == path })
	if dialogText(w) != "" {
		t.Error("the dialog is still open")
	}

	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	w.saveAs(nil)
	focused = w.win.Canvas().Focused().(*pathEntry)
	focused.SetText("d")
	focused.OnSubmitted("")
	l.until(t, "the save", func() bool { return w.desk.Path() == filepath.Join(folder, "d.yaml") })
	if d, _, err := section.Open(path); err != nil || section.Find(d, "L1").At.V.X != -4 {
		t.Error("Save as touched the old file")
	}
	w.saveAs(nil) // over a file that is there
	focused = w.win.Canvas().Focused().(*pathEntry)
	focused.SetText("c.yaml")
	focused.OnSubmitted("")
	l.until(t, "the question", func() bool { return strings.Contains(dialogText(w), "Replace it?") })
	answerDialog(t, w, "Replace")
	l.until(t, "the save", func() bool { return w.desk.Path() == path })
}
