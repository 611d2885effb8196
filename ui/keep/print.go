package keep

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"io"
	"io/fs"
	"os"
	"time"
)

// Print is what a file was when it was read or written last. The zero Print is that of a file that is not there.
type Print struct {
	There bool
	Time  time.Time
	Size  int64
	Sum   string // SHA-256 in hexadecimal
}

// Look takes the print of a file.
func Look(path string) (Print, error) {
	f, err := os.Open(path)
	if errors.Is(err, fs.ErrNotExist) {
		return Print{}, nil
	}
	if err != nil {
		return Print{}, err
	}
	defer f.Close()
	info, err := f.Stat()
	if err != nil {
		return Print{}, err
	}
	h := sha256.New()
	if _, err := io.Copy(h, f); err != nil {
		return Print{}, err
	}
	return Print{There: true, Time: info.ModTime(), Size: info.Size(), Sum: hex.EncodeToString(h.Sum(nil))}, nil
}

// Changed tells whether the file holds something else than it did, or is gone or came, and returns its print now. Unless thorough, a file of the same
// time and size counts as the same.
func (p Print) Changed(path string, thorough bool) (now Print, changed bool, err error) {
	if info, err := os.Stat(path); err == nil && !thorough && p.There && info.ModTime().Equal(p.Time) && info.Size() == p.Size {
		return p, false, nil
	}
	now, err = Look(path)
	if err != nil {
		return p, false, err
	}
	return now, now.There != p.There || now.Sum != p.Sum, nil
}

func sum(data []byte) string {
	s := sha256.Sum256(data)
	return hex.EncodeToString(s[:])
}
