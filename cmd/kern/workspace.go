package main

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"strings"

	"github.com/go-git/go-git/v5/plumbing/format/gitignore"
)

// extension is what calculations are called.
const extension = ".kern"

// workspace is the folder that calculations may read from: the checkout that
// the given paths lie in, or else the folder that holds them all. Names inside
// it have slashes and no leading dot.
type workspace struct {
	dir   string   // absolute
	root  *os.Root // keeps reads inside, links included
	here  string   // the working directory, for printing names
	names []string // the calculations that were asked for
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
		dir = common(dir, folder)
	}
	if inside(here, dir) {
		dir = here
	}
	w := &workspace{dir: checkout(dir), here: here}
	if w.root, err = os.OpenRoot(w.dir); err != nil {
		return nil, err
	}
	for i, a := range absolute {
		found, err := w.find(a)
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
func reason(err error) error {
	var p *fs.PathError
	if errors.As(err, &p) {
		err = p.Err
	}
	if errors.Is(err, fs.ErrNotExist) {
		return errors.New("there is no such file or folder")
	}
	return err
}

// common is the deepest folder that holds both.
func common(a, b string) string {
	if a == "" {
		return b
	}
	for !inside(a, b) {
		a = filepath.Dir(a)
	}
	return a
}

// inside tells whether path is dir or lies in it.
func inside(dir, path string) bool {
	rel, err := filepath.Rel(dir, path)
	return err == nil && rel != ".." && !strings.HasPrefix(rel, ".."+string(filepath.Separator))
}

// checkout is the git checkout that a folder lies in, or the folder itself.
func checkout(dir string) string {
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

// name is the workspace name of an absolute path.
func (w *workspace) name(absolute string) (string, error) {
	rel, err := filepath.Rel(w.dir, absolute)
	if err != nil {
		return "", err
	}
	return filepath.ToSlash(rel), nil
}

// show is a workspace name as a terminal in the working directory can open it.
func (w *workspace) show(name string) string {
	rel, err := filepath.Rel(w.here, filepath.Join(w.dir, filepath.FromSlash(name)))
	if err != nil {
		return name
	}
	return filepath.ToSlash(rel)
}

// read gives the text of a file of the workspace.
func (w *workspace) read(name string) (string, error) {
	f, err := w.root.Open(filepath.FromSlash(name))
	if err != nil {
		return "", reason(err)
	}
	defer f.Close()
	info, err := f.Stat()
	if err != nil {
		return "", reason(err)
	}
	if info.IsDir() {
		return "", errors.New("it is a folder")
	}
	if !info.Mode().IsRegular() {
		return "", errors.New("it is not a regular file")
	}
	var b strings.Builder
	b.Grow(int(info.Size()))
	if _, err := io.Copy(&b, f); err != nil {
		return "", reason(err)
	}
	return b.String(), nil
}

// find lists the calculations at a path: the file itself, or those in the
// folder, without what git ignores and without hidden folders.
func (w *workspace) find(absolute string) ([]string, error) {
	info, err := os.Stat(absolute)
	if err != nil {
		return nil, reason(err)
	}
	if !info.IsDir() {
		name, err := w.name(absolute)
		return []string{name}, err
	}
	start, err := w.name(absolute)
	if err != nil {
		return nil, err
	}
	var patterns []gitignore.Pattern
	// the ignore files between the workspace and the folder count too
	if start != "." {
		parts := strings.Split(start, "/")
		for i := range parts {
			patterns = append(patterns, w.ignored(path.Join(parts[:i]...))...)
		}
	}
	var out []string
	err = fs.WalkDir(w.root.FS(), start, func(name string, d fs.DirEntry, err error) error {
		if err != nil {
			if d != nil && d.IsDir() && name != start {
				return fs.SkipDir // a folder that cannot be read holds nothing for us
			}
			return err
		}
		hidden := strings.HasPrefix(d.Name(), ".") && name != start && name != "."
		match := name != "." && name != start && gitignore.NewMatcher(patterns).Match(strings.Split(name, "/"), d.IsDir())
		if d.IsDir() {
			if hidden || match {
				return fs.SkipDir
			}
			patterns = append(patterns, w.ignored(name)...)
			return nil
		}
		if !hidden && !match && strings.HasSuffix(name, extension) && d.Type().IsRegular() {
			out = append(out, name)
		}
		return nil
	})
	return out, err
}

// ignored reads the ignore file of a folder of the workspace.
func (w *workspace) ignored(dir string) []gitignore.Pattern {
	text, err := w.read(path.Join(dir, ".gitignore"))
	if err != nil {
		return nil
	}
	var domain []string
	if dir != "." && dir != "" {
		domain = strings.Split(dir, "/")
	}
	var out []gitignore.Pattern
	for _, line := range strings.Split(text, "\n") {
		line = strings.TrimRight(line, "\r")
		if line != "" && !strings.HasPrefix(line, "#") {
			out = append(out, gitignore.ParsePattern(line, domain))
		}
	}
	return out
}
