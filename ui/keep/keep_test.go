package keep

import (
	"bufio"
	"fmt"
	"math/rand"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
	"time"
)

const childFolder = "PACKRISE_KEEP_CHILD" // set: this process writes side files until it is killed

func TestMain(m *testing.M) {
	if folder := os.Getenv(childFolder); folder != "" {
		keepForEver(folder)
	}
	os.Exit(m.Run())
}

// body is a design of n steps, long enough to be killed in the middle of.
func body(n int) []byte {
	return []byte(strconv.Itoa(n) + "\n" + strings.Repeat(fmt.Sprintf("line %d of the design\n", n), 20_000))
}

// keepForEver writes step after step and says which is kept.
func keepForEver(folder string) {
	design := filepath.Join(folder, "drive lead.yaml")
	note := NewNote(Me())
	if note.Take(design) != nil {
		os.Exit(3)
	}
	side := NewSide(Me(), filepath.Join(folder, "cache"))
	for n := 1; ; n++ {
		if _, err := side.Write(Head{Path: design, Name: "drive lead.yaml", At: time.Now()}, body(n)); err != nil {
			fmt.Println(err)
			os.Exit(4)
		}
		fmt.Println(n)
	}
}

// gone is an owner that runs no more.
func gone() Owner { return Owner{PID: 1 << 30, Host: Me().Host, Begun: "1"} }

func write(t *testing.T, path, text string) {
	t.Helper()
	if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
}

// names lists a folder.
func names(t *testing.T, folder string) []string {
	t.Helper()
	entries, err := os.ReadDir(folder)
	if err != nil {
		t.Fatal(err)
	}
	var all []string
	for _, e := range entries {
		all = append(all, e.Name())
	}
	return all
}

func TestKilledAtAnyMoment(t *testing.T) {
	rounds := 12
	if testing.Short() {
		rounds = 3
	}
	random := rand.New(rand.NewSource(7))
	folder := t.TempDir()
	design := filepath.Join(folder, "drive lead.yaml")
	write(t, design, "as it was saved")
	for range rounds {
		cmd := exec.Command(os.Args[0])
		cmd.Env = append(os.Environ(), childFolder+"="+folder)
		out, err := cmd.StdoutPipe()
		if err != nil {
			t.Fatal(err)
		}
		if err := cmd.Start(); err != nil {
			t.Fatal(err)
		}
		said := bufio.NewScanner(out)
		for range 1 + random.Intn(5) {
			said.Scan()
		}
		if other := NewNote(Me()).Take(design); other == nil || other.PID != cmd.Process.Pid {
			t.Errorf("while it runs the design is open there, got %+v", other)
		}
		if f := Find(filepath.Join(folder, "cache"), true, design); len(f.Kept)+len(f.Broken) != 0 {
			t.Errorf("while it runs its work is its own, got %d, %v", len(f.Kept), f.Broken)
		}
		time.Sleep(time.Duration(random.Intn(3000)) * time.Microsecond)
		if err := cmd.Process.Kill(); err != nil {
			t.Fatal(err)
		}
		last := said.Text()
		for said.Scan() {
			last = said.Text()
		}
		if err := cmd.Wait(); err == nil {
			t.Fatal("it ended by itself")
		}
		n, err := strconv.Atoi(last)
		if err != nil {
			t.Fatalf("it said %q", last)
		}
		f := Find(filepath.Join(folder, "cache"), true, design)
		if len(f.Kept) != 1 || len(f.Broken) != 0 {
			t.Fatalf("found %d, broken %v", len(f.Kept), f.Broken)
		}
		k := f.Kept[0]
		if got := string(k.Body); got != string(body(n)) && got != string(body(n+1)) { // the last may be kept and not yet told
			t.Errorf("step %d was kept; found one that begins %.20q", n, got)
		}
		if k.Path != design || k.Name != "drive lead.yaml" {
			t.Errorf("it is of %q, %q", k.Path, k.Name)
		}
		note := NewNote(Me())
		if other := note.Take(design); other != nil {
			t.Errorf("the dead one still has it open: %+v", other)
		}
		note.Release()
		if err := Discard(folder, k); err != nil {
			t.Fatal(err)
		}
	}
	for _, name := range names(t, folder) {
		if strings.Contains(name, "packrise") && !strings.HasSuffix(name, ".tmp") {
			t.Errorf("%s stays behind", name)
		}
	}
}

func TestSideFileGoesAndFollows(t *testing.T) {
	folder, cache := t.TempDir(), filepath.Join(t.TempDir(), "kept")
	design := filepath.Join(folder, "Motor für Ölpumpe [2] 100%.yaml")
	s := NewSide(gone(), cache)
	first, err := s.Write(Head{Name: "Untitled", At: time.Unix(1, 0)}, []byte("a"))
	if err != nil || filepath.Dir(first) != cache {
		t.Fatal(first, err)
	}
	second, err := s.Write(Head{Path: design, At: time.Unix(2, 0)}, []byte("b"))
	if err != nil || filepath.Dir(second) != folder {
		t.Fatal(second, err)
	}
	if got := names(t, cache); len(got) != 0 {
		t.Errorf("the one before stays: %v", got)
	}
	f := Find(cache, false, design)
	if len(f.Kept) != 1 || string(f.Kept[0].Body) != "b" || f.Kept[0].At.Unix() != 2 {
		t.Errorf("found %+v", f)
	}
	if f := Find(cache, true, filepath.Join(folder, "Motor.yaml")); len(f.Kept) != 0 {
		t.Errorf("found another design's: %+v", f)
	}
	s.End()
	if _, err := s.Write(Head{Path: design}, []byte("c")); err != nil || len(names(t, folder)) != 0 {
		t.Errorf("after the end %v, %v", names(t, folder), err)
	}
}

func TestFolderOfTheDesignCannotBeWritten(t *testing.T) {
	cache := filepath.Join(t.TempDir(), "kept")
	design := filepath.Join(t.TempDir(), "vanished drive", "a.yaml")
	file, err := NewSide(gone(), cache).Write(Head{Path: design, Name: "a.yaml"}, []byte("b"))
	if err != nil || filepath.Dir(file) != cache {
		t.Fatal(file, err)
	}
	if f := Find(cache, false, design); len(f.Kept) != 1 || !f.Kept[0].Changed && f.Kept[0].Base != "" {
		t.Errorf("found %+v", f)
	}
	if f := Find(cache, false, design+"x"); len(f.Kept) != 0 {
		t.Errorf("found for another %+v", f)
	}
	write(t, filepath.Join(filepath.Dir(cache), "file"), "")
	if _, err := NewSide(gone(), filepath.Join(filepath.Dir(cache), "file", "kept")).Write(Head{}, []byte("b")); err == nil || !strings.Contains(err.Error(), "can't be kept aside") {
		t.Errorf("nowhere to write: %v", err)
	}
}

func TestBrokenFilesArePutAside(t *testing.T) {
	folder := t.TempDir()
	s := NewSide(gone(), folder)
	file, err := s.Write(Head{Name: "Untitled"}, []byte("packrise: 1\n"))
	if err != nil {
		t.Fatal(err)
	}
	whole, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	for name, data := range map[string]string{
		"cut": string(whole[:len(whole)-3]), "empty": "", "noise": "\x00\xff\x00", "headless": "packrise: 1\n",
		"changed": strings.Replace(string(whole), "packrise: 1\n", "packrise: 2\n", 1), "json": "# {\n", "version": "# {\"packrise-kept\":0}\n",
	} {
		dir := t.TempDir()
		write(t, filepath.Join(dir, "x"+kept), data)
		f := Find(dir, true)
		if len(f.Kept) != 0 || len(f.Broken) != 1 {
			t.Errorf("%s: %+v", name, f)
			continue
		}
		if got, err := os.ReadFile(f.Broken[0]); err != nil || string(got) != data {
			t.Errorf("%s: not kept as it is: %v", name, err)
		}
		if f := Find(dir, true); len(f.Kept)+len(f.Broken) != 0 {
			t.Errorf("%s comes up again: %+v", name, f)
		}
	}
	dir := t.TempDir()
	write(t, filepath.Join(dir, "x"+kept), "# {\"packrise-kept\":2}\nof a later program")
	if f := Find(dir, true); len(f.Kept)+len(f.Broken) != 0 || len(names(t, dir)) != 1 {
		t.Errorf("a later program's: %+v", f)
	}
}

func TestWhatTheFileHoldsIsNotOffered(t *testing.T) {
	folder := t.TempDir()
	design := filepath.Join(folder, "a.yaml")
	write(t, design, "new")
	s := NewSide(gone(), folder)
	if _, err := s.Write(Head{Path: design, Base: sum([]byte("old"))}, []byte("new")); err != nil {
		t.Fatal(err)
	}
	if f := Find(folder, true, design); len(f.Kept) != 0 || len(names(t, folder)) != 1 {
		t.Errorf("%+v, %v", f, names(t, folder))
	}
	for base, changed := range map[string]bool{"new": false, "old": true} {
		if _, err := s.Write(Head{Path: design, Base: sum([]byte(base))}, []byte("newer")); err != nil {
			t.Fatal(err)
		}
		if f := Find(folder, true, design); len(f.Kept) != 1 || f.Kept[0].Changed != changed {
			t.Errorf("begun from %s: %+v", base, f)
		}
	}
}

func TestDiscardedStaysForAWhile(t *testing.T) {
	folder := t.TempDir()
	for n := range mostDiscarded + 3 {
		s := NewSide(gone(), folder)
		if _, err := s.Write(Head{}, body(n)); err != nil {
			t.Fatal(err)
		}
		f := Find(folder, true)
		if len(f.Kept) != 1 {
			t.Fatalf("%+v", f)
		}
		if err := Discard(folder, f.Kept[0]); err != nil {
			t.Fatal(err)
		}
	}
	bin := names(t, filepath.Join(folder, "discarded"))
	if len(bin) != mostDiscarded || len(Find(folder, true).Kept) != 0 {
		t.Errorf("%d are there", len(bin))
	}
	data, err := os.ReadFile(filepath.Join(folder, "discarded", bin[len(bin)-1]))
	if err != nil || !strings.HasSuffix(string(data), string(body(mostDiscarded+2))) {
		t.Errorf("the newest is not whole: %v", err)
	}
}

func TestPrint(t *testing.T) {
	path := filepath.Join(t.TempDir(), "a.yaml")
	p, err := Look(path)
	if err != nil || p.There {
		t.Fatal(p, err)
	}
	write(t, path, "one")
	now, changed, err := p.Changed(path, false)
	if err != nil || !changed || !now.There {
		t.Error("a file that came is a change", now, changed, err)
	}
	p = now
	if _, changed, _ := p.Changed(path, true); changed {
		t.Error("nothing changed")
	}
	later := p.Time.Add(time.Second)
	if err := os.Chtimes(path, later, later); err != nil {
		t.Fatal(err)
	}
	if now, changed, _ := p.Changed(path, false); changed || !now.Time.Equal(later) {
		t.Error("touching is no change", now, changed)
	}
	write(t, path, "two") // as long as before, and as old
	if err := os.Chtimes(path, p.Time, p.Time); err != nil {
		t.Fatal(err)
	}
	if _, changed, _ := p.Changed(path, true); !changed {
		t.Error("a thorough look reads the file")
	}
	if err := os.Remove(path); err != nil {
		t.Fatal(err)
	}
	if now, changed, err := p.Changed(path, false); !changed || now.There || err != nil {
		t.Error("a file that is gone is a change", now, changed, err)
	}
	if err := os.Mkdir(path, 0o755); err != nil {
		t.Fatal(err)
	}
	if _, changed, err := p.Changed(path, false); changed || err == nil {
		t.Error("what can't be read is an error, no change", changed, err)
	}
}

func TestNotes(t *testing.T) {
	path := filepath.Join(t.TempDir(), "a.yaml")
	parent := Owner{PID: os.Getppid(), Host: Me().Host, Begun: begun(os.Getppid())} // a process that runs
	theirs, ours := NewNote(parent), NewNote(Me())
	if theirs.Take(path) != nil {
		t.Fatal("nobody had it")
	}
	if other := ours.Take(path); other == nil || other.Owner != parent || time.Since(other.Since) > time.Hour {
		t.Errorf("got %+v", other)
	}
	ours.Release() // holds nothing: theirs stays
	if _, err := os.Stat(noteOf(path)); err != nil {
		t.Error(err)
	}
	theirs.Release()
	for range 2 { // free, and then ours
		if ours.Take(path) != nil {
			t.Error("it was free")
		}
	}
	ours.Take("")
	ours.Take(path)
	ours.End()
	ours.Take(path)
	if got := names(t, filepath.Dir(path)); len(got) != 0 {
		t.Errorf("left behind: %v", got)
	}
}

func TestStaleNotes(t *testing.T) {
	path := filepath.Join(t.TempDir(), "a.yaml")
	for name, o := range map[string]struct {
		owner Owner
		age   time.Duration
		held  bool
	}{
		"dead":               {gone(), 0, false},
		"number used again":  {Owner{PID: os.Getppid(), Host: Me().Host, Begun: "1"}, 0, false},
		"elsewhere":          {Owner{PID: 4, Host: "another machine"}, time.Minute, true},
		"elsewhere and gone": {Owner{PID: 4, Host: "another machine"}, time.Hour, false},
	} {
		theirs := NewNote(o.owner)
		theirs.Take(path)
		old := time.Now().Add(-o.age)
		if err := os.Chtimes(noteOf(path), old, old); err != nil {
			t.Fatal(err)
		}
		if name == "elsewhere and gone" {
			theirs.Renew()
			if NewNote(Me()).Take(path) == nil {
				t.Error("a sign of life renews it")
			}
			if err := os.Chtimes(noteOf(path), old, old); err != nil {
				t.Fatal(err)
			}
		}
		ours := NewNote(Me())
		if held := ours.Take(path) != nil; held != o.held {
			t.Errorf("%s: held %v, want %v", name, held, o.held)
		}
		ours.Release()
		theirs.Release()
	}
	write(t, noteOf(path), "nonsense")
	if NewNote(Me()).Take(path) != nil {
		t.Error("a broken note counts as left behind")
	}
	if NewNote(Me()).Take(filepath.Join(path, "no such folder", "a.yaml")) != nil {
		t.Error("where no note can be written there is none")
	}
}

func TestAlive(t *testing.T) {
	if !alive(os.Getpid()) || alive(gone().PID) {
		t.Error("this process runs, and that one doesn't")
	}
}
