package section

import (
	"errors"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"syscall"
	"testing"
)

func smallDocument(t testing.TB) *Document {
	t.Helper()
	d, problems := Read([]byte(small))
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	return d
}

// only fails the test if the directory holds other files than these.
func only(t *testing.T, dir string, names ...string) {
	t.Helper()
	entries, err := os.ReadDir(dir)
	if err != nil {
		t.Fatal(err)
	}
	var got []string
	for _, e := range entries {
		got = append(got, e.Name())
	}
	if strings.Join(got, " ") != strings.Join(names, " ") {
		t.Errorf("the directory holds %v; want %v", got, names)
	}
}

func TestSaveAndOpen(t *testing.T) {
	dir := t.TempDir()
	file := filepath.Join(dir, "lead.yaml")
	d := smallDocument(t)
	if err := Save(file, d); err != nil {
		t.Fatal(err)
	}
	again, problems, err := Open(file)
	if err != nil || len(problems) > 0 || !Equal(d, again) {
		t.Fatalf("%v %v", problems, err)
	}
	if err := os.Chmod(file, 0o600); err != nil {
		t.Fatal(err)
	}
	if err := Save(file, Move(again, "L1", Point{1, 2})); err != nil {
		t.Fatal(err)
	}
	info, _ := os.Stat(file)
	text, _ := os.ReadFile(file)
	if info.Mode().Perm() != 0o600 || string(text) != strings.Replace(small, "[0, 0]", "[1, 2]", 1) {
		t.Errorf("mode %v, text\n%s", info.Mode(), text)
	}
	only(t, dir, "lead.yaml")
}

func TestSaveFollowsLinks(t *testing.T) {
	dir := t.TempDir()
	real := filepath.Join(dir, "real", "a.yaml")
	if err := os.Mkdir(filepath.Dir(real), 0o755); err != nil {
		t.Fatal(err)
	}
	link, far := filepath.Join(dir, "link.yaml"), filepath.Join(dir, "far.yaml")
	if err := os.Symlink(filepath.Join("real", "a.yaml"), link); err != nil {
		t.Skip("no links here")
	}
	if err := os.Symlink("link.yaml", far); err != nil {
		t.Fatal(err)
	}
	for _, title := range []string{"first", "second"} { // the target is new, then there
		if err := Save(far, smallDocument(t).With(func(d *Document) { d.Title = title })); err != nil {
			t.Fatal(err)
		}
		if d, _, err := Open(real); err != nil || d.Title != title {
			t.Fatalf("%v", err)
		}
	}
	if info, err := os.Lstat(far); err != nil || info.Mode()&fs.ModeSymlink == 0 {
		t.Error("the link is gone")
	}
	only(t, dir, "far.yaml", "link.yaml", "real")
	loop := filepath.Join(dir, "loop.yaml")
	if err := os.Symlink("loop.yaml", loop); err != nil {
		t.Fatal(err)
	}
	if err := Save(loop, smallDocument(t)); err == nil || !strings.Contains(err.Error(), "leads to itself") {
		t.Errorf("saved through a loop: %v", err)
	}
}

// fullDisk writes a part and then fails as a full disk does.
type fullDisk struct {
	w    io.Writer
	left int
	err  error
}

func (d *fullDisk) Write(p []byte) (int, error) {
	if len(p) > d.left {
		n, _ := d.w.Write(p[:d.left])
		return n, &fs.PathError{Op: "write", Path: "x", Err: d.err}
	}
	d.left -= len(p)
	return d.w.Write(p)
}

// Whatever fails while the file is written, the old one stays whole, nothing is left beside it, and the sentence says why.
func TestSaveFailsWhole(t *testing.T) {
	for _, c := range []struct {
		err  error
		want string
	}{
		{syscall.ENOSPC, "the disk is full"}, {syscall.EDQUOT, "the disk is full"}, {syscall.EROFS, "can only be read"}, {syscall.EIO, "input/output error"}, {syscall.EACCES, "permission is denied"},
	} {
		dir := t.TempDir()
		file := filepath.Join(dir, "a.yaml")
		if err := os.WriteFile(file, []byte("old"), 0o644); err != nil {
			t.Fatal(err)
		}
		err := writeFile(file, []byte(small), func(f *os.File) io.Writer { return &fullDisk{f, 20, c.err} })
		if err == nil || !strings.Contains(err.Error(), c.want) || !errors.Is(err, c.err) {
			t.Errorf("%v; want %q", err, c.want)
		}
		if text, _ := os.ReadFile(file); string(text) != "old" {
			t.Errorf("the old file became %q", text)
		}
		only(t, dir, "a.yaml")
	}
}

// A real full disk, where there is one to be had.
func TestSaveOnFullDisk(t *testing.T) {
	dir := t.TempDir()
	if err := mountTiny(dir); err != nil {
		t.Skipf("no small disk can be made here: %v", err)
	}
	defer unmount(dir)
	file := filepath.Join(dir, "a.yaml")
	d := smallDocument(t)
	if err := Save(file, d); err != nil {
		t.Fatal(err)
	}
	err := Save(file, d.With(func(d *Document) { d.Notes = strings.Repeat("long notes ", 20000) }))
	if err == nil || !strings.Contains(err.Error(), file+" was not saved: the disk is full; make room") {
		t.Errorf("%v", err)
	}
	if text, _ := os.ReadFile(file); string(text) != small {
		t.Error("the old file is not whole")
	}
	only(t, dir, "a.yaml")
}

func TestSaveRefuses(t *testing.T) {
	dir := t.TempDir()
	d := smallDocument(t)
	for path, want := range map[string]string{
		dir:                                     "it is a directory; give the file a name",
		filepath.Join(dir, "no", "a.yaml"):      "no such file or folder",
		filepath.Join(dir, "f.yaml", "x"):       "not a directory",
		filepath.Join(dir, "new\x00.yaml"):      "invalid argument",
		string(filepath.Separator) + "dev/null": "no ordinary file",
	} {
		if err := os.WriteFile(filepath.Join(dir, "f.yaml"), []byte("x"), 0o644); err != nil {
			t.Fatal(err)
		}
		if err := Save(path, d); err == nil || !strings.Contains(err.Error(), want) || !strings.Contains(err.Error(), "was not saved") {
			t.Errorf("Save(%q) = %v; want %q", path, err, want)
		}
	}
	if err := Save(filepath.Join(dir, "f.yaml"), Add(d, d.Parts[0])); err == nil || !strings.Contains(err.Error(), "part L1: its id is also that of part number 1") {
		t.Errorf("a document that can't be read back is saved: %v", err)
	}
	only(t, dir, "f.yaml")
}

func TestOpenRefuses(t *testing.T) {
	dir := t.TempDir()
	write := func(name, text string) string {
		file := filepath.Join(dir, name)
		if err := os.WriteFile(file, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
		return file
	}
	huge := write("huge.yaml", "packrise: 1\n")
	if err := os.Truncate(huge, 100<<20); err != nil { // 100 MB that take no room
		t.Fatal(err)
	}
	for path, want := range map[string]string{
		dir:                                     "it is a directory",
		filepath.Join(dir, "gone.yaml"):         "there is no such file or folder; check its name",
		huge:                                    "it has 100 MB, and at most 16 MB are read",
		write("binary.yaml", "a\x00b"):          "binary, not text",
		write("latin.yaml", "caf\xe9"):          "not UTF-8",
		write("empty.yaml", ""):                 "the file is empty",
		string(filepath.Separator) + "dev/null": "no ordinary file",
	} {
		d, problems, err := Open(path)
		if d != nil || problems != nil || err == nil || !strings.Contains(err.Error(), want) || !strings.Contains(err.Error(), path+" can't be opened") {
			t.Errorf("Open(%q) = %v, %v; want %q", path, problems, err, want)
		}
	}
	if _, problems, err := Open(write("bad.yaml", "packrise: 3\n")); err != nil || len(problems) != 1 {
		t.Errorf("%v %v; want one problem", problems, err)
	}
}

// What may not be read or written is left alone, also by somebody who could replace it because the directory is his.
func TestNoPermission(t *testing.T) {
	if os.Getuid() == 0 {
		asNobody(t)
		return
	}
	dir := t.TempDir()
	file := filepath.Join(dir, "a.yaml")
	if err := os.WriteFile(file, []byte(small), 0o444); err != nil {
		t.Fatal(err)
	}
	if err := Save(file, smallDocument(t)); err == nil || !strings.Contains(err.Error(), "permission is denied") {
		t.Errorf("a file that may only be read is replaced: %v", err)
	}
	if err := os.Chmod(file, 0); err != nil {
		t.Fatal(err)
	}
	if _, _, err := Open(file); err == nil || !strings.Contains(err.Error(), "permission is denied; choose another place") {
		t.Errorf("%v", err)
	}
	if err := os.Chmod(dir, 0o500); err != nil {
		t.Fatal(err)
	}
	defer os.Chmod(dir, 0o700)
	if err := Save(filepath.Join(dir, "b.yaml"), smallDocument(t)); err == nil || !strings.Contains(err.Error(), "permission is denied") {
		t.Errorf("%v", err)
	}
}
