package lsp

import (
	"bytes"
	"context"
	"strings"
	"time"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// The methods here change documents. They run on the goroutine that reads the
// client's messages, so documents change in the order of the wire, and do no
// more than that: reading and checking are left to the workspace.

// DidOpen takes over a text from the disk, or a new one.
func (s *Server) DidOpen(_ context.Context, p *protocol.DidOpenTextDocumentParams) error {
	item := p.TextDocument
	u := uri.URI(strings.Clone(string(item.URI)))
	d := &document{uri: u, path: pathOf(u), version: item.Version, text: NewText(strings.Clone(item.Text)), typing: &typing{}}
	s.mu.Lock()
	defer s.mu.Unlock()
	before := s.docs[u]
	s.docs[u] = d
	if before != nil { // opened twice: the new text counts
		s.replace(before, d)
		return nil
	}
	s.doubt()
	s.settle()
	return nil
}

// DidChange applies changes to a text.
func (s *Server) DidChange(ctx context.Context, p *protocol.DidChangeTextDocumentParams) error {
	s.mu.Lock()
	defer s.mu.Unlock()
	d := s.docs[p.TextDocument.URI]
	if d == nil {
		s.log.warn("a change of %s, which is not open, was left out", p.TextDocument.URI)
		return nil
	}
	changes := p.ContentChanges
	if !wellFormed(paramsOf(ctx), changes) {
		changes = []protocol.TextDocumentContentChangeEvent{nil}
	}
	next, edits := d.changed(p.TextDocument.Version, changes, s.unit)
	if next.lost && !d.lost {
		s.log.warn("a change of %s could not be applied: what is said of it waits for its whole text", d.uri)
	}
	hold := time.Duration(s.settings.HoldMilliseconds) * time.Millisecond
	next.typing.edited(next.version, edits, next.text, s.clock.Now().Add(hold))
	s.docs[d.uri] = next
	s.replace(d, next)
	return nil
}

// wellFormed tells whether changes were written as the protocol has them. The
// library is lenient: a change whose range it cannot read is to it a change of
// the whole text, and what is left out is 0 or "". A key cannot be mistaken for
// text, as quotes in a text are written with a backslash.
func wellFormed(raw []byte, changes []protocol.TextDocumentContentChangeEvent) bool {
	if raw == nil {
		return true
	}
	parts := 0
	for _, c := range changes {
		if _, ok := c.(*protocol.TextDocumentContentChangePartial); ok {
			parts++
		}
	}
	for key, want := range map[string]int{"range": parts, "start": parts, "end": parts, "line": 2 * parts, "character": 2 * parts, "text": len(changes)} {
		if bytes.Count(raw, []byte(`"`+key+`"`)) != want {
			return false
		}
	}
	return true
}

// replace puts a new state of a document into the workspaces that read it.
func (s *Server) replace(before, now *document) {
	for _, w := range s.workspaces {
		for name, d := range w.open {
			if d != before {
				continue
			}
			w.open[name] = now
			project := w.parsed.Load()
			if w.owned[name] || project == nil || project.Files[name] != nil {
				w.touch()
			}
		}
	}
}

// desync marks a document whose change could not even be read.
func (s *Server) desync(u uri.URI) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if d := s.docs[u]; d != nil {
		next := *d
		next.lost = true
		s.docs[u] = &next
		s.replace(d, &next)
	}
}

// DidSave ends the holding back of errors.
func (s *Server) DidSave(_ context.Context, p *protocol.DidSaveTextDocumentParams) error {
	s.mu.Lock()
	defer s.mu.Unlock()
	d := s.docs[p.TextDocument.URI]
	if d == nil {
		return nil
	}
	d.typing.release()
	s.doubt()
	for _, w := range s.workspaces {
		if name, ok := w.nameOf(d); ok {
			w.disk.saved(name)
			w.touch()
		}
	}
	return nil
}

// doubt has the disk looked at again where nobody tells us of changes.
func (s *Server) doubt() {
	if s.client.Watches {
		return
	}
	for _, w := range s.workspaces {
		w.disk.suspect(true)
	}
}

// DidClose gives a text back to the disk.
func (s *Server) DidClose(_ context.Context, p *protocol.DidCloseTextDocumentParams) error {
	s.mu.Lock()
	defer s.mu.Unlock()
	d := s.docs[p.TextDocument.URI]
	if d == nil {
		return nil
	}
	delete(s.docs, d.uri)
	s.settle()
	return nil
}
