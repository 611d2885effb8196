package ui

import (
	"bytes"
	"image/png"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/test"
	"fyne.io/fyne/v2/widget"

	"packrise/solver/section"
)

// testWindow is the program's window on a design, solved, at a size.
func testWindow(t *testing.T, d *section.Document, size fyne.Size) (*Window, *loop) {
	t.Helper()
	l := newLoop()
	w := NewWindow(test.NewTempApp(t), Options{Catalog: testCatalog(), Document: d, Version: "test", Rooms: l.rooms(Rooms{})})
	w.win.Resize(size)
	t.Cleanup(w.Close)
	l.solved(t, w.desk)
	return w, l
}

var usualSize = fyne.NewSize(1200, 800)

// saved writes a design into a folder of the test.
func saved(t *testing.T, name string, d *section.Document) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), name)
	if err := section.Save(path, d); err != nil {
		t.Fatal(err)
	}
	return path
}

// texts collects what a tree of objects says.
func texts(o fyne.CanvasObject) string {
	var s strings.Builder
	for _, x := range test.LaidOutObjects(o) {
		switch x := x.(type) {
		case *widget.Label:
			s.WriteString(x.Text + "\n")
		case *widget.Button:
			s.WriteString("[" + x.Text + "]\n")
		}
	}
	return s.String()
}

// dialogText is what the open dialog says, "" for none.
func dialogText(w *Window) string {
	if o := w.win.Canvas().Overlays().Top(); o != nil {
		return texts(o)
	}
	return ""
}

// answer presses a button of the open dialog.
func answerDialog(t *testing.T, w *Window, label string) {
	t.Helper()
	for _, o := range test.LaidOutObjects(w.win.Canvas().Overlays().Top()) {
		if b, ok := o.(*widget.Button); ok && b.Text == label {
			test.Tap(b)
			return
		}
	}
	t.Fatalf("no button %q in %q", label, dialogText(w))
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

func TestUndoOfATextFieldIsItsOwn(t *testing.T) {
	w, _ := testWindow(t, testDesign(), usualSize)
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	e := &pathEntry{escaped: func() {}}
	e.ExtendBaseWidget(e)
	w.win.SetContent(container.NewStack(e))
	w.win.Canvas().Focus(e)
	test.Type(e, "word")
	w.undo()
	if e.Text != "" || w.desk.UndoName() != "move L1" {
		t.Errorf("the field says %q, undo %q", e.Text, w.desk.UndoName())
	}
}

func TestNewDesignIsSound(t *testing.T) {
	w, l := testWindow(t, testDesign(), usualSize)
	w.newDesign()
	if len(w.desk.Document().Parts) != 0 || w.desk.Dirty() {
		t.Error("a new design is empty and unchanged")
	}
	for _, p := range w.desk.Problems() {
		if p.Rule != "empty" {
			t.Errorf("a new design has a problem: %v", p)
		}
	}
	data, err := section.Write(w.desk.Document())
	if err != nil {
		t.Fatal(err)
	}
	if d, problems := section.Read(data); d == nil {
		t.Errorf("a new design can't be read back: %v", problems)
	}
	l.until(t, "an answer", func() bool { return !w.desk.Solving() })
	if s, _, _ := w.desk.Sentence(); s != "Nothing in the section yet." {
		t.Errorf("it says %q", s)
	}
}

func TestEveryDemoSolves(t *testing.T) {
	if testing.Short() {
		t.Skip("long under the race detector")
	}
	all := demoDesigns(demoFiles())
	if len(all) < 3 {
		t.Fatalf("%d demo designs, want three at least", len(all))
	}
	w, l := testWindow(t, testDesign(), usualSize)
	for _, d := range all {
		w.openDemo(d)
		l.solved(t, w.desk)
		if r, fresh := w.desk.Result(); !fresh || r.Governing == nil {
			s, _, _ := w.desk.Sentence()
			t.Errorf("%s: %s", d.title, s)
		}
	}
	if d, err := FirstDesign(); err != nil || d == nil {
		t.Error(err)
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

func TestHolderDialogEdits(t *testing.T) {
	w, l := testWindow(t, testDesign(), usualSize)
	enter := func(key, text string) {
		t.Helper()
		for _, o := range test.LaidOutObjects(w.win.Canvas().Overlays().Top()) {
			if f, ok := o.(*fieldEntry); ok && f.in.key == key {
				f.SetText(text)
				f.OnSubmitted(text)
				return
			}
		}
		t.Fatalf("no field %q", key)
	}
	w.showHolder()
	enter("inside", "1 in")
	if got := w.desk.Document().Holder.InsideMM; got != section.Some(25.4) {
		t.Errorf("inside %v", got)
	}
	enter("kind", "wireway")
	h := w.desk.Document().Holder
	if h.Kind != section.Wireway || h.WidthMM != section.Some(25.4) || at(t, w.desk, "L1").X != -4+12.7 {
		t.Errorf("%+v, L1 at %v", h, at(t, w.desk, "L1"))
	}
	enter("kind", "nonsense")
	if w.desk.Document().Holder.Kind != section.Wireway {
		t.Error("nonsense changed the holder")
	}
	enter("kind", "jacket")
	l.solved(t, w.desk)
	w.hide()
	w.desk.Undo()
	w.desk.Undo()
	w.desk.Undo()
	if w.desk.Dirty() {
		t.Error("three undos must bring the design back")
	}
	w.showSurroundings()
	enter("ambient", "104F")
	if got := w.desk.Document().Surroundings.AmbientC.V; got < 39.99 || got > 40.01 {
		t.Errorf("ambient %g °C", got)
	}
	enter("surroundings", "surface held")
	if s := w.desk.Document().Surroundings; s.Kind != section.FixedWall || s.FilmWM2K.OK {
		t.Errorf("%+v", s)
	}
	l.solved(t, w.desk)
}

func TestFrameFitsSmallWindows(t *testing.T) {
	for _, size := range []fyne.Size{fyne.NewSize(1024, 640), fyne.NewSize(760, 480), fyne.NewSize(1400, 875), fyne.NewSize(1920, 1080)} {
		w, _ := testWindow(t, testDesign(), size)
		w.frame.Layout(nil, size)
		if open := w.frame.details.Visible(); open != (size.Width >= wideEnough) {
			t.Errorf("%v: details are open %v", size, open)
		}
		w.focusDetails()
		inner := w.win.Canvas().Size()
		for _, o := range w.frame.objects() {
			p, s := o.Position(), o.Size()
			if o.Visible() && (p.X < 0 || p.Y < 0 || p.X+s.Width > inner.Width+3 || p.Y+s.Height > inner.Height+3) {
				t.Errorf("%v: %T at %v of size %v is out of %v", size, o, p, s, inner)
			}
		}
		if s := w.view.Size(); s.Width < sectionLeast-1 || s.Height < 60 {
			t.Errorf("%v: the section is left with %v", size, s)
		}
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

func TestTraceTellsScripts(t *testing.T) {
	var out bytes.Buffer
	l := newLoop()
	w := NewWindow(test.NewTempApp(t), Options{Catalog: testCatalog(), Document: testDesign(), Trace: &out, Rooms: l.rooms(Rooms{})})
	t.Cleanup(w.Close)
	w.win.Resize(usualSize)
	l.solved(t, w.desk)
	l.until(t, "the places", func() bool { return strings.Contains(out.String(), "placed 4 parts") })
	for _, want := range []string{"title Three and a filler – Packrise\n", "part L1 at ", "solved rev 1: "} {
		if !strings.Contains(out.String(), want) {
			t.Errorf("%q lacks %q", out.String(), want)
		}
	}
}
