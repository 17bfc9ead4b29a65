package lsp

import (
	"bytes"
	"encoding/json"
	"slices"
	"strings"
	"time"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// fileSet is the diagnostics of a file as one workspace has them, written out.
type fileSet struct {
	items   []byte // a JSON array
	version *int32
}

// shownSet is what the client was told last of a file, and whether it was open
// then.
type shownSet struct {
	items []byte
	open  bool
}

var noItems = []byte("[]")

// show tells the client what a snapshot says: by diagnostics that are pushed or,
// when the client asks for them itself, by asking it to ask again. outer is set
// when more than an edit led to the snapshot.
func (s *Server) show(snapshot *Snapshot, outer bool) {
	if outer || snapshot.manyOpen() {
		s.refresh.soon()
	}
	if s.client.Pulls {
		if outer {
			s.refreshDiagnostics()
		}
		return
	}
	sets, due := snapshot.sets()
	snapshot.workspace.wakeAt(due)
	s.push(snapshot.workspace, sets)
}

// wakeAt has the workspace published again at a time; zero for never. It is
// called by the workspace's own goroutine alone.
func (w *workspace) wakeAt(due time.Time) {
	if w.stopWaking != nil {
		w.stopWaking()
		w.stopWaking = nil
	}
	if due.IsZero() {
		return
	}
	clock := w.server.clock
	w.stopWaking = clock.AfterFunc(due.Sub(clock.Now()), func() {
		w.server.mu.Lock()
		defer w.server.mu.Unlock()
		if w.ctx.Err() == nil {
			w.again()
		}
	})
}

// refreshDiagnostics has a client that asks for diagnostics ask again.
func (s *Server) refreshDiagnostics() {
	if s.client.RefreshDiagnostics {
		s.background(func() {
			if err := s.call(protocol.MethodWorkspaceDiagnosticRefresh, nil, nil); err != nil && s.ctx.Err() == nil {
				s.log.warn("the client refuses to refresh diagnostics: %v", err)
			}
		})
	}
}

// manyOpen tells whether another document may show what an edit changed.
func (s *Snapshot) manyOpen() bool { return len(s.open) > 1 }

// sets writes the diagnostics of every file that the workspace shows.
func (s *Snapshot) sets() (map[uri.URI]fileSet, time.Time) {
	p := s.printer()
	out := map[uri.URI]fileSet{}
	var due time.Time
	for name := range s.project.Files {
		d := s.open[name]
		if d == nil && (s.workspace.kind != wholeFolder || len(diagnosticsOf(s.report, name)) == 0) {
			continue
		}
		now, wait := s.diagnosticsNow(name)
		if !wait.IsZero() && (due.IsZero() || wait.Before(due)) {
			due = wait
		}
		set := fileSet{items: noItems, version: s.Version(name)}
		if len(now) > 0 {
			raw, err := p.write(now)
			if err != nil {
				s.workspace.server.log.fail("the diagnostics of %s cannot be written: %v", name, err)
				continue
			}
			set.items = raw
		}
		out[s.URI(name)] = set
	}
	return out, due
}

// push replaces what a workspace says and sends what that changes.
func (s *Server) push(w *workspace, sets map[uri.URI]fileSet) {
	s.pushing.Lock()
	defer s.pushing.Unlock()
	touched := map[uri.URI]bool{}
	for u, set := range sets {
		before := w.sets[u]
		if !bytes.Equal(set.items, before.items) || (set.version != nil) != (before.version != nil) {
			touched[u] = true
		}
	}
	for u := range w.sets {
		if _, still := sets[u]; !still {
			touched[u] = true
		}
	}
	w.sets = sets
	s.send(touched)
}

// withdraw takes back what a workspace that was closed has said.
func (s *Server) withdraw(w *workspace) {
	s.pushing.Lock()
	defer s.pushing.Unlock()
	touched := map[uri.URI]bool{}
	for u := range w.sets {
		touched[u] = true
	}
	w.sets = map[uri.URI]fileSet{}
	s.send(touched)
}

// send tells the client of files, each only if it would see a difference.
func (s *Server) send(touched map[uri.URI]bool) {
	order := make([]uri.URI, 0, len(touched))
	for u := range touched {
		order = append(order, u)
	}
	slices.SortFunc(order, func(a, b uri.URI) int { return strings.Compare(string(a), string(b)) })
	for _, u := range order {
		set := s.effective(u)
		before, told := s.shown[u]
		empty := bytes.Equal(set.items, noItems)
		switch {
		case empty && set.version == nil:
			delete(s.shown, u) // nothing to say of a file that is not open
		default:
			s.shown[u] = shownSet{set.items, set.version != nil}
		}
		// That an open document is right is worth saying once; and some clients
		// forget what they were told of a file before they opened it.
		opened := set.version != nil && !before.open
		if told && bytes.Equal(before.items, set.items) && !opened || !told && empty && set.version == nil {
			continue
		}
		s.notify(protocol.MethodTextDocumentPublishDiagnostics, s.publication(u, set))
	}
}

// publication writes the notification by hand: the items are written already.
func (s *Server) publication(u uri.URI, set fileSet) jsonrpc2.RawMessage {
	raw := append([]byte(`{"uri":`), object(string(u))...)
	if set.version != nil && s.client.DiagnosticVersions {
		raw = append(append(raw, `,"version":`...), object(protocol.Integer(*set.version))...)
	}
	raw = append(append(raw, `,"diagnostics":`...), set.items...)
	return append(raw, '}')
}

// effective is what is to be shown of a file: what its own workspace says, or,
// for a file that lies in none and is included from several, what they say
// together.
func (s *Server) effective(u uri.URI) fileSet {
	s.mu.Lock()
	var home *workspace
	if d := s.docs[u]; d != nil {
		home = s.homeOf(d)
	} else if path := pathOf(u); path != "" {
		home = s.home(path)
	}
	all := make([]*workspace, 0, len(s.workspaces))
	for _, w := range s.workspaces {
		all = append(all, w)
	}
	s.mu.Unlock()
	if home != nil {
		if set, ok := home.sets[u]; ok {
			return set
		}
		return fileSet{items: noItems}
	}
	slices.SortFunc(all, func(a, b *workspace) int { return strings.Compare(a.key(), b.key()) })
	var merged []json.RawMessage
	seen := map[string]bool{}
	for _, w := range all {
		var items []json.RawMessage
		if set, ok := w.sets[u]; !ok || json.Unmarshal(set.items, &items) != nil {
			continue
		}
		for _, item := range items {
			if !seen[string(item)] {
				seen[string(item)] = true
				merged = append(merged, item)
			}
		}
	}
	if len(merged) == 0 {
		return fileSet{items: noItems}
	}
	raw, err := json.Marshal(merged)
	if err != nil {
		return fileSet{items: noItems}
	}
	return fileSet{items: raw}
}
