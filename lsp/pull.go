package lsp

import (
	"context"
	"crypto/sha256"
	"encoding/hex"
	"slices"
	"strings"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// Diagnostic answers a client that asks for the diagnostics of a document.
func (s *Server) Diagnostic(ctx context.Context, p *protocol.DocumentDiagnosticParams) (protocol.DocumentDiagnosticReport, error) {
	f, err := s.File(ctx, p.TextDocument.URI)
	if err != nil {
		return nil, err
	}
	if f == nil {
		return &protocol.RelatedFullDocumentDiagnosticReport{FullDocumentDiagnosticReport: protocol.FullDocumentDiagnosticReport{Kind: "full", Items: []protocol.Diagnostic{}}}, nil
	}
	items, id, err := f.pulled(f.Name)
	if err != nil {
		return nil, err
	}
	if p.PreviousResultID != nil && *p.PreviousResultID == id {
		return &protocol.RelatedUnchangedDocumentDiagnosticReport{UnchangedDocumentDiagnosticReport: protocol.UnchangedDocumentDiagnosticReport{Kind: "unchanged", ResultID: id}}, nil
	}
	return &protocol.RelatedFullDocumentDiagnosticReport{FullDocumentDiagnosticReport: protocol.FullDocumentDiagnosticReport{Kind: "full", ResultID: &id, Items: items}}, nil
}

// DiagnosticWorkspace answers a client that asks for the diagnostics of all
// files.
func (s *Server) DiagnosticWorkspace(ctx context.Context, p *protocol.WorkspaceDiagnosticParams) (*protocol.WorkspaceDiagnosticReport, error) {
	previous := map[uri.URI]string{}
	for _, r := range p.PreviousResultIds {
		previous[r.URI] = r.Value
	}
	snapshots := s.snapshots()
	release(ctx)
	out := &protocol.WorkspaceDiagnosticReport{Items: []protocol.WorkspaceDocumentDiagnosticReport{}}
	said := map[uri.URI]bool{}
	for _, snapshot := range snapshots {
		if err := snapshot.wait(ctx, snapshot.checked); err != nil {
			return nil, err
		}
		for _, name := range snapshot.shownFiles() {
			u := snapshot.URI(name)
			if said[u] || !s.speaks(snapshot.workspace, u) {
				continue
			}
			said[u] = true
			items, id, err := snapshot.pulled(name)
			if err != nil {
				return nil, err
			}
			if previous[u] == id {
				out.Items = append(out.Items, &protocol.WorkspaceUnchangedDocumentDiagnosticReport{URI: u, Version: snapshot.Version(name),
					UnchangedDocumentDiagnosticReport: protocol.UnchangedDocumentDiagnosticReport{Kind: "unchanged", ResultID: id}})
				continue
			}
			out.Items = append(out.Items, &protocol.WorkspaceFullDocumentDiagnosticReport{URI: u, Version: snapshot.Version(name),
				FullDocumentDiagnosticReport: protocol.FullDocumentDiagnosticReport{Kind: "full", ResultID: &id, Items: items}})
		}
	}
	// a file that is gone has nothing any more
	for _, r := range p.PreviousResultIds {
		if !said[r.URI] {
			said[r.URI] = true
			id := emptyID
			out.Items = append(out.Items, &protocol.WorkspaceFullDocumentDiagnosticReport{URI: r.URI,
				FullDocumentDiagnosticReport: protocol.FullDocumentDiagnosticReport{Kind: "full", ResultID: &id, Items: []protocol.Diagnostic{}}})
		}
	}
	return out, nil
}

// snapshots are the present states of all workspaces, folders first.
func (s *Server) snapshots() []*Snapshot {
	s.mu.Lock()
	defer s.mu.Unlock()
	var out []*Snapshot
	for _, w := range s.workspaces {
		if w.current != nil {
			out = append(out, w.current)
		}
	}
	slices.SortFunc(out, func(a, b *Snapshot) int {
		if a.workspace.kind != b.workspace.kind {
			return int(a.workspace.kind) - int(b.workspace.kind)
		}
		return strings.Compare(a.workspace.base, b.workspace.base)
	})
	return out
}

// speaks tells whether a workspace is the one to speak of a file.
func (s *Server) speaks(w *workspace, u uri.URI) bool {
	s.mu.Lock()
	defer s.mu.Unlock()
	if d := s.docs[u]; d != nil {
		return s.homeOf(d) == w
	}
	home := s.home(pathOf(u))
	return home == nil || home == w
}

// shownFiles are the files that the workspace shows, by name.
func (s *Snapshot) shownFiles() []string {
	var out []string
	for name := range s.project.Files {
		if s.workspace.kind == wholeFolder || s.open[name] != nil {
			out = append(out, name)
		}
	}
	slices.Sort(out)
	return out
}

// emptyID is the result of a file without diagnostics.
var emptyID = digest(noItems)

// digest names a set of diagnostics by what is in it: the same set has the same
// name, whichever snapshot it comes from.
func digest(items []byte) string {
	sum := sha256.Sum256(items)
	return hex.EncodeToString(sum[:12])
}

// pulled gives the diagnostics of a file and the name of the set.
func (s *Snapshot) pulled(name string) ([]protocol.Diagnostic, string, error) {
	now, due := s.diagnosticsNow(name)
	if !due.IsZero() {
		server := s.workspace.server
		server.clock.AfterFunc(due.Sub(server.clock.Now()), server.refreshDiagnostics)
	}
	p := s.printer()
	list := make([]protocol.Diagnostic, len(now))
	for i, x := range now {
		list[i] = p.diagnostic(x)
	}
	raw, err := protocol.Marshal(list)
	if err != nil {
		return nil, "", jsonrpc2.Errorf(jsonrpc2.InternalError, "the diagnostics cannot be written: %v", err)
	}
	return list, digest(raw), nil
}
