package lsp

import (
	"cmp"
	"context"
	"encoding/json"
	"slices"
	"strings"

	"kern/checker/model"
	"kern/lang"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

var workspaceSymbolsFeature = feature{
	name:    "workspace symbols",
	methods: []string{protocol.MethodWorkspaceSymbol, protocol.MethodWorkspaceSymbolResolve},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		switch {
		case client.LazySymbols:
			c.WorkspaceSymbolProvider = &protocol.WorkspaceSymbolOptions{ResolveProvider: pointer(true)}
		case client.WorkspaceSymbols:
			c.WorkspaceSymbolProvider = protocol.Boolean(true)
		}
	},
}

// maxSymbols is how many symbols answer a query: the best ones.
const maxSymbols = 500

// Symbols answers with the names of all files that fit a query. A member is
// found by the words of its title too.
func (s *Server) Symbols(ctx context.Context, p *protocol.WorkspaceSymbolParams) (protocol.WorkspaceSymbolResult, error) {
	query := strings.Clone(p.Query)
	snapshots := s.snapshots()
	release(ctx)
	var found []finding
	said := map[uri.URI]bool{}
	for _, snapshot := range snapshots {
		if err := snapshot.wait(ctx, snapshot.loaded); err != nil {
			return nil, err
		}
		for _, name := range snapshot.shownFiles() {
			if u := snapshot.URI(name); !said[u] && s.speaks(snapshot.workspace, u) {
				said[u] = true
				found = append(found, snapshot.findings(name, query)...)
			}
		}
	}
	slices.SortStableFunc(found, func(a, b finding) int {
		return cmp.Or(b.score-a.score, strings.Compare(a.name, b.name), strings.Compare(a.file, b.file))
	})
	found = found[:min(len(found), maxSymbols)]
	can := symbolKinds(s.client.Capabilities.Workspace.Symbol.SymbolKind)
	out := protocol.WorkspaceSymbolSlice{}
	for _, x := range found {
		symbol := protocol.WorkspaceSymbol{BaseSymbolInformation: protocol.BaseSymbolInformation{Name: x.name, Kind: kindOf(x.kind, can)}}
		if x.title != "" {
			symbol.ContainerName = pointer(x.title)
		}
		if s.client.LazySymbols {
			symbol.Location = &protocol.LocationUriOnly{URI: x.URI(x.file)}
			symbol.Data = object(protocol.Integer(x.claim))
		} else {
			symbol.Location = pointer(x.Location(x.file, x.span))
		}
		out = append(out, symbol)
	}
	return out, nil
}

// WorkspaceSymbolResolve finds where a symbol stands by now.
func (s *Server) WorkspaceSymbolResolve(ctx context.Context, p *protocol.WorkspaceSymbol) (*protocol.WorkspaceSymbol, error) {
	out, err := protocol.Clone(*p)
	if err != nil {
		return nil, err
	}
	lazy, ok := out.Location.(*protocol.LocationUriOnly)
	var claim int32
	if !ok || json.Unmarshal(out.Data, &claim) != nil {
		return &out, nil
	}
	f, err := s.Parsed(ctx, lazy.URI)
	if err != nil {
		return nil, err
	}
	at := protocol.Location{URI: lazy.URI}
	if f != nil {
		for _, x := range f.findings(f.Name, "") {
			if x.name == out.Name && x.claim == claim {
				at = f.Location(f.Name, x.span)
			}
		}
	}
	out.Location = &at
	return &out, nil
}

// finding is a name that a file gives.
type finding struct {
	*Snapshot
	file, name, title string
	kind              model.NameKind
	span              lang.Span
	claim             int32 // the how manieth of that name in the file, from 0
	score             int
}

// findings lists the names that a file gives and that answer a query.
func (s *Snapshot) findings(file, query string) []finding {
	var out []finding
	claims := map[string]int32{}
	f := s.project.Files[file]
	for i, d := range f.Decls {
		for _, stmt := range d.Stmts {
			for _, span := range givenNames(stmt) {
				name := span.Of(d.Text)
				x := finding{Snapshot: s, file: file, name: name, kind: declaredKind(stmt), span: moved(span, f.Starts[i]), claim: claims[name]}
				claims[name]++
				if x.kind == model.MemberName {
					x.title = titleOf(stmt)
				}
				x.score = fuzzy(query, name)
				if x.score == 0 && x.title != "" && fuzzy(query, x.title) > 0 {
					x.score = 1 // behind all that are found by name
				}
				if x.score > 0 {
					out = append(out, x)
				}
			}
		}
	}
	return out
}

// titleOf is the title of a member's statement, "" for none.
func titleOf(s *lang.Stmt) string {
	for _, e := range s.Args {
		if e.Kind == lang.StringExpr {
			return e.Text
		}
	}
	return ""
}
