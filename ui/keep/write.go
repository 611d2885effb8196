package keep

import (
	"os"
	"path/filepath"
)

// replace writes a file aside, flushes it and renames it, so that the path holds the old or the new one, whole.
func replace(path string, data []byte) (err error) {
	f, err := os.OpenFile(path+".tmp", os.O_CREATE|os.O_TRUNC|os.O_WRONLY, 0o600)
	if err != nil {
		return err
	}
	defer func() {
		if err != nil {
			f.Close()
			os.Remove(f.Name())
		}
	}()
	if _, err = f.Write(data); err != nil {
		return err
	}
	if err = f.Sync(); err != nil {
		return err
	}
	if err = f.Close(); err != nil {
		return err
	}
	if err = os.Rename(f.Name(), path); err != nil {
		return err
	}
	if d, err := os.Open(filepath.Dir(path)); err == nil { // makes the rename itself lasting where the system can
		_ = d.Sync()
		d.Close()
	}
	return nil
}
