package main

import (
	"fmt"
	"os"
	"path/filepath"

	"kern/lsp/disk"
)

// extension is what calculations are called.
const extension = disk.Extension

// workspace is the folder that calculations may read from: the checkout that
// the given paths lie in, or else the folder that holds them all. Names inside
// it have slashes and no leading dot.
type workspace struct {
	folder *disk.Folder
	dir    string   // absolute
	root   *os.Root // keeps reads inside, links included
	here   string   // the working directory, for printing names
	names  []string // the calculations that were asked for
}

// openWorkspace finds the calculations that the paths mean: files as they are,
// folders walked.
func openWorkspace(paths []string) (*workspace, error) {
	here, err := os.Getwd()
	if err != nil {
		return nil, err
	}
	if len(paths) == 0 {
		paths = []string{"."}
	}
	var absolute []string
	dir := ""
	for _, p := range paths {
		a, err := filepath.Abs(p)
		if err != nil {
			return nil, err
		}
		info, err := os.Stat(a)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", p, reason(err))
		}
		absolute = append(absolute, a)
		folder := a
		if !info.IsDir() {
			folder = filepath.Dir(a)
		}
		dir = disk.Common(dir, folder)
	}
	if disk.Inside(here, dir) {
		dir = here
	}
	w := &workspace{dir: disk.Checkout(dir), here: here}
	if w.folder, err = disk.Open(w.dir); err != nil {
		return nil, err
	}
	w.root = w.folder.Root()
	for i, a := range absolute {
		found, err := w.folder.Find(a)
		if err != nil {
			return nil, err
		}
		if len(found) == 0 {
			return nil, fmt.Errorf("%s: there is no calculation (*%s) in it", paths[i], extension)
		}
		w.names = append(w.names, found...)
	}
	return w, nil
}

// reason takes the path out of an error of the file system: it is said already.
func reason(err error) error { return disk.Reason(err) }

// show is a workspace name as a terminal in the working directory can open it.
func (w *workspace) show(name string) string {
	rel, err := filepath.Rel(w.here, w.folder.Path(name))
	if err != nil {
		return name
	}
	return filepath.ToSlash(rel)
}

// read gives the text of a file of the workspace.
func (w *workspace) read(name string) (string, error) { return w.folder.Read(name) }
