package model

import (
	"fmt"
	"strings"

	"kern/lang"
	"kern/lang/unit"
)

func (b *builder) value(d declared, value []*lang.Expr) {
	s := d.stmt
	if contains(topWords, s.Word) {
		if !s.Broken {
			p := lang.Problem{Rule: "wrong-form", Span: s.Head, Message: "a declared " + s.Word + " has a name: " + s.Word + " NAME = …"}
			if s.Word == "include" || s.Word == "basis" || s.Word == "forces" || s.Word == "project" {
				p.Message = "'" + s.Word + "' takes no sign ="
			}
			if contains(memberWords, s.Word) {
				p.Notes = append(p.Notes, "what a member is made of is said inside its braces")
			}
			b.report(lang.Diagnostic{Decl: d.decl, Problem: p})
		}
		if s.Word == "combination" {
			b.env.refuse("a combination has an error")
		}
		return
	}
	head := &lang.Expr{Kind: lang.NameExpr, Text: s.Word, Span: s.Head}
	if !b.name(d, head, ValueName, -1) {
		return
	}
	if s.Broken {
		b.env.Names[s.Word].Bad = true
		return
	}
	r := b.reader(d)
	if len(value) == 0 {
		r.fail("missing-value", s.Line, "'%s' has no value: something must stand behind the sign =", s.Word)
		b.env.Names[s.Word].Bad = true
		return
	}
	if k := value[0].Kind; k == lang.EqualsExpr || k == lang.CommaExpr || k == lang.CompareExpr {
		r.fail("wrong-form", value[0].Span, "the value of '%s' is due here", s.Word)
		b.env.Names[s.Word].Bad = true
		return
	}
	r.args = value[1:]
	if !r.end() {
		b.env.Names[s.Word].Bad = true
		return
	}
	b.env.Values.Define(&lang.Value{Name: s.Word, Decl: d.decl, Stmt: s, Expr: value[0]})
}

// ownWords are what every member has of its own. A value of such a name would
// change, unseen, what the members say with it.
var ownWords = map[string]bool{"height": true, "length": true, "top": true, "base": true, "floor": true}

// lookup finds the value of a name in an expression outside members.
func (env *Env) lookup(e *lang.Expr) (unit.Quantity, *lang.Problem) {
	if n := env.Names[e.Text]; n != nil && n.Twice {
		return unit.Quantity{}, lang.Silent
	}
	if strings.Contains(e.Text, ".") {
		q, p, _ := env.Result(e, nil)
		return q, p
	}
	if d, ok := env.Values.Lookup(e.Text); ok {
		if d.Late {
			return unit.Quantity{}, &lang.Problem{Rule: "wrong-kind", Span: e.Span, Message: "'" + clip(e.Text) + "' leans on the result of a member and cannot be used here: members lean on what stands here",
				Related: []lang.Related{{Place: lang.Place{Decl: d.Decl, Span: d.Stmt.Head}, Message: "given here"}}}
		}
		q, p := env.Values.Get(d, env.lookup)
		if p != nil {
			return q, lang.Silent
		}
		return q, nil
	}
	n, ok := env.Names[e.Text]
	switch {
	case ok && (n.Bad || n.Kind == ValueName):
		return unit.Quantity{}, lang.Silent
	case ok && n.Kind == LevelName && n.Index >= 0:
		l := env.Levels[n.Index]
		if l.Bad {
			return unit.Quantity{}, lang.Silent
		}
		return unit.Quantity{Value: l.At, Dim: unit.Length}, nil
	case ok:
		return unit.Quantity{}, &lang.Problem{Rule: "wrong-kind", Span: e.Span, Message: fmt.Sprintf("'%s' is %s, not a value", e.Text, n.Kind),
			Related: []lang.Related{{Place: n.Place, Message: "given here"}}}
	}
	return unit.Quantity{}, env.unknownName(e, "value", []NameKind{ValueName, LevelName})
}

// values evaluates every named value once, so that each problem is reported
// where it lies, used or not.
func (b *builder) values() {
	for _, f := range b.files {
		for _, d := range f.Decls {
			for _, s := range d.Stmts {
				v, ok := b.env.Values.Lookup(s.Word)
				if !ok || v.Stmt != s || v.Decl != d || v.Late {
					continue
				}
				if _, p := b.env.Values.Get(v, b.env.lookup); p != nil && p.Rule != "" {
					b.report(lang.Diagnostic{Decl: d, Problem: *p})
				}
			}
		}
	}
}
