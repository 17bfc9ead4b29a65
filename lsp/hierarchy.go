package lsp

import (
	"context"
	"encoding/json"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/lang"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// The protocol's calls are read as dependence: who uses a thing calls it. The
// members made of a material are its callers; the section, the steel and the
// load cases of a member are what it calls.
var hierarchyFeature = feature{
	name:    "call hierarchy",
	methods: []string{protocol.MethodTextDocumentPrepareCallHierarchy, protocol.MethodCallHierarchyIncomingCalls, protocol.MethodCallHierarchyOutgoingCalls},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Hierarchy {
			c.CallHierarchyProvider = protocol.Boolean(true)
		}
	},
}

// PrepareCallHierarchy answers with what is named under the cursor or, where no
// name stands, with what is declared around it.
func (s *Server) PrepareCallHierarchy(ctx context.Context, p *protocol.CallHierarchyPrepareParams) ([]protocol.CallHierarchyItem, error) {
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	offset := f.Offset(p.Position)
	var out []protocol.CallHierarchyItem
	for _, m := range mentionsAt(f, offset) {
		out = append(out, f.node(m.Calculation, []*model.Named{m.Named}).item())
	}
	if out != nil {
		return out, nil
	}
	at, ok := f.Tree.At(offset)
	if !ok || len(at.Stmts) == 0 {
		return nil, nil
	}
	for _, c := range f.report.Calculations(f.Name) {
		if names := declaredIn(c, at.Decl, at.Stmts[0]); len(names) > 0 {
			return []protocol.CallHierarchyItem{f.node(c, names).item()}, nil
		}
	}
	return nil, nil
}

// IncomingCalls answers with what uses a thing.
func (s *Server) IncomingCalls(ctx context.Context, p *protocol.CallHierarchyIncomingCallsParams) ([]protocol.CallHierarchyIncomingCall, error) {
	snapshots := s.snapshots() // of the same moment as the file
	f, _, names, err := s.itemOf(ctx, p.Item)
	if f == nil || err != nil {
		return nil, err
	}
	spots, err := allSpots(ctx, f, names, snapshots)
	if err != nil {
		return nil, err
	}
	out := []protocol.CallHierarchyIncomingCall{}
	index := map[uri.URI]map[int32]int{} // of the users, by the place of their statement
	for _, spot := range spots {
		if spot.declares {
			continue
		}
		d := spot.mention.Place.Decl
		stmt := stmtAround(d, spot.mention.Place.Span)
		if stmt == nil {
			continue
		}
		u := spot.URI(spot.file)
		_, whole := spot.report.Where(lang.Place{Decl: d, Span: stmt.Span})
		if index[u] == nil {
			index[u] = map[int32]int{}
		}
		i, ok := index[u][whole.Start]
		if !ok {
			i = len(out)
			index[u][whole.Start] = i
			out = append(out, protocol.CallHierarchyIncomingCall{From: spot.user(spot.mention.Calculation, d, stmt).item(), FromRanges: []protocol.Range{}})
		}
		out[i].FromRanges = append(out[i].FromRanges, spot.Range(spot.file, spot.span))
	}
	return out, nil
}

// OutgoingCalls answers with what a thing uses.
func (s *Server) OutgoingCalls(ctx context.Context, p *protocol.CallHierarchyOutgoingCallsParams) ([]protocol.CallHierarchyOutgoingCall, error) {
	f, c, names, err := s.itemOf(ctx, p.Item)
	if f == nil || err != nil {
		return nil, err
	}
	out := []protocol.CallHierarchyOutgoingCall{}
	index := map[lang.Place]int{}
	for _, n := range names {
		checker.Mentions(c, n.Place.Decl, func(m checker.Mention) {
			if !n.Stmt.Span.Contains(m.Place.Span.Start) || claims(m.Place.Decl, m.Place.Span) {
				return
			}
			_, span := f.report.Where(m.Place)
			r := f.RangeOf(span)
			i, ok := index[m.Named.Place]
			if !ok {
				i = len(out)
				index[m.Named.Place] = i
				out = append(out, protocol.CallHierarchyOutgoingCall{To: f.node(c, []*model.Named{m.Named}).item()})
			}
			if !slices.Contains(out[i].FromRanges, r) {
				out[i].FromRanges = append(out[i].FromRanges, r)
			}
		})
	}
	return out, nil
}

// node is a declaration as the hierarchy shows it.
type node struct {
	*Snapshot
	kind         protocol.SymbolKind
	file         string
	whole, at    lang.Span
	names        []string // it may give several members
	word, detail string   // word is for what has no name
}

// node describes names that one statement gives.
func (s *Snapshot) node(c *model.Calculation, names []*model.Named) node {
	n := names[0]
	x := node{Snapshot: s, kind: kindOf(n.Kind, anyKind), detail: s.detail(c, n)}
	x.file, x.at = s.report.Where(n.Place)
	_, x.whole = s.report.Where(lang.Place{Decl: n.Place.Decl, Span: n.Stmt.Span})
	for _, n := range names {
		x.names = append(x.names, n.Name)
	}
	return x
}

// user describes the statement that uses something.
func (s *Snapshot) user(c *model.Calculation, d *lang.Decl, stmt *lang.Stmt) node {
	if names := declaredIn(c, d, stmt); len(names) > 0 {
		return s.node(c, names)
	}
	x := node{Snapshot: s, kind: protocol.SymbolKindPackage, word: stmt.Word} // the basis, or what has lost its name
	x.file, x.at = s.report.Where(lang.Place{Decl: d, Span: stmt.Head})
	_, x.whole = s.report.Where(lang.Place{Decl: d, Span: stmt.Span})
	return x
}

// anyKind is for requests whose clients say nothing about kinds of symbol.
func anyKind(k protocol.SymbolKind) bool { return k <= protocol.SymbolKindTypeParameter }

// item writes a node. The names go with it: whoever asks on finds it by them,
// wherever it stands by then.
func (x node) item() protocol.CallHierarchyItem {
	out := protocol.CallHierarchyItem{Name: strings.Join(x.names, ", "), Kind: x.kind, URI: x.URI(x.file), Range: x.Range(x.file, x.whole), SelectionRange: x.Range(x.file, x.at)}
	if out.Name == "" {
		out.Name = x.word
	}
	if x.detail != "" {
		out.Detail = pointer(x.detail)
	}
	out.Data = object(x.names)
	return out
}

// declaredIn are the names that a statement gives in a calculation.
func declaredIn(c *model.Calculation, d *lang.Decl, s *lang.Stmt) []*model.Named {
	var out []*model.Named
	for _, span := range givenNames(s) {
		if n := c.Env.Names[span.Of(d.Text)]; n != nil && n.Place == (lang.Place{Decl: d, Span: span}) {
			out = append(out, n)
		}
	}
	return out
}

// stmtAround is the declaration's own statement around a span.
func stmtAround(d *lang.Decl, span lang.Span) *lang.Stmt {
	for _, s := range d.Stmts {
		if s.Span.Start <= span.Start && span.End <= s.Span.End {
			return s
		}
	}
	return nil
}

// itemOf finds what an item stands for in the present text.
func (s *Server) itemOf(ctx context.Context, item protocol.CallHierarchyItem) (*File, *model.Calculation, []*model.Named, error) {
	var names []string
	if json.Unmarshal(item.Data, &names) != nil {
		names = nil
	}
	f, err := s.File(ctx, item.URI)
	if f == nil || err != nil {
		return nil, nil, nil, err
	}
	for _, c := range f.report.Calculations(f.Name) {
		var out []*model.Named
		for _, name := range names {
			if n := c.Env.Names[name]; n != nil {
				if file, _ := f.report.Where(n.Place); file == f.Name {
					out = append(out, n)
				}
			}
		}
		if len(out) > 0 {
			return f, c, out, nil
		}
	}
	return nil, nil, nil, nil
}
