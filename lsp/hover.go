package lsp

import (
	"context"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/output"
	"kern/lang"

	"go.lsp.dev/protocol"
)

var hoverFeature = feature{
	name:    "hover",
	methods: []string{protocol.MethodTextDocumentHover},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Hovers {
			c.HoverProvider = protocol.Boolean(true)
		}
	},
}

// Hover answers with what stands at a place and what it means here.
func (s *Server) Hover(ctx context.Context, p *protocol.HoverParams) (*protocol.Hover, error) {
	at := p.Position
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	text, span, ok := hoverAt(f, f.Offset(at), s.paper())
	if !ok {
		return nil, nil
	}
	r := f.RangeOf(span)
	return &protocol.Hover{Contents: s.markup(text), Range: &r}, nil
}

// paper is the form in which a client takes pages.
type paper struct{ markdown, pictures, history bool }

func (s *Server) paper() paper {
	settings := s.Settings()
	return paper{markdown: s.client.HoverMarkdown, pictures: s.client.Pictures && settings.HoverDrawings, history: settings.HoverHistory}
}

// markup is a text in the form of the paper.
func (s *Server) markup(text string) *protocol.MarkupContent {
	kind := protocol.MarkupKindPlainText
	if s.client.HoverMarkdown {
		kind = protocol.MarkupKindMarkdown
	}
	return &protocol.MarkupContent{Kind: kind, Value: text}
}

// hovering is a look at one place of a file.
type hovering struct {
	f     *File
	at    lang.At
	token lang.Token // below the place, in the declaration
	paper paper
	page  *output.Page
	span  lang.Span // of what the page is about, in the declaration
	calc  *model.Calculation
}

// hoverAt gives the page about a place of a file and the span that it is about.
// It is false where there is nothing to say.
func hoverAt(f *File, offset int32, form paper) (string, lang.Span, bool) {
	at, ok := f.Tree.At(offset)
	if !ok || at.Stmt() == nil || f.Report() == nil {
		return "", lang.Span{}, false
	}
	token, ok := tokenAt(at.Decl.Text, at.Offset)
	if !ok {
		return "", lang.Span{}, false
	}
	h := &hovering{f: f, at: at, token: token, paper: form, page: output.NewPage(form.markdown), span: token.Span()}
	if all := f.Report().Calculations(f.Name); len(all) > 0 {
		h.calc = all[0]
	}
	h.look(offset)
	if h.page.Empty() {
		return "", lang.Span{}, false
	}
	return h.page.String(), lang.Span{Start: at.Start + h.span.Start, End: at.Start + h.span.End}, true
}

// tokenAt finds the token that a reader points at: the one at the place, or, at
// the end of a word, the word.
func tokenAt(text string, offset int32) (lang.Token, bool) {
	var found lang.Token
	lexer := lang.NewLexer(text)
	for {
		t := lexer.Next()
		if t.Kind == lang.EOF || t.Start > offset {
			break
		}
		if t.End < offset {
			continue
		}
		switch t.Kind {
		case lang.Name, lang.Number, lang.Unit, lang.String, lang.Operator, lang.Equals:
			if t.End > offset || found.Kind == lang.EOF || found.Kind == lang.Operator || found.Kind == lang.Equals {
				found = t
			}
		}
	}
	return found, found.Kind != lang.EOF
}

// word is the text of the token.
func (h *hovering) word() string { return h.token.Span().Of(h.at.Decl.Text) }

// parent is the statement in whose block the innermost one stands, nil for none.
func (h *hovering) parent() *lang.Stmt {
	if n := len(h.at.Stmts); n > 1 {
		return h.at.Stmts[n-2]
	}
	return nil
}

// context is the kind of block that the innermost statement stands in.
func (h *hovering) context() lang.Context {
	p := h.parent()
	if p == nil {
		return lang.InFile
	}
	return contextOf(p)
}

// contextOf is the kind of block that a statement opens.
func contextOf(s *lang.Stmt) lang.Context {
	return map[string]lang.Context{"project": lang.InProject, "basis": lang.InBasis, "level": lang.InLevel, "column": lang.InMember, "strut": lang.InMember, "tie": lang.InMember,
		"lift": lang.InLift, "material": lang.InMaterial, "section": lang.InSection}[s.Word]
}

// units are the units that the file's results are shown in.
func (h *hovering) units() derivation.Units {
	if h.calc == nil {
		return nil
	}
	return h.calc.Env.Basis.Show
}

// result is the result of the first member of the declaration's outermost
// statement, nil for none.
func (h *hovering) result() *checker.Result {
	for _, r := range h.f.Report().Results(h.at.Decl) {
		if r.Member.Stmt == h.at.Stmts[0] {
			return r
		}
	}
	return nil
}

// expr is the innermost expression below the place of a kind, with its parent.
func (h *hovering) expr(kind lang.ExprKind) (e, parent *lang.Expr) {
	for i, x := range h.at.Exprs {
		if x.Kind == kind && x.Span.Contains(h.at.Offset) {
			e = x
			if parent = nil; i > 0 {
				parent = h.at.Exprs[i-1]
			}
		}
	}
	return e, parent
}

// look finds out what stands at the place, the most particular first.
func (h *hovering) look(offset int32) {
	s := h.at.Stmt()
	if s.Head.Contains(h.token.Start) && h.token.End <= s.Head.End && s.Word != "" {
		h.head(s, offset)
		return
	}
	if h.at.Inside {
		return
	}
	switch {
	case h.particular(s):
	case h.token.Kind == lang.String:
		h.quoted(s)
	case h.token.Kind == lang.Unit, h.token.Kind == lang.Number:
		if !h.name(offset) { // in a combination a case stands where a unit would
			h.quantity()
		}
	case h.token.Kind == lang.Name:
		if !h.name(offset) {
			h.ordinary()
		}
	}
}

// head writes about the word that a statement begins with: what this statement
// does, and how such a statement is written.
func (h *hovering) head(s *lang.Stmt, offset int32) {
	if h.context() == lang.InMember {
		h.line(s)
	} else if h.name(offset) { // a named value, or a case in the block of a level
		return
	}
	h.override(s)
	h.form(s)
}

// particular writes about places whose words are no names: the check of a
// departure, the result of a requirement, units that results are shown in. It is
// false for all others.
func (h *hovering) particular(s *lang.Stmt) bool {
	switch {
	case h.context() == lang.InMember && s.Word == "depart" && len(s.Args) > 0 && s.Args[0].Span.Contains(h.at.Offset) && s.Args[0].Kind != lang.StringExpr:
		h.span = s.Args[0].Span
		h.check(s.Args[0].Span.Of(h.at.Decl.Text))
		return true
	case h.context() == lang.InMember && s.Word == "require" && len(s.Args) > 0 && s.Args[0].Kind == lang.NameExpr && s.Args[0].Span.Contains(h.at.Offset):
		h.span = s.Args[0].Span
		h.symbol(s.Args[0].Text)
		return true
	case h.context() == lang.InBasis && s.Word == "show":
		for _, e := range s.Args {
			if e.Kind != lang.CommaExpr && e.Span.Contains(h.at.Offset) {
				h.span = e.Span
				h.unit(e.Span.Of(h.at.Decl.Text), nil)
			}
		}
		return true
	case h.token.Kind == lang.Operator, h.token.Kind == lang.Equals:
		return true // nothing else has words for signs
	}
	return false
}
