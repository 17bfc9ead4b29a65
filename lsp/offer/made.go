package offer

import (
	"fmt"
	"strings"

	"kern/checker"
	"kern/checker/catalogue"
	"kern/checker/edit"
	"kern/checker/model"
	"kern/lang"
)

// made offers to declare, once and by name, a section or material that two or
// more members of the file say in full.
func (l *list) made(s site) {
	o, ok := l.memberOf(s)
	if !ok || len(s.Stmts) < 2 {
		return
	}
	b := s.Stmts[1]
	text, what, ok := l.full(owner{o.decl, b})
	if !ok {
		return
	}
	var uses []owner
	var decls []int
	members := 0
	for i, d := range l.file.Decls {
		for _, top := range d.Stmts {
			if top.Body == nil || assigned(top) || top.Word != "column" && top.Word != "strut" && top.Word != "tie" {
				continue
			}
			for _, inner := range top.Body.Stmts {
				if inner.Word != b.Word {
					continue
				}
				if other, _, ok := l.full(owner{d, inner}); ok && other == text {
					uses, decls = append(uses, owner{d, inner}), append(decls, i)
					members += names(top)
				}
			}
		}
	}
	if len(uses) == 0 {
		return
	}
	replace := func(name string) []checker.Edit {
		var out []checker.Edit
		for i, u := range uses {
			value, _ := u.stmt.Assigned()
			out = append(out, l.edit(l.file.Starts[decls[i]], lang.Span{Start: value[0].Span.Start, End: u.stmt.Span.End}, name))
		}
		return out
	}
	shown := text
	if b.Body != nil {
		shown = "its dimensions"
	}
	if name := l.already(b.Word, text); name != "" {
		l.add(Offer{Kind: Extract, Title: fmt.Sprintf("Use the %s %s for %s", b.Word, name, shown), edits: func() []checker.Edit { return replace(name) }})
		return
	}
	if members < 2 {
		return
	}
	name := l.free(what)
	value, _ := b.Assigned()
	whole := lang.Span{Start: value[0].Span.Start, End: b.Span.End}.Of(o.decl.Text)
	whole = outdent(whole, edit.IndentOf(o.decl.Text, b.Span.Start))
	title := fmt.Sprintf("Declare the %s: %s = %s", b.Word, name, text)
	if b.Body != nil {
		title = fmt.Sprintf("Declare the %s: %s = %s { … }", b.Word, name, value[0].Text)
	}
	title += fmt.Sprintf(" (%d members)", members)
	edits := func() []checker.Edit {
		e, ok := l.above(decls[0], b.Word+" "+name+" = "+whole)
		if !ok {
			return nil
		}
		return append([]checker.Edit{e}, replace(name)...)
	}
	if edits() != nil {
		l.add(Offer{Kind: Extract, Title: title, edits: edits})
	}
}

// names counts the members that a statement describes.
func names(s *lang.Stmt) int {
	n := 0
	for i, e := range s.Args {
		if e.Kind != lang.NameExpr || e.Is("as") || i > 0 && s.Args[i-1].Kind != lang.CommaExpr {
			if e.Kind != lang.CommaExpr {
				break
			}
			continue
		}
		n++
	}
	return n
}

// full gives what a section or material line of a member says in full, in one
// form for all lines that say the same, and a name for it. It is false for a name,
// for what is not known, and for what depends on the member.
func (l *list) full(o owner) (text, name string, ok bool) {
	s := o.stmt
	value, assigned := s.Assigned()
	if s.Broken || !assigned || len(value) == 0 || s.Word != "section" && s.Word != "material" {
		return "", "", false
	}
	for _, p := range o.decl.Problems {
		if p.Span.Start < s.Span.End && s.Span.Start < p.Span.End {
			return "", "", false
		}
	}
	e := value[0]
	switch {
	case e.Kind == lang.StringExpr && s.Body == nil && known(s.Word, e.Text):
		parts := []string{`"` + e.Text + `"`}
		for _, more := range value[1:] { // per "EN 10025-2"
			parts = append(parts, more.Span.Of(o.decl.Text))
		}
		if len(value) != 1 && !(s.Word == "material" && len(value) == 3 && value[1].Is("per")) {
			return "", "", false
		}
		return strings.Join(parts, " "), word(e.Text), sound(l, o)
	case e.Kind == lang.NameExpr && s.Body != nil && s.Word == "section" && len(value) == 1:
		free := true
		var size string
		for _, b := range s.Body.Stmts {
			v, assigned := b.Assigned()
			if b.Broken || !assigned || len(v) != 1 {
				return "", "", false
			}
			v[0].Walk(func(x *lang.Expr) {
				free = free && !(x.Kind == lang.NameExpr && (x.Text == "height" || x.Text == "length"))
			})
			switch b.Word {
			case "depth", "width", "outside", "diameter":
				if size == "" {
					number, _, _ := strings.Cut(v[0].Span.Of(o.decl.Text), " ")
					size = word("x" + number)[1:]
				}
			}
		}
		whole := lang.Span{Start: e.Span.Start, End: s.Span.End}.Of(o.decl.Text)
		return tokens(whole), e.Text + size, free && sound(l, o)
	}
	return "", "", false
}

// sound tells whether nothing was reported in a statement of the file.
func sound(l *list, o owner) bool {
	file, span := l.Report.Where(lang.Place{Decl: o.decl, Span: o.stmt.Span})
	return file == l.File && l.sound(span)
}

// tokens writes the tokens of a text with single blanks between them, so that
// texts that differ in their layout alone are the same.
func tokens(text string) string {
	var out []string
	last := func() string {
		if len(out) == 0 {
			return "{"
		}
		return out[len(out)-1]
	}
	for _, t := range lang.Tokens(text) {
		switch t.Kind {
		case lang.Blank:
		case lang.Newline, lang.Semicolon:
			if last() != "{" && last() != ";" {
				out = append(out, ";")
			}
		default:
			if t.Kind == lang.CloseBrace && last() == ";" {
				out = out[:len(out)-1]
			}
			out = append(out, t.Span().Of(text))
		}
	}
	return strings.Join(out, " ")
}

// already finds the name of a section or material that says the same and is known
// in every calculation of the file.
func (l *list) already(what, text string) string {
	for _, f := range l.filesOf() {
		for _, d := range f.Decls {
			for _, s := range d.Stmts {
				if s.Word != what || s.Broken || s.Body != nil || len(s.Args) < 3 || s.Args[0].Kind != lang.NameExpr || s.Args[1].Kind != lang.EqualsExpr {
					continue
				}
				name := s.Args[0].Text
				said := lang.Span{Start: s.Args[2].Span.Start, End: s.Line.End}.Of(d.Text)
				if s.Args[2].Kind == lang.StringExpr && strings.Join(strings.Fields(said), " ") == text && l.everywhereKnown(name, kindOf[what], s) {
					return name
				}
			}
		}
	}
	return ""
}

func (l *list) filesOf() []*lang.File {
	if len(l.calculations) == 0 {
		return nil
	}
	return l.calculations[0].Files
}

func (l *list) everywhereKnown(name string, kind model.NameKind, s *lang.Stmt) bool {
	for _, c := range l.calculations {
		n := c.Env.Names[name]
		if n == nil || n.Kind != kind || n.Stmt != s || n.Twice || c.Env.Bad(n) {
			return false
		}
	}
	return true
}

// known tells whether the catalogue has a section or a grade.
func known(what, text string) bool {
	if what == "material" {
		_, ok := catalogue.FindGrade(text, "")
		return ok
	}
	_, ok := catalogue.Find(text)
	return ok
}

// outdent takes the indent of a block's lines away from a text that moves to the
// top level.
func outdent(text, indent string) string {
	return strings.ReplaceAll(strings.ReplaceAll(text, "\n"+indent, "\n"), "\r"+indent, "\r")
}
