package lsp

import (
	"context"
	"slices"
	"strings"

	"kern/lang"

	"go.lsp.dev/protocol"
)

var selectionFeature = feature{
	name:    "selection ranges",
	methods: []string{protocol.MethodTextDocumentSelectionRange},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.SelectionRanges {
			c.SelectionRangeProvider = protocol.Boolean(true)
		}
	},
}

// SelectionRange answers with what a selection grows to, step by step, from each
// of several places.
func (s *Server) SelectionRange(ctx context.Context, p *protocol.SelectionRangeParams) ([]protocol.SelectionRange, error) {
	f, err := s.Parsed(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	out := []protocol.SelectionRange{}
	for _, at := range p.Positions {
		spans := selections(f, f.Offset(at))
		var outer *protocol.SelectionRange
		for i := len(spans) - 1; i >= 0; i-- {
			outer = &protocol.SelectionRange{Range: f.RangeOf(spans[i]), Parent: outer}
		}
		out = append(out, *outer)
	}
	return out, nil
}

// selections gives the spans around an offset from the smallest to the whole
// file: a unit, its number with it, the calculation, the parts of the statement,
// the statement, the insides of the block around it, the block's statement.
func selections(f *File, offset int32) []lang.Span {
	offset = min(max(offset, 0), f.Text.Len())
	whole := lang.Span{Start: 0, End: f.Text.Len()}
	spans := []lang.Span{whole} // from the outside
	add := func(s lang.Span) {
		last := spans[len(spans)-1]
		if s.Contains(offset) && s != last && s.Start >= last.Start && s.End <= last.End {
			spans = append(spans, s)
		}
	}
	at, ok := f.Tree.At(offset)
	if !ok {
		return spans
	}
	here := func(s lang.Span) { add(moved(s, at.Start)) }
	for i, s := range at.Stmts {
		here(s.Span)
		if s.Body == nil || i == len(at.Stmts)-1 && !at.Inside {
			continue
		}
		here(s.Body.Span)
		inside := lang.Span{Start: s.Body.Span.Start + 1, End: s.Body.Span.End}
		if strings.HasSuffix(s.Body.Span.Of(at.Decl.Text), "}") && inside.End > inside.Start {
			inside.End--
		}
		here(trimmed(inside, at.Decl.Text))
	}
	if comment, ok := commentAt(f, offset); ok {
		for _, run := range commentRuns(f.Text) {
			line := f.Text.Line(run.Start)
			run.Start, _ = f.Text.LineSpan(line)
			add(run)
		}
		add(comment)
		words := lang.Span{Start: comment.Start + 1, End: comment.End}
		add(trimmed(words, f.Tree.Text))
		slices.Reverse(spans)
		return spans
	}
	if s := at.Stmt(); s != nil && !at.Inside {
		here(s.Line)
		if len(s.Args) > 0 && at.Offset >= s.Args[0].Span.Start {
			parts := s.Args
			if value, ok := s.Assigned(); ok && len(value) > 0 {
				parts = value
			}
			here(parts[0].Span.Join(parts[len(parts)-1].Span))
		}
		here(s.Head)
		for _, e := range at.Exprs {
			here(e.Span)
		}
		if e := at.Expr(); e != nil {
			switch e.Kind {
			case lang.QuantExpr:
				if unit := e.UnitSpan(); unit.Start < at.Offset {
					here(unit)
				} else {
					here(trimmed(lang.Span{Start: e.Span.Start, End: unit.Start}, at.Decl.Text))
				}
			case lang.StringExpr:
				here(lang.Span{Start: e.Span.Start + 1, End: e.Span.End - 1})
			case lang.CallExpr:
				here(lang.Span{Start: e.Span.Start, End: e.Span.Start + int32(len(e.Text))})
			}
		}
	}
	slices.Reverse(spans)
	return spans
}

// trimmed is a span of a text without the blanks and line ends at its ends.
func trimmed(s lang.Span, text string) lang.Span {
	part := s.Of(text)
	left := len(part) - len(strings.TrimLeft(part, " \t\r\n"))
	right := len(part) - len(strings.TrimRight(part, " \t\r\n"))
	if left == len(part) {
		return lang.Span{Start: s.Start, End: s.Start}
	}
	return lang.Span{Start: s.Start + int32(left), End: s.End - int32(right)}
}

// commentAt gives the comment that an offset lies in or behind.
func commentAt(f *File, offset int32) (lang.Span, bool) {
	start, end := f.Text.LineSpan(f.Text.Line(offset))
	for _, t := range lang.Tokens(f.Tree.Text[start:end]) {
		if span := moved(t.Span(), start); t.Kind == lang.Comment && span.Start < offset && offset <= span.End {
			return span, true
		}
	}
	return lang.Span{}, false
}
