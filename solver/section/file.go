package section

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
)

// Open reads the file at path. A failure to read it (a directory, no permission, over MaxBytes, not text) comes as an error with one
// clear sentence; problems in what it says come as a list.
func Open(path string) (*Document, []Problem, error) {
	data, err := readFile(path)
	if err != nil {
		return nil, nil, fmt.Errorf("%s can't be opened: %w", path, err)
	}
	d, problems := Read(data)
	return d, problems, nil
}

func readFile(path string) ([]byte, error) {
	info, err := os.Stat(path)
	switch {
	case err != nil:
		return nil, reason(err)
	case info.IsDir():
		return nil, errors.New("it is a directory; choose a design file in it")
	case !info.Mode().IsRegular():
		return nil, errors.New("it is no ordinary file; choose a design file")
	}
	f, err := os.Open(path)
	if err != nil {
		return nil, reason(err)
	}
	defer f.Close()
	if info.Size() > MaxBytes {
		return nil, fmt.Errorf("it has %d MB, and at most %d MB are read; choose a design file", info.Size()>>20, MaxBytes>>20)
	}
	data, err := io.ReadAll(io.LimitReader(f, MaxBytes+1))
	if err != nil {
		return nil, reason(err)
	}
	if bad := textFault(data); bad != nil {
		return nil, bad
	}
	return data, nil
}

// osError is a failure of the operating system in words for people; errors.Is sees the cause.
type osError struct {
	words string
	cause error
}

func (e osError) Error() string { return e.words }
func (e osError) Unwrap() error { return e.cause }

// reason turns a failure of the operating system into a sentence.
func reason(err error) error {
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return osError{"there is no such file or folder; check its name", err}
	case errors.Is(err, fs.ErrPermission):
		return osError{"permission is denied; choose another place, or ask for the right to it", err}
	case isFull(err):
		return osError{"the disk is full; make room, or choose another place", err}
	case isReadOnly(err):
		return osError{"the disk can only be read; choose another place", err}
	}
	var pe *fs.PathError
	if errors.As(err, &pe) {
		return osError{pe.Err.Error(), err}
	}
	return err
}

// Save writes the document to path atomically (write aside, flush, rename), so that path holds the old or the new file, whole,
// whatever happens. An existing file keeps its mode; a link is followed.
func Save(path string, d *Document) error {
	data, err := toText(d)
	if err == nil {
		err = writeFile(path, data, func(f *os.File) io.Writer { return f })
	}
	if err != nil {
		return fmt.Errorf("%s was not saved: %w", path, err)
	}
	return nil
}

// writeFile replaces the file at path. through stands between it and the disk, for tests.
func writeFile(path string, data []byte, through func(*os.File) io.Writer) (err error) {
	target, mode, err := destination(path)
	if err != nil {
		return err
	}
	tmp, err := os.CreateTemp(filepath.Dir(target), "."+filepath.Base(target)+".*.tmp")
	if err != nil {
		return reason(err)
	}
	defer func() {
		if err != nil {
			tmp.Close()
			os.Remove(tmp.Name())
			err = reason(err)
		}
	}()
	if _, err = through(tmp).Write(data); err != nil {
		return err
	}
	if err = tmp.Chmod(mode); err != nil && !errors.Is(err, errors.ErrUnsupported) {
		return err
	}
	if err = tmp.Sync(); err != nil {
		return err
	}
	if err = tmp.Close(); err != nil {
		return err
	}
	if err = os.Rename(tmp.Name(), target); err != nil {
		return err
	}
	syncDir(filepath.Dir(target))
	return nil
}

// destination follows links to the file that is to be replaced, and returns the mode that it shall have.
func destination(path string) (target string, mode fs.FileMode, err error) {
	target = path
	for range 40 {
		info, err := os.Lstat(target)
		switch {
		case errors.Is(err, fs.ErrNotExist):
			return target, 0o644, nil
		case err != nil:
			return "", 0, reason(err)
		case info.IsDir():
			return "", 0, errors.New("it is a directory; give the file a name")
		case info.Mode()&fs.ModeSymlink == 0:
			return regular(target, info)
		}
		link, err := os.Readlink(target)
		if err != nil {
			return "", 0, reason(err)
		}
		if !filepath.IsAbs(link) {
			link = filepath.Join(filepath.Dir(target), link)
		}
		target = link
	}
	return "", 0, errors.New("it is a link that leads to itself; choose another name")
}

func regular(target string, info fs.FileInfo) (string, fs.FileMode, error) {
	if !info.Mode().IsRegular() {
		return "", 0, errors.New("it is no ordinary file; choose another name")
	}
	f, err := os.OpenFile(target, os.O_WRONLY, 0) // a file that may not be written to is not replaced either
	if err != nil {
		return "", 0, reason(err)
	}
	f.Close()
	return target, info.Mode().Perm(), nil
}

// syncDir makes the rename itself lasting. Not all systems can; the file is whole either way.
func syncDir(dir string) {
	if f, err := os.Open(dir); err == nil {
		_ = f.Sync()
		f.Close()
	}
}
