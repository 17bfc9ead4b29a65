package lsp

import (
	"context"
	"slices"

	"kern/checker"
	"kern/lang"

	"go.lsp.dev/protocol"
)

var highlightFeature = feature{
	name:    "document highlight",
	methods: []string{protocol.MethodTextDocumentDocumentHighlight},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Highlight {
			c.DocumentHighlightProvider = protocol.Boolean(true)
		}
	},
}

// DocumentHighlight answers with the places of a file where the name under the
// cursor stands: written where it is given, read elsewhere.
func (s *Server) DocumentHighlight(ctx context.Context, p *protocol.DocumentHighlightParams) ([]protocol.DocumentHighlight, error) {
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	var out []protocol.DocumentHighlight
	for _, h := range highlights(f, f.Offset(p.Position)) {
		kind := protocol.DocumentHighlightKindRead
		if h.write {
			kind = protocol.DocumentHighlightKindWrite
		}
		out = append(out, protocol.DocumentHighlight{Range: f.RangeOf(h.span), Kind: kind})
	}
	return out, nil
}

// highlight is a place of a name in a file.
type highlight struct {
	span  lang.Span
	write bool
}

// highlights gives the places in the file of the name at an offset, in order.
func highlights(f *File, offset int32) []highlight {
	found := mentionsAt(f, offset)
	if len(found) == 0 {
		return ownHeights(f, offset)
	}
	var out []highlight
	seen := map[lang.Span]bool{}
	for _, want := range found {
		for _, c := range f.report.Calculations(f.Name) {
			if n := c.Env.Names[want.Named.Name]; n == nil || n.Place != want.Named.Place {
				continue
			}
			for i, d := range f.Tree.Decls {
				start := f.Tree.Starts[i]
				checker.Mentions(c, d, func(m checker.Mention) {
					if m.Named.Place != want.Named.Place || seen[moved(m.Place.Span, start)] {
						return
					}
					span := moved(m.Place.Span, start)
					seen[span] = true
					out = append(out, highlight{span, m.Declares || claims(d, m.Place.Span)})
				})
			}
			break // the others say the same of this file
		}
	}
	slices.SortFunc(out, func(a, b highlight) int { return int(a.span.Start - b.span.Start) })
	return out
}

// ownHeights gives the places where a member speaks of its own height.
func ownHeights(f *File, offset int32) []highlight {
	if _, _, ok := ownHeight(f, offset); !ok {
		return nil
	}
	at, _ := f.Tree.At(offset)
	var out []highlight
	for _, s := range at.Stmts[0].Body.Stmts {
		switch s.Word {
		case "height", "length", "from":
			out = append(out, highlight{moved(s.Head, at.Start), true})
		}
		for _, a := range s.Args {
			a.Walk(func(e *lang.Expr) {
				if e.Is("height") || e.Is("length") {
					out = append(out, highlight{moved(e.Span, at.Start), false})
				}
			})
		}
	}
	return out
}
