package model

import (
	"slices"
	"strings"

	"kern/lang"
	"kern/lang/unit"
)

// Results knows what members came to. It is asked for a name with a dot in it,
// "A1.N_Ed", in the block of another member and in named values.
type Results interface {
	// Result gives a result of a member, by what stands behind the dot. A problem
	// without a rule says that the member has no result; its span is the asker's.
	Result(member *Named, what string) (unit.Quantity, *lang.Problem)
	// Late gives a named value that leans on results.
	Late(v *lang.Value) (unit.Quantity, *lang.Problem)
}

// Result gives the result that a name with a dot speaks of; false for any other
// name. results may be nil, where no result can be used.
func (env *Env) Result(e *lang.Expr, results Results) (unit.Quantity, *lang.Problem, *Named) {
	name, what, _ := strings.Cut(e.Text, ".")
	n := env.Names[name]
	switch {
	case n == nil || n.Kind != MemberName:
		head := *e
		head.Text, head.Span.End = name, e.Span.Start+int32(len(name))
		if n != nil && !n.Bad && !n.Twice {
			return unit.Quantity{}, &lang.Problem{Rule: "wrong-kind", Span: head.Span, Message: "'" + clip(name) + "' is " + n.Kind.String() + "; a dot stands between a member and its result",
				Related: []lang.Related{{Place: n.Place, Message: "given here"}}}, nil
		}
		return unit.Quantity{}, env.unknownName(&head, "member", []NameKind{MemberName}), nil
	case results == nil:
		return unit.Quantity{}, &lang.Problem{Rule: "wrong-kind", Span: e.Span, Message: "'" + clip(e.Text) + "' is a result of a member, which cannot be used here: members lean on what stands here",
			Notes: []string{"results stand in named values and in the blocks of other members"}}, n
	case n.Twice || n.Bad:
		return unit.Quantity{}, lang.Silent, n
	}
	q, p := results.Result(n, what)
	if p != nil && p.Rule != "" {
		at := *p
		at.Span = e.Span
		if at.Rule == "unknown-name" { // the part behind the dot
			at.Span.Start += int32(len(name)) + 1
		}
		for i, f := range at.Fixes {
			at.Fixes[i] = lang.Replace(f.Title, f.Safe, at.Span, f.Edits[0].New)
		}
		p = &at
	}
	return q, p, n
}

// late marks the named values that lean on results, and those that lean on them.
// A circle among them, or a chain of more than maxLate, is reported here.
func (b *builder) late() {
	b.env.Linked = slices.ContainsFunc(b.env.members, func(d *lang.Decl) bool { return d.Dotted })
	if !slices.ContainsFunc(b.env.decls, func(d *lang.Decl) bool { return d.Dotted }) {
		return
	}
	var order []*lang.Value // in the order of the text
	leaners := map[string][]*lang.Value{}
	var queue []*lang.Value
	for _, d := range b.env.decls {
		for _, s := range d.Stmts {
			v, ok := b.env.Values.Lookup(s.Word)
			if !ok || v.Stmt != s || v.Decl != d {
				continue
			}
			order = append(order, v)
			v.Expr.Walk(func(e *lang.Expr) {
				if e.Kind != lang.NameExpr {
					return
				}
				leaners[e.Text] = append(leaners[e.Text], v)
				if !v.Late && strings.Contains(e.Text, ".") {
					v.Late = true
					queue = append(queue, v)
				}
			})
		}
	}
	for len(queue) > 0 {
		v := queue[0]
		queue = queue[1:]
		for _, l := range leaners[v.Name] {
			if !l.Late {
				l.Late = true
				queue = append(queue, l)
			}
		}
	}
	for _, v := range order {
		if v.Late {
			b.env.late = append(b.env.late, v)
			b.env.Linked = true
		}
	}
}

// LateValues are the named values that lean on results of members, in the order
// of the text.
func (env *Env) LateValues() []*lang.Value { return env.late }

// EvaluateLate works out a value that leans on results.
func (env *Env) EvaluateLate(v *lang.Value, results Results) (unit.Quantity, *lang.Problem) {
	return lang.Eval(v.Expr, func(e *lang.Expr) (unit.Quantity, *lang.Problem) {
		if strings.Contains(e.Text, ".") {
			q, p, _ := env.Result(e, results)
			return q, p
		}
		if d, ok := env.Values.Lookup(e.Text); ok && d.Late {
			return env.lateOf(e, d, results)
		}
		return env.lookup(e)
	})
}

// lateOf gives a value that leans on results where a name stands for it. A
// problem without a span is about this place, any other was reported where it
// lies.
func (env *Env) lateOf(e *lang.Expr, v *lang.Value, results Results) (unit.Quantity, *lang.Problem) {
	q, p := results.Late(v)
	switch {
	case p == nil:
	case p.Rule != "" && p.Span == lang.Span{}:
		at := *p
		at.Span = e.Span
		p = &at
	default:
		p = lang.Silent
	}
	return q, p
}

// Value gives a named value, be it known before members are or after; false when
// it has none.
func (env *Env) Value(v *lang.Value) (unit.Quantity, bool) {
	if v.Late {
		q, ok := env.settled[v]
		return q, ok
	}
	q, p := env.Values.Get(v, nil) // worked out with the calculation
	return q, p == nil
}

// WithResults is the Env with the results of its members, and with the values
// that lean on them.
func (env *Env) WithResults(values map[*lang.Value]unit.Quantity, results Results) *Env {
	next := *env
	next.settled, next.results = values, results
	return &next
}

// Results are the results of the members; nil before they are worked out, and
// where no member uses any.
func (env *Env) Results() Results { return env.results }

// FirstName is the name of the first member that a declaration describes; "" for
// none.
func FirstName(d *lang.Decl) string {
	for _, s := range d.Stmts {
		if names := memberNames(s); isMember(s) && len(names) > 0 {
			return names[0].Text
		}
	}
	return ""
}

// Gives tells whether a declaration describes a member of that name.
func Gives(d *lang.Decl, name string) bool {
	return slices.ContainsFunc(d.Stmts, func(s *lang.Stmt) bool {
		return isMember(s) && slices.ContainsFunc(memberNames(s), func(e *lang.Expr) bool { return e.Text == name })
	})
}

// Mentioned calls f for every name that a statement and its block mention.
func Mentioned(s *lang.Stmt, f func(e *lang.Expr)) {
	for _, a := range s.Args {
		a.Walk(func(e *lang.Expr) {
			if e.Kind == lang.NameExpr {
				f(e)
			}
		})
	}
	if s.Body != nil {
		for _, b := range s.Body.Stmts {
			Mentioned(b, f)
		}
	}
}
