package keep

import (
	"cmp"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"time"
)

// mostDiscarded is how many pieces of discarded work stay in the folder.
const mostDiscarded = 20

// Found is what was left behind by runs of the program that are gone.
type Found struct {
	Kept   []Kept   // the newest first
	Broken []string // side files that can't be read, put aside under these names
}

// Find looks for work left behind: beside the designs, and in the folder what belongs to one of them or, if all, whatever is there. Files whose
// owner still runs are left alone, as are those of a design that a later program wrote; what holds just what the design's file holds is taken away.
func Find(folder string, all bool, designs ...string) Found {
	var f Found
	seen := map[string]bool{}
	for _, d := range designs {
		f.look(filepath.Dir(d), seen, func(name string) bool { return strings.HasPrefix(name, "."+filepath.Base(d)+".") }, nil)
	}
	f.look(folder, seen, func(string) bool { return true }, func(k Kept) bool { return all || k.Path != "" && slices.Contains(designs, k.Path) })
	slices.SortStableFunc(f.Kept, func(a, b Kept) int { return cmp.Or(b.At.Compare(a.At), strings.Compare(a.File, b.File)) })
	return f
}

// look goes through a folder. wanted is asked of files that can be read; nil: all.
func (f *Found) look(folder string, seen map[string]bool, named func(string) bool, wanted func(Kept) bool) {
	entries, err := os.ReadDir(folder)
	if err != nil {
		return
	}
	for _, e := range entries {
		file := filepath.Join(folder, e.Name())
		info, err := e.Info()
		if err != nil || seen[file] || !named(e.Name()) {
			continue
		}
		switch {
		case strings.HasSuffix(e.Name(), kept):
			seen[file] = true
			f.take(file, info.ModTime(), wanted)
		case strings.HasSuffix(e.Name(), kept+".tmp") && time.Since(info.ModTime()) > time.Hour:
			os.Remove(file) // killed while it was written; the whole one is beside it
		}
	}
}

func (f *Found) take(file string, sign time.Time, wanted func(Kept) bool) {
	k, err := read(file)
	if err != nil {
		if os.IsNotExist(err) || os.IsPermission(err) {
			return
		}
		f.Broken = append(f.Broken, Aside(file))
		return
	}
	if k.Version > version { // of a later program: for that one to offer
		return
	}
	if k.By.lives(sign, time.Now()) || wanted != nil && !wanted(k) {
		return
	}
	if k.Path != "" {
		now, err := Look(k.Path)
		if err == nil && now.Sum == k.Sum {
			os.Remove(file)
			return
		}
		k.Changed = err != nil || now.Sum != k.Base
	}
	f.Kept = append(f.Kept, k)
}

// Aside renames a side file that can't be read so that it is not looked at again, and returns its name.
func Aside(file string) string {
	to := file + broken
	if _, err := os.Lstat(to); err == nil {
		to = file + "." + time.Now().Format("20060102-150405.000") + broken
	}
	if os.Rename(file, to) != nil {
		return file
	}
	return to
}

// Discard takes kept work out of sight. It stays in a folder of its own, the newest few.
func Discard(folder string, k Kept) error {
	bin := filepath.Join(folder, "discarded")
	if err := os.MkdirAll(bin, 0o700); err != nil {
		return err
	}
	data, err := os.ReadFile(k.File)
	if err != nil {
		return err
	}
	name := time.Now().Format("20060102-150405.000000") + strings.TrimSuffix(filepath.Base(k.File), kept) + ".yaml"
	if err := replace(filepath.Join(bin, name), data); err != nil {
		return err
	}
	if entries, err := os.ReadDir(bin); err == nil { // sorted by name, which begins with the time
		for _, e := range entries[:max(0, len(entries)-mostDiscarded)] {
			os.Remove(filepath.Join(bin, e.Name()))
		}
	}
	return os.Remove(k.File)
}

// Folder is where work of designs without a file is kept: in the user's cache.
func Folder() (string, error) {
	dir, err := os.UserCacheDir()
	if err != nil {
		return "", err
	}
	return filepath.Join(dir, "packrise", "kept"), nil
}
