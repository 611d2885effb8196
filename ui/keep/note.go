package keep

import (
	"encoding/json"
	"errors"
	"io/fs"
	"os"
	"path/filepath"
	"sync"
	"time"
)

// Held says who has a design open.
type Held struct {
	Owner
	Since time.Time `json:"since"`
}

// Note is the mark beside a design that tells other windows that it is open here. It counts for as long as the process runs, or, seen from another
// machine, as long as it is renewed.
type Note struct {
	mu   sync.Mutex
	me   Owner
	file string // "" while none is held
	over bool
}

// NewNote returns a note of an owner that marks nothing yet.
func NewNote(me Owner) *Note { return &Note{me: me} }

func noteOf(path string) string {
	return filepath.Join(filepath.Dir(path), "."+filepath.Base(path)+".packrise-open")
}

// Take marks the design at path as open here, "" for none, and lets go of the one before. If another has it, who that is comes back and nothing is marked. Where
// no note can be written (a folder that can only be read) nothing can be saved either: there is no note and no error.
func (n *Note) Take(path string) (other *Held) {
	n.mu.Lock()
	defer n.mu.Unlock()
	n.release()
	if path == "" || n.over {
		return nil
	}
	file := noteOf(path)
	held, seen, err := readNote(file)
	if err == nil && held.Owner != n.me && held.lives(seen, time.Now()) {
		return &held
	}
	data, err := json.Marshal(Held{Owner: n.me, Since: time.Now().Truncate(time.Second)})
	if err != nil {
		return nil
	}
	f, err := os.OpenFile(file, os.O_CREATE|os.O_EXCL|os.O_WRONLY, 0o644)
	switch {
	case err == nil:
		_, err = f.Write(data)
		f.Close()
	case errors.Is(err, fs.ErrExist): // left behind by a process that is gone
		err = replace(file, data)
	}
	if err == nil {
		n.file = file
	}
	return nil
}

// Renew is the sign of life for other machines.
func (n *Note) Renew() {
	n.mu.Lock()
	defer n.mu.Unlock()
	if n.file != "" {
		now := time.Now()
		_ = os.Chtimes(n.file, now, now)
	}
}

// Release takes the mark away.
func (n *Note) Release() {
	n.mu.Lock()
	defer n.mu.Unlock()
	n.release()
}

// End takes the mark away for good.
func (n *Note) End() {
	n.mu.Lock()
	defer n.mu.Unlock()
	n.release()
	n.over = true
}

func (n *Note) release() {
	if n.file == "" {
		return
	}
	if held, _, err := readNote(n.file); err == nil && held.Owner == n.me {
		os.Remove(n.file)
	}
	n.file = ""
}

func readNote(file string) (h Held, seen time.Time, err error) {
	data, err := os.ReadFile(file)
	if err != nil {
		return h, seen, err
	}
	info, err := os.Stat(file)
	if err != nil {
		return h, seen, err
	}
	return h, info.ModTime(), json.Unmarshal(data, &h)
}
