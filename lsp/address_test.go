package lsp

import (
	"os"
	"path/filepath"
	"testing"

	"go.lsp.dev/uri"
)

func TestAddresses(t *testing.T) {
	for path, want := range map[string]string{
		"/tmp/a b/ä#1.kern": "file:///tmp/a%20b/%C3%A4%231.kern",
		"/tmp/100%.kern":    "file:///tmp/100%25.kern",
		"/tmp/x?y.kern":     "file:///tmp/x%3Fy.kern",
	} {
		u := uriOf(path)
		if string(u) != want {
			t.Errorf("%s is %s, want %s", path, u, want)
		}
		if got := pathOf(u); got != path {
			t.Errorf("%s is %s, want %s", u, got, path)
		}
	}
	// the ways in which clients write one path
	for _, written := range []string{"file:///tmp/a%20b/%C3%A4.kern", "file:///tmp/a b/ä.kern", "file:///tmp/%61%20b/%c3%a4.kern", "file:///tmp/./a%20b/x/../%C3%A4.kern"} {
		u, err := uri.Parse(written)
		if err != nil || pathOf(u) != "/tmp/a b/ä.kern" {
			t.Errorf("%s is %s: %v", written, pathOf(u), err)
		}
	}
	for _, none := range []uri.URI{"", "untitled:One", "git:/tmp/a.kern?x", "kern-rule:undecided", "http://example.org/a.kern"} {
		if got := pathOf(none); got != "" {
			t.Errorf("%s is the path %s", none, got)
		}
	}
	// a drive letter has one form, whichever the client writes
	for _, written := range []string{"file:///c%3A/Posts/a.kern", "file:///C:/Posts/a.kern", "file:///c:/Posts/a.kern"} {
		u, err := uri.Parse(written)
		if got := uri.FsPathFor(u, uri.PlatformWindows, false); err != nil || got != `c:\Posts\a.kern` {
			t.Errorf("%s is %s on Windows: %v", written, got, err)
		}
	}
}

// TestLinks opens a file of a folder by another way to it: it is the folder's
// file all the same.
func TestLinks(t *testing.T) {
	base, err := filepath.EvalSymlinks(t.TempDir())
	if err != nil {
		t.Fatal(err)
	}
	real, link := filepath.Join(base, "real"), filepath.Join(base, "link")
	if err := os.MkdirAll(real, 0o777); err != nil {
		t.Fatal(err)
	}
	if err := os.Symlink(real, link); err != nil {
		t.Fatal(err)
	}
	s := start(t, link)
	s.write("b.kern", "section post = \"HEB 100\"\n")
	s.write("a.kern", "include \"b.kern\"\nbasis { standard \"elastic\" }\ncolumn A1 { section = post; material = \"S235\"; height = 3 m; load 10 kN }\n")
	s.initialize(`{}`, "", ".")
	s.dir = real // the client opens what it calls by another name
	s.openText("b.kern", "section post = \"HEB 100\"\nx = 1 m + 1 kN\n")
	s.settle()
	s.server.mu.Lock()
	n := len(s.server.workspaces)
	s.server.mu.Unlock()
	if said := s.told("b.kern"); n != 1 || said == "" {
		t.Errorf("%d workspaces; told %q", n, said)
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	if len(s.diagnostics) != 1 {
		t.Errorf("told of %d files, one of them under a name that the client does not know", len(s.diagnostics))
	}
}
