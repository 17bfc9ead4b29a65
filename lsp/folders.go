package lsp

import (
	"context"
	"path/filepath"
	"slices"
	"strings"

	"go.lsp.dev/protocol"
)

// addFolder opens the workspace of a folder. The caller holds mu, as for all
// below.
func (s *Server) addFolder(dir string) {
	dir = strings.Clone(dir)
	if slices.Contains(s.folders, dir) {
		return
	}
	w, err := newWorkspace(s, wholeFolder, dir)
	if err != nil {
		s.background(func() { s.log.fail("cannot open the folder %s: %v", dir, err) })
		return
	}
	s.folders = append(s.folders, dir)
	s.workspaces[dir] = w
	w.touch()
}

func (s *Server) removeFolder(dir string) {
	i := slices.Index(s.folders, dir)
	if i < 0 {
		return
	}
	s.folders = slices.Delete(s.folders, i, i+1)
	s.closeWorkspace(s.workspaces[dir])
}

func (s *Server) closeWorkspace(w *workspace) {
	delete(s.workspaces, w.key())
	w.cancel()
	s.background(func() { s.withdraw(w) })
}

// key is what the workspace is found by: the base may be open as a folder and
// hold a file opened alone only one after the other.
func (w *workspace) key() string {
	if w.kind == looseFolder {
		return "loose " + w.base
	}
	return w.base
}

// home is the workspace that a path belongs to: that of the deepest folder
// around it, or else, when it is open, that of its own folder. nil for none.
func (s *Server) home(path string) *workspace {
	var best *workspace
	for _, dir := range s.folders {
		w := s.workspaces[dir]
		if (best == nil || len(w.base) > len(best.base)) && w.owns(path) {
			best = w
		}
	}
	if best == nil {
		best = s.workspaces["loose "+filepath.Dir(path)]
	}
	return best
}

// settle gives every open document to the workspace it belongs to, opens those
// that are missing and closes those that nothing needs. Workspaces of which
// anything changes are touched.
func (s *Server) settle() {
	changed := map[*workspace]bool{}
	for _, d := range s.docs {
		if s.homeOf(d) != nil {
			continue
		}
		kind, base := scratchText, scratchName(d.uri)
		if d.path != "" {
			kind, base = looseFolder, filepath.Dir(d.path)
		}
		w, err := newWorkspace(s, kind, base)
		if err != nil && kind == looseFolder { // a folder that is not there (yet)
			w, err = newWorkspace(s, scratchText, scratchName(d.uri))
		}
		if err != nil {
			continue
		}
		s.workspaces[w.key()] = w
	}
	for key, w := range s.workspaces {
		open, owned := map[string]*document{}, map[string]bool{}
		for _, d := range s.docs {
			name, ok := w.nameOf(d)
			if !ok {
				continue
			}
			open[name] = d
			if s.homeOf(d) == w {
				owned[name] = true
			}
		}
		if w.kind != wholeFolder && len(owned) == 0 {
			s.closeWorkspace(s.workspaces[key])
			continue
		}
		if !sameKeys(open, w.open) || !sameKeys(owned, w.owned) || w.current == nil {
			changed[w] = true
		}
		for name := range w.open {
			if open[name] == nil {
				w.disk.forget(name) // the disk counts again
			}
		}
		w.open, w.owned = open, owned
	}
	for w := range changed {
		w.outer.Store(true)
		w.touch()
	}
}

func sameKeys[V, W any](a map[string]V, b map[string]W) bool {
	if len(a) != len(b) {
		return false
	}
	for k := range a {
		if _, ok := b[k]; !ok {
			return false
		}
	}
	return true
}

// homeOf is the workspace that a document belongs to, nil while it has none.
func (s *Server) homeOf(d *document) *workspace {
	if d.path != "" {
		if w := s.home(d.path); w != nil {
			return w
		}
	}
	return s.workspaces[scratchName(d.uri)]
}

// nameOf is the name of a document in the workspace, false when it does not lie
// there.
func (w *workspace) nameOf(d *document) (string, bool) {
	if w.kind == scratchText {
		return w.base, w.base == scratchName(d.uri)
	}
	if d.path == "" {
		return "", false
	}
	return w.name(d.path)
}

// DidChangeWorkspaceFolders opens and closes folders.
func (s *Server) DidChangeWorkspaceFolders(_ context.Context, p *protocol.DidChangeWorkspaceFoldersParams) error {
	s.mu.Lock()
	defer s.mu.Unlock()
	for _, f := range p.Event.Removed {
		s.removeFolder(pathOf(f.URI))
	}
	for _, f := range p.Event.Added {
		if path := pathOf(f.URI); path != "" {
			s.addFolder(path)
		}
	}
	s.settle()
	return nil
}
