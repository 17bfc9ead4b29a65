package lsp

import (
	"context"
	"sort"
	"strings"

	"kern/checker/rule"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// ruleScheme is the scheme of the pages of rules, for clients that open
// documents whose text the server makes.
const ruleScheme = "kern-rule"

func rulePage(name string) uri.URI { return uri.URI(ruleScheme + ":" + name) }

// contents makes the text of documents by their scheme. Features that make
// others add theirs.
var contents = map[string]func(ctx context.Context, s *Server, u uri.URI) (string, error){
	ruleScheme: func(_ context.Context, _ *Server, u uri.URI) (string, error) {
		name := strings.TrimPrefix(string(u), ruleScheme+":")
		r := rule.Find(name)
		if r == nil {
			return "", jsonrpc2.Errorf(jsonrpc2.InvalidParams, "there is no rule '%s'", name)
		}
		return r.Page, nil
	},
}

var rulePagesFeature = feature{
	name:    "made documents",
	methods: []string{protocol.MethodWorkspaceTextDocumentContent},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Contents {
			workspaceOptions(c).TextDocumentContent = &protocol.TextDocumentContentOptions{Schemes: contentSchemes()}
		}
	},
}

// TextDocumentContent gives the text of a document that the server makes.
func (s *Server) TextDocumentContent(ctx context.Context, p *protocol.TextDocumentContentParams) (*protocol.TextDocumentContentResult, error) {
	f := contents[p.URI.Scheme()]
	if f == nil {
		return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "the server makes no document '%s'", p.URI)
	}
	text, err := f(ctx, s, p.URI)
	if err != nil {
		return nil, err
	}
	return &protocol.TextDocumentContentResult{Text: text}, nil
}

func contentSchemes() []string {
	var out []string
	for scheme := range contents {
		out = append(out, scheme)
	}
	sort.Strings(out)
	return out
}
