package lsp

import (
	"path/filepath"

	"kern/lsp/disk"

	"go.lsp.dev/uri"
)

// pathOf gives the absolute path that a URI means on this machine, "" for one
// that is no file (an unsaved text, a page of version control). The library has
// decoded the percent signs and put the drive letter into one form.
func pathOf(u uri.URI) string {
	if !u.IsFile() {
		return ""
	}
	path := u.FsPath()
	if path == "" || !filepath.IsAbs(path) {
		return ""
	}
	return filepath.Clean(path)
}

// realPath follows the links of a path. For a file that does not exist yet it
// follows those of the folders that do.
func realPath(path string) string {
	if real, err := filepath.EvalSymlinks(path); err == nil {
		return real
	}
	up := filepath.Dir(path)
	if up == path {
		return path
	}
	return filepath.Join(realPath(up), filepath.Base(path))
}

// within tells whether a path lies in a folder, as written or with links
// followed, and gives the path as one below the folder.
func within(dir, path string) (string, bool) {
	if disk.Inside(dir, path) {
		return path, true
	}
	realDir, real := realPath(dir), realPath(path)
	if !disk.Inside(realDir, real) {
		return "", false
	}
	rel, err := filepath.Rel(realDir, real)
	if err != nil {
		return "", false
	}
	return filepath.Join(dir, rel), true
}

// uriOf is the URI of a path.
func uriOf(path string) uri.URI { return uri.File(path) }
