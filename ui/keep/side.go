package keep

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"hash/fnv"
	"os"
	"path/filepath"
	"sync"
	"time"
)

// Head is what a side file says of the work in it.
type Head struct {
	Version int       `json:"packrise-kept"`
	Path    string    `json:"path,omitempty"` // of the design's file, whole; "" for a design that has none
	Name    string    `json:"name"`           // how the window calls it
	At      time.Time `json:"at"`
	Base    string    `json:"base,omitempty"` // sum of the design's file when it was read or written last
	By      Owner     `json:"by"`
	Sum     string    `json:"sum"` // of the body
}

// Kept is a side file that was found.
type Kept struct {
	Head
	File    string
	Body    []byte
	Changed bool // the design's file is not what it was when this work began
}

const (
	kept    = ".packrise-kept"
	broken  = ".broken"
	version = 1
	head    = "# " // begins the head, which for a reader of YAML is a comment
	most    = 64 << 20
)

// Side is the side file of one open design. It may be used from any goroutine.
type Side struct {
	mu     sync.Mutex
	me     Owner
	folder string // for designs without a file and folders that can only be read
	file   string // the one that is there, "" for none
	ended  bool
}

// NewSide returns a side file that is not there yet. folder is made when it is needed.
func NewSide(me Owner, folder string) *Side { return &Side{me: me, folder: folder} }

// Write keeps the body of a design, beside its file where possible, else in the folder, in place of what was kept before.
func (s *Side) Write(h Head, body []byte) (file string, err error) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.ended {
		return "", nil
	}
	h.Version, h.By, h.Sum = version, s.me, sum(body)
	first, err := json.Marshal(h)
	if err != nil {
		return "", err
	}
	data := bytes.Join([][]byte{[]byte(head), first, []byte("\n"), body}, nil)
	err = errors.New("no place")
	for _, place := range s.places(h) {
		if filepath.Dir(place) == s.folder {
			_ = os.MkdirAll(s.folder, 0o700)
		}
		if err = replace(place, data); err == nil {
			if s.file != "" && s.file != place {
				os.Remove(s.file)
			}
			s.file = place
			return place, nil
		}
	}
	return "", fmt.Errorf("unsaved work can't be kept aside: %w", err)
}

// places are where the side file may be, the best first.
func (s *Side) places(h Head) []string {
	mark := fnv.New32a()
	fmt.Fprintf(mark, "%s\n%s\n%p", s.me.Host, s.me.Begun, s)
	tail := fmt.Sprintf(".%d-%08x%s", s.me.PID, mark.Sum32(), kept)
	if h.Path == "" {
		return []string{filepath.Join(s.folder, "unnamed"+tail)}
	}
	where := fnv.New32a()
	where.Write([]byte(h.Path))
	return []string{
		filepath.Join(filepath.Dir(h.Path), "."+filepath.Base(h.Path)+tail),
		filepath.Join(s.folder, fmt.Sprintf("%08x", where.Sum32())+tail),
	}
}

// Remove takes the side file away: what it held is saved, or was given up.
func (s *Side) Remove() {
	s.mu.Lock()
	defer s.mu.Unlock()
	s.remove()
}

func (s *Side) remove() {
	if s.file != "" {
		os.Remove(s.file)
		s.file = ""
	}
}

// End takes the side file away; what is written later is not kept any more.
func (s *Side) End() {
	s.mu.Lock()
	defer s.mu.Unlock()
	s.remove()
	s.ended = true
}

// read reads a side file whole.
func read(file string) (Kept, error) {
	info, err := os.Stat(file)
	if err != nil {
		return Kept{}, err
	}
	if !info.Mode().IsRegular() || info.Size() > most {
		return Kept{}, errors.New("not a file of kept work")
	}
	data, err := os.ReadFile(file)
	if err != nil {
		return Kept{}, err
	}
	first, body, ok := bytes.Cut(data, []byte("\n"))
	k := Kept{File: file, Body: body}
	if !ok || !bytes.HasPrefix(first, []byte(head)) {
		return k, errors.New("it does not begin as a file of kept work")
	}
	if err := json.Unmarshal(first[len(head):], &k.Head); err != nil {
		return k, err
	}
	if k.Version > version {
		return k, nil
	}
	if k.Version != version || k.Sum != sum(body) {
		return k, errors.New("it is not whole")
	}
	return k, nil
}
