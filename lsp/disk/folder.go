// Package disk finds and reads the calculations of a folder: what the command
// line and the language server know of the file system.
package disk

import (
	"errors"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"time"
)

// Extension is what calculations are called.
const Extension = ".kern"

// Folder is the folder that calculations may read from. Names inside it have
// slashes and no leading dot. Reads never leave it, links included.
type Folder struct {
	// Dir is the absolute path.
	Dir  string
	root *os.Root
}

// Open opens a folder by its absolute path. It is to be closed again.
func Open(dir string) (*Folder, error) {
	root, err := os.OpenRoot(dir)
	if err != nil {
		return nil, err
	}
	return &Folder{Dir: dir, root: root}, nil
}

// Close lets go of the folder.
func (f *Folder) Close() error { return f.root.Close() }

// Root gives access to the folder for writing.
func (f *Folder) Root() *os.Root { return f.root }

// Name is the name of an absolute path inside the folder.
func (f *Folder) Name(absolute string) (string, error) {
	rel, err := filepath.Rel(f.Dir, absolute)
	if err != nil {
		return "", err
	}
	return filepath.ToSlash(rel), nil
}

// Path is the absolute path of a name.
func (f *Folder) Path(name string) string {
	return filepath.Join(f.Dir, filepath.FromSlash(name))
}

// Stamp tells one state of a file from another without reading it.
type Stamp struct {
	Size     int64
	Modified time.Time
}

// Stamp gives the state of a file; an error is worded for the user.
func (f *Folder) Stamp(name string) (Stamp, error) {
	info, err := f.root.Stat(filepath.FromSlash(name))
	if err != nil {
		return Stamp{}, Reason(err)
	}
	return Stamp{info.Size(), info.ModTime()}, nil
}

// Read gives the text of a file; an error is worded for the user.
func (f *Folder) Read(name string) (string, error) {
	file, err := f.root.Open(filepath.FromSlash(name))
	if err != nil {
		return "", Reason(err)
	}
	defer file.Close()
	info, err := file.Stat()
	if err != nil {
		return "", Reason(err)
	}
	if info.IsDir() {
		return "", errors.New("it is a folder")
	}
	if !info.Mode().IsRegular() {
		return "", errors.New("it is not a regular file")
	}
	var b strings.Builder
	b.Grow(int(info.Size()))
	if _, err := io.Copy(&b, file); err != nil {
		return "", Reason(err)
	}
	return b.String(), nil
}

// Reason takes the path out of an error of the file system: it is said already.
func Reason(err error) error {
	var p *fs.PathError
	if errors.As(err, &p) {
		err = p.Err
	}
	if errors.Is(err, fs.ErrNotExist) {
		return errors.New("there is no such file or folder")
	}
	return err
}

// Common is the deepest folder that holds both; an empty a gives b.
func Common(a, b string) string {
	if a == "" {
		return b
	}
	for !Inside(a, b) {
		a = filepath.Dir(a)
	}
	return a
}

// Inside tells whether path is dir or lies in it.
func Inside(dir, path string) bool {
	rel, err := filepath.Rel(dir, path)
	return err == nil && rel != ".." && !strings.HasPrefix(rel, ".."+string(filepath.Separator))
}

// Checkout is the git checkout that a folder lies in, or the folder itself.
func Checkout(dir string) string {
	for d := dir; ; {
		if _, err := os.Stat(filepath.Join(d, ".git")); err == nil {
			return d
		}
		up := filepath.Dir(d)
		if up == d {
			return dir
		}
		d = up
	}
}
