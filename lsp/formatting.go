package lsp

import (
	"context"
	"strings"

	"kern/lang"
	"kern/lsp/layout"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// The language has one layout, so the widths of the editor's options are not
// asked for.

var formattingFeature = feature{
	name: "formatting",
	methods: []string{protocol.MethodTextDocumentFormatting, protocol.MethodTextDocumentRangeFormatting, protocol.MethodTextDocumentRangesFormatting,
		protocol.MethodTextDocumentOnTypeFormatting},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Formatting {
			c.DocumentFormattingProvider = protocol.Boolean(true)
		}
		if client.RangeFormatting {
			c.DocumentRangeFormattingProvider = protocol.Boolean(true)
		}
		if client.RangesFormatting {
			c.DocumentRangeFormattingProvider = &protocol.DocumentRangeFormattingOptions{RangesSupport: pointer(true)}
		}
		if client.TypeFormatting {
			c.DocumentOnTypeFormattingProvider = protocol.DocumentOnTypeFormattingOptions{FirstTriggerCharacter: "}", MoreTriggerCharacter: []string{";", "\n"}}
		}
	},
}

// Formatting answers with what lays a document out.
func (s *Server) Formatting(ctx context.Context, p *protocol.DocumentFormattingParams) ([]protocol.TextEdit, error) {
	return s.laid(ctx, p.TextDocument.URI, func(f *File) []lang.Change { return layout.File(f.Tree) })
}

// RangeFormatting answers with what lays the statements of a range out.
func (s *Server) RangeFormatting(ctx context.Context, p *protocol.DocumentRangeFormattingParams) ([]protocol.TextEdit, error) {
	r := p.Range
	return s.laid(ctx, p.TextDocument.URI, func(f *File) []lang.Change { return layout.Ranges(f.Tree, f.Span(r)) })
}

// RangesFormatting is RangeFormatting for several ranges.
func (s *Server) RangesFormatting(ctx context.Context, p *protocol.DocumentRangesFormattingParams) ([]protocol.TextEdit, error) {
	ranges := append([]protocol.Range(nil), p.Ranges...)
	return s.laid(ctx, p.TextDocument.URI, func(f *File) []lang.Change {
		spans := make([]lang.Span, len(ranges))
		for i, r := range ranges {
			spans[i] = f.Span(r)
		}
		return layout.Ranges(f.Tree, spans...)
	})
}

// OnTypeFormatting answers with the indent of the line on which a brace, a
// semicolon or a line end was typed.
func (s *Server) OnTypeFormatting(ctx context.Context, p *protocol.DocumentOnTypeFormattingParams) ([]protocol.TextEdit, error) {
	at, typed := p.Position, strings.Clone(p.Ch)
	return s.laid(ctx, p.TextDocument.URI, func(f *File) []lang.Change { return layout.Typed(f.Tree, f.Offset(at), typed) })
}

func (s *Server) laid(ctx context.Context, u uri.URI, changes func(*File) []lang.Change) ([]protocol.TextEdit, error) {
	f, err := s.Parsed(ctx, u)
	if f == nil || err != nil {
		return nil, err
	}
	out := []protocol.TextEdit{}
	for _, c := range changes(f) {
		out = append(out, protocol.TextEdit{Range: f.RangeOf(c.Span), NewText: c.New})
	}
	return out, nil
}
