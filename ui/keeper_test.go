package ui

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/storage"
	"fyne.io/fyne/v2/test"

	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/ui/keep"
)

// goneOwner is a run of the program that is over.
func goneOwner() keep.Owner { return keep.Owner{PID: 1 << 30, Host: keep.Me().Host, Begun: "1"} }

// parentOwner is a process that runs and is not this one.
func parentOwner(t *testing.T, path string) *keep.Note {
	t.Helper()
	n := keep.NewNote(keep.Owner{PID: 1, Host: "another machine"})
	if n.Take(path) != nil {
		t.Fatal("nobody had it")
	}
	return n
}

// keptWindow is a window that keeps work aside in a folder; prepare is done to the app before.
func keptWindow(t *testing.T, folder, path string, recent ...string) (*Window, *loop) {
	t.Helper()
	l := newLoop()
	a := test.NewTempApp(t)
	a.Preferences().SetStringList(prefRecent, recent)
	d := testDesign()
	if path != "" {
		opened, problems, err := section.Open(path)
		if err != nil || opened == nil {
			t.Fatal(problems, err)
		}
		d = opened
	}
	w := NewWindow(a, Options{Catalog: testCatalog(), Document: d, Path: path, KeepIn: folder, Rooms: l.rooms(Rooms{})})
	w.win.Resize(usualSize)
	t.Cleanup(w.Close)
	l.until(t, "the note", func() bool { return w.keeper.known || path == "" })
	return w, l
}

// leftBehind writes kept work of a run that is over.
func leftBehind(t *testing.T, folder, path, name string, d *section.Document) string {
	t.Helper()
	body, err := section.Write(rating.Snapshot(d, testCatalog()))
	if err != nil {
		t.Fatal(err)
	}
	file, err := keep.NewSide(goneOwner(), folder).Write(keep.Head{Path: path, Name: name, At: time.Now()}, body)
	if err != nil {
		t.Fatal(err)
	}
	return file
}

// sides lists the side files in a folder.
func sides(t *testing.T, folder string) []string {
	t.Helper()
	entries, err := os.ReadDir(folder)
	if err != nil && !os.IsNotExist(err) {
		t.Fatal(err)
	}
	var all []string
	for _, e := range entries {
		if strings.HasSuffix(e.Name(), ".packrise-kept") {
			all = append(all, filepath.Join(folder, e.Name()))
		}
	}
	return all
}

func TestWorkIsKeptWithinAMinute(t *testing.T) {
	if keepWithin >= time.Minute {
		t.Fatal("a change may wait for a minute at most")
	}
	path := saved(t, "Motor für Öl 2.yaml", testDesign())
	folder := filepath.Dir(path)
	w, l := keptWindow(t, t.TempDir(), path)
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	l.pass(keepWithin - time.Second)
	w.desk.Apply(moveTo("L1", -5.5, 0, 0), false) // later changes don't put it off
	if n := len(sides(t, folder)); n != 0 {
		t.Fatalf("%d kept at once", n)
	}
	l.pass(time.Second)
	l.until(t, "the side file", func() bool { return w.keeper.kept != nil })
	all := sides(t, folder)
	if len(all) != 1 {
		t.Fatalf("kept %v", all)
	}
	data, err := os.ReadFile(all[0])
	if err != nil || !strings.Contains(string(data), "-5.5") {
		t.Errorf("it lacks the last change: %v", err)
	}
	d, problems := section.Read(data) // its head is a comment: it can be opened as it is
	if d == nil || section.Find(d, "L1").At.V.X != -5.5 {
		t.Errorf("the side file is no design: %v", problems)
	}
	w.save(nil)
	l.until(t, "the save", func() bool { return !w.desk.Dirty() })
	l.until(t, "the side file to go", func() bool { return len(sides(t, folder)) == 0 || tick(l) })
}

// tick wakes a waiting loop a little later, for what no hop tells.
func tick(l *loop) bool {
	time.AfterFunc(5*time.Millisecond, func() { l.hop(func() {}) })
	return false
}

func TestWorkIsKeptBeforeLongWork(t *testing.T) {
	folder := t.TempDir()
	w, l := keptWindow(t, folder, "")
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	w.settle()
	l.until(t, "the side file", func() bool { return len(sides(t, folder)) == 1 || tick(l) })
}

func TestUndoneWorkIsNotKept(t *testing.T) {
	folder := t.TempDir()
	w, l := keptWindow(t, folder, "")
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	l.pass(keepWithin)
	l.until(t, "the side file", func() bool { return w.keeper.kept != nil })
	w.desk.Undo()
	l.until(t, "it to go", func() bool { return len(sides(t, folder)) == 0 || tick(l) })
}

func TestEndOfTheSessionKeepsCloseDoesNot(t *testing.T) {
	for _, decided := range []bool{false, true} {
		path := saved(t, "a.yaml", testDesign())
		w, l := keptWindow(t, t.TempDir(), path)
		w.desk.Apply(moveTo("L1", -5, 0, 0), false)
		l.pass(keepWithin)
		l.until(t, "the side file", func() bool { return w.keeper.kept != nil })
		w.desk.Apply(moveTo("L1", -4.5, 0, 0), false)
		if decided {
			w.quit()
			answerDialog(t, w, "Don't save")
		}
		w.Close()
		all := sides(t, filepath.Dir(path))
		if decided && len(all) != 0 || !decided && len(all) != 1 {
			t.Fatalf("decided %v: kept %v", decided, all)
		}
		if !decided {
			if data, _ := os.ReadFile(all[0]); !strings.Contains(string(data), "-4.5") {
				t.Error("the last change was not kept")
			}
		}
		if entries, _ := os.ReadDir(filepath.Dir(path)); len(entries) != 1+len(all) {
			t.Errorf("decided %v: more stays in the folder: %v", decided, entries)
		}
	}
}

func TestRecovery(t *testing.T) {
	folder := t.TempDir()
	path := saved(t, "drive lead.yaml", testDesign())
	mine := section.Move(testDesign(), "L1", section.Point{X: -5, Y: 0})
	file := leftBehind(t, folder, path, "drive lead.yaml", mine)
	other := leftBehind(t, folder, "", "Untitled", testDesign())
	w, l := keptWindow(t, folder, "", path) // only the list of recent files tells of it
	l.until(t, "the offer", func() bool { return dialogText(w) != "" })
	says := dialogText(w)
	for _, want := range []string{"Work that was not saved", "drive lead.yaml", "Untitled", "today at", "no file yet", "has been changed"} {
		if !strings.Contains(says, want) {
			t.Errorf("it lacks %q: %s", want, says)
		}
	}
	answerDialog(t, w, "Later")
	if len(sides(t, folder)) != 1 || len(sides(t, filepath.Dir(path))) != 1 || w.desk.Dirty() {
		t.Error("choosing neither must leave everything")
	}
	w.load(path) // has kept work of its own
	l.until(t, "the offer", func() bool { return strings.Contains(dialogText(w), "drive lead.yaml") })
	if strings.Contains(dialogText(w), "Untitled") {
		t.Error("what belongs to no file is none of this design's")
	}
	answerDialog(t, w, "Recover")
	l.until(t, "the design", func() bool { return w.desk.Dirty() })
	if got := at(t, w.desk, "L1"); got.X != -5 || w.desk.Path() != path || w.desk.UndoName() != "recover unsaved work" {
		t.Errorf("L1 at %v, path %q, undo %q", got, w.desk.Path(), w.desk.UndoName())
	}
	l.until(t, "the old side file to be replaced", func() bool { _, err := os.Stat(file); return w.keeper.kept != nil && err != nil || tick(l) })
	if n := len(sides(t, filepath.Dir(path))); n != 1 || dialogText(w) != "" {
		t.Errorf("%d side files, dialog %q", n, dialogText(w))
	}
	w.desk.Undo()
	if got := at(t, w.desk, "L1"); got.X != -4 || w.desk.Dirty() {
		t.Errorf("undone, the file's design is back: %v", got)
	}
	if _, err := os.Stat(other); err != nil {
		t.Error("the other piece is gone", err)
	}
}

func TestRecoveryWithoutItsFileAndDiscard(t *testing.T) {
	folder := t.TempDir()
	path := filepath.Join(t.TempDir(), "gone", "a.yaml")
	leftBehind(t, folder, path, "a.yaml", testDesign())
	leftBehind(t, folder, "", "Untitled", testDesign())
	w, l := keptWindow(t, folder, "")
	l.until(t, "the offer", func() bool { return dialogText(w) != "" })
	answerDialog(t, w, "Discard")
	l.until(t, "the other", func() bool { return strings.Count(dialogText(w), "[Discard]") == 1 })
	if bin, _ := os.ReadDir(filepath.Join(folder, "discarded")); len(bin) != 1 {
		t.Errorf("discarded: %v", bin)
	}
	answerDialog(t, w, "Recover")
	l.until(t, "the design", func() bool { return w.desk.Dirty() })
	if p := w.desk.Path(); p != "" && p != path || len(w.desk.Document().Parts) != 4 {
		t.Errorf("path %q, %d parts", p, len(w.desk.Document().Parts))
	}
}

func TestBrokenRecoveryDoesNotStopTheStart(t *testing.T) {
	folder := t.TempDir()
	if err := os.WriteFile(filepath.Join(folder, "x.packrise-kept"), []byte("# {nonsense\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	if _, err := keep.NewSide(goneOwner(), folder).Write(keep.Head{Name: "no design"}, []byte("packrise: 1\nnonsense: 2\n")); err != nil {
		t.Fatal(err)
	}
	w, l := keptWindow(t, folder, "")
	l.until(t, "the offer", func() bool { return dialogText(w) != "" })
	if s := dialogText(w); !strings.Contains(s, "x.packrise-kept.broken") {
		t.Errorf("it says %q", s)
	}
	answerDialog(t, w, "Recover")
	l.until(t, "the message", func() bool { return strings.Contains(dialogText(w), "Not recovered") })
	if s := dialogText(w); !strings.Contains(s, "nonsense") || w.desk.Dirty() {
		t.Errorf("it says %q", s)
	}
	if entries, _ := os.ReadDir(folder); len(entries) != 2 || len(sides(t, folder)) != 0 {
		t.Errorf("both must stay, out of the way: %v", entries)
	}
}

// overwritten lets another program change the file.
func overwritten(t *testing.T, path string, d *section.Document) {
	t.Helper()
	if err := section.Save(path, d); err != nil {
		t.Fatal(err)
	}
	later := time.Now().Add(time.Second)
	if err := os.Chtimes(path, later, later); err != nil {
		t.Fatal(err)
	}
}

func TestChangeOnDiskTakeTheirs(t *testing.T) {
	path := saved(t, "a.yaml", testDesign())
	w, l := keptWindow(t, t.TempDir(), path)
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	overwritten(t, path, section.Move(testDesign(), "L1", section.Point{X: -6, Y: 0}))
	w.keeper.look()
	l.until(t, "the question", func() bool { return dialogText(w) != "" })
	if s := dialogText(w); !strings.Contains(s, "a.yaml has changed") || !strings.Contains(s, "[Keep mine]") || !strings.Contains(s, "[Save under another name]") {
		t.Errorf("it asks %q", s)
	}
	answerDialog(t, w, "Take theirs")
	l.until(t, "theirs", func() bool { return at(t, w.desk, "L1").X == -6 })
	if w.desk.Dirty() {
		t.Error("theirs is what the file holds")
	}
	w.desk.Undo()
	if at(t, w.desk, "L1").X != -5 || !w.desk.Dirty() {
		t.Error("undo must bring mine back")
	}
	w.save(nil) // the file is known: no question
	l.until(t, "the save", func() bool { return !w.desk.Dirty() })
	if dialogText(w) != "" {
		t.Errorf("it asks %q", dialogText(w))
	}
}

func TestChangeOnDiskKeepMine(t *testing.T) {
	path := saved(t, "a.yaml", testDesign())
	w, l := keptWindow(t, t.TempDir(), path)
	overwritten(t, path, section.Move(testDesign(), "L1", section.Point{X: -6, Y: 0}))
	w.keeper.look()
	l.until(t, "the question", func() bool { return dialogText(w) != "" })
	answerDialog(t, w, "Keep mine")
	if !w.desk.Dirty() || !strings.Contains(w.win.Title(), "a.yaml*") {
		t.Error("the design differs from its file now")
	}
	w.keeper.look()
	for range 20 {
		time.Sleep(time.Millisecond)
		l.run()
	}
	if dialogText(w) != "" {
		t.Error("it asks twice about one change")
	}
	w.save(nil)
	l.until(t, "the save", func() bool { return !w.desk.Dirty() })
	d, _, err := section.Open(path)
	if err != nil || section.Find(d, "L1").At.V.X != -4 {
		t.Error("mine was not written", err)
	}
}

func TestSaveAsksBeforeItOverwritesAnother(t *testing.T) {
	path := saved(t, "a.yaml", testDesign())
	w, l := keptWindow(t, t.TempDir(), path)
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	theirs := section.Move(testDesign(), "L1", section.Point{X: -6, Y: 0})
	overwritten(t, path, theirs)
	then := false
	w.save(func() { then = true })
	l.until(t, "the question", func() bool { return dialogText(w) != "" })
	if d, _, _ := section.Open(path); section.Find(d, "L1").At.V.X != -6 || then {
		t.Error("theirs was overwritten without a question")
	}
	answerDialog(t, w, "Cancel")
	if !w.desk.Dirty() || then {
		t.Error("Cancel saves nothing")
	}
	w.save(func() { then = true })
	l.until(t, "the question", func() bool { return dialogText(w) != "" })
	answerDialog(t, w, "Keep mine")
	l.until(t, "the save", func() bool { return then })
	if d, _, _ := section.Open(path); section.Find(d, "L1").At.V.X != -5 || w.desk.Dirty() {
		t.Error("mine was not written")
	}
}

func TestFileThatIsGoneIsNoticedAndSavedAgain(t *testing.T) {
	path := saved(t, "a.yaml", testDesign())
	w, l := keptWindow(t, t.TempDir(), path)
	if err := os.Remove(path); err != nil {
		t.Fatal(err)
	}
	w.keeper.look()
	l.until(t, "the question", func() bool { return strings.Contains(dialogText(w), "a.yaml is gone") })
	answerDialog(t, w, "Keep mine")
	if !w.desk.Dirty() {
		t.Error("nothing on the disk holds the design")
	}
	w.save(nil)
	l.until(t, "the save", func() bool { return !w.desk.Dirty() })
	if _, err := os.Stat(path); err != nil {
		t.Error(err)
	}
}

func TestVanishedFolderKeepsTheWork(t *testing.T) {
	path := saved(t, "a.yaml", testDesign())
	folder := t.TempDir()
	w, l := keptWindow(t, folder, path)
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	if err := os.RemoveAll(filepath.Dir(path)); err != nil {
		t.Fatal(err)
	}
	w.save(nil)
	l.until(t, "the message", func() bool { return dialogText(w) != "" })
	if s := dialogText(w); !strings.Contains(s, "Not saved") || !strings.Contains(s, "no such file or folder") {
		t.Errorf("it says %q", s)
	}
	l.until(t, "the side file", func() bool { return len(sides(t, folder)) == 1 || tick(l) })
}

func TestOpenElsewhere(t *testing.T) {
	path := saved(t, "a.yaml", testDesign())
	theirs := parentOwner(t, path)
	w, l := keptWindow(t, t.TempDir(), path)
	l.until(t, "the question", func() bool { return dialogText(w) != "" })
	if s := dialogText(w); !strings.Contains(s, "a.yaml is open elsewhere") || !strings.Contains(s, "process 1 on another machine") {
		t.Errorf("it says %q", s)
	}
	answerDialog(t, w, "Work on a copy")
	if w.desk.Path() != "" || w.win.Title() != "Three and a filler – Packrise" {
		t.Errorf("path %q, title %q", w.desk.Path(), w.win.Title())
	}
	w.Close()
	if theirs.Take(path) != nil {
		t.Error("the other's note was taken away")
	}
	theirs.Release()
}

func TestDropOpens(t *testing.T) {
	path := saved(t, "Öl & Späne, 50% #2.yaml", testDesign())
	w, l := testWindow(t, testDesign(), usualSize)
	w.dropped(fyne.Position{}, []fyne.URI{storage.NewFileURI("/somewhere/picture.png"), storage.NewFileURI(path)})
	l.until(t, "the file", func() bool { return w.desk.Path() == path })
	w.dropped(fyne.Position{}, []fyne.URI{storage.NewFileURI("/somewhere/picture.png")})
	if s := dialogText(w); !strings.Contains(s, "picture.png is no design") {
		t.Errorf("it says %q", s)
	}
	w.hide()
	w.desk.Apply(moveTo("L1", -5, 0, 0), false)
	w.dropped(fyne.Position{}, []fyne.URI{storage.NewFileURI(path)})
	if s := dialogText(w); !strings.Contains(s, "before opening") {
		t.Errorf("unsaved work is asked about, it says %q", s)
	}
}

func TestMissingRecentFilesAreGrey(t *testing.T) {
	path := saved(t, "there.yaml", testDesign())
	w, l := testWindow(t, testDesign(), usualSize)
	w.remember(filepath.Join(filepath.Dir(path), "gone.yaml"))
	w.remember(path)
	w.checkRecent()
	l.until(t, "the look", func() bool { return len(w.missing) == 1 })
	items := w.menu.recent.ChildMenu.Items
	if len(items) != 4 || items[0].Disabled || !items[1].Disabled || !strings.HasSuffix(items[1].Label, "(not there)") {
		t.Fatalf("the menu says %s", w.menu)
	}
	items[3].Action()
	if len(w.recent()) != 0 || !w.menu.recent.Disabled {
		t.Error("the list was not cleared")
	}
}

func TestAFileThatCannotBeOpenedDoesNotStopTheStart(t *testing.T) {
	path := filepath.Join(t.TempDir(), "broken.yaml")
	if err := os.WriteFile(path, []byte("packrise: 1\nnonsense: 2\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	l := newLoop()
	w := NewWindow(test.NewTempApp(t), Options{Catalog: testCatalog(), Document: testDesign(), Open: path, Rooms: l.rooms(Rooms{})})
	t.Cleanup(w.Close)
	l.until(t, "the list", func() bool { return strings.Contains(dialogText(w), "broken.yaml:2") })
}

func TestWhenWords(t *testing.T) {
	now := time.Date(2026, 3, 4, 10, 0, 0, 0, time.UTC)
	for at, want := range map[time.Time]string{
		now.Add(-time.Hour):       "today at 09:00",
		now.Add(-24 * time.Hour):  "on 3 March at 10:00",
		now.AddDate(-1, 0, 0):     "on 4 March 2025 at 10:00",
		now.AddDate(0, -3, 0):     "on 4 December 2025 at 10:00",
		now.Add(-9 * time.Minute): "today at 09:51",
	} {
		if got := whenWords(at, now); got != want {
			t.Errorf("%v: %q, want %q", at, got, want)
		}
	}
}
