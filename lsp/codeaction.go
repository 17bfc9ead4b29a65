package lsp

import (
	"context"
	"encoding/json"
	"slices"
	"strings"

	"kern/lang"
	"kern/lsp/offer"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

var codeActionFeature = feature{
	name:    "code actions",
	methods: []string{protocol.MethodTextDocumentCodeAction, protocol.MethodCodeActionResolve},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if !client.Actions {
			return
		}
		o := &protocol.CodeActionOptions{ResolveProvider: pointer(client.LazyActions), CodeActionKinds: []protocol.CodeActionKind{protocol.CodeActionKindSourceFixAll}}
		for _, k := range offer.Kinds() {
			o.CodeActionKinds = append(o.CodeActionKinds, protocol.CodeActionKind(k))
		}
		c.CodeActionProvider = o
	},
}

// actionData finds an offer again when its edit is wanted.
type actionData struct {
	URI        uri.URI  `json:"uri"`
	Version    *int32   `json:"version"` // of the document, nil when it was not open
	Span       [2]int32 `json:"span"`
	Kind       string   `json:"kind"`
	Title      string   `json:"title"`
	Diagnostic string   `json:"diagnostic,omitempty"`
}

// CodeAction answers with what can be done at a range.
func (s *Server) CodeAction(ctx context.Context, p *protocol.CodeActionParams) ([]protocol.CommandOrCodeAction, error) {
	// they share the memory of the message, which does not outlast the waiting
	u := uri.URI(strings.Clone(string(p.TextDocument.URI)))
	only := make([]string, len(p.Context.Only))
	for i, k := range p.Context.Only {
		only[i] = strings.Clone(string(k))
	}
	r, automatic := p.Range, p.Context.TriggerKind == protocol.CodeActionTriggerKindAutomatic && len(only) == 0
	f, err := s.File(ctx, u)
	if f == nil || err != nil {
		return nil, err
	}
	out := []protocol.CommandOrCodeAction{}
	span := f.Span(r)
	offers := offer.At(offer.Request{Report: f.report, File: f.Name, Span: span, Mends: f.mends, Want: func(k offer.Kind) bool {
		if automatic && span.Len() == 0 {
			return k == offer.QuickFix // while somebody moves about, only what is wrong is worth a sign
		}
		return wanted(only, string(k))
	}})
	for _, o := range offers {
		a, err := f.action(u, span, o)
		if err != nil {
			return nil, err
		}
		if a == nil {
			continue
		}
		if o.Kind == offer.FixAll && slices.Contains(only, string(protocol.CodeActionKindSourceFixAll)) && !slices.Contains(only, string(offer.FixAll)) {
			a.Kind = pointer(protocol.CodeActionKindSourceFixAll) // some clients compare what they asked for
		}
		out = append(out, a)
	}
	return out, nil
}

// wanted tells whether a kind is one of those asked for, or below one: "refactor"
// has "refactor.extract" below it. Nothing asked for is everything.
func wanted(only []string, kind string) bool {
	if len(only) == 0 {
		return true
	}
	for _, k := range only {
		if k == "" || k == kind || strings.HasPrefix(kind, k+".") {
			return true
		}
	}
	return false
}

// action writes an offer as the client takes it: with its edit, or with what it
// takes to find the offer again.
func (f *File) action(u uri.URI, span lang.Span, o offer.Offer) (*protocol.CodeAction, error) {
	client := f.workspace.server.client
	a := &protocol.CodeAction{Title: o.Title, Kind: pointer(protocol.CodeActionKind(o.Kind))}
	if o.Preferred && client.PreferredActions {
		a.IsPreferred = pointer(true)
	}
	if o.Mends != nil {
		a.Diagnostics = []protocol.Diagnostic{f.printer().diagnostic(*o.Mends)}
	}
	if client.LazyActions {
		a.Data = f.actionData(u, span, o)
		return a, nil
	}
	var err error
	a.Edit, err = f.offered(o)
	if a.Edit == nil {
		return nil, err
	}
	return a, err
}

func (f *File) actionData(u uri.URI, span lang.Span, o offer.Offer) protocol.LSPAny {
	d := actionData{URI: u, Version: f.Version(f.Name), Span: [2]int32{span.Start, span.End}, Kind: string(o.Kind), Title: o.Title}
	if o.Mends != nil {
		d.Diagnostic = diagnosticKey(*o.Mends)
	}
	raw, err := json.Marshal(d)
	if err != nil {
		panic("lsp: " + err.Error()) // plain data can always be written
	}
	return protocol.LSPAny(raw)
}

// offered is the edit of an offer, nil when nothing would change.
func (f *File) offered(o offer.Offer) (*protocol.WorkspaceEdit, error) {
	var e editing
	for _, c := range o.Edits() {
		e.add(f.Snapshot, c.File, c.Span, c.New)
	}
	return e.workspaceEdit(f.workspace.server.client)
}

// CodeActionResolve answers with the edit of an action that was offered. The
// offer is made again from what the file says now; if it is no longer made, or
// the file has another version, what the client shows is out of date.
func (s *Server) CodeActionResolve(ctx context.Context, p *protocol.CodeAction) (*protocol.CodeAction, error) {
	var d actionData
	if err := json.Unmarshal(p.Data, &d); err != nil || d.URI == "" {
		return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "the action is none that was offered")
	}
	out, err := protocol.Clone(*p)
	if err != nil {
		return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "the action cannot be read: %v", err)
	}
	f, err := s.File(ctx, d.URI)
	if err != nil {
		return nil, err
	}
	if f == nil {
		return nil, protocol.ErrContentModified
	}
	if now := f.Version(f.Name); (now == nil) != (d.Version == nil) || now != nil && *now != *d.Version {
		return nil, protocol.ErrContentModified
	}
	for _, o := range offer.At(offer.Request{Report: f.report, File: f.Name, Mends: f.mends, Span: lang.Span{Start: d.Span[0], End: d.Span[1]}, Want: func(k offer.Kind) bool { return string(k) == d.Kind }}) {
		if o.Title != d.Title || (o.Mends != nil) != (d.Diagnostic != "") || o.Mends != nil && diagnosticKey(*o.Mends) != d.Diagnostic {
			continue
		}
		if out.Edit, err = f.offered(o); err != nil {
			return nil, err
		}
		if out.Edit == nil {
			out.Edit = &protocol.WorkspaceEdit{}
		}
		return &out, nil
	}
	return nil, protocol.ErrContentModified
}
