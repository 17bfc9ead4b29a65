package lsp

import (
	"cmp"
	"context"
	"slices"
	"strings"

	"kern/lang"

	"go.lsp.dev/protocol"
)

var foldingFeature = feature{
	name:    "folding",
	methods: []string{protocol.MethodTextDocumentFoldingRange},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Folding {
			c.FoldingRangeProvider = protocol.Boolean(true)
		}
	},
}

// FoldingRanges answers with what can be folded: blocks, comments of several
// lines, includes.
func (s *Server) FoldingRanges(ctx context.Context, p *protocol.FoldingRangeParams) ([]protocol.FoldingRange, error) {
	f, err := s.Parsed(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	can := s.client.Capabilities.TextDocument.FoldingRange
	list := folds(f)
	if can.RangeLimit != nil && len(list) > int(*can.RangeLimit) {
		list = fewer(list, int(*can.RangeLimit))
	}
	out := []protocol.FoldingRange{}
	for _, x := range list {
		start, end := f.Position(x.span.Start), f.Position(x.span.End)
		r := protocol.FoldingRange{StartLine: start.Line, EndLine: end.Line}
		if !s.client.FoldLines {
			r.StartCharacter, r.EndCharacter = pointer(start.Character), pointer(end.Character)
		} else if x.closed {
			r.EndLine-- // the line of the closing brace stays in sight
		}
		if r.EndLine <= r.StartLine {
			continue
		}
		if can.FoldingRangeKind == nil || slices.Contains(can.FoldingRangeKind.ValueSet, x.kind) {
			r.Kind = x.kind
		}
		out = append(out, r)
	}
	return out, nil
}

// fold is a part of a file that can be folded away.
type fold struct {
	span   lang.Span // what goes out of sight, lines in between whole
	kind   protocol.FoldingRangeKind
	closed bool // a brace stands behind it
	depth  int
}

// folds lists what can be folded, in order.
func folds(f *File) []fold {
	var out []fold
	add := func(x fold) {
		if f.Text.Line(x.span.End) > f.Text.Line(x.span.Start) {
			out = append(out, x)
		}
	}
	var blocks func(d *lang.Decl, start int32, list []*lang.Stmt, depth int)
	blocks = func(d *lang.Decl, start int32, list []*lang.Stmt, depth int) {
		for _, s := range list {
			if s.Body == nil {
				continue
			}
			x := fold{span: lang.Span{Start: s.Body.Span.Start + 1, End: s.Body.Span.End}, kind: protocol.FoldingRangeKindRegion, depth: depth}
			if x.span.End > x.span.Start && strings.HasSuffix(s.Body.Span.Of(d.Text), "}") {
				x.span.End, x.closed = x.span.End-1, true
			}
			x.span = moved(x.span, start)
			add(x)
			blocks(d, start, s.Body.Stmts, depth+1)
		}
	}
	var includes lang.Span // a run of include statements
	for i, d := range f.Tree.Decls {
		start := f.Tree.Starts[i]
		for _, s := range d.Stmts {
			line := moved(s.Line, start)
			if _, assigned := s.Assigned(); s.Word != "include" || assigned {
				add(fold{span: includes, kind: protocol.FoldingRangeKindImports})
				includes = lang.Span{}
			} else if includes == (lang.Span{}) {
				includes = lang.Span{Start: line.End, End: line.End}
			} else {
				includes.End = line.End
			}
		}
		blocks(d, start, d.Stmts, 0)
	}
	add(fold{span: includes, kind: protocol.FoldingRangeKindImports})
	for _, run := range commentRuns(f.Text) {
		add(fold{span: run, kind: protocol.FoldingRangeKindComment})
	}
	slices.SortStableFunc(out, func(a, b fold) int {
		return cmp.Or(cmp.Compare(a.span.Start, b.span.Start), cmp.Compare(b.span.End, a.span.End))
	})
	return out
}

// commentRuns gives the runs of two and more lines that hold a comment and
// nothing else: from the end of the first line to the end of the last. No text
// goes on over a line's end, so the lines can be looked at one by one.
func commentRuns(t *Text) []lang.Span {
	var out []lang.Span
	first := -1 // the line that the present run begins with
	for line := 0; line <= t.Lines(); line++ {
		comment := false
		if line < t.Lines() {
			start, end := t.LineSpan(line)
			if line == 0 && strings.HasPrefix(t.s, "\ufeff") {
				start += int32(len("\ufeff"))
			}
			for start < end && (t.s[start] == ' ' || t.s[start] == '\t') {
				start++
			}
			comment = start < end && t.s[start] == '#'
		}
		if comment {
			if first < 0 {
				first = line
			}
			continue
		}
		if first >= 0 && line-first > 1 {
			_, start := t.LineSpan(first)
			_, end := t.LineSpan(line - 1)
			out = append(out, lang.Span{Start: start, End: end})
		}
		first = -1
	}
	return out
}

// fewer keeps so many folds as the client wants: those farther out before those
// inside, and of these the first.
func fewer(list []fold, limit int) []fold {
	order := slices.Clone(list)
	slices.SortStableFunc(order, func(a, b fold) int { return a.depth - b.depth })
	order = order[:limit]
	slices.SortStableFunc(order, func(a, b fold) int { return cmp.Compare(a.span.Start, b.span.Start) })
	return order
}
