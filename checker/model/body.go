package model

import (
	"kern/lang"
)

// body reads a block of assignments: what may stand in it and what each takes.
// It reports unknown and repeated properties.
func (b *builder) body(what string, d declared, block *lang.Block, take map[string]func(r *reader)) bool {
	return readBody(b.reader, what, d, block, take)
}

func readBody(newReader func(declared) *reader, what string, d declared, block *lang.Block, take map[string]func(r *reader)) bool {
	ok := true
	seen := map[string]*lang.Stmt{}
	for _, s := range block.Stmts {
		r := newReader(declared{d.decl, s})
		if s.Broken {
			ok = false
			continue
		}
		value, assigned := s.Assigned()
		if assigned {
			r.args = value
		}
		f, known := take[s.Word]
		switch {
		case !known:
			var words []string
			for w := range take {
				words = append(words, w)
			}
			p := lang.Problem{Rule: "unknown-property", Span: s.Head, Message: "'" + s.Word + "' is nothing that " + lang.A(what) + " has"}
			near, sure := nearest(s.Word, words, 1)
			if len(near) > 0 {
				p.Message += "; did you mean " + near[0] + "?"
				p.Fixes = append(p.Fixes, lang.Replace("Write "+near[0], sure, s.Head, near[0]))
			} else {
				sortStrings(words)
				p.Notes = append(p.Notes, "it has "+lang.OrList(words))
			}
			r.problem(p)
		case !assigned:
			noSign(r)
		case seen[s.Word] != nil:
			twice(r, seen[s.Word])
		default:
			f(r)
			r.end()
		}
		if seen[s.Word] == nil {
			seen[s.Word] = s
		}
		ok = ok && !r.failed
	}
	return ok
}

// noSign is the problem of a property without the sign and the value, or the
// sign alone.
func noSign(r *reader) {
	s := r.stmt
	if len(s.Args) == 0 {
		r.problem(lang.Problem{Rule: "missing-value", Span: s.Line, Message: "'" + s.Word + "' has no value: " + s.Word + " = …"})
		return
	}
	if sign := s.Args[0]; sign.Kind == lang.CompareExpr && sign.Text == "==" {
		r.problem(lang.Problem{Rule: "wrong-form", Span: sign.Span, Message: "a value is given with one sign: " + s.Word + " = …",
			Fixes: []lang.Fix{lang.Replace("Write =", true, sign.Span, "=")}})
		return
	}
	r.problem(lang.Problem{Rule: "wrong-form", Span: s.Line, Message: "a sign = is missing: " + s.Word + " = …",
		Fixes: []lang.Fix{lang.Replace("Add the sign", true, lang.Span{Start: s.Head.End, End: s.Head.End}, " =")}})
}

func twice(r *reader, first *lang.Stmt) {
	r.problem(lang.Problem{Rule: "value-given-twice", Span: r.stmt.Line, Message: "'" + r.stmt.Word + "' is given twice",
		Related: []lang.Related{{Place: lang.Place{Decl: r.decl, Span: first.Line}, Message: "given here first"}}})
}
