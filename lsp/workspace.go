package lsp

import (
	"context"
	"errors"
	"maps"
	"path/filepath"
	"slices"
	"sync"
	"sync/atomic"

	"kern/checker"
	"kern/lang"
	"kern/lsp/disk"

	"go.lsp.dev/uri"
)

// workspace is a set of files that are checked together: a folder that the
// editor has open, the folder of a file that lies in none of these, or one text
// that is no file.
type workspace struct {
	server *Server
	kind   workspaceKind
	base   string       // the folder that is walked, absolute; the URI of a scratch text
	folder *disk.Folder // what may be read from: the checkout around the base; nil for a scratch text
	cancel context.CancelFunc
	ctx    context.Context

	// guarded by Server.mu
	open     map[string]*document // every open document that lies in the folder, by name
	owned    map[string]bool      // of these, the ones that belong here rather than to a folder below or beside
	current  *Snapshot
	sequence uint64

	wake   chan struct{} // holds a token while there is something to publish
	outer  atomic.Bool   // something other than an edit changed since the last publication
	parsed atomic.Pointer[lang.Project]
	report atomic.Pointer[checker.Report]
	check  sync.Mutex // one check at a time
	lines  sync.Map   // name -> *Text of files that are not open

	disk  files
	pasts pasts
	sets  map[uri.URI]fileSet // guarded by Server.pushing

	stopWaking func() // of the goroutine that publishes
}

type workspaceKind uint8

const (
	wholeFolder workspaceKind = iota // opened by the editor: walked, everything in it is shown
	looseFolder                      // of a file opened alone: its neighbours count, open files are shown
	scratchText                      // an unsaved text
)

func newWorkspace(s *Server, kind workspaceKind, base string) (*workspace, error) {
	w := &workspace{server: s, kind: kind, base: base, open: map[string]*document{}, owned: map[string]bool{}, wake: make(chan struct{}, 1), sets: map[uri.URI]fileSet{}}
	if kind != scratchText {
		folder, err := disk.Open(disk.Checkout(base))
		if err != nil {
			return nil, err
		}
		w.folder = folder
	}
	w.disk = files{folder: w.folder, stale: true, texts: map[string]diskText{}}
	w.ctx, w.cancel = context.WithCancel(s.ctx)
	s.goroutines.Go(w.run)
	return w, nil
}

// name is the name of a path in the workspace.
func (w *workspace) name(path string) (string, bool) {
	if w.folder == nil {
		return "", false
	}
	below, ok := within(w.folder.Dir, path)
	if !ok {
		return "", false
	}
	name, err := w.folder.Name(below)
	return name, err == nil
}

// owns tells whether a path lies in the folder itself, not only in the checkout
// around it.
func (w *workspace) owns(path string) bool {
	switch w.kind {
	case wholeFolder:
		_, ok := within(w.base, path)
		return ok
	case looseFolder:
		below, ok := within(w.base, path)
		return ok && filepath.Dir(below) == w.base
	}
	return false
}

// touch makes a new snapshot of the workspace and has it published. The caller
// holds Server.mu.
func (w *workspace) touch() {
	w.sequence++
	w.current = &Snapshot{workspace: w, sequence: w.sequence, open: maps.Clone(w.open), owned: slices.Sorted(maps.Keys(w.owned)),
		unit: w.server.unit, loaded: make(chan struct{}), checked: make(chan struct{})}
	w.again()
}

// again has the current snapshot published, again if need be.
func (w *workspace) again() {
	w.server.busy.begin()
	select {
	case w.wake <- struct{}{}:
	default:
		w.server.busy.end() // a token waits already
	}
}

// run publishes snapshots, the newest each time, until the workspace closes.
func (w *workspace) run() {
	defer func() {
		if w.folder != nil {
			w.folder.Close()
		}
	}()
	for {
		select {
		case <-w.wake:
			w.publish()
			w.server.busy.end()
		case <-w.ctx.Done():
			select {
			case <-w.wake:
				w.server.busy.end()
			default:
			}
			return
		}
	}
}

func (w *workspace) publish() {
	w.server.mu.Lock()
	snapshot := w.current
	w.server.mu.Unlock()
	outer := w.outer.Swap(false)
	if snapshot == nil || snapshot.wait(w.ctx, snapshot.checked) != nil {
		return
	}
	w.server.show(snapshot, outer)
}

// names are the files to read: those that were found and those that are open.
func (w *workspace) names(s *Snapshot) []string {
	names := slices.Clone(s.owned)
	if w.kind == scratchText {
		return names
	}
	for _, name := range w.disk.found(func() []string {
		if w.kind == looseFolder {
			return w.folder.List(w.base)
		}
		found, err := w.folder.Find(w.base)
		if err != nil {
			w.server.log.warn("cannot list %s: %v", w.base, err)
		}
		return found
	}) {
		if !slices.Contains(s.owned, name) {
			names = append(names, name)
		}
	}
	return names
}

var errScratch = errors.New("a text that is not saved has no folder to include from")

// reader gives the text of files: what the editor has open, before what is on
// the disk.
func (w *workspace) reader(s *Snapshot) lang.Read {
	return func(name string) (string, error) {
		if d := s.open[name]; d != nil {
			return d.text.s, nil
		}
		if w.folder == nil {
			return "", errScratch
		}
		return w.disk.read(name)
	}
}
