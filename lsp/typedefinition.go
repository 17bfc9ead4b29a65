package lsp

import (
	"context"
	"slices"

	"kern/checker/model"
	"kern/lang"

	"go.lsp.dev/protocol"
)

var typeDefinitionFeature = feature{
	name:    "type definition",
	methods: []string{protocol.MethodTextDocumentTypeDefinition},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.TypeDefinition {
			c.TypeDefinitionProvider = protocol.Boolean(true)
		}
	},
}

// TypeDefinition leads from a member to its section and from a load to its case.
func (s *Server) TypeDefinition(ctx context.Context, p *protocol.TypeDefinitionParams) (protocol.DefinitionResult, error) {
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	origin, targets := typeDefinitions(f, f.Offset(p.Position))
	return f.links(origin, targets, s.client.TypeDefinitionLinks), nil
}

// typeDefinitions gives what the thing at an offset is made of: for the name of
// a member, or the word before it, its section; for a load its case, or the
// cases of the level whose floor it carries.
func typeDefinitions(f *File, offset int32) (lang.Span, []target) {
	var out []target
	add := func(t target) {
		if t.file != "" && !slices.Contains(out, t) {
			out = append(out, t)
		}
	}
	for _, m := range mentionsAt(f, offset) {
		if m.Named.Kind != model.MemberName {
			continue
		}
		_, origin := f.report.Where(m.Place)
		for _, at := range f.sectionsOf(m.Named.Place.Decl, m.Named.Stmt) {
			add(at)
		}
		if out != nil {
			return origin, out
		}
	}
	at, ok := f.Tree.At(offset)
	if !ok || len(at.Stmts) == 0 {
		return lang.Span{}, nil
	}
	top, origin := at.Stmts[0], moved(at.Stmt().Line, at.Start)
	switch {
	case len(at.Stmts) == 1 && !at.Inside && isMember(top) && top.Head.Contains(at.Offset):
		for _, t := range f.sectionsOf(at.Decl, top) {
			add(t)
		}
		return moved(top.Head, at.Start), out
	case len(at.Stmts) == 2 && isMember(top) && at.Stmts[1].Word == "load":
		for _, t := range f.casesOf(at.Decl, top, at.Stmts[1]) {
			add(t)
		}
	case len(at.Stmts) == 2 && top.Word == "level":
		head := at.Stmts[1].Head
		for _, m := range mentionsAt(f, at.Start+head.Start) {
			if m.Named.Kind == model.CaseName {
				add(f.target(m.Named.Place, m.Named.Stmt.Span))
			}
		}
	}
	return origin, out
}

// isMember tells whether a statement declares members.
func isMember(s *lang.Stmt) bool {
	if _, assigned := s.Assigned(); assigned {
		return false
	}
	return s.Word == "column" || s.Word == "strut" || s.Word == "tie"
}

// sectionsOf leads to the sections of the members of a statement: the named
// section, or the line that says it otherwise.
func (f *File) sectionsOf(d *lang.Decl, s *lang.Stmt) []target {
	var out []target
	for _, r := range f.report.Results(d) {
		m := r.Member
		switch {
		case m.Stmt != s || m.SectionAt.Decl == nil:
		case m.Section != nil && m.Section.Name != "" && m.Section.Place.Decl != nil && m.Section.Place != m.SectionAt:
			out = append(out, f.target(m.Section.Place, around(m.Section.Place)))
		default:
			out = append(out, f.target(m.SectionAt, m.SectionAt.Span))
		}
	}
	return out
}

// around is the span of the declaration's own statement around a place.
func around(at lang.Place) lang.Span {
	if s := stmtAround(at.Decl, at.Span); s != nil {
		return s.Span
	}
	return at.Span
}

// casesOf leads to the cases of a line "load …" of a member's block. A line that
// names its case need not be right otherwise.
func (f *File) casesOf(d *lang.Decl, member, load *lang.Stmt) []target {
	var out []target
	_, start := f.report.Where(lang.Place{Decl: d})
	for _, e := range load.Args {
		if e.Kind != lang.NameExpr {
			break
		}
		for _, m := range mentionsAt(f, start.Start+e.Span.Start) {
			if m.Named.Kind == model.CaseName {
				out = append(out, f.target(m.Named.Place, m.Named.Stmt.Span))
			}
		}
		break
	}
	if out != nil {
		return out
	}
	for _, c := range f.report.Calculations(f.Name) {
		for _, m := range c.Members {
			if m.Stmt != member {
				continue
			}
			for _, l := range m.Loads {
				if l.Place != (lang.Place{Decl: d, Span: load.Line}) {
					continue
				}
				if n := c.Env.Names[c.Env.Cases[l.Case].Name]; n != nil && n.Kind == model.CaseName {
					out = append(out, f.target(n.Place, n.Stmt.Span))
				}
			}
			break
		}
	}
	return out
}
