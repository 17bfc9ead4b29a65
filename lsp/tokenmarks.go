package lsp

import (
	"slices"

	"kern/checker"
	"kern/checker/catalogue"
	"kern/checker/model"
	"kern/lang"
)

// tokenMark says what a span of a declaration is, where the token alone does not tell.
type tokenMark struct {
	span      lang.Span
	kind      tokenKind
	modifiers uint8
}

// tokenMarks reads what the words of a declaration are. It is used again for the
// next one.
type tokenMarks struct{ list []tokenMark }

func (m *tokenMarks) add(span lang.Span, kind tokenKind, modifiers uint8) {
	m.list = append(m.list, tokenMark{span, kind, modifiers})
}

// read gives the marks of a declaration in order, one at a place at most. What
// is a name of the calculation counts before what is a word of the language.
func (m *tokenMarks) read(c *model.Calculation, d *lang.Decl) []tokenMark {
	m.list = m.list[:0]
	if c != nil {
		checker.Mentions(c, d, m.mention)
	}
	for _, s := range d.Stmts {
		m.declaration(s)
	}
	slices.SortStableFunc(m.list, func(a, b tokenMark) int { return int(a.span.Start - b.span.Start) })
	m.list = slices.CompactFunc(m.list, func(a, b tokenMark) bool { return a.span.Start == b.span.Start })
	return m.list
}

var kindTokens = [...]tokenMark{
	model.ValueName: {kind: quantityToken, modifiers: fixed}, model.LevelName: {kind: quantityToken, modifiers: fixed},
	model.MaterialName: {kind: materialToken}, model.SectionName: {kind: sectionToken}, model.CaseName: {kind: caseToken},
	model.CombinationName: {kind: combinationToken}, model.MemberName: {kind: memberToken},
}

func (m *tokenMarks) mention(n checker.Mention) {
	x := kindTokens[n.Named.Kind]
	if n.Declares {
		x.modifiers |= declares
	}
	m.add(n.Place.Span, x.kind, x.modifiers)
}

// formWords are the words that begin a statement, by context.
var formWords = func() map[lang.Context]map[string]bool {
	out := map[lang.Context]map[string]bool{}
	for _, f := range lang.Forms {
		if out[f.In] == nil {
			out[f.In] = map[string]bool{}
		}
		out[f.In][f.Word] = true
	}
	return out
}()

// head marks the word that a statement begins with.
func (m *tokenMarks) head(s *lang.Stmt, in lang.Context, assigned bool) {
	switch {
	case !formWords[in][s.Word]:
	case assigned:
		m.add(s.Head, propertyToken, 0)
	default:
		m.add(s.Head, keywordToken, 0)
	}
}

// blockContexts are the contexts in the blocks of declarations.
var blockContexts = map[string]lang.Context{"project": lang.InProject, "basis": lang.InBasis, "level": lang.InLevel, "material": lang.InMaterial, "section": lang.InSection,
	"column": lang.InMember, "strut": lang.InMember, "tie": lang.InMember}

func (m *tokenMarks) declaration(s *lang.Stmt) {
	value, assigned := s.Assigned()
	if !assigned {
		m.head(s, lang.InFile, false)
	}
	parts := s.Args
	if assigned {
		parts = value
	}
	m.parts(parts, s.Word)
	if s.Body == nil {
		return
	}
	in := blockContexts[s.Word]
	for _, b := range s.Body.Stmts {
		m.statement(b, in)
	}
}

// statement marks the words of a statement in a block.
func (m *tokenMarks) statement(s *lang.Stmt, in lang.Context) {
	parts := s.Args
	value, assigned := s.Assigned()
	if assigned {
		parts = value
	}
	m.head(s, in, assigned)
	switch {
	case s.Word == "show" && in == lang.InBasis:
		for _, e := range parts {
			if e.Kind != lang.CommaExpr {
				m.add(e.Span, unitToken, 0)
			}
		}
	case len(parts) == 0:
	case s.Word == "depart" && in == lang.InMember:
		m.add(parts[0].Span, choiceToken, builtIn)
		m.parts(parts[1:], s.Word)
	case s.Word == "require" && in == lang.InMember:
		if parts[0].Kind == lang.NameExpr {
			m.add(parts[0].Span, quantityToken, fixed|builtIn)
		}
		m.parts(parts[1:], s.Word)
	case (s.Word == "curve" || s.Word == "curve_major" || s.Word == "curve_minor") && parts[0].Kind == lang.NameExpr:
		m.add(parts[0].Span, choiceToken, 0)
	default:
		m.parts(parts, s.Word)
	}
	if in, ok := map[string]lang.Context{"section": lang.InSection, "lift": lang.InLift}[s.Word]; ok && s.Body != nil {
		for _, b := range s.Body.Stmts {
			m.statement(b, in)
		}
	}
}

func (m *tokenMarks) parts(parts []*lang.Expr, word string) {
	for _, e := range parts {
		m.expr(e, word)
	}
}

func (m *tokenMarks) expr(e *lang.Expr, word string) {
	switch e.Kind {
	case lang.NameExpr:
		m.word(e)
	case lang.CallExpr:
		if _, ok := lang.Functions[e.Text]; ok {
			m.add(lang.Span{Start: e.Span.Start, End: e.Span.Start + int32(len(e.Text))}, functionToken, builtIn)
		}
	case lang.StringExpr:
		m.quoted(e, word)
	}
	for _, a := range e.Args {
		m.expr(a, word)
	}
}

// word marks a word inside a statement, if it is one of the language.
func (m *tokenMarks) word(e *lang.Expr) {
	if _, ok := lang.Constants[e.Text]; ok {
		m.add(e.Span, quantityToken, fixed|builtIn)
		return
	}
	switch e.Text {
	case "at", "about", "across", "offset", "and", "from", "to", "as", "per", "by", "annex", "eq", "because", "floor", "lengths":
		m.add(e.Span, keywordToken, 0)
		return
	case "height", "length", "utilisation", "slenderness", "sway":
		m.add(e.Span, propertyToken, 0)
		return
	}
	if _, ok := lang.Words[e.Text]; ok || e.Text == "base" {
		m.add(e.Span, choiceToken, 0)
	}
}

// quoted marks a text that the catalogue knows.
func (m *tokenMarks) quoted(e *lang.Expr, statement string) {
	switch statement {
	case "section":
		if _, ok := catalogue.Find(e.Text); ok {
			m.add(e.Span, sectionToken, builtIn)
		}
	case "material":
		if _, ok := catalogue.FindGrade(e.Text, ""); ok {
			m.add(e.Span, materialToken, builtIn)
		}
	}
}
