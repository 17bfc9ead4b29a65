package disk

import (
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"strings"

	"github.com/go-git/go-git/v5/plumbing/format/gitignore"
)

// Find lists the calculations at an absolute path: the file itself, or those in
// the folder, without what git ignores and without hidden folders.
func (f *Folder) Find(absolute string) ([]string, error) {
	info, err := os.Stat(absolute)
	if err != nil {
		return nil, Reason(err)
	}
	if !info.IsDir() {
		name, err := f.Name(absolute)
		return []string{name}, err
	}
	start, err := f.Name(absolute)
	if err != nil {
		return nil, err
	}
	var patterns []gitignore.Pattern
	// the ignore files between the workspace and the folder count too
	if start != "." {
		parts := strings.Split(start, "/")
		for i := range parts {
			patterns = append(patterns, f.ignored(path.Join(parts[:i]...))...)
		}
	}
	var out []string
	err = fs.WalkDir(f.root.FS(), start, func(name string, d fs.DirEntry, err error) error {
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
			patterns = append(patterns, f.ignored(name)...)
			return nil
		}
		if !hidden && !match && strings.HasSuffix(name, Extension) && d.Type().IsRegular() {
			out = append(out, name)
		}
		return nil
	})
	return out, err
}

// List lists the calculations that lie in a folder itself, not in those below
// it. A folder that cannot be read holds none.
func (f *Folder) List(absolute string) []string {
	entries, err := os.ReadDir(absolute)
	if err != nil {
		return nil
	}
	var out []string
	for _, e := range entries {
		if !strings.HasPrefix(e.Name(), ".") && strings.HasSuffix(e.Name(), Extension) && e.Type().IsRegular() {
			if name, err := f.Name(filepath.Join(absolute, e.Name())); err == nil {
				out = append(out, name)
			}
		}
	}
	return out
}

// ignored reads the ignore file of a folder of the workspace.
func (f *Folder) ignored(dir string) []gitignore.Pattern {
	text, err := f.Read(path.Join(dir, ".gitignore"))
	if err != nil {
		return nil
	}
	return Ignored(text, dir)
}

// Ignored reads the text of the ignore file of a folder, "." or "" for the
// outermost.
func Ignored(text, dir string) []gitignore.Pattern {
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
