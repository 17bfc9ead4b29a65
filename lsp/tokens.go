package lsp

import (
	"context"
	"runtime"
	"slices"
	"sync"

	"kern/checker/model"
	"kern/lang"

	"go.lsp.dev/protocol"
)

var tokensFeature = feature{
	name:    "semantic tokens",
	methods: []string{protocol.MethodTextDocumentSemanticTokensFull, protocol.MethodTextDocumentSemanticTokensFullDelta, protocol.MethodTextDocumentSemanticTokensRange},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		w := client.Tokens
		if w == nil {
			return
		}
		o := &protocol.SemanticTokensOptions{Legend: protocol.SemanticTokensLegend{TokenTypes: w.types, TokenModifiers: w.modifiers}}
		switch {
		case w.delta:
			o.Full = &protocol.SemanticTokensFullDelta{Delta: pointer(true)}
		case w.full:
			o.Full = protocol.Boolean(true)
		}
		if w.ranges {
			o.Range = protocol.Boolean(true)
		}
		c.SemanticTokensProvider = o
	},
	// what a name is may change by an edit of another file
	refresh: func(client *Client) string {
		if client.Tokens == nil || !client.RefreshTokens {
			return ""
		}
		return protocol.MethodWorkspaceSemanticTokensRefresh
	},
}

// SemanticTokensFull answers with the kinds of all words of a file.
func (s *Server) SemanticTokensFull(ctx context.Context, p *protocol.SemanticTokensParams) (*protocol.SemanticTokens, error) {
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil || s.client.Tokens == nil {
		return nil, err
	}
	data := encodeTokens(f, s.client.Tokens)
	out := &protocol.SemanticTokens{Data: data}
	if s.client.Tokens.delta {
		out.ResultID = pointer(s.answered.keep(s, f, data))
	}
	return out, nil
}

// SemanticTokensFullDelta answers with what changed since an earlier answer, or
// with all when that one is not remembered.
func (s *Server) SemanticTokensFullDelta(ctx context.Context, p *protocol.SemanticTokensDeltaParams) (protocol.SemanticTokensDeltaResult, error) {
	previous := string([]byte(p.PreviousResultID))
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil || s.client.Tokens == nil {
		return nil, err
	}
	before, known := s.answered.recall(f.URI(f.Name), previous)
	data := encodeTokens(f, s.client.Tokens)
	id := s.answered.keep(s, f, data)
	if !known {
		return &protocol.SemanticTokens{ResultID: &id, Data: data}, nil
	}
	return &protocol.SemanticTokensDelta{ResultID: &id, Edits: tokenEdits(before, data)}, nil
}

// SemanticTokensRange answers with the kinds of the words in a part of a file.
func (s *Server) SemanticTokensRange(ctx context.Context, p *protocol.SemanticTokensRangeParams) (*protocol.SemanticTokens, error) {
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil || s.client.Tokens == nil {
		return nil, err
	}
	return &protocol.SemanticTokens{Data: encodeTokensIn(f, s.client.Tokens, f.Span(p.Range))}, nil
}

// encodeTokens writes the tokens of a file as the protocol has them, on all
// cores: declarations begin lines and do not depend on one another.
func encodeTokens(f *File, w *tokenWays) []uint32 {
	n := len(f.Tree.Decls)
	parts := min(runtime.GOMAXPROCS(0), 1+n/200)
	encoders := make([]tokenEncoder, parts)
	var wait sync.WaitGroup
	for i := range encoders {
		e := &encoders[i]
		*e = newTokenEncoder(f, w)
		wait.Go(func() { e.declarations(i*n/parts, (i+1)*n/parts) })
	}
	wait.Wait()
	out := encoders[0].out
	behind := encoders[0].line
	for _, e := range encoders[1:] {
		if len(e.out) > 0 {
			e.out[0] += behind // counts from the last token before
			behind = 0
		}
		out = append(out, e.out...)
		behind += e.line
	}
	if out == nil {
		out = []uint32{}
	}
	return out
}

// encodeTokensIn writes the tokens that touch a span of the file.
func encodeTokensIn(f *File, w *tokenWays, within lang.Span) []uint32 {
	e := newTokenEncoder(f, w)
	e.within = within
	if first := f.Tree.DeclAt(within.Start); first >= 0 {
		e.line = uint32(f.Text.Line(f.Tree.Starts[first]))
		e.declarations(first, f.Tree.DeclAt(within.End)+1)
	}
	if e.out == nil {
		return []uint32{}
	}
	return e.out
}

// tokenEncoder writes tokens, each counted from the one before it.
type tokenEncoder struct {
	file        *File
	ways        *tokenWays
	calculation *model.Calculation // says what names are; nil for none
	within      lang.Span
	positions   positions

	out   []uint32
	line  uint32 // lines since the last token, or since the beginning
	char  uint32 // where the last token of the line begins
	marks tokenMarks
}

func newTokenEncoder(f *File, w *tokenWays) tokenEncoder {
	e := tokenEncoder{file: f, ways: w, within: lang.Span{Start: 0, End: f.Text.Len()}, positions: positions{f.Text, f.unit}}
	if all := f.report.Calculations(f.Name); len(all) > 0 {
		e.calculation = all[0]
	}
	return e
}

func (e *tokenEncoder) declarations(first, last int) {
	e.out = make([]uint32, 0, 5*64*max(0, last-first))
	for i := first; i < last; i++ {
		e.declaration(e.file.Tree.Decls[i], e.file.Tree.Starts[i])
	}
}

// declaration writes the tokens of a declaration. It begins a line, and its
// tokens do not go over one.
func (e *tokenEncoder) declaration(d *lang.Decl, start int32) {
	marks := e.marks.read(e.calculation, d)
	lexer := lang.NewLexer(d.Text)
	column, at := uint32(0), int32(0) // of the offset at, in the client's units
	e.char = 0
	for t := lexer.Next(); t.Kind != lang.EOF; t = lexer.Next() {
		for len(marks) > 0 && marks[0].span.Start < t.Start {
			marks = marks[1:]
		}
		if t.Kind == lang.Newline {
			e.line++
			e.char, column, at = 0, 0, t.End
			continue
		}
		x := tokenMark{span: t.Span(), kind: lexicalKind[t.Kind]}
		if len(marks) > 0 && marks[0].span.Start == t.Start && t.Kind != lang.Blank {
			x = marks[0]
			for t.End < x.span.End { // "flexural-buckling" is one word
				t = lexer.Next()
			}
		} else if x.kind == noToken || e.ways.plain(x.kind) {
			continue
		}
		kind := e.ways.number[x.kind]
		if span := moved(x.span, start); kind < 0 || span.End <= e.within.Start || span.Start >= e.within.End {
			continue
		}
		column += e.units(d.Text[at:x.span.Start])
		at = x.span.Start
		e.out = append(e.out, e.line, column-e.char, e.units(x.span.Of(d.Text)), uint32(kind), e.ways.bits(x.modifiers))
		e.line, e.char = 0, column
	}
}

// units is the length of a piece of a line in the client's units.
func (e *tokenEncoder) units(s string) uint32 {
	for i := 0; i < len(s); i++ {
		if s[i] >= 0x80 {
			return e.positions.units(s)
		}
	}
	return uint32(len(s))
}

// units is the length of a piece of a line in the units of columns.
func (p positions) units(s string) uint32 {
	n := uint32(0)
	for s != "" {
		width, units := p.next(s)
		n += uint32(units)
		s = s[width:]
	}
	return n
}

// tokenEdits gives the change that leads from one row of tokens to another: what
// lies between their common beginning and their common end.
func tokenEdits(before, after []uint32) []protocol.SemanticTokensEdit {
	if slices.Equal(before, after) {
		return []protocol.SemanticTokensEdit{}
	}
	const size = 5 // numbers of a token
	least := min(len(before), len(after))
	head := 0
	for head+size <= least && slices.Equal(before[head:head+size], after[head:head+size]) {
		head += size
	}
	tail := 0
	for tail+size <= least-head && slices.Equal(before[len(before)-tail-size:len(before)-tail], after[len(after)-tail-size:len(after)-tail]) {
		tail += size
	}
	return []protocol.SemanticTokensEdit{{Start: uint32(head), DeleteCount: uint32(len(before) - head - tail), Data: after[head : len(after)-tail]}}
}
