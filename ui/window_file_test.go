package ui

import (
	"bytes"
	"image/png"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"packrise/solver/section"
)

// saved writes a design into a folder of the test.
func saved(t *testing.T, name string, d *section.Document) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), name)
	if err := section.Save(path, d); err != nil {
		t.Fatal(err)
	}
	return path
}

func TestTitleTellsNameAndMark(t *testing.T) {
	path := saved(t, "drive lead.yaml", testDesign())
	w, l := testWindow(t, testDesign(), usualSize)
	if got := w.win.Title(); got != "Three and a filler – Packrise" {
		t.Errorf("title %q", got)
	}
	w.load(path)
	l.until(t, "the file", func() bool { return w.desk.Path() == path })
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	if got := w.win.Title(); got != "drive lead.yaml* – Packrise" {
		t.Errorf("title %q", got)
	}
	w.save(nil)
	l.until(t, "the save", func() bool { return !w.desk.Dirty() })
	if got := w.win.Title(); got != "drive lead.yaml – Packrise" {
		t.Errorf("title %q", got)
	}
	d, problems, err := section.Open(path)
	if err != nil || d == nil {
		t.Fatal(problems, err)
	}
	if p := section.Find(d, "L1").At.V; p.X != -5 {
		t.Errorf("the file has L1 at %v", p)
	}
	if len(d.StockUsed) == 0 {
		t.Error("the file lacks the rows of the catalogue that it uses")
	}
}

func TestQuestionOnClose(t *testing.T) {
	closed := 0
	start := func() (*Window, *loop) {
		w, l := testWindow(t, testDesign(), usualSize)
		w.win.SetOnClosed(func() { closed++ })
		w.desk.path = filepath.Join(t.TempDir(), "a.yaml")
		return w, l
	}
	w, _ := start()
	w.quit()
	if closed != 1 {
		t.Error("an unchanged design closes without a question")
	}

	w, l := start()
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	w.quit()
	if closed != 1 || !strings.Contains(dialogText(w), "before closing") {
		t.Fatalf("closed %d, dialog %q", closed, dialogText(w))
	}
	answerDialog(t, w, "Cancel")
	if closed != 1 || dialogText(w) != "" {
		t.Error("Cancel must stay")
	}
	w.quit()
	answerDialog(t, w, "Save")
	l.until(t, "the save", func() bool { return closed == 2 })
	if _, err := os.Stat(w.desk.Path()); err != nil {
		t.Error(err)
	}

	w, _ = start()
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	w.quit()
	answerDialog(t, w, "Don't save")
	if _, err := os.Stat(w.desk.Path()); closed != 3 || err == nil {
		t.Errorf("closed %d; the file must not be there: %v", closed, err)
	}
}

func TestFailedSaveStays(t *testing.T) {
	w, l := testWindow(t, testDesign(), usualSize)
	w.desk.path = filepath.Join(t.TempDir(), "no such folder", "a.yaml")
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	then := false
	w.save(func() { then = true })
	l.until(t, "the message", func() bool { return dialogText(w) != "" })
	if !strings.Contains(dialogText(w), "Not saved") || !w.desk.Dirty() || then {
		t.Errorf("dialog %q, dirty %v, went on %v", dialogText(w), w.desk.Dirty(), then)
	}
}

func TestFailedOpenKeepsTheDesign(t *testing.T) {
	folder := t.TempDir()
	broken := filepath.Join(folder, "broken.yaml")
	text := "packrise: 1\nsurroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 9}\nholder: {kind: jacket, inside_mm: -3}\nparts:\n  - {id: L1, knd: core}\n"
	if err := os.WriteFile(broken, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
	w, l := testWindow(t, testDesign(), usualSize)
	d := w.desk.Document()
	for _, c := range []struct{ path, want string }{
		{broken, "broken.yaml:5"},
		{folder, "Not opened"},
		{filepath.Join(folder, "gone.yaml"), "Not opened"},
	} {
		w.load(c.path)
		l.until(t, "the message", func() bool { return dialogText(w) != "" })
		if s := dialogText(w); !strings.Contains(s, c.want) {
			t.Errorf("%s: %q lacks %q", filepath.Base(c.path), s, c.want)
		}
		if w.desk.Document() != d || w.desk.Path() != "" {
			t.Errorf("%s took the place of the open design", filepath.Base(c.path))
		}
		w.hide()
	}
}

func TestOpenAsksAboutChanges(t *testing.T) {
	path := saved(t, "b.yaml", testDesign())
	w, l := testWindow(t, testDesign(), usualSize)
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	w.open(path)
	answerDialog(t, w, "Cancel")
	l.run()
	if w.desk.Path() != "" || !w.desk.Dirty() {
		t.Error("Cancel must keep the design")
	}
	w.open(path)
	answerDialog(t, w, "Don't save")
	l.until(t, "the file", func() bool { return w.desk.Path() == path })
	if w.desk.Dirty() || w.desk.UndoName() != "" {
		t.Error("an opened design is new")
	}
	if got := w.app.Preferences().StringList(prefRecent); len(got) != 1 || got[0] != path {
		t.Errorf("recent files %v", got)
	}
	if !strings.Contains(w.menu.String(), "b.yaml  –  ") {
		t.Error("the menu lacks the recent file")
	}
}

func TestRecentFiles(t *testing.T) {
	w, l := testWindow(t, testDesign(), usualSize)
	for i := range 12 {
		w.remember(filepath.Join("/designs", string(rune('a'+i))+".yaml"))
	}
	w.remember("/designs/k.yaml")
	got := w.app.Preferences().StringList(prefRecent)
	if len(got) != mostRecent || got[0] != "/designs/k.yaml" || got[1] != "/designs/l.yaml" {
		t.Errorf("%v", got)
	}
	w.load("/designs/k.yaml") // isn't there
	l.until(t, "the message", func() bool { return dialogText(w) != "" })
	if got := w.app.Preferences().StringList(prefRecent); got[0] != "/designs/l.yaml" {
		t.Errorf("a file that is gone stays in %v", got)
	}
}

func TestSavePicture(t *testing.T) {
	if testing.Short() {
		t.Skip("long under the race detector")
	}
	w, l := testWindow(t, testDesign(), usualSize)
	path := filepath.Join(t.TempDir(), "a.png")
	w.savePicture(path)
	l.until(t, "the picture", func() bool { return strings.HasPrefix(w.status.text, "saved") })
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if img, err := png.Decode(bytes.NewReader(data)); err != nil || img.Bounds().Dx() != pictureWide {
		t.Error(err)
	}
	w.savePicture(filepath.Join(path, "b.png")) // a file is no folder
	l.until(t, "the message", func() bool { return dialogText(w) != "" })
	if s := dialogText(w); !strings.Contains(s, "can't be written") {
		t.Errorf("it says %q", s)
	}
	if all, _ := os.ReadDir(filepath.Dir(path)); len(all) != 1 {
		t.Errorf("%d files in the folder, want the picture alone", len(all))
	}
}
