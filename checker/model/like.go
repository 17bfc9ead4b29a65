package model

import (
	"slices"
	"strings"

	"kern/lang"
)

// takenOver moves a problem of a line that the member takes over to where it
// says so: the line is right where it stands. It is false when the line's own
// member has the same problem and reports it.
func (w *memberReader) takenOver(d lang.Diagnostic) (lang.Diagnostic, bool) {
	switch d.Rule {
	case "level-without-levels", "outside-the-member":
		if !w.ownHeight {
			return d, false
		}
	case "defined-by-itself": // a line about another member's result, which is this member's own
	default:
		return d, false
	}
	p := lang.Problem{Rule: d.Rule, Span: w.asSpan, Message: "a line that is taken over does not fit: " + d.Message,
		Related: []lang.Related{{Place: lang.Place{Decl: d.Decl, Span: d.Span}, Message: "the line"}}}
	return lang.Diagnostic{Decl: w.m.Decl, Problem: p}, true
}

// inherited gives the statements of the member: its own, and those of the
// member it is "as", unless it says anything with the same word.
func (w *memberReader) inherited(r *reader, s *lang.Stmt, depth int) []declared {
	var own []declared
	said := map[string]bool{}
	if s.Body != nil {
		for _, b := range s.Body.Stmts {
			own = append(own, declared{r.decl, b})
			said[sameWord(b.Word)] = true
		}
	}
	if _, ok := r.word("as"); !ok {
		return own
	}
	e := r.take()
	if e == nil || e.Kind != lang.NameExpr {
		r.fail("wrong-form", r.after(), "'as' names the member to be like")
		w.m.Missing = append(w.m.Missing, "the member to be like is not named")
		return own
	}
	n, ok := w.env.Names[e.Text]
	switch {
	case !ok || n.Kind != MemberName:
		r.problem(*w.env.unknownName(e, "member", []NameKind{MemberName}))
	case depth == 0 && w.circle(s) != "":
		r.fail("defined-by-itself", e.Span, "a member cannot be like itself: %s", w.circle(s))
	case slices.Contains(w.chain, n.Stmt):
		r.problem(*lang.Silent) // the circle is reported where it closes
	case depth >= maxLikeness:
		r.fail("defined-by-itself", e.Span, "more than %d members lean on one another in a row", maxLikeness)
	default:
		w.chain = append(w.chain, n.Stmt)
		if depth == 0 {
			w.asSpan, w.ownHeight = e.Span, said["height"]
		}
		w.m.Uses = append(w.m.Uses, n)
		if w.m.As == nil {
			w.m.As = n.Place.Decl
		}
		base := *r
		base.decl, base.stmt = n.Place.Decl, n.Stmt
		base.args = n.Stmt.Args[2*len(memberNames(n.Stmt))-1:]
		if len(base.args) > 0 && base.args[0].Kind == lang.StringExpr {
			base.args = base.args[1:]
		}
		from := w.inherited(&base, n.Stmt, depth+1)
		if n.Stmt.Broken || hurt(n.Place.Decl, n.Stmt) {
			w.m.Missing = append(w.m.Missing, "'"+e.Text+"' has an error")
		}
		if base.failed {
			r.failed = true
		}
		var out []declared
		for _, b := range from {
			if !said[sameWord(b.stmt.Word)] {
				out = append(out, b)
			}
		}
		return append(out, own...)
	}
	w.m.Missing = append(w.m.Missing, "the member to be like is not known")
	return own
}

// maxLikeness bounds how many members may lean on one another in a row.
const maxLikeness = 100

// circle writes the chain of members that leads from a member back to itself,
// "A → B → A"; "" when it does not.
func (w *memberReader) circle(s *lang.Stmt) string {
	seen := []*lang.Stmt{s}
	var names []string
	for len(seen) <= maxLikeness {
		last := seen[len(seen)-1]
		own := memberNames(last)
		i := slices.IndexFunc(last.Args, func(e *lang.Expr) bool { return e.Is("as") })
		if len(own) == 0 || i < 0 || i+1 >= len(last.Args) {
			return ""
		}
		if len(names) == 0 {
			names = append(names, own[0].Text)
		}
		n := w.env.Names[last.Args[i+1].Text]
		switch {
		case n == nil || n.Kind != MemberName:
			return ""
		case n.Stmt == s:
			if len(names) > 6 {
				names = append(names[:6], "…")
			}
			return strings.Join(append(names, names[0]), " → ")
		case slices.Contains(seen, n.Stmt):
			return "" // the circle lies further on
		}
		seen, names = append(seen, n.Stmt), append(names, n.Name)
	}
	return ""
}
